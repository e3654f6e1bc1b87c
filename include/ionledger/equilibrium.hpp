// Charge and mass balances coupled with activity coefficients, solved and certified.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "ionledger/activity.hpp"
#include "ionledger/chemistry.hpp"
#include "ionledger/stream.hpp"

namespace ionledger {

/// What one equilibrium asks for. All amounts in mol per kg of water.
struct Problem {
  Temperature temperature = celsius(25.0);
  std::vector<double> totals;  ///< n_basis; totals[0] (hydrogen) is ignored when a pH is given.
  std::optional<double> ph;    ///< Imposes the activity of H+.
  /// Minerals allowed to form or dissolve; amounts already present belong to `totals`.
  struct AllowedMineral {
    int mineral = 0;              ///< Index into Chemistry::minerals.
    double saturation_index = 0;  ///< Forms only above this; 0 for equilibrium.
  };
  std::vector<AllowedMineral> minerals;
  /// Gases held at a partial pressure; the amount taken up or given off is a result.
  struct HeldGas {
    int gas = 0;  ///< Index into Chemistry::gases.
    double partial_pressure_bar = 0;
  };
  std::vector<HeldGas> gases;
};

enum class SolveStatus { not_run, converged, stalled, iteration_limit, infeasible, non_finite };

/// Evidence that a solution is one, computed from the result alone, not taken from the iteration.
struct Certificate {
  bool converged = false;
  double worst_balance_residual = 0;   ///< Largest |residual| / sum of |terms|, over all balances.
  std::string worst_balance;           ///< Which one.
  double charge_residual = 0;          ///< |sum z m| / sum |z| m.
  double ionic_strength_residual = 0;  ///< Relative.
  double complementarity = 0;  ///< Largest amount * |ln saturation| over the minerals, scaled.
  bool may_have_other_solutions = false;
  int iterations = 0;
  std::string path;  ///< "fast" or "safe".
};

/// One equilibrium. Numbers are NaN until solved.
struct Solution {
  SolveStatus status = SolveStatus::not_run;
  std::string reason;  ///< In words, when status is not converged.
  Temperature temperature = celsius(25.0);
  double ionic_strength_molal = 0;
  double water_activity = 1;
  std::vector<double> molality;     ///< n_species, mol per kg of water.
  std::vector<double> ln_activity;  ///< n_species; -infinity for an absent species.
  std::vector<double> ln_activity_coefficient;
  std::vector<double> totals;        ///< n_basis, dissolved, hydrogen included.
  std::vector<double> deposited;     ///< One per allowed mineral, mol per kg of water.
  std::vector<double> gas_taken_up;  ///< One per held gas.
  Certificate certificate;

  [[nodiscard]] double ph() const;
};

/// Solves `problem`. Never throws for a mathematical reason; Solution::status says how it went.
/// Limits: totals finite; the negative ones only where the feasible cone allows them.
[[nodiscard]] Solution solve(const Problem& problem,
                             const Chemistry& chemistry,
                             const ActivityModel& model);

/// A stream whose charges are closed: its totals are now complete, hydrogen included.
struct ClosedStream {
  SolveStatus status = SolveStatus::not_run;
  std::string reason;
  std::vector<double> totals;  ///< n_basis, mol per kg of water.
  enum class PHFrom { charge_balance, measured, alkalinity_and_carbon, hydrogen_balance };
  PHFrom ph_from = PHFrom::charge_balance;
  /// Net charge of the analysis as reported, before anything gave way, eq per kg of water.
  double imbalance_eq_per_kg = 0;
  std::string closed_by;  ///< Constituent that gave way, or empty.
  double closing_change_mol_per_kg = 0;
  Solution at_ph_temperature;  ///< Only when a measured pH has its own temperature.
  Solution solution;           ///< At the stream's temperature.
  std::vector<Caution> cautions;
};

/// Closes `stream` and solves it at its temperature.
///
/// pH absent               hydrogen follows from charge balance.
/// pH measured             it is imposed at its own temperature; the hydrogen total that implies is
/// kept,
///                         and pH is computed anew at the temperature of the stream.
/// alkalinity, with pH     fixes the carbonate total: eq = -T(H+) + sum reference_protons T.
/// alkalinity and carbon   fix the hydrogen total; a measured pH must then agree.
/// closed_by a constituent the constituent's total is changed until the charges balance.
///
/// Errors   (diagnostics) alkalinity without pH or inorganic carbon; pH, alkalinity and inorganic
/// carbon
///          that contradict each other by more than `consistency_tolerance`; closing by pH while a
///          pH is given. A stream with no solution is a status, not a diagnostic.
inline constexpr double consistency_tolerance = 0.10;  ///< Relative, of the alkalinity.
[[nodiscard]] std::optional<ClosedStream> close_stream(const Stream& stream,
                                                       const Chemistry& chemistry,
                                                       const ActivityModel& model,
                                                       Diagnostics& diagnostics);

}  // namespace ionledger
