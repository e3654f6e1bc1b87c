// Comparisons for tests: doctest's own Approx has an absolute scale of 1, which makes 1e-9 equal
// 7e-8.
#pragma once

#include <doctest/doctest.h>

#include <algorithm>
#include <cmath>
#include <ostream>

namespace ionledger::testing {

/// Equal within a relative tolerance: |a - b| <= tolerance * max(|a|, |b|).
struct Relative {
  double expected;
  double tolerance;
};
[[nodiscard]] inline Relative rel(double expected, double tolerance) {
  return {expected, tolerance};
}
[[nodiscard]] inline bool operator==(double actual, const Relative& r) {
  return std::abs(actual - r.expected) <=
         r.tolerance * std::max(std::abs(actual), std::abs(r.expected));
}
inline std::ostream& operator<<(std::ostream& out, const Relative& r) {
  return out << r.expected << " (relative tolerance " << r.tolerance << ")";
}

/// Equal within an absolute tolerance in the unit of the numbers compared.
struct Within {
  double expected;
  double tolerance;
};
[[nodiscard]] inline Within within(double expected, double tolerance) {
  return {expected, tolerance};
}
[[nodiscard]] inline bool operator==(double actual, const Within& w) {
  return std::abs(actual - w.expected) <= w.tolerance;
}
inline std::ostream& operator<<(std::ostream& out, const Within& w) {
  return out << w.expected << " +- " << w.tolerance;
}

}  // namespace ionledger::testing
