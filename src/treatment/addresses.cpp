// The quantities of a train by their address, and the words behind a degree of concentration.
#include "treatment/workbench.hpp"

namespace ionledger {
namespace {

using Quantities = std::vector<std::pair<std::string, Given*>>;

void add_named(const std::string& key, std::vector<NamedGiven>& named, Quantities& list) {
  for (NamedGiven& entry : named) list.emplace_back(key + "." + entry.name.text, &entry.value);
}

/// One overload for each action.
struct Lister {
  Quantities list;

  void add(std::string key, Given& given) { list.emplace_back(std::move(key), &given); }
  void add(std::string key, std::optional<Given>& given) {
    if (given) add(std::move(key), *given);
  }

  void operator()(Blend& blend) {
    add("share", blend.share);
    add("flow", blend.flow);
  }
  void operator()(Dose& dose) { add(dose.is_of_active ? "active" : "amount", dose.amount); }
  void operator()(ChangeTemperature& change) {
    add(change.cools ? "cool_to" : "heat_to", change.to);
  }
  void operator()(Concentrate& concentrate) {
    add("concentrate", concentrate.factor);
    add_named("rejection", concentrate.rejection, list);
    add("polarisation", concentrate.polarisation);
  }
  void operator()(Strip& strip) { add_named("strip", strip.shares, list); }
  void operator()(OpenTo& open) { add_named("open_to", open.pressures, list); }
  void operator()(Headspace& space) {
    add("headspace", space.volume);
    add_named("of", space.gas.pressures, list);
  }
  void operator()(Settle& settle) {
    for (Settle::Entry& entry : settle.minerals) add("settle." + entry.mineral.text, entry.index);
    add("area", settle.area);
  }
  void operator()(RemoveSolids& remove) { add("remove_solids", remove.share); }
  void operator()(PassBed&) {}
  void operator()(ExchangeIons& exchange) { add("leakage", exchange.leakage); }
  void operator()(BringPH& bring) { add("bring_pH_to", bring.ph); }
  void operator()(Recycle& recycle) { add("share", recycle.share); }
};

struct FactorWord {
  std::string_view word;
  Concentrate::By by;
  bool is_ratio;
};
constexpr FactorWord factor_words[] = {
    {"cycles", Concentrate::By::cycles, false},
    {"evaporated", Concentrate::By::evaporated, true},
    {"recovery", Concentrate::By::recovery, true},
};
constexpr const char* factor_form = R"("4.2 cycles", "75 % recovery" or "30 % evaporated")";

}  // namespace

Quantities quantities_of(Action& action) {
  Lister lister;
  std::visit(lister, action);
  return std::move(lister.list);
}

WrittenQuantity* quantity_at(Train& train, std::string_view address) {
  for (Step& step : train) {
    if (address.substr(0, step.name.size()) != step.name) continue;
    for (const auto& [key, given] : quantities_of(step.action)) {
      if (address == step.name + "." + key) return &given->quantity;
    }
  }
  return nullptr;
}

std::vector<std::string> quantity_addresses(const Train& train) {
  std::vector<std::string> addresses;
  for (Step step : train) {
    for (const auto& [key, given] : quantities_of(step.action)) {
      addresses.push_back(step.name + "." + key);
    }
  }
  return addresses;
}

std::variant<ConcentrationFactor, UnitError> read_concentration_factor(std::string_view text) {
  for (const FactorWord& known : factor_words) {
    const std::size_t end = text.find_last_not_of(' ') + 1;
    if (end <= known.word.size() ||
        text.substr(end - known.word.size(), known.word.size()) != known.word) {
      continue;
    }
    // A bare count has no unit; it is read by the rules of numbers in front of one.
    const std::string quantity(text.substr(0, end - known.word.size()));
    auto read = read_quantity(known.is_ratio ? quantity : quantity + "%");
    if (auto* error = std::get_if<UnitError>(&read)) return std::move(*error);
    ConcentrationFactor factor{known.by, std::get<WrittenQuantity>(read)};
    if (factor.quantity.meaning != Meaning::ratio) break;
    if (!known.is_ratio) {
      factor.quantity.value_in_si = factor.quantity.number;
      factor.quantity.unit.clear();
    }
    factor.quantity.unit += factor.quantity.unit.empty() ? "" : " ";
    factor.quantity.unit += known.word;
    return factor;
  }
  return UnitError{0,
                   "\"" + std::string(text) + "\" is not a degree of concentration",
                   "\"" + std::string(text) + "\"",
                   factor_form,
                   ""};
}

}  // namespace ionledger
