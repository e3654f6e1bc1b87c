// The numbers of a water as a whole, with units.
#include "report/essentials.hpp"

#include "report/number_text.hpp"

namespace ionledger {
namespace {

std::string ph_text(const AssessedState& state) {
  std::string text = fixed_text(state.ph, 2);
  if (!state.measured_ph) return text + ", from " + state.ph_from;
  const double degc = state.measured_ph_degc.value_or(state.temperature_degc);
  const bool is_measured_here = plain_text(degc) == plain_text(state.temperature_degc);
  const std::string measured =
      fixed_text(*state.measured_ph, 2) + " measured at " + plain_text(degc) + " °C";
  if (state.ph_from != "measured") return text + ", from " + state.ph_from + "; " + measured;
  return is_measured_here ? text + ", measured" : text + " at this temperature; " + measured;
}

/// In equivalents, and as the laboratory wrote it or would have written it.
std::string alkalinity_text(const AssessedState& state) {
  std::string text = significant_text(state.alkalinity_eq_per_kg * 1e3) + " meq/kg of water";
  for (const TotalLine& total : state.totals) {
    if (total.constituent != "alkalinity") continue;
    text += ", " + significant_text(total.mg_per_l) + " mg/L as " + total.as_formula;
  }
  return text;
}

std::string conductivity_text(const AssessedState& state) {
  const auto value = [](const std::optional<double>& us_cm) {
    return us_cm ? significant_text(*us_cm, 4) + " µS/cm" : std::string("not known");
  };
  return value(state.conductivity_us_cm) + " at 25 °C from the ions, " +
         value(state.conductivity_at_temperature_us_cm) + " as the water is; " +
         (state.measured_conductivity_us_cm
              ? plain_text(*state.measured_conductivity_us_cm) + " µS/cm measured"
              : "not measured");
}

}  // namespace

std::vector<Essential> essentials_of(const AssessedState& state) {
  return {{"pH", ph_text(state)},
          {"ionic strength", significant_text(state.ionic_strength) + " mol/kg of water"},
          {"water activity", fixed_text(state.water_activity, 4)},
          {"density", fixed_text(state.density_kg_per_l, 4) + " kg/L"},
          {"alkalinity", alkalinity_text(state)},
          {"conductivity", conductivity_text(state)},
          {"dissolved solids",
           significant_text(state.tds_mg_per_l, 4) + " mg/L; dried at 180 °C " +
               significant_text(state.residue_180_mg_per_l, 4)}};
}

}  // namespace ionledger
