// Brings published reactions onto one basis and refuses those that do not balance.
#include "chemistry/compile.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <set>

#include "chemistry/formula.hpp"

namespace ionledger {
namespace {

constexpr double max_step =
    0.02;  // log10 units, between a function at 25 degC and the value given there.
constexpr double balance_tolerance = 1e-9;
const std::string water = "H2O";

class Compiler {
 public:
  Compiler(Chemistry& chemistry,
           const std::map<std::string, SourceSpan>& where,
           Diagnostics& diagnostics)
      : chemistry_(chemistry), where_(where), diagnostics_(diagnostics) {}

  bool run() {
    compositions();
    if (!ok_) return false;
    balances();
    if (!ok_) return false;
    formations();
    if (!ok_) return false;
    dissolutions();
    steps_at_25();
    constituents();
    return ok_;
  }

 private:
  void error(const std::string& kind,
             const std::string& name,
             std::string summary,
             std::string found,
             std::string expected,
             std::string fix = {}) {
    const auto place = where_.find(kind + ":" + name);
    diagnostics_.error(place == where_.end() ? SourceSpan{} : place->second,
                       std::move(summary),
                       std::move(found),
                       std::move(expected),
                       std::move(fix));
    ok_ = false;
  }

  void compositions() {
    for (Species& species : chemistry_.species) {
      compose("species", species.name, species.name, species.composition, species.molar_mass_g);
    }
    for (Mineral& mineral : chemistry_.minerals) {
      compose("mineral", mineral.name, mineral.formula, mineral.composition, mineral.molar_mass_g);
    }
    for (Gas& gas : chemistry_.gases) {
      Composition composition;
      compose("gas", gas.name, gas.formula, composition, gas.molar_mass_g);
    }
  }

  void compose(const std::string& kind,
               const std::string& name,
               const std::string& formula,
               Composition& composition,
               double& molar_mass_g) {
    const auto read = composition_of(formula);
    if (!read) {
      error(kind,
            name,
            fmt::format("\"{}\" is not a chemical formula", formula),
            fmt::format("\"{}\" for {} {}", formula, kind, name),
            "element symbols, numbers and parentheses, such as \"Ca(OH)2\"");
      return;
    }
    composition = *read;
    molar_mass_g = molar_mass_g_per_mol(composition);
  }

  void balances() {
    for (std::size_t s = first_secondary(); s < chemistry_.species.size(); ++s) {
      const Species& species = chemistry_.species[s];
      balance("species", species.name, "", "", species.reaction, species.reaction_text);
    }
    for (const Mineral& mineral : chemistry_.minerals) {
      balance("mineral",
              mineral.name,
              mineral.name,
              mineral.formula,
              mineral.reaction,
              mineral.reaction_text);
    }
    for (const Gas& gas : chemistry_.gases) {
      balance("gas", gas.name, gas.formula + "(g)", gas.formula, gas.reaction, gas.reaction_text);
    }
  }

  /// `solid` is the one participant that is not dissolved, `formula` what it is made of.
  void balance(const std::string& kind,
               const std::string& name,
               const std::string& solid,
               const std::string& formula,
               const std::vector<Term>& reaction,
               const std::string& text) {
    Composition atoms;
    double charge = 0;
    bool has_own = false;
    for (const auto& [participant, coefficient] : reaction) {
      Composition composition;
      if (participant == water) {
        composition = {{"H", 2}, {"O", 1}};
      } else if (!solid.empty() && participant == solid) {
        composition = *composition_of(formula);
        has_own = true;
      } else if (const int s = chemistry_.species_index(participant); s >= 0) {
        const Species& species = chemistry_.species[static_cast<std::size_t>(s)];
        composition = species.composition;
        charge += coefficient * species.charge_number;
        has_own = has_own || participant == name;
      } else {
        error(kind,
              name,
              fmt::format("\"{}\" is not a species of these models", participant),
              fmt::format("\"{}\" in the reaction \"{}\"", participant, text),
              "H2O, the entry itself, or a species defined in some file of the models");
        return;
      }
      for (const auto& [element, count] : composition) atoms[element] += coefficient * count;
    }
    if (!has_own) {
      error(
          kind,
          name,
          fmt::format("the reaction of {} does not contain it", name),
          fmt::format("\"{}\"", text),
          solid.empty() ? name + " as one of the terms" : "\"" + solid + "\" as one of the terms");
      return;
    }
    std::string unbalanced;
    for (const auto& [element, count] : atoms) {
      if (std::abs(count) > balance_tolerance) {
        unbalanced += fmt::format("{}{} {:+g}", unbalanced.empty() ? "" : ", ", element, count);
      }
    }
    if (std::abs(charge) > balance_tolerance) {
      unbalanced += fmt::format("{}charge {:+g}", unbalanced.empty() ? "" : ", ", charge);
    }
    if (!unbalanced.empty()) {
      error(kind,
            name,
            fmt::format("the reaction of {} does not balance", name),
            fmt::format("\"{}\": right side minus left side is {}", text, unbalanced),
            "the same atoms and the same charge on both sides");
    }
  }

  void formations() {
    const std::size_t n_basis = first_secondary();
    for (std::size_t i = 0; i < n_basis; ++i) {
      Species& species = chemistry_.species[i];
      species.formation.assign(n_basis, 0.0);
      species.formation[i] = 1;
      resolved_.insert(species.name);
    }
    bool progress = true;
    while (progress) {
      progress = false;
      for (std::size_t s = n_basis; s < chemistry_.species.size(); ++s) {
        progress = form(s) || progress;
      }
    }
    for (std::size_t s = n_basis; s < chemistry_.species.size(); ++s) {
      const Species& species = chemistry_.species[s];
      if (resolved_.count(species.name) != 0) continue;
      error("species",
            species.name,
            fmt::format("{} cannot be reached from the basis species", species.name),
            fmt::format("\"{}\"", species.reaction_text),
            "a reaction whose other participants lead back to basis species");
    }
  }

  /// Formation of species s, once every other participant has one.
  bool form(std::size_t s) {
    Species& species = chemistry_.species[s];
    if (resolved_.count(species.name) != 0) return false;
    double own = 0;
    for (const auto& [participant, coefficient] : species.reaction) {
      if (participant == species.name) {
        own += coefficient;
      } else if (participant != water && resolved_.count(participant) == 0) {
        return false;
      }
    }
    if (own == 0) return false;
    // ln K = own ln a + rest  gives  ln a = (ln K - rest) / own.
    species.formation.assign(first_secondary(), 0.0);
    std::map<int, double> constants = {{static_cast<int>(s), 1 / own}};
    accumulate(species.reaction,
               species.name,
               -1 / own,
               species.formation,
               species.water_exponent,
               constants);
    species.formation_constants.assign(constants.begin(), constants.end());
    resolved_.insert(species.name);
    return true;
  }

  void accumulate(const std::vector<Term>& reaction,
                  const std::string& skip,
                  double factor,
                  std::vector<double>& vector,
                  double& water_exponent,
                  std::map<int, double>& constants) const {
    for (const auto& [participant, coefficient] : reaction) {
      if (participant == skip) continue;
      if (participant == water) {
        water_exponent += factor * coefficient;
        continue;
      }
      const auto index = static_cast<std::size_t>(chemistry_.species_index(participant));
      const Species& other = chemistry_.species[index];
      for (std::size_t i = 0; i < vector.size(); ++i) {
        vector[i] += factor * coefficient * other.formation[i];
      }
      water_exponent += factor * coefficient * other.water_exponent;
      for (const auto& [k, multiplier] : other.formation_constants) {
        constants[k] += factor * coefficient * multiplier;
      }
    }
  }

  template <class Phase>
  void dissolve(Phase& phase, const std::string& kind, const std::string& own) {
    double coefficient = 0;
    for (const auto& [participant, c] : phase.reaction) {
      if (participant == own) coefficient += c;
    }
    if (coefficient != -1) {
      error(kind,
            phase.name,
            fmt::format("the reaction of {} must dissolve one mole of it", phase.name),
            fmt::format("\"{}\"", phase.reaction_text),
            fmt::format("\"{} = ...\"", own));
      return;
    }
    phase.dissolution.assign(first_secondary(), 0.0);
    std::map<int, double> constants;
    accumulate(phase.reaction, own, 1, phase.dissolution, phase.water_exponent, constants);
    // ln K = ln Q(basis) + the constants of the species on the right: those go to the other side.
    for (const auto& [k, multiplier] : constants) {
      if (multiplier != 0) phase.dissolution_constants.emplace_back(k, -multiplier);
    }
  }

  void dissolutions() {
    for (Mineral& mineral : chemistry_.minerals) dissolve(mineral, "mineral", mineral.name);
    for (Gas& gas : chemistry_.gases) dissolve(gas, "gas", gas.formula + "(g)");
  }

  void step_at_25(const std::string& kind,
                  const std::string& name,
                  const EquilibriumConstant& constant) {
    const double at_25 = log10_k(constant, celsius(25.0));
    const double step = at_25 - constant.log10_k;
    if (std::abs(step) <= max_step || !constant.step_at_25_is_known.empty()) return;
    error(
        kind,
        name,
        fmt::format(
            "the function of temperature of {} misses its value at 25 degC by {:+.3f}", name, step),
        fmt::format("log10_k = {}, the function gives {:.3f}", constant.log10_k, at_25),
        fmt::format("a difference of at most {}", max_step),
        "correct one of them, or say why in step_at_25_is_known");
  }

  void steps_at_25() {
    for (std::size_t s = first_secondary(); s < chemistry_.species.size(); ++s) {
      step_at_25("species", chemistry_.species[s].name, chemistry_.species[s].constant);
    }
    for (const Mineral& mineral : chemistry_.minerals) {
      step_at_25("mineral", mineral.name, mineral.constant);
    }
    for (const Gas& gas : chemistry_.gases) step_at_25("gas", gas.name, gas.constant);
  }

  void constituents() {
    for (const Constituent& constituent : chemistry_.constituents) {
      constituent_parts(constituent);
      if (!constituent.mostly.empty() && chemistry_.species_index(constituent.mostly) < 0) {
        error("constituent",
              constituent.name,
              fmt::format("\"{}\" is not a species of these models", constituent.mostly),
              fmt::format("\"{}\" for {}", constituent.mostly, constituent.name),
              "a species defined in some file of the models");
      }
      if (constituent.as.empty() ||
          (!constituent.plain.empty() && constituent.as.count(constituent.plain) == 0)) {
        error("constituent",
              constituent.name,
              fmt::format("\"as\" of {} is empty or lacks its plain formula", constituent.name),
              fmt::format("plain = \"{}\"", constituent.plain),
              "a table \"as\" that holds the plain formula and every other one in use");
      }
      for (const auto& [formula, amount] : constituent.as) {
        if (composition_of(formula) && amount > 0) continue;
        error("constituent",
              constituent.name,
              fmt::format("\"as {}\" is not a formula with a positive amount", formula),
              fmt::format("{} = {} for {}", formula, amount, constituent.name),
              "a formula, and the moles of the constituent in one mole of it");
      }
    }
  }

  void constituent_parts(const Constituent& constituent) {
    using Kind = Constituent::Kind;
    std::vector<std::string> parts = constituent.parts;
    if (constituent.kind == Kind::total) parts.push_back(constituent.basis_species);
    const std::size_t wanted = constituent.kind == Kind::hardness ? 2 : 1;
    if (parts.size() != wanted) {
      error("constituent",
            constituent.name,
            fmt::format("{} names {} basis species", constituent.name, parts.size()),
            fmt::format("{} in \"species\" and \"parts\"", parts.size()),
            "species for a total, one of parts for alkalinity, two of parts for hardness");
    }
    for (const std::string& part : parts) {
      const int basis = chemistry_.species_index(part);
      if (basis >= 0 && basis < chemistry_.n_basis) continue;
      error("constituent",
            constituent.name,
            fmt::format("\"{}\" is not a basis species", part),
            fmt::format("\"{}\" for {}", part, constituent.name),
            "one of the [[basis]] species");
    }
  }

  [[nodiscard]] std::size_t first_secondary() const {
    return static_cast<std::size_t>(chemistry_.n_basis);
  }

  Chemistry& chemistry_;
  const std::map<std::string, SourceSpan>& where_;
  Diagnostics& diagnostics_;
  std::set<std::string> resolved_;
  bool ok_ = true;
};

}  // namespace

bool compile_chemistry(Chemistry& chemistry,
                       const std::map<std::string, SourceSpan>& where,
                       Diagnostics& diagnostics) {
  return Compiler(chemistry, where, diagnostics).run();
}

}  // namespace ionledger
