// Shared by the tests of this room: a text read, or the test stopped with the reason.
#pragma once

#include <doctest/doctest.h>

#include <string>
#include <string_view>

#include "ionledger/units.hpp"

namespace ionledger::testing {

/// The quantity in `text`, which must be one.
[[nodiscard]] inline WrittenQuantity read(std::string_view text) {
  const auto result = read_quantity(text);
  if (const auto* error = std::get_if<UnitError>(&result)) {
    FAIL(std::string(text), ": ", error->summary);
  }
  return std::get<WrittenQuantity>(result);
}

/// The finding on `text`, which must be none.
[[nodiscard]] inline UnitError refuse(std::string_view text) {
  const auto result = read_quantity(text);
  if (!std::holds_alternative<UnitError>(result)) FAIL(std::string(text), " was accepted");
  return std::get<UnitError>(result);
}

/// `text` as a Q, which it must be, in coherent SI units.
template <class Q>
[[nodiscard]] Q read_as(std::string_view text) {
  const auto result = to<Q>(read(text));
  if (const auto* error = std::get_if<UnitError>(&result)) FAIL(error->summary);
  return std::get<Q>(result);
}

/// The finding when `text` is asked for as a Q.
template <class Q>
[[nodiscard]] UnitError refuse_as(std::string_view text) {
  const auto result = to<Q>(read(text));
  if (!std::holds_alternative<UnitError>(result)) FAIL(std::string(text), " was accepted");
  return std::get<UnitError>(result);
}

}  // namespace ionledger::testing
