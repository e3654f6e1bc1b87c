// Indices of the water trade, each by its published formula and with the numbers that went into it.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "ionledger/equilibrium.hpp"

namespace ionledger {

// ---- the formulas; concentrations per litre, "as CaCO3" in mg/L

/// What Langelier's index is computed from.
struct SaturationPH {
  double ph = 7;                             ///< Of the water; splits its carbonate alkalinity.
  double calcium_mol_per_l = 0;              ///< Total, > 0.
  double carbonate_alkalinity_eq_per_l = 0;  ///< Bicarbonate + 2 carbonate, > 0.
  double ionic_strength_mol_per_l = 0;
  double pk2 = 0;  ///< Of bicarbonate, at `temperature`.
  double pks = 0;  ///< Of calcium carbonate, at `temperature`.
  Temperature temperature = celsius(25.0);
};

/// Activity term of one charge in Langelier's index:
/// pfm = A (sqrt(I)/(1 + sqrt(I)) - 0.3 I), A = 1.82e6 (E T)^-1.5, E = 60954/(T + 116) - 68.937.
/// Range    I to 0.5 mol/L.
/// Source   Standard Methods for the Examination of Water and Wastewater, 2330 B, from memory.
[[nodiscard]] double langelier_pfm(double ionic_strength_mol_per_l, Temperature temperature);

/// pH at which the water, with its calcium and bicarbonate, would be saturated, corrected for
/// activity and without ion pairs:
///
///     pHs     = pK2 - pKs + p[Ca] + p[HCO3] + 5 pfm
///     [HCO3]  = alkalinity / (1 + 2 10^(pH - pK2 + 3 pfm))
///
/// Source   W. F. Langelier, J. Am. Water Works Assoc. 28 (1936) 1500; Standard Methods 2330 B. The
///          second line is mass action, with the 2 that the charge of carbonate asks for.
[[nodiscard]] double langelier_saturation_ph(const SaturationPH& water);

/// The same by the formula of daily practice, logarithms of dissolved solids, temperature, calcium
/// and alkalinity:
///
///     pHs = (9.3 + A + B) - (C + D)
///     A = (log10 TDS - 1)/10        B = -13.12 log10(T) + 34.55
///     C = log10(calcium) - 0.4      D = log10(alkalinity)
///
/// Range    TDS to 10 000 mg/L, 0 to 90 degC; all arguments > 0.
/// Errors   0.1 to 0.2 against the one above below 1000 mg/L, more beyond.
/// Source   W. F. Langelier 1936, in the analytic form of water-treatment handbooks. Tables of A
///          and B in print differ from it by up to 0.3.
[[nodiscard]] double practice_saturation_ph(double solids_mg_per_l,
                                            double calcium_mg_per_l_as_caco3,
                                            double alkalinity_mg_per_l_as_caco3,
                                            Temperature temperature);

/// 2 pHs - pH. Source: J. W. Ryznar, J. Am. Water Works Assoc. 36 (1944) 472.
[[nodiscard]] double ryznar_index(double saturation_ph, double ph);

/// pH that a cooling water with this alkalinity takes on: 1.465 log10(alkalinity) + 4.54.
/// Source   P. R. Puckorius and J. M. Brooke, Corrosion 47 (1991) 280. Reprints with 1.485 are
///          misprints: their tables follow 1.465.
[[nodiscard]] double puckorius_equilibrium_ph(double alkalinity_mg_per_l_as_caco3);

/// (chloride + sulfate) / (bicarbonate + carbonate), all in equivalents.
/// Source   T. E. Larson and R. V. Skold, Corrosion 14 (1958) 285t.
[[nodiscard]] double larson_skold_index(double chloride_eq,
                                        double sulfate_eq,
                                        double carbonate_alkalinity_eq);

/// pH + log10(alkalinity x calcium hardness). Source: AWWA Standard C400.
[[nodiscard]] double aggressive_index(double ph,
                                      double alkalinity_mg_per_l_as_caco3,
                                      double calcium_mg_per_l_as_caco3);

/// sodium / sqrt((calcium + magnesium)/2), in meq/L.
/// Source   L. A. Richards (ed.), U.S. Department of Agriculture Handbook 60, 1954.
[[nodiscard]] double sodium_adsorption_ratio(double sodium_meq_per_l,
                                             double calcium_meq_per_l,
                                             double magnesium_meq_per_l);

// ---- what takes an equilibrium of its own; empty when that was not found

/// Calcium carbonate that must precipitate (+) or dissolve (-) until the water is in equilibrium
/// with it, closed to the air, at the temperature of `solution`; mol per kg of water.
/// `mineral`  index of the calcium carbonate, chemistry.roles.calcium_carbonate.
/// Source   Standard Methods 2330 C defines it; here it is the equilibrium itself, no chart.
[[nodiscard]] std::optional<double> precipitation_potential_mol_per_kg(const Solution& solution,
                                                                       int mineral,
                                                                       const Chemistry& chemistry,
                                                                       const ActivityModel& model);

/// Strong acid that brings the water to `end_ph` at 25 degC, eq per kg of water; 0 when it is there
/// already. A titration in the computer: nothing escapes, and the acid neither dilutes the sample
/// nor adds to its ionic strength.
[[nodiscard]] std::optional<double> titrated_alkalinity_eq_per_kg(const Solution& solution,
                                                                  double end_ph,
                                                                  const Chemistry& chemistry,
                                                                  const ActivityModel& model);

/// Strong base per unit of pH at the pH of `solution`, closed, eq per kg of water: the central
/// difference over +-0.01.
/// Errors   2e-4 relative of the difference.
/// Source   D. D. Van Slyke, J. Biol. Chem. 52 (1922) 525.
[[nodiscard]] std::optional<double> buffer_intensity_eq_per_kg(const Solution& solution,
                                                               const Chemistry& chemistry,
                                                               const ActivityModel& model);

// ---- all of them for one water

/// One number that went into an index.
struct IndexInput {
  std::string name;
  double value = 0;
  std::string unit;  ///< Empty for a pure number.
};

/// One index of one water.
struct IndexLine {
  std::string key;              ///< As in JSON: "langelier".
  std::string title;            ///< "Langelier saturation index, corrected for activity"
  std::optional<double> value;  ///< Empty when an input is missing.
  std::string unit;
  std::string formula;
  std::string source;
  std::vector<IndexInput> inputs;
  std::string missing;  ///< What is missing, when there is no value.
};

/// A solved water as the indices see it.
struct IndexWater {
  const Solution& solution;
  double litre_per_kg_water = 1;  ///< As in Stream.
  double solids_mg_per_l = 0;     ///< dissolved_solids_mg_per_l.
  std::vector<bool> known;        ///< n_basis: totals that were measured or follow from others.
};

/// Every index, always in the same order. Which species they speak of: chemistry.roles.
[[nodiscard]] std::vector<IndexLine> indices_of(const IndexWater& water,
                                                const Chemistry& chemistry,
                                                const ActivityModel& model);

}  // namespace ionledger
