// The ion balance of a report before anything is solved: cations and anions in two columns, as in a
// cash book.
#include <cmath>
#include <cstddef>
#include <numeric>

#include "ionledger/report.hpp"
#include "report/number_text.hpp"
#include "report/text_page.hpp"
#include "report/text_sections.hpp"
#include "report/text_table.hpp"

namespace ionledger {
namespace {

constexpr int decimals = 3;  ///< Of a meq/kg: 1e-6 eq/kg.
constexpr double step_eq = 1e-6;

std::string in_meq(long long steps) { return fixed_text(double(steps) * step_eq * 1e3, decimals); }

/// One column of the book: what each line of the report puts into it, and the sum of those.
struct BookColumn {
  std::vector<std::string> cells;
  long long sum = 0;
};

BookColumn column_of(const ReportBalance& balance, double sign) {
  std::vector<double> terms;
  for (const ReportBalance::Line& line : balance.lines) {
    terms.push_back(line.eq_per_kg * sign > 0 ? line.eq_per_kg * sign : 0.0);
  }
  const std::vector<long long> steps = apportioned(terms, step_eq);
  BookColumn column;
  for (std::size_t i = 0; i < terms.size(); ++i) {
    column.cells.push_back(terms[i] > 0 ? in_meq(steps[i]) : "");
  }
  column.sum = std::accumulate(steps.begin(), steps.end(), 0LL);
  return column;
}

void print_book(TextPage& page, const ReportBalance& balance, bool accepted) {
  TextTable table({{"constituent", Align::left, true},
                   {"as written", Align::left, true},
                   {"mmol/kg", Align::right},
                   {"cations, meq/kg", Align::right},
                   {"anions, meq/kg", Align::right}});
  const BookColumn cations = column_of(balance, 1.0);
  const BookColumn anions = column_of(balance, -1.0);
  for (std::size_t i = 0; i < balance.lines.size(); ++i) {
    const ReportBalance::Line& line = balance.lines[i];
    table.row({{line.constituent},
               {line.as_written},
               {significant_text(line.mol_per_kg * 1e3, 4)},
               {cations.cells[i]},
               {anions.cells[i]}});
  }
  table.rule({3, 4});
  table.row(
      {{"sum"}, {}, {}, {in_meq(cations.sum), Ink::strong}, {in_meq(anions.sum), Ink::strong}});
  // Under a sum, a double rule says that it closes.
  if (accepted) table.rule({3, 4}, true);
  table.print(page);
  const long long gap = cations.sum - anions.sum;
  page.line({{"  cations \u2212 anions = "},
             {signed_text(double(gap) * step_eq * 1e3, decimals), Ink::strong},
             {" meq/kg"}});
}

}  // namespace

std::string text_balance(const ReportBalance& balance,
                         const std::string& title,
                         const TextStyle& style) {
  TextPage page(style);
  const bool accepted = is_accepted(balance.imbalance_percent, balance.accepted_percent);
  page.line({{title.empty() ? "Untitled stream" : title, Ink::strong}});
  page.rule(true);
  page.paragraph(
      std::string(accepted ? "The analysis balances: " : "The analysis does not balance: ") +
          signed_text(balance.imbalance_percent, 2) + " % of both sums, accepted ±" +
          fixed_text(balance.accepted_percent, 2) + " %.",
      2,
      accepted ? Ink::strong : Ink::alarm);
  page.heading("Ion balance of the report", "per kg of water");
  print_book(page, balance, accepted);
  page.paragraph(
      "Nothing is solved here: each constituent counts with the charge it has near neutral pH.",
      2,
      Ink::quiet);
  print_cautions(page, balance.cautions, false);
  return std::move(page).text();
}

}  // namespace ionledger
