// Gauss-Jordan elimination that chooses its columns as they come; see basis.hpp.
#include "solver/basis.hpp"

#include <algorithm>
#include <cmath>

#include "solver/two_sum.hpp"

namespace ionledger::solver {
namespace {

constexpr double dependent = 1e-9;      ///< Pivots are ratios of small whole numbers.
constexpr double cancellation = 1e-30;  ///< Rounding of a sum in twice the working precision.
constexpr double largest_whole = 9e15;  ///< Whole numbers below are exact in a double.

}  // namespace

void resize(Basis& basis, const Kernel& kernel) {
  const auto n = static_cast<std::size_t>(kernel.n_components);
  basis.columns.assign(n, -1);
  basis.inverse.assign(n * n, 0);
  basis.numerator.assign(n * n, 0);
}

void clear(Basis& basis) {
  const std::size_t n = basis.columns.size();
  std::fill(basis.columns.begin(), basis.columns.end(), -1);
  std::fill(basis.inverse.begin(), basis.inverse.end(), 0.0);
  for (std::size_t i = 0; i < n; ++i) basis.inverse[i * n + i] = 1;
  basis.denominator = 1;
  basis.is_exact = true;
  basis.rank = 0;
}

void expand(const Kernel& kernel, const Basis& basis, int column, double* alpha) {
  const std::size_t n = basis.columns.size();
  std::fill(alpha, alpha + n, 0.0);
  const bool by_numerator = basis.denominator != 1;
  const double* const matrix = by_numerator ? basis.numerator.data() : basis.inverse.data();
  for (int e = kernel.begin[column]; e < kernel.begin[column + 1]; ++e) {
    const double nu = kernel.nu[e];
    const double* const inverse_column = matrix + static_cast<std::size_t>(kernel.row[e]) * n;
    for (std::size_t i = 0; i < n; ++i) alpha[i] += nu * inverse_column[i];
  }
  if (!by_numerator) return;
  for (std::size_t i = 0; i < n; ++i) alpha[i] /= basis.denominator;
}

bool try_column(const Kernel& kernel, int column, Basis& basis) {
  const std::size_t n = basis.columns.size();
  double small[64];
  std::vector<double> large;
  double* v = small;
  if (n > 64) {
    large.resize(n);
    v = large.data();
  }
  std::fill(v, v + n, 0.0);
  for (int e = kernel.begin[column]; e < kernel.begin[column + 1]; ++e) {
    const double* const inverse_column =
        &basis.inverse[static_cast<std::size_t>(kernel.row[e]) * n];
    for (std::size_t i = 0; i < n; ++i) v[i] += kernel.nu[e] * inverse_column[i];
  }
  std::size_t pivot = n;
  for (std::size_t i = 0; i < n; ++i) {
    if (basis.columns[i] < 0 && std::abs(v[i]) > (pivot == n ? dependent : std::abs(v[pivot]))) {
      pivot = i;
    }
  }
  if (pivot == n) return false;
  const double pivot_value = v[pivot];
  v[pivot] = 0;
  basis.denominator *= pivot_value;
  for (std::size_t k = 0; k < n; ++k) {
    double* const inverse_column = &basis.inverse[k * n];
    const double factor = inverse_column[pivot] / pivot_value;
    if (factor == 0) continue;
    for (std::size_t i = 0; i < n; ++i) inverse_column[i] -= v[i] * factor;
    inverse_column[pivot] = factor;
  }
  basis.columns[pivot] = column;
  ++basis.rank;
  return true;
}

void finish(const Kernel& kernel, Basis& basis) {
  const std::size_t n = basis.columns.size();
  basis.denominator = std::abs(std::round(basis.denominator));
  if (basis.denominator == 1) {
    for (double& value : basis.inverse) value = std::round(value);
    basis.numerator = basis.inverse;
  } else {
    for (std::size_t k = 0; k < n * n; ++k) {
      basis.numerator[k] = std::round(basis.inverse[k] * basis.denominator);
    }
  }
  // Proof: numerator times M is the denominator times the identity, in whole numbers.
  basis.is_exact = basis.denominator >= 1 && basis.denominator < largest_whole;
  for (std::size_t r = 0; r < n && basis.is_exact; ++r) {
    if (basis.columns[r] < 0) continue;
    const int column = basis.columns[r];
    for (std::size_t i = 0; i < n && basis.is_exact; ++i) {
      double sum = 0;
      double size = 0;
      for (int e = kernel.begin[column]; e < kernel.begin[column + 1]; ++e) {
        const double term =
            kernel.nu[e] * basis.numerator[static_cast<std::size_t>(kernel.row[e]) * n + i];
        sum += term;
        size += std::abs(term);
      }
      basis.is_exact = size < largest_whole && sum == (i == r ? basis.denominator : 0);
    }
  }
  if (!basis.is_exact) basis.denominator = 1;
}

void transform_totals(const Prepared& prepared, const Basis& basis, std::vector<double>& result) {
  const std::size_t n = basis.columns.size();
  const bool by_numerator = basis.denominator != 1;
  const double* const matrix = by_numerator ? basis.numerator.data() : basis.inverse.data();
  for (std::size_t i = 0; i < n; ++i) {
    TwoSum sum;
    double size = 0;
    for (std::size_t k = 0; k < n; ++k) {
      const double factor = matrix[k * n + i];
      if (factor == 0 || prepared.rows[k] != Prepared::Row::balanced) continue;
      sum.add_product(factor, prepared.total[k]);
      size += std::abs(factor * prepared.total[k]);
      sum.add(factor * prepared.total_low[k]);
    }
    // What is left of terms that cancel to the last digit of the sum is 0.
    const bool cancelled = std::abs(sum.value()) <= cancellation * size;
    result[i] = cancelled ? 0 : sum.value() / basis.denominator;
  }
}

void order_by_amount(const std::vector<double>& ln_amount,
                     const std::vector<unsigned char>& present,
                     std::vector<int>& result) {
  result.clear();
  for (std::size_t j = 0; j < ln_amount.size(); ++j) {
    if (present[j] != 0) result.push_back(static_cast<int>(j));
  }
  std::sort(result.begin(), result.end(), [&](int a, int b) {
    return ln_amount[a] != ln_amount[b] ? ln_amount[a] > ln_amount[b] : a < b;
  });
}

}  // namespace ionledger::solver
