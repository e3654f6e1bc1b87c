// Viscosity of water (IAPWS R12-08), whose enhancement near the critical point is left out: it is 1
// below 150 degC.
//
// The coefficients are from memory; they reproduce the check values of the release, see
// tests/water/viscosity_test.cpp.
#include <cmath>
#include <limits>

#include "water/formulations.hpp"

namespace ionledger {
namespace {

constexpr double dilute_gas[4] = {1.67752, 2.20462, 0.6366564, -0.241605};

/// residual[i][j] belongs to (T_c/T - 1)^i (rho/rho_c - 1)^j.
// clang-format off
constexpr double residual[6][7] = {
    { 5.20094e-1,  2.22531e-1, -2.81378e-1,  1.61913e-1, -3.25372e-2, 0,           0         },
    { 8.50895e-2,  9.99115e-1, -9.06851e-1,  2.57399e-1,  0,          0,           0         },
    {-1.08374,     1.88797,    -7.72479e-1,  0,           0,          0,           0         },
    {-2.89555e-1,  1.26613,    -4.89837e-1,  0,           6.98452e-2, 0,          -4.35673e-3},
    { 0,           0,          -2.57040e-1,  0,           0,          8.72102e-3,  0         },
    { 0,           1.20573e-1,  0,           0,           0,          0,          -5.93264e-4},
};
// clang-format on

}  // namespace

double water::viscosity_pa_s(double temperature_k, double density_kg_m3) {
  const double tau = critical_temperature_k / temperature_k;
  const double delta = density_kg_m3 / critical_density_kg_m3;
  double inverse = 0;
  for (int i = 0; i < 4; ++i) inverse += dilute_gas[i] * std::pow(tau, i);
  double exponent = 0;
  for (int i = 0; i < 6; ++i) {
    for (int j = 0; j < 7; ++j) {
      exponent += residual[i][j] * std::pow(tau - 1, i) * std::pow(delta - 1, j);
    }
  }
  return 1e-6 * 100 / (std::sqrt(tau) * inverse) * std::exp(delta * exponent);
}

double water_viscosity_pa_s(Temperature temperature) {
  if (!water::is_in_range(temperature)) return std::numeric_limits<double>::quiet_NaN();
  return water::viscosity_pa_s(in_kelvin(temperature), water_density(temperature).value());
}

}  // namespace ionledger
