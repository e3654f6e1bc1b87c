// "212 mg/L as CaCO3" taken apart into number, unit and basis, and put together in SI.
#include <cmath>
#include <cstddef>
#include <string>
#include <utility>

#include "ionledger/units.hpp"
#include "units/kind.hpp"
#include "units/number.hpp"
#include "units/spelling.hpp"
#include "units/unit_expression.hpp"

namespace ionledger {
namespace {

constexpr const char* whole_form = "a number and a unit, such as \"96 mg/L\" or \"18 degC\"";
constexpr const char* basis_form = "one formula behind \"as\", such as \"212 mg/L as CaCO3\"";
constexpr std::size_t quoted_of_long_text = 40;

/// A word between spaces, or an empty range.
struct Range {
  std::size_t begin = 0;
  std::size_t end = 0;
  [[nodiscard]] bool empty() const { return begin == end; }
};

Range next_word(const QuantityText& text, std::size_t from) {
  Range word;
  word.begin = text.skip_spaces(from);
  word.end = word.begin;
  while (word.end < text.size() && !is_space(text.at(word.end))) ++word.end;
  return word;
}

/// Where the unit ends and where the word "as" stands (empty without one).
struct Parts {
  Range unit;
  Range as;
};

Parts split(const QuantityText& text, std::size_t begin) {
  Parts parts;
  parts.unit = {text.skip_spaces(begin), text.skip_spaces(begin)};
  for (Range word = next_word(text, begin); !word.empty(); word = next_word(text, word.end)) {
    if (text.ascii().substr(word.begin, word.end - word.begin) == "as") {
      parts.as = word;
      break;
    }
    parts.unit.end = word.end;
  }
  return parts;
}

bool is_formula_character(char c) {
  return is_letter(c) || is_digit(c) || c == '(' || c == ')' || c == '+' || c == '-';
}

UnitError digit_zero(const QuantityText& text, const Parts& parts, std::size_t zero, Range word) {
  const std::string mended =
      text.written(parts.unit.begin, zero) + "O" + text.written(zero + 1, word.end);
  return text.error(zero,
                    "unknown unit " + quoted(text.written(parts.unit.begin, word.end)),
                    basis_form,
                    "did you mean " + quoted(mended) + "? (the letter O, not the digit 0)");
}

/// The formula behind "as". Which formulas make sense is for chemistry to say.
std::variant<std::string, UnitError> read_basis(const QuantityText& text, const Parts& parts) {
  const Range word = next_word(text, parts.as.end);
  if (word.empty()) {
    return text.error(text.size(), quoted(text.original()) + " ends behind \"as\"", basis_form);
  }
  for (std::size_t i = word.begin; i < word.end; ++i) {
    if (!is_formula_character(text.at(i))) {
      return text.error(i,
                        quoted(text.written(word.begin, word.end)) + " is not a formula",
                        basis_form,
                        "use plain letters and digits");
    }
    // No count of atoms begins with zero: this is the letter O, struck one key too high.
    if (text.at(i) == '0' && !is_digit(text.at(i - 1))) return digit_zero(text, parts, i, word);
  }
  const Range rest = next_word(text, word.end);
  if (!rest.empty()) {
    return text.error(
        rest.begin,
        "unexpected " + quoted(text.written(rest.begin, text.size())) + " behind the formula",
        basis_form);
  }
  return text.written(word.begin, word.end);
}

UnitError needless_basis(const QuantityText& text, const Parts& parts, const Kind& kind) {
  return text.error(parts.as.begin,
                    std::string(kind.name) + " cannot be \"as\" a formula",
                    "\"as ...\" only behind a concentration, a mass fraction or a mass flow",
                    kind.meaning == Meaning::ratio ? "write \"% by mass as ...\"" : "");
}

/// Sets the SI value; the finding when there is none a computation could use.
std::optional<UnitError> convert(const QuantityText& text,
                                 std::size_t begin,
                                 const UnitExpression& unit,
                                 WrittenQuantity& written) {
  written.value_in_si = (written.number + unit.zero) * unit.factor;
  if (written.meaning == Meaning::absolute_temperature && written.value_in_si < 0) {
    return text.error(begin,
                      quoted(text.original()) + " is below absolute zero",
                      "at least 0 K, which is -273.15 degC or -459.67 degF");
  }
  const bool may_be_zero = written.number == 0 || unit.zero != 0;
  if (std::isnormal(written.value_in_si) || (written.value_in_si == 0 && may_be_zero)) {
    return std::nullopt;
  }
  return text.error(begin,
                    quoted(text.original()) + " is beyond the numbers this program can hold",
                    "a value between 1e-300 and 1e300 in SI units",
                    "check the exponent");
}

UnitError too_long(std::string_view text) {
  const QuantityText start(text.substr(0, quoted_of_long_text));
  return {max_quantity_text,
          "a text of " + std::to_string(text.size()) + " bytes is too long for a quantity",
          quoted(std::string(start.original()) + "..."),
          "at most " + std::to_string(max_quantity_text) + " bytes: " + whole_form,
          ""};
}

}  // namespace

std::variant<WrittenQuantity, UnitError> read_quantity(std::string_view original,
                                                       std::optional<PpmMeaning> ppm) {
  if (original.size() > max_quantity_text) return too_long(original);
  const QuantityText text(original);
  const std::size_t begin = text.skip_spaces(0);
  if (begin == text.size()) return text.error(0, "an empty text is not a quantity", whole_form);

  const auto number_or_error = read_number(text, begin);
  if (const auto* error = std::get_if<UnitError>(&number_or_error)) return *error;
  const auto& number = std::get<Number>(number_or_error);

  const Parts parts = split(text, number.end);
  if (parts.unit.empty()) {
    return text.error(number.end,
                      quoted(text.original()) + " has no unit",
                      whole_form,
                      "write the unit behind it");
  }
  const auto unit_or_error = read_unit(text, parts.unit.begin, parts.unit.end, ppm);
  if (const auto* error = std::get_if<UnitError>(&unit_or_error)) return *error;
  const auto& unit = std::get<UnitExpression>(unit_or_error);

  WrittenQuantity written;
  written.number = number.value;
  written.unit = text.written(parts.unit.begin, parts.unit.end);
  written.dimension = unit.dimension;
  written.meaning = unit.meaning;
  if (!parts.as.empty()) {
    auto basis_or_error = read_basis(text, parts);
    if (const auto* error = std::get_if<UnitError>(&basis_or_error)) return *error;
    written.basis = std::move(std::get<std::string>(basis_or_error));
    const Kind& kind = kind_of(unit.dimension, unit.meaning);
    if (!kind.takes_basis) return needless_basis(text, parts, kind);
  }
  if (const auto error = convert(text, begin, unit, written)) return *error;
  return written;
}

}  // namespace ionledger
