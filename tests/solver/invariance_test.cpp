// The answer is a property of the case, not of how it is written down.
#include <doctest/doctest.h>

#include <algorithm>
#include <cmath>
#include <numeric>

#include "solver/compact_system.hpp"
#include "solver/recheck.hpp"
#include "support/compare.hpp"

namespace {

using namespace ionledger::solver;
using namespace ionledger::testing;

constexpr unsigned long long seed = 777;
constexpr double same = 1e-11;  // ln activities

std::vector<int> shuffled(int n, std::mt19937_64& random) {
  std::vector<int> order(static_cast<std::size_t>(n));
  std::iota(order.begin(), order.end(), 0);
  for (std::size_t k = order.size(); k > 1; --k) std::swap(order[k - 1], order[random() % k]);
  return order;
}

/// The same system with components and species listed in another order.
CompactSystem permuted(const CompactSystem& compact,
                       const std::vector<int>& components,
                       const std::vector<int>& species) {
  CompactSystem result = compact;
  const std::size_t n = components.size();
  for (std::size_t j = 0; j < species.size(); ++j) {
    const auto from = static_cast<std::size_t>(species[j]);
    for (std::size_t i = 0; i < n; ++i) {
      result.system.stoichiometry[j * n + i] =
          compact.system.stoichiometry[from * n + static_cast<std::size_t>(components[i])];
    }
    result.system.solvent_exponent[j] = compact.system.solvent_exponent[from];
    result.system.ionic_weight[j] = compact.system.ionic_weight[from];
    result.system.activity_class[j] = compact.system.activity_class[from];
    result.conditions.ln_k[j] = compact.conditions.ln_k[from];
  }
  const auto n_phases = static_cast<std::size_t>(compact.system.n_phases);
  for (std::size_t m = 0; m < n_phases; ++m) {
    for (std::size_t i = 0; i < n; ++i) {
      result.system.phase_stoichiometry[m * n + i] =
          compact.system.phase_stoichiometry[m * n + static_cast<std::size_t>(components[i])];
    }
  }
  return result;
}

}  // namespace

TEST_SUITE("solver/invariance") {
  TEST_CASE("the order of components and species does not matter") {
    std::mt19937_64 random(seed);
    MESSAGE("seed " << seed);
    const CompactSystem compact = compact_system(0.017);
    for (int k = 0; k < 40; ++k) {
      const auto components = shuffled(compact.system.n_components, random);
      const auto species = shuffled(compact.system.n_species, random);
      const CompactSystem other = permuted(compact, components, species);
      Case a_case;
      a_case.totals = random_totals(random, k % 2);
      if (k % 4 > 1) {
        a_case.phase_rules.assign(static_cast<std::size_t>(compact.system.n_phases),
                                  PhaseRule::may_form);
      }
      Case permuted_case = a_case;
      for (std::size_t i = 0; i < components.size(); ++i) {
        permuted_case.totals[i] = a_case.totals[static_cast<std::size_t>(components[i])];
      }
      const Outcome first = solve(compact.system, compact.conditions, a_case);
      const Outcome second = solve(other.system, other.conditions, permuted_case);
      REQUIRE(first.status == Status::converged);
      REQUIRE(second.status == Status::converged);
      for (std::size_t i = 0; i < components.size(); ++i) {
        CHECK(second.x[i] == within(first.x[static_cast<std::size_t>(components[i])], same));
      }
      CHECK(second.ionic_strength == rel(first.ionic_strength, same));
    }
  }

  TEST_CASE("another choice of components gives the same amounts") {
    // HCO3- takes the place of CO3-2: nu_CO3 CO3 = nu_CO3 HCO3 - nu_CO3 H, K shifts along.
    const CompactSystem compact = compact_system(0.017);
    CompactSystem other = compact;
    constexpr std::size_t h = 0;
    constexpr std::size_t carbonate = 9;
    const std::size_t n = static_cast<std::size_t>(compact.system.n_components);
    const double ln_k_bicarbonate = compact.conditions.ln_k[16];
    for (std::size_t j = 0; j < compact.conditions.ln_k.size(); ++j) {
      const double nu = compact.system.stoichiometry[j * n + carbonate];
      other.system.stoichiometry[j * n + h] -= nu;
      other.conditions.ln_k[j] -= nu * ln_k_bicarbonate;
    }
    std::mt19937_64 random(seed);
    for (int k = 0; k < 40; ++k) {
      Case a_case;
      a_case.totals = random_totals(random, k % 2);
      Case other_case = a_case;
      other_case.totals[h] -= a_case.totals[carbonate];
      const Outcome first = solve(compact.system, compact.conditions, a_case);
      const Outcome second = solve(other.system, other.conditions, other_case);
      REQUIRE(first.status == Status::converged);
      REQUIRE(second.status == Status::converged);
      for (std::size_t j = 0; j < first.ln_amount.size(); ++j) {
        // The totals of the second were rounded once more, up to 1e-16 of 1 mol against 1e-9.
        CHECK(second.ln_amount[j] == within(first.ln_amount[j], 1e-6));
      }
    }
  }

  TEST_CASE("a component with total zero leaves the others as if it had never been") {
    const CompactSystem compact = compact_system(0.017);
    Case a_case;
    a_case.totals = industrial_totals()[0];
    const Outcome trace = [&] {
      a_case.totals[6] = 1e-25;
      return solve(compact.system, compact.conditions, a_case);
    }();
    a_case.totals[6] = 0;
    const Outcome none = solve(compact.system, compact.conditions, a_case);
    REQUIRE(trace.status == Status::converged);
    REQUIRE(none.status == Status::converged);
    CHECK(none.feasibility == Feasibility::boundary);
    CHECK(trace.feasibility == Feasibility::interior);
    CHECK(std::isinf(none.x[6]));
    for (std::size_t i = 0; i < a_case.totals.size(); ++i) {
      if (i != 6) CHECK(none.x[i] == within(trace.x[i], same));
    }
  }
}
