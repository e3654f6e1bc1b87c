// Properties of pure water that the chemistry rests on: density, permittivity, ion product,
// Debye-Hückel slopes.
#pragma once

#include "ionledger/units.hpp"

namespace ionledger {

/// Range of every function here, degrees Celsius, both ends included. Outside it, and for a
/// temperature that is not a number, the functions return NaN; the caller says why.
inline constexpr double water_min_degc = 0.0;
inline constexpr double water_max_degc = 150.0;

/// Largest relative difference of water_density from the published values the tests hold it to.
inline constexpr double water_density_error = 4e-5;

/// Density of liquid water at 101.325 kPa, and at the vapour pressure where that is higher (above
/// 99.97 degC).
///
///     rho = sum_0^5 c_i t^i / (1 + d t)              at 101.325 kPa, t in degC
///     rho(p) = rho (1 + kappa (p - 101.325 kPa))     kappa: isothermal compressibility at t
///
/// Limits  continuous; its slope changes by 0.2 % where the pressure begins to rise.
/// Errors  within water_density_error of IAPWS: 3e-6 up to 30 degC; above, mostly because the
///         paper's temperatures are IPTS-68 (0.026 K at 100 degC), which is left uncorrected.
/// Source  G. S. Kell, J. Chem. Eng. Data 20 (1975) 97-105: density 0..150 degC, compressibility
///         fitted 0..100 degC and extrapolated here, where it carries 2e-4 of the density.
[[nodiscard]] Density water_density(Temperature temperature);

/// Largest relative difference of water_vapour_pressure from IAPWS steam tables, 25..150 degC.
inline constexpr double water_vapour_pressure_error = 1e-4;

/// Saturation (vapour) pressure of water.
///
///     ln(p/p_c) = (T_c/T) sum a_i tau^n_i,    tau = 1 - T/T_c
///
/// Limits  from 0 to 0.01 degC, just below the triple point, the liquid is metastable.
/// Source  W. Wagner and A. Pruss, J. Phys. Chem. Ref. Data 22 (1993) 783-787 (IAPWS SR1-86).
[[nodiscard]] Pressure water_vapour_pressure(Temperature temperature);

/// Largest relative difference of water_permittivity from older measurements, 0..100 degC.
inline constexpr double water_permittivity_error = 4e-3;

/// Static relative permittivity of liquid water, dimensionless, at the density of water_density.
///
///     epsilon = (1 + A + 5 B + sqrt(9 + 2 A + 18 B + A^2 + 10 A B + 9 B^2)) / (4 - 4 B)
///
/// A (dipoles, with the correlation factor g(rho, T)) and B (polarisability) as in
/// src/water/permittivity.cpp; about 78.4 at 25 degC.
/// Source  IAPWS R8-97; D. P. Fernández, A. R. H. Goodwin, E. W. Lemmon, J. M. H. Levelt Sengers
///         and R. C. Williams, J. Phys. Chem. Ref. Data 26 (1997) 1125-1166.
[[nodiscard]] double water_permittivity(Temperature temperature);

/// Largest difference of water_log10_ion_product from the older international formulation.
inline constexpr double water_log10_ion_product_error = 0.02;

/// log10 of the ion product of water, molality scale (about -13.995 at 25 degC), at the density of
/// water_density.
///
///     -log10 K_w = -2 n [log10(1 + Q) - Q/(Q + 1) rho (b0 + b1/T + b2 rho)]
///                  + g0 + g1/T + g2/T^2 + g3/T^3 + 2 log10(M)
///     Q = rho exp(a0 + a1/T + a2/T^2 rho^(2/3)),  rho in g/cm3, M in kg/mol
///
/// Source  IAPWS R11-07; A. V. Bandura and S. N. Lvov, J. Phys. Chem. Ref. Data 35 (2006) 15-30.
[[nodiscard]] double water_log10_ion_product(Temperature temperature);

/// Largest relative difference of water_viscosity_pa_s from published values, 0..100 degC; also the
/// uncertainty IAPWS states for the liquid.
inline constexpr double water_viscosity_error = 0.01;

/// Dynamic viscosity of liquid water, Pa s, at the density of water_density.
///
///     mu = 1e-6 Pa s * mu_0(T) mu_1(T, rho),  without the enhancement near the critical point
///
/// Source  IAPWS R12-08; M. L. Huber et al., J. Phys. Chem. Ref. Data 38 (2009) 101-125.
[[nodiscard]] double water_viscosity_pa_s(Temperature temperature);

/// Slopes of the Debye-Hückel law log10(gamma) = -a z^2 sqrt(I) / (1 + b size sqrt(I)).
struct DebyeHueckelSlopes {
  double a = 0;  ///< (kg/mol)^(1/2), decadic: about 0.5098 at 25 degC.
  double b = 0;  ///< (kg/mol)^(1/2) per ångström: about 0.3284 at 25 degC.
};

/// Largest relative difference of the slope `a` at 25 degC from evaluations that use other
/// permittivities.
inline constexpr double debye_hueckel_slope_error = 1e-3;

/// From fundamental constants, water_density and water_permittivity; SI units, I in mol per kg of
/// water.
///
///     b = (2 e^2 N_A rho / (eps_0 eps k T))^(1/2)      per metre; times 1e-10 per ångström
///     a = e^2 b / (8 pi eps_0 eps k T ln 10)
///
/// Source  P. Debye and E. Hückel, Phys. Z. 24 (1923) 185-206; constants CODATA 2018 (E. Tiesinga
///         et al., J. Phys. Chem. Ref. Data 50 (2021) 033105).
[[nodiscard]] DebyeHueckelSlopes debye_hueckel_slopes(Temperature temperature);

}  // namespace ionledger
