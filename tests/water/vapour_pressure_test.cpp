// Vapour pressure of water: the check values of its authors prove the coefficients.
#include <doctest/doctest.h>

#include "support/compare.hpp"
#include "water/formulations.hpp"

namespace ionledger::testing {

TEST_SUITE("water/vapour_pressure") {
  TEST_CASE("the check values of IAPWS SR1-86 are reproduced") {
    CHECK(water::vapour_pressure_pa(273.16) == within(611.657, 5e-4));
    CHECK(water::vapour_pressure_pa(373.1243) == within(0.101325e6, 0.5));
  }
  TEST_CASE("the public function gives pascal at an absolute temperature") {
    CHECK(water_vapour_pressure(kelvin(373.1243)).value() == within(101325, 0.5));
  }
}

}  // namespace ionledger::testing
