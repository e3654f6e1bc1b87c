// What a treatment step moved, as a table.
#include "report/number_text.hpp"
#include "report/text_sections.hpp"
#include "report/text_table.hpp"

namespace ionledger {
namespace {

void add_rows(const std::string& verb, const std::vector<Portion>& portions, TextTable& table) {
  for (const Portion& portion : portions) {
    table.row({{verb},
               {portion.what},
               {significant_text(portion.mg_per_l)},
               {portion.kg_per_h ? significant_text(*portion.kg_per_h) : no_number}});
    if (portion.mm_per_month) {
      table.note("grows " + significant_text(*portion.mm_per_month) +
                 " mm a month on the area given, if compact and all of it sticks");
    }
  }
}

}  // namespace

void print_step(TextPage& page, const AssessedState& state) {
  if (state.added.empty() && state.removed.empty() && state.deposited.empty()) return;
  page.heading("This step", "per litre of the water before it");
  TextTable table(
      {{"what"}, {"of", Align::left, true}, {"mg/L", Align::right}, {"kg/h", Align::right}});
  add_rows("added", state.added, table);
  add_rows("removed", state.removed, table);
  add_rows(state.solids_stay ? "formed" : "deposited", state.deposited, table);
  table.print(page);
}

}  // namespace ionledger
