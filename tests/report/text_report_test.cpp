// The terminal report on an assessment made by hand: width, colour, sums and completeness.
#include <algorithm>
#include <cmath>
#include <sstream>
#include <string>
#include <vector>

#include "ionledger/report.hpp"
#include "report/example_assessment.hpp"
#include "report/terminal_text.hpp"
#include "support/compare.hpp"

using namespace ionledger;
using ionledger::testing::example_assessment;
using ionledger::testing::within;

namespace {

std::vector<std::string> lines_of(const std::string& text) {
  std::vector<std::string> lines;
  std::istringstream stream(text);
  for (std::string line; std::getline(stream, line);) lines.push_back(line);
  return lines;
}

int widest(const std::string& text) {
  int width = 0;
  for (const std::string& line : lines_of(text)) width = std::max(width, display_width(line));
  return width;
}

bool holds(const std::string& text, const std::string& part) {
  return text.find(part) != std::string::npos;
}

TextStyle style(int width, bool all, bool colour) {
  TextStyle result;
  result.width = width;
  result.all = all;
  result.colour = colour;
  return result;
}

/// `text` without ANSI sequences.
std::string without_colour(std::string text) {
  for (std::size_t at = text.find('\x1b'); at != std::string::npos; at = text.find('\x1b')) {
    text.erase(at, text.find('m', at) + 1 - at);
  }
  return text;
}

/// The numbers of a ledger line: what stands in column "meq/kg" of both sides, NaN where nothing.
struct LedgerRow {
  double cation = std::nan("");
  double anion = std::nan("");
};

double last_number(const std::string& side) {
  std::istringstream stream(side);
  std::string word, last;
  while (stream >> word) last = word;
  return last.empty() || last.find_first_not_of("0123456789.") != std::string::npos
             ? std::nan("")
             : std::stod(last);
}

std::vector<LedgerRow> ledger_rows(const std::string& report) {
  std::vector<LedgerRow> rows;
  const std::string bar = "│";
  bool inside = false;
  for (const std::string& line : lines_of(report)) {
    if (holds(line, "Charge ledger")) inside = true;
    if (holds(line, "Minerals")) inside = false;
    const std::size_t at = line.find(bar);
    if (!inside || at == std::string::npos || holds(line, "cations")) continue;
    rows.push_back({last_number(line.substr(0, at)), last_number(line.substr(at + bar.size()))});
  }
  return rows;
}

ReportBalance example_balance() {
  ReportBalance balance;
  balance.lines = {{"calcium", "96 mg/L", 2.39533e-3, 4.79066e-3},
                   {"sodium", "40 mg/L", 1.73992e-3, 1.73992e-3},
                   {"alkalinity", "212 mg/L as CaCO3", 4.23636e-3, -4.23636e-3},
                   {"chloride", "62 mg/L", 1.74882e-3, -1.74882e-3},
                   {"silica", "14 mg/L as SiO2", 0.233e-3, 0}};
  balance.cations_eq_per_kg = 6.53058e-3;
  balance.anions_eq_per_kg = 5.98518e-3;
  balance.imbalance_percent = 4.3577;
  balance.accepted_percent = 2;
  balance.cautions = {{"ion balance", "Check the analysis before you trust it."}};
  return balance;
}

}  // namespace

TEST_SUITE("report/text_report") {
  TEST_CASE("No line is wider than asked for, whatever the width") {
    Assessment assessment = example_assessment();
    assessment.title = std::string(200, 'x') + " 水水水 °C";
    assessment.states[0].minerals[0].mineral = std::string(90, 'm');
    for (const int width : {20, 33, 50, 72, 80, 120}) {
      for (const bool all : {false, true}) {
        CAPTURE(width);
        CHECK(widest(text_report(assessment, style(width, all, false))) <= width);
      }
    }
  }

  TEST_CASE("Without colour no escape is printed, even when the title holds one") {
    Assessment assessment = example_assessment();
    assessment.title = "\x1b[31mred\x07";
    assessment.states[0].cautions.push_back({"\x1b[2J", "\x1b]0;title\x07 \u009b31m"});
    const std::string text = text_report(assessment, style(80, true, false));
    for (const char c : text) CHECK((static_cast<unsigned char>(c) >= 0x20 || c == '\n'));
    CHECK_FALSE(holds(text, "\u009b"));
  }

  TEST_CASE("Colour changes no character and no column") {
    const Assessment assessment = example_assessment();
    const std::string plain = text_report(assessment, style(80, false, false));
    const std::string coloured = text_report(assessment, style(80, false, true));
    CHECK(holds(coloured, "\x1b["));
    CHECK(without_colour(coloured) == plain);
  }

  TEST_CASE("The printed ledger adds up to the printed sums") {
    for (const bool all : {false, true}) {
      const auto rows = ledger_rows(text_report(example_assessment(), style(80, all, false)));
      REQUIRE(rows.size() >= 4);
      double cations = 0, anions = 0;
      for (std::size_t i = 0; i + 1 < rows.size(); ++i) {
        if (!std::isnan(rows[i].cation)) cations += rows[i].cation;
        if (!std::isnan(rows[i].anion)) anions += rows[i].anion;
      }
      // Less than half a step of the three printed decimals: the printed numbers agree exactly.
      CHECK(rows.back().cation == within(cations, 4e-4));
      CHECK(rows.back().anion == within(anions, 4e-4));
      CHECK(rows.back().cation == within(12.12046, 6e-4));  // of the state, in meq/kg
    }
  }

  TEST_CASE("A double rule stands under sums that close, and only there") {
    Assessment assessment = example_assessment();
    const auto double_rules = [&] {
      const auto lines = lines_of(text_report(assessment, style(80, false, false)));
      return std::count_if(
          lines.begin(), lines.end(), [](const std::string& line) { return holds(line, "══"); });
    };
    CHECK(double_rules() == 2);  // under the title, and under the sums
    assessment.states[0].accepted_imbalance_percent = 0.1;
    CHECK(double_rules() == 1);
  }

  TEST_CASE("The verdict says when the analysis does not balance") {
    Assessment assessment = example_assessment();
    CHECK(holds(text_report(assessment, {}), "balances: +0.46 %, accepted ±5.00 %"));
    assessment.states[0].reported_imbalance_percent = -12.3;
    CHECK(holds(text_report(assessment, {}), "does not balance: \u221212.30 %, accepted ±5.00 %"));
  }

  TEST_CASE("A balance that gave the pH is not called a test of the analysis") {
    Assessment assessment = example_assessment();
    assessment.states[0].ph_from = "charge balance";
    CHECK(holds(text_report(assessment, {}), "not tested"));
    CHECK_FALSE(holds(text_report(assessment, {}), "balances: "));
    assessment.states[0].closed_by = "sodium";
    CHECK(holds(text_report(assessment, {}), "after sodium was changed by"));
  }

  TEST_CASE("The pH says where it comes from, and the temperature of the meter if it differs") {
    Assessment assessment = example_assessment();
    AssessedState& state = assessment.states[0];
    CHECK(holds(text_report(assessment, {}), "8.25 at this temperature; 8.25 measured at 25 °C"));
    state.measured_ph_degc = state.temperature_degc;
    CHECK(holds(text_report(assessment, {}), "8.25, measured\n"));
    state.ph_from = "alkalinity and inorganic carbon";
    CHECK(holds(text_report(assessment, {}), "8.25, from alkalinity and inorganic carbon; 8.25"));
    state.measured_ph.reset();
    CHECK(holds(text_report(assessment, {}), "8.25, from alkalinity and inorganic carbon\n"));
  }

  TEST_CASE("A subject with two cautions is named once in the verdict") {
    Assessment assessment = example_assessment();
    assessment.states[0].cautions.push_back({"phosphate", "Third."});
    CHECK(holds(text_report(assessment, {}), "3 cautions below: temperature, phosphate\n"));
  }

  TEST_CASE("Minerals are named by what they would do") {
    const std::string text = text_report(example_assessment(), style(80, false, false));
    const auto lines = lines_of(text);
    const auto line_with = [&](const std::string& name) {
      const auto found = std::find_if(lines.begin(), lines.end(), [&](const std::string& line) {
        return line.rfind("  " + name, 0) == 0;
      });
      return found == lines.end() ? std::string() : *found;
    };
    CHECK(holds(line_with("calcite"), "+0.95  ±0.04"));  // 1.96 times 0.02
    CHECK(holds(line_with("calcite"), "would form"));
    CHECK(holds(line_with("brucite"), "near saturation"));
    CHECK(holds(line_with("gypsum"), "dissolves"));
    CHECK(holds(line_with("hydroxyapatite"), "past saturation"));
    CHECK(holds(text, "The usual hard scale."));
    CHECK_FALSE(holds(text, "Above 40 degC less."));
  }

  TEST_CASE("What is left out is counted, and --all leaves nothing out") {
    const std::string some = text_report(example_assessment(), style(80, false, false));
    const std::string all = text_report(example_assessment(), style(80, true, false));
    CHECK(holds(some, "Left out: 2 minerals"));
    CHECK(holds(some, "Left out: 2 species"));
    CHECK(holds(some, "Left out: 1 gas"));
    CHECK_FALSE(holds(some, "celestite"));
    CHECK_FALSE(holds(all, "Left out"));
    for (const char* name : {"celestite", "magnesite", "H+", "OH-", "ammonia"}) {
      CAPTURE(name);
      CHECK(holds(all, std::string("  ") + name));
    }
  }

  TEST_CASE("Indices are listed by title, and --all shows formula, inputs and what is missing") {
    const std::string some = text_report(example_assessment(), style(80, false, false));
    const std::string all = text_report(example_assessment(), style(80, true, false));
    CHECK(holds(some, "Langelier saturation index"));
    CHECK(holds(some, "0.96"));
    CHECK(holds(some, "31.3 mg/L as CaCO3"));
    CHECK(holds(some, "Left out: 1 index"));
    CHECK_FALSE(holds(some, "Ryznar"));
    CHECK(holds(all, "pH - pHs; Langelier 1936"));
    CHECK(holds(all, "from pH 8.25, calcium 0.00330 mol/L"));
    CHECK(holds(all, "missing: calcium"));
  }

  TEST_CASE("Every caution is there, whole, and so is the last word on authority") {
    const Assessment assessment = example_assessment();
    const std::string text = text_report(assessment, style(80, false, false));
    std::string flowing;
    for (const std::string& line : lines_of(text)) {
      flowing += line.substr(std::min(line.find_first_not_of(' '), line.size())) + " ";
    }
    for (const Caution& caution : assessment.states[0].cautions) {
      CHECK(holds(flowing, caution.says));
      CHECK(holds(text, "  " + caution.about));
    }
    CHECK(holds(text, "licensed engineer's judgement come first"));
  }

  TEST_CASE("A number that does not exist is a dash, never nan") {
    Assessment assessment = example_assessment();
    AssessedState& state = assessment.states[0];
    const double nan = std::nan("");
    state.ph = state.ionic_strength = state.water_activity = state.density_kg_per_l = nan;
    state.imbalance_percent = state.reported_imbalance_percent = nan;
    state.minerals[0].saturation_index = nan;
    state.ledger[0].eq_per_kg = nan;
    state.species[0].molality = nan;
    const std::string text = text_report(assessment, style(80, true, false));
    CHECK_FALSE(holds(text, "nan"));
    CHECK_FALSE(holds(text, "inf"));
    CHECK(holds(text, "not known"));
  }

  TEST_CASE("A state with nothing in it still makes a report") {
    Assessment empty;
    empty.states.emplace_back();
    const std::string text = text_report(empty, style(80, false, false));
    CHECK(holds(text, "Untitled stream"));
    CHECK(holds(text, "no common scale can form"));
    CHECK(widest(text) <= 80);
  }
}

TEST_SUITE("report/text_balance") {
  TEST_CASE("Sums, gap, acceptance and cautions of a report are printed") {
    const std::string text = text_balance(example_balance(), "Well 3", style(80, false, false));
    CHECK(holds(text, "does not balance: +4.36 % of both sums, accepted ±2.00 %"));
    CHECK(holds(text, "6.531"));
    CHECK(holds(text, "5.985"));
    CHECK(holds(text, "+0.546"));  // of the printed sums
    CHECK(holds(text, "14 mg/L as SiO2"));
    CHECK(holds(text, "Check the analysis before you trust it."));
    CHECK(widest(text) <= 80);
    CHECK(widest(text_balance(example_balance(), std::string(99, 'w'), style(40, false, false))) <=
          40);
  }
}
