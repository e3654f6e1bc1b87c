// Thousands of random well-posed cases of one system, every answer judged by independent code.
// IONLEDGER_DEEP=1 in the environment raises the numbers from 2000 to 100 000.
#include <doctest/doctest.h>

#include <algorithm>
#include <cmath>
#include <cstdlib>
#include <numbers>
#include <string>

#include "solver/certificate.hpp"
#include "solver/compact_system.hpp"
#include "solver/compiled.hpp"
#include "solver/feasibility.hpp"
#include "solver/prepare.hpp"
#include "solver/recheck.hpp"
#include "solver/safe_path.hpp"
#include "support/compare.hpp"

namespace {

using namespace ionledger::solver;
using namespace ionledger::testing;

constexpr unsigned long long seed = 12345;

int number_of_streams() {
  const char* const deep = std::getenv("IONLEDGER_DEEP");
  return deep != nullptr && *deep == '1' ? 100000 : 2000;
}

struct Tally {
  int solved = 0, safe = 0, worst_iterations = 0;
  double iterations = 0;
  Recheck worst;
};

void count(const CompactSystem& compact, const Case& a_case, const Outcome& outcome, Tally& tally) {
  if (outcome.status == Status::converged) ++tally.solved;
  if (outcome.used_safe_path) ++tally.safe;
  tally.iterations += outcome.iterations;
  tally.worst_iterations = std::max(tally.worst_iterations, outcome.iterations);
  const Recheck check = recheck(compact.system, compact.conditions, a_case, outcome);
  for (const auto member : {&Recheck::balance,
                            &Recheck::mass_action,
                            &Recheck::gamma,
                            &Recheck::coupling,
                            &Recheck::phases}) {
    if (!(check.*member <= tally.worst.*member)) tally.worst.*member = check.*member;
  }
}

void report(const std::string& what, int n, const Tally& tally) {
  MESSAGE(what << ", seed " << seed << ": " << tally.solved << " of " << n << " solved, "
               << tally.safe << " by the safe path, " << tally.iterations / n
               << " iterations on average, " << tally.worst_iterations << " at most");
}

void check(int n, const Tally& tally) {
  CHECK(tally.solved == n);
  CHECK(tally.worst.balance <= 1e-11);
  CHECK(tally.worst.mass_action <= 1e-12);
  CHECK(tally.worst.gamma <= 1e-12);
  CHECK(tally.worst.coupling <= 1e-11);
  CHECK(tally.worst.phases <= 1e-10);
}

Tally run_streams(double solvent_slope, int mode, int n_phases, int n) {
  const CompactSystem compact = compact_system(solvent_slope);
  const CompiledSystem compiled(compact.system, compact.conditions);
  CompiledSystem::Workspace workspace(compiled);
  Outcome outcome;
  Tally tally;
  std::mt19937_64 random(seed);
  for (int k = 0; k < n; ++k) {
    Case a_case;
    a_case.totals = random_totals(random, mode);
    const auto all = static_cast<std::size_t>(compact.system.n_phases);
    a_case.phase_rules.assign(all, PhaseRule::absent);
    a_case.ln_target.assign(all, 0);
    for (int m = 0; m < std::min(n_phases, compact_gas); ++m) {
      a_case.phase_rules[static_cast<std::size_t>(m)] = PhaseRule::may_form;
    }
    if (n_phases > compact_gas) {
      a_case.phase_rules[compact_gas] = PhaseRule::imposed;
      a_case.ln_target[compact_gas] = -3.4 * std::numbers::ln10;
    }
    compiled.solve(a_case, {}, workspace, outcome);
    count(compact, a_case, outcome, tally);
  }
  return tally;
}

}  // namespace

TEST_SUITE("solver/streams") {
  TEST_CASE("random streams whose charge hydrogen closes are all solved") {
    const int n = number_of_streams();
    const Tally tally = run_streams(0, 0, 0, n);
    report("raw streams", n, tally);
    check(n, tally);
    CHECK(tally.worst_iterations <= 120);
  }

  TEST_CASE("random streams near neutral are all solved") {
    const int n = number_of_streams();
    const Tally tally = run_streams(0, 1, 0, n);
    report("neutral streams", n, tally);
    check(n, tally);
  }

  TEST_CASE("with a solvent activity that falls with the solutes") {
    for (const int mode : {0, 1}) {
      const int n = number_of_streams();
      const Tally tally = run_streams(0.017, mode, 0, n);
      report("solvent coupled", n, tally);
      check(n, tally);
    }
  }

  TEST_CASE("with eight phases that may form, and with one more imposed") {
    for (const int n_phases : {8, 9}) {
      for (const int mode : {0, 1}) {
        const int n = number_of_streams();
        const Tally tally = run_streams(0.017, mode, n_phases, n);
        report("with phases", n, tally);
        check(n, tally);
      }
    }
  }

  TEST_CASE("the safe path alone solves random streams, with and without phases") {
    const CompactSystem compact = compact_system(0.017);
    const Kernel kernel = compile(compact.system, compact.conditions);
    std::mt19937_64 random(seed);
    CertificateWork work;
    resize(work, kernel);
    const int n = number_of_streams() / 20;
    int good = 0;
    for (int k = 0; k < n; ++k) {
      Case a_case;
      a_case.totals = random_totals(random, k % 2);
      if (k % 4 > 1) {
        a_case.phase_rules.assign(static_cast<std::size_t>(compact.system.n_phases),
                                  PhaseRule::may_form);
      }
      Prepared prepared;
      REQUIRE(prepare(kernel, a_case, prepared));
      Feasibility kind{};
      REQUIRE(settle_by_signs(kernel, prepared, kind));
      Point point;
      set_start(kernel, prepared, {}, point);
      if (!run_safe_path(kernel, prepared, point).solved) continue;
      Certificate certificate;
      compute_amounts(kernel, prepared, point, work);
      certify(kernel, prepared, point, work, certificate);
      if (certificate.good) ++good;
    }
    MESSAGE("safe path, seed " << seed << ": " << good << " of " << n);
    CHECK(good == n);
  }

  TEST_CASE("a warm start gives the same answer in fewer iterations") {
    const CompactSystem compact = compact_system(0.017);
    const CompiledSystem compiled(compact.system, compact.conditions);
    CompiledSystem::Workspace workspace(compiled);
    int cold = 0;
    int warm = 0;
    for (const std::vector<double>& totals : industrial_totals()) {
      for (const bool with_phases : {false, true}) {
        Case a_case;
        a_case.totals = totals;
        if (with_phases) {
          a_case.phase_rules.assign(static_cast<std::size_t>(compact.system.n_phases),
                                    PhaseRule::may_form);
          a_case.phase_rules[compact_gas] = PhaseRule::absent;
        }
        Outcome first;
        compiled.solve(a_case, {}, workspace, first);
        REQUIRE(first.status == Status::converged);
        for (std::size_t i = 1; i < totals.size(); ++i) {
          a_case.totals[i] *= 1 + 0.01 * (static_cast<double>(i % 3) - 1);
        }
        close_charge(a_case.totals);
        Outcome from_start;
        compiled.solve(a_case, {}, workspace, from_start);
        Outcome from_neighbour;
        compiled.solve(
            a_case, {first.x, first.ionic_strength, first.phase_amount}, workspace, from_neighbour);
        REQUIRE(from_start.status == Status::converged);
        REQUIRE(from_neighbour.status == Status::converged);
        cold += from_start.iterations;
        warm += from_neighbour.iterations;
        for (std::size_t i = 0; i < totals.size(); ++i) {
          CHECK(from_start.x[i] == within(from_neighbour.x[i], 1e-9));  // ln activities
        }
      }
    }
    MESSAGE("iterations over six cases: " << cold << " cold, " << warm << " warm");
    CHECK(warm < cold);
  }

  TEST_CASE("an answer does not depend on what the workspace solved before") {
    const CompactSystem compact = compact_system(0.017);
    const CompiledSystem compiled(compact.system, compact.conditions);
    CompiledSystem::Workspace workspace(compiled);
    std::mt19937_64 random(seed);
    Outcome used;
    for (int k = 0; k < 50; ++k) {
      Case a_case;
      a_case.totals = random_totals(random, k % 2);
      compiled.solve(a_case, {}, workspace, used);
      const Outcome fresh = solve(compact.system, compact.conditions, a_case);
      CHECK(used.x == fresh.x);
      CHECK(used.ln_amount == fresh.ln_amount);
      CHECK(used.ionic_strength == fresh.ionic_strength);
      CHECK(used.certificate.ionic_strength_slope == fresh.certificate.ionic_strength_slope);
      CHECK(used.certificate.worst_balance_residual == fresh.certificate.worst_balance_residual);
    }
  }
}
