// Reads one system of hard_systems.json into the solver's arrays. Shared by solve_system and tests.
#pragma once

#include <map>
#include <nlohmann/json.hpp>
#include <optional>
#include <string>
#include <vector>

#include "solver/solver.hpp"

namespace ionledger::reference {

struct HardSystem {
  std::string id;
  std::vector<std::string> components;
  std::vector<std::string> species;
  std::vector<std::string> phases;  ///< The candidates, then the imposed ones.
  solver::System system;
  solver::Conditions conditions;
  solver::Case the_case;
  /// Component whose total follows from electroneutrality, or -1.
  int closed_by_charge = -1;
  /// Species are mole fractions of one ideal mixture of unknown size, c_j = N exp(ln K_j + nu_j x).
  bool is_mixture = false;
  std::vector<double> species_charge;  ///< Empty when the file gives no charges.
  nlohmann::json expected;             ///< The file's own answer: "solution" or "expected".
};

/// The groups of the file, in its order, with the identifiers of each.
[[nodiscard]] std::map<std::string, std::vector<std::string>> identifiers(
    const nlohmann::json& file);

/// Empty, with `problem` in words, when there is no such system or it is of another kind.
[[nodiscard]] std::optional<HardSystem> read_hard_system(const nlohmann::json& file,
                                                         const std::string& id,
                                                         std::string& problem);

/// Solves it; a total closed by charge, or the size of a mixture, is found by a bracketed secant
/// around the solver.
[[nodiscard]] solver::Outcome solve_hard_system(const HardSystem& hard,
                                                const solver::Start& start = {});

}  // namespace ionledger::reference
