// Systems small enough for a formula: what the solver says must be what the formula says.
#include <doctest/doctest.h>

#include <cmath>
#include <limits>

#include "solver/recheck.hpp"
#include "solver/solver.hpp"
#include "support/compare.hpp"

namespace {

using namespace ionledger::solver;
using ionledger::testing::rel;
using ionledger::testing::within;

/// Components H and A; species H, OH, A and HA. Ideal unless classes are changed.
struct WeakAcid {
  System system;
  Conditions conditions;
  WeakAcid() {
    system.n_components = 2;
    system.n_species = 4;
    system.stoichiometry = {1, 0, -1, 0, 0, 1, 1, 1};
    system.solvent_exponent = {0, 1, 0, 0};
    system.ionic_weight = {0.5, 0.5, 0.5, 0};
    system.solute_weight = {1, 1, 1, 1};
    system.activity_class = {0, 0, 0, 1};
    conditions.ln_k = {0, std::log(1e-14), 0, std::log(1e5)};
    conditions.classes = {{0, 0, 0}, {0, 0, 0}};
  }
  [[nodiscard]] Outcome solve_for(double total_h, double total_a) const {
    Case a_case;
    a_case.totals = {total_h, total_a};
    return solve(system, conditions, a_case);
  }
};

}  // namespace

TEST_SUITE("solver/closed_forms") {
  TEST_CASE("pure water is neutral") {
    const Outcome outcome = WeakAcid().solve_for(0, 0);
    REQUIRE(outcome.status == Status::converged);
    CHECK(outcome.feasibility == Feasibility::boundary);  // no A at all
    CHECK(outcome.x[0] == within(std::log(1e-7), 1e-13));
    CHECK(outcome.x[1] == -std::numeric_limits<double>::infinity());
    CHECK(outcome.ln_amount[3] == -std::numeric_limits<double>::infinity());
    CHECK(outcome.ionic_strength == rel(1e-7, 1e-13));
  }

  TEST_CASE("a strong acid: h^2 - T h - Kw = 0, down to traces") {
    for (const double total : {1.0, 1e-3, 1e-7, 1e-9, -1e-9, -1e-4, -0.5}) {
      const Outcome outcome = WeakAcid().solve_for(total, 0);
      CAPTURE(total);
      REQUIRE(outcome.status == Status::converged);
      const double root = std::sqrt(total * total + 4e-14);
      const double h = total > 0 ? 0.5 * (total + root) : 2e-14 / (root - total);
      CHECK(std::exp(outcome.x[0]) == rel(h, 1e-12));
    }
  }

  TEST_CASE("a half-neutralised buffer: T_H fixes the ratio of acid and base") {
    const double total_h = 0.005;
    const double total_a = 0.01;
    const auto excess = [&](double h) {
      return h + total_a * h * 1e5 / (1 + h * 1e5) - 1e-14 / h - total_h;
    };
    double low = 1e-14;
    double high = 1;
    for (int k = 0; k < 200; ++k) {
      const double middle = std::sqrt(low * high);
      (excess(middle) < 0 ? low : high) = middle;
    }
    const Outcome outcome = WeakAcid().solve_for(total_h, total_a);
    REQUIRE(outcome.status == Status::converged);
    CHECK(std::exp(outcome.x[0]) == rel(std::sqrt(low * high), 1e-12));
    CHECK(std::exp(outcome.x[0]) == rel(1e-5, 5e-3));  // the textbook neglects h beside T_H
  }

  TEST_CASE("infinite dilution: activity coefficients go to 1") {
    WeakAcid acid;
    acid.conditions.classes[0] = {1.17, 1, 0};
    const Outcome outcome = acid.solve_for(0, 1e-12);
    REQUIRE(outcome.status == Status::converged);
    CHECK(outcome.ln_gamma[0] == within(0, 5e-4));  // 1.17 sqrt(1e-7)
    CHECK(outcome.x[0] == within(std::log(1e-7), 2e-5));
  }

  TEST_CASE("solvent activity enters through its exponent and follows the solutes") {
    WeakAcid acid;
    acid.conditions.solvent_slope = 0.02;
    const Outcome outcome = acid.solve_for(-2, 3);
    REQUIRE(outcome.status == Status::converged);
    // H is negligible: OH = 2, A = 3, HA negligible beside them.
    const double a_w = 1 - 0.02 * 5;
    CHECK(std::exp(outcome.ln_solvent_activity) == rel(a_w, 1e-9));
    CHECK(std::exp(outcome.x[0]) == rel(1e-14 * a_w / 2, 1e-8));
    CHECK(outcome.certificate.solvent_residual <= 1e-11);
  }

  TEST_CASE("a phase forms above its limit only, and then the product is the limit") {
    System system;
    system.n_components = 2;
    system.n_species = 2;
    system.n_phases = 1;
    system.stoichiometry = {1, 0, 0, 1};
    system.phase_stoichiometry = {1, 1};
    Conditions conditions;
    conditions.ln_k = {0, 0};
    conditions.ln_k_phase = {std::log(1e6)};
    Case a_case;
    a_case.phase_rules = {PhaseRule::may_form};
    a_case.ln_target = {0};
    a_case.totals = {9e-4, 1e-3};
    const Outcome below = solve(system, conditions, a_case);
    REQUIRE(below.status == Status::converged);
    CHECK(below.phase_amount[0] == 0);
    a_case.totals = {3e-3, 4e-3};
    const Outcome above = solve(system, conditions, a_case);
    REQUIRE(above.status == Status::converged);
    // (3e-3 - n)(4e-3 - n) = 1e-6
    const double n = 0.5 * (7e-3 - std::sqrt(1e-6 + 4e-6));
    CHECK(above.phase_amount[0] == rel(n, 1e-12));
    CHECK(above.x[0] + above.x[1] == within(std::log(1e-6), 1e-12));
    a_case.ln_target = {std::log(4.0)};
    const Outcome reluctant = solve(system, conditions, a_case);
    REQUIRE(reluctant.status == Status::converged);
    CHECK(reluctant.x[0] + reluctant.x[1] == within(std::log(4e-6), 1e-12));
    a_case.phase_rules = {PhaseRule::imposed};
    a_case.totals = {1e-4, 1e-4};
    const Outcome imposed = solve(system, conditions, a_case);
    REQUIRE(imposed.status == Status::converged);
    CHECK(imposed.phase_amount[0] == rel(1e-4 - 2e-3, 1e-12));
    a_case.phase_rules = {PhaseRule::absent};
    const Outcome absent = solve(system, conditions, a_case);
    CHECK(absent.phase_amount[0] == 0);
  }

  TEST_CASE("a fixed activity is met and its total is implied") {
    const WeakAcid acid;
    Case a_case;
    a_case.totals = {std::numeric_limits<double>::quiet_NaN(), 1e-2};
    a_case.fixed_ln_activity = {std::log(1e-6), std::nullopt};
    a_case.totals[0] = 0;  // ignored
    const Outcome outcome = solve(acid.system, acid.conditions, a_case);
    REQUIRE(outcome.status == Status::converged);
    CHECK(outcome.x[0] == within(std::log(1e-6), 1e-14));
    CHECK(std::exp(outcome.ln_amount[3]) == rel(1e-2 / 11, 1e-12));
    CHECK(outcome.implied_total[0] == rel(1e-6 - 1e-8 + 1e-2 / 11, 1e-12));
    CHECK(outcome.implied_total[1] == rel(1e-2, 1e-12));
  }

  TEST_CASE("numbers that are not finite are a status, and nothing looks like an answer") {
    const WeakAcid acid;
    for (const double bad :
         {std::numeric_limits<double>::quiet_NaN(), std::numeric_limits<double>::infinity()}) {
      const Outcome outcome = acid.solve_for(0, bad);
      CHECK(outcome.status == Status::non_finite);
      CHECK_FALSE(outcome.certificate.good);
      CHECK_FALSE(outcome.reason.empty());
      CHECK(std::isnan(outcome.x[0]));
      CHECK(std::isnan(outcome.ln_amount[0]));
      CHECK(std::isnan(outcome.ln_gamma[0]));
      CHECK(std::isnan(outcome.implied_total[0]));
      CHECK(std::isnan(outcome.ionic_strength));
    }
    const Outcome infeasible = acid.solve_for(0, -1e-3);
    CHECK(infeasible.status == Status::infeasible);
    CHECK(std::isnan(infeasible.x[0]));
  }

  TEST_CASE("the recheck of these tests sees a wrong answer") {
    const WeakAcid acid;
    Case a_case;
    a_case.totals = {5e-3, 1e-2};
    Outcome outcome = solve(acid.system, acid.conditions, a_case);
    CHECK(ionledger::testing::recheck(acid.system, acid.conditions, a_case, outcome).balance <=
          1e-12);
    outcome.ln_amount[3] += 1e-6;
    const auto wrong = ionledger::testing::recheck(acid.system, acid.conditions, a_case, outcome);
    CHECK(wrong.balance > 1e-8);
    CHECK(wrong.mass_action > 1e-8);
  }
}
