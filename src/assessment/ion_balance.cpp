// The ion balance of a report, without solving anything; separate because `check` needs only this.
#include "assessment/ion_balance.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

namespace ionledger {
namespace {

constexpr double largest_ph_without_free_acid = 5.0;
constexpr std::ptrdiff_t majors_of_an_analysis = 3;

const Constituent* constituent_named(const Chemistry& chemistry, const std::string& name) {
  const int index = chemistry.constituent_index(name);
  return index < 0 ? nullptr : &chemistry.constituents[static_cast<std::size_t>(index)];
}

/// Charge that one mole of the constituent carries near neutral pH.
double charge_near_neutral(const Chemistry& chemistry, const Constituent& constituent) {
  if (constituent.kind == Constituent::Kind::alkalinity) return -1;
  const int species = chemistry.species_index(constituent.mostly);
  return species < 0 ? 0 : chemistry.species[static_cast<std::size_t>(species)].charge_number;
}

bool is_reported(const Stream& stream, const Chemistry& chemistry, const Constituent& constituent) {
  if (constituent.kind == Constituent::Kind::alkalinity) {
    return stream.alkalinity_eq_per_kg.has_value() || stream.inorganic_carbon_is_known;
  }
  const int component = chemistry.species_index(constituent.basis_species);
  return component >= 0 && stream.reported[static_cast<std::size_t>(component)];
}

}  // namespace

double imbalance_percent(double cations_eq, double anions_eq) {
  const double sum = cations_eq + anions_eq;
  return sum > 0 ? 100 * (cations_eq - anions_eq) / sum : 0;
}

double accepted_imbalance_percent(double cations_eq_per_l, double anions_eq_per_l) {
  // Standard Methods for the Examination of Water and Wastewater, 1030 E: anion sum 0 to 3 meq/L
  // within 0.2 meq/L, 3 to 10 within 2 %, 10 to 800 within 5 %.
  constexpr double first_band = 3e-3;
  constexpr double second_band = 10e-3;
  constexpr double absolute = 0.2e-3;
  const double sum = cations_eq_per_l + anions_eq_per_l;
  if (anions_eq_per_l <= first_band) return sum > 0 ? std::min(100.0, 100 * absolute / sum) : 100;
  return anions_eq_per_l <= second_band ? 2 : 5;
}

Caution imbalance_caution(double percent, double accepted) {
  if (std::abs(percent) <= accepted) return {};
  return {"ion balance",
          fmt::format(
              "Cations and anions differ by {:+.1f} % of their sum; {:.1f} % is accepted for this "
              "strength (Standard Methods 1030 E). {} are missing or {} are too high: check the "
              "analysis before you trust what follows.",
              percent,
              accepted,
              percent > 0 ? "Anions" : "Cations",
              percent > 0 ? "cations" : "anions")};
}

Caution missing_majors_caution(const Stream& stream, const Chemistry& chemistry) {
  std::string missing;
  std::ptrdiff_t present = 0;
  for (const Constituent& constituent : chemistry.constituents) {
    if (!constituent.is_major) continue;
    if (is_reported(stream, chemistry, constituent)) {
      ++present;
    } else {
      missing += (missing.empty() ? "" : ", ") + constituent.name;
    }
  }
  if (missing.empty() || present < majors_of_an_analysis) return {};
  return {"missing ions",
          fmt::format("Not reported: {}. Counted as zero, which makes the ion balance and the "
                      "saturation indices that need them unsure.",
                      missing)};
}

ReportBalance balance_of_report(const Stream& stream, const Chemistry& chemistry) {
  ReportBalance result;
  for (const Conversion& conversion : stream.conversions) {
    const Constituent* constituent = constituent_named(chemistry, conversion.constituent);
    if (constituent == nullptr) continue;
    ReportBalance::Line line{
        conversion.constituent, conversion.as_written, conversion.mol_per_kg, 0};
    const bool is_counted_elsewhere =
        constituent->kind == Constituent::Kind::hardness ||
        (stream.alkalinity_eq_per_kg &&
         chemistry.species_index(constituent->basis_species) == stream.carbon_component);
    if (!is_counted_elsewhere) {
      line.eq_per_kg = charge_near_neutral(chemistry, *constituent) * conversion.mol_per_kg;
    }
    result.lines.push_back(std::move(line));
  }
  if (stream.ph && stream.ph->value < largest_ph_without_free_acid) {
    const double hydrogen = std::pow(10.0, -stream.ph->value);
    result.lines.push_back(
        {"free acid", fmt::format("pH {:.2f}", stream.ph->value), hydrogen, hydrogen});
  }
  for (const ReportBalance::Line& line : result.lines) {
    (line.eq_per_kg > 0 ? result.cations_eq_per_kg : result.anions_eq_per_kg) +=
        std::abs(line.eq_per_kg);
  }
  result.imbalance_percent = imbalance_percent(result.cations_eq_per_kg, result.anions_eq_per_kg);
  const double litres = stream.litre_per_kg_water;
  result.accepted_percent = accepted_imbalance_percent(result.cations_eq_per_kg / litres,
                                                       result.anions_eq_per_kg / litres);
  result.cautions = stream.cautions;
  for (Caution caution : {imbalance_caution(result.imbalance_percent, result.accepted_percent),
                          missing_majors_caution(stream, chemistry)}) {
    if (!caution.says.empty()) result.cautions.push_back(std::move(caution));
  }
  return result;
}

}  // namespace ionledger
