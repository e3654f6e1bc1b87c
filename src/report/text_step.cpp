// What a treatment step moved, as a table.
#include <algorithm>

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

void print_train(TextPage& page, const std::vector<AssessedState>& states) {
  page.heading("Train", "the mineral with the highest index among common scales");
  TextTable table({{"state"},
                   {"°C", Align::right},
                   {"pH", Align::right},
                   {"ionic strength", Align::right},
                   {"index", Align::right},
                   {"of", Align::left, true},
                   {"deposit, mg/L", Align::right}});
  for (const AssessedState& state : states) {
    const auto worst =
        std::find_if(state.minerals.begin(), state.minerals.end(), [](const MineralLine& mineral) {
          return mineral.is_common_scale;
        });
    const bool has_scale = worst != state.minerals.end();
    double deposit = 0;
    for (const Portion& portion : state.deposited) deposit += portion.mg_per_l;
    table.row({{state.name},
               {significant_text(state.temperature_degc, 3)},
               {fixed_text(state.ph, 2)},
               {significant_text(state.ionic_strength, 3)},
               {has_scale ? signed_text(worst->saturation_index, 2) : ""},
               {has_scale ? worst->mineral : ""},
               {deposit > 0 ? significant_text(deposit, 3) : ""}});
  }
  table.print(page);
}

}  // namespace ionledger
