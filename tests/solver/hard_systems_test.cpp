// Every system of hard_systems.json against its 120-digit answer, from the default start and from
// random ones, through the whole solver and through the safe path alone.
#include <doctest/doctest.h>

#include <cmath>
#include <fstream>
#include <limits>
#include <numbers>
#include <random>

#include "reference/hard_system.hpp"
#include "solver/feasibility.hpp"
#include "solver/prepare.hpp"
#include "solver/safe_path.hpp"
#include "support/compare.hpp"

namespace {

using namespace ionledger;
using reference::HardSystem;
using testing::within;

const nlohmann::json& file() {
  static const nlohmann::json result = [] {
    std::ifstream in(IONLEDGER_SOURCE_DIR "/tests/reference/hard_systems.json");
    return nlohmann::json::parse(in);
  }();
  return result;
}

HardSystem read(const std::string& id) {
  std::string problem;
  auto hard = reference::read_hard_system(file(), id, problem);
  REQUIRE_MESSAGE(hard, problem);
  return *hard;
}

/// Systems with a solution, that is all of the first two groups but the one with several.
std::vector<std::string> solvable() {
  std::vector<std::string> result;
  const auto ids = reference::identifiers(file());
  for (const char* group : {"ideal", "activity_coupled_davies"}) {
    for (const std::string& id : ids.at(group)) {
      if (id != "D9_bistable_4_4_Davies") result.push_back(id);
    }
  }
  return result;
}

double number(const nlohmann::json& value) {
  return value.is_string() ? std::stod(value.get<std::string>()) : value.get<double>();
}

/// Largest error of a log10 activity, infinite when an absence is wrong.
double activity_error(const HardSystem& hard, const std::vector<double>& x) {
  const bool coupled = hard.expected.contains("log10_activity_components");
  const auto& expected = hard.expected[coupled ? "log10_activity_components" : "log10_free"];
  double worst = 0;
  for (std::size_t i = 0; i < hard.components.size(); ++i) {
    const auto& value = expected[hard.components[i]];
    double error = std::numeric_limits<double>::infinity();
    if (value.is_null()) {
      if (std::isinf(x[i]) && x[i] < 0) error = 0;
    } else {
      error = std::abs(x[i] / std::numbers::ln10 - number(value));
    }
    if (!(error <= worst)) worst = error;
  }
  return worst;
}

double phase_error(const HardSystem& hard, const std::vector<double>& amounts) {
  double worst = 0;
  if (hard.id == "C7_degenerate_invariant_two_phase_one_component") {
    // Two phases of one composition and constant: only the sum of their amounts is determined.
    const auto& expected = hard.expected["phase_amounts"];
    return std::abs(amounts[0] + amounts[1] - number(expected["P1"]) - number(expected["P2"]));
  }
  for (std::size_t m = 0; m < hard.phases.size(); ++m) {
    const bool imposed = hard.the_case.phase_rules[m] == solver::PhaseRule::imposed;
    const auto& expected = hard.expected[imposed ? "fixed_phase_transfer" : "phase_amounts"];
    const double error = std::abs(amounts[m] - number(expected[hard.phases[m]]));
    if (!(error <= worst)) worst = error;
  }
  return worst;
}

constexpr double tolerance = 1e-10;  // log10 of activities, and mol of phases

void check_solution(const HardSystem& hard, const solver::Outcome& outcome) {
  CAPTURE(hard.id);
  CAPTURE(outcome.reason);
  REQUIRE(outcome.status == solver::Status::converged);
  CHECK(outcome.certificate.good);
  CHECK(activity_error(hard, outcome.x) <= tolerance);
  CHECK(phase_error(hard, outcome.phase_amount) <= tolerance);
}

/// ln X uniform over 20 decades below 1; seeded by the name, so that tests do not hang together.
solver::Start random_start(const HardSystem& hard, std::mt19937_64& random) {
  const auto uniform = [&] { return static_cast<double>(random() >> 11) * 0x1p-53; };
  solver::Start start;
  for (std::size_t i = 0; i < hard.components.size(); ++i) {
    start.x.push_back(-20 * std::numbers::ln10 * uniform());
  }
  start.ionic_strength = std::pow(10, -6 + 6 * uniform());
  return start;
}

constexpr unsigned long long seed = 20240611;

}  // namespace

TEST_SUITE("solver/hard_systems") {
  TEST_CASE("every system is solved from the default start") {
    for (const std::string& id : solvable()) {
      const HardSystem hard = read(id);
      check_solution(hard, reference::solve_hard_system(hard));
    }
  }

  TEST_CASE("ionic strengths agree with the references") {
    for (const std::string& id : solvable()) {
      if (id[0] != 'D') continue;  // coupled with activity coefficients
      const HardSystem hard = read(id);
      const solver::Outcome outcome = reference::solve_hard_system(hard);
      CAPTURE(id);
      CHECK(outcome.ionic_strength == testing::rel(number(hard.expected["ionic_strength"]), 1e-10));
      // The file prints its slopes with 8 digits; the solver's is one iteration old.
      CHECK(outcome.certificate.ionic_strength_slope ==
            within(number(hard.expected["dIcalc_dI"]), 1e-5));
    }
  }

  TEST_CASE("every system is solved from a hundred random starts") {
    std::mt19937_64 random(seed);
    MESSAGE("seed " << seed);
    for (const std::string& id : solvable()) {
      const HardSystem hard = read(id);
      // The largest system costs a hundred times the others; five starts, as its reference had.
      const int n_starts = hard.components.size() > 50 ? 5 : 100;
      for (int k = 0; k < n_starts; ++k) {
        check_solution(hard, reference::solve_hard_system(hard, random_start(hard, random)));
      }
    }
  }

  TEST_CASE("the safe path alone solves every system from a hundred random starts") {
    std::mt19937_64 random(seed + 1);
    MESSAGE("seed " << seed + 1);
    for (const std::string& id : solvable()) {
      const HardSystem hard = read(id);
      const solver::Kernel kernel = solver::compile(hard.system, hard.conditions);
      solver::Prepared prepared;
      REQUIRE(solver::prepare(kernel, hard.the_case, prepared));
      REQUIRE(solver::read_decimal_totals(kernel, hard.the_case, prepared));
      solver::Feasibility kind{};
      if (!solver::settle_by_signs(kernel, prepared, kind)) {
        CHECK(solver::settle_exactly(kernel, hard.the_case, prepared).kind ==
              solver::Feasibility::interior);
      }
      const int n_starts = hard.components.size() > 50 ? 2 : 100;
      for (int k = 0; k < n_starts; ++k) {
        solver::Point point;
        solver::set_start(kernel, prepared, random_start(hard, random), point);
        const solver::SafeFinding finding = solver::run_safe_path(kernel, prepared, point);
        CAPTURE(id);
        CAPTURE(k);
        REQUIRE(finding.solved);
        std::vector<double> x(point.x.size());
        for (std::size_t i = 0; i < x.size(); ++i) {
          const bool absent = prepared.rows[i] == solver::Prepared::Row::absent;
          x[kernel.order[i]] = absent ? -std::numeric_limits<double>::infinity() : point.x[i];
        }
        CHECK(activity_error(hard, x) <= tolerance);
        CHECK(phase_error(hard, point.amount) <= tolerance);
      }
    }
  }

  TEST_CASE("a pair of charges 4 and -4 is flagged for its several solutions") {
    const HardSystem hard = read("D9_bistable_4_4_Davies");
    const solver::Outcome outcome = reference::solve_hard_system(hard);
    CHECK(outcome.status == solver::Status::converged);
    CHECK(outcome.certificate.several_solutions);
    bool is_a_root = false;
    for (const auto& root : hard.expected["ionic_strength_roots"]) {
      is_a_root = is_a_root || outcome.ionic_strength == testing::rel(number(root), 1e-10);
    }
    CHECK(is_a_root);
  }

  TEST_CASE("systems with one solution are not flagged for several") {
    for (const std::string& id : solvable()) {
      CAPTURE(id);
      CHECK_FALSE(reference::solve_hard_system(read(id)).certificate.several_solutions);
    }
  }

  TEST_CASE("infeasible systems are named, with a combination that proves it") {
    for (const char* id : {"I1_infeasible_negative_total", "I5_infeasible_hidden"}) {
      const HardSystem hard = read(id);
      const solver::Outcome outcome = reference::solve_hard_system(hard);
      CAPTURE(id);
      CHECK(outcome.status == solver::Status::infeasible);
      CHECK(outcome.feasibility == solver::Feasibility::infeasible);
      CHECK(std::isnan(outcome.ionic_strength));
      std::vector<double> y(hard.components.size(), 0);
      for (std::size_t k = 0; k < outcome.conflict.size(); ++k) {
        y[outcome.conflict[k]] = outcome.conflict_weight[k];
      }
      double at_totals = 0;
      for (std::size_t i = 0; i < y.size(); ++i) at_totals += y[i] * hard.the_case.totals[i];
      CHECK(at_totals < 0);
      for (int j = 0; j < hard.system.n_species; ++j) {
        double at_species = 0;
        for (std::size_t i = 0; i < y.size(); ++i) {
          at_species +=
              y[i] * hard.system.stoichiometry[static_cast<std::size_t>(j) * y.size() + i];
        }
        CHECK(at_species >= 0);
      }
    }
  }

  TEST_CASE("imposed phases that contradict each other are infeasible") {
    const solver::Outcome outcome =
        reference::solve_hard_system(read("I4_infeasible_fixed_gas_no_base"));
    CHECK(outcome.status == solver::Status::infeasible);
    CHECK(outcome.feasibility == solver::Feasibility::infeasible);
  }

  TEST_CASE("on the boundary the absent are absent and the rest is solved") {
    const solver::Outcome zero = reference::solve_hard_system(read("I3_boundary_zero_total"));
    CHECK(zero.status == solver::Status::converged);
    CHECK(zero.feasibility == solver::Feasibility::boundary);
    CHECK(zero.x[0] == within(-3 * std::numbers::ln10, 1e-12));
    CHECK(zero.x[1] == -std::numeric_limits<double>::infinity());

    // Only XY remains: its amount is known, neither activity is.
    const solver::Outcome ray =
        reference::solve_hard_system(read("I6_boundary_component_activity_undefined"));
    CHECK(ray.status == solver::Status::converged);
    CHECK(ray.feasibility == solver::Feasibility::boundary);
    CHECK(std::exp(ray.ln_amount[1]) == testing::rel(1e-3, 1e-12));
    CHECK(ray.ln_amount[0] == -std::numeric_limits<double>::infinity());
    CHECK(ray.ln_amount[2] == -std::numeric_limits<double>::infinity());
    CHECK(ray.x[0] == -std::numeric_limits<double>::infinity());
    CHECK(ray.x[1] == -std::numeric_limits<double>::infinity());
    for (const char* id :
         {"M1_momas_easy_initial_A", "M2_momas_easy_initial_B", "M3_momas_easy_injection"}) {
      CHECK(reference::solve_hard_system(read(id)).feasibility == solver::Feasibility::boundary);
    }
  }

  TEST_CASE("a total closed by electroneutrality at fixed activity of another component") {
    const HardSystem hard = read("E2_seawater_fixed_pH_Na_by_charge");
    const solver::Outcome outcome = reference::solve_hard_system(hard);
    CHECK(activity_error(hard, outcome.x) <= tolerance);
    CHECK(outcome.implied_total[1] == testing::rel(number(hard.expected["T_Na"]), 1e-12));
    CHECK(outcome.implied_total[0] == testing::rel(number(hard.expected["implied_T_H"]), 1e-10));
  }

  TEST_CASE("the hydrazine mixture of White, Johnson and Dantzig") {
    // J. Chem. Phys. 28 (1958) 751; digits of the file, computed with 120.
    const HardSystem hard = read("W1_hydrazine_WJD");
    const solver::Outcome outcome = reference::solve_hard_system(hard);
    REQUIRE(outcome.status == solver::Status::converged);
    for (std::size_t j = 0; j < hard.species.size(); ++j) {
      CHECK(std::exp(outcome.ln_amount[j]) == testing::rel(number(hard.expected["x"][j]), 1e-10));
    }
    for (std::size_t i = 0; i < hard.components.size(); ++i) {
      CHECK(outcome.x[i] == within(number(hard.expected["element_potentials"][i]), 1e-10));
    }
  }
}
