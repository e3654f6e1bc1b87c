// Exact rational numbers, for the questions that rounding would answer wrongly. Separate because
// the header behind it is heavy and few files need it.
#pragma once

#include <boost/multiprecision/cpp_int.hpp>
#include <optional>
#include <string>

namespace ionledger::solver {

using Rational = boost::multiprecision::cpp_rational;

/// The value of a finite double, which is a whole number times a power of 2.
[[nodiscard]] Rational exact(double value);

/// The value of a decimal such as "-1.5e-3"; empty when `text` is not one.
[[nodiscard]] std::optional<Rational> exact_decimal(const std::string& text);

/// Nearest double; a Rational converts only by truncation of its parts otherwise.
[[nodiscard]] double nearest(const Rational& value);

}  // namespace ionledger::solver
