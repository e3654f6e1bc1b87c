// What is dissolved in a litre and what remains of it when the litre is dried.
#include "ionledger/dissolved_solids.hpp"

#include <algorithm>

#include "assessment/forms.hpp"

namespace ionledger {
namespace {

bool is_gas(const Chemistry& chemistry, const Species& species) {
  return std::any_of(chemistry.gases.begin(), chemistry.gases.end(), [&](const Gas& gas) {
    return gas.formula == species.name;
  });
}

/// Mass each basis species loses, g/mol, when it is counted as its solid formula.
std::vector<double> losses_of(const Chemistry& chemistry) {
  std::vector<double> losses(static_cast<std::size_t>(chemistry.n_basis), 0.0);
  for (const auto& [name, formula] : chemistry.solid_formulas) {
    const int i = chemistry.species_index(name);
    const auto composition = composition_of(formula);
    if (i < 0 || i >= chemistry.n_basis || !composition) continue;
    const auto place = static_cast<std::size_t>(i);
    losses[place] = chemistry.species[place].molar_mass_g - molar_mass_g_per_mol(*composition);
  }
  return losses;
}

}  // namespace

double molality_of_form(const Chemistry& chemistry,
                        const std::vector<double>& molality,
                        int form,
                        int basis) {
  const std::vector<double>& wanted = chemistry.species[static_cast<std::size_t>(form)].formation;
  const auto b = static_cast<std::size_t>(basis);
  double sum = 0;
  for (std::size_t s = 0; s < chemistry.species.size(); ++s) {
    const std::vector<double>& formation = chemistry.species[s].formation;
    if (formation[0] == wanted[0] && formation[b] == wanted[b]) sum += molality[s];
  }
  return sum;
}

double dissolved_solids_mg_per_l(const Chemistry& chemistry,
                                 const Solution& solution,
                                 double litre_per_kg_water) {
  const std::vector<double> losses = losses_of(chemistry);
  double grams = 0;
  for (std::size_t s = 0; s < chemistry.species.size(); ++s) {
    const Species& species = chemistry.species[s];
    if (is_gas(chemistry, species)) continue;
    double molar_mass_g = species.molar_mass_g;
    for (std::size_t i = 0; i < losses.size(); ++i) {
      molar_mass_g -= species.formation[i] * losses[i];
    }
    grams += solution.molality[s] * molar_mass_g;
  }
  return 1000 * grams / litre_per_kg_water;
}

double residue_180_mg_per_l(const Chemistry& chemistry,
                            const Solution& solution,
                            double litre_per_kg_water) {
  const double solids = dissolved_solids_mg_per_l(chemistry, solution, litre_per_kg_water);
  const int bicarbonate = chemistry.species_index(chemistry.roles.bicarbonate);
  const int carbonate = chemistry.species_index(chemistry.roles.carbonate);
  if (bicarbonate < 0 || carbonate < 0) return solids;
  const double lost_g = chemistry.species[static_cast<std::size_t>(bicarbonate)].molar_mass_g -
                        chemistry.species[static_cast<std::size_t>(carbonate)].molar_mass_g / 2;
  const double lost = molality_of_form(chemistry, solution.molality, bicarbonate, carbonate);
  return solids - 1000 * lost * lost_g / litre_per_kg_water;
}

}  // namespace ionledger
