// Whether positive amounts can add up to the totals at all, decided before anything is iterated.
#pragma once

#include "solver/kernel.hpp"

namespace ionledger::solver {

struct FeasibilityFinding {
  Feasibility kind = Feasibility::interior;
  std::vector<int> conflict;  ///< Components, in the caller's numbers.
  std::vector<double> conflict_weight;
};

/// Settles the ordinary cases by looking at signs: removes components whose total is zero and that
/// nothing could take away, then wants for every other row a species of its own and a positive
/// total, or one species of each sign, or an imposed phase that can supply it. Marks what is
/// absent. False when signs do not settle it.
[[nodiscard]] bool settle_by_signs(const Kernel& kernel, Prepared& prepared, Feasibility& kind);

/// Settles every case, by linear programming in exact arithmetic. Marks the columns that can have
/// no amount. Uses the decimal totals where the case has them. When infeasible, the combination
/// found is one that no positive amounts could make negative, and the totals do.
[[nodiscard]] FeasibilityFinding settle_exactly(const Kernel& kernel,
                                                const Case& a_case,
                                                Prepared& prepared);

/// Sets total and total_low from the decimal totals; false when one is not a decimal.
[[nodiscard]] bool read_decimal_totals(const Kernel& kernel,
                                       const Case& a_case,
                                       Prepared& prepared);

}  // namespace ionledger::solver
