// Indices that are a small experiment: calcium carbonate to equilibrium, a titration, a drop of
// base. Separate because each of them solves equilibria.
#include <cmath>

#include "equilibrium/system.hpp"
#include "ionledger/indices.hpp"

namespace ionledger {
namespace {

constexpr double first_dose_mol_per_kg = 1e-3;
constexpr double largest_dose_mol_per_kg = 10;
constexpr double half_step_ph = 0.01;

/// Hydrogen total that `solution` would have at `ph`, everything else as it is.
std::optional<double> hydrogen_at(double ph,
                                  const Solution& solution,
                                  const EquilibriumSystem& system) {
  Problem problem;
  problem.temperature = system.temperature();
  problem.totals = solution.totals;
  problem.ph = ph;
  const Solution there = system.solve(problem);
  if (there.status != SolveStatus::converged) return std::nullopt;
  return there.totals[0];
}

}  // namespace

std::optional<double> precipitation_potential_mol_per_kg(const Solution& solution,
                                                         int mineral,
                                                         const Chemistry& chemistry,
                                                         const ActivityModel& model) {
  const EquilibriumSystem system(chemistry, model, solution.temperature);
  const auto& dissolution = chemistry.minerals[static_cast<std::size_t>(mineral)].dissolution;
  // Solid is added until some of it is left: only then is the water in equilibrium with it.
  double dose = 0;
  while (dose <= largest_dose_mol_per_kg) {
    Problem problem;
    problem.temperature = solution.temperature;
    problem.totals = solution.totals;
    for (std::size_t i = 0; i < dissolution.size(); ++i) {
      problem.totals[i] += dose * dissolution[i];
    }
    problem.minerals = {{mineral, 0}};
    const Solution settled = system.solve(problem);
    if (settled.status != SolveStatus::converged) return std::nullopt;
    if (settled.deposited[0] > 0) return settled.deposited[0] - dose;
    dose = dose == 0 ? first_dose_mol_per_kg : 4 * dose;
  }
  return std::nullopt;
}

std::optional<double> titrated_alkalinity_eq_per_kg(const Solution& solution,
                                                    double end_ph,
                                                    const Chemistry& chemistry,
                                                    const ActivityModel& model) {
  const EquilibriumSystem system(chemistry, model, celsius(25.0));
  const auto hydrogen = hydrogen_at(end_ph, solution, system);
  if (!hydrogen) return std::nullopt;
  return std::max(0.0, *hydrogen - solution.totals[0]);
}

std::optional<double> buffer_intensity_eq_per_kg(const Solution& solution,
                                                 const Chemistry& chemistry,
                                                 const ActivityModel& model) {
  const EquilibriumSystem system(chemistry, model, solution.temperature);
  const auto below = hydrogen_at(solution.ph() - half_step_ph, solution, system);
  const auto above = hydrogen_at(solution.ph() + half_step_ph, solution, system);
  if (!below || !above) return std::nullopt;
  return (*below - *above) / (2 * half_step_ph);
}

}  // namespace ionledger
