// Steps that add something: another water, a reagent, water that comes back.
#include <fmt/format.h>

#include <cassert>
#include <cmath>

#include "treatment/root.hpp"
#include "treatment/workbench.hpp"

namespace ionledger {
namespace {

constexpr double first_try_kg_per_kg = 1e-9;  // of product per kg of water, when a pH is looked for
constexpr double last_try_kg_per_kg = 1;
constexpr double wrong_way_ph = 0.01;

/// Moles of the active substance behind one mole of the formula after "as": both hold the one
/// element that is neither hydrogen nor oxygen. 0 when they do not.
double active_per_basis(const std::string& formula, const std::string& active) {
  const auto basis = composition_of(formula);
  const auto whole = composition_of(active);
  if (!basis || !whole) return 0;
  double ratio = 0;
  for (const auto& [element, count] : *basis) {
    if (element == "H" || element == "O") continue;
    const auto in_active = whole->find(element);
    if (ratio != 0 || in_active == whole->end()) return 0;
    ratio = count / in_active->second;
  }
  return ratio;
}

/// kg of the active substance in one of what was written in kg "as" a formula.
double mass_factor(const WrittenQuantity& written, const Reagent& reagent) {
  if (written.basis.empty()) return 1;
  const double ratio = active_per_basis(written.basis, reagent.ingredients.front().formula);
  return ratio * reagent.active_molar_mass_g / molar_mass_g_per_mol(*composition_of(written.basis));
}

}  // namespace

bool dose_can_be_as(const std::string& formula, const Reagent& reagent) {
  return active_per_basis(formula, reagent.ingredients.front().formula) > 0;
}

double product_kg(const Dose& dose, const Reagent& reagent, const Water& water, Workbench& bench) {
  const WrittenQuantity& written = dose.amount.quantity;
  const double litres = bench.litres(water);
  const double feed_kg_per_s = bench.plant().feed_water_kg_per_s.value_or(0);
  const double density = reagent.density_kg_per_l.value_or(0);
  const double kg_per_mol = reagent.active_molar_mass_g / 1000;
  double kg = 0;
  if (const auto mass = to<Density>(written); std::holds_alternative<Density>(mass)) {
    kg = written.value_in_si * litres / 1000 * mass_factor(written, reagent);
  } else if (std::holds_alternative<MassFlow>(to<MassFlow>(written))) {
    kg = written.value_in_si / feed_kg_per_s * mass_factor(written, reagent);
  } else if (std::holds_alternative<VolumeFlow>(to<VolumeFlow>(written))) {
    kg = written.value_in_si * 1000 * density / feed_kg_per_s;
  } else if (std::holds_alternative<AmountPerVolume>(to<AmountPerVolume>(written))) {
    kg = written.value_in_si * litres / 1000 * kg_per_mol;
  } else if (std::holds_alternative<AmountPerMass>(to<AmountPerMass>(written))) {
    kg = written.value_in_si * water.water_kg * kg_per_mol;
  } else if (written.meaning == Meaning::mass_fraction) {
    kg = written.value_in_si * mass_kg(amounts_of(water), bench.chemistry()) *
         mass_factor(written, reagent);
  } else {
    kg = written.value_in_si * litres * density;  // mL/m3: volume of product per volume of water
  }
  return dose.is_of_active ? kg / reagent.ingredients.front().share : kg;
}

namespace {

Amounts product(const Reagent& reagent, double kg, const Workbench& bench) {
  Amounts amounts = bench.none();
  for (std::size_t i = 0; i < amounts.basis.size(); ++i) {
    amounts.basis[i] = kg * reagent.basis_mol_per_kg[i];
  }
  amounts.water_kg = kg * reagent.water_kg_per_kg;
  return amounts;
}

Applied dosed(const Reagent& reagent, double kg, const Water& water, Workbench& bench) {
  Amounts amounts = amounts_of(water);
  amounts.add(product(reagent, kg, bench));
  return bench.water(amounts, water.temperature, water.pressure);
}

void book_dose(
    const Reagent& reagent, double kg, const Water& water, Workbench& bench, StepRecord& record) {
  record.added.push_back(
      bench.portion(reagent.name,
                    product(reagent, kg, bench),
                    kg * reagent.ingredients.front().share * 1000 / reagent.active_molar_mass_g,
                    kg,
                    water));
  if (kg > 0 && !reagent.caution.empty())
    record.cautions.push_back({reagent.name, reagent.caution});
}

/// kg of product for every kg of feed at which the pH is reached; nullopt, and why, when it cannot.
std::optional<double> kg_for_ph(const Reagent& reagent,
                                double target,
                                const Water& water,
                                Workbench& bench) {
  const double before = water.solution.ph();
  const double upwards = target > before ? 1 : -1;
  bool solves = true;
  const auto miss = [&](double kg) {
    const Applied after = dosed(reagent, kg, water, bench);
    solves = after.has_value();
    return solves ? after->solution.ph() - target : 0;
  };
  Ordinate low{0, before - target};
  if (std::abs(low.f) <= ph_tolerance) return 0;
  double nearest = before;
  for (double kg = first_try_kg_per_kg * water.water_kg; kg <= last_try_kg_per_kg * water.water_kg;
       kg *= 2) {
    const Ordinate high{kg, miss(kg)};
    if (!solves) break;
    if (high.f * upwards >= 0) return root_between(low, high, ph_tolerance, miss);
    const double ph = high.f + target;
    if ((ph - before) * upwards < -wrong_way_ph) {
      return bench.fail(fmt::format("{} moves the pH from {:.2f} to {:.2f}, away from {:g}",
                                    reagent.name,
                                    before,
                                    ph,
                                    target));
    }
    if ((ph - nearest) * upwards > 0) nearest = ph;
    low = high;
  }
  return bench.fail(fmt::format("{} brings the pH from {:.2f} no further than {:.2f}, not to {:g}",
                                reagent.name,
                                before,
                                nearest,
                                target));
}

}  // namespace

Applied mixed(const Water& water,
              const Water& other,
              const std::string& what,
              Workbench& bench,
              StepRecord& record) {
  Amounts amounts = amounts_of(water);
  const Amounts added = amounts_of(other);
  const double mass = mass_kg(amounts, bench.chemistry());
  const double other_mass = mass_kg(added, bench.chemistry());
  const double temperature_k =
      (mass * in_kelvin(water.temperature) + other_mass * in_kelvin(other.temperature)) /
      (mass + other_mass);
  amounts.add(added);
  record.added.push_back(bench.portion(what, added, 0, other_mass, water));
  return bench.water(amounts, kelvin(temperature_k), water.pressure);
}

Applied apply(const Blend& blend, const Water& water, Workbench& bench, StepRecord& record) {
  assert(blend.water);
  Water other = *blend.water;
  double water_kg = 0;
  if (blend.share) {
    const double share = blend.share->quantity.value_in_si;
    if (share >= 1) return bench.fail("a share of all leaves nothing of the water itself");
    water_kg =
        share / (1 - share) * bench.litres(water) / litres_per_kg_water(other, bench.chemistry());
  } else {
    water_kg = blend.flow->quantity.value_in_si * 1000 /
               litres_per_kg_water(other, bench.chemistry()) / *bench.plant().feed_water_kg_per_s;
  }
  other.water_kg = water_kg;
  return mixed(water, other, blend.other.text, bench, record);
}

Applied apply(const Dose& dose, const Water& water, Workbench& bench, StepRecord& record) {
  const Reagent& reagent = *bench.plant().supplies.reagent(dose.reagent.text);
  const double kg = product_kg(dose, reagent, water, bench);
  book_dose(reagent, kg, water, bench, record);
  return dosed(reagent, kg, water, bench);
}

Applied apply(const BringPH& bring, const Water& water, Workbench& bench, StepRecord& record) {
  const Reagent& reagent = *bench.plant().supplies.reagent(bring.reagent.text);
  const auto kg = kg_for_ph(reagent, bring.ph.quantity.number, water, bench);
  if (!kg) return std::nullopt;
  book_dose(reagent, *kg, water, bench, record);
  return dosed(reagent, *kg, water, bench);
}

/// What is returned is the `removed` of this step; the train mixes it in where it goes.
Applied apply(const Recycle& recycle, const Water& water, Workbench& bench, StepRecord& record) {
  const double share = recycle.share.quantity.value_in_si;
  if (share >= 1) return bench.fail("all of the water returns, so none leaves");
  Water returned = water;
  returned.water_kg = share * water.water_kg;
  record.removed.push_back(
      bench.portion("returned to " + recycle.to.text, amounts_of(returned), 0, water));
  Water onward = water;
  onward.water_kg -= returned.water_kg;
  return onward;
}

}  // namespace ionledger
