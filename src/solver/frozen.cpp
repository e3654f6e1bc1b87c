// State of the held programme: amounts, basis, balances; see frozen.hpp. Its iteration is in
// frozen_newton.cpp.
#include "solver/frozen.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

namespace ionledger::solver {
namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();
constexpr double contradiction = 1e-9;  ///< Of two limits on dependent columns.

bool is_held(const Frozen& frozen, int column) {
  const Kernel& kernel = *frozen.kernel;
  if (column < kernel.n_species) return false;
  if (column >= kernel.n_species + kernel.n_phases) return true;
  return frozen.held[column - kernel.n_species] != 0;
}

double limit_of(const Frozen& frozen, int column) {
  const Kernel& kernel = *frozen.kernel;
  const int after_phases = kernel.n_species + kernel.n_phases;
  return column >= after_phases ? frozen.prepared->ln_fixed[column - after_phases]
                                : frozen.ln_limit[column - kernel.n_species];
}

double value_of(const Frozen& frozen, int column) {
  const Kernel& kernel = *frozen.kernel;
  double value = 0;
  for (int e = kernel.begin[column]; e < kernel.begin[column + 1]; ++e) {
    value += kernel.nu[e] * frozen.x[kernel.row[e]];
  }
  return value;
}

/// Columns with a known ln Q: fixed activities, imposed phases, then held phases that may form.
template <class Visit>
void for_each_held(const Frozen& frozen, Visit visit) {
  const Kernel& kernel = *frozen.kernel;
  const Prepared& prepared = *frozen.prepared;
  for (int i = 0; i < kernel.n_components; ++i) {
    if (prepared.rows[i] == Prepared::Row::fixed) visit(kernel.n_species + kernel.n_phases + i);
  }
  for (const PhaseRule rule : {PhaseRule::imposed, PhaseRule::may_form}) {
    for (int m = 0; m < kernel.n_phases; ++m) {
      if (prepared.rules[m] == rule && frozen.held[m] != 0) visit(kernel.n_species + m);
    }
  }
}

void choose_basis(Frozen& frozen) {
  const Kernel& kernel = *frozen.kernel;
  clear(frozen.basis);
  for_each_held(frozen, [&](int column) { try_column(kernel, column, frozen.basis); });
  std::vector<int> order;
  order_by_amount(frozen.ln_weight, frozen.prepared->present, order);
  for (const int column : order) {
    if (frozen.basis.rank == kernel.n_components) break;
    if (frozen.ln_weight[column] == -infinity || is_held(frozen, column)) continue;
    try_column(kernel, column, frozen.basis);
  }
  finish(kernel, frozen.basis);
  frozen.free_rows.clear();
  for (int i = 0; i < kernel.n_components; ++i) {
    const int column = frozen.basis.columns[i];
    if (column >= 0 && !is_held(frozen, column)) frozen.free_rows.push_back(i);
  }
  std::sort(frozen.free_rows.begin(), frozen.free_rows.end(), [&](int a, int b) {
    const double left = frozen.ln_weight[frozen.basis.columns[a]];
    const double right = frozen.ln_weight[frozen.basis.columns[b]];
    return left != right ? left > right : a < b;
  });
}

}  // namespace

Frozen freeze(const Kernel& kernel, const Prepared& prepared, const Point& point) {
  Frozen frozen;
  frozen.kernel = &kernel;
  frozen.prepared = &prepared;
  const auto n = static_cast<std::size_t>(kernel.n_components);
  const auto n_columns = static_cast<std::size_t>(kernel.n_species + kernel.n_phases);
  frozen.ln_k.resize(static_cast<std::size_t>(kernel.n_species));
  frozen.ln_limit.resize(static_cast<std::size_t>(kernel.n_phases));
  frozen.x = point.x;
  frozen.amount.assign(static_cast<std::size_t>(kernel.n_phases), 0);
  frozen.held.assign(static_cast<std::size_t>(kernel.n_phases), 0);
  for (int m = 0; m < kernel.n_phases; ++m) {
    frozen.held[m] =
        prepared.present[kernel.n_species + m] != 0 && prepared.rules[m] == PhaseRule::imposed;
  }
  frozen.ln_weight.assign(n_columns, -infinity);
  resize(frozen.basis, kernel);
  frozen.alpha.resize(n * n_columns);
  frozen.total.resize(n);
  frozen.scaled_residual.resize(n);
  set_conditions(point.ionic_strength, point.ln_solvent, frozen);
  return frozen;
}

void set_conditions(double ionic_strength, double ln_solvent, Frozen& frozen) {
  const Kernel& kernel = *frozen.kernel;
  for (int j = 0; j < kernel.n_species; ++j) {
    const ActivityClass& activity_class = kernel.classes[kernel.activity_class[j]];
    frozen.ln_k[j] = kernel.ln_k[j] + kernel.solvent_exponent[j] * ln_solvent -
                     ln_gamma(activity_class, ionic_strength).value;
  }
  for (int m = 0; m < kernel.n_phases; ++m) {
    frozen.ln_limit[m] = frozen.prepared->ln_target[m] - kernel.ln_k_phase[m] -
                         kernel.phase_solvent_exponent[m] * ln_solvent;
  }
}

void refresh(Frozen& frozen) {
  const Kernel& kernel = *frozen.kernel;
  const auto n = static_cast<std::size_t>(kernel.n_components);
  for (int j = 0; j < kernel.n_species; ++j) {
    frozen.ln_weight[j] =
        frozen.prepared->present[j] != 0 ? frozen.ln_k[j] + value_of(frozen, j) : -infinity;
  }
  choose_basis(frozen);
  for (int j = 0; j < kernel.n_species + kernel.n_phases; ++j) {
    if (frozen.prepared->present[j] == 0) continue;
    expand(kernel, frozen.basis, j, &frozen.alpha[static_cast<std::size_t>(j) * n]);
  }
  transform_totals(*frozen.prepared, frozen.basis, frozen.total);
}

bool meet_limits(Frozen& frozen) {
  const Kernel& kernel = *frozen.kernel;
  refresh(frozen);
  std::vector<double> step(static_cast<std::size_t>(kernel.n_components), 0);
  for (int i = 0; i < kernel.n_components; ++i) {
    const int column = frozen.basis.columns[i];
    if (column < 0 || !is_held(frozen, column)) continue;
    step[i] = limit_of(frozen, column) - value_of(frozen, column);
  }
  add_step(frozen, step, 1, frozen.x);
  bool consistent = true;
  for_each_held(frozen, [&](int column) {
    const double off = limit_of(frozen, column) - value_of(frozen, column);
    consistent =
        consistent && std::abs(off) <= contradiction * (1 + std::abs(value_of(frozen, column)));
  });
  return consistent;
}

void add_step(const Frozen& frozen,
              const std::vector<double>& basis_step,
              double fraction,
              std::vector<double>& x) {
  // nu_b dx = step_b for every basis column b: dx = (M^-1)^T step.
  const std::size_t n = frozen.basis.columns.size();
  for (std::size_t k = 0; k < n; ++k) {
    double change = 0;
    for (std::size_t i = 0; i < n; ++i) {
      if (frozen.basis.columns[i] < 0) continue;
      change += frozen.basis.inverse[k * n + i] * basis_step[i];
    }
    x[k] += fraction * change;
  }
}

double column_change(const Frozen& frozen, int column, const std::vector<double>& basis_step) {
  const std::size_t n = frozen.basis.columns.size();
  const double* const alpha = &frozen.alpha[static_cast<std::size_t>(column) * n];
  double change = 0;
  for (const int i : frozen.free_rows) change += alpha[i] * basis_step[i];
  return change;
}

}  // namespace ionledger::solver
