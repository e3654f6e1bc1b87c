// A dilute-water-sized system, 15 components and 80 species, for random and timing tests. The
// constants are round numbers of the usual size, from memory; nothing here is data.
#pragma once

#include <cmath>
#include <numbers>
#include <random>
#include <sstream>
#include <string>
#include <utility>
#include <vector>

#include "solver/solver.hpp"

namespace ionledger::testing {

// clang-format off
inline constexpr const char* compact_components[] = {
    "H", "Na", "K", "Ca", "Mg", "Sr", "Ba", "Cl", "SO4", "CO3", "F", "PO4", "Si", "B", "N"};
inline constexpr double compact_charges[] = {1, 1, 1, 2, 2, 2, 2, -1, -2, -2, -1, -3, 0, 0, 1};
inline constexpr std::pair<double, const char*> compact_species[] = {
    {-14.0, "-1 H"}, {10.33, "1 H 1 CO3"}, {16.68, "2 H 1 CO3"}, {1.99, "1 H 1 SO4"},
    {12.35, "1 H 1 PO4"}, {19.56, "2 H 1 PO4"}, {21.71, "3 H 1 PO4"}, {3.18, "1 H 1 F"},
    {3.6, "1 H 2 F"}, {-9.83, "-1 H 1 Si"}, {-23.0, "-2 H 1 Si"}, {30.18, "4 H 6 F 1 Si"},
    {-9.24, "-1 H 1 B"}, {-0.4, "1 B 1 F"}, {7.6, "1 H 1 B 2 F"}, {13.7, "2 H 1 B 3 F"},
    {20.3, "3 H 1 B 4 F"}, {-9.25, "-1 H 1 N"}, {1.11, "1 N 1 SO4"}, {0.7, "1 Na 1 SO4"},
    {1.27, "1 Na 1 CO3"}, {10.08, "1 Na 1 H 1 CO3"}, {-0.24, "1 Na 1 F"}, {13.45, "1 Na 1 H 1 PO4"},
    {0.85, "1 K 1 SO4"}, {13.43, "1 K 1 H 1 PO4"}, {2.30, "1 Ca 1 SO4"}, {3.22, "1 Ca 1 CO3"},
    {11.43, "1 Ca 1 H 1 CO3"}, {-12.78, "1 Ca -1 H"}, {1.14, "1 Ca 1 F"}, {6.46, "1 Ca 1 PO4"},
    {15.08, "1 Ca 1 H 1 PO4"}, {20.96, "1 Ca 2 H 1 PO4"}, {-7.6, "1 Ca -1 H 1 B"},
    {-8.8, "1 Ca -1 H 1 Si"}, {2.37, "1 Mg 1 SO4"}, {2.98, "1 Mg 1 CO3"}, {11.40, "1 Mg 1 H 1 CO3"},
    {-11.44, "1 Mg -1 H"}, {1.82, "1 Mg 1 F"}, {6.59, "1 Mg 1 PO4"}, {15.22, "1 Mg 1 H 1 PO4"},
    {21.07, "1 Mg 2 H 1 PO4"}, {-7.7, "1 Mg -1 H 1 B"}, {-8.6, "1 Mg -1 H 1 Si"},
    {2.29, "1 Sr 1 SO4"}, {2.81, "1 Sr 1 CO3"}, {11.51, "1 Sr 1 H 1 CO3"}, {-13.2, "1 Sr -1 H"},
    {14.5, "1 Sr 1 H 1 PO4"}, {20.3, "1 Sr 2 H 1 PO4"}, {0.6, "1 Sr 1 F"}, {2.7, "1 Ba 1 SO4"},
    {2.71, "1 Ba 1 CO3"}, {11.31, "1 Ba 1 H 1 CO3"}, {-13.4, "1 Ba -1 H"}, {0.4, "1 Ba 1 F"},
    {14.2, "1 Ba 1 H 1 PO4"}, {0.2, "1 Ca 1 Cl"}, {0.1, "1 Mg 1 Cl"}, {19.0, "1 K 2 H 1 PO4"},
    {19.9, "1 Na 2 H 1 PO4"}, {1.2, "1 K 1 CO3"}, {-14.3, "1 Na -1 H"}};
/// Phases: log10 K of formation from the components.
inline constexpr std::pair<double, const char*> compact_phases[] = {
    {8.48, "1 Ca 1 CO3"}, {4.58, "1 Ca 1 SO4"}, {9.97, "1 Ba 1 SO4"}, {-16.84, "1 Mg -2 H"},
    {10.6, "1 Ca 2 F"}, {2.71, "1 Si"}, {6.63, "1 Sr 1 SO4"}, {44.3, "5 Ca 3 PO4 -1 H"},
    {18.15, "2 H 1 CO3"}};
// clang-format on
inline constexpr int compact_gas = 8;  ///< The last phase, meant to be imposed.

struct CompactSystem {
  solver::System system;
  solver::Conditions conditions;
};

inline std::vector<double> compact_column(const std::string& written) {
  std::vector<double> result(std::size(compact_components), 0);
  std::istringstream in(written);
  double nu = 0;
  std::string name;
  while (in >> nu >> name) {
    for (std::size_t i = 0; i < result.size(); ++i) {
      if (name == compact_components[i]) result[i] = nu;
    }
  }
  return result;
}

/// Davies for ions, ln gamma = 0.1 ln(10) I for the others, a_w = 1 - solvent_slope sum m.
inline CompactSystem compact_system(double solvent_slope = 0) {
  CompactSystem result;
  solver::System& system = result.system;
  const std::size_t n = std::size(compact_components);
  system.n_components = static_cast<int>(n);
  std::vector<std::pair<double, std::vector<double>>> species;
  for (const char* name : compact_components) {
    species.emplace_back(0.0, compact_column(std::string("1 ") + name));
  }
  for (const auto& [log10_k, written] : compact_species) {
    species.emplace_back(log10_k, compact_column(written));
  }
  for (int z = 0; z <= 3; ++z) {
    const double debye = 0.509 * std::numbers::ln10 * z * z;
    result.conditions.classes.push_back(
        {debye, 1.0, z == 0 ? 0.1 * std::numbers::ln10 : 0.3 * debye});
  }
  for (const auto& [log10_k, nu] : species) {
    double z = 0;
    for (std::size_t i = 0; i < n; ++i) z += nu[i] * compact_charges[i];
    system.stoichiometry.insert(system.stoichiometry.end(), nu.begin(), nu.end());
    system.solvent_exponent.push_back(nu[0] < 0 ? -nu[0] : 0);
    system.ionic_weight.push_back(z * z / 2);
    system.solute_weight.push_back(1);
    system.activity_class.push_back(static_cast<int>(std::lround(std::abs(z))));
    result.conditions.ln_k.push_back(log10_k * std::numbers::ln10);
  }
  system.n_species = static_cast<int>(species.size());
  for (const auto& [log10_k, written] : compact_phases) {
    const std::vector<double> nu = compact_column(written);
    system.phase_stoichiometry.insert(system.phase_stoichiometry.end(), nu.begin(), nu.end());
    system.phase_solvent_exponent.push_back(nu[0] < 0 ? -nu[0] : 0);
    result.conditions.ln_k_phase.push_back(log10_k * std::numbers::ln10);
  }
  system.n_phases = static_cast<int>(std::size(compact_phases));
  result.conditions.solvent_slope = solvent_slope;
  return result;
}

/// Hydrogen total that closes the charges: reactions conserve charge.
inline void close_charge(std::vector<double>& totals) {
  totals[0] = 0;
  for (std::size_t i = 1; i < totals.size(); ++i) totals[0] -= compact_charges[i] * totals[i];
}

/// 14 totals log-uniform over 1e-9 .. 1; mode 0 lets hydrogen close the charges as they are,
/// mode 1 adds sodium or chloride first, which keeps the solution near neutral.
inline std::vector<double> random_totals(std::mt19937_64& random, int mode) {
  // The distribution is written out: std::uniform_real_distribution differs between libraries.
  const auto uniform = [&] { return static_cast<double>(random() >> 11) * 0x1p-53; };
  std::vector<double> totals(std::size(compact_components), 0);
  for (std::size_t i = 1; i < totals.size(); ++i) totals[i] = std::pow(10, -9 + 9 * uniform());
  if (mode == 1) {
    // At neutral pH carbonate is HCO3-, phosphate between H2PO4- and HPO4-2.
    double charge = 0;
    for (std::size_t i = 1; i < totals.size(); ++i) {
      const double z = i == 9 ? -1 : i == 11 ? -1.5 : compact_charges[i];
      charge += z * totals[i];
    }
    totals[charge > 0 ? 7 : 1] += std::abs(charge);
  }
  close_charge(totals);
  return totals;
}

/// An invented well water, blowdown and concentrate.
inline std::vector<std::vector<double>> industrial_totals() {
  std::vector<std::vector<double>> result = {
      {0, 4e-3, 2e-4, 3e-3, 1.5e-3, 1e-5, 5e-7, 3e-3, 2e-3, 7e-3, 2e-5, 1e-6, 3e-4, 2e-5, 1e-5},
      {0, 2e-2, 8e-4, 1.0e-2, 6e-3, 4e-5, 1e-6, 2e-2, 1.4e-2, 6e-3, 8e-5, 2e-5, 1.8e-3, 8e-5, 2e-5},
      {0, 0.25, 6e-3, 3e-2, 4e-2, 3e-4, 1e-6, 0.28, 4.5e-2, 1e-2, 2e-4, 1e-5, 2e-3, 8e-4, 1e-4}};
  const double alkalinity[] = {6.2e-3, 5.6e-3, 8.6e-3};
  for (std::size_t k = 0; k < result.size(); ++k) {
    // Chloride closes the charge at the given alkalinity, then hydrogen takes what is left.
    std::vector<double>& totals = result[k];
    close_charge(totals);
    totals[7] += 2 * totals[9] - alkalinity[k] - totals[0];
    close_charge(totals);
  }
  return result;
}

}  // namespace ionledger::testing
