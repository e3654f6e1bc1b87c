// Waters for tests: totals by species name, solved with the built-in chemistry.
#pragma once

#include <map>
#include <string>

#include "ionledger/equilibrium.hpp"
#include "ionledger/readers.hpp"

namespace ionledger::testing {

/// The built-in models, read once. Stops the test run when they do not read.
[[nodiscard]] const Models& models();
[[nodiscard]] const ActivityModel& activity_model(const std::string& name);
[[nodiscard]] const ActivityModel& default_activity_model();

/// Totals of basis species, mol per kg of water, by name.
using Totals = std::map<std::string, double>;

/// A problem with these totals whose hydrogen total is the one that balances the charges.
[[nodiscard]] Problem neutral_water(const Totals& totals, double degc = 25.0);

/// Solves and requires convergence and the physical invariants of check_physical.
[[nodiscard]] Solution solved(const Problem& problem, const ActivityModel& model);
[[nodiscard]] Solution solved(const Totals& totals, double degc, const ActivityModel& model);

[[nodiscard]] double molality(const Solution& solution, const std::string& species);
[[nodiscard]] double activity(const Solution& solution, const std::string& species);
/// log10 of the ion activity product over the solubility product.
[[nodiscard]] double saturation_index(const Solution& solution, const std::string& mineral);
/// Partial pressure over the solution, bar.
[[nodiscard]] double partial_pressure_bar(const Solution& solution, const std::string& gas);

/// Positive amounts, balances, mass action: re-derived here, not read from the certificate.
void check_physical(const Problem& problem, const Solution& solution);

}  // namespace ionledger::testing
