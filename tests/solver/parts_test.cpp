// The solver's parts on their own: sums against differences, basis, exact numbers, the cone.
#include <doctest/doctest.h>

#include <cmath>

#include "solver/basis.hpp"
#include "solver/compact_system.hpp"
#include "solver/cone.hpp"
#include "solver/feasibility.hpp"
#include "solver/kernel.hpp"
#include "solver/prepare.hpp"
#include "solver/two_sum.hpp"
#include "support/compare.hpp"

namespace {

using namespace ionledger::solver;
using namespace ionledger::testing;

constexpr unsigned long long seed = 4242;

struct State {
  Kernel kernel;
  Prepared prepared;
  Point point;
  Sums sums;
};

void evaluate(State& state) {
  for (std::size_t i = 0; i < state.point.x.size(); ++i) {
    state.sums.activity[i] = std::exp(state.point.x[i]);
  }
  evaluate_factors(state.kernel, state.point, state.sums);
  evaluate_amounts(state.kernel, state.sums);
  evaluate_borders(state.kernel, state.sums);
}

State random_state(std::mt19937_64& random) {
  const CompactSystem compact = compact_system(0.017);
  State state;
  state.kernel = compile(compact.system, compact.conditions);
  Case a_case;
  a_case.totals = random_totals(random, 1);
  REQUIRE(prepare(state.kernel, a_case, state.prepared));
  set_start(state.kernel, state.prepared, {}, state.point);
  for (double& x : state.point.x) x += 1e-3 * static_cast<double>(random() % 1000);
  state.point.ln_solvent = -0.02;
  resize(state.sums, state.kernel);
  state.sums.k_present = state.kernel.k;
  evaluate(state);
  return state;
}

double balance(const State& state, int i) {
  return state.sums.sum[2 * i] - state.sums.sum[2 * i + 1];
}

}  // namespace

TEST_SUITE("solver/parts") {
  TEST_CASE("borders and Hessian are the derivatives of the sums") {
    std::mt19937_64 random(seed);
    for (int k = 0; k < 5; ++k) {
      State state = random_state(random);
      const State base = state;
      const int n = state.kernel.n_components;
      constexpr double h = 1e-5;
      const auto difference = [&](double& variable, auto read) {
        const double kept = variable;
        variable = kept + h;
        evaluate(state);
        const std::vector<double> up = read();
        variable = kept - h;
        evaluate(state);
        std::vector<double> result = read();
        variable = kept;
        evaluate(state);
        for (std::size_t i = 0; i < result.size(); ++i) result[i] = (up[i] - result[i]) / (2 * h);
        return result;
      };
      const auto read = [&] {
        std::vector<double> result;
        for (int i = 0; i < n; ++i) result.push_back(balance(state, i));
        result.push_back(state.sums.ionic);
        result.push_back(state.sums.solute);
        return result;
      };
      const auto size = [&](int i) {
        return base.sums.squares[2 * i] + base.sums.squares[2 * i + 1];
      };
      const std::vector<double> by_ionic = difference(state.point.ionic_strength, read);
      const std::vector<double> by_solvent = difference(state.point.ln_solvent, read);
      for (int i = 0; i < n; ++i) {
        // Central differences: h^2 of the third derivative, and rounding over h.
        CHECK(by_ionic[i] == within(base.sums.borders[i].by_ionic, 1e-6 * size(i)));
        CHECK(by_solvent[i] == within(base.sums.borders[i].by_solvent, 1e-8 * size(i)));
      }
      CHECK(by_ionic[n] == within(base.sums.ionic_by_ionic, 1e-6 * base.sums.ionic));
      CHECK(by_solvent[n] == within(base.sums.ionic_by_solvent, 1e-8 * base.sums.ionic));
      CHECK(by_ionic[n + 1] == within(base.sums.solute_by_ionic, 1e-6 * base.sums.solute));
      CHECK(by_solvent[n + 1] == within(base.sums.solute_by_solvent, 1e-8 * base.sums.solute));
      for (int a = 0; a < n; ++a) {
        const std::vector<double> column = difference(state.point.x[a], read);
        CHECK(column[n] == within(base.sums.borders[a].gradient_ionic, 1e-7 * base.sums.ionic));
        CHECK(column[n + 1] ==
              within(base.sums.borders[a].gradient_solvent, 1e-7 * base.sums.solute));
        // H e_a, read off by solving H y = H e_a, which must give e_a back.
        REQUIRE(factor_hessian(state.kernel, state.prepared, state.sums));
        std::vector<double> y(column.begin(), column.begin() + n);
        solve_hessian(state.kernel, state.sums, y.data());
        for (int i = 0; i < n; ++i) CHECK(y[i] == within(i == a ? 1 : 0, 1e-4));
      }
    }
  }

  TEST_CASE("a basis of the most abundant columns expands every other with small numbers") {
    std::mt19937_64 random(seed);
    for (int k = 0; k < 20; ++k) {
      const State state = random_state(random);
      const int n = state.kernel.n_components;
      std::vector<double> ln_amount;
      for (const double c : state.sums.amount) ln_amount.push_back(std::log(c));
      std::vector<int> order;
      order_by_amount(ln_amount, state.prepared.present, order);
      Basis basis;
      resize(basis, state.kernel);
      clear(basis);
      for (const int j : order) try_column(state.kernel, j, basis);
      finish(state.kernel, basis);
      REQUIRE(basis.rank == n);
      std::vector<double> alpha(static_cast<std::size_t>(n));
      for (int j = 0; j < state.kernel.n_species; ++j) {
        expand(state.kernel, basis, j, alpha.data());
        std::vector<double> rebuilt(static_cast<std::size_t>(n), 0);
        for (int i = 0; i < n; ++i) {
          // The exchange property: a column appears only in rows of more abundant ones.
          if (alpha[i] != 0) CHECK(ln_amount[j] <= ln_amount[basis.columns[i]]);
          const int column = basis.columns[i];
          for (int e = state.kernel.begin[column]; e < state.kernel.begin[column + 1]; ++e) {
            rebuilt[state.kernel.row[e]] += alpha[i] * state.kernel.nu[e];
          }
        }
        for (int e = state.kernel.begin[j]; e < state.kernel.begin[j + 1]; ++e) {
          rebuilt[state.kernel.row[e]] -= state.kernel.nu[e];
        }
        for (const double rest : rebuilt) CHECK(rest == within(0, 1e-14));
      }
    }
  }

  TEST_CASE("a basis with a determinant beyond 1 still gives exact zeros") {
    System system;
    system.n_components = 2;
    system.n_species = 3;
    system.stoichiometry = {3, 1, 0, 7, 3, 8};  // the third is the first plus the second
    Conditions conditions;
    conditions.ln_k = {0, 0, 0};
    const Kernel kernel = compile(system, conditions);
    Basis basis;
    resize(basis, kernel);
    clear(basis);
    REQUIRE(try_column(kernel, 0, basis));
    REQUIRE(try_column(kernel, 1, basis));
    CHECK_FALSE(try_column(kernel, 2, basis));
    finish(kernel, basis);
    CHECK(basis.denominator == 21);
    std::vector<double> alpha(2);
    for (int j = 0; j < 3; ++j) {
      expand(kernel, basis, j, alpha.data());
      for (std::size_t i = 0; i < 2; ++i) {
        CHECK(alpha[i] == (j == 2 || basis.columns[i] == j ? 1 : 0));
      }
    }
  }

  TEST_CASE("a two-term sum keeps what a double would lose") {
    TwoSum sum;
    sum.add(1e-3);
    sum.add(1e-30);
    sum.add(-1e-3);
    CHECK(sum.value() == rel(1e-30, 1e-15));
    TwoSum product;
    product.add_product(3, 0.1);
    product.add(-0.3);
    // 3 fl(0.1) - fl(0.3), exactly: fl(0.1) = 0.1 + 5.551115123125783e-18 and
    // fl(0.3) = 0.3 - 1.1102230246251565e-17.
    CHECK(product.value() == rel(2.7755575615628914e-17, 1e-15));
  }

  TEST_CASE("decimals and doubles become the rational numbers they are") {
    CHECK(exact_decimal("16e-3") == Rational(16, 1000));
    CHECK(exact_decimal("-1.000000000001E-3") == Rational("-1000000000001/1000000000000000"));
    CHECK(exact_decimal("+2") == Rational(2));
    for (const char* bad : {"", "-", "1.2.3", "1e", "e3", "0x1", "1e99999", "nan", "1 "}) {
      CAPTURE(bad);
      CHECK_FALSE(exact_decimal(bad));
    }
    CHECK(exact(0.5) == Rational(1, 2));
    CHECK(exact(0.1) != Rational(1, 10));
    CHECK(exact(-3) == Rational(-3));
    CHECK(exact(0) == Rational(0));
    CHECK(exact(5e-324) *
              Rational(boost::multiprecision::pow(boost::multiprecision::cpp_int(2), 1074)) ==
          Rational(1));
  }

  TEST_CASE("the cone knows inside, edge and outside, and proves the last two") {
    const std::vector<ConeColumn> quadrant = {{{{0, Rational(1)}}}, {{{1, Rational(1)}}}};
    using Place = ConeFinding::Place;
    CHECK(locate(quadrant, {Rational(1), Rational(2)}).place == Place::inside);
    const ConeFinding edge = locate(quadrant, {Rational(1), Rational(0)});
    CHECK(edge.place == Place::edge);
    CHECK(edge.y[0] == 0);
    CHECK(edge.y[1] > 0);
    const ConeFinding outside = locate(quadrant, {Rational(1), Rational(-1, 1000000)});
    CHECK(outside.place == Place::outside);
    CHECK(outside.y[1] > 0);
    // One column only: the totals must be a multiple of it.
    const std::vector<ConeColumn> ray = {{{{0, Rational(1)}, {1, Rational(2)}}}};
    CHECK(locate(ray, {Rational(1), Rational(2)}).place == Place::inside);
    const ConeFinding beside = locate(ray, {Rational(1), Rational(1)});
    CHECK(beside.place == Place::outside);
    CHECK(beside.y[0] + 2 * beside.y[1] == 0);
    CHECK(beside.y[0] + beside.y[1] < 0);
    // A column of either sign makes a line.
    const std::vector<ConeColumn> line = {{{{0, Rational(1)}}, true}, {{{1, Rational(1)}}}};
    CHECK(locate(line, {Rational(-5), Rational(1)}).place == Place::inside);
    CHECK(locate(line, {Rational(-5), Rational(-1)}).place == Place::outside);
  }

  TEST_CASE("signs settle the ordinary cases and agree with the exact answer") {
    const CompactSystem compact = compact_system();
    const Kernel kernel = compile(compact.system, compact.conditions);
    std::mt19937_64 random(seed);
    for (int k = 0; k < 30; ++k) {
      Case a_case;
      a_case.totals = random_totals(random, k % 2);
      for (std::size_t i = 1; i < a_case.totals.size(); ++i) {
        if (random() % 4 == 0) a_case.totals[i] = 0;
      }
      close_charge(a_case.totals);
      if (k % 3 == 2) {
        a_case.phase_rules.assign(static_cast<std::size_t>(compact.system.n_phases),
                                  PhaseRule::may_form);
        a_case.phase_rules[compact_gas] = PhaseRule::imposed;
      }
      Prepared by_signs;
      REQUIRE(prepare(kernel, a_case, by_signs));
      Prepared exactly = by_signs;
      Feasibility kind{};
      REQUIRE(settle_by_signs(kernel, by_signs, kind));
      CHECK(settle_exactly(kernel, a_case, exactly).kind == kind);
      CHECK(by_signs.present == exactly.present);
    }
  }
}
