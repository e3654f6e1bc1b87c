// Sweeps and Newton steps in the caller's components; see fast_path.hpp.
#include "solver/fast_path.hpp"

#include <algorithm>
#include <cmath>

namespace ionledger::solver {
namespace {

constexpr int iterations_before_phases = 4;
constexpr double saturation_tolerance = 1e-11;  ///< |ln Q - ln target| of a phase in equilibrium.
constexpr double largest_solvent_step = 0.3;    ///< Of ln a_w.
constexpr double smallest_ln_solvent = -4;
/// Largest d I(c(I)) / d I taken at its word: above 1 a Newton step would run away from the root.
constexpr double largest_slope = 0.7;

/// A balance as two positive sides, plus = minus, so that its logarithm can be taken:
/// sum over nu > 0 of nu c + max(-T, 0) against sum over nu < 0 of |nu| c + max(T, 0).
struct Sides {
  double plus, minus;
};

Sides sides_of(const Sums& sums, const Prepared& prepared, int i) {
  const double total = prepared.total[i];
  return {sums.sum[2 * i] + std::max(-total, 0.0), sums.sum[2 * i + 1] + std::max(total, 0.0)};
}

/// 1 / d ln(plus / minus) by d x_i
double inverse_log_slope(const Sums& sums, const Sides& sides, int i) {
  return 1 / (sums.squares[2 * i] / sides.plus + sums.squares[2 * i + 1] / sides.minus);
}

void sweep(
    const Kernel& kernel, const Prepared& prepared, double damping, Point& point, Sums& sums) {
  evaluate_amounts(kernel, sums);
  for (int i = 0; i < kernel.n_components; ++i) {
    if (prepared.rows[i] != Prepared::Row::balanced) continue;
    const Sides sides = sides_of(sums, prepared, i);
    const double change =
        -damping * inverse_log_slope(sums, sides, i) * std::log(sides.plus / sides.minus);
    if (!std::isfinite(change)) continue;
    point.x[i] += change;
    sums.activity[i] *= std::exp(change);
  }
}

/// Right-hand sides. A row without a phase uses -W ln(plus / minus), which is the logarithmic
/// residual far away and the linear one close by; a row with one uses T - sum nu c - sum nu n, so
/// that the unknown is the change of n: large amounts would drown the small ones otherwise.
void fill_right_hand_sides(const Kernel& kernel,
                           const Prepared& prepared,
                           const Point& point,
                           FastWork& work) {
  for (int i = 0; i < kernel.n_components; ++i) {
    work.step[i] = 0;
    work.by_ionic[i] = work.sums.borders[i].by_ionic;
    work.by_solvent[i] = work.sums.borders[i].by_solvent;
    if (prepared.rows[i] != Prepared::Row::balanced) {
      work.by_ionic[i] = work.by_solvent[i] = 0;
      continue;
    }
    if (work.phases.touched[i] != 0) {
      work.step[i] = prepared.total[i] - work.sums.sum[2 * i] + work.sums.sum[2 * i + 1];
      continue;
    }
    const Sides sides = sides_of(work.sums, prepared, i);
    const double weight = (work.sums.squares[2 * i] + work.sums.squares[2 * i + 1]) *
                          inverse_log_slope(work.sums, sides, i);
    work.step[i] = -weight * std::log(sides.plus / sides.minus);
  }
  for (const int m : work.phases.members) {
    const int column = kernel.n_species + m;
    for (int e = kernel.begin[column]; e < kernel.begin[column + 1]; ++e) {
      const int i = kernel.row[e];
      if (prepared.rows[i] == Prepared::Row::balanced) {
        work.step[i] -= kernel.nu[e] * point.amount[m];
      }
    }
  }
}

/// Changes of I(c) and of the sum of solutes along a change of x.
struct Along {
  double ionic = 0, solute = 0;
};

Along along(const Sums& sums, const std::vector<double>& step) {
  Along result;
  for (std::size_t i = 0; i < step.size(); ++i) {
    result.ionic += sums.borders[i].gradient_ionic * step[i];
    result.solute += sums.borders[i].gradient_solvent * step[i];
  }
  return result;
}

bool balances_hold(const Kernel& kernel,
                   const Prepared& prepared,
                   const Point& point,
                   FastWork& work) {
  // `by_ionic` and `by_solvent` hold the phases' share of each balance and its size for a moment.
  std::fill(work.by_ionic.begin(), work.by_ionic.end(), 0.0);
  std::fill(work.by_solvent.begin(), work.by_solvent.end(), 0.0);
  if (prepared.has_phases) {
    for (int m = 0; m < kernel.n_phases; ++m) {
      if (prepared.present[kernel.n_species + m] == 0) continue;
      const double n = point.amount[m];
      const double ln_omega = ln_saturation(kernel, prepared, point, m);
      const bool imposed = prepared.rules[m] == PhaseRule::imposed;
      if (!imposed && n < 0) return false;
      if (ln_omega > saturation_tolerance) return false;
      if ((imposed || n > 0) && ln_omega < -saturation_tolerance) return false;
      const int column = kernel.n_species + m;
      for (int e = kernel.begin[column]; e < kernel.begin[column + 1]; ++e) {
        work.by_ionic[kernel.row[e]] += kernel.nu[e] * n;
        work.by_solvent[kernel.row[e]] += std::abs(kernel.nu[e] * n);
      }
    }
  }
  for (int i = 0; i < kernel.n_components; ++i) {
    if (prepared.rows[i] != Prepared::Row::balanced) continue;
    const double plus = work.sums.sum[2 * i];
    const double minus = work.sums.sum[2 * i + 1];
    const double residual = plus - minus + work.by_ionic[i] - prepared.total[i];
    if (!(std::abs(residual) <= fast_balance_tolerance * (plus + minus + work.by_solvent[i]))) {
      return false;
    }
  }
  return true;
}

bool couplings_hold(const Kernel& kernel, const Point& point, const Sums& sums) {
  const double solvent = 1 - kernel.solvent_slope * sums.solute - std::exp(point.ln_solvent);
  return std::abs(sums.ionic - point.ionic_strength) <=
             fast_balance_tolerance * point.ionic_strength &&
         (kernel.solvent_slope == 0 || std::abs(solvent) <= fast_balance_tolerance);
}

struct Couplings {
  double ionic = 0, ln_solvent = 0;
};

/// Steps of I and ln a_w from the two border equations left after elimination of everything else:
///
///     I + dI = I(c + dc),    exp(L)(1 + dL) = 1 - slope sum s (c + dc),
///     dc = dc(step) - dI dc(by_ionic) - dL dc(by_solvent) + direct terms.
Couplings couple(const Kernel& kernel, const Point& point, FastWork& work) {
  const Sums& sums = work.sums;
  const double slope = kernel.solvent_slope;
  const Along step = along(sums, work.step);
  const Along by_ionic = along(sums, work.by_ionic);
  const double ionic_by_ionic = sums.ionic_by_ionic - by_ionic.ionic;
  const double ionic_right = point.ionic_strength - sums.ionic - step.ionic;
  work.ionic_strength_slope = ionic_by_ionic;
  const double a = std::min(ionic_by_ionic, largest_slope) - 1;
  const double smallest = -0.7 * point.ionic_strength;
  const double largest = std::max(2 * point.ionic_strength, 0.02) - point.ionic_strength;
  Couplings result;
  if (slope == 0) {
    result.ionic = std::clamp(ionic_right / a, smallest, largest);
    return result;
  }
  const Along by_solvent = along(sums, work.by_solvent);
  const double ionic_by_solvent = sums.ionic_by_solvent - by_solvent.ionic;
  const double a_w = std::exp(point.ln_solvent);
  const double solvent_by_ionic = slope * (sums.solute_by_ionic - by_ionic.solute);
  const double solvent_by_solvent = a_w + slope * (sums.solute_by_solvent - by_solvent.solute);
  const double solvent_right = 1 - a_w - slope * (sums.solute + step.solute);
  const double determinant = a * solvent_by_solvent - ionic_by_solvent * solvent_by_ionic;
  const double ionic =
      (ionic_right * solvent_by_solvent - ionic_by_solvent * solvent_right) / determinant;
  result.ionic = std::clamp(ionic, smallest, largest);
  const double ln_solvent =
      std::clamp((solvent_right - solvent_by_ionic * result.ionic) / solvent_by_solvent,
                 -largest_solvent_step,
                 largest_solvent_step);
  result.ln_solvent =
      std::clamp(ln_solvent, smallest_ln_solvent - point.ln_solvent, -point.ln_solvent);
  return result;
}

/// One Newton step from the sums at `point`; false when it cannot be computed.
bool take_step(const Kernel& kernel,
               const Prepared& prepared,
               const FastSettings& settings,
               bool imposed_only,
               Point& point,
               FastWork& work) {
  Sums& sums = work.sums;
  if (!factor_hessian(kernel, prepared, sums)) return false;
  work.phases.members.clear();
  std::fill(work.phases.touched.begin(), work.phases.touched.end(), 0);
  if (prepared.has_phases) {
    choose_active(kernel, prepared, point, imposed_only, work.phases);
    factor_phases(kernel, prepared, sums, work.phases);
    for (std::size_t a = 0; a < work.phases.members.size(); ++a) {
      const int m = work.phases.members[a];
      work.phase_step[a] = -ln_saturation(kernel, prepared, point, m);
      work.phase_by_ionic[a] = 0;
      work.phase_by_solvent[a] = kernel.phase_solvent_exponent[m];
    }
  }
  fill_right_hand_sides(kernel, prepared, point, work);
  solve_bordered(kernel, sums, work.phases, work.step.data(), work.phase_step.data());
  solve_bordered(kernel, sums, work.phases, work.by_ionic.data(), work.phase_by_ionic.data());
  if (kernel.solvent_slope != 0) {
    solve_bordered(kernel, sums, work.phases, work.by_solvent.data(), work.phase_by_solvent.data());
  }
  const Couplings couplings = couple(kernel, point, work);
  double largest = 0;
  for (int i = 0; i < kernel.n_components; ++i) {
    work.step[i] -= work.by_ionic[i] * couplings.ionic;
    if (kernel.solvent_slope != 0) work.step[i] -= work.by_solvent[i] * couplings.ln_solvent;
    largest = std::max(largest, std::abs(work.step[i]));
  }
  if (!std::isfinite(largest)) return false;
  const double fraction = largest > settings.largest_step ? settings.largest_step / largest : 1;
  for (int i = 0; i < kernel.n_components; ++i) {
    const double change = fraction * work.step[i];
    if (!(std::abs(change) <= settings.largest_step)) return false;  // NaN hides from max()
    point.x[i] += change;
    sums.activity[i] *= std::exp(change);
  }
  point.ionic_strength += fraction * couplings.ionic;
  point.ln_solvent += fraction * couplings.ln_solvent;
  if (prepared.has_phases) {
    for (int m = 0; m < kernel.n_phases; ++m) {
      if (work.phases.active[m] == 0) point.amount[m] = 0;
    }
    for (std::size_t a = 0; a < work.phases.members.size(); ++a) {
      double& amount = point.amount[work.phases.members[a]];
      double change = work.phase_step[a] - couplings.ionic * work.phase_by_ionic[a];
      if (kernel.solvent_slope != 0) change -= couplings.ln_solvent * work.phase_by_solvent[a];
      amount += fraction * change;
    }
  }
  return true;
}

}  // namespace

void resize(FastWork& work, const Kernel& kernel) {
  resize(work.sums, kernel);
  resize(work.phases, kernel);
  const auto n = static_cast<std::size_t>(kernel.n_components);
  const auto n_phases = static_cast<std::size_t>(kernel.n_phases);
  for (auto* v : {&work.step, &work.by_ionic, &work.by_solvent}) v->assign(n, 0);
  for (auto* v : {&work.phase_step, &work.phase_by_ionic, &work.phase_by_solvent}) {
    v->assign(n_phases, 0);
  }
}

bool run_fast_path(const Kernel& kernel,
                   const Prepared& prepared,
                   const FastSettings& settings,
                   Point& point,
                   FastWork& work) {
  Sums& sums = work.sums;
  for (int j = 0; j < kernel.n_species; ++j) {
    sums.k_present[j] = prepared.present[j] != 0 ? kernel.k[j] : 0;
  }
  for (int i = 0; i < kernel.n_components; ++i) sums.activity[i] = std::exp(point.x[i]);
  const bool phases_known =
      std::any_of(point.amount.begin(), point.amount.end(), [](double n) { return n != 0; });
  evaluate_factors(kernel, point, sums);
  for (int s = 0; s < settings.sweeps; ++s) {
    sweep(kernel, prepared, settings.sweep_damping, point, sums);
  }
  for (int it = 0; it < settings.limit; ++it) {
    if (it > 0) evaluate_factors(kernel, point, sums);
    evaluate_amounts(kernel, sums);
    evaluate_borders(kernel, sums);
    if (!std::isfinite(sums.ionic)) return false;
    // One step at least, even from a solution: it gives the slope of I(c(I)).
    if (it > 0 && couplings_hold(kernel, point, sums) &&
        balances_hold(kernel, prepared, point, work)) {
      return true;
    }
    ++work.iterations;
    const bool imposed_only = !phases_known && it < iterations_before_phases;
    if (!take_step(kernel, prepared, settings, imposed_only, point, work)) return false;
  }
  return false;
}

}  // namespace ionledger::solver
