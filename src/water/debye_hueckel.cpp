// Debye-Hückel slopes from fundamental constants: no table, so that they follow the density and
// permittivity used everywhere else.
#include <cmath>
#include <numbers>

#include "ionledger/water.hpp"

namespace ionledger {
namespace {

// CODATA 2018; the first three are exact.
constexpr double elementary_charge_c = 1.602176634e-19;
constexpr double boltzmann_j_per_k = 1.380649e-23;
constexpr double avogadro_per_mol = 6.02214076e23;
constexpr double vacuum_permittivity = 8.8541878128e-12;  // C^2/(J m)

}  // namespace

DebyeHueckelSlopes debye_hueckel_slopes(Temperature temperature) {
  // Out of range, density and permittivity are NaN and so are the slopes.
  const double ions_per_kg_m3 = avogadro_per_mol * water_density(temperature).value();
  // e^2/(eps_0 eps k T): 4 pi times the distance at which two charges hold each other against kT.
  const double coupling_m = elementary_charge_c * elementary_charge_c /
                            (vacuum_permittivity * water_permittivity(temperature) *
                             boltzmann_j_per_k * in_kelvin(temperature));
  const double inverse_length = std::sqrt(2 * coupling_m * ions_per_kg_m3);  // at I = 1 mol/kg
  return {inverse_length * coupling_m / (8 * std::numbers::pi * std::numbers::ln10),
          inverse_length * 1e-10};
}

}  // namespace ionledger
