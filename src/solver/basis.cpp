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

/// Whether the inverse times its denominator, rounded to whole numbers, is proved exact: times M it
/// must be the denominator times the identity, in whole numbers.
bool is_whole_over_denominator(const Kernel& kernel, const Basis& basis) {
  const std::size_t n = basis.columns.size();
  if (!(basis.denominator >= 1 && basis.denominator < largest_whole)) return false;
  for (std::size_t r = 0; r < n; ++r) {
    const int column = basis.columns[r];
    if (column < 0) continue;
    for (std::size_t i = 0; i < n; ++i) {
      double sum = 0;
      double size = 0;
      for (int e = kernel.begin[column]; e < kernel.begin[column + 1]; ++e) {
        const double value = basis.inverse[static_cast<std::size_t>(kernel.row[e]) * n + i];
        const double term = kernel.nu[e] * std::round(value * basis.denominator);
        sum += term;
        size += std::abs(term);
      }
      if (!(size < largest_whole) || sum != (i == r ? basis.denominator : 0)) return false;
    }
  }
  return true;
}

}  // namespace

void resize(Basis& basis, const Kernel& kernel) {
  const auto n = static_cast<std::size_t>(kernel.n_components);
  basis.columns.assign(n, -1);
  basis.inverse.assign(n * n, 0);
  basis.entries.reserve(n * n);
  basis.begin.assign(n + 1, 0);
  basis.plain.assign(n, 1);
}

void clear(Basis& basis) {
  const std::size_t n = basis.columns.size();
  std::fill(basis.columns.begin(), basis.columns.end(), -1);
  std::fill(basis.inverse.begin(), basis.inverse.end(), 0.0);
  std::fill(basis.plain.begin(), basis.plain.end(), 1);
  for (std::size_t i = 0; i < n; ++i) basis.inverse[i * n + i] = 1;
  basis.denominator = 1;
  basis.whole = true;
  basis.rank = 0;
}

void expand(const Kernel& kernel, const Basis& basis, int column, double* alpha) {
  std::fill(alpha, alpha + basis.columns.size(), 0.0);
  for (int e = kernel.begin[column]; e < kernel.begin[column + 1]; ++e) {
    const double nu = kernel.nu[e];
    const Basis::Entry* const last = basis.entries.data() + basis.begin[kernel.row[e] + 1];
    const Basis::Entry* entry = basis.entries.data() + basis.begin[kernel.row[e]];
    for (; entry != last; ++entry) alpha[entry->row] += nu * entry->numerator;
  }
  if (basis.denominator == 1) return;
  for (std::size_t i = 0; i < basis.columns.size(); ++i) alpha[i] /= basis.denominator;
}

bool try_column(const Kernel& kernel, int column, Basis& basis) {
  const std::size_t n = basis.columns.size();
  const int first = kernel.begin[column];
  if (kernel.begin[column + 1] == first + 1 && kernel.nu[first] == 1) {
    const int row = kernel.row[first];
    if (basis.plain[row] != 0) {  // the common case: a unit column whose row nothing has used
      if (basis.columns[row] >= 0) return false;
      basis.columns[row] = column;
      ++basis.rank;
      return true;
    }
  }
  double small[64];
  std::vector<double> large;
  double* v = small;
  if (n > 64) {
    large.resize(n);
    v = large.data();
  }
  std::fill(v, v + n, 0.0);
  for (int e = first; e < kernel.begin[column + 1]; ++e) {
    const double nu = kernel.nu[e];
    const double* const inverse_column =
        &basis.inverse[static_cast<std::size_t>(kernel.row[e]) * n];
    for (std::size_t i = 0; i < n; ++i) v[i] += nu * inverse_column[i];
  }
  std::size_t pivot = n;
  double largest = dependent;
  for (std::size_t i = 0; i < n; ++i) {
    if (basis.columns[i] >= 0 || std::abs(v[i]) <= largest) continue;
    pivot = i;
    largest = std::abs(v[i]);
  }
  if (pivot == n) return false;
  const double pivot_value = v[pivot];
  v[pivot] = 0;
  basis.denominator *= pivot_value;
  basis.whole = basis.whole && kernel.is_whole && std::abs(pivot_value) == 1;
  for (std::size_t k = 0; k < n; ++k) {
    double* const inverse_column = &basis.inverse[k * n];
    const double factor = inverse_column[pivot] / pivot_value;
    if (factor == 0) continue;
    for (std::size_t i = 0; i < n; ++i) inverse_column[i] -= v[i] * factor;
    inverse_column[pivot] = factor;
    basis.plain[k] = 0;
  }
  basis.columns[pivot] = column;
  ++basis.rank;
  return true;
}

void finish(const Kernel& kernel, Basis& basis) {
  const std::size_t n = basis.columns.size();
  basis.denominator = std::abs(std::round(basis.denominator));
  if (basis.whole || !is_whole_over_denominator(kernel, basis)) basis.denominator = 1;
  basis.entries.clear();
  for (std::size_t k = 0; k < n; ++k) {
    basis.begin[k] = static_cast<int>(basis.entries.size());
    for (std::size_t i = 0; i < n; ++i) {
      const double value = basis.inverse[k * n + i];
      if (value == 0) continue;
      // It was proved that this product is a whole number but for rounding.
      const double numerator =
          basis.denominator == 1 ? value : std::round(value * basis.denominator);
      if (numerator != 0) basis.entries.push_back({static_cast<int>(i), numerator});
    }
  }
  basis.begin[n] = static_cast<int>(basis.entries.size());
}

void transform_totals(const Prepared& prepared, const Basis& basis, std::vector<double>& result) {
  const std::size_t n = basis.columns.size();
  std::fill(result.begin(), result.end(), 0.0);
  for (std::size_t i = 0; i < n; ++i) {
    TwoSum sum;
    double size = 0;
    for (std::size_t k = 0; k < n; ++k) {
      const double factor = basis.inverse[k * n + i];
      if (factor == 0 || prepared.rows[k] != Prepared::Row::balanced) continue;
      const double numerator =
          basis.denominator == 1 ? factor : std::round(factor * basis.denominator);
      sum.add_product(numerator, prepared.total[k]);
      sum.add(numerator * prepared.total_low[k]);
      size += std::abs(numerator * prepared.total[k]);
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
