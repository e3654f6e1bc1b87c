// What a person should know beside the numbers, gathered in one place and in order of weight.
#pragma once

#include <vector>

#include "ionledger/assessment.hpp"

namespace ionledger {

/// Every caution about `state`, the gravest first. `state` must be complete but for its cautions.
[[nodiscard]] std::vector<Caution> cautions_of(const AssessedState& state,
                                               const Stream& stream,
                                               const ClosedStream& closed,
                                               const Chemistry& chemistry,
                                               const ActivityModel& model);

}  // namespace ionledger
