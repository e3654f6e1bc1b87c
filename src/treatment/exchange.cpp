// Ion exchange: equivalents taken are given back, as the resin's table says.
#include <algorithm>
#include <cmath>

#include "equilibrium/system.hpp"
#include "treatment/workbench.hpp"

namespace ionledger {
namespace {

/// Equivalents of one component that a resin takes; a neutral weak acid counts nothing.
double equivalents(std::size_t component, double mol, const Chemistry& chemistry) {
  return std::abs(chemistry.species[component].charge_number) * mol;
}

}  // namespace

Applied apply(const ExchangeIons& exchange,
              const Water& water,
              Workbench& bench,
              StepRecord& record) {
  const Chemistry& chemistry = bench.chemistry();
  const Resin& resin = *bench.plant().supplies.resin(exchange.resin.text);
  const double taken_share = exchange.leakage ? 1 - exchange.leakage->quantity.value_in_si : 1;
  Amounts amounts = amounts_of(water);
  for (const Resin::Exchange& part : resin.exchanges) {
    std::vector<std::pair<std::size_t, double>> taken;
    double sum = 0;
    for (const std::string& name : part.takes) {
      const auto i = static_cast<std::size_t>(chemistry.species_index(name));
      const double mol = std::max(0.0, amounts.basis[i] * taken_share);
      if (mol == 0) continue;
      taken.emplace_back(i, mol);
      sum += equivalents(i, mol, chemistry);
    }
    double share = 1;
    if (resin.up_to_alkalinity && sum > 0) {
      share = std::clamp(alkalinity(chemistry, amounts.basis) / sum, 0.0, 1.0);
    }
    for (const auto& [i, mol] : taken) {
      Amounts gone = bench.none();
      gone.basis[i] = mol * share;
      amounts.add(gone, -1);
      record.removed.push_back(bench.portion(chemistry.species[i].name, gone, mol * share, water));
    }
    const auto s = static_cast<std::size_t>(chemistry.species_index(part.gives));
    const Species& given = chemistry.species[s];
    const double mol = sum * share / std::abs(given.charge_number);
    if (mol == 0) continue;
    Amounts gained = bench.none();
    for (std::size_t i = 0; i < gained.basis.size(); ++i)
      gained.basis[i] = mol * given.formation[i];
    gained.water_kg = mol * given.water_exponent * water_kg_per_mol();
    amounts.add(gained);
    record.added.push_back(bench.portion(given.name, gained, mol, water));
  }
  return bench.water(amounts, water.temperature, water.pressure);
}

}  // namespace ionledger
