// Printing a constant with everything that is known of it.
#include "report/text_constant.hpp"

#include <array>
#include <cmath>
#include <utility>

#include "report/number_text.hpp"
#include "report/text_topics.hpp"

namespace ionledger {
namespace {

/// Digits of a coefficient as it was published; a double holds 15 of any decimal number.
constexpr int published_digits = 15;

std::string left_side(double to_log10_k) {
  if (to_log10_k == 1) return "log10 K";
  return to_log10_k == -1 ? "pK" : "ln K";
}

std::string temperature_dependence(const EquilibriumConstant& constant) {
  if (constant.is_water_ion_product) return "follows the ion product of water";
  if (constant.of_temperature) return function_text(*constant.of_temperature) + ", T in K";
  if (constant.enthalpy_kj_per_mol) return "from the enthalpy (van 't Hoff)";
  return "unknown; the value at 25 °C is used everywhere";
}

std::string uncertainty_text(const EquilibriumConstant& constant) {
  return "±" + fixed_text(half_width_95 * constant.uncertainty, 3) + " in log10 K (95 %), " +
         (constant.uncertainty_is_estimated ? "estimated here" : "from the source");
}

}  // namespace

std::string range_text(const TemperatureRange& range) {
  return plain_text(range.low_degc) + " to " + plain_text(range.high_degc);
}

std::string function_text(const TemperatureFunction& f) {
  const std::array<std::pair<double, const char*>, 9> terms = {
      {{f.constant, ""},
       {f.per_t, "/T"},
       {f.log10_t, " log10 T"},
       {f.ln_t, " ln T"},
       {f.t_1, " T"},
       {f.t_2, " T²"},
       {f.per_t2, "/T²"},
       {f.theta, " (T \u2212 298.15)"},
       {f.theta_2, " (T \u2212 298.15)²"}}};
  std::string text;
  for (const auto& [coefficient, factor] : terms) {
    if (coefficient == 0) continue;
    if (text.empty()) {
      text = plain_text(coefficient, published_digits) + factor;
    } else {
      text += (coefficient < 0 ? " \u2212 " : " + ") +
              plain_text(std::abs(coefficient), published_digits) + factor;
    }
  }
  return left_side(f.to_log10_k) + " = " + (text.empty() ? "0" : text);
}

std::string standing_text(Standing standing) {
  switch (standing) {
    case Standing::read_in_source:
      return "read in the source itself";
    case Standing::secondary_table:
      return "read in a handbook or review that quotes the source";
    case Standing::reproduces_a_check:
      return "from memory, confirmed by reproducing published measurements";
    case Standing::from_memory:
      return "from memory; the source was not read again";
    case Standing::estimated:
      return "estimated here; the note says how";
  }
  return "";
}

std::string citation_of(const std::map<std::string, std::string>& sources, const std::string& key) {
  const auto found = sources.find(key);
  return found == sources.end() ? key : found->second + " [" + key + "]";
}

void print_constant(TextPage& page,
                    const EquilibriumConstant& constant,
                    const std::string& reaction,
                    const Chemistry& chemistry) {
  page.labelled("reaction", reaction + "  (as published)");
  page.labelled("log10 K at 25 °C", fixed_text(constant.log10_k, 3), Ink::strong);
  page.labelled("uncertainty", uncertainty_text(constant));
  page.labelled("temperature", temperature_dependence(constant));
  if (!constant.step_at_25_is_known.empty())
    page.labelled("at 25 °C", constant.step_at_25_is_known);
  if (constant.enthalpy_kj_per_mol) {
    page.labelled("enthalpy", plain_text(*constant.enthalpy_kj_per_mol) + " kJ/mol at 25 °C");
  }
  if (constant.heat_capacity_j_per_mol_k) {
    page.labelled("heat capacity",
                  plain_text(*constant.heat_capacity_j_per_mol_k) + " J/(mol K), of reaction");
  }
  page.labelled("valid", range_text(constant.valid) + " °C");
  page.labelled("source", citation_of(chemistry.sources, constant.source));
  page.labelled("standing", standing_text(constant.standing));
  if (!constant.note.empty()) page.labelled("note", constant.note);
  for (const AlternativeValue& other : constant.alternatives) {
    page.labelled("not chosen",
                  fixed_text(other.log10_k, 3) + ": " +
                      citation_of(chemistry.sources, other.source) +
                      (other.note.empty() ? "" : "; " + other.note));
  }
}

}  // namespace ionledger
