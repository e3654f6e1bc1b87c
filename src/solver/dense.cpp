// See dense.hpp.
#include "solver/dense.hpp"

#include <cmath>
#include <cstddef>
#include <utility>

namespace ionledger::solver {
namespace {

void eliminate(const std::vector<int>& order,
               std::size_t step,
               std::vector<double>& matrix,
               std::vector<double>& b,
               std::size_t n) {
  const auto p = static_cast<std::size_t>(order[step]);
  for (std::size_t s = step + 1; s < order.size(); ++s) {
    const auto r = static_cast<std::size_t>(order[s]);
    const double factor = matrix[r * n + p] / matrix[p * n + p];
    if (factor == 0) continue;
    for (std::size_t t = step + 1; t < order.size(); ++t) {
      const auto c = static_cast<std::size_t>(order[t]);
      matrix[r * n + c] -= factor * matrix[p * n + c];
    }
    b[r] -= factor * b[p];
  }
}

void substitute_back(const std::vector<int>& order,
                     const std::vector<double>& matrix,
                     std::vector<double>& b,
                     std::size_t n) {
  for (std::size_t s = order.size(); s-- > 0;) {
    const auto p = static_cast<std::size_t>(order[s]);
    double value = b[p];
    for (std::size_t t = s + 1; t < order.size(); ++t) {
      const auto c = static_cast<std::size_t>(order[t]);
      value -= matrix[p * n + c] * b[c];
    }
    b[p] = value / matrix[p * n + p];
  }
}

}  // namespace

bool solve_in_order(const std::vector<int>& order,
                    std::vector<double>& matrix,
                    std::vector<double>& b,
                    int n) {
  const auto width = static_cast<std::size_t>(n);
  for (std::size_t s = 0; s < order.size(); ++s) {
    const auto p = static_cast<std::size_t>(order[s]);
    if (!(matrix[p * width + p] > 0)) return false;
    eliminate(order, s, matrix, b, width);
  }
  substitute_back(order, matrix, b, width);
  return true;
}

bool solve_with_exchange(const std::vector<int>& order,
                         std::vector<double>& matrix,
                         std::vector<double>& b,
                         int n) {
  const auto width = static_cast<std::size_t>(n);
  for (std::size_t s = 0; s < order.size(); ++s) {
    const auto p = static_cast<std::size_t>(order[s]);
    std::size_t best = p;
    for (std::size_t t = s + 1; t < order.size(); ++t) {
      const auto r = static_cast<std::size_t>(order[t]);
      if (std::abs(matrix[r * width + p]) > std::abs(matrix[best * width + p])) best = r;
    }
    if (!(std::abs(matrix[best * width + p]) > 0)) return false;
    if (best != p) {
      for (std::size_t c = 0; c < width; ++c) {
        std::swap(matrix[best * width + c], matrix[p * width + c]);
      }
      std::swap(b[best], b[p]);
    }
    eliminate(order, s, matrix, b, width);
  }
  substitute_back(order, matrix, b, width);
  return true;
}

}  // namespace ionledger::solver
