// One case from start to certified outcome: feasibility, fast path, safe path, certificate.
#include <cmath>
#include <limits>

#include "solver/certificate.hpp"
#include "solver/compiled.hpp"
#include "solver/fast_path.hpp"
#include "solver/feasibility.hpp"
#include "solver/prepare.hpp"
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
constexpr double large_ionic_weight = 8;  ///< Charge 4: convexity over all I is no longer certain.
constexpr double large_share = 0.1;       ///< Of the ionic strength.

/// The retries: smaller steps, more and gentler sweeps.
constexpr FastSettings fast_chain[] = {{3, 0.6, 4, 60}, {6, 0.5, 1.5, 100}, {6, 0.5, 0.4, 200}};

bool try_fast(const Kernel& kernel, const Start& start, WorkspaceParts& parts, Outcome& outcome) {
  for (int m = 0; m < kernel.n_phases; ++m) {
    parts.fast.phases.scale[m] = phase_scale(kernel, parts.prepared, m);
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
  if (!prepare(kernel, a_case, parts.prepared) ||
      !read_decimal_totals(kernel, a_case, parts.prepared)) {
    outcome.status = Status::non_finite;
    outcome.reason = "a total, a fixed activity or a limit is not a finite number";
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
