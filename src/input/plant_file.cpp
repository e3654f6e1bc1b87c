// Reads a plant file: what the laboratory reported, as it was written. What the words mean is for
// the chemistry to say, elsewhere.
#include <fast_float/fast_float.h>
#include <fmt/format.h>

#include <cmath>

#include "input/file_text.hpp"
#include "input/quantity_value.hpp"
#include "input/steps.hpp"
#include "input/toml_cursor.hpp"
#include "ionledger/readers.hpp"

namespace ionledger {
namespace {

constexpr double min_ph = -2;
constexpr double max_ph = 16;

const QuantityExample temperature_example = {"a temperature", "18", "degC"};
const QuantityExample flow_example = {"a volume flow", "42", "m3/h"};
const QuantityExample pressure_example = {"an absolute pressure", "2.5", "bar"};
const QuantityExample conductivity_example = {"a conductivity", "850", "uS/cm"};
const QuantityExample density_example = {"a density", "1.02", "kg/L"};
const QuantityExample concentration_example = {"a concentration", "96", "mg/L"};
constexpr const char* accepted_concentrations =
    "mass per volume (\"96 mg/L\"), amount per volume (\"2.4 mmol/L\", \"4.8 meq/L\"), amount per "
    "kg of water (\"2.4 mmol/kg\", \"4.8 meq/kg\") or mass fraction (\"96 mg/kg\", \"3 % by "
    "mass\")";
const QuantityExample uncertainty_example = {
    "a share, or a quantity of the same kind as the value,", "3", "%"};
constexpr const char* accepted_ph = "a number such as 7.62, or text such as \"7.62 at 25 degC\"";

/// Sections that later versions will read; refused, not ignored.
struct UnreadSection {
  const char* key;
  const char* summary;
};
constexpr UnreadSection unread_sections[] = {
    {"find", "the question [find] is not read by this version"},
    {"screen", "the question [screen] is not read by this version"},
};

/// The whole of `text` as a finite number with a decimal point.
std::optional<double> plain_number(std::string_view text) {
  double number = 0;
  const char* const end = text.data() + text.size();
  const auto [stop, status] = fast_float::from_chars(text.data(), end, number);
  if (status != std::errc() || stop != end || !std::isfinite(number)) return std::nullopt;
  return number;
}

template <class Q>
bool is_concentration(const WrittenQuantity& written) {
  return std::holds_alternative<Q>(to<Q>(written));
}

class PlantReader {
 public:
  PlantReader(const TomlNode& root, TomlFindings& findings)
      : root_(root, "", findings), findings_(findings) {}

  PlantFile read() {
    if (const auto title = root_.find("title")) {
      plant_.analysis.title = title->text("text, the name of the water").value_or("");
    }
    if (const auto ppm = root_.find("ppm_means")) ppm_ = ppm_meaning(*ppm);
    if (auto model = section("model")) read_model(*model);
    stream();
    analysis();
    if (auto balance = section("balance")) read_balance(*balance);
    if (const auto steps = root_.find("step")) plant_.train = read_steps(*steps, ppm_);
    for (const UnreadSection& unread : unread_sections) {
      if (const auto found = root_.find(unread.key)) {
        found->key_error(unread.summary,
                         "title, ppm_means, [model], [stream], [analysis], [balance], [[step]]",
                         "leave the section out to assess the water as it was analysed");
      }
    }
    root_.refuse_unknown_keys();
    return std::move(plant_);
  }

 private:
  std::optional<TomlCursor> section(std::string_view key) {
    auto found = root_.find(key);
    if (found && !found->must_be_table()) return std::nullopt;
    return found;
  }

  static std::optional<PpmMeaning> ppm_meaning(const TomlCursor& value) {
    const char* const expected = "\"mg/L\" or \"mg/kg\"";
    const auto text = value.text(expected);
    if (!text) return std::nullopt;
    if (*text == "mg/L") return PpmMeaning::mg_per_litre;
    if (*text == "mg/kg") return PpmMeaning::mg_per_kg;
    value.error(fmt::format("ppm cannot mean {}", excerpt(*text)), expected);
    return std::nullopt;
  }

  void read_model(TomlCursor& model) {
    if (const auto activity = model.find("activity")) {
      plant_.activity_model =
          activity->text("the name of an activity model, such as \"davies\"").value_or("");
      plant_.activity_span = activity->span();
    }
    model.refuse_unknown_keys();
  }

  void stream() {
    auto stream = section("stream");
    if (!stream) {
      if (!root_.has("stream")) {
        findings_.error("[stream] is missing",
                        "at least the temperature: every equilibrium depends on it",
                        "add a line [stream] and below it temperature = \"18 degC\"");
      }
      return;
    }
    Analysis& to_fill = plant_.analysis;
    to_fill.stream_span = stream->key_span();
    const auto temperature = stream->require(
        "temperature", described(temperature_example) + "; every equilibrium depends on it");
    if (temperature) {
      to_fill.temperature =
          read_as<Temperature>(*temperature, temperature_example).value_or(to_fill.temperature);
    }
    if (const auto ph = stream->find("pH")) to_fill.ph = measured_ph(*ph);
    read_optional(*stream, "flow", flow_example, to_fill.flow);
    std::optional<Pressure> pressure;
    read_positive(*stream, "pressure", pressure_example, pressure);
    to_fill.pressure = pressure.value_or(to_fill.pressure);
    read_optional(*stream, "conductivity", conductivity_example, to_fill.conductivity);
    read_positive(*stream, "density", density_example, to_fill.density);
    stream->refuse_unknown_keys();
  }

  template <class Q>
  static std::optional<TomlCursor> read_optional(TomlCursor& table,
                                                 std::string_view key,
                                                 const QuantityExample& example,
                                                 std::optional<Q>& result) {
    auto value = table.find(key);
    if (!value) return std::nullopt;
    result = read_as<Q>(*value, example);
    if (result && result->value() < 0) {
      value->error(fmt::format("{} is negative", value->path()), described(example));
    }
    return value;
  }

  template <class Q>
  static void read_positive(TomlCursor& table,
                            std::string_view key,
                            const QuantityExample& example,
                            std::optional<Q>& result) {
    const auto value = read_optional(table, key, example, result);
    if (value && result && result->value() == 0) {
      value->error(fmt::format("{} is zero", value->path()), described(example));
    }
  }

  static std::optional<MeasuredPH> measured_ph(const TomlCursor& value) {
    MeasuredPH ph;
    ph.span = value.span();
    std::optional<double> number;
    if (value.is(TomlNode::Kind::text)) {
      const std::string text = value.text(accepted_ph).value_or("");
      constexpr std::string_view at = " at ";
      const std::size_t split = text.find(at);
      number = plain_number(std::string_view(text).substr(0, split));
      if (!number) {
        value.error(fmt::format("{} is not a pH", excerpt(text)),
                    accepted_ph,
                    text.find(',') == std::string::npos ? "" : "write a decimal point");
        return std::nullopt;
      }
      if (split != std::string::npos) {
        ph.temperature = temperature_in(value, text, split + at.size());
        if (!ph.temperature) return std::nullopt;
      }
    } else {
      number = value.number(accepted_ph);
      if (!number) return std::nullopt;
    }
    if (*number < min_ph || *number > max_ph) {
      value.error(fmt::format("a pH of {} is not possible in water", *number),
                  fmt::format("a pH between {} and {}", min_ph, max_ph));
      return std::nullopt;
    }
    ph.value = *number;
    return ph;
  }

  /// The temperature that begins at `offset` of `text`, which is what `value` says.
  static std::optional<Temperature> temperature_in(const TomlCursor& value,
                                                   std::string_view text,
                                                   std::size_t offset) {
    const auto written = read_quantity(text.substr(offset));
    if (const auto* unit_error = std::get_if<UnitError>(&written)) {
      refuse_quantity(value, *unit_error, offset);
      return std::nullopt;
    }
    const auto temperature = to<Temperature>(std::get<WrittenQuantity>(written));
    if (const auto* unit_error = std::get_if<UnitError>(&temperature)) {
      refuse_quantity(value, *unit_error, offset);
      return std::nullopt;
    }
    return std::get<Temperature>(temperature);
  }

  void analysis() {
    auto analysis = section("analysis");
    if (!analysis) {
      if (!root_.has("analysis")) {
        findings_.error("[analysis] is missing",
                        "what the laboratory reported, one constituent a line",
                        "add a line [analysis] and below it such lines as calcium = \"96 mg/L\"");
      }
      return;
    }
    for (TomlCursor& entry : analysis->entries()) {
      if (auto value = reported_value(entry)) plant_.analysis.values.push_back(std::move(*value));
    }
  }

  [[nodiscard]] std::optional<ReportedValue> reported_value(TomlCursor& entry) const {
    ReportedValue reported;
    reported.key = entry.key();
    reported.key_span = entry.key_span();
    if (!entry.is(TomlNode::Kind::table)) {
      if (!read_concentration(entry, reported)) return std::nullopt;
      return reported;
    }
    const auto value = entry.require("value", described(concentration_example));
    const auto uncertainty = entry.find("uncertainty");
    entry.refuse_unknown_keys();
    if (!value || !read_concentration(*value, reported)) return std::nullopt;
    if (uncertainty) read_uncertainty(*uncertainty, reported);
    return reported;
  }

  bool read_concentration(const TomlCursor& value, ReportedValue& reported) const {
    const auto written = read_written(value, ppm_, concentration_example);
    if (!written) return false;
    reported.text = value.text("").value_or("");
    reported.value_span = value.span();
    reported.quantity = *written;
    const bool is_accepted =
        is_concentration<Density>(*written) || is_concentration<AmountPerVolume>(*written) ||
        is_concentration<EquivalentPerVolume>(*written) ||
        is_concentration<AmountPerMass>(*written) ||
        is_concentration<EquivalentPerMass>(*written) || is_concentration<MassFraction>(*written);
    if (!is_accepted) {
      value.error(fmt::format("\"{}\" is not a unit of concentration", written->unit),
                  accepted_concentrations);
    } else if (written->value_in_si < 0) {
      value.error(fmt::format("{} is negative", value.path()), "zero or more");
      return false;
    }
    return is_accepted;
  }

  void read_uncertainty(const TomlCursor& value, ReportedValue& reported) const {
    const auto written = read_written(value, ppm_, uncertainty_example);
    if (!written) return;
    const WrittenQuantity& of = reported.quantity;
    const bool has_other_basis = !written->basis.empty() && written->basis != of.basis;
    if (written->value_in_si < 0) {
      value.error(fmt::format("{} is negative", value.path()), "zero or more");
    } else if (written->meaning == Meaning::ratio) {
      reported.relative_uncertainty = written->value_in_si;
    } else if (written->dimension != of.dimension || written->meaning != of.meaning ||
               has_other_basis) {
      value.error(fmt::format("this uncertainty does not fit \"{}\"", reported.text),
                  described(uncertainty_example));
    } else {
      reported.si_uncertainty = written->value_in_si;
    }
  }

  void read_balance(TomlCursor& balance) {
    const char* const expected = "\"nothing\", \"pH\" or a constituent such as \"sodium\"";
    if (const auto closed_by = balance.require("closed_by", expected)) {
      if (const auto text = closed_by->text(expected)) {
        plant_.analysis.closure = closure(*text);
        plant_.analysis.closure.span = closed_by->span();
      }
    }
    balance.refuse_unknown_keys();
  }

  static Closure closure(const std::string& text) {
    Closure closure;
    if (text == "nothing") return closure;
    closure.by = text == "pH" ? Closure::By::ph : Closure::By::constituent;
    if (closure.by == Closure::By::constituent) closure.constituent = text;
    return closure;
  }

  TomlCursor root_;
  TomlFindings& findings_;
  std::optional<PpmMeaning> ppm_;
  PlantFile plant_;
};

}  // namespace

std::optional<PlantFile> read_plant_draft(std::string_view text,
                                          const std::string& name,
                                          Diagnostics& diagnostics) {
  const auto readable = readable_text(text, name, diagnostics);
  if (!readable) return std::nullopt;
  TomlFindings findings(name, diagnostics);
  const auto root = parse_toml(*readable, findings);
  if (!root) return std::nullopt;
  return PlantReader(*root, findings).read();
}

std::optional<PlantFile> read_plant_file(std::string_view text,
                                         const std::string& name,
                                         Diagnostics& diagnostics) {
  auto plant = read_plant_draft(text, name, diagnostics);
  if (diagnostics.has_errors()) return std::nullopt;
  return plant;
}

}  // namespace ionledger
