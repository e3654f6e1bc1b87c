// Permittivity of water: the check points of its release prove the coefficients.
#include <doctest/doctest.h>

#include "support/compare.hpp"
#include "water/formulations.hpp"

namespace ionledger::testing {
namespace {

struct CheckPoint {
  double temperature_k, density_mol_per_litre, permittivity;
};

}  // namespace

TEST_SUITE("water/permittivity") {
  TEST_CASE("the check points of IAPWS R8-97 are reproduced") {
    // Table 4 of the release, from memory. The printed density is rounded to 5e-6 mol/L, which
    // moves the permittivity by as much as half its last digit again.
    const double tolerance = 1.5e-5;
    for (const CheckPoint& point : {CheckPoint{240, 54.33702, 104.34982},
                                    CheckPoint{300, 55.31735, 77.74735},
                                    CheckPoint{300, 55.56148, 78.11269},
                                    CheckPoint{300, 68.69265, 103.69632},
                                    CheckPoint{650, 40.31090, 17.71733},
                                    CheckPoint{650, 52.58636, 26.62132},
                                    CheckPoint{870, 20.98927, 4.98281},
                                    CheckPoint{870, 45.01376, 15.09746}}) {
      CAPTURE(point.temperature_k);
      CAPTURE(point.density_mol_per_litre);
      const double density_kg_m3 =
          1000 * point.density_mol_per_litre * water::molar_mass_kg_per_mol;
      CHECK(water::permittivity(point.temperature_k, density_kg_m3) ==
            within(point.permittivity, tolerance));
    }
  }
  TEST_CASE("the public function takes the density of water at that temperature") {
    // 300 K and 0.101325 MPa is one of the check points; density differs by 3e-6.
    CHECK(water_permittivity(kelvin(300)) == within(77.74735, 5e-4));
  }
}

}  // namespace ionledger::testing
