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

/// Adds what `mol` of a mineral dissolve to.
void add_dissolved(const Mineral& mineral, double mol, std::vector<double>& totals) {
  for (std::size_t i = 0; i < totals.size(); ++i) totals[i] += mol * mineral.dissolution[i];
}

/// Lets the minerals of `problem` form or dissolve in `amounts`, whose solids they join.
bool equilibrate(Problem& problem,
                 const std::vector<std::size_t>& minerals,
                 Amounts& amounts,
                 const Water& water,
                 Workbench& bench) {
  const Chemistry& chemistry = bench.chemistry();
  const Water now = Workbench::unsolved(amounts, water.temperature, water.pressure);
  problem.totals = now.totals;
  for (const std::size_t m : minerals) {
    add_dissolved(chemistry.minerals[m], now.solids[m], problem.totals);
  }
  const Solution solution = bench.solve(problem);
  if (solution.status != SolveStatus::converged) {
    static_cast<void>(bench.fail("no equilibrium with the solids: " + solution.reason));
    return false;
  }
  for (std::size_t k = 0; k < minerals.size(); ++k) {
    const double mol = (solution.deposited[k] - now.solids[minerals[k]]) * now.water_kg;
    amounts.add(bench.dissolved(chemistry.minerals[minerals[k]], mol), -1);
    amounts.solids[minerals[k]] = solution.deposited[k] * now.water_kg;
  }
  for (std::size_t i = 1; i < amounts.basis.size(); ++i) {
    if (std::abs(amounts.basis[i]) < depleted * problem.totals[i] * now.water_kg) {
      amounts.basis[i] = solution.totals[i] * now.water_kg;
    }
  }
  return true;
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
  std::vector<std::size_t> minerals;
  Problem problem;
  problem.temperature = water.temperature;
  for (const Settle::Entry& entry : settle.minerals) {
    const auto m = static_cast<std::size_t>(chemistry.mineral_index(entry.mineral.text));
    if (!can_form(chemistry.minerals[m], water.totals) && water.solids[m] == 0) continue;
    minerals.push_back(m);
    problem.minerals.push_back(
        {static_cast<int>(m), entry.index ? entry.index->quantity.number : 0});
  }
  Amounts amounts = amounts_of(water);
  for (int pass = 0; pass < phase_passes; ++pass) {
    if (!equilibrate(problem, minerals, amounts, water, bench)) return std::nullopt;
  }
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

namespace {

/// mol of the mineral that one kg of `water` dissolves to saturation; negative when it is past it.
/// The bed is a solid that does not run out: more of it is offered until some is left.
std::optional<double> dissolved_by(const Water& water, std::size_t mineral, Workbench& bench) {
  Problem problem;
  problem.temperature = water.temperature;
  problem.minerals.push_back({static_cast<int>(mineral), 0});
  for (double offered = first_bed_molal; offered <= last_bed_molal; offered *= 10) {
    problem.totals = water.totals;
    add_dissolved(bench.chemistry().minerals[mineral], offered, problem.totals);
    const Solution solution = bench.solve(problem);
    if (solution.status != SolveStatus::converged) {
      return bench.fail("no equilibrium with the bed: " + solution.reason);
    }
    if (solution.deposited[0] > 0) return offered - solution.deposited[0];
  }
  return bench.fail("the bed dissolves without reaching saturation");
}

}  // namespace

Applied apply(const PassBed& bed, const Water& water, Workbench& bench, StepRecord& record) {
  const Chemistry& chemistry = bench.chemistry();
  const auto m = static_cast<std::size_t>(chemistry.mineral_index(bed.mineral.text));
  Amounts amounts = amounts_of(water);
  double sum = 0;
  for (int pass = 0; pass < phase_passes; ++pass) {
    const Water now = Workbench::unsolved(amounts, water.temperature, water.pressure);
    const auto molality = dissolved_by(now, m, bench);
    if (!molality) return std::nullopt;
    if (pass == 0 && *molality <= 0) return water;
    const double mol = *molality * now.water_kg;
    amounts.add(bench.dissolved(chemistry.minerals[m], mol));
    sum += mol;
  }
  record.added.push_back(bench.portion(
      chemistry.minerals[m].name, bench.dissolved(chemistry.minerals[m], sum), sum, water));
  return bench.water(amounts, water.temperature, water.pressure);
}

}  // namespace ionledger
