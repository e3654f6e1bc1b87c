// A stream in the solver's own terms: totals per kg of water, temperature, what is known of its pH
// and carbon, and what closes the charge.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "ionledger/analysis.hpp"
#include "ionledger/chemistry.hpp"
#include "ionledger/diagnostic.hpp"

namespace ionledger {

/// What a person should know about a result, beside the numbers.
struct Caution {
  std::string about;  ///< Short subject: "ion balance", "calcite", "ionic strength".
  std::string says;   ///< One or two full sentences.
};

/// How one reported value was turned into moles, for the reader who checks it by hand.
struct Conversion {
  std::string constituent;   ///< Canonical name.
  std::string as_written;    ///< "96 mg/L"
  double mol_per_litre = 0;  ///< eq for alkalinity and hardness; NaN when written per kg of water.
  double mol_per_kg = 0;     ///< Per kg of water.
  std::optional<double> relative_uncertainty;
};

/// A stream before its charges are closed.
struct Stream {
  std::string name;
  Temperature temperature = celsius(25.0);
  Pressure pressure = 101325.0 * Pressure::unit_type();
  std::optional<VolumeFlow> flow;
  std::optional<Conductivity> measured_conductivity;

  /// n_basis totals, mol per kg of water. The hydrogen total (index 0) is filled by closing.
  std::vector<double> totals;
  std::vector<bool> reported;  ///< n_basis: which totals the analysis spoke of (zero counts).

  std::optional<MeasuredPH> ph;
  std::optional<double> alkalinity_eq_per_kg;
  int carbon_component = -1;  ///< The total that alkalinity settles when the pH is known.
  bool inorganic_carbon_is_known = false;
  std::optional<double> hardness_eq_per_kg;  ///< As reported, for the check against Ca and Mg.
  Closure::By closed_by = Closure::By::nothing;
  int closing_component = -1;  ///< Basis index, when closed_by is a constituent.
  SourceSpan closure_span, alkalinity_span, carbon_span, stream_span;

  std::vector<Conversion> conversions;
  std::vector<Caution> cautions;
  /// Laboratory litres that hold one kg of water with its solutes, and their density.
  double litre_per_kg_water = 0;
  double laboratory_density_kg_per_l = 0;
  bool density_is_measured = false;
};

/// Totals per kg of water from a laboratory report.
///
/// Volumes are laboratory litres at 25 degC. One kg of water with molalities m_i fills
/// V = 1/rho_w + sum m_i V_i (partial molar volumes of the species each constituent mostly is), so
/// a value c_i per litre is m_i = c_i V; V follows in closed form from V (1 - sum c_i V_i) =
/// 1/rho_w. A measured density replaces this volume. Values per kg of solution use the mass 1 + sum
/// m_i M_i in the same manner.
///
/// Errors   (in `diagnostics`, nullopt returned) unknown or ambiguous constituent, a mass unit that
///          needs "as ...", a basis that does not belong, meq/L where it means nothing, a
///          constituent given twice, a closing constituent that is unknown or not a total, hardness
///          that is less than the calcium or magnesium it must contain, solutes that fill more than
///          the litre.
[[nodiscard]] std::optional<Stream> make_stream(const Analysis& analysis,
                                                const Chemistry& chemistry,
                                                Diagnostics& diagnostics);

}  // namespace ionledger
