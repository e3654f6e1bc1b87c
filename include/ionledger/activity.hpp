// Activity models: every one of them is ln(gamma) = -debye sqrt(I)/(1 + size sqrt(I)) + linear I
// with its own three numbers for each species, so that the solver needs to know only the numbers.
#pragma once

#include <map>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "ionledger/chemistry.hpp"
#include "ionledger/water.hpp"

namespace ionledger {

/// What turns a species into numbers.
enum class ActivityForm {
  davies,                  ///< log10 g = -A z^2 (sqrt I/(1+sqrt I) - b I)
  extended_debye_hueckel,  ///< log10 g = -A z^2 sqrt I/(1 + B size sqrt I)
  truesdell_jones,         ///< log10 g = -A z^2 sqrt I/(1 + B size sqrt I) + b I
  neutral,                 ///< log10 g = b I
};

/// Parameters of one species in one model.
struct ActivityParameters {
  ActivityForm form = ActivityForm::davies;
  double size_angstrom = 0;  ///< Ion size; unused by davies and neutral.
  double linear = 0;         ///< b, kg/mol.
  std::string source;        ///< Key into Chemistry::sources.
};

/// A named model. `davies`, `extended-debye-huckel`, `truesdell-jones` are read from
/// models/activity.toml.
struct ActivityModel {
  std::string name;
  std::string title;                    ///< "Truesdell and Jones (1974), with Kielland sizes ..."
  double max_ionic_strength_molal = 0;  ///< Up to here its authors trust it.
  std::string source;
  std::string note;
  ActivityParameters ions;      ///< For an ion without its own entry.
  ActivityParameters neutrals;  ///< For a neutral species without its own entry.
  ActivityParameters pairs;  ///< For a charged ion pair (Species::is_pair) without its own entry.
  std::map<std::string, ActivityParameters> species;
  /// a_w = 1 - water_activity_slope * sum of molalities; kg/mol.
  double water_activity_slope = 0.017;
};

/// ln(gamma) = -debye sqrt(I)/(1 + size sqrt(I)) + linear I. I in mol per kg of water.
struct ActivityTerm {
  double debye = 0;   ///< (kg/mol)^(1/2)
  double size = 0;    ///< (kg/mol)^(1/2)
  double linear = 0;  ///< kg/mol
  friend bool operator==(const ActivityTerm& a, const ActivityTerm& b) {
    return a.debye == b.debye && a.size == b.size && a.linear == b.linear;
  }
};

/// The three numbers of a species of charge `charge_number`, with A and B from `slopes`:
///
///     form                     debye        size    linear
///     davies                   ln10 A z^2   1       ln10 A z^2 b
///     extended_debye_hueckel   ln10 A z^2   B size  0
///     truesdell_jones          ln10 A z^2   B size  ln10 b
///     neutral                  0            0       ln10 b
///
/// Units   A in (kg/mol)^(1/2), decadic; B in (kg/mol)^(1/2) per ångström; b in kg/mol.
/// Range   any; NaN slopes (temperature outside 0..150 degC) give NaN for all forms but neutral.
/// Sources C. W. Davies, Ion Association, Butterworths, London, 1962; P. Debye and E. Hückel,
///         Phys. Z. 24 (1923) 185-206; A. H. Truesdell and B. F. Jones, J. Res. US Geol. Survey 2
///         (1974) 233-248. The parameters are data: models/activity.toml.
[[nodiscard]] ActivityTerm activity_term(const ActivityParameters& parameters,
                                         int charge_number,
                                         const DebyeHueckelSlopes& slopes);

/// Which parameters `model` gives to `species`: its own entry; else `neutrals` for charge 0,
/// `pairs` for a charged pair, `ions` for the rest. The reference points into `model`.
[[nodiscard]] const ActivityParameters& parameters_of(const ActivityModel& model,
                                                      const Species& species);

/// Terms of every species of `chemistry`, in its order (n_species), at `temperature`; range as in
/// activity_term.
[[nodiscard]] std::vector<ActivityTerm> activity_terms(const ActivityModel& model,
                                                       const Chemistry& chemistry,
                                                       Temperature temperature);

/// Tested bound on the rounding of ln_activity_coefficient, relative to the larger of its two
/// parts.
inline constexpr double ln_activity_coefficient_error = 2e-15;

/// ln(gamma), molality scale: the natural logarithm of the activity coefficient, dimensionless.
///
///     ln(gamma) = -debye sqrt(I)/(1 + size sqrt(I)) + linear I
///
/// Units   I in mol per kg of water.
/// Range   I >= 0 (asserted). Beyond ActivityModel::max_ionic_strength_molal the formula is still
///         evaluated; the caller cautions.
/// Limits  I = 0 returns 0 exactly.
[[nodiscard]] double ln_activity_coefficient(const ActivityTerm& term,
                                             double ionic_strength_molal) noexcept;

}  // namespace ionledger
