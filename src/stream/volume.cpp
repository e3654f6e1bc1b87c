// How much room solutes take; separate because reading a report and reporting a density both need
// it.
#include "stream/volume.hpp"

#include <cmath>

#include "ionledger/water.hpp"

namespace ionledger {
namespace {

constexpr double water_volume_cm3 =
    18.07;  // per mol of liquid water at 25 degC: 18.015 g / 0.99705 g/cm3
// Debye-Hückel limiting slope for apparent volumes, per mol of ionic strength: (2/3) 1.868 cm3
// kg^1/2 mol^-3/2 times z^2/2 summed over the ions gives 1.868 I^1.5 for the solution, 25 degC.
// Source: O. Redlich and D. M. Meyer, Chem. Rev. 64 (1964) 221 (1.868), from memory.
constexpr double volume_slope_cm3 = 1.868;

}  // namespace

double molar_volume_l_per_mol(const Chemistry& chemistry, int species) {
  const Species& s = chemistry.species[static_cast<std::size_t>(species)];
  if (s.molar_volume_cm3) return *s.molar_volume_cm3 / 1000;
  double volume = s.water_exponent * water_volume_cm3;
  for (std::size_t i = 0; i < s.formation.size(); ++i) {
    volume += s.formation[i] * chemistry.species[i].molar_volume_cm3.value_or(0.0);
  }
  return species < chemistry.n_basis ? 0.0 : volume / 1000;
}

double solution_volume_l(const Chemistry& chemistry,
                         const std::vector<double>& molality,
                         double ionic_strength,
                         Temperature temperature) {
  double volume = 1000.0 / water_density(temperature).value();
  for (std::size_t s = 0; s < molality.size(); ++s) {
    if (molality[s] == 0) continue;
    volume += molality[s] * molar_volume_l_per_mol(chemistry, static_cast<int>(s));
  }
  return volume + volume_slope_cm3 / 1000 * std::pow(ionic_strength, 1.5);
}

double solution_mass_kg(const Chemistry& chemistry, const std::vector<double>& molality) {
  double mass = 1;
  for (std::size_t s = 0; s < molality.size(); ++s) {
    mass += molality[s] * chemistry.species[s].molar_mass_g / 1000;
  }
  return mass;
}

}  // namespace ionledger
