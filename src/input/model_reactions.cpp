// Tables that define species, minerals and gases with their constants.
#include <fmt/format.h>

#include <array>
#include <cmath>

#include "chemistry/formula.hpp"
#include "input/file_text.hpp"
#include "input/model_draft.hpp"

namespace ionledger {
namespace {

constexpr double bar_per_atm = 1.01325;  // exact: 101325 Pa

struct StandingWord {
  const char* word;
  Standing standing;
};
constexpr std::array<StandingWord, 5> standing_words = {
    {{"read_in_source", Standing::read_in_source},
     {"secondary_table", Standing::secondary_table},
     {"reproduces_a_check", Standing::reproduces_a_check},
     {"from_memory", Standing::from_memory},
     {"estimated", Standing::estimated}}};

struct FunctionTerm {
  const char* key;
  double TemperatureFunction::*field;
};
constexpr std::array<FunctionTerm, 9> function_terms = {
    {{"constant", &TemperatureFunction::constant},
     {"per_t", &TemperatureFunction::per_t},
     {"log10_t", &TemperatureFunction::log10_t},
     {"ln_t", &TemperatureFunction::ln_t},
     {"t_1", &TemperatureFunction::t_1},
     {"t_2", &TemperatureFunction::t_2},
     {"per_t2", &TemperatureFunction::per_t2},
     {"theta", &TemperatureFunction::theta},
     {"theta_2", &TemperatureFunction::theta_2}}};

/// The value of `key` among `words`, or an error that lists them.
template <class Words>
auto one_of(TomlCursor& table, const std::string& key, const Words& words) {
  std::string expected;
  for (const auto& entry : words) {
    expected += fmt::format("{}\"{}\"", expected.empty() ? "" : ", ", entry.word);
  }
  const std::string text = table.text_at(key, expected);
  for (const auto& entry : words) {
    if (text == entry.word) return entry;
  }
  const auto value = table.find(key);
  if (value && !text.empty()) {
    value->error(fmt::format("{} is not a {}", excerpt(text), key), expected);
  }
  return words.front();
}

TemperatureRange read_range(TomlCursor& table) {
  const char* const expected = "two temperatures in degC, the lower first, such as [0, 90]";
  const auto range = table.require("valid_degc", expected);
  if (!range) return {};
  std::vector<double> ends;
  for (const TomlCursor& end : range->items(expected)) {
    ends.push_back(end.number(expected).value_or(0));
  }
  if (range->is(TomlNode::Kind::array) && (ends.size() != 2 || ends[0] > ends[1])) {
    range->error(fmt::format("{} is not a range", range->path()), expected);
  }
  return ends.size() == 2 ? TemperatureRange{ends[0], ends[1]} : TemperatureRange{};
}

TemperatureFunction read_function(TomlCursor& table) {
  struct Kind {
    const char* word;
    double to_log10_k;
  };
  const std::array<Kind, 3> kinds = {{{"log10_k", 1}, {"pk", -1}, {"ln_k", 1 / std::log(10.0)}}};
  TemperatureFunction function;
  function.to_log10_k = one_of(table, "gives", kinds).to_log10_k;
  for (const FunctionTerm& term : function_terms) {
    function.*term.field = table.number_if(term.key, "the coefficient of that term").value_or(0);
  }
  table.refuse_unknown_keys();
  return function;
}

void read_of_temperature(TomlCursor& table, EquilibriumConstant& constant) {
  auto value = table.find("of_temperature");
  if (!value) return;
  if (value->is(TomlNode::Kind::table)) {
    constant.of_temperature = read_function(*value);
    return;
  }
  const char* const expected = "a table of terms, or \"water_ion_product\"";
  const auto text = value->text(expected);
  if (text && *text != "water_ion_product") {
    value->error(fmt::format("{} is not a function of temperature", excerpt(*text)), expected);
  }
  constant.is_water_ion_product = true;
}

std::vector<AlternativeValue> read_alternatives(TomlCursor& table, ModelDraft& draft) {
  std::vector<AlternativeValue> alternatives;
  const auto array = table.find("alternatives");
  if (!array) return alternatives;
  for (TomlCursor& item : array->items("tables with log10_k, source and note")) {
    if (!item.must_be_table()) continue;
    AlternativeValue alternative;
    alternative.log10_k = item.number_at("log10_k", "the value at 25 degC");
    alternative.source = draft.cite(item);
    alternative.note = item.text_if("note", "what it would change");
    item.refuse_unknown_keys();
    alternatives.push_back(std::move(alternative));
  }
  return alternatives;
}

EquilibriumConstant read_constant(TomlCursor& table, ModelDraft& draft) {
  EquilibriumConstant constant;
  constant.log10_k = table.number_at("log10_k", "the value at 25 degC, a number");
  read_of_temperature(table, constant);
  constant.step_at_25_is_known = table.text_if("step_at_25_is_known", "the reason, as text");
  constant.enthalpy_kj_per_mol = table.number_if("enthalpy_kj_per_mol", "kJ/mol");
  constant.heat_capacity_j_per_mol_k = table.number_if("heat_capacity_j_per_mol_k", "J/(mol K)");
  constant.valid = read_range(table);
  constant.uncertainty = table.number_at("uncertainty", "one standard deviation of log10 K");
  if (constant.uncertainty < 0) {
    table.find("uncertainty")->error("an uncertainty is negative", "zero or more");
  }
  constant.uncertainty_is_estimated = table.flag("uncertainty_is_estimated", false);
  constant.source = draft.cite(table);
  constant.standing = read_standing(table);
  constant.note = table.text_if("note", "why this value");
  constant.alternatives = read_alternatives(table, draft);
  return constant;
}

/// Reaction and constant, which species, minerals and gases have alike.
template <class Entry>
void read_reaction_of(TomlCursor& table, const std::string& file, Entry& entry, ModelDraft& draft) {
  const char* const expected = "such as \"HCO3- = H+ + CO3-2\", with spaces around + and =";
  entry.file = file;
  entry.reaction_text = table.text_at("reaction", expected);
  if (auto reaction = read_reaction(entry.reaction_text)) {
    entry.reaction = std::move(*reaction);
  } else if (!entry.reaction_text.empty()) {
    table.find("reaction")->error("this is not a reaction", expected);
  }
  entry.constant = read_constant(table, draft);
}

/// The pressure that can hurt and what it does: both or neither.
void read_caution(TomlCursor& table, Gas& gas) {
  const char* const expected_pressure = "a pressure in bar, above zero";
  const char* const expected_caution = "what the gas can do above caution_above_bar";
  if (!table.has("caution_above_bar") && !table.has("caution")) return;
  gas.caution_above_bar = table.number_at("caution_above_bar", expected_pressure);
  gas.caution = table.text_at("caution", expected_caution);
  const auto pressure = table.find("caution_above_bar");
  if (pressure && gas.caution_above_bar <= 0) {
    pressure->error("this pressure is not above zero", expected_pressure);
  }
}

/// Name and charge of the species that `table` defines.
Species named_species(TomlCursor& table, const std::string& file) {
  Species species;
  species.file = file;
  species.name = table.text_at("species", "formula and charge, such as \"Ca+2\"");
  const auto charge = charge_of(species.name);
  if (!charge) {
    table.find("species")->error(fmt::format("{} does not end in a charge", excerpt(species.name)),
                                 "a sign and at most one digit at the end: \"Ca+2\", \"HCO3-\"");
  }
  species.charge_number = charge.value_or(0);
  species.molar_volume_cm3 = table.number_if("molar_volume_cm3", "cm3/mol at 25 degC");
  return species;
}

}  // namespace

Standing read_standing(TomlCursor& table) {
  return one_of(table, "standing", standing_words).standing;
}

void read_basis(TomlCursor& table, const std::string& file, ModelDraft& draft) {
  Species species = named_species(table, file);
  const double protons =
      table.number_at("reference_protons", "protons against the reference form of alkalinity");
  if (species.molar_volume_cm3 || table.has("source")) draft.cite(table);
  table.refuse_unknown_keys();
  if (!draft.define("species", species.name, table)) return;
  Chemistry& chemistry = draft.models.chemistry;
  chemistry.species.push_back(std::move(species));
  chemistry.reference_protons.push_back(protons);
  ++chemistry.n_basis;
}

void read_species(TomlCursor& table, bool is_pair, const std::string& file, ModelDraft& draft) {
  Species species = named_species(table, file);
  species.is_pair = is_pair;
  read_reaction_of(table, file, species, draft);
  table.refuse_unknown_keys();
  if (draft.define("species", species.name, table)) {
    draft.models.chemistry.species.push_back(std::move(species));
  }
}

void read_mineral(TomlCursor& table, const std::string& file, ModelDraft& draft) {
  Mineral mineral;
  mineral.name = table.text_at("name", "such as \"calcite\"");
  mineral.formula = table.text_at("formula", "such as \"CaCO3\"");
  read_reaction_of(table, file, mineral, draft);
  mineral.is_common_scale = table.flag("is_common_scale", true);
  mineral.remark = table.text_if("remark", "one sentence");
  table.refuse_unknown_keys();
  if (draft.define("mineral", mineral.name, table)) {
    draft.models.chemistry.minerals.push_back(std::move(mineral));
  }
}

void read_gas(TomlCursor& table, const std::string& file, ModelDraft& draft) {
  struct PressureUnit {
    const char* word;
    double bar;
  };
  const std::array<PressureUnit, 2> units = {{{"bar", 1}, {"atm", bar_per_atm}}};
  Gas gas;
  gas.name = table.text_at("name", "such as \"carbon dioxide\"");
  gas.formula = table.text_at("formula", "such as \"CO2\"");
  read_reaction_of(table, file, gas, draft);
  gas.bar_per_unit = one_of(table, "pressure_unit", units).bar;
  read_caution(table, gas);
  table.refuse_unknown_keys();
  if (draft.define("gas", gas.name, table)) draft.models.chemistry.gases.push_back(std::move(gas));
}

}  // namespace ionledger
