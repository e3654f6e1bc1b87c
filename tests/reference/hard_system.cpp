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

/// Net charge of the dissolved species and its gross size.
double charge_of(const HardSystem& hard, const solver::Outcome& outcome) {
  double charge = 0;
  for (std::size_t j = 0; j < hard.species_charge.size(); ++j) {
    charge += hard.species_charge[j] * std::exp(outcome.ln_amount[j]);
  }
  return charge;
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
  solver::Outcome outcome = solver::solve(hard.system, hard.conditions, hard.the_case, start);
  if (hard.closed_by_charge < 0) return outcome;
  // The net charge rises or falls steadily with the total of an ion: secant inside a bracket.
  HardSystem trial = hard;
  const auto i = static_cast<std::size_t>(hard.closed_by_charge);
  const auto charge_at = [&](double total) {
    trial.the_case.totals[i] = total;
    outcome = solver::solve(trial.system, trial.conditions, trial.the_case, start);
    return charge_of(trial, outcome);
  };
  double low = 0;
  double charge_low = charge_at(low);
  double high = 1e-6;
  double charge_high = charge_at(high);
  while (charge_low * charge_high > 0 && high < 1e3) {
    low = high;
    charge_low = charge_high;
    high *= 10;
    charge_high = charge_at(high);
  }
  for (int step = 0; step < 200 && high - low > 1e-16 * high; ++step) {
    const double secant = low - charge_low * (high - low) / (charge_high - charge_low);
    const bool usable = step % 3 != 2 && secant > low && secant < high;
    const double middle = usable ? secant : 0.5 * (low + high);
    if (middle <= low || middle >= high) break;
    const double charge = charge_at(middle);
    if (charge == 0) break;
    if (charge * charge_low > 0) {
      low = middle;
      charge_low = charge;
    } else {
      high = middle;
      charge_high = charge;
    }
  }
  return outcome;
}

}  // namespace ionledger::reference
