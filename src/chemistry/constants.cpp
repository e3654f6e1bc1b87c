// Equilibrium constants against temperature, reaction by reaction and on the basis.
#include <cmath>
#include <numbers>

#include "ionledger/chemistry.hpp"
#include "ionledger/water.hpp"

namespace ionledger {
namespace {

constexpr double reference_k = 298.15;
constexpr double gas_constant = 8.314462618;  // J/(mol K), exact from the SI of 2019 (CODATA 2018).

double ln_k(const EquilibriumConstant& constant, Temperature temperature) {
  return log10_k(constant, temperature) * std::numbers::ln10;
}

double combine(const std::vector<std::pair<int, double>>& parts,
               const std::vector<double>& ln_own) {
  double sum = 0;
  for (const auto& [species, multiplier] : parts) {
    sum += multiplier * ln_own[static_cast<std::size_t>(species)];
  }
  return sum;
}

std::vector<double> ln_own_constants(const Chemistry& chemistry, Temperature temperature) {
  std::vector<double> ln_own(chemistry.species.size(), 0.0);
  for (std::size_t s = static_cast<std::size_t>(chemistry.n_basis); s < ln_own.size(); ++s) {
    ln_own[s] = ln_k(chemistry.species[s].constant, temperature);
  }
  return ln_own;
}

}  // namespace

double log10_k(const EquilibriumConstant& constant, Temperature temperature) {
  const double t = in_kelvin(temperature);
  if (constant.is_water_ion_product) return water_log10_ion_product(temperature);
  if (constant.of_temperature) {
    const TemperatureFunction& f = *constant.of_temperature;
    const double d = t - reference_k;
    return f.to_log10_k *
           (f.constant + f.per_t / t + f.log10_t * std::log10(t) + f.ln_t * std::log(t) +
            f.t_1 * t + f.t_2 * t * t + f.per_t2 / (t * t) + f.theta * d + f.theta_2 * d * d);
  }
  // van 't Hoff, integrated with a constant heat capacity of reaction.
  const double enthalpy = 1000.0 * constant.enthalpy_kj_per_mol.value_or(0.0);
  const double heat_capacity = constant.heat_capacity_j_per_mol_k.value_or(0.0);
  const double ln_change =
      enthalpy / gas_constant * (1 / reference_k - 1 / t) +
      heat_capacity / gas_constant * (std::log(t / reference_k) + reference_k / t - 1);
  return constant.log10_k + ln_change / std::numbers::ln10;
}

std::vector<double> ln_formation(const Chemistry& chemistry, Temperature temperature) {
  const std::vector<double> ln_own = ln_own_constants(chemistry, temperature);
  std::vector<double> result;
  result.reserve(chemistry.species.size());
  for (const Species& species : chemistry.species) {
    result.push_back(combine(species.formation_constants, ln_own));
  }
  return result;
}

std::vector<double> ln_solubility(const Chemistry& chemistry, Temperature temperature) {
  const std::vector<double> ln_own = ln_own_constants(chemistry, temperature);
  std::vector<double> result;
  result.reserve(chemistry.minerals.size());
  for (const Mineral& mineral : chemistry.minerals) {
    result.push_back(ln_k(mineral.constant, temperature) +
                     combine(mineral.dissolution_constants, ln_own));
  }
  return result;
}

std::vector<double> ln_dissolution(const Chemistry& chemistry, Temperature temperature) {
  const std::vector<double> ln_own = ln_own_constants(chemistry, temperature);
  std::vector<double> result;
  result.reserve(chemistry.gases.size());
  for (const Gas& gas : chemistry.gases) {
    // K is per published unit of pressure; per bar it is smaller by bar_per_unit.
    result.push_back(ln_k(gas.constant, temperature) + combine(gas.dissolution_constants, ln_own) -
                     std::log(gas.bar_per_unit));
  }
  return result;
}

}  // namespace ionledger
