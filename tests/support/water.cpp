#include "support/water.hpp"

#include <doctest/doctest.h>

#include <cmath>
#include <cstdlib>
#include <iostream>
#include <numbers>

#include "support/compare.hpp"

namespace ionledger::testing {
namespace {

Models read_built_in() {
  Diagnostics diagnostics;
  auto read = read_models(built_in_models(), diagnostics);
  if (!read) {
    std::cerr << render(diagnostics);
    std::exit(1);
  }
  return std::move(*read);
}

std::size_t species_index(const std::string& name) {
  const int index = models().chemistry.species_index(name);
  REQUIRE_MESSAGE(index >= 0, "no species " << name);
  return static_cast<std::size_t>(index);
}

}  // namespace

const Models& models() {
  static const Models read = read_built_in();
  return read;
}

const ActivityModel& activity_model(const std::string& name) {
  const ActivityModel* model = models().activity_model(name);
  REQUIRE_MESSAGE(model != nullptr, "no activity model " << name);
  return *model;
}

const ActivityModel& default_activity_model() {
  return activity_model(models().default_activity_model);
}

Problem neutral_water(const Totals& totals, double degc) {
  const Chemistry& chemistry = models().chemistry;
  Problem problem;
  problem.temperature = celsius(degc);
  problem.totals.assign(static_cast<std::size_t>(chemistry.n_basis), 0.0);
  for (const auto& [name, total] : totals) {
    const std::size_t i = species_index(name);
    REQUIRE(i < problem.totals.size());
    problem.totals[i] = total;
    problem.totals[0] -= chemistry.species[i].charge_number * total;
  }
  return problem;
}

Solution solved(const Problem& problem, const ActivityModel& model) {
  Solution solution = solve(problem, models().chemistry, model);
  REQUIRE_MESSAGE(solution.status == SolveStatus::converged, solution.reason);
  check_physical(problem, solution);
  return solution;
}

Solution solved(const Totals& totals, double degc, const ActivityModel& model) {
  return solved(neutral_water(totals, degc), model);
}

double molality(const Solution& solution, const std::string& species) {
  return solution.molality[species_index(species)];
}

double activity(const Solution& solution, const std::string& species) {
  return std::exp(solution.ln_activity[species_index(species)]);
}

double saturation_index(const Solution& solution, const std::string& mineral) {
  const Chemistry& chemistry = models().chemistry;
  const int index = chemistry.mineral_index(mineral);
  REQUIRE_MESSAGE(index >= 0, "no mineral " << mineral);
  const auto m = static_cast<std::size_t>(index);
  double ln_q = chemistry.minerals[m].water_exponent * std::log(solution.water_activity);
  for (std::size_t i = 0; i < chemistry.minerals[m].dissolution.size(); ++i) {
    const double exponent = chemistry.minerals[m].dissolution[i];
    if (exponent != 0) ln_q += exponent * solution.ln_activity[i];
  }
  return (ln_q - ln_solubility(chemistry, solution.temperature)[m]) / std::numbers::ln10;
}

double partial_pressure_bar(const Solution& solution, const std::string& gas) {
  const Chemistry& chemistry = models().chemistry;
  const int index = chemistry.gas_index(gas);
  REQUIRE_MESSAGE(index >= 0, "no gas " << gas);
  const auto g = static_cast<std::size_t>(index);
  double ln_q = chemistry.gases[g].water_exponent * std::log(solution.water_activity);
  for (std::size_t i = 0; i < chemistry.gases[g].dissolution.size(); ++i) {
    const double exponent = chemistry.gases[g].dissolution[i];
    if (exponent != 0) ln_q += exponent * solution.ln_activity[i];
  }
  return std::exp(ln_q - ln_dissolution(chemistry, solution.temperature)[g]);
}

void check_physical(const Problem& problem, const Solution& solution) {
  const Chemistry& chemistry = models().chemistry;
  const auto n_basis = static_cast<std::size_t>(chemistry.n_basis);
  const std::vector<double> ln_k = ln_formation(chemistry, problem.temperature);
  std::vector<double> sum(n_basis, 0.0);
  std::vector<double> gross(n_basis, 0.0);
  double ionic_strength = 0;
  for (std::size_t s = 0; s < chemistry.species.size(); ++s) {
    const Species& species = chemistry.species[s];
    const double m = solution.molality[s];
    CHECK(m >= 0);
    ionic_strength += 0.5 * species.charge_number * species.charge_number * m;
    double ln_activity = ln_k[s];
    if (species.water_exponent != 0) {
      ln_activity += species.water_exponent * std::log(solution.water_activity);
    }
    for (std::size_t i = 0; i < n_basis; ++i) {
      if (species.formation[i] == 0) continue;
      sum[i] += species.formation[i] * m;
      gross[i] += std::abs(species.formation[i]) * m;
      ln_activity += species.formation[i] * solution.ln_activity[i];
    }
    // Mass action holds to the rounding of a sum of some ten logarithms of size 100.
    if (m > 0) CHECK(solution.ln_activity[s] == within(ln_activity, 1e-10));
  }
  CHECK(solution.ionic_strength_molal == rel(ionic_strength, 1e-10));
  for (std::size_t k = 0; k < problem.minerals.size(); ++k) {
    const auto m = static_cast<std::size_t>(problem.minerals[k].mineral);
    CHECK(solution.deposited[k] >= 0);
    for (std::size_t i = 0; i < n_basis; ++i) {
      sum[i] += chemistry.minerals[m].dissolution[i] * solution.deposited[k];
      gross[i] += std::abs(chemistry.minerals[m].dissolution[i]) * solution.deposited[k];
    }
  }
  for (std::size_t k = 0; k < problem.gases.size(); ++k) {
    const auto g = static_cast<std::size_t>(problem.gases[k].gas);
    for (std::size_t i = 0; i < n_basis; ++i) {
      sum[i] -= chemistry.gases[g].dissolution[i] * solution.gas_taken_up[k];
      gross[i] += std::abs(chemistry.gases[g].dissolution[i] * solution.gas_taken_up[k]);
    }
  }
  for (std::size_t i = problem.ph ? 1 : 0; i < n_basis; ++i) {
    CHECK(std::abs(sum[i] - problem.totals[i]) <= 1e-11 * (gross[i] + std::abs(problem.totals[i])));
  }
}

}  // namespace ionledger::testing
