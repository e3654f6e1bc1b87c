// Judges an outcome with plain loops in long double that share nothing with the solver.
#pragma once

#include <algorithm>
#include <cmath>

#include "solver/solver.hpp"

namespace ionledger::testing {

/// Worst relative violation of each kind of equation; 0 is perfect.
struct Recheck {
  double balance = 0;      ///< |sum - T| / sum |terms|
  double mass_action = 0;  ///< |ln c + ln gamma - ln K - nu x - w ln a_w|
  double gamma = 0;        ///< |ln gamma - formula at the outcome's I|
  double coupling = 0;     ///< I(c) against I, relative, and a_w
  double phases = 0;       ///< ln Q over target, amounts below 0, product of both
};

inline Recheck recheck(const solver::System& system,
                       const solver::Conditions& conditions,
                       const solver::Case& a_case,
                       const solver::Outcome& outcome) {
  Recheck worst;
  const int n = system.n_components;
  const auto raise = [](double& value, long double candidate) {
    // NaN must not hide.
    if (!(candidate <= value)) value = static_cast<double>(candidate);
  };
  std::vector<long double> sum(static_cast<std::size_t>(n), 0);
  std::vector<long double> size = sum;
  long double ionic = 0;
  long double solute = 0;
  for (int j = 0; j < system.n_species; ++j) {
    if (outcome.ln_amount[j] == -INFINITY) continue;
    const long double c = std::exp(static_cast<long double>(outcome.ln_amount[j]));
    ionic += system.ionic_weight[j] * c;
    solute += system.solute_weight[j] * c;
    long double action = conditions.ln_k[j];
    action += system.solvent_exponent[j] * outcome.ln_solvent_activity;
    for (int i = 0; i < n; ++i) {
      const long double nu = system.stoichiometry[static_cast<std::size_t>(j * n + i)];
      if (nu == 0) continue;
      sum[i] += nu * c;
      size[i] += std::abs(nu) * c;
      action += nu * outcome.x[i];
    }
    raise(worst.mass_action, std::abs(action - outcome.ln_amount[j] - outcome.ln_gamma[j]));
    const solver::ActivityClass& k = conditions.classes[system.activity_class[j]];
    const long double root = std::sqrt(static_cast<long double>(outcome.ionic_strength));
    const long double ln_gamma =
        -k.debye * root / (1 + k.size * root) + k.linear * outcome.ionic_strength;
    raise(worst.gamma, std::abs(ln_gamma - outcome.ln_gamma[j]));
  }
  for (int m = 0; m < system.n_phases; ++m) {
    if (a_case.phase_rules.empty() || a_case.phase_rules[m] == solver::PhaseRule::absent) continue;
    const long double amount = outcome.phase_amount[m];
    long double excess = conditions.ln_k_phase[m] - a_case.ln_target[m] +
                         system.phase_solvent_exponent[m] * outcome.ln_solvent_activity;
    for (int i = 0; i < n; ++i) {
      const long double nu = system.phase_stoichiometry[static_cast<std::size_t>(m * n + i)];
      if (nu == 0) continue;
      sum[i] += nu * amount;
      size[i] += std::abs(nu * amount);
      excess += nu * outcome.x[i];
    }
    if (a_case.phase_rules[m] == solver::PhaseRule::imposed) {
      raise(worst.phases, std::abs(excess));
    } else {
      raise(worst.phases, std::max({excess, -amount, std::min(-excess, amount)}));
    }
  }
  for (int i = 0; i < n; ++i) {
    if (!a_case.fixed_ln_activity.empty() && a_case.fixed_ln_activity[i]) {
      raise(worst.mass_action, std::abs(*a_case.fixed_ln_activity[i] - outcome.x[i]));
      continue;
    }
    const long double total = a_case.totals[i];
    if (size[i] + std::abs(total) == 0) continue;
    raise(worst.balance, std::abs(sum[i] - total) / (size[i] + std::abs(total)));
  }
  if (ionic > 0) raise(worst.coupling, std::abs(ionic - outcome.ionic_strength) / ionic);
  raise(worst.coupling,
        std::abs(1 - conditions.solvent_slope * solute -
                 std::exp(static_cast<long double>(outcome.ln_solvent_activity))));
  return worst;
}

}  // namespace ionledger::testing
