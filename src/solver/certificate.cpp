// Balances in the basis of the most abundant species, couplings and phases; see certificate.hpp.
#include "solver/certificate.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

namespace ionledger::solver {
namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

void choose_basis(const Kernel& kernel,
                  const Prepared& prepared,
                  const Point& point,
                  CertificateWork& work) {
  // Whatever has a known activity comes first: its row gives an amount, not a condition.
  clear(work.basis);
  for (int i = 0; i < kernel.n_components; ++i) {
    if (prepared.rows[i] != Prepared::Row::fixed) continue;
    try_column(kernel, kernel.n_species + kernel.n_phases + i, work.basis);
  }
  for (const PhaseRule rule : {PhaseRule::imposed, PhaseRule::may_form}) {
    for (int m = 0; m < kernel.n_phases; ++m) {
      const int column = kernel.n_species + m;
      if (prepared.rules[m] != rule || prepared.present[column] == 0) continue;
      if (rule == PhaseRule::may_form && !(point.amount[m] > 0)) continue;
      try_column(kernel, column, work.basis);
    }
  }
  order_by_amount(work.ln_amount, prepared.present, work.order);
  for (const int j : work.order) {
    if (work.basis.rank == kernel.n_components) break;
    try_column(kernel, j, work.basis);
  }
  finish(kernel, work.basis);
}

void add_column(const Kernel& kernel, int column, double amount, CertificateWork& work) {
  expand(kernel, work.basis, column, work.alpha.data());
  for (std::size_t i = 0; i < work.alpha.size(); ++i) {
    const double term = work.alpha[i] * amount;
    work.residual[i] += term;
    work.size[i] += std::abs(term);
  }
}

void check_balances(const Kernel& kernel,
                    const Prepared& prepared,
                    const Point& point,
                    CertificateWork& work,
                    Certificate& certificate) {
  choose_basis(kernel, prepared, point, work);
  transform_totals(prepared, work.basis, work.total);
  std::fill(work.residual.begin(), work.residual.end(), 0.0);
  std::fill(work.size.begin(), work.size.end(), 0.0);
  for (int j = 0; j < kernel.n_species; ++j) {
    if (prepared.present[j] != 0) add_column(kernel, j, work.amount[j], work);
  }
  for (int m = 0; m < kernel.n_phases; ++m) {
    const int column = kernel.n_species + m;
    if (prepared.present[column] != 0) add_column(kernel, column, point.amount[m], work);
  }
  certificate.worst_balance_residual = 0;
  certificate.worst_component = -1;
  for (int i = 0; i < kernel.n_components; ++i) {
    const int column = work.basis.columns[i];
    if (column >= kernel.n_species + kernel.n_phases) continue;  // a fixed activity
    const double size = work.size[i] + std::abs(work.total[i]);
    if (size == 0) continue;
    const double residual = std::abs(work.residual[i] - work.total[i]) / size;
    if (!(residual <= certificate.worst_balance_residual)) {
      certificate.worst_balance_residual = residual;
      certificate.worst_component = kernel.order[i];
    }
  }
}

void check_couplings(const Kernel& kernel,
                     const Prepared& prepared,
                     const Point& point,
                     const CertificateWork& work,
                     Certificate& certificate) {
  double ionic = 0;
  double solute = 0;
  for (int j = 0; j < kernel.n_species; ++j) {
    if (prepared.present[j] == 0) continue;
    ionic += kernel.ionic_weight[j] * work.amount[j];
    solute += kernel.solute_weight[j] * work.amount[j];
  }
  const double scale = std::max(ionic, point.ionic_strength);
  certificate.ionic_strength_residual =
      scale > 0 ? std::abs(ionic - point.ionic_strength) / scale : 0;
  certificate.solvent_residual =
      kernel.solvent_slope == 0
          ? 0
          : std::abs(1 - kernel.solvent_slope * solute - std::exp(point.ln_solvent));
}

double phase_scale(const Kernel& kernel, const Prepared& prepared, int column) {
  double scale = 0;
  for (int e = kernel.begin[column]; e < kernel.begin[column + 1]; ++e) {
    scale = std::max(scale, std::abs(prepared.total[kernel.row[e]] / kernel.nu[e]));
  }
  return scale > 0 ? scale : 1;
}

void check_phases(const Kernel& kernel,
                  const Prepared& prepared,
                  const Point& point,
                  Certificate& certificate) {
  certificate.complementarity = 0;
  for (int m = 0; m < kernel.n_phases; ++m) {
    const int column = kernel.n_species + m;
    if (prepared.present[column] == 0) continue;
    double ln_omega = kernel.ln_k_phase[m] + kernel.phase_solvent_exponent[m] * point.ln_solvent -
                      prepared.ln_target[m];
    for (int e = kernel.begin[column]; e < kernel.begin[column + 1]; ++e) {
      ln_omega += kernel.nu[e] * point.x[kernel.row[e]];
    }
    const double amount = point.amount[m] / phase_scale(kernel, prepared, column);
    const double violation =
        prepared.rules[m] == PhaseRule::imposed
            ? std::abs(ln_omega)
            : std::max({-amount, ln_omega, std::min(1.0, std::abs(ln_omega)) * std::abs(amount)});
    if (!(violation <= certificate.complementarity)) certificate.complementarity = violation;
  }
}

}  // namespace

void resize(CertificateWork& work, const Kernel& kernel) {
  const auto n = static_cast<std::size_t>(kernel.n_components);
  const auto n_species = static_cast<std::size_t>(kernel.n_species);
  work.ln_gamma_class.assign(kernel.classes.size(), 0);
  work.ln_amount.assign(n_species, 0);
  work.amount.assign(n_species, 0);
  work.order.reserve(n_species);
  resize(work.basis, kernel);
  for (auto* v : {&work.alpha, &work.residual, &work.size, &work.total}) v->assign(n, 0);
}

void compute_amounts(const Kernel& kernel,
                     const Prepared& prepared,
                     const Point& point,
                     CertificateWork& work) {
  for (std::size_t k = 0; k < kernel.classes.size(); ++k) {
    work.ln_gamma_class[k] = ln_gamma(kernel.classes[k], point.ionic_strength).value;
  }
  for (int j = 0; j < kernel.n_species; ++j) {
    if (prepared.present[j] == 0) {
      work.ln_amount[j] = -infinity;
      work.amount[j] = 0;
      continue;
    }
    double value = kernel.ln_k[j] + kernel.solvent_exponent[j] * point.ln_solvent -
                   work.ln_gamma_class[kernel.activity_class[j]];
    for (int e = kernel.begin[j]; e < kernel.begin[j + 1]; ++e) {
      value += kernel.nu[e] * point.x[kernel.row[e]];
    }
    work.ln_amount[j] = value;
    work.amount[j] = std::exp(value);
  }
}

void certify(const Kernel& kernel,
             const Prepared& prepared,
             const Point& point,
             CertificateWork& work,
             Certificate& certificate) {
  check_balances(kernel, prepared, point, work, certificate);
  check_couplings(kernel, prepared, point, work, certificate);
  check_phases(kernel, prepared, point, certificate);
  certificate.good = certificate.worst_balance_residual <= balance_tolerance &&
                     certificate.ionic_strength_residual <= coupling_tolerance &&
                     certificate.solvent_residual <= coupling_tolerance &&
                     certificate.complementarity <= complementarity_tolerance;
}

}  // namespace ionledger::solver
