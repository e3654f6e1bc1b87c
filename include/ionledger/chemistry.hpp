// Chemistry as data: species, reactions, minerals, gases and constituents, each with its constants
// and their sources. The code knows only water, H+ and electric charge by name.
#pragma once

#include <map>
#include <optional>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

#include "ionledger/units.hpp"

namespace ionledger {

/// How well a number was confirmed by whoever wrote the data.
enum class Standing {
  read_in_source,      ///< Read in the paper or standard itself.
  secondary_table,     ///< Read in a handbook or review that quotes the source.
  reproduces_a_check,  ///< Remembered, and confirmed by reproducing published measurements.
  from_memory,         ///< Remembered; not re-read.
  estimated,           ///< Chosen here between published values or by analogy; the note says how.
};

/// Temperatures between which a number may be used without a caution, degrees Celsius.
struct TemperatureRange {
  double low_degc = 0;
  double high_degc = 0;
};

/// One way of writing log10 K (or pK, or ln K) against temperature, t in K:
///
///     constant + per_t/t + log10_t log10(t) + ln_t ln(t) + t_1 t + t_2 t^2 + per_t2/t^2
///       + theta (t - 298.15) + theta_2 (t - 298.15)^2
///
/// `to_log10_k` turns the sum into log10 K: 1 for log10 K, -1 for pK, 1/ln(10) for ln K.
struct TemperatureFunction {
  double to_log10_k = 1;
  double constant = 0, per_t = 0, log10_t = 0, ln_t = 0, t_1 = 0, t_2 = 0, per_t2 = 0;
  double theta = 0, theta_2 = 0;
};

/// A value that was published and not chosen.
struct AlternativeValue {
  double log10_k = 0;  ///< At 25 degC.
  std::string source;  ///< Key into Chemistry::sources.
  std::string note;
};

/// An equilibrium constant of the reaction as it was published.
struct EquilibriumConstant {
  double log10_k = 0;  ///< At 25 degC, molality scale, infinite dilution.
  std::optional<TemperatureFunction> of_temperature;
  bool is_water_ion_product =
      false;                        ///< Takes water_log10_ion_product() instead of a function here.
  std::string step_at_25_is_known;  ///< Why the function may miss log10_k at 25 degC by over 0.02.
  std::optional<double> enthalpy_kj_per_mol;        ///< Of reaction at 25 degC.
  std::optional<double> heat_capacity_j_per_mol_k;  ///< Of reaction, constant.
  TemperatureRange valid;
  double uncertainty = 0;  ///< One standard deviation of log10 K at 25 degC.
  bool uncertainty_is_estimated = false;
  std::string source;  ///< Key into Chemistry::sources.
  Standing standing = Standing::from_memory;
  std::string note;
  std::vector<AlternativeValue> alternatives;
};

/// log10 K at `temperature`: the function where there is one; else van 't Hoff with the enthalpy
/// and heat capacity; else the value at 25 degC. Defined everywhere; the caller cautions outside
/// `valid`.
[[nodiscard]] double log10_k(const EquilibriumConstant& constant, Temperature temperature);

/// Numbers of atoms by element symbol.
using Composition = std::map<std::string, double>;

/// Atoms of a formula such as "CaSO4", "Al(OH)4-" or "Mg(NH4)PO4(H2O)6", charge ignored; nullopt
/// when it is not a formula or names an unknown element.
[[nodiscard]] std::optional<Composition> composition_of(std::string_view formula);

/// Molar mass from the standard atomic weights (IUPAC 2021, abridged), g/mol.
[[nodiscard]] double molar_mass_g_per_mol(const Composition& composition);

/// A participant of a reaction and its coefficient (products positive).
using Term = std::pair<std::string, double>;

/// A dissolved species. Basis species come first and have no reaction.
struct Species {
  std::string name;  ///< Formula and charge: "Ca+2", "HCO3-", "CaCO3".
  int charge_number = 0;
  Composition composition;
  double molar_mass_g = 0;
  bool is_pair = false;        ///< From a [[pair]] table: two ions associated.
  std::string file;            ///< Model file it came from.
  std::vector<Term> reaction;  ///< As published; the species itself is one of the terms.
  std::string reaction_text;
  EquilibriumConstant constant;
  /// Formation from the basis: ln a = ln K + sum coefficient ln a_basis + water_exponent ln a_w.
  std::vector<double> formation;  ///< n_basis coefficients.
  double water_exponent = 0;
  /// ln K of formation = sum of multiplier * ln K of the published reaction of species[first].
  std::vector<std::pair<int, double>> formation_constants;
  std::optional<double> molar_volume_cm3;  ///< Partial molar volume at infinite dilution, 25 degC.
};

/// A mineral; its reaction is its dissolution.
struct Mineral {
  std::string name;     ///< "calcite"
  std::string formula;  ///< "CaCO3"
  Composition composition;
  double molar_mass_g = 0;
  std::string file;
  std::vector<Term> reaction;
  std::string reaction_text;
  EquilibriumConstant constant;
  /// Ion activity product: ln Q = sum coefficient ln a_basis + water_exponent ln a_w.
  std::vector<double> dissolution;
  double water_exponent = 0;
  /// ln Q at saturation = ln K of the reaction + sum of multiplier * ln K of species[first].
  std::vector<std::pair<int, double>> dissolution_constants;
  bool is_common_scale =
      true;            ///< False: saturation is reported, but it rarely forms by itself in a plant.
  std::string remark;  ///< What a plant chemist should know about it, one sentence.
};

/// A gas; its reaction is its dissolution, its pressure in bar inside the code.
struct Gas {
  std::string name;     ///< "carbon dioxide"
  std::string formula;  ///< "CO2"
  double molar_mass_g = 0;
  std::string file;
  std::vector<Term> reaction;
  std::string reaction_text;
  EquilibriumConstant constant;
  double bar_per_unit = 1;       ///< Pressure unit of the published constant: 1.01325 for atm.
  double caution_above_bar = 0;  ///< 0: no caution of its own.
  std::string caution;           ///< What can hurt above that pressure, one or two sentences.
  std::vector<double> dissolution;
  double water_exponent = 0;
  std::vector<std::pair<int, double>> dissolution_constants;  ///< As for a mineral.
};

/// What one word of a laboratory report means.
struct Constituent {
  /// How a value acts on the stream.
  enum class Kind { total, alkalinity, hardness };
  std::string name;                  ///< "calcium"
  std::vector<std::string> symbols;  ///< Also accepted: "Ca", "Ca+2".
  Kind kind = Kind::total;
  std::string basis_species;  ///< The basis species whose total it is; empty unless kind is total.
  /// Basis species behind the two kinds that are not totals: the two that hardness counts; the one
  /// whose total alkalinity settles when the pH is known.
  std::vector<std::string> parts;
  /// Formula after "as" -> mol of the constituent (eq, for alkalinity and hardness) in one mole of
  /// it.
  std::map<std::string, double> as;
  /// What a mass unit without "as" means; empty where it must be said.
  std::string plain;
  /// Equivalents in one mole, for meq/L; 0 where meq means nothing.
  double equivalents = 0;
  /// Reported in every full analysis of a natural water: its absence deserves a caution.
  bool is_major = false;
  /// Species the constituent mostly is at neutral pH: its volume and mass when the litre is turned
  /// into kg.
  std::string mostly;
};

/// A word people write that could mean two things.
struct AmbiguousWord {
  std::string word;
  std::string question;  ///< "ferrous_iron (dissolved, Fe(II)) or ferric_iron (Fe(III))?"
};

/// What one ion carries at infinite dilution.
struct IonConductivity {
  double limiting_s_cm2_per_eq = 0;  ///< At 25 degC, per mole of charge.
  /// n of lambda(T) = lambda(25 degC) (viscosity of water at 25 degC / at T)^n.
  double viscosity_exponent = 0;
  std::string source;           ///< Key into Chemistry::sources, of the limiting value.
  std::string exponent_source;  ///< Of the exponent; empty where it is the convention.
  Standing standing = Standing::from_memory;
  std::string note;
};

/// Numbers from which the conductivity of a solution follows.
struct ConductivityModel {
  std::string title;   ///< One line for the report.
  std::string source;  ///< Key into Chemistry::sources, of the method.
  std::string note;
  /// Effective ion sizes for charge 1, 2, ...; the last holds for every higher charge.
  std::vector<double> sizes_angstrom;
  /// Limiting values of ions without an entry, for charge 1, 2, ...; the last for every higher one.
  std::vector<double> unlisted_s_cm2_per_eq;
  double unlisted_viscosity_exponent = 0;
  std::map<std::string, IonConductivity> ions;  ///< By species name.
};

/// Which species and mineral the published indices of the trade speak of. An empty name: these
/// models have none, and an index that needs it has no value.
struct IndexRoles {
  std::string calcium, magnesium, sodium, chloride, sulfate, carbonate;  ///< Basis species.
  std::string bicarbonate;                                               ///< A species.
  std::string calcium_carbonate;                                         ///< A mineral.
};

/// Everything the program knows about chemistry. Immutable after reading.
struct Chemistry {
  std::string name;    ///< Name of the coherent set.
  std::string digest;  ///< "sha256:" and 64 hexadecimal digits over all model files, in name order.
  std::vector<Species> species;  ///< The first n_basis are the basis; species[0] is H+.
  int n_basis = 0;
  std::vector<Mineral> minerals;
  std::vector<Gas> gases;
  std::vector<Constituent> constituents;
  std::vector<AmbiguousWord> ambiguous_words;
  /// Proton condition of alkalinity: eq = -T(H+) + sum reference_protons[i] T(i); n_basis numbers.
  std::vector<double> reference_protons;
  std::map<std::string, std::string> sources;  ///< Key -> full citation.
  ConductivityModel conductivity;
  IndexRoles roles;
  /// Basis species -> formula it counts as among dissolved solids: "H4SiO4" -> "SiO2".
  std::map<std::string, std::string> solid_formulas;

  [[nodiscard]] int species_index(std::string_view name) const;  ///< -1 when there is none.
  [[nodiscard]] int mineral_index(std::string_view name) const;
  [[nodiscard]] int gas_index(std::string_view name) const;
  /// By name or symbol, letter case of names ignored; -1 when there is none.
  [[nodiscard]] int constituent_index(std::string_view name_or_symbol) const;
};

/// ln K of formation of every species from the basis (0 for the basis itself), n_species numbers.
[[nodiscard]] std::vector<double> ln_formation(const Chemistry& chemistry, Temperature temperature);
/// ln of the solubility product of every mineral on the basis, n_minerals numbers.
[[nodiscard]] std::vector<double> ln_solubility(const Chemistry& chemistry,
                                                Temperature temperature);
/// ln of Q at 1 bar of every gas on the basis, n_gases numbers: ln p(bar) = ln Q - ln_dissolution.
[[nodiscard]] std::vector<double> ln_dissolution(const Chemistry& chemistry,
                                                 Temperature temperature);

}  // namespace ionledger
