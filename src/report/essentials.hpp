// pH, ionic strength and the other numbers that describe a water as a whole, in words. Separate
// because terminal and pages must say the same.
#pragma once

#include <string>
#include <vector>

#include "ionledger/assessment.hpp"

namespace ionledger {

struct Essential {
  std::string name;   ///< "pH"
  std::string value;  ///< "8.25 at this temperature; 8.31 measured at 25 °C"
};

/// pH first.
[[nodiscard]] std::vector<Essential> essentials_of(const AssessedState& state);

}  // namespace ionledger
