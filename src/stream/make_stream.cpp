// A laboratory report becomes totals per kg of water: names, amounts, then litres and kilograms.
#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <limits>

#include "ionledger/stream.hpp"
#include "ionledger/water.hpp"
#include "stream/amounts.hpp"
#include "stream/volume.hpp"

namespace ionledger {
namespace {

const Temperature laboratory_temperature = celsius(25.0);
constexpr double most_kg_per_kg_water = 3;   // two thirds of solutes: no water any more
constexpr double hardness_tolerance = 0.05;  // relative; common practice for a hardness check

/// One understood line of the report.
struct Entry {
  const ReportedValue* reported = nullptr;
  const Constituent* constituent = nullptr;
  Amount amount;
  bool fills_volume = true;
};

class StreamMaker {
 public:
  StreamMaker(const Analysis& analysis, const Chemistry& chemistry, Diagnostics& diagnostics)
      : analysis_(analysis), chemistry_(chemistry), diagnostics_(diagnostics) {}

  std::optional<Stream> make() {
    copy_conditions();
    for (const ReportedValue& value : analysis_.values) add(value);
    find_closure();
    if (failed_) return std::nullopt;
    if (!settle_volume()) return std::nullopt;
    stream_.carbon_component = carbon_component();
    for (const Entry& entry : entries_) book(entry);
    use_hardness();
    if (failed_) return std::nullopt;
    return std::move(stream_);
  }

 private:
  void error(const SourceSpan& where,
             std::string summary,
             std::string found,
             std::string expected,
             std::string fix = {}) {
    diagnostics_.error(
        where, std::move(summary), std::move(found), std::move(expected), std::move(fix));
    failed_ = true;
  }

  void copy_conditions() {
    stream_.name = analysis_.title;
    stream_.temperature = analysis_.temperature;
    stream_.pressure = analysis_.pressure;
    stream_.flow = analysis_.flow;
    stream_.measured_conductivity = analysis_.conductivity;
    stream_.ph = analysis_.ph;
    stream_.stream_span = analysis_.stream_span;
    stream_.totals.assign(static_cast<std::size_t>(chemistry_.n_basis), 0.0);
    stream_.reported.assign(static_cast<std::size_t>(chemistry_.n_basis), false);
  }

  /// The constituent a word names, or a diagnostic that helps to find it.
  const Constituent* constituent_of(const std::string& word,
                                    const SourceSpan& where,
                                    const std::string& key_path) {
    const int index = chemistry_.constituent_index(word);
    if (index >= 0) return &chemistry_.constituents[static_cast<std::size_t>(index)];
    for (const AmbiguousWord& ambiguous : chemistry_.ambiguous_words) {
      if (ambiguous.word != word) continue;
      error(where,
            fmt::format("\"{}\" could mean several things", word),
            fmt::format("\"{}\" in {}", word, key_path),
            ambiguous.question);
      return nullptr;
    }
    std::vector<std::string> known;
    std::string list;
    for (const Constituent& constituent : chemistry_.constituents) {
      known.push_back(constituent.name);
      known.insert(known.end(), constituent.symbols.begin(), constituent.symbols.end());
      list += (list.empty() ? "" : " ") + constituent.name;
    }
    const std::string near = nearest_word(word, known);
    error(where,
          fmt::format("unknown constituent \"{}\"", word),
          fmt::format("\"{}\" in {}", word, key_path),
          list,
          near.empty() ? "" : fmt::format("did you mean \"{}\"?", near));
    return nullptr;
  }

  void add(const ReportedValue& value) {
    const Constituent* constituent = constituent_of(value.key, value.key_span, "[analysis]");
    if (constituent == nullptr) return;
    for (const Entry& other : entries_) {
      if (other.constituent != constituent) continue;
      error(value.key_span,
            fmt::format("{} is given twice", constituent->name),
            fmt::format("\"{}\" here and \"{}\" in line {}",
                        value.key,
                        other.reported->key,
                        other.reported->key_span.line),
            "one line for each constituent",
            "keep the one you trust");
      return;
    }
    const auto amount = amount_of(value, *constituent, diagnostics_);
    if (!amount) {
      failed_ = true;
      return;
    }
    entries_.push_back({&value, constituent, *amount, true});
  }

  void find_closure() {
    const Closure& closure = analysis_.closure;
    stream_.closed_by = closure.by;
    stream_.closure_span = closure.span;
    if (closure.by != Closure::By::constituent) return;
    const Constituent* constituent =
        constituent_of(closure.constituent, closure.span, "balance.closed_by");
    if (constituent == nullptr) return;
    const int component = chemistry_.species_index(constituent->basis_species);
    const bool is_charged =
        component > 0 && chemistry_.species[static_cast<std::size_t>(component)].charge_number != 0;
    if (constituent->kind == Constituent::Kind::total && is_charged) {
      stream_.closing_component = component;
      return;
    }
    error(closure.span,
          fmt::format("{} cannot close the charge balance", constituent->name),
          fmt::format("closed_by = \"{}\"", closure.constituent),
          "an ion such as \"sodium\" or \"chloride\", or \"pH\", or \"nothing\"");
  }

  [[nodiscard]] const Entry* entry_of_kind(Constituent::Kind kind) const {
    for (const Entry& entry : entries_) {
      if (entry.constituent->kind == kind) return &entry;
    }
    return nullptr;
  }

  [[nodiscard]] double mostly_volume(const Entry& entry) const {
    const int species = chemistry_.species_index(entry.constituent->mostly);
    return species < 0 ? 0.0 : molar_volume_l_per_mol(chemistry_, species) * moles_of(entry);
  }
  [[nodiscard]] double mostly_mass(const Entry& entry) const {
    const int species = chemistry_.species_index(entry.constituent->mostly);
    if (species < 0) return 0.0;
    return chemistry_.species[static_cast<std::size_t>(species)].molar_mass_g / 1000 *
           moles_of(entry);
  }
  /// Moles of the `mostly` species per unit of the base the value is written on.
  [[nodiscard]] static double moles_of(const Entry& entry) {
    if (!entry.fills_volume) return 0;
    const bool is_total = entry.constituent->kind == Constituent::Kind::total;
    return is_total ? entry.amount.value
                    : entry.amount.value / std::max(entry.constituent->equivalents, 1.0);
  }

  /// Volume V (L) and mass M (kg) that go with one kg of water. With c per litre, m per kg of water
  /// and w per kg of solution both are linear:
  ///   V = 1/rho_w + V sum(c v) + M sum(w v) + sum(m v)      M = 1 + V sum(c mu) + M sum(w mu) +
  ///   sum(m mu)
  bool settle_volume() {
    count_hardness_once();
    double v[3] = {0, 0, 0};
    double mu[3] = {0, 0, 0};
    for (const Entry& entry : entries_) {
      v[static_cast<int>(entry.amount.per)] += mostly_volume(entry);
      mu[static_cast<int>(entry.amount.per)] += mostly_mass(entry);
    }
    const auto litre = static_cast<int>(Per::litre);
    const auto water = static_cast<int>(Per::kg_of_water);
    const auto solution = static_cast<int>(Per::kg_of_solution);
    double volume = 0;
    double mass = 0;
    if (analysis_.density) {
      // M = rho V, so one equation is left.
      const double rho = analysis_.density->value() / 1000;
      volume = (1 + mu[water]) / (rho * (1 - mu[solution]) - mu[litre]);
      mass = rho * volume;
    } else {
      const double water_volume = 1000 / water_density(laboratory_temperature).value();
      const double a = 1 - v[litre];
      const double b = 1 - mu[solution];
      const double determinant = a * b - v[solution] * mu[litre];
      volume = (b * (water_volume + v[water]) + v[solution] * (1 + mu[water])) / determinant;
      mass = (a * (1 + mu[water]) + mu[litre] * (water_volume + v[water])) / determinant;
    }
    if (!(volume > 0) || !(mass >= 1) || !std::isfinite(volume) || mass > most_kg_per_kg_water) {
      error(analysis_.stream_span,
            "the constituents leave no room for water",
            fmt::format("{} values in [analysis] that together outweigh the solution",
                        entries_.size()),
            "an aqueous solution",
            "check the units: mg/L against g/L, % by mass");
      return false;
    }
    stream_.litre_per_kg_water = volume;
    stream_.laboratory_density_kg_per_l = mass / volume;
    stream_.density_is_measured = analysis_.density.has_value();
    per_kg_[litre] = volume;
    per_kg_[water] = 1;
    per_kg_[solution] = mass;
    return true;
  }

  /// Hardness is two of the totals once more; only the complete reading of the two takes up room.
  void count_hardness_once() {
    const Entry* hardness = entry_of_kind(Constituent::Kind::hardness);
    if (hardness == nullptr) return;
    const std::vector<std::string>& parts = hardness->constituent->parts;
    const auto is_part = [&](const Entry& entry) {
      return std::count(parts.begin(), parts.end(), entry.constituent->basis_species) > 0;
    };
    const bool both = std::count_if(entries_.begin(), entries_.end(), is_part) == 2;
    for (Entry& entry : entries_) {
      if (entry.constituent->kind == Constituent::Kind::hardness) entry.fills_volume = !both;
      if (is_part(entry)) entry.fills_volume = both;
    }
  }

  [[nodiscard]] double molality_of(const Entry& entry) const {
    return entry.amount.value * per_kg_[static_cast<int>(entry.amount.per)];
  }

  void book(const Entry& entry) {
    const double molality = molality_of(entry);
    Conversion conversion;
    conversion.constituent = entry.constituent->name;
    conversion.as_written = entry.reported->text;
    conversion.mol_per_litre = entry.amount.per == Per::kg_of_water
                                   ? std::numeric_limits<double>::quiet_NaN()
                                   : molality / stream_.litre_per_kg_water;
    conversion.mol_per_kg = molality;
    conversion.relative_uncertainty = entry.reported->relative_uncertainty;
    if (entry.reported->si_uncertainty && entry.reported->quantity.value_in_si > 0) {
      conversion.relative_uncertainty =
          *entry.reported->si_uncertainty / entry.reported->quantity.value_in_si;
    }
    stream_.conversions.push_back(std::move(conversion));
    switch (entry.constituent->kind) {
      case Constituent::Kind::alkalinity:
        stream_.alkalinity_eq_per_kg = molality;
        stream_.alkalinity_span = entry.reported->value_span;
        break;
      case Constituent::Kind::hardness:
        stream_.hardness_eq_per_kg = molality;
        break;
      case Constituent::Kind::total: {
        const int index = chemistry_.species_index(entry.constituent->basis_species);
        const auto component = static_cast<std::size_t>(index);
        stream_.totals[component] = molality;
        stream_.reported[component] = true;
        if (index == stream_.carbon_component) {
          stream_.inorganic_carbon_is_known = true;
          stream_.carbon_span = entry.reported->value_span;
        }
        break;
      }
    }
  }

  /// The basis species that alkalinity settles, by the data; -1 when they know no alkalinity.
  [[nodiscard]] int carbon_component() const {
    for (const Constituent& constituent : chemistry_.constituents) {
      if (constituent.kind == Constituent::Kind::alkalinity) {
        return chemistry_.species_index(constituent.parts.front());
      }
    }
    return -1;
  }

  [[nodiscard]] std::string name_of_total(std::size_t component) const {
    for (const Constituent& constituent : chemistry_.constituents) {
      if (constituent.basis_species == chemistry_.species[component].name) return constituent.name;
    }
    return chemistry_.species[component].name;
  }

  /// Hardness either gives the one of its two ions that is missing, or checks the two.
  void use_hardness() {
    if (!stream_.hardness_eq_per_kg) return;
    const Entry& entry = *entry_of_kind(Constituent::Kind::hardness);
    const std::vector<std::string>& parts = entry.constituent->parts;
    const auto a = static_cast<std::size_t>(chemistry_.species_index(parts[0]));
    const auto b = static_cast<std::size_t>(chemistry_.species_index(parts[1]));
    const double hardness = *stream_.hardness_eq_per_kg;
    const double known = 2 * (stream_.totals[a] + stream_.totals[b]);
    if (stream_.reported[a] && stream_.reported[b]) {
      compare_hardness(hardness, known, name_of_total(a) + " and " + name_of_total(b));
      return;
    }
    if (!stream_.reported[a] && !stream_.reported[b]) {
      error(entry.reported->value_span,
            fmt::format("hardness alone does not say how much is {} and how much {}",
                        name_of_total(a),
                        name_of_total(b)),
            fmt::format("\"{}\" for analysis.{}", entry.reported->text, entry.reported->key),
            "hardness together with one of the two",
            fmt::format("add {0}, for instance as \"... mg/L as CaCO3\"", name_of_total(a)));
      return;
    }
    const std::size_t given = stream_.reported[a] ? a : b;
    const std::size_t missing = stream_.reported[a] ? b : a;
    if (known > hardness * (1 + hardness_tolerance)) {
      error(entry.reported->value_span,
            fmt::format("hardness is less than the {} it must contain", name_of_total(given)),
            fmt::format("{:.4g} meq/kg of hardness against {:.4g}", 1000 * hardness, 1000 * known),
            "a hardness that is at least as large",
            "check the units of both");
      return;
    }
    stream_.totals[missing] = std::max(0.0, (hardness - known) / 2);
    stream_.reported[missing] = true;
    stream_.cautions.push_back(
        {name_of_total(missing),
         fmt::format("Not reported; taken as hardness minus {}: {:.3g} mmol/kg.",
                     name_of_total(given),
                     1000 * stream_.totals[missing])});
  }

  void compare_hardness(double hardness, double known, const std::string& ions) {
    if (std::abs(hardness - known) <= hardness_tolerance * std::max(hardness, known)) return;
    stream_.cautions.push_back(
        {"hardness",
         fmt::format(
             "The hardness reported is {:.3g} meq/kg, {} together are {:.3g}: one of the three "
             "is in doubt. The two ions were used.",
             1000 * hardness,
             ions,
             1000 * known)});
  }

  const Analysis& analysis_;
  const Chemistry& chemistry_;
  Diagnostics& diagnostics_;
  Stream stream_;
  std::vector<Entry> entries_;
  double per_kg_[3] = {1, 1, 1};  // of water, for each Per
  bool failed_ = false;
};

}  // namespace

std::optional<Stream> make_stream(const Analysis& analysis,
                                  const Chemistry& chemistry,
                                  Diagnostics& diagnostics) {
  return StreamMaker(analysis, chemistry, diagnostics).make();
}

}  // namespace ionledger
