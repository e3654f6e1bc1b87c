// Evidence that a point solves a case, computed from the point alone. Separate from the iterations,
// whose word is not taken: their residuals, in the caller's components, can be small while an
// amount is wrong by orders of magnitude.
#pragma once

#include "solver/basis.hpp"
#include "solver/kernel.hpp"

namespace ionledger::solver {

/// A certificate is good when no residual exceeds these.
inline constexpr double balance_tolerance = 1e-11;
inline constexpr double coupling_tolerance = 1e-11;
inline constexpr double complementarity_tolerance = 1e-10;

struct CertificateWork {
  std::vector<double> ln_gamma_class;
  std::vector<double> ln_amount, amount;  ///< n_species
  std::vector<int> order;
  Basis basis;
  std::vector<double> alpha, residual, size, total;  ///< n_components
};

void resize(CertificateWork& work, const Kernel& kernel);

/// ln c_j = ln K_j + nu_j x + w_j ln a_w - ln gamma_j, -infinity where absent; and c_j.
void compute_amounts(const Kernel& kernel,
                     const Prepared& prepared,
                     const Point& point,
                     CertificateWork& work);

/// Needs compute_amounts. Leaves slope and several_solutions alone. Components in caller's numbers.
void certify(const Kernel& kernel,
             const Prepared& prepared,
             const Point& point,
             CertificateWork& work,
             Certificate& certificate);

}  // namespace ionledger::solver
