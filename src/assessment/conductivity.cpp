// Conductivity from composition: the law in conductivity.hpp on the ions of a solution.
#include "ionledger/conductivity.hpp"

#include <algorithm>
#include <cmath>
#include <cstdlib>

#include "ionledger/water.hpp"
#include "stream/volume.hpp"

namespace ionledger {
namespace {

constexpr double relaxation_constant = 2.801e6;     // K^1.5 (L/mol)^0.5
constexpr double electrophoretic_constant = 41.25;  // S cm2/mol P K^0.5 (L/mol)^0.5
constexpr double poise_per_pa_s = 10;
constexpr double s_per_m_per_s_cm2_per_l = 0.1;  // 1 S cm2/L = 1e-3 S/cm

/// The value of a list that starts at charge 1 and whose last holds for every higher charge.
double of_charge(const std::vector<double>& values, int charge_number) {
  if (values.empty() || charge_number == 0) return 0;
  const auto place = static_cast<std::size_t>(std::abs(charge_number)) - 1;
  return values[std::min(place, values.size() - 1)];
}

/// One ion as it moves: equivalents per litre, charge, and its conductivity at infinite dilution.
struct Carrier {
  double eq_per_l = 0;
  int charge_number = 0;
  double limiting = 0;
};

std::vector<Carrier> carriers_of(const Chemistry& chemistry,
                                 const Solution& solution,
                                 double litres) {
  std::vector<Carrier> carriers;
  for (std::size_t s = 0; s < chemistry.species.size(); ++s) {
    const int z = chemistry.species[s].charge_number;
    if (z == 0 || !(solution.molality[s] > 0)) continue;
    carriers.push_back(
        {std::abs(z) * solution.molality[s] / litres,
         z,
         limiting_conductivity_s_cm2_per_eq(chemistry, static_cast<int>(s), solution.temperature)});
  }
  return carriers;
}

/// Means over the ions of one sign, weighted with their equivalents; zeros when there are none.
struct SideMean {
  double charge = 0;
  double limiting = 0;
};

SideMean mean_of(const std::vector<Carrier>& carriers, int sign) {
  SideMean mean;
  double sum = 0;
  for (const Carrier& carrier : carriers) {
    if (carrier.charge_number * sign < 0) continue;
    sum += carrier.eq_per_l;
    mean.charge += carrier.eq_per_l * std::abs(carrier.charge_number);
    mean.limiting += carrier.eq_per_l * carrier.limiting;
  }
  if (sum > 0) {
    mean.charge /= sum;
    mean.limiting /= sum;
  }
  return mean;
}

/// B1 of the header without its temperature: z+ z- q / (1 + sqrt(q)).
double relaxation_of(const SideMean& cations, const SideMean& anions) {
  const double crossed = anions.charge * cations.limiting + cations.charge * anions.limiting;
  if (!(crossed > 0)) return 0;
  const double product = cations.charge * anions.charge;
  const double q =
      product * (cations.limiting + anions.limiting) / ((cations.charge + anions.charge) * crossed);
  return product * q / (1 + std::sqrt(q));
}

}  // namespace

double limiting_conductivity_s_cm2_per_eq(const Chemistry& chemistry,
                                          int species,
                                          Temperature temperature) {
  const ConductivityModel& model = chemistry.conductivity;
  const Species& s = chemistry.species[static_cast<std::size_t>(species)];
  if (s.charge_number == 0) return 0;
  double at_25 = of_charge(model.unlisted_s_cm2_per_eq, s.charge_number);
  double exponent = model.unlisted_viscosity_exponent;
  if (const auto own = model.ions.find(s.name); own != model.ions.end()) {
    at_25 = own->second.limiting_s_cm2_per_eq;
    exponent = own->second.viscosity_exponent;
  }
  const double fluidity = water_viscosity_pa_s(celsius(25.0)) / water_viscosity_pa_s(temperature);
  return at_25 * std::pow(fluidity, exponent);
}

Conductivity conductivity(const Chemistry& chemistry, const Solution& solution) {
  const double litres = solution_volume_l(
      chemistry, solution.molality, solution.ionic_strength_molal, solution.temperature);
  const std::vector<Carrier> carriers = carriers_of(chemistry, solution, litres);
  const double root_i = std::sqrt(solution.ionic_strength_molal / litres);

  const double eps_t = water_permittivity(solution.temperature) * in_kelvin(solution.temperature);
  const double poise = water_viscosity_pa_s(solution.temperature) * poise_per_pa_s;
  const double water_kg_per_l = water_density(solution.temperature).value() / 1000;
  const double b = debye_hueckel_slopes(solution.temperature).b / std::sqrt(water_kg_per_l);
  const double b1 = relaxation_constant / std::pow(eps_t, 1.5) *
                    relaxation_of(mean_of(carriers, 1), mean_of(carriers, -1));
  const double b2 = electrophoretic_constant / (poise * std::sqrt(eps_t));

  double sum = 0;
  for (const Carrier& ion : carriers) {
    const double size = of_charge(chemistry.conductivity.sizes_angstrom, ion.charge_number);
    const double lost =
        (b1 * ion.limiting + b2 * std::abs(ion.charge_number)) * root_i / (1 + b * size * root_i);
    sum += ion.eq_per_l * std::max(ion.limiting - lost, 0.0);
  }
  return s_per_m_per_s_cm2_per_l * sum * Conductivity::unit_type();
}

}  // namespace ionledger
