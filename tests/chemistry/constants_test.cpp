#include <doctest/doctest.h>

#include <cmath>

#include "ionledger/chemistry.hpp"
#include "support/compare.hpp"
#include "support/water.hpp"

namespace ionledger::testing {

TEST_SUITE("chemistry/constants") {
  TEST_CASE("an enthalpy moves log K as van 't Hoff says") {
    EquilibriumConstant constant;
    constant.log10_k = 2;
    constant.enthalpy_kj_per_mol = 20;
    CHECK(log10_k(constant, celsius(25)) == within(2, 1e-14));
    // d log K = dH / (R ln 10) (1/298.15 - 1/323.15), by hand 0.27107.
    CHECK(log10_k(constant, celsius(50)) == within(2.27107, 1e-5));
  }
  TEST_CASE("a heat capacity leaves the slope at 25 degC alone") {
    EquilibriumConstant constant;
    constant.heat_capacity_j_per_mol_k = 100;
    const double step = 0.01;
    const double slope =
        (log10_k(constant, celsius(25 + step)) - log10_k(constant, celsius(25 - step))) /
        (2 * step);
    CHECK(slope == within(0, 1e-6));
    // dCp/(R ln 10) (ln(T/T0) + T0/T - 1) at 75 degC, by hand 0.05965.
    CHECK(log10_k(constant, celsius(75)) == within(0.05965, 1e-5));
  }
  TEST_CASE("every formation conserves charge and elements on the basis") {
    const Chemistry& chemistry = models().chemistry;
    for (const Species& species : chemistry.species) {
      CAPTURE(species.name);
      double charge = -species.charge_number;
      Composition atoms = species.composition;
      for (std::size_t i = 0; i < species.formation.size(); ++i) {
        charge += species.formation[i] * chemistry.species[i].charge_number;
        for (const auto& [element, count] : chemistry.species[i].composition) {
          atoms[element] -= species.formation[i] * count;
        }
      }
      atoms["H"] -= 2 * species.water_exponent;
      atoms["O"] -= species.water_exponent;
      CHECK(charge == within(0, 1e-12));
      for (const auto& atom : atoms) {
        CAPTURE(atom.first);
        CHECK(atom.second == within(0, 1e-12));
      }
    }
  }
  TEST_CASE("carbonic acid on the basis has the published constants") {
    // Plummer and Busenberg 1982 at 25 degC: pK1 6.352, pK2 10.329, log K CaCO3(aq) 3.224.
    const Chemistry& chemistry = models().chemistry;
    const std::vector<double> ln_k = ln_formation(chemistry, celsius(25));
    const auto log10_formation = [&](const char* name) {
      return ln_k[static_cast<std::size_t>(chemistry.species_index(name))] / std::log(10.0);
    };
    CHECK(log10_formation("HCO3-") == within(10.329, 0.002));
    CHECK(log10_formation("CO2") == within(10.329 + 6.352, 0.003));
    CHECK(log10_formation("CaCO3") == within(3.224, 0.002));
  }
}

}  // namespace ionledger::testing
