// An assessment, or the balance of a report, as JSON. Key names and their order are a contract with
// scripts; keys may be added, never renamed.
#include <nlohmann/json.hpp>

#include "ionledger/report.hpp"

namespace ionledger {
namespace {

// Numbers that are not finite become null when dumped, as what was not computed does.
using Json = nlohmann::ordered_json;

Json optional_number(const std::optional<double>& value) {
  return value ? Json(*value) : Json(nullptr);
}

/// An array with one object for each item.
template <class Items, class ToObject>
Json array_of(const Items& items, ToObject to_object) {
  Json array = Json::array();
  for (const auto& item : items) array.push_back(to_object(item));
  return array;
}

Json charge_of(const AssessedState& state) {
  return {{"cations_eq_per_kg", state.cations_eq_per_kg},
          {"anions_eq_per_kg", state.anions_eq_per_kg},
          {"imbalance_eq_per_kg", state.imbalance_eq_per_kg},
          {"imbalance_percent", state.imbalance_percent},
          {"reported_imbalance_eq_per_kg", state.reported_imbalance_eq_per_kg},
          {"reported_imbalance_percent", state.reported_imbalance_percent},
          {"accepted_imbalance_percent", state.accepted_imbalance_percent},
          {"closed_by", state.closed_by},
          {"closing_change_mol_per_kg", state.closing_change_mol_per_kg},
          {"ledger", array_of(state.ledger, [](const LedgerLine& line) -> Json {
             return {{"species", line.species},
                     {"charge", line.charge},
                     {"molality_mol_per_kg", line.molality},
                     {"eq_per_kg", line.eq_per_kg}};
           })}};
}

Json total_of(const TotalLine& line) {
  return {{"constituent", line.constituent},
          {"mol_per_kg", line.mol_per_kg},
          {"mg_per_L", line.mg_per_l},
          {"as", line.as_formula},
          {"as_written", line.as_written}};
}

Json species_of(const SpeciesLine& line) {
  return {{"species", line.species},
          {"charge", line.charge},
          {"molality_mol_per_kg", line.molality},
          {"activity_coefficient", line.activity_coefficient},
          {"activity", line.activity}};
}

Json mineral_of(const MineralLine& line) {
  return {{"mineral", line.mineral},
          {"formula", line.formula},
          {"saturation_index", line.saturation_index},
          {"deposit_mol_per_kg", line.deposit_mol_per_kg},
          {"uncertainty", line.uncertainty},
          {"is_common_scale", line.is_common_scale},
          {"remark", line.remark}};
}

Json gas_of(const GasLine& line) {
  return {{"gas", line.gas},
          {"partial_pressure_bar", line.partial_pressure_bar},
          {"formula", line.formula}};
}

/// Values by key; null where an input is missing.
Json index_values_of(const AssessedState& state) {
  Json object = Json::object();
  for (const IndexLine& line : state.indices) object[line.key] = optional_number(line.value);
  return object;
}

Json index_of(const IndexLine& line) {
  return {{"index", line.key},
          {"title", line.title},
          {"value", optional_number(line.value)},
          {"unit", line.unit},
          {"formula", line.formula},
          {"source", line.source},
          {"inputs",
           array_of(line.inputs,
                    [](const IndexInput& input) -> Json {
                      return {{"name", input.name}, {"value", input.value}, {"unit", input.unit}};
                    })},
          {"missing", line.missing}};
}

Json portion_of(const Portion& portion) {
  return {{"what", portion.what},
          {"mol_per_kg_feed", portion.mol},
          {"kg_per_kg_feed", portion.kg},
          {"mg_per_L", portion.mg_per_l},
          {"kg_per_h", optional_number(portion.kg_per_h)},
          {"mm_per_month", optional_number(portion.mm_per_month)}};
}

Json caution_of(const Caution& caution) {
  return {{"about", caution.about}, {"says", caution.says}};
}

Json certificate_of(const Certificate& certificate) {
  return {{"converged", certificate.converged},
          {"worst_balance_residual", certificate.worst_balance_residual},
          {"charge_residual", certificate.charge_residual},
          {"ionic_strength_residual", certificate.ionic_strength_residual},
          {"iterations", certificate.iterations},
          {"path", certificate.path},
          {"worst_balance", certificate.worst_balance},
          {"complementarity", certificate.complementarity},
          {"may_have_other_solutions", certificate.may_have_other_solutions}};
}

Json state_of(const AssessedState& state) {
  Json object;
  object["name"] = state.name;
  object["temperature_degC"] = state.temperature_degc;
  object["pressure_bar"] = state.pressure_bar;
  object["pH"] = state.ph;
  // The contract knows two words; the hydrogen total of a treated water is its charge balance
  // carried on.
  object["pH_from"] = state.ph_from == "measured" ? "measured" : "charge balance";
  object["pH_follows_from"] = state.ph_from;
  object["measured_pH"] = optional_number(state.measured_ph);
  object["measured_pH_degC"] = optional_number(state.measured_ph_degc);
  object["ionic_strength_mol_per_kg"] = state.ionic_strength;
  object["water_activity"] = state.water_activity;
  object["density_kg_per_L"] = state.density_kg_per_l;
  object["conductivity_uS_per_cm"] = optional_number(state.conductivity_us_cm);
  object["conductivity_at_temperature_uS_per_cm"] =
      optional_number(state.conductivity_at_temperature_us_cm);
  object["measured_conductivity_uS_per_cm"] = optional_number(state.measured_conductivity_us_cm);
  object["tds_mg_per_L"] = state.tds_mg_per_l;
  object["residue_180_mg_per_L"] = state.residue_180_mg_per_l;
  object["alkalinity_eq_per_kg"] = state.alkalinity_eq_per_kg;
  object["charge"] = charge_of(state);
  object["totals"] = array_of(state.totals, total_of);
  object["species"] = array_of(state.species, species_of);
  object["minerals"] = array_of(state.minerals, mineral_of);
  object["gases"] = array_of(state.gases, gas_of);
  object["indices"] = index_values_of(state);
  object["index_details"] = array_of(state.indices, index_of);
  object["cautions"] = array_of(state.cautions, caution_of);
  object["certificate"] = certificate_of(state.certificate);
  object["added"] = array_of(state.added, portion_of);
  object["removed"] = array_of(state.removed, portion_of);
  object["deposited"] = array_of(state.deposited, portion_of);
  object["solids_stay"] = state.solids_stay;
  object["water_kg_per_kg_feed"] = state.water_kg_per_kg_feed;
  object["flow_m3_per_h"] = optional_number(state.flow_m3_per_h);
  return object;
}

/// Two blanks a level, a line break at the end; text that is not UTF-8 is replaced, not thrown at.
std::string dumped(const Json& json) {
  return json.dump(2, ' ', false, Json::error_handler_t::replace) + "\n";
}

}  // namespace

std::string json_report(const Assessment& assessment) {
  return dumped({{"format", "ionledger/assessment/1"},
                 {"title", assessment.title},
                 {"model",
                  {{"chemistry", assessment.chemistry},
                   {"activity", assessment.activity_model},
                   {"digest", assessment.digest},
                   {"activity_title", assessment.activity_title},
                   {"max_ionic_strength_mol_per_kg", assessment.max_ionic_strength},
                   {"sources", assessment.sources}}},
                 {"states", array_of(assessment.states, state_of)}});
}

std::string json_balance(const ReportBalance& balance, const std::string& title) {
  const auto line_of = [](const ReportBalance::Line& line) -> Json {
    return {{"constituent", line.constituent},
            {"as_written", line.as_written},
            {"mol_per_kg", line.mol_per_kg},
            {"eq_per_kg", line.eq_per_kg}};
  };
  return dumped({{"format", "ionledger/balance/1"},
                 {"title", title},
                 {"cations_eq_per_kg", balance.cations_eq_per_kg},
                 {"anions_eq_per_kg", balance.anions_eq_per_kg},
                 {"imbalance_percent", balance.imbalance_percent},
                 {"accepted_imbalance_percent", balance.accepted_percent},
                 {"lines", array_of(balance.lines, line_of)},
                 {"cautions", array_of(balance.cautions, caution_of)}});
}

}  // namespace ionledger
