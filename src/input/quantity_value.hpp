// Quantities in TOML text: the grammar of units.hpp, with every error placed in the file. Separate
// because every section of a plant file needs it.
#pragma once

#include <optional>
#include <string>
#include <variant>

#include "input/toml_cursor.hpp"
#include "ionledger/units.hpp"

namespace ionledger {

/// What a value of this kind looks like, for messages.
struct QuantityExample {
  std::string what;    ///< "a temperature"
  std::string number;  ///< "18"
  std::string unit;    ///< "degC"
};

/// `a temperature such as "18 degC"`
[[nodiscard]] std::string described(const QuantityExample& example);

/// An error of the unit grammar about the text of `value`, `offset` bytes into it.
void refuse_quantity(const TomlCursor& value, const UnitError& unit_error, std::size_t offset = 0);

/// The quantity written in `value`; a bare number, another kind or bad text is an error.
[[nodiscard]] std::optional<WrittenQuantity> read_written(const TomlCursor& value,
                                                          std::optional<PpmMeaning> ppm,
                                                          const QuantityExample& example);

/// The quantity written in `value` as a Q.
template <class Q>
[[nodiscard]] std::optional<Q> read_as(const TomlCursor& value, const QuantityExample& example) {
  const auto written = read_written(value, std::nullopt, example);
  if (!written) return std::nullopt;
  const std::variant<Q, UnitError> result = to<Q>(*written);
  if (const auto* unit_error = std::get_if<UnitError>(&result)) {
    refuse_quantity(value, *unit_error);
    return std::nullopt;
  }
  return std::get<Q>(result);
}

}  // namespace ionledger
