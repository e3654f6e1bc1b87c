// Viscosity of water: the check values of its release prove the coefficients.
#include <doctest/doctest.h>

#include "support/compare.hpp"
#include "water/formulations.hpp"

namespace ionledger::testing {
namespace {

struct CheckPoint {
  double temperature_k, density_kg_m3, micropascal_seconds;
};

}  // namespace

TEST_SUITE("water/viscosity") {
  TEST_CASE("the check values of IAPWS R12-08 without enhancement are reproduced") {
    // Table 4 of the release, from memory.
    for (const CheckPoint& point : {CheckPoint{298.15, 998, 889.735100},
                                    CheckPoint{298.15, 1200, 1437.649467},
                                    CheckPoint{373.15, 1000, 307.883622},
                                    CheckPoint{433.15, 1, 14.538324},
                                    CheckPoint{433.15, 1000, 217.685358},
                                    CheckPoint{873.15, 1, 32.619287},
                                    CheckPoint{873.15, 100, 35.802262},
                                    CheckPoint{873.15, 600, 77.430195},
                                    CheckPoint{1173.15, 1, 44.217245},
                                    CheckPoint{1173.15, 100, 47.640433},
                                    CheckPoint{1173.15, 400, 64.154608}}) {
      CAPTURE(point.temperature_k);
      CAPTURE(point.density_kg_m3);
      CHECK(1e6 * water::viscosity_pa_s(point.temperature_k, point.density_kg_m3) ==
            within(point.micropascal_seconds, 6e-7));
    }
  }
  TEST_CASE("water at 20 degC has 1.0016 mPa s") {
    // ISO/TR 3666:1998, the value viscometers are calibrated with; printed to 0.0001.
    CHECK(1e3 * water_viscosity_pa_s(celsius(20)) == within(1.0016, 5e-5));
  }
}

}  // namespace ionledger::testing
