// The charge ledger: cations against anions, every line and every sum printed so that a person can
// add them up.
#include <algorithm>
#include <cmath>
#include <cstddef>

#include "report/number_text.hpp"
#include "report/terminal_text.hpp"
#include "report/text_sections.hpp"
#include "report/text_table.hpp"

namespace ionledger {
namespace {

/// Ions below this share of their side are lumped into one line, unless everything is asked for.
constexpr double trace_share = 1e-3;
/// Significant digits of the larger sum: one more than an analysis defends, so that sums close.
constexpr int sum_digits = 5;
constexpr int most_decimals = 6;

/// The unit of a ledger and how many decimals it prints.
struct Scale {
  double per_unit = 1e3;  ///< Printed units in one mol or eq.
  std::string prefix = "m";
  int decimals = 3;
  [[nodiscard]] double step() const { return std::pow(10.0, -decimals) / per_unit; }
  [[nodiscard]] std::string text(long long steps) const {
    return fixed_text(double(steps) * std::pow(10.0, -decimals), decimals);
  }
};

/// One side of the account.
struct Side {
  struct Entry {
    std::string name;
    std::string amount;  ///< "2 × 3.2041"; empty for the lumped traces.
    long long steps = 0;
  };
  std::vector<Entry> entries;
  long long sum = 0;
};

std::vector<LedgerLine> lines_of(const AssessedState& state, bool cations) {
  std::vector<LedgerLine> lines;
  std::copy_if(state.ledger.begin(),
               state.ledger.end(),
               std::back_inserter(lines),
               [&](const LedgerLine& line) {
                 return (line.charge > 0) == cations && line.charge != 0 &&
                        std::isfinite(line.eq_per_kg);
               });
  return lines;
}

double sum_of(const std::vector<LedgerLine>& lines) {
  double sum = 0;
  for (const LedgerLine& line : lines) sum += std::abs(line.eq_per_kg);
  return sum;
}

Scale scale_for(double largest_sum) {
  Scale scale;
  if (largest_sum > 0 && largest_sum < 1e-5) scale = {1e6, "µ", 3};
  const double printed = largest_sum * scale.per_unit;
  if (printed <= 0) return scale;
  const int exponent = static_cast<int>(std::floor(std::log10(printed)));
  scale.decimals = std::clamp(sum_digits - 1 - exponent, 0, most_decimals);
  return scale;
}

Side side_of(const std::vector<LedgerLine>& lines, const Scale& scale, bool shows_all) {
  const double limit = shows_all ? 0.0 : trace_share * sum_of(lines);
  std::vector<double> terms;
  Side side;
  std::size_t traces = 0;
  double trace_sum = 0;
  for (const LedgerLine& line : lines) {
    const double equivalents = std::abs(line.eq_per_kg);
    if (equivalents < limit) {
      ++traces;
      trace_sum += equivalents;
      continue;
    }
    terms.push_back(equivalents);
    side.entries.push_back({line.species,
                            std::to_string(std::abs(line.charge)) + " × " +
                                fixed_text(line.molality * scale.per_unit, scale.decimals)});
  }
  if (traces > 0) {
    terms.push_back(trace_sum);
    side.entries.push_back({counted(traces, "trace", "traces"), ""});
  }
  const std::vector<long long> steps = apportioned(terms, scale.step());
  for (std::size_t i = 0; i < steps.size(); ++i) {
    side.entries[i].steps = steps[i];
    side.sum += steps[i];
  }
  return side;
}

std::vector<TableColumn> columns_of(const std::string& side, const Scale& scale) {
  return {{side, Align::left, true},
          {scale.prefix + "mol/kg", Align::right},
          {scale.prefix + "eq/kg", Align::right}};
}

void append_entry(std::vector<Piece>& cells, const Side& side, std::size_t i, const Scale& scale) {
  if (i >= side.entries.size()) {
    cells.insert(cells.end(), 3, Piece{});
    return;
  }
  const Side::Entry& entry = side.entries[i];
  cells.push_back({entry.name});
  cells.push_back({entry.amount});
  cells.push_back({scale.text(entry.steps)});
}

/// Cations on the left, anions on the right, as in an account.
TextTable account(const Side& cations, const Side& anions, const Scale& scale, bool closes) {
  std::vector<TableColumn> columns = columns_of("cations", scale);
  columns.push_back({"│"});
  for (const TableColumn& column : columns_of("anions", scale)) columns.push_back(column);
  TextTable table(columns);
  const std::size_t rows = std::max(cations.entries.size(), anions.entries.size());
  for (std::size_t i = 0; i < rows; ++i) {
    std::vector<Piece> cells;
    append_entry(cells, cations, i, scale);
    cells.push_back({"│", Ink::quiet});
    append_entry(cells, anions, i, scale);
    table.row(cells);
  }
  table.rule({2, 6});
  table.row({{"sum"},
             {},
             {scale.text(cations.sum), Ink::strong},
             {"│", Ink::quiet},
             {"sum"},
             {},
             {scale.text(anions.sum), Ink::strong}});
  if (closes) table.rule({2, 6}, true);
  return table;
}

/// One side below the other, for a page too narrow for an account.
TextTable column(const std::string& name, const Side& side, const Scale& scale, bool closes) {
  TextTable table(columns_of(name, scale));
  for (std::size_t i = 0; i < side.entries.size(); ++i) {
    std::vector<Piece> cells;
    append_entry(cells, side, i, scale);
    table.row(cells);
  }
  table.rule({2});
  table.row({{"sum"}, {}, {scale.text(side.sum), Ink::strong}});
  if (closes) table.rule({2}, true);
  return table;
}

void print_gap(TextPage& page, const AssessedState& state, const std::string& gap) {
  std::string text = "cations \u2212 anions = " + gap;
  if (balance_was_spent_on_ph(state)) {
    page.paragraph(text + ". The pH was taken from this balance, so it cannot test the analysis.");
    return;
  }
  if (!state.closed_by.empty()) {
    text += ", after " + state.closed_by + " was changed by " +
            signed_text(state.closing_change_mol_per_kg * 1e3, 3) +
            " mmol/kg. As reported it was " +
            signed_text(state.reported_imbalance_eq_per_kg * 1e3, 3) + " meq/kg";
  }
  text += ", " + signed_text(state.reported_imbalance_percent, 2) + " % of both sums; accepted: ±" +
          fixed_text(state.accepted_imbalance_percent, 2) + " %.";
  const bool accepted =
      is_accepted(state.reported_imbalance_percent, state.accepted_imbalance_percent);
  page.paragraph(text, 2, accepted ? Ink::strong : Ink::alarm);
}

}  // namespace

bool is_accepted(double imbalance_percent, double accepted_percent) {
  return std::abs(imbalance_percent) <= accepted_percent;
}

bool balance_was_spent_on_ph(const AssessedState& state) {
  return state.ph_from == "charge balance" && state.closed_by.empty();
}

void print_ledger(TextPage& page, const AssessedState& state) {
  const std::vector<LedgerLine> cation_lines = lines_of(state, true);
  const std::vector<LedgerLine> anion_lines = lines_of(state, false);
  const Scale scale = scale_for(std::max(sum_of(cation_lines), sum_of(anion_lines)));
  const Side cations = side_of(cation_lines, scale, page.shows_all());
  const Side anions = side_of(anion_lines, scale, page.shows_all());
  const long long gap = cations.sum - anions.sum;
  // Under a sum, a double rule says that it closes.
  const bool closes =
      gap == 0 || is_accepted(100.0 * double(gap) / double(cations.sum + anions.sum),
                              state.accepted_imbalance_percent);

  page.heading("Charge ledger", "charge × molality per kg of water, rounded to add up");
  const TextTable both = account(cations, anions, scale, closes);
  if (both.natural_width() <= page.width()) {
    both.print(page);
  } else {
    column("cations", cations, scale, closes).print(page);
    column("anions", anions, scale, closes).print(page);
  }
  print_gap(page, state, (gap > 0 ? "+" : "") + scale.text(gap) + " " + scale.prefix + "eq/kg");
}

}  // namespace ionledger
