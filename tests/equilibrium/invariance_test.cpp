// What must not matter: the order of the data, the basis they are written on, the size of the
// sample.
#include <doctest/doctest.h>

#include <algorithm>
#include <random>

#include "chemistry/compile.hpp"
#include "equilibrium/system.hpp"
#include "support/compare.hpp"
#include "support/water.hpp"

namespace ionledger::testing {
namespace {

constexpr double invariant = 1e-10;

const Totals well = {{"Ca+2", 2.6e-3},
                     {"Mg+2", 6e-4},
                     {"Na+", 9.4e-4},
                     {"K+", 7e-5},
                     {"Fe+2", 1.6e-5},
                     {"Cl-", 1.06e-3},
                     {"NO3-", 1.5e-4},
                     {"SO4-2", 6.3e-4},
                     {"CO3-2", 5.7e-3},
                     {"F-", 1.1e-5},
                     {"H4SiO4", 2.4e-4},
                     {"PO4-3", 1e-5},
                     {"NH4+", 3e-5}};

/// Solves the same water in another Chemistry and compares species by name.
void compare_with(const Chemistry& other) {
  const ActivityModel& model = default_activity_model();
  const Solution here = solved(well, 25, model);
  Problem problem;
  problem.totals.assign(static_cast<std::size_t>(other.n_basis), 0.0);
  for (std::size_t i = 1; i < problem.totals.size(); ++i) {
    const auto total = well.find(other.species[i].name);
    if (total == well.end()) continue;
    problem.totals[i] = total->second;
    problem.totals[0] -= other.species[i].charge_number * total->second;
  }
  const Solution there = solve(problem, other, model);
  REQUIRE(there.status == SolveStatus::converged);
  for (std::size_t s = 0; s < other.species.size(); ++s) {
    CAPTURE(other.species[s].name);
    CHECK(there.molality[s] == rel(molality(here, other.species[s].name), invariant));
  }
  CHECK(there.ph() == rel(here.ph(), invariant));
}

}  // namespace

TEST_SUITE("equilibrium/invariance") {
  TEST_CASE("the order of basis species, other species and minerals changes nothing") {
    std::mt19937 random(20260101);
    for (int round = 0; round < 5; ++round) {
      Chemistry shuffled = models().chemistry;
      const auto begin = shuffled.species.begin();
      std::shuffle(begin + 1, begin + shuffled.n_basis, random);
      std::shuffle(begin + shuffled.n_basis, shuffled.species.end(), random);
      std::shuffle(shuffled.minerals.begin(), shuffled.minerals.end(), random);
      for (Species& species : shuffled.species) {
        species.formation.clear();
        species.formation_constants.clear();
        species.water_exponent = 0;
      }
      for (Mineral& mineral : shuffled.minerals) {
        mineral.dissolution_constants.clear();
        mineral.water_exponent = 0;
      }
      for (Gas& gas : shuffled.gases) {
        gas.dissolution_constants.clear();
        gas.water_exponent = 0;
      }
      Diagnostics diagnostics;
      REQUIRE(compile_chemistry(shuffled, {}, diagnostics));
      compare_with(shuffled);
    }
  }

  TEST_CASE("doubling every total at fixed pH doubles an ideal solution") {
    // With activity coefficients held at one the balances are homogeneous in species that hold one
    // mole each.
    ActivityModel ideal = default_activity_model();
    ideal.species.clear();
    ideal.ions = ideal.pairs = ideal.neutrals = {ActivityForm::neutral, 0, 0, ""};
    ideal.water_activity_slope = 0;
    Problem problem = neutral_water({{"Na+", 1e-3}, {"Cl-", 2e-3}, {"CO3-2", 1e-3}});
    problem.ph = 7;
    const Solution once = solve(problem, models().chemistry, ideal);
    for (double& total : problem.totals) total *= 2;
    const Solution twice = solve(problem, models().chemistry, ideal);
    REQUIRE(once.status == SolveStatus::converged);
    REQUIRE(twice.status == SolveStatus::converged);
    for (const char* name : {"Na+", "Cl-", "HCO3-", "CO2", "CO3-2"}) {
      CHECK(molality(twice, name) == rel(2 * molality(once, name), invariant));
    }
  }

  TEST_CASE("imposing the pH that charge balance gave gives the same water") {
    const Solution balanced = solved(well, 25, default_activity_model());
    Problem problem = neutral_water(well);
    problem.ph = balanced.ph();
    const Solution imposed = solved(problem, default_activity_model());
    CHECK(imposed.totals[0] == rel(neutral_water(well).totals[0], 1e-9));
    CHECK(imposed.ionic_strength_molal == rel(balanced.ionic_strength_molal, invariant));
  }
}

}  // namespace ionledger::testing
