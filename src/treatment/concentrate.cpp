// Steps that take water away: evaporation, and membranes that hold back ions and let gases pass.
#include <cassert>
#include <cmath>

#include "treatment/workbench.hpp"

namespace ionledger {
namespace {

/// What is dissolved as gases themselves, mol of each component per kg of water. A gas is dissolved
/// as the neutral species that is made of the same components.
std::vector<double> in_gas_form(const Water& water, const Chemistry& chemistry) {
  std::vector<double> amounts(water.totals.size(), 0.0);
  for (const Gas& gas : chemistry.gases) {
    const int s = dissolved_form(gas, chemistry);
    if (s < 0) continue;
    const double molality = water.solution.molality[static_cast<std::size_t>(s)];
    for (std::size_t i = 0; i < amounts.size(); ++i) amounts[i] += molality * gas.dissolution[i];
  }
  return amounts;
}

/// Sets the hydrogen of `amounts` so that its net charge is `charge_eq`.
void balance_by_hydrogen(Amounts& amounts, double charge_eq, const Chemistry& chemistry) {
  amounts.basis[0] = 0;
  amounts.basis[0] = charge_eq - net_charge(chemistry, amounts.basis);
}

/// Share of each component, hydrogen aside, that passes the membrane with the water.
std::vector<double> passages(const Concentrate& step, const Chemistry& chemistry) {
  std::vector<double> passage(static_cast<std::size_t>(chemistry.n_basis), 0.0);
  for (const NamedGiven& rejection : step.rejection) {
    const int c = chemistry.constituent_index(rejection.name.text);
    const Constituent& constituent = chemistry.constituents[static_cast<std::size_t>(c)];
    const int i = chemistry.species_index(constituent.basis_species);
    passage[static_cast<std::size_t>(i)] = 1 - rejection.value.quantity.value_in_si;
  }
  return passage;
}

/// The concentrate of a membrane: ions by C = C_f (1 - y SP)/(1 - y), gases as in the feed. What
/// the analysis leaves unbalanced is taken for an ion that does not pass.
Amounts concentrate_of(const Concentrate& step, const Water& water, const Chemistry& chemistry) {
  const double recovery = step.factor.quantity.value_in_si;
  const std::vector<double> gases = in_gas_form(water, chemistry);
  const std::vector<double> passage = passages(step, chemistry);
  Amounts kept = amounts_of(water);
  for (std::size_t i = 1; i < kept.basis.size(); ++i) {
    const double ionic = water.totals[i] - gases[i];
    kept.basis[i] =
        water.water_kg * (ionic * (1 - recovery * passage[i]) + gases[i] * (1 - recovery));
  }
  kept.water_kg = water.water_kg * (1 - recovery);
  balance_by_hydrogen(kept, water.water_kg * net_charge(chemistry, water.totals), chemistry);
  return kept;
}

/// The concentrate where it touches the membrane: ions times the polarisation, gases as they are.
Applied at_membrane(double polarisation, const Water& concentrate, Workbench& bench) {
  const std::vector<double> gases = in_gas_form(concentrate, bench.chemistry());
  Amounts amounts = amounts_of(concentrate);
  for (std::size_t i = 1; i < amounts.basis.size(); ++i) {
    amounts.basis[i] =
        concentrate.water_kg * ((concentrate.totals[i] - gases[i]) * polarisation + gases[i]);
  }
  const double charge = net_charge(bench.chemistry(), concentrate.totals);
  balance_by_hydrogen(amounts, polarisation * concentrate.water_kg * charge, bench.chemistry());
  return bench.water(amounts, concentrate.temperature, concentrate.pressure);
}

Applied through_membrane(const Concentrate& step,
                         const Water& water,
                         Workbench& bench,
                         StepRecord& record) {
  const Amounts kept = concentrate_of(step, water, bench.chemistry());
  Amounts passed = amounts_of(water);
  passed.add(kept, -1);
  for (double& solid : passed.solids) solid = 0;
  const Applied concentrate = bench.water(kept, water.temperature, water.pressure);
  const Applied permeate = bench.water(passed, water.temperature, water.pressure);
  if (!concentrate || !permeate) return std::nullopt;
  if (step.polarisation) {
    const Applied wall = at_membrane(step.polarisation->quantity.number, *concentrate, bench);
    if (!wall) return std::nullopt;
    record.beside.emplace_back("membrane", *wall);
  }
  if (step.keeps_permeate) {
    record.beside.emplace_back("concentrate", *concentrate);
    record.removed.push_back(bench.portion("concentrate", kept, 0, water));
    return permeate;
  }
  record.beside.emplace_back("permeate", *permeate);
  record.removed.push_back(bench.portion("permeate", passed, 0, water));
  return concentrate;
}

}  // namespace

int dissolved_form(const Gas& gas, const Chemistry& chemistry) {
  for (std::size_t s = 0; s < chemistry.species.size(); ++s) {
    const Species& species = chemistry.species[s];
    if (species.charge_number == 0 && species.formation == gas.dissolution) {
      return static_cast<int>(s);
    }
  }
  return -1;
}

Applied apply(const Concentrate& step, const Water& water, Workbench& bench, StepRecord& record) {
  if (step.by == Concentrate::By::recovery) return through_membrane(step, water, bench, record);
  const double left = step.by == Concentrate::By::cycles ? 1 / step.factor.quantity.number
                                                         : 1 - step.factor.quantity.value_in_si;
  Amounts gone = bench.none();
  gone.water_kg = water.water_kg * (1 - left);
  Amounts amounts = amounts_of(water);
  amounts.add(gone, -1);
  record.removed.push_back(bench.portion("water", gone, gone.water_kg / water_kg_per_mol(), water));
  return bench.water(amounts, water.temperature, water.pressure);
}

}  // namespace ionledger
