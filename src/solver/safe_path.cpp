// Phases by exchange, then solvent activity, then ionic strength; see safe_path.hpp.
#include "solver/safe_path.hpp"

#include <algorithm>
#include <cmath>

#include "solver/frozen.hpp"
#include "solver/interior_point.hpp"

namespace ionledger::solver {
namespace {

constexpr double saturation_tolerance = 1e-11;
constexpr double amount_tolerance = 1e-13;  ///< Relative to the largest total.
constexpr double coupling_tolerance = 1e-14;
constexpr int solvent_limit = 60;
constexpr int ionic_limit = 120;
constexpr double least_solvent_activity = 1e-4;
constexpr double largest_ionic_strength = 1e4;
constexpr int grid_points = 40;

class SafePath {
 public:
  SafePath(const Kernel& kernel, const Prepared& prepared, const Point& point)
      : kernel_(kernel),
        prepared_(prepared),
        frozen_(freeze(kernel, prepared, point)),
        ln_solvent_(point.ln_solvent) {
    for (const double total : prepared.total) scale_ = std::max(scale_, std::abs(total));
    for (int m = 0; m < kernel.n_phases; ++m) {
      if (point.amount[m] > 0 && prepared.present[kernel.n_species + m] != 0) frozen_.held[m] = 1;
    }
  }

  [[nodiscard]] bool contradicts() const { return contradicts_; }
  [[nodiscard]] int iterations() const { return iterations_; }

  /// I(c) - I with everything else solved at this I; NaN when that failed.
  double excess(double ionic_strength) {
    for (int k = 0; k < solvent_limit; ++k) {
      set_conditions(ionic_strength, ln_solvent_, frozen_);
      if (!solve_phases()) return std::nan("");
      if (kernel_.solvent_slope == 0) break;
      const double before = ln_solvent_;
      const double a_w = 1 - kernel_.solvent_slope * weighted(kernel_.solute_weight);
      ln_solvent_ = std::log(std::max(a_w, least_solvent_activity));
      if (std::abs(ln_solvent_ - before) <= coupling_tolerance) break;
    }
    return weighted(kernel_.ionic_weight) - ionic_strength;
  }

  void write(double ionic_strength, Point& point) const {
    point.x = frozen_.x;
    point.amount = frozen_.amount;
    point.ionic_strength = ionic_strength;
    point.ln_solvent = ln_solvent_;
  }

 private:
  double weighted(const std::vector<double>& weight) const {
    double sum = 0;
    for (int j = 0; j < kernel_.n_species; ++j) {
      if (prepared_.present[j] != 0) sum += weight[j] * std::exp(frozen_.ln_weight[j]);
    }
    return sum;
  }

  [[nodiscard]] bool may_form(int m) const {
    return prepared_.present[kernel_.n_species + m] != 0 &&
           prepared_.rules[m] == PhaseRule::may_form;
  }

  /// The set of the last solve first; then, from the solution without any phase, the interior
  /// point method; and when that does not settle, one exchange after the other.
  bool solve_phases() {
    if (!prepared_.has_phases) return solve_frozen(frozen_, iterations_);
    if (warm_ && exchange_phases()) return true;
    release_all();
    const bool without = solve_frozen(frozen_, iterations_);
    const std::vector<double> x = frozen_.x;
    warm_ = find_present_phases(frozen_, iterations_) && exchange_phases();
    if (!warm_ && without) {
      release_all();
      frozen_.x = x;
      warm_ = exchange_phases();
    }
    if (!warm_) {
      release_all();
      contradicts_ = !meet_limits(frozen_);
    }
    return warm_;
  }

  void release_all() {
    for (int m = 0; m < kernel_.n_phases; ++m) {
      if (may_form(m)) frozen_.held[m] = 0;
    }
  }

  /// Solves with the held set, releases the phase with the most negative amount or holds the most
  /// supersaturated one, and repeats. Every exchange raises the optimum, so none comes back.
  bool exchange_phases() {
    for (int step = 0; step < 4 * kernel_.n_phases + 10; ++step) {
      if (!solve_frozen(frozen_, iterations_)) return false;
      int worst = -1;
      double worst_value = -amount_tolerance * scale_;
      for (int m = 0; m < kernel_.n_phases; ++m) {
        if (!may_form(m) || frozen_.held[m] == 0 || frozen_.amount[m] >= worst_value) continue;
        worst = m;
        worst_value = frozen_.amount[m];
      }
      if (worst >= 0) {
        frozen_.held[worst] = 0;
        continue;
      }
      worst_value = saturation_tolerance;
      for (int m = 0; m < kernel_.n_phases; ++m) {
        if (!may_form(m) || frozen_.held[m] != 0) continue;
        const double excess_here = ln_excess(m);
        if (excess_here <= worst_value) continue;
        worst = m;
        worst_value = excess_here;
      }
      if (worst < 0) {
        for (double& amount : frozen_.amount) {
          if (std::abs(amount) <= amount_tolerance * scale_ && amount < 0) amount = 0;
        }
        return true;
      }
      make_room_for(worst);
      frozen_.held[worst] = 1;
    }
    return false;
  }

  [[nodiscard]] double ln_excess(int m) const {
    const int column = kernel_.n_species + m;
    double value = -frozen_.ln_limit[m];
    for (int e = kernel_.begin[column]; e < kernel_.begin[column + 1]; ++e) {
      value += kernel_.nu[e] * frozen_.x[kernel_.row[e]];
    }
    return value;
  }

  /// A phase that is a combination of held ones takes the place of the one it uses up first.
  void make_room_for(int m) {
    const std::size_t n = frozen_.basis.columns.size();
    const double* const alpha = &frozen_.alpha[static_cast<std::size_t>(kernel_.n_species + m) * n];
    for (const int i : frozen_.free_rows) {
      if (alpha[i] != 0) return;
    }
    int first = -1;
    double smallest = 0;
    for (std::size_t i = 0; i < n; ++i) {
      const int other = frozen_.basis.columns[i] - kernel_.n_species;
      if (other < 0 || other >= kernel_.n_phases || !may_form(other) || alpha[i] <= 0) continue;
      const double ratio = frozen_.amount[other] / alpha[i];
      if (first >= 0 && ratio >= smallest) continue;
      first = other;
      smallest = ratio;
    }
    if (first >= 0) frozen_.held[first] = 0;
  }

  const Kernel& kernel_;
  const Prepared& prepared_;
  Frozen frozen_;
  double ln_solvent_;
  double scale_ = 0;
  int iterations_ = 0;
  bool warm_ = false;
  bool contradicts_ = false;
};

bool couples(const Kernel& kernel) {
  if (kernel.largest_ionic_weight == 0) return false;
  return std::any_of(kernel.classes.begin(), kernel.classes.end(), [](const ActivityClass& c) {
    return c.debye != 0 || c.linear != 0;
  });
}

/// Root of excess(I) by the Illinois variant of false position, with bisection every third step.
/// excess(0) >= 0 and excess < 0 for large I, so a bracket exists.
bool find_root(SafePath& path, double start, double& root) {
  double low = start;
  double high = start;
  double at_low = path.excess(start);
  double at_high = at_low;
  if (std::isnan(at_low)) return false;
  if (at_low >= 0) {
    while (at_high > 0 && high < largest_ionic_strength) {
      low = high;
      at_low = at_high;
      high = high + std::max(at_high, high);
      at_high = path.excess(high);
    }
  } else {
    while (at_low < 0 && low > 1e-30) {
      high = low;
      at_high = at_low;
      low *= 0.1;
      at_low = path.excess(low);
    }
  }
  if (!(at_low >= 0) || !(at_high <= 0)) return false;
  int side = 0;
  for (int k = 0; k < ionic_limit; ++k) {
    root = at_low == at_high ? low : (low * at_high - high * at_low) / (at_high - at_low);
    if (k % 3 == 2 || !(root > low && root < high)) root = 0.5 * (low + high);
    const double here = path.excess(root);
    if (std::isnan(here)) return false;
    if (std::abs(here) <= coupling_tolerance * root || high - low <= 4e-16 * high) return true;
    if (here > 0) {
      low = root;
      at_low = here;
      if (side == 1) at_high *= 0.5;
      side = 1;
    } else {
      high = root;
      at_high = here;
      if (side == -1) at_low *= 0.5;
      side = -1;
    }
  }
  return true;
}

}  // namespace

SafeFinding run_safe_path(const Kernel& kernel, const Prepared& prepared, Point& point) {
  SafeFinding finding;
  SafePath path(kernel, prepared, point);
  double root = point.ionic_strength;
  if (couples(kernel)) {
    finding.solved = find_root(path, std::max(root, 1e-8), root);
    if (finding.solved) {
      // d I(c(I)) / d I by a central difference; both solves start next to their answer.
      constexpr double share = 1e-4;
      SafePath beside = path;
      finding.ionic_strength_slope =
          (beside.excess(root * (1 + share)) - beside.excess(root * (1 - share))) /
              (2 * share * root) +
          1;
    }
  } else {
    const double excess = path.excess(root);
    finding.solved = std::isfinite(excess);
    root += finding.solved ? excess : 0;
  }
  finding.iterations = path.iterations();
  finding.limits_contradict = path.contradicts();
  if (finding.solved) path.write(root, point);
  return finding;
}

bool has_several_solutions(const Kernel& kernel, const Prepared& prepared, const Point& point) {
  SafePath path(kernel, prepared, point);
  double potential = 0;
  for (int i = 0; i < kernel.n_components; ++i) {
    const int unit = kernel.unit_species[i];
    if (unit >= 0) potential += kernel.ionic_weight[unit] * std::abs(prepared.total[i]);
  }
  // From far above what the totals could give down to where every ion is almost free of others.
  const double top = std::log(2 * std::max(potential, point.ionic_strength));
  const double bottom = top - 14;
  int changes = 0;
  bool was_positive = false;
  for (int k = 0; k < grid_points; ++k) {
    const double ln_i = top + (bottom - top) * k / (grid_points - 1);
    const double here = path.excess(std::exp(ln_i));
    if (std::isnan(here)) continue;
    if (k > 0 && (here > 0) != was_positive) ++changes;
    was_positive = here > 0;
  }
  return changes > 1;
}

}  // namespace ionledger::solver
