// Formulas, charges and reactions as text: what the model files are written in.
#pragma once

#include <optional>
#include <string_view>
#include <vector>

#include "ionledger/chemistry.hpp"

namespace ionledger {

/// Charge number at the end of a species name: "Ca+2" 2, "HCO3-" -1, "CaCO3" 0; nullopt when a sign
/// is followed by anything but one digit.
[[nodiscard]] std::optional<int> charge_of(std::string_view name);

/// "CO2 + H2O = H+ + HCO3-" as terms, products positive; a coefficient stands before its formula
/// with a space ("2 H+"). nullopt when a side is empty, a coefficient is not a positive number or
/// there is not exactly one " = ".
[[nodiscard]] std::optional<std::vector<Term>> read_reaction(std::string_view text);

}  // namespace ionledger
