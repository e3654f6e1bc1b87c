// Tables that define activity models and the parameters of ions in them.
#include <fmt/format.h>

#include <array>

#include "input/file_text.hpp"
#include "input/model_draft.hpp"

namespace ionledger {
namespace {

/// A form of activity coefficient and the parameters it has.
struct FormWord {
  const char* word;
  ActivityForm form;
  bool has_size;
  bool has_linear;
};
constexpr std::array<FormWord, 4> form_words = {
    {{"davies", ActivityForm::davies, false, true},
     {"extended_debye_hueckel", ActivityForm::extended_debye_hueckel, true, false},
     {"truesdell_jones", ActivityForm::truesdell_jones, true, true},
     {"neutral", ActivityForm::neutral, false, true}}};
constexpr const char* accepted_forms =
    "\"davies\", \"extended_debye_hueckel\", \"truesdell_jones\" or \"neutral\"";

ActivityParameters read_parameters(TomlCursor& table, ModelDraft& draft) {
  ActivityParameters parameters;
  if (!table.must_be_table()) return parameters;
  const std::string form = table.text_at("form", accepted_forms);
  parameters.source = draft.cite(table);
  for (const FormWord& known : form_words) {
    if (form != known.word) continue;
    parameters.form = known.form;
    if (known.has_linear) parameters.linear = table.number_at("linear", "kg/mol");
    if (known.has_size) {
      parameters.size_angstrom = table.number_at("size_angstrom", "the ion size in angstrom");
      if (parameters.size_angstrom < 0) {
        table.find("size_angstrom")->error("an ion size is negative", "zero or more");
      }
    }
    table.refuse_unknown_keys();
    return parameters;
  }
  const auto value = table.find("form");
  if (value && !form.empty()) {
    value->error(fmt::format("{} is not a form of activity coefficient", excerpt(form)),
                 accepted_forms);
  }
  return parameters;
}

ActivityParameters read_parameters_at(TomlCursor& model, const char* key, ModelDraft& draft) {
  auto table = model.require(key, "{ form = ..., source = ... } with the parameters of that form");
  return table ? read_parameters(*table, draft) : ActivityParameters();
}

}  // namespace

void read_activity_model(TomlCursor& table, ModelDraft& draft) {
  ActivityModel model;
  model.name = table.text_at("name", "such as \"davies\"");
  model.title = table.text_at("title", "one line for the report");
  model.max_ionic_strength_molal =
      table.number_at("max_ionic_strength_molal", "mol per kg of water");
  model.source = draft.cite(table);
  model.note = table.text_if("note", "why");
  model.water_activity_slope =
      table.number_if("water_activity_slope", "kg/mol").value_or(model.water_activity_slope);
  model.ions = read_parameters_at(table, "ions", draft);
  model.pairs = read_parameters_at(table, "pairs", draft);
  model.neutrals = read_parameters_at(table, "neutrals", draft);
  auto species = table.find("species");
  if (species && species->must_be_table()) {
    for (TomlCursor& entry : species->entries()) {
      model.species[entry.key()] = read_parameters(entry, draft);
      draft.named_species.push_back(entry);
    }
  }
  table.refuse_unknown_keys();
  if (draft.define("activity_model", model.name, table)) {
    draft.models.activity_models.push_back(std::move(model));
  }
}

}  // namespace ionledger
