// Cautions: the analysis, then the ranges of model and constants, then what can hurt.
#include "assessment/cautions.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "assessment/ion_balance.hpp"

namespace ionledger {
namespace {

constexpr double corrosive_below_ph = 2.0;  // common practice: strongly acid, strongly alkaline
constexpr double corrosive_above_ph = 12.5;
constexpr double share_that_matters = 0.02;  // of a basis total; smaller species move nothing
constexpr double index_that_matters = -1.0;  // a mineral far below saturation needs no caution
constexpr double gas_that_leaves_bar = 1.0;
constexpr std::size_t names_in_a_list = 6;

bool is_outside(const TemperatureRange& range, double degc) {
  constexpr double slack = 0.05;
  return degc < range.low_degc - slack || degc > range.high_degc + slack;
}

std::string joined(const std::vector<std::string>& names) {
  std::string text;
  for (std::size_t i = 0; i < std::min(names.size(), names_in_a_list); ++i) {
    text += (i == 0 ? "" : ", ") + names[i];
  }
  if (names.size() > names_in_a_list)
    text += fmt::format(" and {} more", names.size() - names_in_a_list);
  return text;
}

/// Species that carry a share of some total worth looking at.
std::vector<std::string> species_out_of_range(const ClosedStream& closed,
                                              const Chemistry& chemistry,
                                              double degc) {
  std::vector<std::string> names;
  const auto n_basis = static_cast<std::size_t>(chemistry.n_basis);
  for (std::size_t s = n_basis; s < chemistry.species.size(); ++s) {
    const Species& species = chemistry.species[s];
    if (!is_outside(species.constant.valid, degc)) continue;
    for (std::size_t i = 1; i < n_basis; ++i) {
      const double total = closed.totals[i];
      if (total > 0 && std::abs(species.formation[i]) * closed.solution.molality[s] >
                           share_that_matters * total) {
        names.push_back(species.name);
        break;
      }
    }
  }
  return names;
}

std::vector<std::string> minerals_out_of_range(const AssessedState& state,
                                               const Chemistry& chemistry) {
  std::vector<std::string> names;
  for (const MineralLine& line : state.minerals) {
    if (line.saturation_index < index_that_matters) continue;
    const auto m = static_cast<std::size_t>(chemistry.mineral_index(line.mineral));
    if (is_outside(chemistry.minerals[m].constant.valid, state.temperature_degc)) {
      names.push_back(line.mineral);
    }
  }
  return names;
}

class CautionList {
 public:
  void add(Caution caution) {
    if (!caution.says.empty()) cautions_.push_back(std::move(caution));
  }
  void add(std::string about, std::string says) { add(Caution{std::move(about), std::move(says)}); }
  std::vector<Caution> take() { return std::move(cautions_); }

 private:
  std::vector<Caution> cautions_;
};

/// An analysis whose ions do not carry the current that was measured.
Caution conductivity_caution(const AssessedState& state) {
  if (!state.measured_conductivity_us_cm || !state.conductivity_us_cm) return {};
  const double ratio = *state.measured_conductivity_us_cm / *state.conductivity_us_cm;
  if (ratio >= least_conductivity_ratio && ratio <= largest_conductivity_ratio) return {};
  return {"conductivity",
          fmt::format(
              "Measured are {:.4g} uS/cm; the ions of this analysis make {:.4g} at 25 degC. The "
              "ratio {:.2f} is outside {:.1f} to {:.1f} (Standard Methods 1030 E): {}, or the "
              "meter was not read at 25 degC.",
              *state.measured_conductivity_us_cm,
              *state.conductivity_us_cm,
              ratio,
              least_conductivity_ratio,
              largest_conductivity_ratio,
              ratio > 1 ? "ions are missing or too low" : "ions are too high")};
}

void add_hazards(const AssessedState& state, const Chemistry& chemistry, CautionList& list) {
  if (state.ph < corrosive_below_ph || state.ph > corrosive_above_ph) {
    list.add("handling",
             fmt::format(
                 "At pH {:.1f} this water is corrosive to skin, eyes and many materials. Handle it "
                 "under local codes and the plant's own rules.",
                 state.ph));
  }
  for (const GasLine& gas : state.gases) {
    const Gas& known = chemistry.gases[static_cast<std::size_t>(chemistry.gas_index(gas.gas))];
    if (known.caution_above_bar > 0 && gas.partial_pressure_bar > known.caution_above_bar) {
      list.add(gas.gas,
               fmt::format("Air in equilibrium with this water holds {:.2g} bar of it. {}",
                           gas.partial_pressure_bar,
                           known.caution));
    } else if (gas.partial_pressure_bar > gas_that_leaves_bar) {
      list.add(gas.gas,
               fmt::format(
                   "Its pressure over this water is {:.2g} bar: it leaves an open tank as bubbles, "
                   "can displace air in closed rooms, and puts a sealed vessel under pressure.",
                   gas.partial_pressure_bar));
    }
  }
}

}  // namespace

std::vector<Caution> cautions_of(const AssessedState& state,
                                 const Stream& stream,
                                 const ClosedStream& closed,
                                 const Chemistry& chemistry,
                                 const ActivityModel& model) {
  CautionList list;
  list.add(imbalance_caution(state.reported_imbalance_percent, state.accepted_imbalance_percent));
  if (state.ionic_strength > model.max_ionic_strength_molal) {
    list.add("ionic strength",
             fmt::format(
                 "{:.3g} mol/kg is beyond the {:.3g} mol/kg up to which the {} model is trusted; "
                 "activities, pH and saturation indices are extrapolated.",
                 state.ionic_strength,
                 model.max_ionic_strength_molal,
                 model.name));
  }
  add_hazards(state, chemistry, list);
  list.add(conductivity_caution(state));
  list.add(missing_majors_caution(stream, chemistry));
  for (const Caution& caution : closed.cautions) list.add(caution);
  for (const Caution& caution : stream.cautions) list.add(caution);
  const auto minerals = minerals_out_of_range(state, chemistry);
  if (!minerals.empty()) {
    list.add("temperature",
             fmt::format(
                 "At {:.1f} degC the constants of these minerals are used outside the range they "
                 "were measured in: {}.",
                 state.temperature_degc,
                 joined(minerals)));
  }
  const auto species = species_out_of_range(closed, chemistry, state.temperature_degc);
  if (!species.empty()) {
    list.add(
        "temperature",
        fmt::format("At {:.1f} degC the constants of these species are used outside the range they "
                    "were measured in: {}.",
                    state.temperature_degc,
                    joined(species)));
  }
  if (state.certificate.may_have_other_solutions) {
    list.add(
        "several solutions",
        "The activity model allows more than one composition with these totals; the one of lowest "
        "ionic strength is shown.");
  }
  return list.take();
}

}  // namespace ionledger
