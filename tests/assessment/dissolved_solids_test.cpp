#include "ionledger/dissolved_solids.hpp"

#include <doctest/doctest.h>

#include "support/compare.hpp"
#include "support/water.hpp"

namespace ionledger::testing {
namespace {

double solids(const Solution& solution) {
  return dissolved_solids_mg_per_l(models().chemistry, solution, 1.0);
}
double residue(const Solution& solution) {
  return residue_180_mg_per_l(models().chemistry, solution, 1.0);
}
Solution water(const Totals& totals) { return solved(totals, 25, default_activity_model()); }

}  // namespace

TEST_SUITE("assessment/dissolved solids") {
  TEST_CASE("sodium chloride weighs what it weighs, dissolved or dried") {
    const Solution solution = water({{"Na+", 0.01}, {"Cl-", 0.01}});
    // 58.443 g/mol; the last digits are the ions of water.
    CHECK(solids(solution) == rel(584.43, 1e-4));
    CHECK(residue(solution) == rel(584.43, 1e-4));
  }

  TEST_CASE("sodium bicarbonate dries to half a mole of sodium carbonate") {
    const Solution solution = water({{"Na+", 0.01}, {"CO3-2", 0.01}});
    CHECK(solids(solution) < 840.07);               // a little of it is carbon dioxide
    CHECK(residue(solution) == rel(529.94, 1e-3));  // 105.988/2 g/mol
  }

  TEST_CASE("the factor for bicarbonate is 0.4917, as Hem prints it") {
    const Solution solution = water({{"Ca+2", 0.001}, {"CO3-2", 0.002}});
    const Chemistry& chemistry = models().chemistry;
    double bicarbonate = 0;
    for (const char* species : {"HCO3-", "CaHCO3+"}) bicarbonate += molality(solution, species);
    const double mg =
        1000 * bicarbonate *
        chemistry.species[static_cast<std::size_t>(chemistry.species_index("HCO3-"))].molar_mass_g;
    CHECK(solids(solution) - residue(solution) == rel((1 - 0.4917) * mg, 1e-3));
  }

  TEST_CASE("dissolved carbon dioxide is no solid and silica counts as SiO2") {
    CHECK(solids(water({{"CO3-2", 0.01}})) < 0.01 * 440);
    CHECK(solids(water({{"H4SiO4", 0.001}})) == rel(60.08, 1e-3));
  }
}

}  // namespace ionledger::testing
