// Published formulations of water on plain numbers: separate from the public functions so that
// tests can reach the check points their authors printed, which lie off the line of water_density.
#pragma once

#include "ionledger/water.hpp"

namespace ionledger::water {

inline constexpr double critical_temperature_k = 647.096;     // IAPWS R2-83
inline constexpr double critical_pressure_pa = 22.064e6;      // IAPWS R2-83
inline constexpr double critical_density_kg_m3 = 322.0;       // IAPWS R2-83
inline constexpr double molar_mass_kg_per_mol = 0.018015268;  // as in IAPWS R8-97 and R11-07

/// False for NaN too.
[[nodiscard]] inline bool is_in_range(Temperature temperature) {
  return in_kelvin(temperature) >= in_kelvin(celsius(water_min_degc)) &&
         in_kelvin(temperature) <= in_kelvin(celsius(water_max_degc));
}

// The kernels check no range.
[[nodiscard]] double compressibility_per_pa(double degc);
[[nodiscard]] double vapour_pressure_pa(double temperature_k);
[[nodiscard]] double permittivity(double temperature_k, double density_kg_m3);
[[nodiscard]] double log10_ion_product(double temperature_k, double density_kg_m3);
[[nodiscard]] double viscosity_pa_s(double temperature_k, double density_kg_m3);

}  // namespace ionledger::water
