// Tables of conductivity, indices and dissolved solids: what the assessment needs beside
// equilibria.
#include <fmt/format.h>

#include <array>

#include "input/file_text.hpp"
#include "input/model_draft.hpp"

namespace ionledger {
namespace {

/// Positive numbers for charge 1, 2, ...; at least one.
std::vector<double> read_by_charge(TomlCursor& table, const char* key) {
  const char* const expected = "positive numbers for charge 1, 2, ... such as [40.0, 60.0]";
  std::vector<double> numbers;
  const auto array = table.require(key, expected);
  if (!array) return numbers;
  for (const TomlCursor& item : array->items(expected)) {
    const double number = item.number(expected).value_or(1);
    if (number <= 0) item.error(fmt::format("{} is not positive", item.path()), expected);
    numbers.push_back(number);
  }
  if (array->is(TomlNode::Kind::array) && numbers.empty()) {
    array->error(fmt::format("{} is empty", array->path()), expected);
  }
  return numbers;
}

IonConductivity read_ion(TomlCursor& table, double usual_exponent, ModelDraft& draft) {
  IonConductivity ion;
  if (!table.must_be_table()) return ion;
  const char* const unit = "S cm2 per mole of charge at 25 degC";
  ion.limiting_s_cm2_per_eq = table.number_at("limiting_s_cm2_per_eq", unit);
  if (const auto value = table.find("limiting_s_cm2_per_eq");
      value && ion.limiting_s_cm2_per_eq < 0) {
    value->error("a limiting conductivity is negative", unit);
  }
  ion.viscosity_exponent = usual_exponent;
  if (table.has("viscosity_exponent") || table.has("exponent_source")) {
    ion.viscosity_exponent = table.number_at("viscosity_exponent", "a number near 0.9");
    ion.exponent_source = table.text_at("exponent_source", "the key of a [[source]]");
    if (const auto source = table.find("exponent_source")) draft.cited_sources.push_back(*source);
  }
  ion.source = draft.cite(table);
  ion.standing = read_standing(table);
  ion.note = table.text_if("note", "why this value");
  table.refuse_unknown_keys();
  return ion;
}

bool is_basis(const ModelDraft& draft, const std::string& name) {
  const Chemistry& chemistry = draft.models.chemistry;
  const int index = chemistry.species_index(name);
  return index >= 0 && index < chemistry.n_basis;
}

/// The value of `key`, which must be a basis species; empty when left out.
std::string read_basis_role(TomlCursor& table, const char* key, const ModelDraft& draft) {
  const char* const expected = "a [[basis]] species such as \"Ca+2\"";
  const std::string name = table.text_if(key, expected);
  const auto value = table.find(key);
  if (value && value->is(TomlNode::Kind::text) && !is_basis(draft, name)) {
    value->error(fmt::format("{} is not a basis species", excerpt(name)), expected);
  }
  return name;
}

struct BasisRole {
  const char* key;
  std::string IndexRoles::*field;
};
const std::array<BasisRole, 6> basis_roles = {{{"calcium", &IndexRoles::calcium},
                                               {"magnesium", &IndexRoles::magnesium},
                                               {"sodium", &IndexRoles::sodium},
                                               {"chloride", &IndexRoles::chloride},
                                               {"sulfate", &IndexRoles::sulfate},
                                               {"carbonate", &IndexRoles::carbonate}}};

}  // namespace

void read_conductivity(TomlCursor& table, ModelDraft& draft) {
  ConductivityModel& model = draft.models.chemistry.conductivity;
  model.title = table.text_at("title", "one line for the report");
  model.source = draft.cite(table);
  model.note = table.text_if("note", "why");
  model.sizes_angstrom = read_by_charge(table, "sizes_angstrom");
  model.unlisted_s_cm2_per_eq = read_by_charge(table, "unlisted_s_cm2_per_eq");
  model.unlisted_viscosity_exponent =
      table.number_at("unlisted_viscosity_exponent", "a number near 0.9");
  auto ions = table.require("ions", "a table of ions such as \"Ca+2\" = { ... }");
  if (ions && ions->must_be_table()) {
    for (TomlCursor& entry : ions->entries()) {
      model.ions[entry.key()] = read_ion(entry, model.unlisted_viscosity_exponent, draft);
      draft.named_species.push_back(entry);
    }
  }
  table.refuse_unknown_keys();
}

void read_index_roles(TomlCursor& table, ModelDraft& draft) {
  IndexRoles& roles = draft.models.chemistry.roles;
  for (const BasisRole& role : basis_roles) {
    roles.*role.field = read_basis_role(table, role.key, draft);
  }
  roles.bicarbonate = table.text_if("bicarbonate", "a species such as \"HCO3-\"");
  if (const auto value = table.find("bicarbonate")) draft.species_values.push_back(*value);
  roles.calcium_carbonate = table.text_if("calcium_carbonate", "a mineral such as \"calcite\"");
  if (const auto value = table.find("calcium_carbonate")) draft.mineral_values.push_back(*value);
  table.refuse_unknown_keys();
}

void read_dissolved_solids(TomlCursor& table, ModelDraft& draft) {
  const char* const expected = "a table such as { \"H4SiO4\" = \"SiO2\" }";
  auto formulas = table.require("counted_as", expected);
  if (formulas && formulas->must_be_table()) {
    for (const TomlCursor& entry : formulas->entries()) {
      const std::string formula = entry.text(expected).value_or("");
      if (entry.is(TomlNode::Kind::text) && !composition_of(formula)) {
        entry.error(fmt::format("{} is not a chemical formula", excerpt(formula)), expected);
      }
      draft.models.chemistry.solid_formulas[entry.key()] = formula;
      if (!is_basis(draft, entry.key())) {
        entry.key_error(fmt::format("{} is not a basis species", excerpt(entry.key())), expected);
      }
    }
  }
  table.refuse_unknown_keys();
}

}  // namespace ionledger
