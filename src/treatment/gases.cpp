// Steps that move gases: stripping, contact with an atmosphere, a sealed gas space; and the change
// of temperature, which moves none.
#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "ionledger/water.hpp"
#include "treatment/root.hpp"
#include "treatment/workbench.hpp"

namespace ionledger {
namespace {

constexpr double gas_constant_l_bar = 0.08314462618;  // L bar/(mol K), CODATA 2018, exact
constexpr double pascal_per_bar = 1e5;

/// A gas of the chemistry at a partial pressure.
struct HeldPressure {
  std::size_t gas = 0;
  double bar = 0;
};

std::vector<HeldPressure> pressures_of(const OpenTo& open, const Workbench& bench) {
  std::vector<HeldPressure> held;
  const Chemistry& chemistry = bench.chemistry();
  if (open.atmosphere.text.empty()) {
    for (const NamedGiven& gas : open.pressures) {
      held.push_back({static_cast<std::size_t>(gas_named(gas.name.text, chemistry)),
                      gas.value.quantity.value_in_si / pascal_per_bar});
    }
    return held;
  }
  for (const auto& [name, bar] :
       bench.plant().supplies.atmosphere(open.atmosphere.text)->pressures_bar) {
    held.push_back({static_cast<std::size_t>(chemistry.gas_index(name)), bar});
  }
  return held;
}

/// Books `mol` of a gas, for every kg of feed, that left the water (or, negative, entered it).
void book_gas(
    const Gas& gas, double mol, const Water& water, Workbench& bench, StepRecord& record) {
  if (mol == 0) return;
  auto& side = mol > 0 ? record.removed : record.added;
  side.push_back(
      bench.portion(gas.name, bench.dissolved(gas, std::abs(mol)), std::abs(mol), water));
}

/// mol of each gas that enters `water`, per kg of it, when all are held at their pressures; empty
/// and why when there is no equilibrium.
std::vector<double> taken_up(const std::vector<HeldPressure>& held,
                             const Water& water,
                             Workbench& bench) {
  Problem problem;
  problem.temperature = water.temperature;
  problem.totals = water.totals;
  for (const HeldPressure& gas : held) {
    problem.gases.push_back({static_cast<int>(gas.gas), gas.bar});
  }
  const Solution solution = bench.solve(problem);
  if (solution.status == SolveStatus::converged) return solution.gas_taken_up;
  static_cast<void>(bench.fail("no equilibrium with the gas: " + solution.reason));
  return {};
}

/// Every component of the gas, hydrogen aside, is in the water.
bool can_give_off(const Gas& gas, const Water& water) {
  for (std::size_t i = 1; i < water.totals.size(); ++i) {
    if (gas.dissolution[i] != 0 && !(water.totals[i] > 0)) return false;
  }
  return true;
}

}  // namespace

int gas_named(const std::string& key, const Chemistry& chemistry) {
  std::string name = key;
  std::replace(name.begin(), name.end(), '_', ' ');
  return chemistry.gas_index(name);
}

Applied apply(const Strip& strip, const Water& water, Workbench& bench, StepRecord& record) {
  Amounts amounts = amounts_of(water);
  for (const NamedGiven& entry : strip.shares) {
    const Gas& gas =
        bench.chemistry()
            .gases[static_cast<std::size_t>(gas_named(entry.name.text, bench.chemistry()))];
    const auto form = static_cast<std::size_t>(dissolved_form(gas, bench.chemistry()));
    const double mol =
        water.water_kg * water.solution.molality[form] * entry.value.quantity.value_in_si;
    amounts.add(bench.dissolved(gas, mol), -1);
    book_gas(gas, mol, water, bench, record);
  }
  return bench.water(amounts, water.temperature, water.pressure);
}

Applied apply(const OpenTo& open, const Water& water, Workbench& bench, StepRecord& record) {
  const std::vector<HeldPressure> held = pressures_of(open, bench);
  std::vector<double> taken_mol(held.size(), 0.0);
  Amounts amounts = amounts_of(water);
  for (int pass = 0; pass < phase_passes; ++pass) {
    const Water now = Workbench::unsolved(amounts, water.temperature, water.pressure);
    const std::vector<double> taken = taken_up(held, now, bench);
    if (taken.size() != held.size()) return std::nullopt;
    for (std::size_t k = 0; k < held.size(); ++k) {
      const double mol = taken[k] * now.water_kg;
      amounts.add(bench.dissolved(bench.chemistry().gases[held[k].gas], mol));
      taken_mol[k] += mol;
    }
  }
  for (std::size_t k = 0; k < held.size(); ++k) {
    book_gas(bench.chemistry().gases[held[k].gas], -taken_mol[k], water, bench, record);
  }
  return bench.water(amounts, water.temperature, water.pressure);
}

Applied apply(const ChangeTemperature& change,
              const Water& water,
              Workbench& bench,
              StepRecord& record) {
  const Temperature to = kelvin(change.to.quantity.value_in_si);
  if (change.cools != (in_kelvin(to) < in_kelvin(water.temperature))) {
    record.cautions.push_back({"temperature",
                               fmt::format("The water came at {:.1f} degC, so this step {} it.",
                                           in_celsius(water.temperature),
                                           change.cools ? "does not cool" : "does not heat")});
  }
  const double vapour_bar = water_vapour_pressure(to).value() / pascal_per_bar;
  if (vapour_bar > water.pressure.value() / pascal_per_bar) {
    record.cautions.push_back(
        {"pressure",
         fmt::format("At {:.1f} degC water boils below {:.2f} bar: this state exists only in a "
                     "vessel that is sealed and built for that pressure.",
                     in_celsius(to),
                     vapour_bar)});
  }
  return bench.water(amounts_of(water), to, water.pressure);
}

// ---- a sealed gas space
// --------------------------------------------------------------------------

namespace {

/// Finds the pressures at which the gas space holds what the water gave off. For each gas in turn,
/// the others held, the gas taken up rises with its pressure, so there is one root; the rounds
/// converge because the whole is the minimum of one convex function.
class GasSpace {
 public:
  GasSpace(const Headspace& space, const Water& water, Workbench& bench)
      : water_(water),
        bench_(bench),
        mol_per_bar_(space.volume.quantity.value_in_si *
                     litres_per_kg_water(water, bench.chemistry()) /
                     (gas_constant_l_bar * in_kelvin(water.temperature))) {
    const Chemistry& chemistry = bench.chemistry();
    std::vector<double> first(chemistry.gases.size(), 0.0);
    for (const HeldPressure& gas : pressures_of(space.gas, bench)) first[gas.gas] = gas.bar;
    for (std::size_t g = 0; g < first.size(); ++g) {
      const Gas& gas = chemistry.gases[g];
      const bool is_in_water = can_give_off(gas, water);
      if (!(first[g] > 0) && !is_in_water) continue;
      held_.push_back({g, is_in_water ? pressure_over(g) : first[g]});
      first_bar_.push_back(first[g]);
      scale_.push_back(first[g] * mol_per_bar_ + most_that_is_there(gas));
    }
  }

  /// mol of each gas that entered the water, per kg of it; empty when it failed.
  std::vector<double> solve() {
    for (int round = 0; round < max_rounds; ++round) {
      bool is_steady = true;
      for (std::size_t k = 0; k < held_.size(); ++k) {
        const double before = held_[k].bar;
        if (!settle(k)) return {};
        const double change = std::abs(held_[k].bar - before) * mol_per_bar_;
        is_steady = is_steady && change <= tolerance * scale_[k];
      }
      if (is_steady || held_.size() < 2) return entered();
    }
    static_cast<void>(bench_.fail("the gas space finds no steady composition"));
    return {};
  }

  [[nodiscard]] std::size_t gas(std::size_t k) const { return held_[k].gas; }
  [[nodiscard]] std::size_t size() const { return held_.size(); }

 private:
  static constexpr int max_rounds = 200;
  static constexpr double tolerance = 1e-12;  // of what there is of the gas, in water and space
  static constexpr double root_tolerance = 1e-14;
  static constexpr double bracket_step = 4;  // of ln p
  static constexpr int max_bracket_steps = 100;

  /// Partial pressure over the water as it stands, bar.
  [[nodiscard]] double pressure_over(std::size_t g) const {
    const Gas& gas = bench_.chemistry().gases[g];
    double ln_bar = gas.water_exponent * std::log(water_.solution.water_activity) -
                    ln_dissolution(bench_.chemistry(), water_.temperature)[g];
    for (std::size_t i = 0; i < gas.dissolution.size(); ++i) {
      if (gas.dissolution[i] != 0) ln_bar += gas.dissolution[i] * water_.solution.ln_activity[i];
    }
    return std::exp(ln_bar);
  }

  /// mol of the gas that the components of one kg of water could make.
  [[nodiscard]] double most_that_is_there(const Gas& gas) const {
    double most = 0;
    for (std::size_t i = 1; i < water_.totals.size(); ++i) {
      if (gas.dissolution[i] > 0) most = std::max(most, water_.totals[i] / gas.dissolution[i]);
    }
    return most;
  }

  /// What the gas space gained plus what the water gained of gas k at ln p: zero at the answer.
  double excess(std::size_t k, double ln_bar) {
    held_[k].bar = std::exp(ln_bar);
    const std::vector<double> taken = taken_up(held_, water_, bench_);
    if (taken.empty()) {
      failed_ = true;
      return 0;
    }
    return taken[k] + (held_[k].bar - first_bar_[k]) * mol_per_bar_;
  }

  bool settle(std::size_t k) {
    Ordinate low{std::log(held_[k].bar), 0};
    low.f = excess(k, low.x);
    Ordinate high = low;
    for (int step = 0; step < max_bracket_steps && !failed_ && (high.f > 0) == (low.f > 0);
         ++step) {
      if (step > 0) low = high;
      high.x += low.f > 0 ? -bracket_step : bracket_step;
      high.f = excess(k, high.x);
    }
    if (failed_) return false;
    const double root = root_between(
        low, high, root_tolerance * scale_[k], [&](double ln_bar) { return excess(k, ln_bar); });
    held_[k].bar = std::exp(root);
    return !failed_;
  }

  /// From the gas space, which is exact where the water holds much more than it.
  [[nodiscard]] std::vector<double> entered() const {
    std::vector<double> mol;
    for (std::size_t k = 0; k < held_.size(); ++k) {
      mol.push_back((first_bar_[k] - held_[k].bar) * mol_per_bar_);
    }
    return mol;
  }

  const Water& water_;
  Workbench& bench_;
  double mol_per_bar_ = 0;  // in the gas space of one kg of water
  std::vector<HeldPressure> held_;
  std::vector<double> first_bar_;
  std::vector<double> scale_;  // mol of each gas that a rounding error is compared with
  bool failed_ = false;
};

}  // namespace

Applied apply(const Headspace& space, const Water& water, Workbench& bench, StepRecord& record) {
  GasSpace gas_space(space, water, bench);
  const std::vector<double> entered = gas_space.solve();
  if (entered.size() != gas_space.size()) return std::nullopt;
  Amounts amounts = amounts_of(water);
  for (std::size_t k = 0; k < entered.size(); ++k) {
    const Gas& gas = bench.chemistry().gases[gas_space.gas(k)];
    amounts.add(bench.dissolved(gas, entered[k] * water.water_kg));
    book_gas(gas, -entered[k] * water.water_kg, water, bench, record);
  }
  return bench.water(amounts, water.temperature, water.pressure);
}

}  // namespace ionledger
