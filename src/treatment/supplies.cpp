// What stands in the store, checked against the chemistry: atoms, charges, names.
#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <set>

#include "treatment/workbench.hpp"

namespace ionledger {
namespace {

constexpr double balance_tolerance = 1e-9;
const std::string water = "H2O";

template <class Items>
auto find_named(const Items& items, std::string_view name) {
  const auto found =
      std::find_if(items.begin(), items.end(), [&](const auto& item) { return item.name == name; });
  return found == items.end() ? nullptr : &*found;
}

class SupplyCompiler {
 public:
  SupplyCompiler(Supplies& supplies,
                 const Chemistry& chemistry,
                 const std::map<std::string, SourceSpan>& where,
                 Diagnostics& diagnostics)
      : supplies_(supplies), chemistry_(chemistry), where_(where), diagnostics_(diagnostics) {}

  bool run() {
    for (Reagent& reagent : supplies_.reagents) compile(reagent);
    for (const Resin& resin : supplies_.resins) check(resin);
    for (const Atmosphere& atmosphere : supplies_.atmospheres) check(atmosphere);
    for (const auto& [mineral, density] : supplies_.solid_densities) check(mineral, density);
    for (const Incompatible& pair : supplies_.incompatible) check(pair);
    return ok_;
  }

 private:
  void error(const std::string& place,
             std::string summary,
             std::string found,
             std::string expected) {
    const auto known = where_.find(place);
    diagnostics_.error(known == where_.end() ? SourceSpan{} : known->second,
                       std::move(summary),
                       std::move(found),
                       std::move(expected));
    ok_ = false;
  }

  void compile(Reagent& reagent) {
    const std::string place = "reagent:" + reagent.name;
    reagent.basis_mol_per_kg.assign(static_cast<std::size_t>(chemistry_.n_basis), 0.0);
    reagent.water_kg_per_kg = 0;
    double share = 0;
    for (const Ingredient& ingredient : reagent.ingredients) {
      if (!book(ingredient, place, reagent)) return;
      share += ingredient.share;
    }
    if (reagent.ingredients.empty() || share > 1 + balance_tolerance) {
      error(
          place,
          fmt::format("the ingredients of {} are not a share of it", reagent.name),
          fmt::format("{} ingredients, {:g} kg per kg together", reagent.ingredients.size(), share),
          "an active substance and impurities that add up to no more than 1 kg per kg");
      return;
    }
    reagent.active_molar_mass_g =
        molar_mass_g_per_mol(*composition_of(reagent.ingredients.front().formula));
    if (reagent.rest_is_water) reagent.water_kg_per_kg += std::max(0.0, 1 - share);
    if (reagent.density_kg_per_l && !(*reagent.density_kg_per_l > 0)) {
      error(place,
            fmt::format("the density of {} is not positive", reagent.name),
            fmt::format("{}", *reagent.density_kg_per_l),
            "kg/L, or left out");
    }
  }

  /// Adds what one kg of product brings by this ingredient.
  bool book(const Ingredient& ingredient, const std::string& place, Reagent& reagent) {
    const auto composition = composition_of(ingredient.formula);
    if (!composition || !(ingredient.share > 0)) {
      error(place,
            fmt::format("{} has an ingredient that is not one", reagent.name),
            fmt::format("formula \"{}\", share {}", ingredient.formula, ingredient.share),
            "a chemical formula and a positive share, kg per kg");
      return false;
    }
    Composition atoms = *composition;
    double charge = 0;
    const double mol = ingredient.share * 1000 / molar_mass_g_per_mol(*composition);
    for (const auto& [name, coefficient] : ingredient.books) {
      if (name == water) {
        atoms["H"] -= 2 * coefficient;
        atoms["O"] -= coefficient;
        reagent.water_kg_per_kg += mol * coefficient * water_kg_per_mol();
        continue;
      }
      const int index = chemistry_.species_index(name);
      if (index < 0) {
        error(place,
              fmt::format("\"{}\" is not a species of these models", name),
              fmt::format("\"{}\" in what {} books", name, reagent.name),
              "H2O, or a species defined in some file of the models");
        return false;
      }
      const Species& species = chemistry_.species[static_cast<std::size_t>(index)];
      for (const auto& [element, count] : species.composition)
        atoms[element] -= coefficient * count;
      charge += coefficient * species.charge_number;
      for (std::size_t i = 0; i < reagent.basis_mol_per_kg.size(); ++i) {
        reagent.basis_mol_per_kg[i] += mol * coefficient * species.formation[i];
      }
      reagent.water_kg_per_kg += mol * coefficient * species.water_exponent * water_kg_per_mol();
    }
    return balances(ingredient, atoms, charge, place, reagent.name);
  }

  bool balances(const Ingredient& ingredient,
                const Composition& atoms,
                double charge,
                const std::string& place,
                const std::string& name) {
    std::string unbalanced;
    for (const auto& [element, count] : atoms) {
      if (std::abs(count) > balance_tolerance)
        unbalanced += fmt::format(" {} {:+g}", element, count);
    }
    if (std::abs(charge) > balance_tolerance) unbalanced += fmt::format(" charge {:+g}", charge);
    if (unbalanced.empty()) return true;
    error(place,
          fmt::format("what {} books is not {}", name, ingredient.formula),
          fmt::format("left over:{}", unbalanced),
          "the atoms of the formula, and no charge");
    return false;
  }

  void check(const Resin& resin) {
    const std::string place = "resin:" + resin.name;
    for (const Resin::Exchange& exchange : resin.exchanges) {
      const int gives = chemistry_.species_index(exchange.gives);
      const int sign =
          gives < 0 ? 0 : chemistry_.species[static_cast<std::size_t>(gives)].charge_number;
      bool good = sign != 0;
      for (const std::string& name : exchange.takes) {
        const int i = chemistry_.species_index(name);
        good = good && i > 0 && i < chemistry_.n_basis &&
               sign * chemistry_.species[static_cast<std::size_t>(i)].charge_number >= 0;
      }
      if (good) continue;
      error(place,
            fmt::format("{} does not exchange ions of one sign", resin.name),
            fmt::format("it gives \"{}\"", exchange.gives),
            "takes: basis species, hydrogen excepted; gives: an ion of the same sign");
    }
  }

  void check(const Atmosphere& atmosphere) {
    for (const auto& [gas, bar] : atmosphere.pressures_bar) {
      if (chemistry_.gas_index(gas) >= 0 && bar > 0) continue;
      error("atmosphere:" + atmosphere.name,
            fmt::format("{} holds what is no gas of these models", atmosphere.name),
            fmt::format("\"{}\" at {} bar", gas, bar),
            "the name of a [[gas]] and a positive pressure");
    }
  }

  void check(const std::string& mineral, const SolidDensity& density) {
    if (chemistry_.mineral_index(mineral) >= 0 && density.kg_per_l > 0) return;
    error("solid_density:" + mineral,
          fmt::format("\"{}\" has a density but is no mineral", mineral),
          fmt::format("{} kg/L", density.kg_per_l),
          "the name of a [[mineral]] and a positive density");
  }

  void check(const Incompatible& pair) {
    for (const std::string& family : {pair.first, pair.second}) {
      const bool is_known = std::any_of(
          supplies_.reagents.begin(), supplies_.reagents.end(), [&](const Reagent& reagent) {
            return reagent.family == family;
          });
      if (is_known) continue;
      error("incompatible:" + pair.first + "/" + pair.second,
            fmt::format("there is no family \"{}\" of reagents", family),
            fmt::format("\"{}\" in [[incompatible]]", family),
            "the family of some [[reagent]]");
    }
  }

  Supplies& supplies_;
  const Chemistry& chemistry_;
  const std::map<std::string, SourceSpan>& where_;
  Diagnostics& diagnostics_;
  bool ok_ = true;
};

}  // namespace

const Reagent* Supplies::reagent(std::string_view name) const { return find_named(reagents, name); }
const Resin* Supplies::resin(std::string_view name) const { return find_named(resins, name); }
const Atmosphere* Supplies::atmosphere(std::string_view name) const {
  return find_named(atmospheres, name);
}

bool compile_supplies(Supplies& supplies,
                      const Chemistry& chemistry,
                      const std::map<std::string, SourceSpan>& where,
                      Diagnostics& diagnostics) {
  return SupplyCompiler(supplies, chemistry, where, diagnostics).run();
}

}  // namespace ionledger
