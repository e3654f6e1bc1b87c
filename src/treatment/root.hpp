// The root of a function between two points where it has opposite signs. Separate because a pH
// target and a gas space are both found so.
#pragma once

#include <cmath>

namespace ionledger {

/// A point and the value there.
struct Ordinate {
  double x = 0;
  double f = 0;
};

/// x with |f(x)| <= tolerance, or the last x when the interval has shrunk to rounding.
/// Regula falsi with the Illinois weights, which never leaves the bracket; every third step halves
/// it, so that it always shrinks. Expects low.f and high.f of opposite sign, or zero.
template <class Function>
[[nodiscard]] double root_between(Ordinate low,
                                  Ordinate high,
                                  double tolerance,
                                  const Function& function) {
  constexpr int max_steps = 300;
  constexpr double rounding = 4e-16;
  if (std::abs(low.f) <= tolerance) return low.x;
  if (std::abs(high.f) <= tolerance) return high.x;
  double x = high.x;
  int side = 0;
  for (int step = 0; step < max_steps; ++step) {
    x = (high.f * low.x - low.f * high.x) / (high.f - low.f);
    const double least = std::fmin(low.x, high.x);
    const double most = std::fmax(low.x, high.x);
    if (step % 3 == 2 || !(x > least && x < most)) x = 0.5 * (low.x + high.x);
    const double f = function(x);
    if (std::abs(f) <= tolerance || most - least <= rounding * std::abs(x)) break;
    if ((f < 0) == (low.f < 0)) {
      low = {x, f};
      if (side == -1) high.f /= 2;
      side = -1;
    } else {
      high = {x, f};
      if (side == 1) low.f /= 2;
      side = 1;
    }
  }
  return x;
}

}  // namespace ionledger
