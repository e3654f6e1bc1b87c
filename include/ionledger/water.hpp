// Properties of pure water that the chemistry rests on: density, permittivity, ion product,
// Debye-Hückel slopes.
#pragma once

#include "ionledger/units.hpp"

namespace ionledger {

/// Range of every function here, degrees Celsius. Outside it the functions return NaN.
inline constexpr double water_min_degc = 0.0;
inline constexpr double water_max_degc = 150.0;

/// Density of liquid water, at 0.1 MPa up to 100 degC and at saturation pressure above.
[[nodiscard]] Density water_density(Temperature temperature);

/// Saturation (vapour) pressure of water.
[[nodiscard]] Pressure water_vapour_pressure(Temperature temperature);

/// Static relative permittivity of liquid water, dimensionless, on the line of water_density.
[[nodiscard]] double water_permittivity(Temperature temperature);

/// log10 of the ion product of water, molality scale (about -13.995 at 25 degC).
[[nodiscard]] double water_log10_ion_product(Temperature temperature);

/// Dynamic viscosity of liquid water, Pa s.
[[nodiscard]] double water_viscosity_pa_s(Temperature temperature);

/// Slopes of the Debye-Hückel law log10(gamma) = -a z^2 sqrt(I) / (1 + b size sqrt(I)).
struct DebyeHueckelSlopes {
  double a = 0;  ///< (kg/mol)^(1/2), decadic: about 0.5098 at 25 degC.
  double b = 0;  ///< (kg/mol)^(1/2) per ångström: about 0.3284 at 25 degC.
};

/// From fundamental constants, water_density and water_permittivity.
[[nodiscard]] DebyeHueckelSlopes debye_hueckel_slopes(Temperature temperature);

}  // namespace ionledger
