// One case from start to certified outcome: feasibility, fast path, safe path, certificate.
#include <cmath>
#include <limits>

#include "solver/certificate.hpp"
#include "solver/compiled.hpp"
#include "solver/fast_path.hpp"
#include "solver/feasibility.hpp"
#include "solver/safe_path.hpp"

namespace ionledger::solver {

struct WorkspaceParts {
  Prepared prepared;
  Point point;
  FastWork fast;
  CertificateWork certificate;
};

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();
constexpr double not_a_number = std::numeric_limits<double>::quiet_NaN();
constexpr double default_ln_activity = -12;  ///< Where nothing better is known.
constexpr double largest_start_ionic_strength = 100;
constexpr double large_ionic_weight = 8;  ///< Charge 4: convexity over all I is no longer certain.
constexpr double large_share = 0.1;       ///< Of the ionic strength.

/// The retries: smaller steps, more and gentler sweeps.
constexpr FastSettings fast_chain[] = {{3, 0.6, 4, 60}, {6, 0.5, 1.5, 100}, {6, 0.5, 0.4, 200}};

void prepare(const Kernel& kernel, const Case& a_case, Prepared& prepared) {
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
}

bool all_finite(const Prepared& prepared) {
  for (std::size_t i = 0; i < prepared.total.size(); ++i) {
    if (!std::isfinite(prepared.total[i])) return false;
    if (prepared.rows[i] == Prepared::Row::fixed && !std::isfinite(prepared.ln_fixed[i])) {
      return false;
    }
  }
  return true;
}

/// ln total where that is an amount of the component; for a component with a species and its
/// inverse, the point where the two are equal.
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
  if (point.ionic_strength == 0 && kernel.largest_ionic_weight > 0) point.ionic_strength = 1e-6;
  point.ln_solvent = 0;
}

void impose(const Kernel& kernel, const Prepared& prepared, Point& point) {
  for (int i = 0; i < kernel.n_components; ++i) {
    if (prepared.rows[i] == Prepared::Row::fixed) point.x[i] = prepared.ln_fixed[i];
    if (prepared.rows[i] == Prepared::Row::absent) point.x[i] = 0;
  }
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
  if (start.ionic_strength > 0 && kernel.largest_ionic_weight > 0) {
    point.ionic_strength = start.ionic_strength;
  }
  impose(kernel, prepared, point);
  return given;
}

/// The smallest total that a phase needs: what one of it could use up.
double phase_scale(const Kernel& kernel, const Prepared& prepared, int column) {
  double smallest = infinity;
  for (int e = kernel.begin[column]; e < kernel.begin[column + 1]; ++e) {
    const int i = kernel.row[e];
    if (prepared.total[i] > 0 && kernel.nu[e] > 0 && kernel.unit_inverse[i] < 0) {
      smallest = std::min(smallest, prepared.total[i] / kernel.nu[e]);
    }
  }
  return std::isfinite(smallest) ? smallest : 1e-3;
}

bool try_fast(const Kernel& kernel, const Start& start, WorkspaceParts& parts, Outcome& outcome) {
  for (int m = 0; m < kernel.n_phases; ++m) {
    parts.fast.phases.scale[m] = phase_scale(kernel, parts.prepared, kernel.n_species + m);
  }
  const bool warm = set_start(kernel, parts.prepared, start, parts.point);
  for (FastSettings settings : fast_chain) {
    if (warm && outcome.iterations == 0) settings.sweeps = 0;
    parts.fast.iterations = 0;
    const bool solved = run_fast_path(kernel, parts.prepared, settings, parts.point, parts.fast);
    outcome.iterations += parts.fast.iterations;
    if (solved) return true;
    set_start(kernel, parts.prepared, Start{}, parts.point);
  }
  return false;
}

/// Whether the present columns fix the activity of component i: e_i is a combination of them.
bool is_determined(const Kernel& kernel, WorkspaceParts& parts, int i) {
  if (parts.prepared.rows[i] == Prepared::Row::absent) return false;
  const Basis& basis = parts.certificate.basis;
  if (basis.rank == kernel.n_components) return true;
  std::vector<double>& alpha = parts.certificate.alpha;
  expand(kernel, basis, kernel.n_species + kernel.n_phases + i, alpha.data());
  for (std::size_t r = 0; r < alpha.size(); ++r) {
    if (basis.columns[r] < 0 && std::abs(alpha[r]) > 1e-9) return false;
  }
  return true;
}

void write_outcome(const Kernel& kernel, WorkspaceParts& parts, Outcome& outcome) {
  const auto n = static_cast<std::size_t>(kernel.n_components);
  const auto n_species = static_cast<std::size_t>(kernel.n_species);
  outcome.x.resize(n);
  outcome.implied_total.assign(n, 0);
  outcome.ln_gamma.resize(n_species);
  outcome.ln_amount = parts.certificate.ln_amount;
  outcome.phase_amount = parts.point.amount;
  for (int i = 0; i < kernel.n_components; ++i) {
    outcome.x[kernel.order[i]] = is_determined(kernel, parts, i) ? parts.point.x[i] : -infinity;
  }
  for (int j = 0; j < kernel.n_species + kernel.n_phases; ++j) {
    const double amount = j < kernel.n_species ? parts.certificate.amount[j]
                                               : parts.point.amount[j - kernel.n_species];
    for (int e = kernel.begin[j]; e < kernel.begin[j + 1]; ++e) {
      outcome.implied_total[kernel.order[kernel.row[e]]] += kernel.nu[e] * amount;
    }
  }
  for (int j = 0; j < kernel.n_species; ++j) {
    outcome.ln_gamma[j] = parts.certificate.ln_gamma_class[kernel.activity_class[j]];
  }
  outcome.ionic_strength = parts.point.ionic_strength;
  outcome.ln_solvent_activity = parts.point.ln_solvent;
}

void clear(const Kernel& kernel, Outcome& outcome) {
  const auto n = static_cast<std::size_t>(kernel.n_components);
  const auto n_species = static_cast<std::size_t>(kernel.n_species);
  outcome.status = Status::not_run;
  outcome.feasibility = Feasibility::interior;
  outcome.reason.clear();
  outcome.conflict.clear();
  outcome.conflict_weight.clear();
  outcome.x.assign(n, not_a_number);
  outcome.implied_total.assign(n, not_a_number);
  outcome.ln_amount.assign(n_species, not_a_number);
  outcome.ln_gamma.assign(n_species, not_a_number);
  outcome.phase_amount.assign(static_cast<std::size_t>(kernel.n_phases), not_a_number);
  outcome.ionic_strength = not_a_number;
  outcome.ln_solvent_activity = not_a_number;
  outcome.iterations = 0;
  outcome.used_safe_path = false;
  outcome.certificate = {};
}

/// Sets Prepared's rows and columns that are absent; false when nothing can be solved. What is
/// left may not determine every activity when `regular` becomes false.
bool settle_feasibility(
    const Kernel& kernel, const Case& a_case, Prepared& prepared, Outcome& outcome, bool& regular) {
  regular = true;
  if (settle_by_signs(kernel, prepared, outcome.feasibility)) return true;
  FeasibilityFinding finding = settle_exactly(kernel, a_case, prepared);
  if (finding.kind != Feasibility::interior) outcome.feasibility = finding.kind;
  regular = finding.kind == Feasibility::interior;
  if (finding.kind != Feasibility::infeasible) return true;
  outcome.conflict = std::move(finding.conflict);
  outcome.conflict_weight = std::move(finding.conflict_weight);
  outcome.status = Status::infeasible;
  outcome.reason = "no positive amounts add up to the totals";
  return false;
}

void certify_point(const Kernel& kernel, WorkspaceParts& parts, Outcome& outcome) {
  compute_amounts(kernel, parts.prepared, parts.point, parts.certificate);
  certify(kernel, parts.prepared, parts.point, parts.certificate, outcome.certificate);
}

/// Solves at the safe path from wherever the point is, or from the start when it is nowhere.
void run_safe(const Kernel& kernel, WorkspaceParts& parts, Outcome& outcome) {
  outcome.used_safe_path = true;
  const SafeFinding finding = run_safe_path(kernel, parts.prepared, parts.point);
  outcome.iterations += finding.iterations;
  outcome.certificate.ionic_strength_slope = finding.ionic_strength_slope;
  if (finding.solved) {
    certify_point(kernel, parts, outcome);
    return;
  }
  if (finding.limits_contradict) {
    outcome.feasibility = Feasibility::infeasible;
    outcome.status = Status::infeasible;
    outcome.reason = "imposed phases or fixed activities contradict each other";
    return;
  }
  outcome.status = Status::iteration_limit;
  outcome.reason = "no iteration reached a solution";
}

/// Whether species of charge 4 and more carry enough of the ionic strength to allow several roots.
bool large_charges_matter(const Kernel& kernel, const WorkspaceParts& parts) {
  if (kernel.largest_ionic_weight < large_ionic_weight) return false;
  double large = 0;
  for (int j = 0; j < kernel.n_species; ++j) {
    if (kernel.ionic_weight[j] < large_ionic_weight) continue;
    large += kernel.ionic_weight[j] * parts.certificate.amount[j];
  }
  for (int i = 0; i < kernel.n_components; ++i) {
    const int unit = kernel.unit_species[i];
    if (unit < 0 || kernel.ionic_weight[unit] < large_ionic_weight) continue;
    large += kernel.ionic_weight[unit] * std::max(parts.prepared.total[i], 0.0);
  }
  return large > large_share * parts.point.ionic_strength;
}

void run(const Kernel& kernel,
         const Case& a_case,
         const Start& start,
         WorkspaceParts& parts,
         Outcome& outcome) {
  clear(kernel, outcome);
  prepare(kernel, a_case, parts.prepared);
  if (!all_finite(parts.prepared) || !read_decimal_totals(kernel, a_case, parts.prepared)) {
    outcome.status = Status::non_finite;
    outcome.reason = "a total or a fixed activity is not a finite number";
    return;
  }
  bool regular = true;
  if (!settle_feasibility(kernel, a_case, parts.prepared, outcome, regular)) return;
  if (!regular) {
    set_start(kernel, parts.prepared, start, parts.point);
  } else if (try_fast(kernel, start, parts, outcome)) {
    certify_point(kernel, parts, outcome);
    outcome.certificate.ionic_strength_slope = parts.fast.ionic_strength_slope;
  }
  if (!outcome.certificate.good) run_safe(kernel, parts, outcome);
  if (outcome.status != Status::not_run) return;
  if (large_charges_matter(kernel, parts)) {
    outcome.certificate.several_solutions =
        has_several_solutions(kernel, parts.prepared, parts.point);
  }
  write_outcome(kernel, parts, outcome);
  outcome.status = outcome.certificate.good ? Status::converged : Status::stalled;
  if (!outcome.certificate.good) outcome.reason = "the iteration ended short of a solution";
}

}  // namespace

CompiledSystem::Workspace::Workspace(const CompiledSystem& system)
    : parts_(std::make_unique<WorkspaceParts>()) {
  resize(parts_->fast, *system.kernel_);
  resize(parts_->certificate, *system.kernel_);
}
CompiledSystem::Workspace::~Workspace() = default;
CompiledSystem::Workspace::Workspace(Workspace&&) noexcept = default;
CompiledSystem::Workspace& CompiledSystem::Workspace::operator=(Workspace&&) noexcept = default;

CompiledSystem::CompiledSystem(const System& system, const Conditions& conditions)
    : kernel_(std::make_unique<const Kernel>(compile(system, conditions))) {}
CompiledSystem::~CompiledSystem() = default;
CompiledSystem::CompiledSystem(CompiledSystem&&) noexcept = default;
CompiledSystem& CompiledSystem::operator=(CompiledSystem&&) noexcept = default;

void CompiledSystem::solve(const Case& a_case,
                           const Start& start,
                           Workspace& workspace,
                           Outcome& outcome) const {
  run(*kernel_, a_case, start, *workspace.parts_, outcome);
}

Outcome solve(const System& system,
              const Conditions& conditions,
              const Case& a_case,
              const Start& start) {
  const CompiledSystem compiled(system, conditions);
  CompiledSystem::Workspace workspace(compiled);
  Outcome outcome;
  compiled.solve(a_case, start, workspace, outcome);
  return outcome;
}

}  // namespace ionledger::solver
