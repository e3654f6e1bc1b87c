// From [[step]] tables to a train: one reader for each action key.
#include "input/steps.hpp"

#include <fmt/format.h>

#include <array>

#include "input/file_text.hpp"
#include "input/quantity_value.hpp"

namespace ionledger {
namespace {

constexpr const char* action_names =
    "blend, dose, heat_to, cool_to, concentrate, strip, open_to, headspace, settle, remove_solids, "
    "pass_bed_of, exchange, bring_pH_to or recycle_to";

/// Reads one table. Every reader asks for the keys it knows, so that the others are refused.
class StepReader {
 public:
  StepReader(TomlCursor& table, std::optional<PpmMeaning> ppm) : table_(table), ppm_(ppm) {}

  std::optional<Action> action() {
    struct Reader {
      const char* key;
      Action (StepReader::*read)(TomlCursor&);
    };
    constexpr std::array<Reader, 14> readers = {{{"blend", &StepReader::blend},
                                                 {"dose", &StepReader::dose},
                                                 {"heat_to", &StepReader::heat},
                                                 {"cool_to", &StepReader::cool},
                                                 {"concentrate", &StepReader::concentrate},
                                                 {"strip", &StepReader::strip},
                                                 {"open_to", &StepReader::open},
                                                 {"headspace", &StepReader::headspace},
                                                 {"settle", &StepReader::settle},
                                                 {"remove_solids", &StepReader::remove_solids},
                                                 {"pass_bed_of", &StepReader::pass_bed},
                                                 {"exchange", &StepReader::exchange},
                                                 {"bring_pH_to", &StepReader::bring_ph},
                                                 {"recycle_to", &StepReader::recycle}}};
    std::optional<Action> action;
    std::string first;
    for (const Reader& reader : readers) {
      auto value = table_.find(reader.key);
      if (!value) continue;
      if (action) {
        value->key_error(fmt::format("this step has two actions, {} and {}", first, reader.key),
                         "one action in each [[step]]",
                         "begin a new [[step]] with the second");
        continue;
      }
      first = reader.key;
      span_ = value->key_span();
      action = (this->*reader.read)(*value);
    }
    if (!action) {
      table_.error("this step does nothing", fmt::format("one action: {}", action_names));
    }
    return action;
  }

  [[nodiscard]] const SourceSpan& span() const { return span_; }

 private:
  static Word word(const TomlCursor& value, const std::string& expected) {
    return {value.text(expected).value_or(""), value.span()};
  }
  Word word_at(std::string_view key, const std::string& expected) {
    const auto value = table_.require(key, expected);
    return value ? word(*value, expected) : Word{};
  }

  [[nodiscard]] Given given(const TomlCursor& value, const QuantityExample& example) const {
    Given result;
    result.span = value.span();
    if (const auto written = read_written(value, ppm_, example)) {
      result.quantity = *written;
      result.text = value.text("").value_or("");
    }
    return result;
  }
  Given given_at(std::string_view key, const QuantityExample& example) {
    const auto value = table_.require(key, described(example));
    return value ? given(*value, example) : Given{};
  }
  std::optional<Given> given_if(std::string_view key, const QuantityExample& example) {
    const auto value = table_.find(key);
    if (!value) return std::nullopt;
    return given(*value, example);
  }
  /// A bare number, which has no unit.
  static Given number(const TomlCursor& value, const std::string& expected) {
    Given result;
    result.span = value.span();
    result.text = value.written();
    result.quantity.number = result.quantity.value_in_si = value.number(expected).value_or(0);
    return result;
  }

  [[nodiscard]] std::vector<NamedGiven> named(TomlCursor& table,
                                              const QuantityExample& example) const {
    std::vector<NamedGiven> result;
    for (const TomlCursor& entry : table.entries()) {
      result.push_back({{entry.key(), entry.key_span()}, given(entry, example)});
    }
    return result;
  }

  Action blend(TomlCursor& value) {
    Blend blend;
    blend.other = word(value, "the name of another plant file, such as \"well_5.toml\"");
    blend.share = given_if("share", {"a share of the mixture", "30", "%"});
    blend.flow = given_if("flow", {"a volume flow", "12", "m3/h"});
    return blend;
  }

  Action dose(TomlCursor& value) {
    Dose dose;
    dose.reagent = word(value, "a reagent such as \"sulfuric acid 96 %\"");
    const auto active = given_if("active", {"an amount of the active substance", "33.6", "mg/L"});
    const QuantityExample product = {"an amount of product", "35", "mg/L"};
    dose.is_of_active = active.has_value();
    dose.amount = active ? *active : given_at("amount", product);
    if (active && table_.has("amount")) {
      table_.find("amount")->key_error("this dose is given twice, as amount and as active",
                                       "amount, of the product, or active, of what acts in it");
    }
    return dose;
  }

  Action heat(TomlCursor& value) {
    return ChangeTemperature{given(value, {"a temperature", "46", "degC"}), false};
  }
  Action cool(TomlCursor& value) {
    return ChangeTemperature{given(value, {"a temperature", "15", "degC"}), true};
  }

  Action concentrate(TomlCursor& value) {
    const char* const expected = "\"4.2 cycles\", \"75 % recovery\" or \"30 % evaporated\"";
    Concentrate step;
    step.factor.span = value.span();
    if (const auto text = value.text(expected)) {
      step.factor.text = *text;
      const auto read = read_concentration_factor(*text);
      if (const auto* unit_error = std::get_if<UnitError>(&read)) {
        refuse_quantity(value, *unit_error);
      } else {
        step.by = std::get<ConcentrationFactor>(read).by;
        step.factor.quantity = std::get<ConcentrationFactor>(read).quantity;
      }
    }
    auto rejection = table_.find("rejection");
    if (rejection && rejection->must_be_table()) {
      step.rejection = named(*rejection, {"a share that is held back", "97", "%"});
    }
    if (const auto polarisation = table_.find("polarisation")) {
      step.polarisation = number(*polarisation, "a number such as 1.1");
    }
    if (const auto keep = table_.find("keep")) step.keeps_permeate = keeps_permeate(*keep);
    return step;
  }

  static bool keeps_permeate(const TomlCursor& value) {
    const char* const expected = "\"concentrate\" or \"permeate\"";
    const auto text = value.text(expected);
    if (text && *text != "permeate" && *text != "concentrate") {
      value.error(fmt::format("{} is not a side of the membrane", excerpt(*text)), expected);
    }
    return text == "permeate";
  }

  Action strip(TomlCursor& value) {
    Strip strip;
    if (value.must_be_table()) strip.shares = named(value, {"a share that leaves", "90", "%"});
    return strip;
  }

  OpenTo gas_phase(TomlCursor& value) const {
    OpenTo open;
    if (value.is(TomlNode::Kind::table)) {
      open.pressures = named(value, {"a partial pressure", "0.0004", "bar"});
    } else {
      open.atmosphere =
          word(value, "\"air\", or a table such as { carbon_dioxide = \"0.0004 bar\" }");
    }
    return open;
  }
  Action open(TomlCursor& value) { return gas_phase(value); }

  Action headspace(TomlCursor& value) {
    Headspace space;
    space.volume = given(value, {"a volume per volume of water", "0.5", "L/L"});
    if (auto of = table_.find("of")) space.gas = gas_phase(*of);
    return space;
  }

  Action settle(TomlCursor& value) {
    const char* const expected =
        "minerals such as [\"calcite\"], or with the saturation index that stays { calcite = 0.3 }";
    Settle settle;
    if (value.is(TomlNode::Kind::table)) {
      for (const TomlCursor& entry : value.entries()) {
        settle.minerals.push_back(
            {{entry.key(), entry.key_span()}, number(entry, "a saturation index such as 0.3")});
      }
    } else {
      for (const TomlCursor& item : value.items(expected)) {
        settle.minerals.push_back({word(item, expected), std::nullopt});
      }
    }
    settle.keep_solids = table_.flag("keep_solids", false);
    settle.area = given_if("area", {"an area", "120", "m2"});
    return settle;
  }

  Action remove_solids(TomlCursor& value) {
    return RemoveSolids{given(value, {"a share of what is suspended", "98", "%"})};
  }

  Action pass_bed(TomlCursor& value) {
    return PassBed{word(value, "a mineral such as \"calcite\"")};
  }

  Action exchange(TomlCursor& value) {
    ExchangeIons exchange;
    exchange.resin = word(value, "an ion exchanger such as \"softener\"");
    exchange.leakage = given_if("leakage", {"a share that passes", "2", "%"});
    return exchange;
  }

  Action bring_ph(TomlCursor& value) {
    BringPH bring;
    bring.ph = number(value, "a pH such as 7.2");
    bring.reagent = word_at("with", "a reagent such as \"sodium hydroxide 50 %\"");
    return bring;
  }

  Action recycle(TomlCursor& value) {
    Recycle recycle;
    recycle.to = word(value, "the name of an earlier step");
    recycle.share = given_at("share", {"a share of the water", "20", "%"});
    return recycle;
  }

  TomlCursor& table_;
  std::optional<PpmMeaning> ppm_;
  SourceSpan span_;
};

}  // namespace

Train read_steps(const TomlCursor& steps, std::optional<PpmMeaning> ppm) {
  Train train;
  int position = 0;
  for (TomlCursor& table : steps.items("[[step]] tables")) {
    if (!table.must_be_table()) continue;
    Step step;
    step.name = fmt::format("step_{}", ++position);
    step.name_span = table.span();
    if (const auto name = table.find("name")) {
      step.name = name->text("a name of your own, such as \"acid\"").value_or("");
      step.name_span = name->span();
    }
    StepReader reader(table, ppm);
    auto action = reader.action();
    table.refuse_unknown_keys();
    if (!action) continue;
    step.action = std::move(*action);
    step.span = reader.span();
    train.push_back(std::move(step));
  }
  return train;
}

}  // namespace ionledger
