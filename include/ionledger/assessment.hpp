// Everything a person or a machine reads about a stream. Terminal, JSON and pages take their
// numbers from here.
#pragma once

#include <limits>
#include <optional>
#include <string>
#include <vector>

#include "ionledger/equilibrium.hpp"
#include "ionledger/indices.hpp"
#include "ionledger/treatment.hpp"

namespace ionledger {

struct LedgerLine {
  std::string species;
  int charge = 0;
  double molality = 0;   ///< mol per kg of water.
  double eq_per_kg = 0;  ///< charge * molality: positive for cations, negative for anions.
};

struct TotalLine {
  std::string constituent;
  double mol_per_kg = 0;
  double mg_per_l =
      0;  ///< Of the constituent as its `plain` or first `as` formula, in the laboratory litre.
  std::string as_formula;
  std::string as_written;  ///< From the report; empty when nothing was written.
};

struct SpeciesLine {
  std::string species;
  int charge = 0;
  double molality = 0;
  double activity_coefficient = 1;
  double activity = 0;
};

struct MineralLine {
  std::string mineral;
  std::string formula;
  double saturation_index = 0;
  double uncertainty =
      0;  ///< One standard deviation of the index from the constant of the mineral alone.
  bool is_common_scale = true;
  std::string remark;
  double deposit_mol_per_kg = 0;
};

struct GasLine {
  std::string gas;
  std::string formula;
  double partial_pressure_bar = 0;
};

/// One state of the water, complete.
struct AssessedState {
  std::string name = "as_received";
  double temperature_degc = 25;
  double pressure_bar = 1.01325;
  double ph = std::numeric_limits<double>::quiet_NaN();
  std::string ph_from;  ///< In words: "measured", "charge balance", ...
  std::optional<double> measured_ph, measured_ph_degc;
  double ionic_strength = 0;
  double water_activity = 1;
  double density_kg_per_l = 1;
  double alkalinity_eq_per_kg = 0;
  std::optional<double> measured_conductivity_us_cm;  ///< At 25 degC, as laboratories report it.
  /// Computed from the ions: of the sealed sample brought to 25 degC, and as the water is.
  std::optional<double> conductivity_us_cm, conductivity_at_temperature_us_cm;
  double tds_mg_per_l = 0;          ///< Everything dissolved but gases, bicarbonate in full.
  double residue_180_mg_per_l = 0;  ///< The same after drying at 180 degC.

  double cations_eq_per_kg = 0;
  double anions_eq_per_kg = 0;     ///< Positive.
  double imbalance_eq_per_kg = 0;  ///< Cations minus anions of the ledger.
  double imbalance_percent = 0;    ///< 100 (cations - anions) / (cations + anions).
  /// The same before anything gave way; equal to the two above unless a constituent closed the
  /// balance.
  double reported_imbalance_eq_per_kg = 0;
  double reported_imbalance_percent = 0;
  double accepted_imbalance_percent =
      0;  ///< Of the standard's acceptance criterion for this stream.
  std::string closed_by;
  double closing_change_mol_per_kg = 0;
  std::vector<LedgerLine> ledger;  ///< Cations, then anions, each by falling equivalents.

  std::vector<TotalLine> totals;      ///< As the report has them, then what was derived.
  std::vector<SpeciesLine> species;   ///< By falling molality.
  std::vector<MineralLine> minerals;  ///< By falling saturation index, common scales first.
  std::vector<GasLine> gases;         ///< By falling pressure.
  std::vector<IndexLine> indices;     ///< In a fixed order; those without inputs have no value.

  /// Of a step; empty in a water as received.
  std::vector<Portion> added, removed, deposited;
  bool solids_stay = false;             ///< What was deposited is suspended in this water.
  double water_kg_per_kg_feed = 1;      ///< Water in this state for every kg in the feed.
  std::optional<double> flow_m3_per_h;  ///< At the temperature of this state.

  std::vector<Caution> cautions;  ///< What matters most first.
  Certificate certificate;
};

/// A whole assessment.
struct Assessment {
  std::string title;
  std::string chemistry;
  std::string digest;
  std::string activity_model;
  std::string activity_title;
  double max_ionic_strength = 0;
  std::vector<std::string> sources;  ///< Citations of the constants used, in alphabetical order.
  std::vector<AssessedState> states;
};

/// Assesses a closed stream: one state, "as_received".
/// `closed.status` must be converged (asserted).
[[nodiscard]] Assessment assess(const Stream& stream,
                                const ClosedStream& closed,
                                const Chemistry& chemistry,
                                const ActivityModel& model);

/// Adds the states of a train, in order: one for each step under its name, and one for each water
/// beside it under "STEP_permeate", "STEP_concentrate" or "STEP_membrane".
void assess_train(const TrainOutcome& train,
                  const Stream& stream,
                  const Plant& plant,
                  Assessment& assessment);

/// Ion-balance acceptance (Standard Methods 1030 E): largest accepted |imbalance| in percent of
/// cations + anions, from the sum of anions. Below 3 meq/L the criterion is 0.2 meq/L.
[[nodiscard]] double accepted_imbalance_percent(double cations_eq_per_l, double anions_eq_per_l);

/// Measured over computed conductivity that is accepted (Standard Methods 1030 E).
inline constexpr double least_conductivity_ratio = 0.9;
inline constexpr double largest_conductivity_ratio = 1.1;

/// Ion balance of a report without solving anything: acid-base constituents count at their form
/// near neutral pH (alkalinity as HCO3-, ammonia as NH4+). For `check`.
struct ReportBalance {
  struct Line {
    std::string constituent;
    std::string as_written;
    double mol_per_kg = 0;
    double eq_per_kg = 0;  ///< Signed; 0 for uncharged.
  };
  std::vector<Line> lines;
  double cations_eq_per_kg = 0, anions_eq_per_kg = 0;
  double imbalance_percent = 0, accepted_percent = 0;
  std::vector<Caution> cautions;
};
[[nodiscard]] ReportBalance balance_of_report(const Stream& stream, const Chemistry& chemistry);

}  // namespace ionledger
