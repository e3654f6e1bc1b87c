// The charge ledger: cations against anions, every line and every sum printed so that a person can
// add them up.
#include <algorithm>
#include <cmath>
#include <cstddef>

#include "report/account.hpp"
#include "report/number_text.hpp"
#include "report/terminal_text.hpp"
#include "report/text_sections.hpp"
#include "report/text_table.hpp"

namespace ionledger {
namespace {

std::vector<TableColumn> columns_of(const std::string& side, const AccountUnit& unit) {
  return {{side, Align::left, true},
          {unit.prefix + "mol/kg", Align::right},
          {unit.prefix + "eq/kg", Align::right}};
}

void append_entry(std::vector<Piece>& cells,
                  const AccountSide& side,
                  std::size_t i,
                  const AccountUnit& unit) {
  if (i >= side.entries.size()) {
    cells.insert(cells.end(), 3, Piece{});
    return;
  }
  const AccountSide::Entry& entry = side.entries[i];
  cells.push_back({entry.name});
  cells.push_back(
      {entry.charges == 0 ? "" : std::to_string(entry.charges) + " × " + entry.molality});
  cells.push_back({unit.text(entry.steps)});
}

/// Cations on the left, anions on the right, as in an account.
TextTable account(const AccountSide& cations,
                  const AccountSide& anions,
                  const AccountUnit& unit,
                  bool closes) {
  std::vector<TableColumn> columns = columns_of("cations", unit);
  columns.push_back({"│"});
  for (const TableColumn& column : columns_of("anions", unit)) columns.push_back(column);
  TextTable table(columns);
  const std::size_t rows = std::max(cations.entries.size(), anions.entries.size());
  for (std::size_t i = 0; i < rows; ++i) {
    std::vector<Piece> cells;
    append_entry(cells, cations, i, unit);
    cells.push_back({"│", Ink::quiet});
    append_entry(cells, anions, i, unit);
    table.row(cells);
  }
  table.rule({2, 6});
  table.row({{"sum"},
             {},
             {unit.text(cations.sum), Ink::strong},
             {"│", Ink::quiet},
             {"sum"},
             {},
             {unit.text(anions.sum), Ink::strong}});
  if (closes) table.rule({2, 6}, true);
  return table;
}

/// One side below the other, for a page too narrow for an account.
TextTable column(const std::string& name,
                 const AccountSide& side,
                 const AccountUnit& unit,
                 bool closes) {
  TextTable table(columns_of(name, unit));
  for (std::size_t i = 0; i < side.entries.size(); ++i) {
    std::vector<Piece> cells;
    append_entry(cells, side, i, unit);
    table.row(cells);
  }
  table.rule({2});
  table.row({{"sum"}, {}, {unit.text(side.sum), Ink::strong}});
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
  const auto [unit, cations, anions, gap, closes] = account_of(state, page.shows_all());
  // Under a sum, a double rule says that it closes.
  page.heading("Charge ledger", "charge × molality per kg of water, rounded to add up");
  const TextTable both = account(cations, anions, unit, closes);
  if (both.natural_width() <= page.width()) {
    both.print(page);
  } else {
    column("cations", cations, unit, closes).print(page);
    column("anions", anions, unit, closes).print(page);
  }
  print_gap(page, state, (gap > 0 ? "+" : "") + unit.text(gap) + " " + unit.prefix + "eq/kg");
}

}  // namespace ionledger
