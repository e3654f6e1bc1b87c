// Absolute temperatures from plain numbers and back; the zero of the Celsius scale stands here.
#include "ionledger/units.hpp"

namespace ionledger {
namespace {

constexpr double zero_degc_in_kelvin = 273.15;  // exact, SI Brochure 2.3.1

}  // namespace

Temperature kelvin(double temperature_k) { return Temperature::from_value(temperature_k); }

double in_kelvin(Temperature temperature) { return temperature.value(); }

Temperature celsius(double temperature_degc) {
  return kelvin(temperature_degc + zero_degc_in_kelvin);
}

double in_celsius(Temperature temperature) { return in_kelvin(temperature) - zero_degc_in_kelvin; }

}  // namespace ionledger
