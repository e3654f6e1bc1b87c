// Slacks s = ln_limit - nu x and amounts n of the phases with n s -> 0; see interior_point.hpp.
#include "solver/interior_point.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

#include "solver/dense.hpp"

namespace ionledger::solver {
namespace {

constexpr int iteration_limit = 200;
constexpr double centring = 0.15;        ///< n s aims at this share of its average.
constexpr double to_boundary = 0.99;     ///< Share of the way to n = 0 or s = 0 that a step takes.
constexpr double small_product = 1e-12;  ///< n s / scale
constexpr double largest_exponent = 600;

struct Candidate {
  int phase;
  double amount, slack, scale;
  double change = 0;  ///< nu dx
};

double ln_excess(const Frozen& frozen, int m) {
  const Kernel& kernel = *frozen.kernel;
  const int column = kernel.n_species + m;
  double value = -frozen.ln_limit[m];
  for (int e = kernel.begin[column]; e < kernel.begin[column + 1]; ++e) {
    value += kernel.nu[e] * frozen.x[kernel.row[e]];
  }
  return value;
}

std::vector<Candidate> candidates_of(const Frozen& frozen) {
  const Kernel& kernel = *frozen.kernel;
  std::vector<Candidate> result;
  for (int m = 0; m < kernel.n_phases; ++m) {
    const int column = kernel.n_species + m;
    if (frozen.prepared->present[column] == 0) continue;
    if (frozen.prepared->rules[m] != PhaseRule::may_form) continue;
    double scale = 0;
    for (int e = kernel.begin[column]; e < kernel.begin[column + 1]; ++e) {
      scale = std::max(scale, std::abs(frozen.prepared->total[kernel.row[e]] / kernel.nu[e]));
    }
    if (scale == 0) scale = 1e-6;
    const double slack = std::max(1.0, -ln_excess(frozen, m));
    result.push_back({m, scale / slack, slack, scale});
  }
  return result;
}

/// Newton step of the basis columns for n s = mu; false when the matrix is not positive definite.
bool newton_step(const Frozen& frozen,
                 const std::vector<Candidate>& candidates,
                 const std::vector<double>& mu,
                 std::vector<double>& step) {
  const Kernel& kernel = *frozen.kernel;
  const auto n = static_cast<std::size_t>(kernel.n_components);
  std::vector<double> matrix(n * n, 0);
  step.assign(n, 0);
  const auto add = [&](int i, int column, double weight) {
    const double* const alpha = &frozen.alpha[static_cast<std::size_t>(column) * n];
    for (const int k : frozen.free_rows) {
      matrix[static_cast<std::size_t>(i) * n + static_cast<std::size_t>(k)] +=
          alpha[i] * alpha[k] * weight;
    }
  };
  for (const int i : frozen.free_rows) {
    const double ln_scale = frozen.ln_weight[frozen.basis.columns[i]];
    const auto scaled = [&](double value) {
      if (value == 0) return 0.0;
      return std::copysign(
          std::exp(std::min(std::log(std::abs(value)) - ln_scale, largest_exponent)), value);
    };
    double residual = -scaled(frozen.total[i]);
    for (int j = 0; j < kernel.n_species; ++j) {
      const double alpha = frozen.alpha[static_cast<std::size_t>(j) * n + i];
      if (frozen.prepared->present[j] == 0 || alpha == 0) continue;
      const double weight = std::exp(std::min(frozen.ln_weight[j] - ln_scale, largest_exponent));
      residual += alpha * weight;
      add(i, j, weight);
    }
    for (std::size_t k = 0; k < candidates.size(); ++k) {
      const Candidate& c = candidates[k];
      const int column = kernel.n_species + c.phase;
      const double alpha = frozen.alpha[static_cast<std::size_t>(column) * n + i];
      if (alpha == 0) continue;
      const double off = ln_excess(frozen, c.phase) + c.slack;
      residual += alpha * scaled((mu[k] + c.amount * off) / c.slack);
      add(i, column, std::exp(std::min(frozen.ln_weight[column] - ln_scale, largest_exponent)));
    }
    step[i] = -residual;
  }
  return solve_in_order(frozen.free_rows, matrix, step, kernel.n_components);
}

}  // namespace

bool find_present_phases(Frozen& frozen, int& iterations) {
  const Kernel& kernel = *frozen.kernel;
  for (int m = 0; m < kernel.n_phases; ++m) {
    if (frozen.prepared->rules[m] != PhaseRule::imposed) frozen.held[m] = 0;
    frozen.ln_weight[kernel.n_species + m] = -std::numeric_limits<double>::infinity();
  }
  if (!meet_limits(frozen)) return false;
  std::vector<Candidate> candidates = candidates_of(frozen);
  std::vector<double> mu(candidates.size());
  std::vector<double> step;
  bool settled = false;
  for (int it = 0; it < iteration_limit && !settled; ++it) {
    ++iterations;
    double average = 0;
    for (const Candidate& c : candidates) {
      average += c.amount * c.slack / c.scale / static_cast<double>(candidates.size());
      frozen.ln_weight[kernel.n_species + c.phase] = std::log(c.amount) - std::log(c.slack);
    }
    for (std::size_t k = 0; k < candidates.size(); ++k) {
      mu[k] = centring * average * candidates[k].scale;
    }
    refresh(frozen);
    if (!newton_step(frozen, candidates, mu, step)) break;
    double largest = 0;
    for (int j = 0; j < kernel.n_species; ++j) {
      if (frozen.prepared->present[j] == 0) continue;
      largest = std::max(largest, std::abs(column_change(frozen, j, step)));
    }
    if (!std::isfinite(largest)) break;
    double fraction = largest > 0 ? std::min(1.0, std::log1p(largest) / largest) : 1;
    for (std::size_t k = 0; k < candidates.size(); ++k) {
      Candidate& c = candidates[k];
      c.change = column_change(frozen, kernel.n_species + c.phase, step);
      const double off = ln_excess(frozen, c.phase) + c.slack;
      const double slack_step = -off - c.change;
      const double amount_step = (mu[k] - c.amount * slack_step) / c.slack - c.amount;
      if (slack_step < 0) fraction = std::min(fraction, -to_boundary * c.slack / slack_step);
      if (amount_step < 0) fraction = std::min(fraction, -to_boundary * c.amount / amount_step);
    }
    for (std::size_t k = 0; k < candidates.size(); ++k) {
      Candidate& c = candidates[k];
      const double off = ln_excess(frozen, c.phase) + c.slack;
      const double slack_step = -off - c.change;
      const double amount_step = (mu[k] - c.amount * slack_step) / c.slack - c.amount;
      c.slack += fraction * slack_step;
      c.amount += fraction * amount_step;
    }
    add_step(frozen, step, fraction, frozen.x);
    settled = average < small_product && fraction > 0.5;
  }
  for (const Candidate& c : candidates) {
    frozen.held[c.phase] = c.amount / c.scale > c.slack;
    frozen.ln_weight[kernel.n_species + c.phase] = -std::numeric_limits<double>::infinity();
  }
  return settled;
}

}  // namespace ionledger::solver
