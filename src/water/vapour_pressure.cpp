// Vapour pressure of water (Wagner and Pruss 1993, IAPWS SR1-86).
//
// The coefficients are from memory; they reproduce the check values of the release, see
// tests/water/vapour_pressure_test.cpp.
#include <cmath>
#include <limits>

#include "water/formulations.hpp"

namespace ionledger {

double water::vapour_pressure_pa(double temperature_k) {
  const double tau = 1 - temperature_k / critical_temperature_k;
  const double sum = -7.85951783 * tau + 1.84408259 * std::pow(tau, 1.5) -
                     11.7866497 * std::pow(tau, 3.0) + 22.6807411 * std::pow(tau, 3.5) -
                     15.9618719 * std::pow(tau, 4.0) + 1.80122502 * std::pow(tau, 7.5);
  return critical_pressure_pa * std::exp(critical_temperature_k / temperature_k * sum);
}

Pressure water_vapour_pressure(Temperature temperature) {
  if (!water::is_in_range(temperature)) {
    return Pressure::from_value(std::numeric_limits<double>::quiet_NaN());
  }
  return Pressure::from_value(water::vapour_pressure_pa(in_kelvin(temperature)));
}

}  // namespace ionledger
