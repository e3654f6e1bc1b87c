// Tables that say what stands in the store: reagents, ion exchangers, atmospheres, densities.
#include <fmt/format.h>

#include "input/file_text.hpp"
#include "input/model_draft.hpp"

namespace ionledger {
namespace {

/// `{ "Na+" = 1, "OH-" = 1 }`
std::vector<Term> read_books(TomlCursor& table) {
  const char* const expected = "moles of species in one mole, such as { \"Na+\" = 1, \"OH-\" = 1 }";
  std::vector<Term> books;
  auto value = table.require("books", expected);
  if (!value || !value->must_be_table()) return books;
  for (const TomlCursor& entry : value->entries()) {
    books.emplace_back(entry.key(), entry.number(expected).value_or(0));
  }
  return books;
}

Ingredient read_ingredient(TomlCursor& table) {
  Ingredient ingredient;
  ingredient.formula = table.text_at("formula", "such as \"H2SO4\"");
  ingredient.share = table.number_at("share", "kg in one kg of product, a number");
  ingredient.books = read_books(table);
  return ingredient;
}

bool rest_is_water(TomlCursor& table) {
  const char* const expected = "\"water\" or \"inert\"";
  const auto rest = table.find("rest");
  if (!rest) return true;
  const auto text = rest->text(expected);
  if (text && *text != "water" && *text != "inert") {
    rest->error(fmt::format("the rest cannot be {}", excerpt(*text)), expected);
  }
  return text != "inert";
}

}  // namespace

void read_reagent(TomlCursor& table, ModelDraft& draft) {
  Reagent reagent;
  reagent.name = table.text_at("name", "trade name and strength, such as \"sulfuric acid 96 %\"");
  reagent.ingredients.push_back(read_ingredient(table));
  if (const auto impurities = table.find("impurities")) {
    for (TomlCursor& item : impurities->items("tables with formula, share and books")) {
      if (!item.must_be_table()) continue;
      reagent.ingredients.push_back(read_ingredient(item));
      item.refuse_unknown_keys();
    }
  }
  reagent.rest_is_water = rest_is_water(table);
  reagent.density_kg_per_l = table.number_if("density_kg_per_l", "kg/L at 20 degC");
  reagent.family = table.text_if("family", "such as \"acid\"");
  reagent.caution = table.text_if("caution", "one or two sentences");
  reagent.source = draft.cite(table);
  reagent.standing = read_standing(table);
  reagent.note = table.text_if("note", "why this value");
  table.refuse_unknown_keys();
  if (draft.define("reagent", reagent.name, table)) {
    draft.models.supplies.reagents.push_back(std::move(reagent));
  }
}

void read_resin(TomlCursor& table, ModelDraft& draft) {
  Resin resin;
  resin.name = table.text_at("name", "such as \"softener\"");
  const char* const expected = "tables such as { takes = [\"Ca+2\"], gives = \"Na+\" }";
  if (const auto exchanges = table.require("exchanges", expected)) {
    for (TomlCursor& item : exchanges->items(expected)) {
      if (!item.must_be_table()) continue;
      Resin::Exchange exchange;
      exchange.takes = read_texts(item, "takes", "basis species such as [\"Ca+2\", \"Mg+2\"]");
      exchange.gives = item.text_at("gives", "a species such as \"Na+\"");
      item.refuse_unknown_keys();
      resin.exchanges.push_back(std::move(exchange));
    }
  }
  resin.up_to_alkalinity = table.flag("up_to_alkalinity", false);
  resin.source = draft.cite(table);
  resin.remark = table.text_if("remark", "one sentence");
  table.refuse_unknown_keys();
  if (draft.define("resin", resin.name, table)) {
    draft.models.supplies.resins.push_back(std::move(resin));
  }
}

void read_atmosphere(TomlCursor& table, ModelDraft& draft) {
  Atmosphere atmosphere;
  atmosphere.name = table.text_at("name", "such as \"air\"");
  const char* const expected = "bar, such as { \"carbon dioxide\" = 0.0004 }";
  auto pressures = table.require("pressures_bar", expected);
  if (pressures && pressures->must_be_table()) {
    for (const TomlCursor& entry : pressures->entries()) {
      atmosphere.pressures_bar.emplace_back(entry.key(), entry.number(expected).value_or(0));
    }
  }
  atmosphere.source = draft.cite(table);
  atmosphere.note = table.text_if("note", "why this value");
  table.refuse_unknown_keys();
  if (draft.define("atmosphere", atmosphere.name, table)) {
    draft.models.supplies.atmospheres.push_back(std::move(atmosphere));
  }
}

void read_incompatible(TomlCursor& table, ModelDraft& draft) {
  const char* const expected = "two families of reagents, such as [\"acid\", \"alkali\"]";
  const auto value = table.require("families", expected);
  const std::vector<std::string> families =
      value ? read_texts(table, "families", expected) : std::vector<std::string>{};
  if (value && families.size() != 2) value->error("these are not two families", expected);
  const std::string says = table.text_at("says", "what can happen, one sentence");
  table.refuse_unknown_keys();
  if (families.size() == 2 &&
      draft.define("incompatible", families[0] + "/" + families[1], table)) {
    draft.models.supplies.incompatible.push_back({families[0], families[1], says});
  }
}

void read_solid_density(TomlCursor& table, ModelDraft& draft) {
  const char* const expected = "kg/L by mineral, such as { calcite = 2.71 }";
  const std::string source = draft.cite(table);
  auto densities = table.require("kg_per_l", expected);
  if (densities && densities->must_be_table()) {
    for (const TomlCursor& entry : densities->entries()) {
      const double density = entry.number(expected).value_or(0);
      if (!draft.define("solid_density", entry.key(), entry)) continue;
      draft.models.supplies.solid_densities[entry.key()] = {density, source};
    }
  }
  table.refuse_unknown_keys();
}

}  // namespace ionledger
