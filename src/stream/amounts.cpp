// "212 mg/L as CaCO3" of alkalinity to equivalents per litre: units meet chemistry here and nowhere
// else.
#include "stream/amounts.hpp"

#include <fmt/format.h>

#include <string>
#include <variant>
#include <vector>

namespace ionledger {
namespace {

constexpr double litre_m3 = 1e-3;
constexpr double gram_kg = 1e-3;

template <class Q>
std::optional<double> si_value_as(const WrittenQuantity& written) {
  const auto converted = to<Q>(written);
  const Q* quantity = std::get_if<Q>(&converted);
  if (quantity == nullptr) return std::nullopt;
  return quantity->value();
}

std::string choices(const Constituent& constituent) {
  std::string list;
  for (const auto& [formula, amount] : constituent.as) {
    list += fmt::format("{}\"as {}\"", list.empty() ? "" : ", ", formula);
  }
  return list;
}

/// Reads one value; each step either narrows it down or reports why it cannot.
class AmountReader {
 public:
  AmountReader(const ReportedValue& reported,
               const Constituent& constituent,
               Diagnostics& diagnostics)
      : reported_(reported), constituent_(constituent), diagnostics_(diagnostics) {}

  std::optional<Amount> read() {
    const WrittenQuantity& written = reported_.quantity;
    if (written.meaning == Meaning::mass_fraction) {
      return mass(written.value_in_si, Per::kg_of_solution);
    }
    if (const auto v = si_value_as<AmountPerVolume>(written))
      return moles(*v * litre_m3, Per::litre);
    if (const auto v = si_value_as<AmountPerMass>(written)) return moles(*v, Per::kg_of_water);
    if (const auto v = si_value_as<EquivalentPerVolume>(written)) {
      return equivalents(*v * litre_m3, Per::litre);
    }
    if (const auto v = si_value_as<EquivalentPerMass>(written)) {
      return equivalents(*v, Per::kg_of_water);
    }
    if (const auto v = si_value_as<Density>(written)) return mass(*v * litre_m3, Per::litre);
    return refuse(fmt::format("\"{}\" is not a concentration", reported_.text),
                  "a concentration such as \"96 mg/L\", \"2.1 mmol/L\" or \"4.8 meq/L\"");
  }

 private:
  std::optional<Amount> refuse(std::string summary, std::string expected, std::string fix = {}) {
    diagnostics_.error(reported_.value_span,
                       std::move(summary),
                       fmt::format("\"{}\" for analysis.{}", reported_.text, reported_.key),
                       std::move(expected),
                       std::move(fix));
    return std::nullopt;
  }

  /// Moles of the constituent in one mole of `formula`, or nothing with a diagnostic.
  std::optional<double> per_mole_of(const std::string& formula) {
    const auto entry = constituent_.as.find(formula);
    if (entry != constituent_.as.end()) return entry->second;
    std::vector<std::string> known;
    for (const auto& [name, amount] : constituent_.as) known.push_back(name);
    const std::string near = nearest_word(formula, known);
    refuse(fmt::format("{} is not reported \"as {}\"", constituent_.name, formula),
           choices(constituent_),
           near.empty() ? "" : fmt::format("did you mean \"as {}\"?", near));
    return std::nullopt;
  }

  std::optional<Amount> moles(double value, Per per) {
    const std::string& basis = reported_.quantity.basis;
    if (!basis.empty()) {
      const auto factor = per_mole_of(basis);
      return factor ? std::optional(Amount{value * *factor, per}) : std::nullopt;
    }
    // Alkalinity and hardness are counted in equivalents: one per mol of protons, two per mol of Ca
    // or Mg.
    const bool counts_equivalents = constituent_.kind != Constituent::Kind::total;
    return Amount{counts_equivalents ? value * constituent_.equivalents : value, per};
  }

  std::optional<Amount> equivalents(double value, Per per) {
    const std::string& basis = reported_.quantity.basis;
    if (!basis.empty()) {
      return refuse(fmt::format("an equivalent needs no \"as {}\"", basis),
                    "meq/L alone, or mg/L with \"as ...\"",
                    fmt::format("leave out \"as {}\"", basis));
    }
    if (constituent_.kind != Constituent::Kind::total) return Amount{value, per};
    if (constituent_.equivalents == 0) {
      return refuse(fmt::format("equivalents of {} depend on pH", constituent_.name),
                    fmt::format("mmol/L, or mg/L with {}", choices(constituent_)));
    }
    return Amount{value / constituent_.equivalents, per};
  }

  std::optional<Amount> mass(double kilograms, Per per) {
    std::string formula = reported_.quantity.basis;
    if (formula.empty()) formula = constituent_.plain;
    if (formula.empty()) {
      return refuse(
          fmt::format(
              "{} of {} could mean several things", reported_.quantity.unit, constituent_.name),
          choices(constituent_),
          fmt::format("write what the laboratory wrote, such as \"{} as {}\"",
                      reported_.text,
                      constituent_.as.begin()->first));
    }
    const auto factor = per_mole_of(formula);
    if (!factor) return std::nullopt;
    const double grams_per_mole = molar_mass_g_per_mol(*composition_of(formula));
    return Amount{kilograms / gram_kg / grams_per_mole * *factor, per};
  }

  const ReportedValue& reported_;
  const Constituent& constituent_;
  Diagnostics& diagnostics_;
};

}  // namespace

std::optional<Amount> amount_of(const ReportedValue& reported,
                                const Constituent& constituent,
                                Diagnostics& diagnostics) {
  return AmountReader(reported, constituent, diagnostics).read();
}

}  // namespace ionledger
