// Debye-Hückel slopes: lengths that follow from them and are known by themselves.
#include <doctest/doctest.h>

#include <numbers>

#include "ionledger/water.hpp"
#include "support/compare.hpp"

namespace ionledger::testing {

TEST_SUITE("water/debye_hueckel") {
  TEST_CASE("the ratio of the slopes is the Bjerrum length over 2 ln 10") {
    // e^2/(4 pi eps_0 k) = 1.671010e-5 m K: two electrons one metre apart, over k. CODATA 2018.
    for (const double t : {0.0, 25.0, 100.0, 150.0}) {
      CAPTURE(t);
      const DebyeHueckelSlopes slopes = debye_hueckel_slopes(celsius(t));
      const double bjerrum_angstrom =
          1e10 * 1.671010e-5 / (water_permittivity(celsius(t)) * (t + 273.15));
      CHECK(slopes.a / slopes.b == rel(bjerrum_angstrom / (2 * std::numbers::ln10), 1e-6));
    }
  }
  TEST_CASE("the Debye length at 25 degC is 3.04 angstrom over the root of ionic strength") {
    // Textbook value; on the molality scale it is 0.15 % longer, within the last digit.
    CHECK(1 / debye_hueckel_slopes(celsius(25)).b == within(3.04, 5e-3));
  }
}

}  // namespace ionledger::testing
