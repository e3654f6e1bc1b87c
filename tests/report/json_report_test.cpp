// The JSON contract: keys and their order, numbers that come back, null for what is not known.
#include <cmath>
#include <limits>
#include <nlohmann/json.hpp>
#include <string>
#include <vector>

#include "ionledger/report.hpp"
#include "report/example_assessment.hpp"
#include "support/compare.hpp"

using namespace ionledger;
using ionledger::testing::example_assessment;
using Json = nlohmann::ordered_json;

namespace {

/// True when `keys` stand in `object` in this order; others may stand between them.
bool has_in_order(const Json& object, const std::vector<std::string>& keys) {
  std::size_t next = 0;
  for (const auto& [key, value] : object.items()) {
    if (next < keys.size() && key == keys[next]) ++next;
  }
  return next == keys.size();
}

}  // namespace

TEST_SUITE("report/json_report") {
  TEST_CASE("The keys of the contract are there, in its order") {
    const Json json = Json::parse(json_report(example_assessment()));
    CHECK(json["format"] == "ionledger/assessment/1");
    CHECK(has_in_order(json, {"format", "model", "states"}));
    CHECK(has_in_order(json["model"], {"chemistry", "activity", "digest"}));
    const Json& state = json["states"][0];
    CHECK(has_in_order(state,
                       {"name",
                        "temperature_degC",
                        "pressure_bar",
                        "pH",
                        "pH_from",
                        "ionic_strength_mol_per_kg",
                        "water_activity",
                        "density_kg_per_L",
                        "conductivity_uS_per_cm",
                        "conductivity_at_temperature_uS_per_cm",
                        "measured_conductivity_uS_per_cm",
                        "tds_mg_per_L",
                        "residue_180_mg_per_L",
                        "charge",
                        "totals",
                        "species",
                        "minerals",
                        "gases",
                        "indices",
                        "cautions",
                        "certificate"}));
    CHECK(has_in_order(state["charge"],
                       {"cations_eq_per_kg",
                        "anions_eq_per_kg",
                        "imbalance_eq_per_kg",
                        "imbalance_percent",
                        "ledger"}));
    CHECK(has_in_order(state["charge"]["ledger"][0],
                       {"species", "charge", "molality_mol_per_kg", "eq_per_kg"}));
    CHECK(has_in_order(state["totals"][0], {"constituent", "mol_per_kg", "mg_per_L"}));
    CHECK(has_in_order(
        state["species"][0],
        {"species", "charge", "molality_mol_per_kg", "activity_coefficient", "activity"}));
    CHECK(has_in_order(state["minerals"][0],
                       {"mineral", "formula", "saturation_index", "deposit_mol_per_kg"}));
    CHECK(has_in_order(state["gases"][0], {"gas", "partial_pressure_bar"}));
    CHECK(has_in_order(state["indices"], {"langelier", "ryznar", "ccpp_mg_per_L_as_CaCO3"}));
    CHECK(has_in_order(state["cautions"][0], {"about", "says"}));
    CHECK(has_in_order(state["certificate"],
                       {"converged",
                        "worst_balance_residual",
                        "charge_residual",
                        "ionic_strength_residual",
                        "iterations",
                        "path"}));
  }

  TEST_CASE("Every number comes back bit by bit") {
    Assessment assessment = example_assessment();
    const double awkward = 0.1 + 0.2;  // 0.30000000000000004
    assessment.states[0].ph = awkward;
    assessment.states[0].ionic_strength = std::nextafter(1.0, 2.0);
    assessment.states[0].ledger[0].molality = 4.9e-324;
    const Json state = Json::parse(json_report(assessment))["states"][0];
    CHECK(state["pH"].get<double>() == awkward);
    CHECK(state["ionic_strength_mol_per_kg"].get<double>() == std::nextafter(1.0, 2.0));
    CHECK(state["charge"]["ledger"][0]["molality_mol_per_kg"].get<double>() == 4.9e-324);
  }

  TEST_CASE("What is not a number or not computed is null") {
    Assessment assessment = example_assessment();
    assessment.states[0].ph = std::numeric_limits<double>::quiet_NaN();
    assessment.states[0].minerals[0].saturation_index = -std::numeric_limits<double>::infinity();
    assessment.states[0].measured_ph.reset();
    const Json state = Json::parse(json_report(assessment))["states"][0];
    CHECK(state["pH"].is_null());
    CHECK(state["minerals"][0]["saturation_index"].is_null());
    CHECK(state["measured_pH"].is_null());
    CHECK(state["conductivity_uS_per_cm"].is_null());
    CHECK(state["indices"]["ryznar"].is_null());
    CHECK(state["indices"]["langelier"].get<double>() == 0.957);
  }

  TEST_CASE("An index comes with its formula, its source and what went into it") {
    const Json state = Json::parse(json_report(example_assessment()))["states"][0];
    const Json& langelier = state["index_details"][0];
    CHECK(has_in_order(langelier,
                       {"index", "title", "value", "unit", "formula", "source", "inputs"}));
    CHECK(langelier["inputs"][1]["name"] == "calcium");
    CHECK(langelier["inputs"][1]["value"].get<double>() == 3.3e-3);
    CHECK(langelier["inputs"][1]["unit"] == "mol/L");
    CHECK(state["index_details"][1]["missing"] == "calcium");
  }

  TEST_CASE("Empty lists are lists, and odd text is no obstacle") {
    Assessment assessment;
    assessment.title = "quote \" and \xff";
    assessment.states.emplace_back();
    const Json json = Json::parse(json_report(assessment));
    CHECK(json["title"] == "quote \" and \uFFFD");
    CHECK(json["states"][0]["species"].is_array());
    CHECK(json["states"][0]["cautions"].empty());
  }

  TEST_CASE("A balance has its own format") {
    ReportBalance balance;
    balance.lines = {{"calcium", "96 mg/L", 2.4e-3, 4.8e-3}};
    balance.imbalance_percent = 1.5;
    const Json json = Json::parse(json_balance(balance, "Well 3"));
    CHECK(json["format"] == "ionledger/balance/1");
    CHECK(json["title"] == "Well 3");
    CHECK(json["lines"][0]["eq_per_kg"].get<double>() == 4.8e-3);
    CHECK(json["imbalance_percent"].get<double>() == 1.5);
  }
}
