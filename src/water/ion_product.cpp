// Ion product of water (IAPWS R11-07, Bandura and Lvov 2006).
//
// The coefficients are from memory; they reproduce the table of the release, see
// tests/water/ion_product_test.cpp.
#include <cmath>
#include <limits>

#include "water/formulations.hpp"

namespace ionledger {

double water::log10_ion_product(double temperature_k, double density_kg_m3) {
  constexpr double coordination = 6.0;  // water molecules around an ion
  const double t = temperature_k;
  const double rho = density_kg_m3 / 1000;
  const double q =
      rho * std::exp(-0.864671 + 8659.19 / t - 22786.2 / (t * t) * std::pow(rho, 2.0 / 3.0));
  const double hydration =
      std::log10(1 + q) - q / (q + 1) * rho * (0.642044 - 56.8534 / t - 0.375754 * rho);
  const double ideal_gas =
      0.6141500 + 4.825133e4 / t - 6.770793e4 / (t * t) + 1.010210e7 / (t * t * t);
  return 2 * coordination * hydration - ideal_gas - 2 * std::log10(molar_mass_kg_per_mol);
}

double water_log10_ion_product(Temperature temperature) {
  if (!water::is_in_range(temperature)) return std::numeric_limits<double>::quiet_NaN();
  return water::log10_ion_product(in_kelvin(temperature), water_density(temperature).value());
}

}  // namespace ionledger
