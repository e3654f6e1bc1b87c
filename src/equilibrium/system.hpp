// One chemistry with one activity model at one temperature, as the arrays the solver wants.
// Separate so that closing a stream, which solves many times at one temperature, builds them once.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "ionledger/equilibrium.hpp"
#include "solver/solver.hpp"

namespace ionledger {

/// Phases of the solver are the minerals, then the gases.
class EquilibriumSystem {
 public:
  EquilibriumSystem(const Chemistry& chemistry,
                    const ActivityModel& model,
                    Temperature temperature);

  /// Solves; `problem.temperature` must be the one given above (asserted).
  [[nodiscard]] Solution solve(const Problem& problem) const;

  [[nodiscard]] const Chemistry& chemistry() const { return chemistry_; }
  [[nodiscard]] Temperature temperature() const { return temperature_; }

 private:
  [[nodiscard]] solver::Case case_of(const Problem& problem) const;
  [[nodiscard]] Solution solution_of(const Problem& problem, const solver::Outcome& outcome) const;
  [[nodiscard]] std::string reason_of(const solver::Outcome& outcome) const;

  const Chemistry& chemistry_;
  Temperature temperature_;
  solver::System system_;
  solver::Conditions conditions_;
};

/// Net charge of complete totals, eq per kg of water: sum z_i T_i over the basis, hydrogen
/// included.
[[nodiscard]] double net_charge(const Chemistry& chemistry, const std::vector<double>& totals);

/// Alkalinity of complete totals, eq per kg of water: -T(H+) + sum reference_protons T.
[[nodiscard]] double alkalinity(const Chemistry& chemistry, const std::vector<double>& totals);

}  // namespace ionledger
