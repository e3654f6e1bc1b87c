// Whether totals lie inside, on the edge or outside of the cone of the columns, decided exactly.
// Separate from feasibility.cpp because it is pure linear programming.
#pragma once

#include <vector>

#include "solver/exact.hpp"

namespace ionledger::solver {

struct ConeColumn {
  std::vector<std::pair<int, Rational>> entries;  ///< (row, value)
  bool either_sign = false;                       ///< The amount may be negative.
};

struct ConeFinding {
  enum class Place { inside, edge, outside } place = Place::inside;
  /// y with y . column >= 0 for all, = 0 for those of either sign; y . totals is 0 on the edge
  /// (columns with y . column > 0 can then have no amount) and negative outside.
  std::vector<Rational> y;
};

/// maximise t subject to sum_j a_j (c_j + t) = totals, c >= 0, by the simplex method with Bland's
/// rule: t > 0 inside, 0 on the edge, negative outside, where the dual gives y.
[[nodiscard]] ConeFinding locate(const std::vector<ConeColumn>& columns,
                                 const std::vector<Rational>& totals);

}  // namespace ionledger::solver
