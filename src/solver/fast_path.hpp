// The usual way to a solution: damped sweeps, then a Newton iteration that couples everything.
#pragma once

#include "solver/kernel.hpp"
#include "solver/phases.hpp"

namespace ionledger::solver {

struct FastSettings {
  int sweeps = 3;
  double sweep_damping = 0.6;
  double largest_step = 4;  ///< Of any ln activity.
  int limit = 60;           ///< Newton iterations.
};

struct FastWork {
  Sums sums;
  PhaseSet phases;
  std::vector<double> step, by_ionic, by_solvent;  ///< n_components
  std::vector<double> phase_step, phase_by_ionic, phase_by_solvent;
  int iterations = 0;
  double ionic_strength_slope = 0;  ///< d I(c(I)) / d I at the last factorisation.
};

void resize(FastWork& work, const Kernel& kernel);

/// Balances in the caller's components are met to this share of the sum of their terms.
inline constexpr double fast_balance_tolerance = 1e-12;

/// Iterates from `point`; true when every equation is met. Otherwise `point` is unspecified.
[[nodiscard]] bool run_fast_path(const Kernel& kernel,
                                 const Prepared& prepared,
                                 const FastSettings& settings,
                                 Point& point,
                                 FastWork& work);

}  // namespace ionledger::solver
