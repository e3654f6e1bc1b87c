// Active phases of the fast path; see phases.hpp.
#include "solver/phases.hpp"

#include <algorithm>
#include <cmath>

namespace ionledger::solver {
namespace {

/// Pivots of N H^-1 N^T below this share of their diagonal mean a dependent phase.
constexpr double dependence = 1e-9;

/// nu . values
double dot_column(const Kernel& kernel, int column, const double* values) {
  double sum = 0;
  for (int e = kernel.begin[column]; e < kernel.begin[column + 1]; ++e) {
    sum += kernel.nu[e] * values[kernel.row[e]];
  }
  return sum;
}

}  // namespace

void resize(PhaseSet& set, const Kernel& kernel) {
  const auto n = static_cast<std::size_t>(kernel.n_components);
  const auto n_phases = static_cast<std::size_t>(kernel.n_phases);
  set.active.assign(n_phases, 0);
  set.members.reserve(n_phases);
  set.response.assign(n * n_phases, 0);
  set.schur.assign(n_phases * n_phases, 0);
  set.scale.assign(n_phases, 1);
  set.touched.assign(n, 0);
}

double ln_saturation(const Kernel& kernel,
                     const Prepared& prepared,
                     const Point& point,
                     int phase) {
  return kernel.ln_k_phase[phase] + kernel.phase_solvent_exponent[phase] * point.ln_solvent +
         dot_column(kernel, kernel.n_species + phase, point.x.data()) - prepared.ln_target[phase];
}

void choose_active(const Kernel& kernel,
                   const Prepared& prepared,
                   const Point& point,
                   bool imposed_only,
                   PhaseSet& set) {
  for (int m = 0; m < kernel.n_phases; ++m) {
    set.active[m] = prepared.present[kernel.n_species + m] != 0;
    if (set.active[m] == 0 || prepared.rules[m] == PhaseRule::imposed) continue;
    const double ln_omega = imposed_only ? -1 : ln_saturation(kernel, prepared, point, m);
    set.active[m] = point.amount[m] / set.scale[m] + ln_omega > 0;
  }
}

void factor_phases(const Kernel& kernel,
                   const Prepared& prepared,
                   const Sums& sums,
                   PhaseSet& set) {
  const int n = kernel.n_components;
  const int width = kernel.n_phases;
  set.members.clear();
  std::fill(set.touched.begin(), set.touched.end(), 0);
  for (const PhaseRule rule : {PhaseRule::imposed, PhaseRule::may_form}) {
    for (int m = 0; m < kernel.n_phases; ++m) {
      if (set.active[m] == 0 || prepared.rules[m] != rule) continue;
      const int column = kernel.n_species + m;
      const auto count = static_cast<int>(set.members.size());
      double* const response = &set.response[static_cast<std::size_t>(count * n)];
      std::fill(response, response + n, 0.0);
      for (int e = kernel.begin[column]; e < kernel.begin[column + 1]; ++e) {
        const int i = kernel.row[e];
        if (prepared.rows[i] == Prepared::Row::balanced) response[i] = kernel.nu[e];
      }
      solve_hessian(kernel, sums, response);
      double* const row = &set.schur[static_cast<std::size_t>(count * width)];
      double pivot = 0;
      for (int e = kernel.begin[column]; e < kernel.begin[column + 1]; ++e) {
        if (prepared.rows[kernel.row[e]] == Prepared::Row::balanced) {
          pivot += kernel.nu[e] * response[kernel.row[e]];
        }
      }
      const double diagonal = pivot;
      for (int a = 0; a < count; ++a) {
        const double* const other = &set.schur[static_cast<std::size_t>(a * width)];
        double value = dot_column(kernel, column, &set.response[static_cast<std::size_t>(a * n)]);
        for (int b = 0; b < a; ++b) value -= row[b] * other[b];
        row[a] = value / other[a];
        pivot -= row[a] * row[a];
      }
      if (!(pivot > dependence * diagonal)) {
        set.active[m] = 0;
        continue;
      }
      row[count] = std::sqrt(pivot);
      set.members.push_back(m);
      for (int e = kernel.begin[column]; e < kernel.begin[column + 1]; ++e) {
        set.touched[kernel.row[e]] = 1;
      }
    }
  }
}

void solve_bordered(
    const Kernel& kernel, const Sums& sums, const PhaseSet& set, double* b, double* limits) {
  solve_hessian(kernel, sums, b);
  const auto count = static_cast<int>(set.members.size());
  const int n = kernel.n_components;
  const int width = kernel.n_phases;
  // N H^-1 N^T amounts = N H^-1 b - limits
  for (int a = 0; a < count; ++a) {
    const double* const row = &set.schur[static_cast<std::size_t>(a * width)];
    double value = dot_column(kernel, kernel.n_species + set.members[a], b) - limits[a];
    for (int c = 0; c < a; ++c) value -= row[c] * limits[c];
    limits[a] = value / row[a];
  }
  for (int a = count - 1; a >= 0; --a) {
    double value = limits[a];
    for (int c = a + 1; c < count; ++c) {
      value -= set.schur[static_cast<std::size_t>(c * width + a)] * limits[c];
    }
    limits[a] = value / set.schur[static_cast<std::size_t>(a * width + a)];
  }
  for (int a = 0; a < count; ++a) {
    const double* const response = &set.response[static_cast<std::size_t>(a * n)];
    for (int i = 0; i < n; ++i) b[i] -= limits[a] * response[i];
  }
}

}  // namespace ionledger::solver
