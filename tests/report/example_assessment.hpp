// An assessment made by hand, with everything in it that a report has to cope with: traces, an
// oversaturated rare mineral, a long remark, an absent number.
#pragma once

#include <limits>

#include "ionledger/assessment.hpp"

namespace ionledger::testing {

inline AssessedState example_state() {
  AssessedState state;
  state.temperature_degc = 31;
  state.ph = 8.247;
  state.ph_from = "measured";
  state.measured_ph = 8.25;
  state.measured_ph_degc = 25.0;
  state.ionic_strength = 0.01943;
  state.water_activity = 0.99964;
  state.density_kg_per_l = 0.99631;
  state.alkalinity_eq_per_kg = 2.1e-3;
  state.measured_conductivity_us_cm = 1200;
  // Chosen so that rounding each line by itself does not give the rounded sum.
  state.ledger = {{"Ca+2", 2, 3.20406e-3, 6.40812e-3},
                  {"Na+", 1, 3.59056e-3, 3.59056e-3},
                  {"Mg+2", 2, 0.85286e-3, 1.70572e-3},
                  {"K+", 1, 0.40566e-3, 0.40566e-3},
                  {"NH4+", 1, 1.04e-5, 1.04e-5},
                  {"H+", 1, 6.46e-9, 6.46e-9},
                  {"SO4-2", -2, 3.07836e-3, -6.15672e-3},
                  {"Cl-", -1, 3.06106e-3, -3.06106e-3},
                  {"HCO3-", -1, 1.78356e-3, -1.78356e-3},
                  {"NO3-", -1, 1.00466e-3, -1.00466e-3},
                  {"OH-", -1, 3.17e-6, -3.17e-6}};
  for (const LedgerLine& line : state.ledger) {
    (line.charge > 0 ? state.cations_eq_per_kg : state.anions_eq_per_kg) +=
        line.charge > 0 ? line.eq_per_kg : -line.eq_per_kg;
    state.species.push_back({line.species, line.charge, line.molality, 0.8, 0.8 * line.molality});
  }
  state.imbalance_eq_per_kg = state.cations_eq_per_kg - state.anions_eq_per_kg;
  state.imbalance_percent =
      100 * state.imbalance_eq_per_kg / (state.cations_eq_per_kg + state.anions_eq_per_kg);
  state.reported_imbalance_eq_per_kg = state.imbalance_eq_per_kg;
  state.reported_imbalance_percent = state.imbalance_percent;
  state.accepted_imbalance_percent = 5;
  state.totals = {
      {"calcium", 4.0e-3, 159.8, "Ca", "399 mg/L as CaCO3"},
      {"inorganic_carbon", 2.0e-3, std::numeric_limits<double>::quiet_NaN(), "CO2", ""}};
  state.minerals = {{"calcite", "CaCO3", 0.954, 0.02, true, "The usual hard scale.", 0},
                    {"aragonite", "CaCO3", 0.82, 0.02, true, "", 1.2e-4},
                    {"brucite", "Mg(OH)2", 0.04, 0.1, true, "", 0},
                    {"gypsum", "CaSO4(H2O)2", -0.91, 0.02, true, "Above 40 degC less.", 0},
                    {"celestite", "SrSO4", -6.2, 0.02, true, "", 0},
                    {"hydroxyapatite",
                     "Ca5(PO4)3OH",
                     9.31,
                     1.0,
                     false,
                     "Forms by way of less stable phosphates, so that waters stay far above it.",
                     0},
                    {"magnesite", "MgCO3", -0.4, 0.1, false, "", 0}};
  state.gases = {{"carbon dioxide", "CO2", 5.1e-4}, {"ammonia", "NH3", 3.0e-10}};
  state.indices = {
      {"langelier",
       "Langelier saturation index",
       0.957,
       "",
       "pH - pHs",
       "Langelier 1936",
       {{"pH", 8.247, ""}, {"calcium", 3.3e-3, "mol/L"}},
       ""},
      {"ryznar", "Ryznar stability index", {}, "", "2 pHs - pH", "Ryznar 1944", {}, "calcium"},
      {"ccpp_mg_per_L_as_CaCO3",
       "Calcium carbonate precipitation potential",
       31.27,
       "mg/L as CaCO3",
       "what forms until equilibrium",
       "Standard Methods 2330 C",
       {{"temperature", 31, "degC"}},
       ""}};
  state.cautions = {{"temperature", "First caution, one sentence."},
                    {"phosphate",
                     "Second caution: a longer one, which has to be wrapped because it "
                     "does not fit into a single line of the terminal at all."}};
  state.certificate.converged = true;
  state.certificate.worst_balance_residual = 1.2e-15;
  state.certificate.worst_balance = "CO3-2";
  state.certificate.charge_residual = 3e-16;
  state.certificate.ionic_strength_residual = 2e-13;
  state.certificate.iterations = 6;
  state.certificate.path = "fast";
  return state;
}

inline Assessment example_assessment() {
  Assessment assessment;
  assessment.title = "Cooling blowdown, 31 °C, µ-filtered";
  assessment.chemistry = "an invented set";
  assessment.digest = "sha256:" + std::string(64, 'a');
  assessment.activity_model = "davies";
  assessment.activity_title = "Davies (1962)";
  assessment.max_ionic_strength = 0.5;
  assessment.states.push_back(example_state());
  return assessment;
}

}  // namespace ionledger::testing
