// The way to a solution when the fast one fails: the convex programme solved for certain at held
// ionic strength and solvent activity, inside a bracketed search for those two numbers.
#pragma once

#include "solver/kernel.hpp"

namespace ionledger::solver {

struct SafeFinding {
  bool solved = false;
  bool limits_contradict = false;  ///< Two imposed columns want different things.
  int iterations = 0;
  double ionic_strength_slope = 0;
};

/// Solves from any finite `point`, which becomes the solution.
[[nodiscard]] SafeFinding run_safe_path(const Kernel& kernel,
                                        const Prepared& prepared,
                                        Point& point);

/// Whether I(c(I)) = I has a second root, from signs on a grid of ionic strengths around `point`,
/// a solution. Expensive; called only when large charges matter.
[[nodiscard]] bool has_several_solutions(const Kernel& kernel,
                                         const Prepared& prepared,
                                         const Point& point);

}  // namespace ionledger::solver
