// Which phases are present, without guessing: a primal-dual interior point method on the held
// programme with its limits as inequalities. Separate because it only proposes the set; amounts
// come from the Newton iteration that follows.
#pragma once

#include "solver/frozen.hpp"

namespace ionledger::solver {

/// Sets frozen.held for the phases that may form and moves x near the optimum. False when it did
/// not settle; frozen is then at its last iterate. Counts `iterations`.
[[nodiscard]] bool find_present_phases(Frozen& frozen, int& iterations);

}  // namespace ionledger::solver
