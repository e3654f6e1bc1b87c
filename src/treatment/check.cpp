// Mistakes of a train that show before anything is solved, each at its place.
#include <fmt/format.h>

#include <algorithm>

#include "treatment/workbench.hpp"

namespace ionledger {
namespace {

constexpr double lowest_degc = 0;  // where the properties of water are known
constexpr double highest_degc = 150;
constexpr double lowest_ph = -2;
constexpr double highest_ph = 16;
constexpr double highest_polarisation = 3;  // film theory; plants stay below 1.2
constexpr double highest_index = 6;
constexpr std::size_t names_listed = 40;

template <class Items>
std::vector<std::string> names_of(const Items& items) {
  std::vector<std::string> names;
  for (const auto& item : items) names.push_back(item.name);
  return names;
}

std::string listed(const std::vector<std::string>& names) {
  std::string text;
  for (std::size_t i = 0; i < std::min(names.size(), names_listed); ++i) {
    text += (i == 0 ? "\"" : ", \"") + names[i] + "\"";
  }
  return text + (names.size() > names_listed ? " ..." : "");
}

class TrainChecker {
 public:
  TrainChecker(const Train& train,
               const Chemistry& chemistry,
               const Supplies& supplies,
               bool has_flow,
               Diagnostics& diagnostics)
      : train_(train),
        chemistry_(chemistry),
        supplies_(supplies),
        has_flow_(has_flow),
        diagnostics_(diagnostics) {}

  bool run() {
    for (at_ = 0; at_ < train_.size(); ++at_) {
      const Step& step = train_[at_];
      check_name(step);
      Step copy = step;
      for (const auto& [key, given] : quantities_of(copy.action)) {
        if (given->quantity.value_in_si < 0 && key.rfind("settle.", 0) != 0 &&
            key != "bring_pH_to") {
          error(given->span, key + " is negative", given->text, "zero or more");
        }
      }
      std::visit([&](const auto& action) { check(action); }, step.action);
    }
    return ok_;
  }

 private:
  void error(const SourceSpan& where,
             std::string summary,
             const std::string& found,
             std::string expected,
             std::string fix = {}) {
    diagnostics_.error(where,
                       std::move(summary),
                       fmt::format("\"{}\" in step \"{}\"", found, train_[at_].name),
                       std::move(expected),
                       std::move(fix));
    ok_ = false;
  }

  void unknown(const std::string& kind, const Word& word, const std::vector<std::string>& known) {
    const std::string near = nearest_word(word.text, known);
    error(word.span,
          fmt::format("unknown {} \"{}\"", kind, word.text),
          word.text,
          listed(known),
          near.empty() ? "" : fmt::format("did you mean \"{}\"?", near));
  }

  void check_name(const Step& step) {
    const auto same = [&](const Step& other) { return other.name == step.name; };
    const auto last = train_.begin() + static_cast<std::ptrdiff_t>(at_);
    if (step.name.empty() || step.name.find('.') != std::string::npos) {
      error(step.name_span,
            "the name of a step is empty or has a point in it",
            step.name,
            "letters, digits, blanks and underscores, such as \"acid\"");
    } else if (step.name == "as_received" || std::any_of(train_.begin(), last, same)) {
      error(step.name_span,
            fmt::format("the name \"{}\" is taken", step.name),
            step.name,
            "a name of its own for each step; \"as_received\" is the water before them");
    }
  }

  /// A quantity that must be of one of the types Q.
  template <class... Q>
  bool is_one_of(const Given& given, const std::string& expected) {
    if ((std::holds_alternative<Q>(to<Q>(given.quantity)) || ...)) return true;
    error(given.span, fmt::format("\"{}\" does not fit here", given.text), given.text, expected);
    return false;
  }

  void check_share(const Given& given, bool may_be_all) {
    if (!is_one_of<Ratio>(given, "a share such as \"30 %\"")) return;
    const double share = given.quantity.value_in_si;
    if (share > 1 || (share == 1 && !may_be_all)) {
      error(given.span,
            fmt::format("\"{}\" is too large a share", given.text),
            given.text,
            may_be_all ? "at most \"100 %\"" : "less than \"100 %\"");
    }
  }

  void need_flow(const Given& given, const std::string& instead) {
    if (has_flow_) return;
    error(given.span,
          fmt::format("\"{}\" says nothing without the flow of the stream", given.text),
          given.text,
          instead.empty() ? "stream.flow" : instead + ", or stream.flow",
          "add flow = \"42 m3/h\" to [stream]");
  }

  void check(const Blend& blend) {
    if (blend.share.has_value() == blend.flow.has_value()) {
      error(blend.other.span,
            "a blend needs either a share of the mixture or a flow",
            blend.other.text,
            "share = \"30 %\" or flow = \"12 m3/h\"");
    }
    if (blend.share) check_share(*blend.share, false);
    if (blend.flow && is_one_of<VolumeFlow>(*blend.flow, "a volume flow such as \"12 m3/h\"")) {
      need_flow(*blend.flow, "a share of the mixture");
    }
  }

  const Reagent* known_reagent(const Word& word) {
    const Reagent* reagent = supplies_.reagent(word.text);
    if (reagent == nullptr) unknown("reagent", word, names_of(supplies_.reagents));
    return reagent;
  }

  void check(const Dose& dose) {
    const Reagent* reagent = known_reagent(dose.reagent);
    const Given& amount = dose.amount;
    const WrittenQuantity& written = amount.quantity;
    const bool is_volume = written.dimension == DimensionExponents{} &&
                           written.meaning == Meaning::plain && !written.unit.empty();
    const bool is_volume_flow = std::holds_alternative<VolumeFlow>(to<VolumeFlow>(written));
    bool fits = true;
    if (dose.is_of_active) {
      fits = is_one_of<Density, MassFlow, AmountPerVolume, AmountPerMass, MassFraction>(
          amount,
          "active substance per volume or mass of water or per time: \"33 mg/L\", \"0.4 mmol/L\", "
          "\"1.2 kg/h\"");
    } else if (!is_volume) {
      fits = is_one_of<Density, MassFlow, VolumeFlow, MassFraction>(
          amount,
          "product per volume or mass of water or per time: \"35 mg/L\", \"20 mL/m3\", \"1.5 "
          "kg/h\"; moles only of the active substance");
    }
    if (!fits || reagent == nullptr) return;
    if (is_volume_flow || std::holds_alternative<MassFlow>(to<MassFlow>(written))) {
      need_flow(amount, "an amount per volume");
    }
    if ((is_volume || is_volume_flow) && !reagent->density_kg_per_l) {
      error(amount.span,
            fmt::format("{} has no density, so its volume says nothing", reagent->name),
            amount.text,
            "a mass, such as \"35 mg/L\"");
    }
    check_basis(dose, *reagent);
  }

  void check_basis(const Dose& dose, const Reagent& reagent) {
    const std::string& basis = dose.amount.quantity.basis;
    if (basis.empty()) return;
    if (dose.is_of_active && dose_can_be_as(basis, reagent)) return;
    error(dose.amount.span,
          fmt::format("\"as {}\" does not say how much {}", basis, reagent.name),
          dose.amount.text,
          fmt::format("the active substance, {}, or one element of it behind \"as\"",
                      reagent.ingredients.front().formula),
          dose.is_of_active ? "" : "write active = instead of amount =");
  }

  void check(const BringPH& bring) {
    static_cast<void>(known_reagent(bring.reagent));
    const double ph = bring.ph.quantity.number;
    if (ph >= lowest_ph && ph <= highest_ph) return;
    error(bring.ph.span,
          fmt::format("a pH of {:g} is not possible in water", ph),
          bring.ph.text,
          fmt::format("a pH between {:g} and {:g}", lowest_ph, highest_ph));
  }

  void check(const ChangeTemperature& change) {
    if (!is_one_of<Temperature>(change.to, "a temperature such as \"46 degC\"")) return;
    const double degc = in_celsius(kelvin(change.to.quantity.value_in_si));
    if (degc >= lowest_degc && degc <= highest_degc) return;
    error(change.to.span,
          "the properties of water are not known at this temperature",
          change.to.text,
          fmt::format("{:g} to {:g} degC", lowest_degc, highest_degc));
  }

  void check(const Concentrate& step) {
    const WrittenQuantity& factor = step.factor.quantity;
    const bool is_cycles = step.by == Concentrate::By::cycles;
    if (is_cycles ? factor.number < 1 : factor.value_in_si >= 1) {
      error(step.factor.span,
            is_cycles ? "less than one cycle is no concentration" : "no water would be left",
            step.factor.text,
            is_cycles ? "1 cycle or more" : "less than 100 %");
    }
    const bool is_membrane = step.by == Concentrate::By::recovery;
    if (!is_membrane && (!step.rejection.empty() || step.polarisation || step.keeps_permeate)) {
      error(step.factor.span,
            "only a membrane has rejection, polarisation and permeate",
            step.factor.text,
            "concentrate = \"75 % recovery\" with them");
    }
    for (const NamedGiven& rejection : step.rejection) check_rejection(rejection);
    if (!step.polarisation) return;
    const double polarisation = step.polarisation->quantity.number;
    if (polarisation >= 1 && polarisation <= highest_polarisation) return;
    error(step.polarisation->span,
          "this is no polarisation",
          step.polarisation->text,
          fmt::format("a number between 1 and {:g}: at the membrane over in the bulk",
                      highest_polarisation));
  }

  void check_rejection(const NamedGiven& rejection) {
    check_share(rejection.value, true);
    const int c = chemistry_.constituent_index(rejection.name.text);
    if (c < 0) {
      unknown("constituent", rejection.name, names_of(chemistry_.constituents));
    } else if (chemistry_.constituents[static_cast<std::size_t>(c)].kind !=
               Constituent::Kind::total) {
      error(rejection.name.span,
            fmt::format("{} is not one constituent", rejection.name.text),
            rejection.name.text,
            "what is counted in it: calcium, magnesium, inorganic_carbon");
    }
  }

  /// Gas names as keys.
  bool is_gas(const Word& word) {
    if (gas_named(word.text, chemistry_) >= 0) return true;
    std::vector<std::string> keys = names_of(chemistry_.gases);
    for (std::string& key : keys) std::replace(key.begin(), key.end(), ' ', '_');
    unknown("gas", word, keys);
    return false;
  }

  void check(const Strip& strip) {
    for (const NamedGiven& entry : strip.shares) {
      check_share(entry.value, true);
      if (!is_gas(entry.name)) continue;
      const auto gas = static_cast<std::size_t>(gas_named(entry.name.text, chemistry_));
      if (dissolved_form(chemistry_.gases[gas], chemistry_) >= 0) continue;
      error(entry.name.span,
            fmt::format("{} is not dissolved as itself", entry.name.text),
            entry.name.text,
            "a gas that is");
    }
  }

  void check(const OpenTo& open) {
    if (!open.atmosphere.text.empty() && supplies_.atmosphere(open.atmosphere.text) == nullptr) {
      unknown("atmosphere", open.atmosphere, names_of(supplies_.atmospheres));
    }
    for (const NamedGiven& gas : open.pressures) {
      static_cast<void>(is_gas(gas.name));
      if (!is_one_of<Pressure>(gas.value, "a partial pressure such as \"0.0004 bar\"")) continue;
      if (gas.value.quantity.value_in_si > 0) continue;
      error(gas.value.span,
            "a gas at no pressure would be taken out to the last molecule",
            gas.value.text,
            "a positive partial pressure",
            fmt::format("write strip = {{ {} = \"99 %\" }}", gas.name.text));
    }
  }

  void check(const Headspace& space) {
    const WrittenQuantity& volume = space.volume.quantity;
    const bool is_volume_ratio =
        volume.dimension == DimensionExponents{} &&
        (volume.meaning == Meaning::plain || volume.meaning == Meaning::ratio);
    if (!is_volume_ratio || !(volume.value_in_si > 0)) {
      error(space.volume.span,
            "a gas space is a positive volume per volume of water",
            space.volume.text,
            "such as \"0.5 L/L\" or \"50 %\"");
    }
    check(space.gas);
  }

  void check_mineral(const Word& word) {
    if (chemistry_.mineral_index(word.text) < 0) {
      unknown("mineral", word, names_of(chemistry_.minerals));
    }
  }

  void check(const Settle& settle) {
    if (settle.minerals.empty()) {
      error(train_[at_].span, "nothing may settle", "settle", "at least one mineral");
    }
    for (std::size_t k = 0; k < settle.minerals.size(); ++k) {
      const Settle::Entry& entry = settle.minerals[k];
      check_mineral(entry.mineral);
      for (std::size_t j = 0; j < k; ++j) {
        if (settle.minerals[j].mineral.text != entry.mineral.text) continue;
        error(entry.mineral.span, "this mineral is named twice", entry.mineral.text, "once");
      }
      if (!entry.index) continue;
      const double index = entry.index->quantity.number;
      if (index >= 0 && index <= highest_index) continue;
      error(entry.index->span,
            "this is no saturation index that could stay",
            entry.index->text,
            fmt::format("a number from 0 to {:g}: log10 of the supersaturation", highest_index));
    }
    if (!settle.area) return;
    constexpr DimensionExponents area = {2, 0, 0, 0, 0, 0, 0};
    if (settle.area->quantity.dimension != area || !(settle.area->quantity.value_in_si > 0)) {
      error(settle.area->span, "this is no area", settle.area->text, "such as \"120 m2\"");
    } else {
      need_flow(*settle.area, "");
    }
  }

  void check(const RemoveSolids& remove) { check_share(remove.share, true); }
  void check(const PassBed& bed) { check_mineral(bed.mineral); }

  void check(const ExchangeIons& exchange) {
    if (supplies_.resin(exchange.resin.text) == nullptr) {
      unknown("resin", exchange.resin, names_of(supplies_.resins));
    }
    if (exchange.leakage) check_share(*exchange.leakage, true);
  }

  void check(const Recycle& recycle) {
    check_share(recycle.share, false);
    std::vector<std::string> earlier;
    for (std::size_t k = 0; k < at_; ++k) earlier.push_back(train_[k].name);
    if (std::find(earlier.begin(), earlier.end(), recycle.to.text) != earlier.end()) return;
    if (!earlier.empty()) return unknown("earlier step", recycle.to, earlier);
    error(recycle.to.span,
          "there is no earlier step to return to",
          recycle.to.text,
          "the name of a step before this one");
  }

  const Train& train_;
  const Chemistry& chemistry_;
  const Supplies& supplies_;
  bool has_flow_ = false;
  Diagnostics& diagnostics_;
  std::size_t at_ = 0;
  bool ok_ = true;
};

}  // namespace

bool check_train(const Train& train,
                 const Chemistry& chemistry,
                 const Supplies& supplies,
                 bool has_flow,
                 Diagnostics& diagnostics) {
  return TrainChecker(train, chemistry, supplies, has_flow, diagnostics).run();
}

}  // namespace ionledger
