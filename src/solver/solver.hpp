// The convex programme behind every equilibrium, in plain algebra: a stoichiometric matrix, ln K,
// totals, fixed activities, saturation limits and an activity function. Knows no chemistry.
//
// Unknowns are x_i = ln X_i, the log activities of the components. Species j has
//
//     ln activity_j = ln K_j + sum_i nu_ji x_i + w_j ln a_w        amount c_j = activity_j /
//     gamma_j ln gamma_j    = -debye sqrt(I)/(1 + size sqrt(I)) + linear I,   I = sum_j
//     ionic_weight_j c_j a_w           = 1 - solvent_slope sum_j solute_weight_j c_j
//
// and every component has the balance sum_j nu_ji c_j + sum_m nu_mi n_m + gas transfer = T_i.
// A component takes part in the amounts only if it is itself listed as a species.
// Phase m is limited by ln Q_m = ln K_m + sum_i nu_mi x_i + w_m ln a_w <= ln_target_m, amount n_m
// >= 0, n_m (ln_target_m - ln Q_m) = 0; an imposed phase has ln Q_m = ln_target_m and an amount of
// either sign.
#pragma once

#include <optional>
#include <span>
#include <string>
#include <vector>

namespace ionledger::solver {

struct ActivityClass {
  double debye = 0, size = 0, linear = 0;
};

/// What does not change with temperature or case. Sizes are n_species x n_components, row-major.
struct System {
  int n_components = 0;
  int n_species = 0;
  int n_phases = 0;
  std::vector<double> stoichiometry;
  std::vector<double> solvent_exponent;  ///< n_species
  std::vector<double> ionic_weight;      ///< n_species: z^2 / 2
  std::vector<double> solute_weight;     ///< n_species: 1 for a solute
  std::vector<int> activity_class;       ///< n_species, index into Conditions::classes
  std::vector<double> phase_stoichiometry;
  std::vector<double> phase_solvent_exponent;  ///< n_phases
};

/// What changes with temperature.
struct Conditions {
  std::vector<double> ln_k;        ///< n_species
  std::vector<double> ln_k_phase;  ///< n_phases: ln Q = ln_k_phase + ...
  std::vector<ActivityClass> classes;
  double solvent_slope = 0;  ///< 0 keeps a_w at 1.
};

enum class PhaseRule { absent, may_form, imposed };

/// One case to solve.
struct Case {
  std::vector<double> totals;  ///< n_components; ignored where the activity is fixed.
  /// n_components or empty: the same totals written as decimals ("16e-3"), for cases where totals
  /// cancel to beyond the precision of a double. An empty string falls back on `totals`.
  std::vector<std::string> decimal_totals;
  std::vector<std::optional<double>> fixed_ln_activity;  ///< n_components or empty
  std::vector<PhaseRule> phase_rules;                    ///< n_phases or empty (all absent)
  std::vector<double> ln_target;                         ///< n_phases or empty (all 0)
};

enum class Status { not_run, converged, stalled, iteration_limit, infeasible, non_finite };
enum class Feasibility { interior, boundary, infeasible };

struct Certificate {
  bool good = false;
  double worst_balance_residual = 0;  ///< In the optimal basis: |residual| / sum |terms|.
  int worst_component = -1;
  double ionic_strength_residual = 0;  ///< |I(c) - I| / I
  double solvent_residual = 0;
  double complementarity = 0;  ///< Worst of phase amounts < 0, ln Q over target, and their product.
  double ionic_strength_slope = 0;  ///< d I(c(I)) / d I at the solution.
  bool several_solutions = false;   ///< More than one root of I(c(I)) = I was found.
};

struct Outcome {
  Status status = Status::not_run;
  Feasibility feasibility = Feasibility::interior;
  std::string reason;         ///< In terms of component and phase numbers; empty when converged.
  std::vector<int> conflict;  ///< Components of the combination that proves infeasibility.
  std::vector<double> conflict_weight;
  std::vector<double> x;             ///< ln activity of the components; -infinity when absent.
  std::vector<double> ln_amount;     ///< ln c_j; -infinity when absent.
  std::vector<double> ln_gamma;      ///< n_species
  std::vector<double> phase_amount;  ///< n_phases
  std::vector<double>
      implied_total;  ///< n_components: sum nu c + phases, also where activity was fixed
  double ionic_strength = 0;
  double ln_solvent_activity = 0;
  int iterations = 0;
  bool used_safe_path = false;
  Certificate certificate;
};

/// Where to start; empty members mean the built-in start.
struct Start {
  std::vector<double> x;
  double ionic_strength = -1;
  std::vector<double> phase_amount;
};

/// Solves one case from any start. Never throws, never prints. Deterministic.
[[nodiscard]] Outcome solve(const System& system,
                            const Conditions& conditions,
                            const Case& a_case,
                            const Start& start = {});

}  // namespace ionledger::solver
