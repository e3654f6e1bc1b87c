// The saddle point system of one Newton step: the Hessian bordered by the phases in equilibrium.
// Separate because with no phase present none of it runs.
#pragma once

#include <vector>

#include "solver/kernel.hpp"

namespace ionledger::solver {

/// Phases taken as present, with H^-1 nu of each and the factor of N H^-1 N^T.
struct PhaseSet {
  std::vector<unsigned char> active;   ///< n_phases
  std::vector<int> members;            ///< Independent ones among the active, imposed first.
  std::vector<double> response;        ///< H^-1 nu_m, n_components per member.
  std::vector<double> schur;           ///< Lower Cholesky factor, row-major, n_phases wide.
  std::vector<double> scale;           ///< An amount typical of each phase.
  std::vector<unsigned char> touched;  ///< Rows that a member takes part in.
};

void resize(PhaseSet& set, const Kernel& kernel);

/// ln Q_m - ln target_m
[[nodiscard]] double ln_saturation(const Kernel& kernel,
                                   const Prepared& prepared,
                                   const Point& point,
                                   int phase);

/// Primal-dual active set: a phase that may form is active when n / scale + ln(Q / target) > 0,
/// the semismooth form of min(n / scale, -ln(Q / target)) = 0. Imposed phases always are.
void choose_active(const Kernel& kernel,
                   const Prepared& prepared,
                   const Point& point,
                   bool imposed_only,
                   PhaseSet& set);

/// Factors N H^-1 N^T; members that depend on earlier ones are dropped.
void factor_phases(const Kernel& kernel, const Prepared& prepared, const Sums& sums, PhaseSet& set);

/// Solves H step + N^T amounts = b, N step = limits. `b` becomes the step, `limits` the amounts,
/// one per member.
void solve_bordered(
    const Kernel& kernel, const Sums& sums, const PhaseSet& set, double* b, double* limits);

}  // namespace ionledger::solver
