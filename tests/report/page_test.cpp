// The page: well-formed, complete by itself, deaf to hostile text, and without a number that the
// assessment does not have.
#include <algorithm>
#include <cctype>
#include <cmath>
#include <nlohmann/json.hpp>
#include <regex>
#include <string>
#include <vector>

#include "ionledger/report.hpp"
#include "report/example_assessment.hpp"
#include "report/html_writer.hpp"
#include "report/plot.hpp"
#include "support/compare.hpp"

using namespace ionledger;
using ionledger::testing::example_assessment;
using ionledger::testing::within;
using Json = nlohmann::ordered_json;

namespace {

/// The first mistake of a text that ought to be XML after its document type; empty when it is.
std::string mistake_of_xml(const std::string& text) {
  std::vector<std::string> open;
  for (std::size_t at = text.find('<'); at != std::string::npos; at = text.find('<', at + 1)) {
    const std::size_t end = text.find('>', at);
    if (end == std::string::npos) return "a tag without an end";
    const std::string tag = text.substr(at + 1, end - at - 1);
    if (tag.rfind("!DOCTYPE", 0) == 0 || tag.back() == '/') continue;
    if (std::count(tag.begin(), tag.end(), '"') % 2 != 0) return "an open quotation in " + tag;
    if (tag.front() != '/') {
      open.push_back(tag.substr(0, tag.find(' ')));
    } else if (open.empty() || open.back() != tag.substr(1)) {
      return "</" + tag.substr(1) + "> closes " + (open.empty() ? "nothing" : open.back());
    } else {
      open.pop_back();
    }
  }
  return open.empty() ? "" : open.back() + " is never closed";
}

std::string replaced(std::string text, const std::string& what, const std::string& by) {
  for (std::size_t at = text.find(what); at != std::string::npos && !what.empty();
       at = text.find(what, at + by.size())) {
    text.replace(at, what.size(), by);
  }
  return text;
}

/// What a reader sees, with scales of pictures, numbers of headings and the style sheet left out.
std::string visible_text(std::string html) {
  const auto cut = [&](const std::string& from, const std::string& to) {
    for (std::size_t at = html.find(from); at != std::string::npos; at = html.find(from, at)) {
      html.erase(at, html.find(to, at) + to.size() - at);
    }
  };
  cut("<style>", "</style>");
  cut("<g class=\"axis\">", "</g>");
  cut("<span class=\"no\">", "</span>");
  std::string text;
  for (std::size_t at = 0; at < html.size(); ++at) {
    if (html[at] == '<') {
      at = html.find('>', at);
      text += '\n';
    } else {
      text += html[at];
    }
  }
  for (const auto& [entity, character] : std::vector<std::pair<std::string, std::string>>{
           {"&lt;", "<"}, {"&gt;", ">"}, {"&quot;", "\""}, {"&amp;", "&"}}) {
    text = replaced(text, entity, character);
  }
  return text;
}

/// Numbers of the assessment, and its texts, which may hold numbers of their own.
void collect(const Json& json, std::vector<double>& numbers, std::vector<std::string>& texts) {
  if (json.is_number()) numbers.push_back(json.get<double>());
  if (json.is_string()) texts.push_back(json.get<std::string>());
  if (!json.is_structured()) return;
  if (json.is_array()) numbers.push_back(double(json.size()));
  for (const auto& item : json) collect(item, numbers, texts);
}

/// Numbers printed with a decimal point or a power of ten, and half of their last digit.
struct Printed {
  double value, half_digit;
};

std::vector<Printed> printed_numbers(std::string text) {
  text = replaced(text, "\u202F", "");
  text = replaced(text, "\u2212", "-");
  text = replaced(text, " × 10", "e");
  const std::vector<std::string> above = {"⁰", "¹", "²", "³", "⁴", "⁵", "⁶", "⁷", "⁸", "⁹"};
  // Charges of ions stand above too; only behind "e" or "e⁻" are they exponents.
  text = replaced(text, "e⁻", "e-");
  for (int pass = 0; pass < 3; ++pass) {
    for (std::size_t d = 0; d < above.size(); ++d) {
      const std::string digit = std::to_string(d);
      text = std::regex_replace(text, std::regex("(e-?\\d*)" + above[d]), "$01" + digit);
    }
  }
  std::vector<Printed> found;
  const std::regex number("[-+]?\\d+(\\.(\\d+))?(e-?\\d+)?");
  for (std::sregex_iterator it(text.begin(), text.end(), number), end; it != end; ++it) {
    const std::size_t decimals = (*it)[2].str().size();
    const bool has_exponent = (*it)[3].matched;
    if (decimals == 0 && !has_exponent) continue;  // charges, coefficients, counts
    const double power = has_exponent ? std::stod("1" + (*it)[3].str()) : 1.0;
    found.push_back({std::stod(it->str()), 0.5 * power * std::pow(10.0, -double(decimals))});
  }
  return found;
}

/// Numbers printed that are none of the assessment's, as they are, in thousandths, as a half width
/// of 95 %, or as the sum of the traces of one side.
std::vector<double> strangers(const Assessment& assessment) {
  std::vector<double> numbers;
  std::vector<std::string> texts;
  collect(Json::parse(json_report(assessment)), numbers, texts);
  for (const AssessedState& state : assessment.states) {
    for (const int sign : {1, -1}) {
      const double side = sign > 0 ? state.cations_eq_per_kg : state.anions_eq_per_kg;
      double traces = 0;
      for (const LedgerLine& line : state.ledger) {
        const double eq = sign * line.eq_per_kg;
        if (eq > 0 && eq < 1e-3 * side) traces += eq;
      }
      numbers.push_back(traces);
    }
  }
  std::string text = visible_text(html_report(assessment));
  std::sort(
      texts.begin(), texts.end(), [](const auto& a, const auto& b) { return a.size() > b.size(); });
  for (const std::string& known : texts) {
    if (known.size() > 3) text = replaced(text, known, "");
  }
  std::vector<double> unknown;
  for (const Printed& printed : printed_numbers(text)) {
    const bool is_known = std::any_of(numbers.begin(), numbers.end(), [&](double number) {
      // A term of a sum may be rounded the other way so that the sum closes: up to a whole digit.
      const double slack = 2.1 * printed.half_digit;
      return std::abs(std::abs(number) - std::abs(printed.value)) <= slack ||
             std::abs(1e3 * std::abs(number) - std::abs(printed.value)) <= slack ||
             std::abs(1.96 * number - printed.value) <= slack;
    });
    if (!is_known) unknown.push_back(printed.value);
  }
  return unknown;
}

Assessment example_train() {
  Assessment assessment = example_assessment();
  AssessedState next = assessment.states.front();
  next.name = "acid";
  next.ph = 6.914;
  next.minerals[0].saturation_index = -0.377;
  next.added = {{"sulfuric acid 96 %", {}, 0, 2e-5, 19.87, 1.234, {}}};
  next.deposited = {{"calcite", {}, 1e-4, 1e-5, 9.876, {}, 0.123}};
  assessment.states.push_back(next);
  next.name = "acid_permeate";
  assessment.states.push_back(next);
  return assessment;
}

}  // namespace

TEST_SUITE("report/page") {
  TEST_CASE("A page is well-formed, with one state or several") {
    CHECK(mistake_of_xml(html_report(example_assessment())) == "");
    CHECK(mistake_of_xml(html_report(example_train())) == "");
    CHECK(mistake_of_xml(html_report(Assessment{})) == "");
    Assessment bare;
    bare.states.emplace_back();
    CHECK(mistake_of_xml(html_report(bare)) == "");
  }

  TEST_CASE("Every number on a page is one of the assessment") {
    for (const double stranger : strangers(example_train())) {
      INFO(stranger);
      CHECK(false);
    }
    CHECK(printed_numbers(visible_text(html_report(example_train()))).size() > 150);
  }

  TEST_CASE("Nothing on a page is fetched and nothing runs") {
    const std::string page = html_report(example_train());
    for (const char* word : {"http:", "https:", "src=", "href=", "@import", "<script", "<link"}) {
      INFO(word);
      CHECK(page.find(word) == std::string::npos);
    }
    // The one url() is the hatching drawn in the page itself.
    CHECK(replaced(page, "url(#hatching)", "").find("url(") == std::string::npos);
  }

  TEST_CASE("Text of a user stays text") {
    Assessment assessment = example_train();
    assessment.title = "<script>alert(\"1\")</script> & \x01";
    assessment.states[0].cautions[0].says = "</li><img src=x>";
    assessment.states[0].totals[0].as_written = "\"><b>";
    assessment.states[1].name = "<i>acid</i>";
    const std::string page = html_report(assessment);
    CHECK(mistake_of_xml(page) == "");
    CHECK(page.find("<script") == std::string::npos);
    CHECK(page.find("<img") == std::string::npos);
    CHECK(page.find("<i>") == std::string::npos);
    CHECK(page.find('\x01') == std::string::npos);
    CHECK(page.find("&lt;script&gt;alert(&quot;1&quot;)&lt;/script&gt; &amp;") !=
          std::string::npos);
  }

  TEST_CASE("Every picture has a title and a description, and every id is given once") {
    const std::string page = html_report(example_train());
    std::vector<std::string> ids;
    const std::regex id(" id=\"([^\"]+)\"");
    for (std::sregex_iterator it(page.begin(), page.end(), id), end; it != end; ++it) {
      ids.push_back((*it)[1].str());
    }
    std::sort(ids.begin(), ids.end());
    CHECK(std::adjacent_find(ids.begin(), ids.end()) == ids.end());
    const std::regex picture("role=\"img\" aria-labelledby=\"(\\S+) (\\S+)\"");
    std::size_t pictures = 0;
    for (std::sregex_iterator it(page.begin(), page.end(), picture), end; it != end; ++it) {
      ++pictures;
      CHECK(std::binary_search(ids.begin(), ids.end(), (*it)[1].str()));
      CHECK(std::binary_search(ids.begin(), ids.end(), (*it)[2].str()));
    }
    CHECK(pictures >= 6);
  }

  TEST_CASE("A balance that fails is the first thing the verdict says") {
    Assessment assessment = example_assessment();
    assessment.states[0].reported_imbalance_percent = 12.3;
    const std::string page = html_report(assessment);
    const std::size_t fails = page.find("The analysis does not balance: +12.30 %");
    REQUIRE(fails != std::string::npos);
    CHECK(fails < page.find("would form"));
  }

  TEST_CASE("Axes end at ticks of 1, 2 or 5, four to seven of them") {
    for (const double high : {0.013, 0.9, 1.0, 3.7, 9.0, 14.0, 260.0}) {
      const PlotAxis axis = axis_around(-0.4 * high, high);
      const PlotTicks ticks = ticks_of(axis);
      INFO(high);
      CHECK(ticks.values.size() >= 4);
      CHECK(ticks.values.size() <= 8);
      CHECK(ticks.values.front() == within(axis.low, 1e-9 * high));
      CHECK(ticks.values.back() == within(axis.high, 1e-9 * high));
    }
  }

  TEST_CASE("Formulas are printed as chemists write them") {
    CHECK(typeset_formula("SO4-2") == "SO₄²⁻");
    CHECK(typeset_formula("Na+") == "Na⁺");
    CHECK(typeset_formula("Al(OH)4-") == "Al(OH)₄⁻");
    CHECK(typeset_formula("CaSO4(H2O)2") == "CaSO₄(H₂O)₂");
    CHECK(typeset_formula("").empty());
  }
}
