// Ion product of water: the table of its release proves the coefficients.
#include <doctest/doctest.h>

#include "support/compare.hpp"
#include "water/formulations.hpp"

namespace ionledger::testing {
namespace {

struct Row {
  double degc, pkw;
};

}  // namespace

TEST_SUITE("water/ion_product") {
  TEST_CASE("the liquid column of IAPWS R11-07 is reproduced to its last digit") {
    // 0.1 MPa to 75 degC, saturation above; as printed in the CRC Handbook of Chemistry and
    // Physics.
    for (const Row& row : {Row{0, 14.946},
                           Row{25, 13.995},
                           Row{50, 13.264},
                           Row{75, 12.696},
                           Row{100, 12.252},
                           Row{150, 11.641}}) {
      CAPTURE(row.degc);
      CHECK(-water_log10_ion_product(celsius(row.degc)) == within(row.pkw, 5e-4));
    }
  }
  TEST_CASE("the values IAPWS R11-07 gives for checking a program are reproduced") {
    // From memory; rounding of the sixth decimal.
    struct CheckPoint {
      double temperature_k, density_g_cm3, pkw;
    };
    for (const CheckPoint& point : {CheckPoint{300, 1.0, 13.906565},
                                    CheckPoint{600, 0.07, 21.048874},
                                    CheckPoint{600, 0.7, 11.203153},
                                    CheckPoint{800, 0.2, 15.089765},
                                    CheckPoint{800, 1.2, 6.438330}}) {
      CAPTURE(point.temperature_k);
      CAPTURE(point.density_g_cm3);
      CHECK(-water::log10_ion_product(point.temperature_k, 1000 * point.density_g_cm3) ==
            within(point.pkw, 6e-7));
    }
  }
}

}  // namespace ionledger::testing
