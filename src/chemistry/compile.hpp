// From reactions as they were published to one coherent set on the basis; checks what can be
// checked.
#pragma once

#include <map>
#include <string>

#include "ionledger/chemistry.hpp"
#include "ionledger/diagnostic.hpp"

namespace ionledger {

/// Fills compositions, molar masses, formation and dissolution vectors and their constants.
///
/// Expects  names, charges, reactions and constants in place, the basis first, H+ at index 0.
/// Checks   every formula readable, every reaction balanced in elements and charge, every
/// participant
///          defined, every species reached from the basis, every function of temperature within
///          0.02 of its value at 25 degC (or the step stated), constituents on known species.
/// Errors   in `diagnostics`, at `where["species:NAME"]`, `["mineral:NAME"]`, `["gas:NAME"]`,
///          `["constituent:NAME"]`. Returns false when there was one.
[[nodiscard]] bool compile_chemistry(Chemistry& chemistry,
                                     const std::map<std::string, SourceSpan>& where,
                                     Diagnostics& diagnostics);

}  // namespace ionledger
