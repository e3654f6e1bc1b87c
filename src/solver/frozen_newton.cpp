// Globally convergent Newton iteration on the held programme. Three directions compete in every
// step and the one that lowers the objective most wins; one of them has a proof.
#include <algorithm>
#include <cmath>

#include "solver/dense.hpp"
#include "solver/frozen.hpp"

namespace ionledger::solver {
namespace {

constexpr int iteration_limit = 300;
constexpr double largest_exponent = 600;  ///< exp() stays finite and above 0.
constexpr double final_change = 1e-9;     ///< Of any ln c; its square is below rounding.
constexpr double small_residual = 1e-14;  ///< Relative to the basis amounts.

double bounded_exp(double value) { return std::exp(std::min(value, largest_exponent)); }

struct Work {
  std::vector<double> matrix, log_matrix;            ///< n x n, rows divided by the basis amounts.
  std::vector<double> newton, log_newton, diagonal;  ///< Directions.
  std::vector<double> right, plus, minus;
  std::vector<double> change;    ///< nu_j dx of every species.
  std::vector<double> relative;  ///< c_j over the largest amount.
  std::vector<double> best;
};

void resize(Work& work, const Frozen& frozen) {
  const auto n = frozen.basis.columns.size();
  for (auto* m : {&work.matrix, &work.log_matrix}) m->resize(n * n);
  for (auto* v : {&work.newton,
                  &work.log_newton,
                  &work.diagonal,
                  &work.right,
                  &work.plus,
                  &work.minus,
                  &work.best}) {
    v->assign(n, 0);
  }
  work.change.resize(static_cast<std::size_t>(frozen.kernel->n_species));
  work.relative.resize(work.change.size());
}

/// Balances and both matrices. Row i is divided by the amount of its basis column: every term is
/// then at most |alpha|, because a column appears only in rows of more abundant ones.
void fill(Frozen& frozen, Work& work) {
  const Kernel& kernel = *frozen.kernel;
  const std::size_t n = frozen.basis.columns.size();
  std::fill(work.matrix.begin(), work.matrix.end(), 0.0);
  std::fill(work.log_matrix.begin(), work.log_matrix.end(), 0.0);
  for (const int i : frozen.free_rows) {
    const double ln_scale = frozen.ln_weight[frozen.basis.columns[i]];
    const double total = frozen.total[i];
    const double scaled_total =
        total == 0 ? 0 : std::copysign(bounded_exp(std::log(std::abs(total)) - ln_scale), total);
    work.plus[i] = std::max(-scaled_total, 0.0);
    work.minus[i] = std::max(scaled_total, 0.0);
    double* const row = &work.matrix[static_cast<std::size_t>(i) * n];
    double* const plus_row = &work.log_matrix[static_cast<std::size_t>(i) * n];
    work.right.assign(n, 0);  // derivatives of the minus side, for a moment
    for (int j = 0; j < kernel.n_species; ++j) {
      const double* const alpha = &frozen.alpha[static_cast<std::size_t>(j) * n];
      if (frozen.prepared->present[j] == 0 || alpha[i] == 0) continue;
      const double term = std::abs(alpha[i]) * bounded_exp(frozen.ln_weight[j] - ln_scale);
      (alpha[i] > 0 ? work.plus : work.minus)[i] += term;
      double* const side = alpha[i] > 0 ? plus_row : work.right.data();
      for (const int k : frozen.free_rows) side[k] += term * alpha[k];
    }
    for (const int k : frozen.free_rows) {
      row[k] = plus_row[k] - work.right[k];
      plus_row[k] = plus_row[k] / work.plus[i] - work.right[k] / work.minus[i];
    }
    frozen.scaled_residual[i] = work.plus[i] - work.minus[i];
  }
  double largest = -1e300;
  for (const int i : frozen.free_rows) {
    largest = std::max(largest, frozen.ln_weight[frozen.basis.columns[i]]);
  }
  for (int j = 0; j < kernel.n_species; ++j) {
    work.relative[j] =
        frozen.prepared->present[j] != 0 ? bounded_exp(frozen.ln_weight[j] - largest) : 0;
  }
}

/// The best step length along one direction and the change of the objective there, in units of the
/// largest amount. Convex in the length, so Newton on its derivative with bisection as a guard.
struct Search {
  double fraction = 0, gain = 0, largest_change = 0;
};

Search search(const Frozen& frozen, const std::vector<double>& direction, Work& work) {
  Search result;
  const Kernel& kernel = *frozen.kernel;
  double largest_weight = -1e300;
  for (const int i : frozen.free_rows) {
    largest_weight = std::max(largest_weight, frozen.ln_weight[frozen.basis.columns[i]]);
  }
  double slope = 0;
  for (const int i : frozen.free_rows) {
    if (!std::isfinite(direction[i])) return result;
    const double weight = std::exp(frozen.ln_weight[frozen.basis.columns[i]] - largest_weight);
    slope += frozen.scaled_residual[i] * weight * direction[i];
  }
  for (int j = 0; j < kernel.n_species; ++j) {
    work.change[j] = frozen.prepared->present[j] != 0 ? column_change(frozen, j, direction) : 0;
    result.largest_change = std::max(result.largest_change, std::abs(work.change[j]));
  }
  if (!(slope < 0) || !std::isfinite(result.largest_change)) return result;
  // c (e^u - 1 - u) <= c u^2 (e^d - 1 - d) / d^2 for |u| <= d: the bound is least at ln(1 + d) / d.
  const double safe = std::log1p(result.largest_change) / result.largest_change;
  const auto gain_at = [&](double t) {
    double sum = t * slope;
    for (std::size_t j = 0; j < work.change.size(); ++j) {
      const double u = t * work.change[j];
      if (u == 0) continue;
      // e^u - 1 - u without cancellation
      const double rest = std::abs(u) < 1e-3 ? u * u * (0.5 + u * (1.0 / 6 + u / 24))
                                             : std::expm1(std::min(u, largest_exponent)) - u;
      sum += work.relative[j] * rest;
    }
    return sum;
  };
  double low = 0;
  double high = std::max(1.0, safe) * 4;
  double t = result.largest_change < 1 ? 1 : safe;
  for (int step = 0; step < 12; ++step) {
    double first = slope;
    double second = 0;
    for (std::size_t j = 0; j < work.change.size(); ++j) {
      const double u = work.change[j];
      if (u == 0) continue;
      const double grown = std::expm1(std::min(t * u, largest_exponent));
      first += work.relative[j] * u * grown;
      second += work.relative[j] * u * u * (grown + 1);
    }
    (first > 0 ? high : low) = t;
    if (std::abs(first) < 1e-3 * std::abs(slope)) break;
    double next = t - first / second;
    if (!(next > low && next < high)) next = 0.5 * (low + high);
    if (std::abs(next - t) < 1e-3 * t) break;
    t = next;
  }
  result.fraction = safe;
  result.gain = gain_at(safe);
  const double searched = gain_at(t);
  if (searched < result.gain) {
    result.fraction = t;
    result.gain = searched;
  }
  if (!std::isfinite(result.gain)) result.gain = 0;
  return result;
}

bool fill_directions(const Frozen& frozen, Work& work) {
  const Kernel& kernel = *frozen.kernel;
  const int n = kernel.n_components;
  for (const int i : frozen.free_rows) {
    work.newton[i] = -frozen.scaled_residual[i];
    work.log_newton[i] = -std::log(work.plus[i] / work.minus[i]);
    double largest = 0;
    for (int j = 0; j < kernel.n_species; ++j) {
      if (frozen.prepared->present[j] == 0) continue;
      largest = std::max(largest, std::abs(frozen.alpha[static_cast<std::size_t>(j * n + i)]));
    }
    work.diagonal[i] = work.log_newton[i] / largest;
  }
  if (!solve_in_order(frozen.free_rows, work.matrix, work.newton, n)) return false;
  if (!solve_with_exchange(frozen.free_rows, work.log_matrix, work.log_newton, n)) {
    std::fill(work.log_newton.begin(), work.log_newton.end(), std::nan(""));
  }
  return true;
}

/// Amounts of the held columns: what the species leave of their balances.
void set_held_amounts(Frozen& frozen) {
  const Kernel& kernel = *frozen.kernel;
  const std::size_t n = frozen.basis.columns.size();
  std::fill(frozen.amount.begin(), frozen.amount.end(), 0.0);
  for (std::size_t i = 0; i < n; ++i) {
    const int m = frozen.basis.columns[i] - kernel.n_species;
    if (m < 0 || m >= kernel.n_phases || frozen.held[m] == 0) continue;
    double left = frozen.total[i];
    for (int j = 0; j < kernel.n_species; ++j) {
      const double alpha = frozen.alpha[static_cast<std::size_t>(j) * n + i];
      if (frozen.prepared->present[j] == 0 || alpha == 0) continue;
      left -= alpha * std::exp(frozen.ln_weight[j]);
    }
    frozen.amount[m] = left;
  }
}

}  // namespace

bool solve_frozen(Frozen& frozen, int& iterations) {
  Work work;
  resize(work, frozen);
  if (!meet_limits(frozen)) return false;
  for (int it = 0; it < iteration_limit; ++it) {
    refresh(frozen);
    fill(frozen, work);
    double worst = 0;
    for (const int i : frozen.free_rows) {
      worst = std::max(worst, std::abs(frozen.scaled_residual[i]));
    }
    if (!(worst > small_residual)) {
      set_held_amounts(frozen);
      return std::isfinite(worst);
    }
    ++iterations;
    if (!fill_directions(frozen, work)) return false;
    const Search newton = search(frozen, work.newton, work);
    if (newton.largest_change < final_change) {
      // Quadratic convergence: this last full step leaves an error below rounding.
      add_step(frozen, work.newton, 1, frozen.x);
      refresh(frozen);
      set_held_amounts(frozen);
      return true;
    }
    Search best = newton;
    const std::vector<double>* direction = &work.newton;
    for (const auto* candidate : {&work.log_newton, &work.diagonal}) {
      const Search found = search(frozen, *candidate, work);
      if (found.gain < best.gain) {
        best = found;
        direction = candidate;
      }
    }
    if (best.fraction == 0) return false;
    add_step(frozen, *direction, best.fraction, frozen.x);
  }
  return false;
}

}  // namespace ionledger::solver
