// The sums of one Newton step, driven by the tables of the kernel.
#include "solver/kernel.hpp"

#include <algorithm>
#include <cmath>

namespace ionledger::solver {

LnGamma ln_gamma(const ActivityClass& c, double ionic_strength) {
  // ln gamma = -A sqrt(I) / (1 + B sqrt(I)) + C I
  const double root = std::sqrt(ionic_strength);
  const double bottom = 1 + c.size * root;
  const double slope = root > 0 ? -0.5 * c.debye / (root * bottom * bottom) + c.linear : c.linear;
  return {-c.debye * root / bottom + c.linear * ionic_strength, slope};
}

void resize(Sums& sums, const Kernel& kernel) {
  const auto n = static_cast<std::size_t>(kernel.n_components);
  sums.activity.assign(n, 1);
  sums.power_value.assign(kernel.powers.size(), 1);
  sums.k_present.assign(kernel.k.size(), 0);
  sums.class_value.assign(kernel.classes.size(), 0);
  sums.class_slope.assign(kernel.classes.size(), 0);
  sums.factor_value.assign(kernel.factors.size(), 1);
  sums.amount.assign(kernel.k.size(), 0);
  for (auto* v : {&sums.sum, &sums.squares}) v->assign(2 * n, 0);
  for (auto* v :
       {&sums.gradient_ionic, &sums.border_ionic, &sums.gradient_solvent, &sums.border_solvent}) {
    v->assign(n, 0);
  }
  sums.hessian.assign(static_cast<std::size_t>(kernel.n_hessian), 0);
}

void evaluate_factors(const Kernel& kernel, const Point& point, Sums& sums) {
  for (std::size_t k = 0; k < kernel.classes.size(); ++k) {
    const LnGamma g = ln_gamma(kernel.classes[k], point.ionic_strength);
    sums.class_value[k] = g.value;
    sums.class_slope[k] = g.slope;
  }
  for (std::size_t f = 0; f < kernel.factors.size(); ++f) {
    const Kernel::Factor& factor = kernel.factors[f];
    sums.factor_value[f] = std::exp(factor.solvent_exponent * point.ln_solvent -
                                    sums.class_value[factor.activity_class]);
  }
}

void evaluate_amounts(const Kernel& kernel, Sums& sums) {
  double* const value = sums.power_value.data();
  for (std::size_t p = 0; p < kernel.powers.size(); ++p) {
    const Kernel::Power& power = kernel.powers[p];
    if (power.previous >= 0) {
      value[p] = value[power.previous] * value[power.step];
    } else {
      const double activity = sums.activity[power.component];
      value[p] = power.exponent == 1    ? activity
                 : power.exponent == -1 ? 1 / activity
                                        : std::pow(activity, power.exponent);
    }
  }
  std::fill(sums.sum.begin(), sums.sum.end(), 0.0);
  std::fill(sums.squares.begin(), sums.squares.end(), 0.0);
  for (int j = 0; j < kernel.n_species; ++j) {
    // c_j = K_j a_w^w_j / gamma_j prod_i X_i^nu_ji
    double c = sums.k_present[j] * sums.factor_value[kernel.factor[j]];
    const int end = kernel.begin[j + 1];
    for (int e = kernel.begin[j]; e < end; ++e) c *= value[kernel.power[e]];
    sums.amount[j] = c;
    for (int e = kernel.begin[j]; e < end; ++e) {
      const double nu = kernel.nu[e];
      const int side = 2 * kernel.row[e] + (nu < 0);
      const double term = std::abs(nu) * c;
      sums.sum[side] += term;
      sums.squares[side] += std::abs(nu) * term;
    }
  }
}

void evaluate_borders(const Kernel& kernel, Sums& sums) {
  const bool with_solvent = kernel.solvent_slope != 0;
  for (auto* v : {&sums.gradient_ionic, &sums.border_ionic}) std::fill(v->begin(), v->end(), 0.0);
  for (auto* v : {&sums.gradient_solvent, &sums.border_solvent}) {
    std::fill(v->begin(), v->end(), 0.0);
  }
  sums.ionic = sums.ionic_by_ionic = sums.ionic_by_solvent = 0;
  sums.solute = sums.solute_by_ionic = sums.solute_by_solvent = 0;
  for (int j = 0; j < kernel.n_species; ++j) {
    // d c_j = c_j (nu_j dx - g'_j dI + w_j d ln a_w)
    const double c = sums.amount[j];
    const double by_ionic = -c * sums.class_slope[kernel.activity_class[j]];
    const double by_solvent = c * kernel.solvent_exponent[j];
    const double ionic = kernel.ionic_weight[j];
    sums.ionic += ionic * c;
    sums.ionic_by_ionic += ionic * by_ionic;
    for (int e = kernel.begin[j]; e < kernel.begin[j + 1]; ++e) {
      sums.gradient_ionic[kernel.row[e]] += kernel.nu[e] * (ionic * c);
      sums.border_ionic[kernel.row[e]] += kernel.nu[e] * by_ionic;
    }
    if (!with_solvent) continue;
    const double solute = kernel.solute_weight[j];
    sums.ionic_by_solvent += ionic * by_solvent;
    sums.solute += solute * c;
    sums.solute_by_ionic += solute * by_ionic;
    sums.solute_by_solvent += solute * by_solvent;
    for (int e = kernel.begin[j]; e < kernel.begin[j + 1]; ++e) {
      sums.gradient_solvent[kernel.row[e]] += kernel.nu[e] * (solute * c);
      sums.border_solvent[kernel.row[e]] += kernel.nu[e] * by_solvent;
    }
  }
}

bool factor_hessian(const Kernel& kernel, const Prepared& prepared, Sums& sums) {
  double* const h = sums.hessian.data();
  const int n = kernel.n_components;
  std::fill(sums.hessian.begin(), sums.hessian.end(), 0.0);
  for (int i = 0; i < n; ++i) h[i] = sums.squares[2 * i] + sums.squares[2 * i + 1];
  for (int j = 0; j < kernel.n_species; ++j) {
    const double c = sums.amount[j];
    for (int p = kernel.product_begin[j]; p < kernel.product_begin[j + 1]; ++p) {
      h[kernel.products[p].target] += kernel.products[p].weight * c;
    }
  }
  for (int i = 0; i < n; ++i) {
    if (prepared.rows[i] == Prepared::Row::balanced) continue;
    h[i] = 1;
    for (int t = kernel.touching_begin[i]; t < kernel.touching_begin[i + 1]; ++t) {
      h[kernel.touching[t]] = 0;
    }
  }
  for (int i = 0; i < n; ++i) {
    if (!(h[i] > 0)) return false;
    const double inverse = 1 / h[i];
    for (int u = kernel.update_begin[i]; u < kernel.update_begin[i + 1]; ++u) {
      const Kernel::Update& update = kernel.updates[u];
      h[update.target] -= h[update.left] * h[update.right] * inverse;
    }
    for (int b = kernel.below_begin[i]; b < kernel.below_begin[i + 1]; ++b) {
      h[kernel.below[b].slot] *= inverse;
    }
    h[i] = inverse;
  }
  return true;
}

void solve_hessian(const Kernel& kernel, const Sums& sums, double* b) {
  const double* const h = sums.hessian.data();
  const int n = kernel.n_components;
  for (int i = 0; i < n; ++i) {
    const double value = b[i];
    for (int e = kernel.below_begin[i]; e < kernel.below_begin[i + 1]; ++e) {
      b[kernel.below[e].row] -= h[kernel.below[e].slot] * value;
    }
  }
  for (int i = n - 1; i >= 0; --i) {
    double value = b[i] * h[i];
    for (int e = kernel.below_begin[i]; e < kernel.below_begin[i + 1]; ++e) {
      value -= h[kernel.below[e].slot] * b[kernel.below[e].row];
    }
    b[i] = value;
  }
}

}  // namespace ionledger::solver
