// The components chosen anew: the most abundant independent columns at a point. In that basis the
// scaled Hessian has eigenvalues between 1 and 1 + sum ||alpha_j||^2 whatever the constants are,
// and a balance residual bounds the error of an amount. Separate because fast and safe path,
// certificate and feasibility all lean on it.
#pragma once

#include <vector>

#include "solver/kernel.hpp"

namespace ionledger::solver {

/// Columns of the kernel, one per row where the rank allows, and the inverse of their matrix.
/// `finish` writes it as whole numbers over one denominator, sparse, so that coefficients that
/// cancel are exactly 0.
struct Basis {
  std::vector<int> columns;     ///< n_components; -1 for a row outside the rank.
  std::vector<double> inverse;  ///< n x n, column-major: coefficient (i, k) at [k n + i].
  double denominator = 1;
  int rank = 0;

  struct Entry {
    int row = 0;
    double numerator = 0;
  };
  std::vector<Entry> entries;  ///< Non-zeros of inverse times denominator, column by column.
  std::vector<int> begin;

  std::vector<unsigned char> plain;  ///< Column k of the inverse is still e_k.
  bool whole = true;                 ///< Every pivot was 1 or -1: the inverse is exact as it is.
};

void resize(Basis& basis, const Kernel& kernel);
/// Starts over with no column chosen.
void clear(Basis& basis);
/// Adds `column` if it is independent of those chosen; returns whether it was.
bool try_column(const Kernel& kernel, int column, Basis& basis);
/// Call once after the last column: cleans rounding from the inverse.
void finish(const Kernel& kernel, Basis& basis);

/// alpha with column = sum_i alpha_i (basis column i), into n_components values.
void expand(const Kernel& kernel, const Basis& basis, int column, double* alpha);

/// Totals in the basis, T' = M^-1 T, in twice the working precision.
void transform_totals(const Prepared& prepared, const Basis& basis, std::vector<double>& result);

/// Orders species by amount, in factors of 2; `result` lists the present ones, the largest first.
void order_by_amount(const std::vector<double>& ln_amount,
                     const std::vector<unsigned char>& present,
                     std::vector<int>& result);

}  // namespace ionledger::solver
