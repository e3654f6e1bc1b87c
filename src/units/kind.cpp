// The kinds of quantities a person may write, named.
#include "units/kind.hpp"

#include <algorithm>
#include <iterator>

namespace ionledger {
namespace {

using enum Meaning;

// clang-format off
constexpr Kind kinds[] = {
    {{ 0, 0, 0, 0, 1, 0, 0}, absolute_temperature, "a temperature", R"("degC", "degF" or "K")", false},
    {{ 0, 0, 0, 0, 1, 0, 0}, plain, "a temperature difference", R"("K")", false},
    {{-1, 1,-2, 0, 0, 0, 0}, plain, "a pressure", R"("bar", "kPa", "atm" or "psi")", false},
    {{ 3, 0,-1, 0, 0, 0, 0}, plain, "a volume flow", R"("m3/h", "L/s" or "gpm")", false},
    {{ 0, 1,-1, 0, 0, 0, 0}, plain, "a mass flow", R"("kg/h" or "t/h")", true},
    {{-3, 1, 0, 0, 0, 0, 0}, plain, "a mass concentration or density", R"("mg/L", "g/L" or "kg/m3")", true},
    {{-3, 0, 0, 0, 0, 1, 0}, plain, "an amount concentration", R"("mmol/L" or "mol/m3")", true},
    {{-3, 0, 0, 0, 0, 0, 1}, plain, "an equivalent concentration", R"("meq/L" or "degdH")", true},
    {{ 0,-1, 0, 0, 0, 1, 0}, plain, "an amount per mass", R"("mol/kg" or "mmol/kg")", true},
    {{ 0,-1, 0, 0, 0, 0, 1}, plain, "an equivalent per mass", R"("meq/kg" or "eq/kg")", true},
    {{-3,-1, 3, 2, 0, 0, 0}, plain, "a conductivity", R"("uS/cm", "mS/cm" or "mS/m")", false},
    {{ 2, 1,-3,-1, 0, 0, 0}, plain, "an electric potential", R"("mV" or "V")", false},
    {{ 0, 0, 0, 0, 0, 0, 0}, mass_fraction, "a mass fraction", R"("% by mass", "mg/kg" or "g/kg")", true},
    {{ 0, 0, 0, 0, 0, 0, 0}, ratio, "a ratio", R"("%")", false},
    {{ 0, 0, 0, 0, 0, 0, 0}, plain, "a share of volume or amount", R"("mL/m3" or "mL/L")", false},
    {{ 1, 0, 0, 0, 0, 0, 0}, plain, "a length", R"("m")", false},
    {{ 2, 0, 0, 0, 0, 0, 0}, plain, "an area", R"("m2")", false},
    {{ 3, 0, 0, 0, 0, 0, 0}, plain, "a volume", R"("L" or "m3")", false},
    {{ 0, 1, 0, 0, 0, 0, 0}, plain, "a mass", R"("kg" or "g")", true},
    {{ 0, 0, 1, 0, 0, 0, 0}, plain, "a time", R"("h", "min" or "s")", false},
    {{ 0, 0, 0, 0, 0, 1, 0}, plain, "an amount of substance", R"("mol")", true},
    {{ 0, 0, 0, 0, 0, 0, 1}, plain, "a number of equivalents", R"("eq")", true},
};
// clang-format on

constexpr Kind unnamed{{}, plain, "a quantity of another kind", "", false};

}  // namespace

const Kind& kind_of(const DimensionExponents& dimension, Meaning meaning) {
  const auto* const found = std::find_if(std::begin(kinds), std::end(kinds), [&](const Kind& kind) {
    return kind.dimension == dimension && kind.meaning == meaning;
  });
  return found == std::end(kinds) ? unnamed : *found;
}

}  // namespace ionledger
