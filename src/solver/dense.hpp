// Two small dense solvers for the safe path, n x n row-major.
#pragma once

#include <vector>

namespace ionledger::solver {

/// Gaussian elimination in the given order of rows and columns, without exchange: for a positive
/// definite matrix whose rows were divided by weights that fall along `order`, this keeps small
/// unknowns as accurate as large ones. Overwrites both; false when a pivot is not positive.
[[nodiscard]] bool solve_in_order(const std::vector<int>& order,
                                  std::vector<double>& matrix,
                                  std::vector<double>& b,
                                  int n);

/// Gaussian elimination with row exchange over the rows and columns listed in `order`.
[[nodiscard]] bool solve_with_exchange(const std::vector<int>& order,
                                       std::vector<double>& matrix,
                                       std::vector<double>& b,
                                       int n);

}  // namespace ionledger::solver
