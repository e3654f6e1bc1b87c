// Density of liquid water (Kell 1975): one rational function for the whole range, and the
// compression by the vapour pressure above the boiling point.
//
// The coefficients are from memory; to 100 degC a handbook table proves them, above it an equation
// that shares none of them, see tests/published/water_tables_test.cpp and
// tests/water/density_test.cpp.
#include <algorithm>
#include <limits>

#include "water/formulations.hpp"

namespace ionledger {
namespace {

constexpr double atmosphere_pa = 101325.0;

double density_at_one_atmosphere_kg_m3(double t) {
  const double numerator =
      999.83952 +
      t * (16.945176 +
           t * (-7.9870401e-3 + t * (-46.170461e-6 + t * (105.56302e-9 + t * -280.54253e-12))));
  return numerator / (1 + 16.879850e-3 * t);
}

}  // namespace

double water::compressibility_per_pa(double degc) {
  const double t = degc;
  const double numerator =
      50.88496 + t * (0.6163813 + t * (1.459187e-3 +
                                       t * (20.08438e-6 + t * (-58.47727e-9 + t * 410.4110e-12))));
  return 1e-11 * numerator / (1 + 19.67348e-3 * t);
}

Density water_density(Temperature temperature) {
  if (!water::is_in_range(temperature)) {
    return Density::from_value(std::numeric_limits<double>::quiet_NaN());
  }
  const double t = in_celsius(temperature);
  const double excess_pa =
      std::max(water::vapour_pressure_pa(in_kelvin(temperature)) - atmosphere_pa, 0.0);
  return Density::from_value(density_at_one_atmosphere_kg_m3(t) *
                             (1 + water::compressibility_per_pa(t) * excess_pa));
}

}  // namespace ionledger
