// Density of water: proof of the coefficients above 100 degC, and the shape of the curve.
#include <doctest/doctest.h>

#include <cmath>

#include "support/compare.hpp"
#include "water/formulations.hpp"

namespace ionledger::testing {
namespace {

double density(double degc) { return water_density(celsius(degc)).value(); }

/// Saturated liquid, kg/m3: W. Wagner and A. Pruss, J. Phys. Chem. Ref. Data 22 (1993) 783
/// (IAPWS SR1-86); coefficients from memory, proved by the check values below.
double saturated_density(double temperature_k) {
  const double tau = 1 - temperature_k / water::critical_temperature_k;
  return water::critical_density_kg_m3 *
         (1 + 1.99274064 * std::pow(tau, 1.0 / 3) + 1.09965342 * std::pow(tau, 2.0 / 3) -
          0.510839303 * std::pow(tau, 5.0 / 3) - 1.75493479 * std::pow(tau, 16.0 / 3) -
          45.5170352 * std::pow(tau, 43.0 / 3) - 6.74694450e5 * std::pow(tau, 110.0 / 3));
}

}  // namespace

TEST_SUITE("water/density") {
  TEST_CASE("the equation for the saturated liquid reproduces its check values") {
    CHECK(saturated_density(273.16) == within(999.789, 5e-4));
    CHECK(saturated_density(373.1243) == within(958.365, 5e-4));
  }
  TEST_CASE("above the boiling point the density is that of the saturated liquid") {
    for (double t = 100; t <= 150; t += 5) {
      CAPTURE(t);
      CHECK(density(t) == rel(saturated_density(t + 273.15), water_density_error));
    }
  }
  TEST_CASE("the compressibility is that of the handbooks") {
    // CRC Handbook of Chemistry and Physics, 1e-10/Pa; from memory. The correction it serves is
    // below 2.4e-4 of the density, so that 0.1 % of it is nothing.
    struct Row {
      double degc, compressibility;
    };
    for (const Row& row : {Row{0, 5.089}, Row{25, 4.525}, Row{50, 4.417}, Row{100, 4.902}}) {
      CAPTURE(row.degc);
      CHECK(1e10 * water::compressibility_per_pa(row.degc) == rel(row.compressibility, 1e-3));
    }
  }
  TEST_CASE("the density is greatest near 4 degC") {
    // Maximum at 3.98 degC (handbooks); a step of 0.1 K cannot resolve it better.
    double greatest_at = 0;
    for (int k = 0; k <= 100; ++k) {
      if (density(0.1 * k) > density(greatest_at)) greatest_at = 0.1 * k;
    }
    CHECK(greatest_at == within(3.98, 0.1));
  }
}

}  // namespace ionledger::testing
