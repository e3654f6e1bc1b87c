// The number in front of a unit; separate because most of it is about the ways numbers go wrong.
#pragma once

#include <cstddef>
#include <variant>

#include "units/spelling.hpp"

namespace ionledger {

struct Number {
  double value = 0;
  std::size_t end = 0;  ///< Position behind the last character of the number.
};

/// Reads the decimal number at `begin`: sign, digits, one decimal point, exponent ("-1.5e-3").
/// The result is finite, and zero only where zero was written.
[[nodiscard]] std::variant<Number, UnitError> read_number(const QuantityText& text,
                                                          std::size_t begin);

}  // namespace ionledger
