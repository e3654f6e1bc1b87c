// A system and its conditions as flat tables, and the sums every Newton step needs. Separate from
// the iterations so that nothing is looked up, searched or allocated while one of them runs.
#pragma once

#include <vector>

#include "solver/solver.hpp"

namespace ionledger::solver {

/// Components are renumbered (`order`) so that the factor of the Hessian stays sparse.
/// Columns are the species, then the phases, then one unit column per component.
struct Kernel {
  int n_components = 0, n_species = 0, n_phases = 0;
  std::vector<int> order;     ///< Component of the caller for every row here.
  std::vector<int> position;  ///< Row here for every component of the caller.

  std::vector<int> begin;  ///< Column j owns the entries begin[j] .. begin[j + 1].
  std::vector<int> row;
  std::vector<double> nu;
  bool is_whole = true;           ///< Every nu is a whole number.
  std::vector<int> unit_species;  ///< Species nu = e_i without solvent, or -1.
  std::vector<int> unit_inverse;  ///< Species nu = -e_i, or -1.

  std::vector<double> ln_k, k;  ///< Species; k = exp(ln_k), possibly infinite or 0.
  std::vector<double> solvent_exponent, ionic_weight, solute_weight;
  std::vector<double> ln_k_phase, phase_solvent_exponent;
  std::vector<ActivityClass> classes;
  std::vector<int> activity_class;
  double solvent_slope = 0;
  bool all_solutes = true;        ///< Every solute weight is 1.
  std::vector<int> with_solvent;  ///< Species with a solvent exponent, few.
  double largest_ionic_weight = 0;

  /// X_i^e for every exponent in use; whole exponents by a chain of products.
  struct Power {
    int component = 0;
    double exponent = 1;
    int previous = -1, step = -1;  ///< value = value[previous] value[step]; -1: from the activity.
  };
  std::vector<Power> powers;
  /// What the sums need of every entry of a species column.
  struct Term {
    double size = 0;  ///< |nu|
    int side = 0;     ///< 2 row, or 2 row + 1 when nu < 0
    int power = 0;    ///< Index of X^nu.
  };
  std::vector<Term> terms;

  /// exp(w ln a_w) / gamma for every pair of activity class and solvent exponent in use.
  struct Factor {
    int activity_class = 0;
    double solvent_exponent = 0;
  };
  std::vector<Factor> factors;
  std::vector<int> factor;  ///< For every species.

  // Hessian sum_j c_j nu_j nu_j^T and its factor L D L^T share one array: the diagonal first.
  int n_hessian = 0;
  struct Product {
    int target = 0;
    double weight = 0;  ///< nu_ja nu_jb
  };
  std::vector<Product> products;  ///< Off-diagonal contributions, species by species.
  std::vector<int> product_begin;
  std::vector<int> below;  ///< Rows of the entries under the diagonal, in the order of the slots.
  std::vector<int> below_begin;
  struct Update {
    int target = 0, left = 0, right = 0;
  };
  std::vector<Update> updates;  ///< h[target] -= h[left] h[right] / h[pivot], in elimination order.
  std::vector<int> update_begin;
  std::vector<int> touching, touching_begin;  ///< Off-diagonal slots in row or column i.
};

[[nodiscard]] Kernel compile(const System& system, const Conditions& conditions);

/// ln gamma of one class and its derivative by the ionic strength.
struct LnGamma {
  double value = 0, slope = 0;
};
[[nodiscard]] LnGamma ln_gamma(const ActivityClass& activity_class, double ionic_strength);

/// One case in the numbering of the kernel, after the feasibility check.
struct Prepared {
  enum class Row : unsigned char { balanced, fixed, absent };
  std::vector<double> total;      ///< n_components
  std::vector<double> total_low;  ///< What rounding took from `total`; the exact total is the sum.
  std::vector<double> ln_fixed;   ///< ln activity of fixed rows.
  std::vector<Row> rows;
  std::vector<unsigned char> present;  ///< Species and phases that can have an amount.
  std::vector<PhaseRule> rules;        ///< n_phases
  std::vector<double> ln_target;       ///< n_phases
  bool has_phases = false;
};

/// Where an iteration stands. Sized once; nothing allocates while solving.
struct Point {
  std::vector<double> x;       ///< ln activities
  std::vector<double> amount;  ///< Phases.
  double ionic_strength = 0;
  double ln_solvent = 0;
};

/// Sums over the species at one point.
struct Sums {
  std::vector<double> activity;                  ///< exp(x), updated by products.
  std::vector<double> power_value;               ///< Kernel::powers
  std::vector<double> k_present;                 ///< k, 0 where the species is absent.
  std::vector<double> class_value, class_slope;  ///< ln gamma and its derivative by I.
  std::vector<double> factor_value;
  std::vector<double> amount;   ///< c_j
  std::vector<double> sum;      ///< 2i: sum of nu c over nu > 0; 2i + 1: of -nu c over nu < 0.
  std::vector<double> squares;  ///< The same of nu^2 c.
  struct Border {
    double gradient_ionic = 0;    ///< u_i = sum omega c nu = d I(c) / d x_i
    double by_ionic = 0;          ///< p_i = d (sum nu c) / d I
    double gradient_solvent = 0;  ///< v_i = sum s c nu
    double by_solvent = 0;        ///< q_i = d (sum nu c) / d ln a_w
  };
  std::vector<Border> borders;  ///< n_components
  double ionic = 0, ionic_by_ionic = 0, ionic_by_solvent = 0;
  double solute = 0, solute_by_ionic = 0, solute_by_solvent = 0;
  std::vector<double> hessian;
};

void resize(Sums& sums, const Kernel& kernel);
/// factor_value and class_slope at the point's ionic strength and solvent activity.
void evaluate_factors(const Kernel& kernel, const Point& point, Sums& sums);
/// amount, sum and squares from `activity`.
void evaluate_amounts(const Kernel& kernel, Sums& sums);
/// Borders and gradients; needs the amounts.
void evaluate_borders(const Kernel& kernel, Sums& sums);
/// Fills and factors the Hessian; false when a pivot is not positive.
[[nodiscard]] bool factor_hessian(const Kernel& kernel, const Prepared& prepared, Sums& sums);
/// Overwrites b with H^-1 b.
void solve_hessian(const Kernel& kernel, const Sums& sums, double* b);

}  // namespace ionledger::solver
