// How much room solutes take: what turns litres into kilograms of water.
#pragma once

#include <vector>

#include "ionledger/chemistry.hpp"
#include "ionledger/units.hpp"

namespace ionledger {

/// Partial molar volume of a species at infinite dilution and 25 degC, L/mol. A species without its
/// own number takes the sum over its basis species and water (18.07 cm3/mol), that is, a reaction
/// volume of zero. Basis species without a number count as zero.
/// Source   additivity of ionic volumes: F. J. Millero, Chem. Rev. 71 (1971) 147.
[[nodiscard]] double molar_volume_l_per_mol(const Chemistry& chemistry, int species);

/// Volume of one kg of water with the given molalities (n_species), L:
/// 1/rho_w(T) + sum m_i V_i + S_v I^1.5 with S_v the limiting slope for volumes at 25 degC.
/// Range    the volumes are those of 25 degC at every temperature: the density error this leaves is
///          below 0.1 % for ionic strengths to 0.5 and 0 to 60 degC.
[[nodiscard]] double solution_volume_l(const Chemistry& chemistry,
                                       const std::vector<double>& molality,
                                       double ionic_strength,
                                       Temperature temperature);

/// Mass of the same, kg: 1 + sum m_i M_i.
[[nodiscard]] double solution_mass_kg(const Chemistry& chemistry,
                                      const std::vector<double>& molality);

}  // namespace ionledger
