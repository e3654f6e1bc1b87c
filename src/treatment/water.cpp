// Amounts, volumes and masses of a water on its way through the train.
#include <cassert>
#include <cmath>

#include "stream/volume.hpp"
#include "treatment/workbench.hpp"

namespace ionledger {
namespace {

constexpr double seconds_per_hour = 3600;

}  // namespace

double water_kg_per_mol() {
  static const double value = molar_mass_g_per_mol({{"H", 2}, {"O", 1}}) / 1000;
  return value;
}

void Amounts::add(const Amounts& other, double factor) {
  for (std::size_t i = 0; i < basis.size(); ++i) basis[i] += factor * other.basis[i];
  for (std::size_t m = 0; m < solids.size(); ++m) solids[m] += factor * other.solids[m];
  water_kg += factor * other.water_kg;
}

double mass_kg(const Amounts& amounts, const Chemistry& chemistry) {
  double mass = amounts.water_kg;
  for (std::size_t i = 0; i < amounts.basis.size(); ++i) {
    mass += amounts.basis[i] * chemistry.species[i].molar_mass_g / 1000;
  }
  for (std::size_t m = 0; m < amounts.solids.size(); ++m) {
    mass += amounts.solids[m] * chemistry.minerals[m].molar_mass_g / 1000;
  }
  return mass;
}

Water water_of(const Stream& stream, const ClosedStream& closed, const Chemistry& chemistry) {
  assert(closed.status == SolveStatus::converged);
  Water water;
  water.totals = closed.totals;
  water.solids.assign(chemistry.minerals.size(), 0.0);
  water.temperature = stream.temperature;
  water.pressure = stream.pressure;
  water.solution = closed.solution;
  return water;
}

Amounts amounts_of(const Water& water) {
  Amounts amounts{water.totals, water.water_kg, water.solids};
  for (double& total : amounts.basis) total *= water.water_kg;
  for (double& solid : amounts.solids) solid *= water.water_kg;
  return amounts;
}

double litres_per_kg_water(const Water& water, const Chemistry& chemistry) {
  return solution_volume_l(
      chemistry, water.solution.molality, water.solution.ionic_strength_molal, water.temperature);
}

Amounts net_of(const StepRecord& record, const Chemistry& chemistry) {
  Amounts net{std::vector<double>(static_cast<std::size_t>(chemistry.n_basis), 0.0),
              0,
              std::vector<double>(chemistry.minerals.size(), 0.0)};
  for (const Portion& portion : record.added) net.add(portion.amounts);
  for (const Portion& portion : record.removed) net.add(portion.amounts, -1);
  if (record.solids_stay) return net;
  for (const Portion& portion : record.deposited) net.add(portion.amounts, -1);
  return net;
}

Plant plant_of(const Stream& stream,
               const Water& feed,
               const Chemistry& chemistry,
               const ActivityModel& model,
               const Supplies& supplies) {
  Plant plant{chemistry, model, supplies, std::nullopt};
  if (stream.flow) {
    plant.feed_water_kg_per_s = stream.flow->value() * 1000 / litres_per_kg_water(feed, chemistry);
  }
  return plant;
}

Solution Workbench::solve(const Problem& problem) {
  const double temperature_k = in_kelvin(problem.temperature);
  auto found = systems_.find(temperature_k);
  if (found == systems_.end()) {
    found = systems_.try_emplace(temperature_k, plant_.chemistry, plant_.model, problem.temperature)
                .first;
  }
  return found->second.solve(problem);
}

Amounts Workbench::none() const {
  return {std::vector<double>(static_cast<std::size_t>(plant_.chemistry.n_basis), 0.0),
          0,
          std::vector<double>(plant_.chemistry.minerals.size(), 0.0)};
}

Water Workbench::unsolved(const Amounts& amounts, Temperature temperature, Pressure pressure) {
  Water water{amounts.basis, amounts.solids, amounts.water_kg, temperature, pressure, {}};
  for (double& total : water.totals) total /= water.water_kg;
  for (double& solid : water.solids) solid /= water.water_kg;
  return water;
}

std::optional<Water> Workbench::water(const Amounts& amounts,
                                      Temperature temperature,
                                      Pressure pressure) {
  if (!(amounts.water_kg > 0)) return fail("no water is left");
  Water water = unsolved(amounts, temperature, pressure);
  Problem problem;
  problem.temperature = temperature;
  problem.totals = water.totals;
  water.solution = solve(problem);
  if (water.solution.status != SolveStatus::converged) {
    return fail("the water after it has no equilibrium: " + water.solution.reason);
  }
  return water;
}

Portion Workbench::portion(
    std::string what, Amounts amounts, double mol, double kg, const Water& water) const {
  Portion portion{std::move(what), std::move(amounts), mol, kg, 1e6 * kg / litres(water), {}, {}};
  if (plant_.feed_water_kg_per_s) {
    portion.kg_per_h = kg * *plant_.feed_water_kg_per_s * seconds_per_hour;
  }
  return portion;
}

Portion Workbench::portion(std::string what,
                           Amounts amounts,
                           double mol,
                           const Water& water) const {
  const double kg = mass_kg(amounts, plant_.chemistry);
  return portion(std::move(what), std::move(amounts), mol, kg, water);
}

}  // namespace ionledger
