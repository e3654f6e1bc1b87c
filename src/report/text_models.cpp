// What is inside the models: the overview, and which pages answer to a name.
#include <algorithm>
#include <cstddef>

#include "ionledger/report.hpp"
#include "report/number_text.hpp"
#include "report/text_page.hpp"
#include "report/text_table.hpp"
#include "report/text_topics.hpp"

namespace ionledger {
namespace {

void print_set(TextPage& page, const Models& models) {
  const Chemistry& chemistry = models.chemistry;
  const auto pairs = static_cast<std::size_t>(
      std::count_if(chemistry.species.begin(), chemistry.species.end(), [](const Species& species) {
        return species.is_pair;
      }));
  page.line({{chemistry.name, Ink::strong}});
  page.line({{chemistry.digest, Ink::quiet}});
  page.rule(true);
  page.paragraph(counted(chemistry.species.size(), "species", "species") + " (" +
                 std::to_string(chemistry.n_basis) + " of them the basis, " +
                 counted(pairs, "pair", "pairs") + "), " +
                 counted(chemistry.minerals.size(), "mineral", "minerals") + ", " +
                 counted(chemistry.gases.size(), "gas", "gases") + ", " +
                 counted(chemistry.constituents.size(), "constituent", "constituents") +
                 " of a laboratory report, " +
                 counted(models.activity_models.size(), "activity model", "activity models") +
                 ", " + counted(chemistry.sources.size(), "source", "sources") + ".");
  page.paragraph("\"ionledger models NAME\" tells everything about one of them.");
}

std::string half_width_of(const EquilibriumConstant& constant) {
  return "±" + fixed_text(half_width_95 * constant.uncertainty, 2);
}

void print_minerals(TextPage& page, const Chemistry& chemistry) {
  page.heading("Minerals", "log10 K of dissolution at 25 °C; ± is 95 %");
  TextTable table({{"mineral"},
                   {"formula", Align::left, true},
                   {"log10 K", Align::right},
                   {"±", Align::right},
                   {"valid, °C"},
                   {""}});
  for (const Mineral& mineral : chemistry.minerals) {
    table.row({{mineral.name},
               {mineral.formula},
               {fixed_text(mineral.constant.log10_k, 2)},
               {half_width_of(mineral.constant), Ink::quiet},
               {range_text(mineral.constant.valid)},
               {mineral.is_common_scale ? "" : "rare", Ink::quiet}});
  }
  table.print(page);
}

void print_species(TextPage& page, const Chemistry& chemistry) {
  const auto first = chemistry.species.begin();
  std::string basis;
  for (auto it = first; it != first + chemistry.n_basis; ++it) {
    basis += (basis.empty() ? "" : ", ") + it->name;
  }
  page.heading("Species", "log10 K at 25 °C of the reaction as published");
  page.paragraph("Basis: " + basis + ".");
  TextTable table({{"species"},
                   {"reaction", Align::left, true},
                   {"log10 K", Align::right},
                   {"±", Align::right},
                   {"valid, °C"}});
  for (auto it = first + chemistry.n_basis; it != chemistry.species.end(); ++it) {
    table.row({{it->name},
               {it->reaction_text},
               {fixed_text(it->constant.log10_k, 3)},
               {half_width_of(it->constant), Ink::quiet},
               {range_text(it->constant.valid)}});
  }
  table.print(page);
}

void print_gases(TextPage& page, const Chemistry& chemistry) {
  page.heading("Gases", "log10 K of dissolution at 25 °C");
  TextTable table({{"gas", Align::left, true},
                   {"formula"},
                   {"log10 K", Align::right},
                   {"±", Align::right},
                   {"per"},
                   {"valid, °C"}});
  for (const Gas& gas : chemistry.gases) {
    table.row({{gas.name},
               {gas.formula},
               {fixed_text(gas.constant.log10_k, 3)},
               {half_width_of(gas.constant), Ink::quiet},
               {gas.bar_per_unit == 1 ? "bar" : "atm"},
               {range_text(gas.constant.valid)}});
  }
  table.print(page);
}

void print_words(TextPage& page, const Models& models) {
  page.heading("Constituents", "words of a laboratory report");
  std::string words;
  for (const Constituent& constituent : models.chemistry.constituents) {
    words += (words.empty() ? "" : ", ") + constituent.name;
  }
  page.paragraph(words);
  page.heading("Activity models", "trusted up to, mol/kg");
  TextTable table({{"name"}, {"up to", Align::right}, {"title", Align::left, true}});
  for (const ActivityModel& model : models.activity_models) {
    const bool is_default = model.name == models.default_activity_model;
    table.row({{model.name, is_default ? Ink::strong : Ink::plain},
               {plain_text(model.max_ionic_strength_molal)},
               {(is_default ? "(default) " : "") + model.title}});
  }
  table.print(page);
}

}  // namespace

std::string text_models(const Models& models, const std::string& topic, const TextStyle& style) {
  TextPage page(style);
  if (topic.empty()) {
    print_set(page, models);
    print_minerals(page, models.chemistry);
    print_species(page, models.chemistry);
    print_gases(page, models.chemistry);
    print_words(page, models);
    return std::move(page).text();
  }
  // One name can mean several things: "CO2" is a species and a symbol of inorganic carbon.
  bool found = false;
  for (const auto print : {print_species_topic,
                           print_mineral_topic,
                           print_gas_topic,
                           print_constituent_topic,
                           print_activity_topic,
                           print_source_topic}) {
    found = print(page, models, topic) || found;
  }
  return found ? std::move(page).text() : std::string();
}

}  // namespace ionledger
