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
  sums.borders.assign(n, {});
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
  double* const sum = sums.sum.data();
  double* const squares = sums.squares.data();
  const Kernel::Term* term = kernel.terms.data();
  const int* const begin = kernel.begin.data();
  for (int j = 0; j < kernel.n_species; ++j) {
    // c_j = K_j a_w^w_j / gamma_j prod_i X_i^nu_ji
    double c = sums.k_present[j] * sums.factor_value[kernel.factor[j]];
    const Kernel::Term* const end = kernel.terms.data() + begin[j + 1];
    for (const Kernel::Term* t = term; t != end; ++t) c *= value[t->power];
    sums.amount[j] = c;
    for (; term != end; ++term) {
      const double part = term->size * c;
      sum[term->side] += part;
      squares[term->side] += term->size * part;
    }
  }
}

namespace {

/// What the solvent activity adds to the borders.
void evaluate_solvent_borders(const Kernel& kernel, Sums& sums) {
  for (int j = 0; j < kernel.n_species; ++j) {
    const double c = kernel.solute_weight[j] * sums.amount[j];
    sums.solute += c;
    sums.solute_by_ionic -= c * sums.class_slope[kernel.activity_class[j]];
    if (kernel.all_solutes) continue;
    for (int e = kernel.begin[j]; e < kernel.begin[j + 1]; ++e) {
      sums.borders[kernel.row[e]].gradient_solvent += kernel.nu[e] * c;
    }
  }
  if (kernel.all_solutes) {
    for (int i = 0; i < kernel.n_components; ++i) {
      sums.borders[i].gradient_solvent = sums.sum[2 * i] - sums.sum[2 * i + 1];
    }
  }
  for (const int j : kernel.with_solvent) {
    const double by_solvent = kernel.solvent_exponent[j] * sums.amount[j];
    sums.ionic_by_solvent += kernel.ionic_weight[j] * by_solvent;
    sums.solute_by_solvent += kernel.solute_weight[j] * by_solvent;
    for (int e = kernel.begin[j]; e < kernel.begin[j + 1]; ++e) {
      sums.borders[kernel.row[e]].by_solvent += kernel.nu[e] * by_solvent;
    }
  }
}

}  // namespace

void evaluate_borders(const Kernel& kernel, Sums& sums) {
  // d c_j = c_j (nu_j dx - g'_j dI + w_j d ln a_w)
  std::fill(sums.borders.begin(), sums.borders.end(), Sums::Border{});
  sums.ionic = sums.ionic_by_ionic = sums.ionic_by_solvent = 0;
  sums.solute = sums.solute_by_ionic = sums.solute_by_solvent = 0;
  Sums::Border* const borders = sums.borders.data();
  const double* const nu = kernel.nu.data();
  const int* const row = kernel.row.data();
  int e = 0;
  for (int j = 0; j < kernel.n_species; ++j) {
    const double c = sums.amount[j];
    const double ionic = kernel.ionic_weight[j] * c;
    const double by_ionic = -c * sums.class_slope[kernel.activity_class[j]];
    sums.ionic += ionic;
    sums.ionic_by_ionic += kernel.ionic_weight[j] * by_ionic;
    const int end = kernel.begin[j + 1];
    for (; e < end; ++e) {
      borders[row[e]].gradient_ionic += nu[e] * ionic;
      borders[row[e]].by_ionic += nu[e] * by_ionic;
    }
  }
  if (kernel.solvent_slope != 0) evaluate_solvent_borders(kernel, sums);
}

bool factor_hessian(const Kernel& kernel, const Prepared& prepared, Sums& sums) {
  double* const h = sums.hessian.data();
  const int n = kernel.n_components;
  std::fill(sums.hessian.begin(), sums.hessian.end(), 0.0);
  for (int i = 0; i < n; ++i) h[i] = sums.squares[2 * i] + sums.squares[2 * i + 1];
  const Kernel::Product* product = kernel.products.data();
  for (int j = 0; j < kernel.n_species; ++j) {
    const double c = sums.amount[j];
    const Kernel::Product* const end = kernel.products.data() + kernel.product_begin[j + 1];
    for (; product != end; ++product) h[product->target] += product->weight * c;
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
    const Kernel::Update* const last = kernel.updates.data() + kernel.update_begin[i + 1];
    for (const Kernel::Update* u = kernel.updates.data() + kernel.update_begin[i]; u != last; ++u) {
      h[u->target] -= h[u->left] * h[u->right] * inverse;
    }
    for (int b = kernel.below_begin[i]; b < kernel.below_begin[i + 1]; ++b) h[n + b] *= inverse;
    h[i] = inverse;
  }
  return true;
}

void solve_hessian(const Kernel& kernel, const Sums& sums, double* b) {
  // The slots below the diagonal follow each other column by column.
  const double* const h = sums.hessian.data();
  const int n = kernel.n_components;
  const double* const lower = h + n;
  const int* const row = kernel.below.data();
  const int* const begin = kernel.below_begin.data();
  for (int i = 0; i < n; ++i) {
    const double value = b[i];
    for (int e = begin[i]; e < begin[i + 1]; ++e) b[row[e]] -= lower[e] * value;
  }
  for (int i = n - 1; i >= 0; --i) {
    double value = b[i] * h[i];
    for (int e = begin[i]; e < begin[i + 1]; ++e) value -= lower[e] * b[row[e]];
    b[i] = value;
  }
}

}  // namespace ionledger::solver
