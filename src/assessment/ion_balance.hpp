// The ion balance a laboratory would strike, and what the standard accepts of it.
#pragma once

#include <string>

#include "ionledger/assessment.hpp"

namespace ionledger {

/// 100 (cations - anions) / (cations + anions); 0 when there are no ions.
[[nodiscard]] double imbalance_percent(double cations_eq, double anions_eq);

/// A caution when the imbalance is over what is accepted; empty `says` when it is not.
[[nodiscard]] Caution imbalance_caution(double imbalance_percent, double accepted_percent);

/// Constituents of a full analysis that are not in the report, as one caution; empty `says` when
/// none. Speaks up only when at least three of them are there: a reagent solution is not a bad
/// analysis.
[[nodiscard]] Caution missing_majors_caution(const Stream& stream, const Chemistry& chemistry);

}  // namespace ionledger
