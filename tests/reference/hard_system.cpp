// See hard_system.hpp; the format is described in hard_systems.json under "_about".
#include "reference/hard_system.hpp"

#include <cmath>
#include <cstdlib>
#include <numbers>

namespace ionledger::reference {
namespace {

using nlohmann::json;

constexpr double davies_a_log10 = 0.509;  // as the file's "activity_model" states
constexpr double davies_b = 0.3;

double number(const json& value) {
  return value.is_string() ? std::strtod(value.get<std::string>().c_str(), nullptr)
                           : value.get<double>();
}

std::string text(const json& value) {
  return value.is_string() ? value.get<std::string>() : value.dump();
}

/// The system D9 keeps its definition one level down and its species as [name, log10K, stoich].
json uniform_definition(const json& entry) {
  json result = entry.contains("definition") ? entry["definition"] : entry;
  if (entry.contains("definition")) {
    result["activity_model"] = "Davies";
    result["component_charges"] = result["charges"];
    result["solution"] = entry["solution"];
  }
  for (json& species : result["species"]) {
    if (!species.is_array()) continue;
    species = json{{"name", species[0]}, {"log10K", species[1]}, {"stoich", species[2]}};
  }
  return result;
}

std::vector<double> column(const json& stoichiometry, const std::vector<std::string>& components) {
  std::vector<double> result;
  for (const std::string& name : components) {
    result.push_back(stoichiometry.contains(name) ? number(stoichiometry[name]) : 0.0);
  }
  return result;
}

void add_phase(const std::string& name,
               const json& phase,
               solver::PhaseRule rule,
               double ln_target,
               HardSystem& hard) {
  hard.phases.push_back(name);
  const std::vector<double> nu = column(phase["stoich"], hard.components);
  hard.system.phase_stoichiometry.insert(
      hard.system.phase_stoichiometry.end(), nu.begin(), nu.end());
  hard.system.phase_solvent_exponent.push_back(0);
  hard.conditions.ln_k_phase.push_back(number(phase["log10K"]) * std::numbers::ln10);
  hard.the_case.phase_rules.push_back(rule);
  hard.the_case.ln_target.push_back(ln_target);
  ++hard.system.n_phases;
}

void read_phases(const json& definition, HardSystem& hard) {
  if (definition.contains("phases")) {
    for (const json& phase : definition["phases"]) {
      add_phase(phase["name"], phase, solver::PhaseRule::may_form, 0, hard);
    }
  }
  if (!definition.contains("fixed_phases")) return;
  for (const auto& [name, phase] : definition["fixed_phases"].items()) {
    const double ln_target = number(phase["log10_activity"]) * std::numbers::ln10;
    add_phase(name, phase, solver::PhaseRule::imposed, ln_target, hard);
  }
}

/// Class 0 is ideal, class 1 + |z| is Davies for charge z.
void read_activity(const json& definition, HardSystem& hard) {
  const auto n_species = static_cast<std::size_t>(hard.system.n_species);
  hard.system.activity_class.assign(n_species, 0);
  hard.system.ionic_weight.assign(n_species, 0);
  hard.system.solute_weight.assign(n_species, 0);
  hard.system.solvent_exponent.assign(n_species, 0);
  hard.conditions.classes.emplace_back();
  if (!definition.contains("component_charges") || definition["component_charges"].is_null()) {
    return;
  }
  const std::vector<double> charges = column(definition["component_charges"], hard.components);
  for (std::size_t j = 0; j < n_species; ++j) {
    double z = 0;
    for (std::size_t i = 0; i < charges.size(); ++i) {
      z += charges[i] * hard.system.stoichiometry[j * charges.size() + i];
    }
    hard.species_charge.push_back(z);
    hard.system.ionic_weight[j] = z * z / 2;
    if (!definition.contains("activity_model")) continue;
    const auto wanted = static_cast<std::size_t>(std::lround(std::abs(z))) + 1;
    while (hard.conditions.classes.size() <= wanted) {
      const auto magnitude = static_cast<double>(hard.conditions.classes.size() - 1);
      const double debye = davies_a_log10 * std::numbers::ln10 * magnitude * magnitude;
      hard.conditions.classes.push_back({debye, 1.0, davies_b * debye});
    }
    hard.system.activity_class[j] = static_cast<int>(wanted);
  }
}

bool read_totals(const json& definition, HardSystem& hard, std::string& problem) {
  const bool has_fixed = definition.contains("fixed_component_log10");
  for (const std::string& name : hard.components) {
    std::optional<double> fixed;
    if (has_fixed && definition["fixed_component_log10"].contains(name)) {
      fixed = number(definition["fixed_component_log10"][name]) * std::numbers::ln10;
    }
    hard.the_case.fixed_ln_activity.push_back(fixed);
    hard.the_case.totals.push_back(0);
    hard.the_case.decimal_totals.emplace_back();
    const json& totals = definition["totals"];
    if (fixed && !totals.contains(name)) continue;
    if (!totals.contains(name)) {
      problem = "component " + name + " has neither a total nor a fixed activity";
      return false;
    }
    const std::string written = text(totals[name]);
    if (written.find("charge balance") != std::string::npos) {
      hard.closed_by_charge = static_cast<int>(hard.the_case.totals.size()) - 1;
      continue;
    }
    hard.the_case.totals.back() = number(totals[name]);
    hard.the_case.decimal_totals.back() = written;
  }
  return true;
}

/// Net charge of the dissolved species.
double charge_of(const HardSystem& hard, const solver::Outcome& outcome) {
  double charge = 0;
  for (std::size_t j = 0; j < hard.species_charge.size(); ++j) {
    charge += hard.species_charge[j] * std::exp(outcome.ln_amount[j]);
  }
  return charge;
}

/// Root of a function with one change of sign above `low`: secant steps inside a bracket, bisection
/// every third time. The last evaluation is at the root.
template <class Function>
void find_root(double low, double high, const Function& function) {
  double at_low = function(low);
  double at_high = function(high);
  while (at_low * at_high > 0 && high < 1e6) {
    low = high;
    at_low = at_high;
    high *= 10;
    at_high = function(high);
  }
  for (int step = 0; step < 200 && high - low > 1e-16 * high; ++step) {
    double middle = low - at_low * (high - low) / (at_high - at_low);
    if (step % 3 == 2 || !(middle > low && middle < high)) middle = 0.5 * (low + high);
    if (middle <= low || middle >= high) return;
    const double here = function(middle);
    if (here == 0) return;
    const bool same_side = (here > 0) == (at_low > 0);
    (same_side ? low : high) = middle;
    (same_side ? at_low : at_high) = here;
  }
}

/// An ideal mixture given as energies c / RT and element rows: K_j = exp(-c_j).
HardSystem read_mixture(const std::string& id, const json& entry) {
  HardSystem hard;
  hard.id = id;
  hard.is_mixture = true;
  hard.species = entry["species"].get<std::vector<std::string>>();
  const json& rows = entry["A_rows_H_N_O"];
  hard.components = {"H", "N", "O"};
  hard.system.n_components = static_cast<int>(hard.components.size());
  hard.system.n_species = static_cast<int>(hard.species.size());
  for (std::size_t j = 0; j < hard.species.size(); ++j) {
    for (const json& row : rows) hard.system.stoichiometry.push_back(row[j].get<double>());
    hard.conditions.ln_k.push_back(-number(entry["c_over_RT"][j]));
  }
  for (const json& total : entry["b"]) hard.the_case.totals.push_back(total.get<double>());
  hard.expected = entry;
  return hard;
}

}  // namespace

std::map<std::string, std::vector<std::string>> identifiers(const json& file) {
  std::map<std::string, std::vector<std::string>> result;
  for (const auto& [group, systems] : file.items()) {
    if (!systems.is_object()) continue;
    for (const auto& [id, system] : systems.items()) result[group].push_back(id);
  }
  return result;
}

std::optional<HardSystem> read_hard_system(const json& file,
                                           const std::string& id,
                                           std::string& problem) {
  const json* entry = nullptr;
  for (const auto& [group, systems] : file.items()) {
    if (systems.is_object() && systems.contains(id)) entry = &systems[id];
  }
  if (entry == nullptr) {
    problem = "no system named " + id;
    return std::nullopt;
  }
  if (entry->contains("A_rows_H_N_O")) return read_mixture(id, *entry);
  const json definition = uniform_definition(*entry);
  if (!definition.contains("components") || !definition.contains("totals")) {
    problem = id + " is not given as components, species and totals";
    return std::nullopt;
  }
  HardSystem hard;
  hard.id = id;
  hard.components = definition["components"].get<std::vector<std::string>>();
  hard.system.n_components = static_cast<int>(hard.components.size());
  for (const json& species : definition["species"]) {
    hard.species.push_back(species["name"]);
    const std::vector<double> nu = column(species["stoich"], hard.components);
    hard.system.stoichiometry.insert(hard.system.stoichiometry.end(), nu.begin(), nu.end());
    hard.conditions.ln_k.push_back(number(species["log10K"]) * std::numbers::ln10);
  }
  hard.system.n_species = static_cast<int>(hard.species.size());
  read_phases(definition, hard);
  read_activity(definition, hard);
  if (!read_totals(definition, hard, problem)) return std::nullopt;
  if (definition.contains("solution")) hard.expected = definition["solution"];
  if (definition.contains("expected")) hard.expected = definition["expected"];
  return hard;
}

solver::Outcome solve_hard_system(const HardSystem& hard, const solver::Start& start) {
  HardSystem trial = hard;
  solver::Outcome outcome;
  const auto solve = [&] {
    outcome = solver::solve(trial.system, trial.conditions, trial.the_case, start);
  };
  if (hard.closed_by_charge >= 0) {
    // The net charge rises or falls steadily with the total of an ion.
    find_root(0, 1e-6, [&](double total) {
      trial.the_case.totals[static_cast<std::size_t>(hard.closed_by_charge)] = total;
      solve();
      return charge_of(trial, outcome);
    });
  } else if (hard.is_mixture) {
    find_root(1e-3, 2e-3, [&](double size) {
      for (std::size_t j = 0; j < hard.conditions.ln_k.size(); ++j) {
        trial.conditions.ln_k[j] = hard.conditions.ln_k[j] + std::log(size);
      }
      solve();
      double sum = 0;
      for (const double ln_amount : outcome.ln_amount) sum += std::exp(ln_amount);
      return sum - size;
    });
  } else {
    solve();
  }
  return outcome;
}

}  // namespace ionledger::reference
