// Whether positive amounts can add up to the totals at all, decided before anything is iterated.
#pragma once

#include "solver/kernel.hpp"

namespace ionledger::solver {

struct FeasibilityFinding {
  Feasibility kind = Feasibility::interior;
  std::vector<int> conflict;  ///< In the caller's numbers.
  std::vector<double> conflict_weight;
};

/// Settles the ordinary cases by looking at signs: removes components whose total is zero and that
/// nothing could take away, then wants for every other row a species of its own and a positive
/// total, or one species of each sign. Marks what is absent. False when signs do not settle it.
[[nodiscard]] bool settle_by_signs(const Kernel& kernel, Prepared& prepared, Feasibility& kind);

}  // namespace ionledger::solver
