// A case in the numbering of the kernel, and the point from which it is solved.
#pragma once

#include "solver/kernel.hpp"

namespace ionledger::solver {

/// Fills `prepared` from the case; nothing is absent yet but phases nobody asked for. False when a
/// number that matters is not finite.
[[nodiscard]] bool prepare(const Kernel& kernel, const Case& a_case, Prepared& prepared);

/// The point given by `start`, completed: ln total where that is an amount of the component; for a
/// component with a species and its inverse, the point where the two are equal; fixed activities
/// as they are. True when `start` gave activities.
bool set_start(const Kernel& kernel, const Prepared& prepared, const Start& start, Point& point);

/// An amount typical of a phase: what the total it uses up first can make.
[[nodiscard]] double phase_scale(const Kernel& kernel, const Prepared& prepared, int phase);

}  // namespace ionledger::solver
