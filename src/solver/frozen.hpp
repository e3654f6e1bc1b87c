// The convex programme that is left when ionic strength and solvent activity are held: minimise
// sum c_j(x) - T x over the log activities x, with some columns held at known ln Q. Separate
// because both the interior point method and the search for the ionic strength stand on it.
#pragma once

#include <vector>

#include "solver/basis.hpp"
#include "solver/kernel.hpp"

namespace ionledger::solver {

/// One held problem and its state; sized once per call of the safe path.
struct Frozen {
  const Kernel* kernel = nullptr;
  const Prepared* prepared = nullptr;
  std::vector<double> ln_k;      ///< Species, with gamma and solvent inside.
  std::vector<double> ln_limit;  ///< nu_m x <= ln_limit for phases.
  std::vector<double> x;
  std::vector<double> amount;       ///< Phases.
  std::vector<unsigned char> held;  ///< Phases taken as equalities; imposed ones always are.

  // Everything below is a function of the state, refreshed by `refresh`.
  std::vector<double> ln_weight;  ///< Species: ln c_j. Phases: whatever the caller set, or -inf.
  Basis basis;
  std::vector<int> free_rows;  ///< Rows whose basis column is not held, largest weight first.
  std::vector<double> alpha;   ///< n_components per column.
  std::vector<double> total;   ///< T'
  std::vector<double> scaled_residual;  ///< (sum alpha c - T') / weight of the basis column.
};

[[nodiscard]] Frozen freeze(const Kernel& kernel, const Prepared& prepared, const Point& point);

/// ln_k and ln_limit at another ionic strength and solvent activity.
void set_conditions(double ionic_strength, double ln_solvent, Frozen& frozen);

/// ln c, basis (held columns, then by weight), alpha and T'. Phases compete for places in the basis
/// when `ln_weight` of them is finite.
void refresh(Frozen& frozen);

/// Moves x so that every held column is at its limit. False when two of them contradict.
[[nodiscard]] bool meet_limits(Frozen& frozen);

/// Change of x for given changes of the basis columns' ln Q.
void add_step(const Frozen& frozen,
              const std::vector<double>& basis_step,
              double fraction,
              std::vector<double>& x);

/// nu_j dx for given changes of the basis columns.
[[nodiscard]] double column_change(const Frozen& frozen,
                                   int column,
                                   const std::vector<double>& basis_step);

/// Newton from any x; held phases get their amounts. Counts `iterations`. False: not converged.
[[nodiscard]] bool solve_frozen(Frozen& frozen, int& iterations);

}  // namespace ionledger::solver
