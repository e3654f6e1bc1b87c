// Static permittivity of water (IAPWS R8-97, Fernández et al. 1997).
//
// The coefficients are from memory; they reproduce the eight check points of the release, see
// tests/water/permittivity_test.cpp.
#include <cmath>
#include <limits>

#include "water/formulations.hpp"

namespace ionledger {
namespace {

// The release fixes these values with its coefficients; newer ones would spoil the fit.
constexpr double avogadro_per_mol = 6.0221367e23;
constexpr double boltzmann_j_per_k = 1.380658e-23;
constexpr double vacuum_permittivity = 8.854187817e-12;  // C^2/(J m)
constexpr double polarizability = 1.636e-40;             // C^2 m^2/J
constexpr double dipole_moment_c_m = 6.138e-30;

/// Terms n (rho/rho_c)^i (T_c/T)^j of the correlation factor g.
struct CorrelationTerm {
  double n;
  int i;
  double j;
};
// clang-format off
constexpr CorrelationTerm correlation_terms[] = {
    { 0.978224486826,    1,  0.25},
    {-0.957771379375,    1,  1.0 },
    { 0.237511794148,    1,  2.5 },
    { 0.714692244396,    2,  1.5 },
    {-0.298217036956,    3,  1.5 },
    {-0.108863472196,    3,  2.5 },
    { 0.949327488264e-1, 4,  2.0 },
    {-0.980469816509e-2, 5,  2.0 },
    { 0.165167634970e-4, 6,  5.0 },
    { 0.937359795772e-4, 7,  0.5 },
    {-0.123179218720e-9, 10, 10.0},
};
// clang-format on

/// The factor g by which neighbouring dipoles reinforce each other (Harris-Alder, extended).
double dipole_correlation(double temperature_k, double density_kg_m3) {
  const double delta = density_kg_m3 / water::critical_density_kg_m3;
  const double tau = water::critical_temperature_k / temperature_k;
  double g = 1 + 0.196096504426e-2 * delta * std::pow(temperature_k / 228.0 - 1, -1.2);
  for (const CorrelationTerm& term : correlation_terms) {
    g += term.n * std::pow(delta, term.i) * std::pow(tau, term.j);
  }
  return g;
}

}  // namespace

double water::permittivity(double temperature_k, double density_kg_m3) {
  const double molecules_per_m3 = avogadro_per_mol * density_kg_m3 / molar_mass_kg_per_mol;
  const double a = molecules_per_m3 * dipole_moment_c_m * dipole_moment_c_m *
                   dipole_correlation(temperature_k, density_kg_m3) /
                   (vacuum_permittivity * boltzmann_j_per_k * temperature_k);
  const double b = molecules_per_m3 * polarizability / (3 * vacuum_permittivity);
  return (1 + a + 5 * b + std::sqrt(9 + 2 * a + 18 * b + a * a + 10 * a * b + 9 * b * b)) /
         (4 - 4 * b);
}

double water_permittivity(Temperature temperature) {
  if (!water::is_in_range(temperature)) return std::numeric_limits<double>::quiet_NaN();
  return water::permittivity(in_kelvin(temperature), water_density(temperature).value());
}

}  // namespace ionledger
