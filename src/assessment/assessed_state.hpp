// One state of the water from its solution. Separate because the states of a train are made so too.
#pragma once

#include "ionledger/assessment.hpp"

namespace ionledger {

/// Everything that is said about `closed`, which has a solution.
[[nodiscard]] AssessedState assessed_state(const Stream& stream,
                                           const ClosedStream& closed,
                                           const Chemistry& chemistry,
                                           const ActivityModel& model);

}  // namespace ionledger
