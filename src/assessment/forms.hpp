// The forms in which a constituent is dissolved, ion pairs included: what a laboratory that
// titrates or weighs sees of it.
#pragma once

#include <vector>

#include "ionledger/chemistry.hpp"

namespace ionledger {

/// Sum of the molalities of `form` and of the species that are `form` and other basis species than
/// hydrogen, such as its ion pairs: of HCO3- also CaHCO3+, of CO3-2 also CaCO3 but not HCO3-.
/// `basis` is the basis species `form` is made of besides hydrogen.
[[nodiscard]] double molality_of_form(const Chemistry& chemistry,
                                      const std::vector<double>& molality,
                                      int form,
                                      int basis);

}  // namespace ionledger
