// From a solved stream to everything that is said about it.
#include <algorithm>
#include <cassert>
#include <cmath>
#include <numbers>
#include <set>

#include "assessment/assessed_state.hpp"
#include "assessment/cautions.hpp"
#include "assessment/ion_balance.hpp"
#include "equilibrium/system.hpp"
#include "ionledger/assessment.hpp"
#include "ionledger/conductivity.hpp"
#include "ionledger/dissolved_solids.hpp"
#include "stream/volume.hpp"

namespace ionledger {
namespace {

constexpr double pascal_per_bar = 1e5;
constexpr double us_per_cm_per_s_per_m = 1e4;
constexpr double laboratory_degc = 25;

const char* words_of(ClosedStream::PHFrom from) {
  switch (from) {
    case ClosedStream::PHFrom::charge_balance:
      return "charge balance";
    case ClosedStream::PHFrom::measured:
      return "measured";
    case ClosedStream::PHFrom::alkalinity_and_carbon:
      return "alkalinity and inorganic carbon";
    case ClosedStream::PHFrom::hydrogen_balance:
      return "the balance of hydrogen through the steps";
  }
  return "";
}

/// Every basis species the phase needs, hydrogen aside, is there.
bool has_constituents(const std::vector<double>& dissolution, const std::vector<double>& totals) {
  for (std::size_t i = 1; i < dissolution.size(); ++i) {
    if (dissolution[i] != 0 && !(totals[i] > 0)) return false;
  }
  return true;
}

double ln_activity_product(const std::vector<double>& dissolution,
                           double water_exponent,
                           const Solution& solution) {
  double sum = water_exponent * std::log(solution.water_activity);
  for (std::size_t i = 0; i < dissolution.size(); ++i) {
    if (dissolution[i] != 0) sum += dissolution[i] * solution.ln_activity[i];
  }
  return sum;
}

/// Fills one state part by part; each part reads only what came before it.
class StateBuilder {
 public:
  StateBuilder(const Stream& stream,
               const ClosedStream& closed,
               const Chemistry& chemistry,
               const ActivityModel& model)
      : stream_(stream),
        closed_(closed),
        solution_(closed.solution),
        chemistry_(chemistry),
        model_(model) {}

  AssessedState build() {
    conditions();
    ledger();
    totals();
    species();
    minerals();
    gases();
    conductivities();
    solids_and_indices();
    state_.certificate = solution_.certificate;
    state_.cautions = cautions_of(state_, stream_, closed_, chemistry_, model_);
    return std::move(state_);
  }

 private:
  void conditions() {
    state_.temperature_degc = in_celsius(stream_.temperature);
    state_.pressure_bar = stream_.pressure.value() / pascal_per_bar;
    state_.ph = solution_.ph();
    state_.ph_from = words_of(closed_.ph_from);
    if (stream_.ph) {
      state_.measured_ph = stream_.ph->value;
      state_.measured_ph_degc = in_celsius(stream_.ph->temperature.value_or(stream_.temperature));
    }
    state_.ionic_strength = solution_.ionic_strength_molal;
    state_.water_activity = solution_.water_activity;
    state_.density_kg_per_l =
        solution_mass_kg(chemistry_, solution_.molality) /
        solution_volume_l(
            chemistry_, solution_.molality, solution_.ionic_strength_molal, stream_.temperature);
    state_.alkalinity_eq_per_kg = alkalinity(chemistry_, closed_.totals);
    if (stream_.measured_conductivity) {
      state_.measured_conductivity_us_cm =
          stream_.measured_conductivity->value() * us_per_cm_per_s_per_m;
    }
  }

  void ledger() {
    for (std::size_t s = 0; s < chemistry_.species.size(); ++s) {
      const Species& species = chemistry_.species[s];
      if (species.charge_number == 0 || !(solution_.molality[s] > 0)) continue;
      const double equivalents = species.charge_number * solution_.molality[s];
      (equivalents > 0 ? state_.cations_eq_per_kg : state_.anions_eq_per_kg) +=
          std::abs(equivalents);
      state_.ledger.push_back(
          {species.name, species.charge_number, solution_.molality[s], equivalents});
    }
    std::stable_sort(state_.ledger.begin(), state_.ledger.end(), [](const auto& a, const auto& b) {
      if ((a.charge > 0) != (b.charge > 0)) return a.charge > 0;
      return std::abs(a.eq_per_kg) > std::abs(b.eq_per_kg);
    });
    state_.imbalance_eq_per_kg = state_.cations_eq_per_kg - state_.anions_eq_per_kg;
    state_.imbalance_percent = imbalance_percent(state_.cations_eq_per_kg, state_.anions_eq_per_kg);
    state_.closed_by = closed_.closed_by;
    state_.closing_change_mol_per_kg = closed_.closing_change_mol_per_kg;
    state_.reported_imbalance_eq_per_kg = state_.imbalance_eq_per_kg;
    if (!closed_.closed_by.empty())
      state_.reported_imbalance_eq_per_kg = closed_.imbalance_eq_per_kg;
    const double sum = state_.cations_eq_per_kg + state_.anions_eq_per_kg;
    state_.reported_imbalance_percent =
        sum > 0 ? 100 * state_.reported_imbalance_eq_per_kg / sum : 0;
    const double litres = stream_.litre_per_kg_water;
    state_.accepted_imbalance_percent = accepted_imbalance_percent(
        state_.cations_eq_per_kg / litres, state_.anions_eq_per_kg / litres);
  }

  void totals() {
    for (const Constituent& constituent : chemistry_.constituents) {
      TotalLine line;
      line.constituent = constituent.name;
      for (const Conversion& conversion : stream_.conversions) {
        if (conversion.constituent == constituent.name) line.as_written = conversion.as_written;
      }
      switch (constituent.kind) {
        case Constituent::Kind::total: {
          const auto i =
              static_cast<std::size_t>(chemistry_.species_index(constituent.basis_species));
          line.mol_per_kg = closed_.totals[i];
          if (!stream_.reported[i] && !(line.mol_per_kg > 0)) continue;
          break;
        }
        case Constituent::Kind::alkalinity:
          line.mol_per_kg = state_.alkalinity_eq_per_kg;
          break;
        case Constituent::Kind::hardness:
          for (const std::string& part : constituent.parts) {
            const auto i = static_cast<std::size_t>(chemistry_.species_index(part));
            line.mol_per_kg += 2 * closed_.totals[i];
          }
          break;
      }
      line.as_formula =
          constituent.plain.empty() ? preferred_formula(constituent) : constituent.plain;
      const double grams = molar_mass_g_per_mol(*composition_of(line.as_formula)) /
                           constituent.as.at(line.as_formula);
      line.mg_per_l = 1000 * grams * line.mol_per_kg / stream_.litre_per_kg_water;
      state_.totals.push_back(std::move(line));
    }
  }

  /// The formula the laboratory used, else the first of the data.
  [[nodiscard]] std::string preferred_formula(const Constituent& constituent) const {
    for (const Conversion& conversion : stream_.conversions) {
      if (conversion.constituent != constituent.name) continue;
      const std::size_t at = conversion.as_written.rfind(" as ");
      if (at == std::string::npos) continue;
      const std::string formula = conversion.as_written.substr(at + 4);
      if (constituent.as.count(formula) != 0) return formula;
    }
    if (constituent.as.count("CaCO3") != 0 && constituent.kind != Constituent::Kind::total)
      return "CaCO3";
    return constituent.as.begin()->first;
  }

  void species() {
    for (std::size_t s = 0; s < chemistry_.species.size(); ++s) {
      if (!(solution_.molality[s] > 0)) continue;
      const Species& species = chemistry_.species[s];
      state_.species.push_back({species.name,
                                species.charge_number,
                                solution_.molality[s],
                                std::exp(solution_.ln_activity_coefficient[s]),
                                std::exp(solution_.ln_activity[s])});
    }
    std::stable_sort(state_.species.begin(),
                     state_.species.end(),
                     [](const auto& a, const auto& b) { return a.molality > b.molality; });
  }

  void minerals() {
    const std::vector<double> ln_k = ln_solubility(chemistry_, stream_.temperature);
    for (std::size_t m = 0; m < chemistry_.minerals.size(); ++m) {
      const Mineral& mineral = chemistry_.minerals[m];
      if (!has_constituents(mineral.dissolution, closed_.totals)) continue;
      const double ln_q =
          ln_activity_product(mineral.dissolution, mineral.water_exponent, solution_);
      state_.minerals.push_back({mineral.name,
                                 mineral.formula,
                                 (ln_q - ln_k[m]) / std::numbers::ln10,
                                 mineral.constant.uncertainty,
                                 mineral.is_common_scale,
                                 mineral.remark,
                                 0});
    }
    std::stable_sort(
        state_.minerals.begin(), state_.minerals.end(), [](const auto& a, const auto& b) {
          if (a.is_common_scale != b.is_common_scale) return a.is_common_scale;
          return a.saturation_index > b.saturation_index;
        });
  }

  void gases() {
    const std::vector<double> ln_k = ln_dissolution(chemistry_, stream_.temperature);
    for (std::size_t g = 0; g < chemistry_.gases.size(); ++g) {
      const Gas& gas = chemistry_.gases[g];
      if (!has_constituents(gas.dissolution, closed_.totals)) continue;
      const double ln_q = ln_activity_product(gas.dissolution, gas.water_exponent, solution_);
      state_.gases.push_back({gas.name, gas.formula, std::exp(ln_q - ln_k[g])});
    }
    std::stable_sort(state_.gases.begin(), state_.gases.end(), [](const auto& a, const auto& b) {
      return a.partial_pressure_bar > b.partial_pressure_bar;
    });
  }

  void conductivities() {
    if (chemistry_.conductivity.ions.empty()) return;
    state_.conductivity_at_temperature_us_cm = us_per_cm(solution_);
    if (state_.temperature_degc == laboratory_degc) {
      state_.conductivity_us_cm = state_.conductivity_at_temperature_us_cm;
      return;
    }
    Problem at_25;
    at_25.temperature = celsius(laboratory_degc);
    at_25.totals = solution_.totals;
    const Solution solution = solve(at_25, chemistry_, model_);
    if (solution.status == SolveStatus::converged) {
      state_.conductivity_us_cm = us_per_cm(solution);
    }
  }

  [[nodiscard]] std::optional<double> us_per_cm(const Solution& solution) const {
    const double value = conductivity(chemistry_, solution).value();
    return std::isfinite(value) ? std::optional(us_per_cm_per_s_per_m * value) : std::nullopt;
  }

  void solids_and_indices() {
    const double litres = stream_.litre_per_kg_water;
    state_.tds_mg_per_l = dissolved_solids_mg_per_l(chemistry_, solution_, litres);
    state_.residue_180_mg_per_l = residue_180_mg_per_l(chemistry_, solution_, litres);
    std::vector<bool> known = stream_.reported;
    for (std::size_t i = 0; i < known.size(); ++i) {
      known[i] = known[i] || solution_.totals[i] > 0;
    }
    state_.indices =
        indices_of({solution_, litres, state_.tds_mg_per_l, known}, chemistry_, model_);
  }

  const Stream& stream_;
  const ClosedStream& closed_;
  const Solution& solution_;
  const Chemistry& chemistry_;
  const ActivityModel& model_;
  AssessedState state_;
};

/// Citations of the constants of every species and mineral that can exist in the stream.
std::vector<std::string> sources_of(const Chemistry& chemistry, const ClosedStream& closed) {
  std::set<std::string> keys;
  const auto n_basis = static_cast<std::size_t>(chemistry.n_basis);
  for (std::size_t s = n_basis; s < chemistry.species.size(); ++s) {
    if (closed.solution.molality[s] > 0) keys.insert(chemistry.species[s].constant.source);
  }
  for (const Mineral& mineral : chemistry.minerals) {
    if (has_constituents(mineral.dissolution, closed.totals)) keys.insert(mineral.constant.source);
  }
  std::set<std::string> citations;
  for (const std::string& key : keys) {
    const auto found = chemistry.sources.find(key);
    if (found != chemistry.sources.end()) citations.insert(found->second);
  }
  return {citations.begin(), citations.end()};
}

}  // namespace

AssessedState assessed_state(const Stream& stream,
                             const ClosedStream& closed,
                             const Chemistry& chemistry,
                             const ActivityModel& model) {
  return StateBuilder(stream, closed, chemistry, model).build();
}

Assessment assess(const Stream& stream,
                  const ClosedStream& closed,
                  const Chemistry& chemistry,
                  const ActivityModel& model) {
  assert(closed.status == SolveStatus::converged);
  Assessment result;
  result.title = stream.name;
  result.chemistry = chemistry.name;
  result.digest = chemistry.digest;
  result.activity_model = model.name;
  result.activity_title = model.title;
  result.max_ionic_strength = model.max_ionic_strength_molal;
  result.sources = sources_of(chemistry, closed);
  result.states.push_back(assessed_state(stream, closed, chemistry, model));
  return result;
}

}  // namespace ionledger
