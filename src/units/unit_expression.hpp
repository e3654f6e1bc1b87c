// "mg/L", "m3/h", "% by mass" as one factor and one dimension; the grammar of units lives here.
#pragma once

#include <cstddef>
#include <optional>
#include <variant>

#include "units/spelling.hpp"

namespace ionledger {

/// SI value of x units: (x + zero) * factor.
struct UnitExpression {
  double factor = 1;
  double zero = 0;
  DimensionExponents dimension{};
  Meaning meaning = Meaning::plain;
};

/// Largest power of one unit, either sign: keeps every factor of the table far from overflow.
inline constexpr int max_unit_power = 9;

/// What a unit may look like, for the `expected` line of a finding.
inline constexpr const char* unit_examples =
    "a unit such as \"mg/L\", \"mmol/kg\", \"% by mass\", \"m3/h\" or \"degC\"";

/// Reads the unit that fills [begin, end) of the text, which holds at least one character and has
/// no space at either end:  factor { ("*" | "." | "/") factor },  factor = symbol [["^"] power],
/// with nothing behind a quotient (SI Brochure 5.4.1: no second solidus, no product after it).
[[nodiscard]] std::variant<UnitExpression, UnitError> read_unit(const QuantityText& text,
                                                                std::size_t begin,
                                                                std::size_t end,
                                                                std::optional<PpmMeaning> ppm);

}  // namespace ionledger
