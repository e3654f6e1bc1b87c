// Hands chemistry to the solver as plain arrays and reads its answer back.
#include "equilibrium/system.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cassert>
#include <cmath>
#include <limits>
#include <numbers>

namespace ionledger {
namespace {

SolveStatus status_of(solver::Status status) {
  switch (status) {
    case solver::Status::converged:
      return SolveStatus::converged;
    case solver::Status::stalled:
      return SolveStatus::stalled;
    case solver::Status::iteration_limit:
      return SolveStatus::iteration_limit;
    case solver::Status::infeasible:
      return SolveStatus::infeasible;
    case solver::Status::non_finite:
      return SolveStatus::non_finite;
    case solver::Status::not_run:
      break;
  }
  return SolveStatus::not_run;
}

/// Index of `term` among the classes, which are few; added when it is new.
int class_of(const ActivityTerm& term, std::vector<solver::ActivityClass>& classes) {
  for (std::size_t k = 0; k < classes.size(); ++k) {
    if (ActivityTerm{classes[k].debye, classes[k].size, classes[k].linear} == term) {
      return static_cast<int>(k);
    }
  }
  classes.push_back({term.debye, term.size, term.linear});
  return static_cast<int>(classes.size() - 1);
}

template <class Phases>
void add_phases(const Phases& phases,
                const std::vector<double>& ln_k,
                solver::System& system,
                solver::Conditions& conditions) {
  for (std::size_t m = 0; m < phases.size(); ++m) {
    system.phase_stoichiometry.insert(system.phase_stoichiometry.end(),
                                      phases[m].dissolution.begin(),
                                      phases[m].dissolution.end());
    system.phase_solvent_exponent.push_back(phases[m].water_exponent);
    conditions.ln_k_phase.push_back(-ln_k[m]);
  }
  system.n_phases += static_cast<int>(phases.size());
}

}  // namespace

EquilibriumSystem::EquilibriumSystem(const Chemistry& chemistry,
                                     const ActivityModel& model,
                                     Temperature temperature)
    : chemistry_(chemistry), temperature_(temperature) {
  const std::vector<ActivityTerm> terms = activity_terms(model, chemistry, temperature);
  system_.n_components = chemistry.n_basis;
  system_.n_species = static_cast<int>(chemistry.species.size());
  for (std::size_t s = 0; s < chemistry.species.size(); ++s) {
    const Species& species = chemistry.species[s];
    system_.stoichiometry.insert(
        system_.stoichiometry.end(), species.formation.begin(), species.formation.end());
    system_.solvent_exponent.push_back(species.water_exponent);
    system_.ionic_weight.push_back(0.5 * species.charge_number * species.charge_number);
    system_.solute_weight.push_back(1);
    system_.activity_class.push_back(class_of(terms[s], conditions_.classes));
  }
  conditions_.ln_k = ln_formation(chemistry, temperature);
  conditions_.solvent_slope = model.water_activity_slope;
  add_phases(chemistry.minerals, ln_solubility(chemistry, temperature), system_, conditions_);
  add_phases(chemistry.gases, ln_dissolution(chemistry, temperature), system_, conditions_);
}

solver::Case EquilibriumSystem::case_of(const Problem& problem) const {
  solver::Case result;
  result.totals = problem.totals;
  result.fixed_ln_activity.assign(problem.totals.size(), std::nullopt);
  if (problem.ph) result.fixed_ln_activity[0] = -*problem.ph * std::numbers::ln10;
  const auto n_phases = static_cast<std::size_t>(system_.n_phases);
  result.phase_rules.assign(n_phases, solver::PhaseRule::absent);
  result.ln_target.assign(n_phases, 0.0);
  for (const Problem::AllowedMineral& allowed : problem.minerals) {
    const auto m = static_cast<std::size_t>(allowed.mineral);
    result.phase_rules[m] = solver::PhaseRule::may_form;
    result.ln_target[m] = allowed.saturation_index * std::numbers::ln10;
  }
  for (const Problem::HeldGas& held : problem.gases) {
    const std::size_t m = chemistry_.minerals.size() + static_cast<std::size_t>(held.gas);
    result.phase_rules[m] = solver::PhaseRule::imposed;
    result.ln_target[m] = std::log(held.partial_pressure_bar);
  }
  return result;
}

std::string EquilibriumSystem::reason_of(const solver::Outcome& outcome) const {
  if (outcome.conflict.empty()) return outcome.reason;
  std::string combination;
  for (std::size_t k = 0; k < outcome.conflict.size(); ++k) {
    const auto component = static_cast<std::size_t>(outcome.conflict[k]);
    combination += fmt::format("{}{:+g} T({})",
                               combination.empty() ? "" : " ",
                               outcome.conflict_weight[k],
                               chemistry_.species[component].name);
  }
  return fmt::format(
      "no amounts of species, all of them positive, add up to these totals: {} cannot be negative",
      combination);
}

Solution EquilibriumSystem::solution_of(const Problem& problem,
                                        const solver::Outcome& outcome) const {
  Solution result;
  result.status = status_of(outcome.status);
  result.temperature = temperature_;
  const solver::Certificate& c = outcome.certificate;
  result.certificate.converged = c.good;
  result.certificate.worst_balance_residual = c.worst_balance_residual;
  if (c.worst_component >= 0) {
    result.certificate.worst_balance =
        chemistry_.species[static_cast<std::size_t>(c.worst_component)].name;
  }
  result.certificate.ionic_strength_residual = c.ionic_strength_residual;
  result.certificate.complementarity = c.complementarity;
  result.certificate.may_have_other_solutions = c.several_solutions;
  result.certificate.iterations = outcome.iterations;
  result.certificate.path = outcome.used_safe_path ? "safe" : "fast";
  if (result.status != SolveStatus::converged) {
    result.reason = reason_of(outcome);
    return result;
  }
  result.ionic_strength_molal = outcome.ionic_strength;
  result.water_activity = std::exp(outcome.ln_solvent_activity);
  const std::size_t n = chemistry_.species.size();
  result.molality.resize(n);
  result.ln_activity.resize(n);
  for (std::size_t s = 0; s < n; ++s) {
    result.molality[s] = std::exp(outcome.ln_amount[s]);
    result.ln_activity[s] = outcome.ln_amount[s] + outcome.ln_gamma[s];
  }
  result.ln_activity_coefficient = outcome.ln_gamma;
  result.totals.assign(static_cast<std::size_t>(chemistry_.n_basis), 0.0);
  double charge = 0;
  double gross = 0;
  for (std::size_t s = 0; s < n; ++s) {
    const Species& species = chemistry_.species[s];
    for (std::size_t i = 0; i < result.totals.size(); ++i) {
      result.totals[i] += species.formation[i] * result.molality[s];
    }
    charge += species.charge_number * result.molality[s];
    gross += std::abs(species.charge_number) * result.molality[s];
  }
  std::vector<double> asked = problem.totals;
  asked[0] = problem.ph ? result.totals[0] : asked[0];
  for (const Problem::AllowedMineral& allowed : problem.minerals) {
    const double amount = outcome.phase_amount[static_cast<std::size_t>(allowed.mineral)];
    result.deposited.push_back(amount);
  }
  for (const Problem::HeldGas& held : problem.gases) {
    const std::size_t m = chemistry_.minerals.size() + static_cast<std::size_t>(held.gas);
    result.gas_taken_up.push_back(-outcome.phase_amount[m]);
  }
  // Minerals and gases carry no charge, so what is dissolved has the charge of what was asked for.
  if (gross > 0)
    result.certificate.charge_residual = std::abs(charge - net_charge(chemistry_, asked)) / gross;
  return result;
}

Solution EquilibriumSystem::solve(const Problem& problem) const {
  assert(in_kelvin(problem.temperature) == in_kelvin(temperature_));
  return solution_of(problem, solver::solve(system_, conditions_, case_of(problem)));
}

double Solution::ph() const {
  return ln_activity.empty() ? std::numeric_limits<double>::quiet_NaN()
                             : -ln_activity[0] / std::numbers::ln10;
}

Solution solve(const Problem& problem, const Chemistry& chemistry, const ActivityModel& model) {
  return EquilibriumSystem(chemistry, model, problem.temperature).solve(problem);
}

double net_charge(const Chemistry& chemistry, const std::vector<double>& totals) {
  double sum = 0;
  for (std::size_t i = 0; i < totals.size(); ++i)
    sum += chemistry.species[i].charge_number * totals[i];
  return sum;
}

double alkalinity(const Chemistry& chemistry, const std::vector<double>& totals) {
  double sum = -totals[0];
  for (std::size_t i = 1; i < totals.size(); ++i) sum += chemistry.reference_protons[i] * totals[i];
  return sum;
}

}  // namespace ionledger
