// See prepare.hpp.
#include "solver/prepare.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

namespace ionledger::solver {
namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();
constexpr double not_a_number = std::numeric_limits<double>::quiet_NaN();
constexpr double default_ln_activity = -12;  ///< Where nothing better is known.
constexpr double default_phase_scale = 1e-3;
constexpr double largest_start_ionic_strength = 100;
constexpr double smallest_start_ionic_strength = 1e-6;

bool all_finite(const Prepared& prepared) {
  for (std::size_t i = 0; i < prepared.total.size(); ++i) {
    if (!std::isfinite(prepared.total[i])) return false;
    if (prepared.rows[i] == Prepared::Row::fixed && !std::isfinite(prepared.ln_fixed[i])) {
      return false;
    }
  }
  for (std::size_t m = 0; m < prepared.rules.size(); ++m) {
    if (prepared.rules[m] != PhaseRule::absent && !std::isfinite(prepared.ln_target[m])) {
      return false;
    }
  }
  return true;
}

void default_start(const Kernel& kernel, const Prepared& prepared, Point& point) {
  double ionic = 0;
  for (int i = 0; i < kernel.n_components; ++i) {
    const int unit = kernel.unit_species[i];
    const int inverse = kernel.unit_inverse[i];
    const double total = prepared.total[i];
    double& x = point.x[i];
    if (unit >= 0 && inverse >= 0) {
      x = 0.5 * (kernel.ln_k[inverse] - kernel.ln_k[unit]);
    } else if (total > 0) {
      x = std::log(total) - (unit >= 0 ? kernel.ln_k[unit] : 0);
    } else {
      x = default_ln_activity;
    }
    if (unit >= 0 && total > 0) ionic += kernel.ionic_weight[unit] * total;
  }
  point.ionic_strength = std::min(ionic, largest_start_ionic_strength);
  if (point.ionic_strength == 0 && kernel.largest_ionic_weight > 0) {
    point.ionic_strength = smallest_start_ionic_strength;
  }
  point.ln_solvent = 0;
}

void impose(const Kernel& kernel, const Prepared& prepared, Point& point) {
  for (int i = 0; i < kernel.n_components; ++i) {
    if (prepared.rows[i] == Prepared::Row::fixed) point.x[i] = prepared.ln_fixed[i];
    if (prepared.rows[i] == Prepared::Row::absent) point.x[i] = 0;
  }
}

}  // namespace

bool prepare(const Kernel& kernel, const Case& a_case, Prepared& prepared) {
  const auto n = static_cast<std::size_t>(kernel.n_components);
  const auto n_phases = static_cast<std::size_t>(kernel.n_phases);
  prepared.total.assign(n, 0);
  prepared.total_low.assign(n, 0);
  prepared.ln_fixed.assign(n, not_a_number);
  prepared.rows.assign(n, Prepared::Row::balanced);
  prepared.present.assign(static_cast<std::size_t>(kernel.n_species) + n_phases, 1);
  prepared.rules.assign(n_phases, PhaseRule::absent);
  prepared.ln_target.assign(n_phases, 0);
  prepared.has_phases = false;
  for (std::size_t i = 0; i < n; ++i) {
    const auto caller = static_cast<std::size_t>(kernel.order[i]);
    if (caller < a_case.fixed_ln_activity.size() && a_case.fixed_ln_activity[caller]) {
      prepared.rows[i] = Prepared::Row::fixed;
      prepared.ln_fixed[i] = *a_case.fixed_ln_activity[caller];
    } else {
      prepared.total[i] = a_case.totals[caller];
    }
  }
  for (std::size_t m = 0; m < n_phases; ++m) {
    if (m < a_case.phase_rules.size()) prepared.rules[m] = a_case.phase_rules[m];
    if (m < a_case.ln_target.size()) prepared.ln_target[m] = a_case.ln_target[m];
    const bool taken = prepared.rules[m] != PhaseRule::absent;
    prepared.present[static_cast<std::size_t>(kernel.n_species) + m] = taken;
    prepared.has_phases = prepared.has_phases || taken;
  }
  return all_finite(prepared);
}

bool set_start(const Kernel& kernel, const Prepared& prepared, const Start& start, Point& point) {
  point.x.resize(static_cast<std::size_t>(kernel.n_components));
  point.amount.assign(static_cast<std::size_t>(kernel.n_phases), 0);
  default_start(kernel, prepared, point);
  const bool given = start.x.size() == point.x.size();
  if (given) {
    for (int i = 0; i < kernel.n_components; ++i) {
      if (std::isfinite(start.x[kernel.order[i]])) point.x[i] = start.x[kernel.order[i]];
    }
  }
  if (start.phase_amount.size() == point.amount.size()) {
    for (int m = 0; m < kernel.n_phases; ++m) {
      const bool usable =
          prepared.present[kernel.n_species + m] != 0 && std::isfinite(start.phase_amount[m]);
      if (usable) point.amount[m] = start.phase_amount[m];
    }
  }
  if (start.ionic_strength > 0 && kernel.largest_ionic_weight > 0) {
    point.ionic_strength = start.ionic_strength;
  }
  impose(kernel, prepared, point);
  return given;
}

double phase_scale(const Kernel& kernel, const Prepared& prepared, int phase) {
  const int column = kernel.n_species + phase;
  double smallest = infinity;
  for (int e = kernel.begin[column]; e < kernel.begin[column + 1]; ++e) {
    const int i = kernel.row[e];
    if (prepared.total[i] > 0 && kernel.nu[e] > 0 && kernel.unit_inverse[i] < 0) {
      smallest = std::min(smallest, prepared.total[i] / kernel.nu[e]);
    }
  }
  return std::isfinite(smallest) ? smallest : default_phase_scale;
}

}  // namespace ionledger::solver
