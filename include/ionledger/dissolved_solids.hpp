// Dissolved solids of a solved water: what a sum of its ions weighs, and what drying would leave.
#pragma once

#include "ionledger/equilibrium.hpp"

namespace ionledger {

/// Mass of everything dissolved but gases, mg per laboratory litre.
///
/// Sum over species of molality times molar mass. A species that is a gas of the models (CO2, NH3)
/// does not count; a basis species with an entry in chemistry.solid_formulas counts, in all its
/// species, as that formula (silicic acid as SiO2); bicarbonate counts in full.
/// `litre_per_kg_water` as in Stream.
[[nodiscard]] double dissolved_solids_mg_per_l(const Chemistry& chemistry,
                                               const Solution& solution,
                                               double litre_per_kg_water);

/// The same after drying at 180 degC: two bicarbonates leave one carbonate, so that half of what
/// they hold goes as CO2 and water (mg HCO3 times 0.4917 stay). Crystal water, which gypsum and
/// magnesium salts keep in part, and acids and ammonium salts, which go, are not considered.
/// Source   J. D. Hem, U.S. Geological Survey Water-Supply Paper 2254, 3rd ed. 1985 (the factor
///          0.4917); Standard Methods 1030 E, whose 0.6 times alkalinity is the same rule.
[[nodiscard]] double residue_180_mg_per_l(const Chemistry& chemistry,
                                          const Solution& solution,
                                          double litre_per_kg_water);

}  // namespace ionledger
