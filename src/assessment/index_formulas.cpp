// The published formulas of the trade's indices, nothing else.
#include <cmath>

#include "ionledger/indices.hpp"

namespace ionledger {

double langelier_pfm(double ionic_strength_mol_per_l, Temperature temperature) {
  const double t = in_kelvin(temperature);
  const double permittivity = 60954 / (t + 116) - 68.937;
  const double a = 1.82e6 * std::pow(permittivity * t, -1.5);
  const double root = std::sqrt(ionic_strength_mol_per_l);
  return a * (root / (1 + root) - 0.3 * ionic_strength_mol_per_l);
}

double langelier_saturation_ph(const SaturationPH& water) {
  const double pfm = langelier_pfm(water.ionic_strength_mol_per_l, water.temperature);
  const double carbonate_per_bicarbonate = std::pow(10.0, water.ph - water.pk2 + 3 * pfm);
  const double bicarbonate =
      water.carbonate_alkalinity_eq_per_l / (1 + 2 * carbonate_per_bicarbonate);
  return water.pk2 - water.pks - std::log10(water.calcium_mol_per_l) - std::log10(bicarbonate) +
         5 * pfm;
}

double practice_saturation_ph(double solids_mg_per_l,
                              double calcium_mg_per_l_as_caco3,
                              double alkalinity_mg_per_l_as_caco3,
                              Temperature temperature) {
  const double a = (std::log10(solids_mg_per_l) - 1) / 10;
  const double b = -13.12 * std::log10(in_celsius(temperature) + 273) + 34.55;
  const double c = std::log10(calcium_mg_per_l_as_caco3) - 0.4;
  const double d = std::log10(alkalinity_mg_per_l_as_caco3);
  return 9.3 + a + b - (c + d);
}

double ryznar_index(double saturation_ph, double ph) { return 2 * saturation_ph - ph; }

double puckorius_equilibrium_ph(double alkalinity_mg_per_l_as_caco3) {
  return 1.465 * std::log10(alkalinity_mg_per_l_as_caco3) + 4.54;
}

double larson_skold_index(double chloride_eq, double sulfate_eq, double carbonate_alkalinity_eq) {
  return (chloride_eq + sulfate_eq) / carbonate_alkalinity_eq;
}

double aggressive_index(double ph,
                        double alkalinity_mg_per_l_as_caco3,
                        double calcium_mg_per_l_as_caco3) {
  return ph + std::log10(alkalinity_mg_per_l_as_caco3 * calcium_mg_per_l_as_caco3);
}

double sodium_adsorption_ratio(double sodium_meq_per_l,
                               double calcium_meq_per_l,
                               double magnesium_meq_per_l) {
  return sodium_meq_per_l / std::sqrt((calcium_meq_per_l + magnesium_meq_per_l) / 2);
}

}  // namespace ionledger
