// What every step needs at hand: the plant, and an equilibrium system for each temperature, built
// once.
#pragma once

#include <map>
#include <optional>
#include <string>
#include <vector>

#include "equilibrium/system.hpp"
#include "ionledger/treatment.hpp"

namespace ionledger {

/// A phase takes water along or leaves some behind, which changes every molality by some 1e-5 of
/// itself; after this many passes the rest is rounding.
inline constexpr int phase_passes = 3;

/// Molar mass of water, kg/mol, by the atomic weights of the chemistry.
[[nodiscard]] double water_kg_per_mol();

class Workbench {
 public:
  explicit Workbench(const Plant& plant) : plant_(plant) {}

  [[nodiscard]] const Plant& plant() const { return plant_; }
  [[nodiscard]] const Chemistry& chemistry() const { return plant_.chemistry; }

  [[nodiscard]] Solution solve(const Problem& problem);

  /// The totals of `amounts` per kg of the water in it, not solved.
  [[nodiscard]] static Water unsolved(const Amounts& amounts,
                                      Temperature temperature,
                                      Pressure pressure);
  /// The water that `amounts` make; nullopt, and why in failure(), when they make none.
  [[nodiscard]] std::optional<Water> water(const Amounts& amounts,
                                           Temperature temperature,
                                           Pressure pressure);

  /// Why the last step stopped.
  [[nodiscard]] const std::string& failure() const { return failure_; }
  std::nullopt_t fail(std::string reason) {
    failure_ = std::move(reason);
    return std::nullopt;
  }

  [[nodiscard]] Amounts none() const;
  /// `mol` of a mineral or gas, in dissolved components.
  template <class Phase>
  [[nodiscard]] Amounts dissolved(const Phase& phase, double mol) const {
    Amounts amounts = none();
    for (std::size_t i = 0; i < phase.dissolution.size(); ++i) {
      amounts.basis[i] = mol * phase.dissolution[i];
    }
    amounts.water_kg = mol * phase.water_exponent * water_kg_per_mol();
    return amounts;
  }

  /// Volume of the water as it stands, L per kg of water in the feed.
  [[nodiscard]] double litres(const Water& water) const {
    return water.water_kg * litres_per_kg_water(water, plant_.chemistry);
  }
  /// `amounts`, of mass `kg`, as a portion of what went into or out of `water`.
  [[nodiscard]] Portion portion(
      std::string what, Amounts amounts, double mol, double kg, const Water& water) const;
  /// The same, of the mass that the amounts have.
  [[nodiscard]] Portion portion(std::string what,
                                Amounts amounts,
                                double mol,
                                const Water& water) const;

 private:
  Plant plant_;
  std::map<double, EquilibriumSystem> systems_;  // by temperature in K
  std::string failure_;
};

// One function for each action: the water after it, or nullopt and why in bench.failure().
using Applied = std::optional<Water>;
[[nodiscard]] Applied apply(const Blend&, const Water&, Workbench&, StepRecord&);
[[nodiscard]] Applied apply(const Dose&, const Water&, Workbench&, StepRecord&);
[[nodiscard]] Applied apply(const BringPH&, const Water&, Workbench&, StepRecord&);
[[nodiscard]] Applied apply(const ChangeTemperature&, const Water&, Workbench&, StepRecord&);
[[nodiscard]] Applied apply(const Concentrate&, const Water&, Workbench&, StepRecord&);
[[nodiscard]] Applied apply(const Strip&, const Water&, Workbench&, StepRecord&);
[[nodiscard]] Applied apply(const OpenTo&, const Water&, Workbench&, StepRecord&);
[[nodiscard]] Applied apply(const Headspace&, const Water&, Workbench&, StepRecord&);
[[nodiscard]] Applied apply(const Settle&, const Water&, Workbench&, StepRecord&);
[[nodiscard]] Applied apply(const RemoveSolids&, const Water&, Workbench&, StepRecord&);
[[nodiscard]] Applied apply(const PassBed&, const Water&, Workbench&, StepRecord&);
[[nodiscard]] Applied apply(const ExchangeIons&, const Water&, Workbench&, StepRecord&);
[[nodiscard]] Applied apply(const Recycle&, const Water&, Workbench&, StepRecord&);

/// kg of product, for every kg of water in the feed, that a dose means in `water`.
[[nodiscard]] double product_kg(const Dose& dose,
                                const Reagent& reagent,
                                const Water& water,
                                Workbench& bench);
/// A mass of the reagent may be written "as" this formula: it holds one element besides hydrogen
/// and oxygen, and the active substance holds it too.
[[nodiscard]] bool dose_can_be_as(const std::string& formula, const Reagent& reagent);
/// The neutral species as which a gas is dissolved, by the components it is made of; -1 when there
/// is none.
[[nodiscard]] int dissolved_form(const Gas& gas, const Chemistry& chemistry);
/// The gas a key such as carbon_dioxide means; -1 when there is none.
[[nodiscard]] int gas_named(const std::string& key, const Chemistry& chemistry);

/// Every quantity of an action under its key in the plant file: "amount", "rejection.sodium".
[[nodiscard]] std::vector<std::pair<std::string, Given*>> quantities_of(Action& action);

/// `other` added to `water`, at the mass-weighted temperature of the two; booked as `what`.
[[nodiscard]] Applied mixed(const Water& water,
                            const Water& other,
                            const std::string& what,
                            Workbench& bench,
                            StepRecord& record);

}  // namespace ionledger
