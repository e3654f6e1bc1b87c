// Steps that move solids: settling, removing what is suspended, a bed that dissolves.
#include <algorithm>
#include <cmath>

#include "treatment/workbench.hpp"

namespace ionledger {
namespace {

constexpr double hours_per_month = 730.5;  // 365.25 d / 12
constexpr double first_bed_molal = 0.01;
constexpr double last_bed_molal = 100;
/// Below this share of its total a component is what the solver found dissolved; the difference of
/// total and deposit would be rounding.
constexpr double depleted = 1e-6;

/// Every component of the mineral, hydrogen aside, is there.
bool can_form(const Mineral& mineral, const std::vector<double>& totals) {
  for (std::size_t i = 1; i < totals.size(); ++i) {
    if (mineral.dissolution[i] != 0 && !(totals[i] > 0)) return false;
  }
  return true;
}

/// The water with `solid_mol[k]` of the problem's minerals dissolved in it, mol per kg of water.
std::vector<double> with_dissolved(std::vector<double> totals,
                                   const std::vector<std::size_t>& minerals,
                                   const std::vector<double>& solid_mol,
                                   double sign,
                                   const Chemistry& chemistry) {
  for (std::size_t k = 0; k < minerals.size(); ++k) {
    for (std::size_t i = 0; i < totals.size(); ++i) {
      totals[i] += sign * solid_mol[k] * chemistry.minerals[minerals[k]].dissolution[i];
    }
  }
  return totals;
}

/// Moves `change[k]` mol of mineral k, for every kg of feed, from the water into its solids.
/// `dissolved` is what the solver left dissolved, per kg of the water before.
void precipitate(Amounts& amounts,
                 const std::vector<std::size_t>& minerals,
                 const std::vector<double>& change,
                 const std::vector<double>& dissolved,
                 const Water& water,
                 const Workbench& bench) {
  for (std::size_t k = 0; k < minerals.size(); ++k) {
    amounts.add(bench.dissolved(bench.chemistry().minerals[minerals[k]], change[k]), -1);
    amounts.solids[minerals[k]] += change[k];
  }
  for (std::size_t i = 1; i < amounts.basis.size(); ++i) {
    if (std::abs(amounts.basis[i]) < depleted * water.totals[i] * water.water_kg) {
      amounts.basis[i] = dissolved[i] * water.water_kg;
    }
  }
}

Portion solid_portion(std::size_t mineral, double mol, const Water& water, Workbench& bench) {
  Amounts amounts = bench.none();
  amounts.solids[mineral] = mol;
  return bench.portion(bench.chemistry().minerals[mineral].name, std::move(amounts), mol, water);
}

void add_thickness(Portion& deposit, const Settle& settle, const Workbench& bench) {
  if (!settle.area || !deposit.kg_per_h) return;
  const auto& densities = bench.plant().supplies.solid_densities;
  const auto density = densities.find(deposit.what);
  if (density == densities.end()) return;
  const double m3_per_month =
      *deposit.kg_per_h * hours_per_month / (1000 * density->second.kg_per_l);
  deposit.mm_per_month = 1000 * m3_per_month / settle.area->quantity.value_in_si;
}

}  // namespace

Applied apply(const Settle& settle, const Water& water, Workbench& bench, StepRecord& record) {
  const Chemistry& chemistry = bench.chemistry();
  Problem problem;
  problem.temperature = water.temperature;
  std::vector<std::size_t> minerals;
  std::vector<double> before;
  for (const Settle::Entry& entry : settle.minerals) {
    const auto m = static_cast<std::size_t>(chemistry.mineral_index(entry.mineral.text));
    if (!can_form(chemistry.minerals[m], water.totals) && water.solids[m] == 0) continue;
    minerals.push_back(m);
    before.push_back(water.solids[m]);
    problem.minerals.push_back(
        {static_cast<int>(m), entry.index ? entry.index->quantity.number : 0});
  }
  problem.totals = with_dissolved(water.totals, minerals, before, 1, chemistry);
  const Solution solution = bench.solve(problem);
  if (solution.status != SolveStatus::converged) {
    return bench.fail("no equilibrium with the solids: " + solution.reason);
  }
  std::vector<double> change;
  for (std::size_t k = 0; k < minerals.size(); ++k) {
    change.push_back((solution.deposited[k] - before[k]) * water.water_kg);
  }
  Amounts amounts = amounts_of(water);
  precipitate(amounts, minerals, change, solution.totals, water, bench);
  record.solids_stay = settle.keep_solids;
  for (std::size_t m = 0; m < amounts.solids.size(); ++m) {
    const double formed = amounts.solids[m] - water.solids[m] * water.water_kg;
    const double mol = settle.keep_solids ? formed : amounts.solids[m];
    if (mol == 0) continue;
    record.deposited.push_back(solid_portion(m, mol, water, bench));
    add_thickness(record.deposited.back(), settle, bench);
    if (!settle.keep_solids) amounts.solids[m] = 0;
  }
  return bench.water(amounts, water.temperature, water.pressure);
}

Applied apply(const RemoveSolids& remove,
              const Water& water,
              Workbench& bench,
              StepRecord& record) {
  Water after = water;
  for (std::size_t m = 0; m < after.solids.size(); ++m) {
    const double gone = after.solids[m] * remove.share.quantity.value_in_si;
    if (gone == 0) continue;
    record.removed.push_back(solid_portion(m, gone * water.water_kg, water, bench));
    after.solids[m] -= gone;
  }
  return after;
}

/// The bed is a solid that does not run out: more of it is offered until some is left.
Applied apply(const PassBed& bed, const Water& water, Workbench& bench, StepRecord& record) {
  const Chemistry& chemistry = bench.chemistry();
  const auto m = static_cast<std::size_t>(chemistry.mineral_index(bed.mineral.text));
  const std::vector<std::size_t> minerals = {m};
  Problem problem;
  problem.temperature = water.temperature;
  problem.minerals.push_back({static_cast<int>(m), 0});
  for (double offered = first_bed_molal; offered <= last_bed_molal; offered *= 10) {
    problem.totals = with_dissolved(water.totals, minerals, {offered}, 1, chemistry);
    const Solution solution = bench.solve(problem);
    if (solution.status != SolveStatus::converged) {
      return bench.fail("no equilibrium with the bed: " + solution.reason);
    }
    if (solution.deposited[0] <= 0) continue;
    const double dissolved = (offered - solution.deposited[0]) * water.water_kg;
    if (dissolved <= 0) return water;
    Amounts amounts = amounts_of(water);
    const Amounts gained = bench.dissolved(chemistry.minerals[m], dissolved);
    amounts.add(gained);
    record.added.push_back(bench.portion(chemistry.minerals[m].name, gained, dissolved, water));
    return bench.water(amounts, water.temperature, water.pressure);
  }
  return bench.fail("the bed dissolves without reaching saturation");
}

}  // namespace ionledger
