// An equilibrium constant in words: value, function, range, uncertainty, source, standing.
#pragma once

#include <map>
#include <string>

#include "ionledger/chemistry.hpp"
#include "report/text_page.hpp"

namespace ionledger {

/// "log10 K = −107.8871 + 5 151.79/T + 38.92561 log10 T", T in K.
[[nodiscard]] std::string function_text(const TemperatureFunction& function);

/// "read in the source itself" and so on.
[[nodiscard]] std::string standing_text(Standing standing);

/// The citation behind a key; the key itself where there is none.
[[nodiscard]] std::string citation_of(const std::map<std::string, std::string>& sources,
                                      const std::string& key);

/// Prints the lines of a topic page that speak of the constant.
void print_constant(TextPage& page,
                    const EquilibriumConstant& constant,
                    const std::string& reaction,
                    const Chemistry& chemistry);

}  // namespace ionledger
