// One page each on a species, mineral, gas, constituent, activity model or source.
#include "report/text_topics.hpp"

#include <algorithm>
#include <cstddef>

#include "report/number_text.hpp"
#include "report/text_constant.hpp"
#include "report/text_table.hpp"

namespace ionledger {
namespace {

std::string joined(const std::vector<std::string>& words) {
  std::string text;
  for (const std::string& word : words) text += (text.empty() ? "" : ", ") + word;
  return text;
}

/// Names of the items for which `is_meant` holds.
template <class Items, class Condition>
std::vector<std::string> names_where(const Items& items, Condition is_meant) {
  std::vector<std::string> names;
  for (const auto& item : items) {
    if (is_meant(item)) names.push_back(item.name);
  }
  return names;
}

void print_names(TextPage& page, const std::string& label, const std::vector<std::string>& names) {
  if (!names.empty()) page.labelled(label, joined(names));
}

std::string form_text(ActivityForm form) {
  switch (form) {
    case ActivityForm::davies:
      return "Davies";
    case ActivityForm::extended_debye_hueckel:
      return "extended Debye-Hückel";
    case ActivityForm::truesdell_jones:
      return "Truesdell-Jones";
    case ActivityForm::neutral:
      return "linear";
  }
  return "";
}

void add_parameters(TextTable& table,
                    const std::string& name,
                    const ActivityParameters& parameters) {
  table.row({{name},
             {form_text(parameters.form)},
             {parameters.size_angstrom > 0 ? plain_text(parameters.size_angstrom) : ""},
             {plain_text(parameters.linear)},
             {parameters.source, Ink::quiet}});
}

/// What the constituent's total is found in.
void print_forms(TextPage& page, const Chemistry& chemistry, const Constituent& constituent) {
  const int basis = chemistry.species_index(constituent.basis_species);
  if (basis < 0 || basis >= chemistry.n_basis) return;
  const auto at = static_cast<std::size_t>(basis);
  print_names(page, "dissolved as", names_where(chemistry.species, [&](const Species& species) {
                return species.name == constituent.basis_species ||
                       (at < species.formation.size() && species.formation[at] != 0);
              }));
  print_names(page, "minerals", names_where(chemistry.minerals, [&](const Mineral& mineral) {
                return at < mineral.dissolution.size() && mineral.dissolution[at] != 0;
              }));
}

std::string kind_text(const Constituent& constituent) {
  switch (constituent.kind) {
    case Constituent::Kind::total:
      return "all of it that is dissolved, counted as " + constituent.basis_species;
    case Constituent::Kind::alkalinity:
      return "acid the water takes up, in equivalents";
    case Constituent::Kind::hardness:
      return "calcium and magnesium together, in equivalents";
  }
  return "";
}

}  // namespace

bool print_species_topic(TextPage& page, const Models& models, const std::string& topic) {
  const Chemistry& chemistry = models.chemistry;
  const int index = chemistry.species_index(topic);
  if (index < 0) return false;
  const Species& species = chemistry.species[static_cast<std::size_t>(index)];
  page.heading(species.name, species.is_pair ? "pair of ions" : "dissolved species");
  page.labelled("charge", species.charge_number == 0 ? "0" : signed_text(species.charge_number, 0));
  page.labelled("molar mass", fixed_text(species.molar_mass_g, 3) + " g/mol");
  if (species.molar_volume_cm3) {
    page.labelled("molar volume",
                  plain_text(*species.molar_volume_cm3) + " cm³/mol at 25 °C, infinite dilution");
  }
  if (index < chemistry.n_basis) {
    page.labelled("reaction", "none: it belongs to the basis that the others are formed from");
  } else {
    print_constant(page, species.constant, species.reaction_text, chemistry);
  }
  page.labelled("file", species.file, Ink::quiet);
  return true;
}

bool print_mineral_topic(TextPage& page, const Models& models, const std::string& topic) {
  const Chemistry& chemistry = models.chemistry;
  const int index = chemistry.mineral_index(topic);
  if (index < 0) return false;
  const Mineral& mineral = chemistry.minerals[static_cast<std::size_t>(index)];
  page.heading(mineral.name, "mineral");
  page.labelled("formula", mineral.formula);
  page.labelled("molar mass", fixed_text(mineral.molar_mass_g, 3) + " g/mol");
  page.labelled("as a scale",
                mineral.is_common_scale ? "common" : "rarely forms by itself in a plant");
  if (!mineral.remark.empty()) page.labelled("remark", mineral.remark);
  print_constant(page, mineral.constant, mineral.reaction_text, chemistry);
  page.labelled("file", mineral.file, Ink::quiet);
  return true;
}

bool print_gas_topic(TextPage& page, const Models& models, const std::string& topic) {
  const Chemistry& chemistry = models.chemistry;
  const int index = chemistry.gas_index(topic);
  if (index < 0) return false;
  const Gas& gas = chemistry.gases[static_cast<std::size_t>(index)];
  page.heading(gas.name, "gas");
  page.labelled("formula", gas.formula);
  page.labelled("pressure unit",
                gas.bar_per_unit == 1 ? "bar" : "atm, as the constant was published");
  print_constant(page, gas.constant, gas.reaction_text, chemistry);
  page.labelled("file", gas.file, Ink::quiet);
  return true;
}

bool print_constituent_topic(TextPage& page, const Models& models, const std::string& topic) {
  const Chemistry& chemistry = models.chemistry;
  const int index = chemistry.constituent_index(topic);
  if (index < 0) return false;
  const Constituent& constituent = chemistry.constituents[static_cast<std::size_t>(index)];
  page.heading(constituent.name, "word of a laboratory report");
  page.labelled("means", kind_text(constituent));
  print_names(page, "also written", constituent.symbols);
  page.labelled("mg/L alone means",
                constituent.plain.empty() ? "nothing: \"as\" and a formula must be said"
                                          : "mg/L as " + constituent.plain);
  std::vector<std::string> formulas;
  for (const auto& [formula, moles] : constituent.as) formulas.push_back(formula);
  print_names(page, "may be given as", formulas);
  if (constituent.equivalents > 0) {
    page.labelled("equivalents", plain_text(constituent.equivalents) + " in one mole");
  }
  print_forms(page, chemistry, constituent);
  return true;
}

bool print_activity_topic(TextPage& page, const Models& models, const std::string& topic) {
  const ActivityModel* model = models.activity_model(topic);
  if (model == nullptr) return false;
  page.heading(model->name, "activity model");
  page.labelled("title", model->title);
  page.labelled("trusted up to",
                plain_text(model->max_ionic_strength_molal) + " mol/kg of ionic strength");
  page.labelled("source", citation_of(models.chemistry.sources, model->source));
  if (!model->note.empty()) page.labelled("note", model->note);
  page.blank();
  TextTable table({{"species"},
                   {"form"},
                   {"size, Å", Align::right},
                   {"b, kg/mol", Align::right},
                   {"source", Align::left, true}});
  add_parameters(table, "other ions", model->ions);
  add_parameters(table, "charged pairs", model->pairs);
  add_parameters(table, "neutral species", model->neutrals);
  for (const auto& [name, parameters] : model->species) add_parameters(table, name, parameters);
  table.print(page);
  return true;
}

bool print_source_topic(TextPage& page, const Models& models, const std::string& topic) {
  const Chemistry& chemistry = models.chemistry;
  const auto found = chemistry.sources.find(topic);
  if (found == chemistry.sources.end()) return false;
  const auto is_from_it = [&](const auto& item) { return item.constant.source == topic; };
  page.heading(topic, "source");
  page.labelled("citation", found->second);
  print_names(page, "species", names_where(chemistry.species, is_from_it));
  print_names(page, "minerals", names_where(chemistry.minerals, is_from_it));
  print_names(page, "gases", names_where(chemistry.gases, is_from_it));
  print_names(page, "activity models", names_where(models.activity_models, [&](const auto& model) {
                return model.source == topic;
              }));
  return true;
}

}  // namespace ionledger
