// The grammar of units: symbols, powers, products and one quotient.
#include "units/unit_expression.hpp"

#include <algorithm>
#include <cmath>
#include <cstdlib>
#include <string>
#include <utility>

#include "units/unit_table.hpp"

namespace ionledger {
namespace {

constexpr DimensionExponents mass_dimension{0, 1, 0, 0, 0, 0, 0};
constexpr DimensionExponents mass_per_volume{-3, 1, 0, 0, 0, 0, 0};

double integer_power(double base, int exponent) {
  double result = 1;
  for (int i = 0; i < std::abs(exponent); ++i) result *= base;
  return exponent < 0 ? 1 / result : result;
}

/// Reads factor after factor; the first finding ends the reading.
class UnitReader {
 public:
  UnitReader(const QuantityText& text, std::size_t begin, std::size_t end)
      : text_(text), begin_(begin), end_(end), position_(begin) {}

  std::variant<UnitExpression, UnitError> read() {
    bool is_divided = false;
    while (!error_) {
      read_factor(is_divided);
      if (error_ || position_ == end_) break;
      is_divided = read_operator(is_divided);
    }
    if (error_) return *error_;
    if (!std::isnormal(unit_.factor)) {
      return text_.error(begin_, "the powers in " + unit_text() + " are too large", unit_examples);
    }
    if (n_factors_ == 2 && n_masses_ == 2 && unit_.dimension == DimensionExponents{}) {
      unit_.meaning = Meaning::mass_fraction;
    }
    return unit_;
  }

 private:
  [[nodiscard]] std::string unit_text() const { return quoted(text_.written(begin_, end_)); }

  void fail(std::size_t position, std::string summary, std::string fix = {}) {
    error_ = text_.error(position, std::move(summary), unit_examples, std::move(fix));
  }

  void skip_spaces() { position_ = std::min(text_.skip_spaces(position_), end_); }

  void read_factor(bool is_divided) {
    const std::size_t symbol_begin = position_;
    while (position_ < end_ && (is_letter(text_.at(position_)) || text_.at(position_) == '%')) {
      ++position_;
    }
    if (position_ == symbol_begin) return fail_without_symbol();
    const std::size_t symbol_end = position_;
    const KnownUnit* const unit =
        find_unit(text_.ascii().substr(symbol_begin, symbol_end - symbol_begin));
    if (unit == nullptr) return fail_unknown(symbol_begin, symbol_end);
    const std::optional<int> power = read_power();
    if (error_) return;
    const bool is_alone = symbol_begin == begin_ && position_ == end_ && !power;
    if (unit->stands_alone && !is_alone) {
      return fail(symbol_begin,
                  quoted(unit->symbol) + " cannot be part of a product, quotient or power");
    }
    take(*unit, is_divided ? -power.value_or(1) : power.value_or(1), is_alone);
    skip_spaces();
  }

  void take(const KnownUnit& unit, int power, bool is_alone) {
    unit_.factor *= integer_power(unit.factor, power);
    for (std::size_t i = 0; i < unit_.dimension.size(); ++i) {
      unit_.dimension[i] += power * unit.dimension[i];
    }
    ++n_factors_;
    if (unit.dimension == mass_dimension && std::abs(power) == 1) ++n_masses_;
    if (is_alone) {
      unit_.zero = unit.zero;
      unit_.meaning = unit.meaning;
    }
  }

  /// The power behind a symbol ("3", "^3", "-1", "^-1"), or nothing.
  std::optional<int> read_power() {
    const std::size_t power_begin = position_;
    const bool has_caret = text_.at(position_) == '^' && position_ < end_;
    if (has_caret) ++position_;
    const bool is_negative = text_.at(position_) == '-' && position_ < end_ &&
                             (has_caret || is_digit(text_.at(position_ + 1)));
    if (is_negative) ++position_;
    const std::size_t digits_begin = position_;
    int power = 0;
    while (position_ < end_ && is_digit(text_.at(position_))) {
      if (power <= max_unit_power) power = 10 * power + (text_.at(position_) - '0');
      ++position_;
    }
    if (position_ == power_begin) return std::nullopt;
    if (position_ == digits_begin || power == 0 || power > max_unit_power) {
      fail(power_begin,
           unit_text() + " has a power that is no whole number from 1 to " +
               std::to_string(max_unit_power) + ", of either sign");
    }
    return is_negative ? -power : power;
  }

  /// Moves to the next factor; true when it stands below the line.
  bool read_operator(bool is_divided) {
    const char c = text_.at(position_);
    const bool is_quotient = c == '/';
    if (!is_quotient && c != '*' && c != '.') {
      fail_between();
      return false;
    }
    if (is_divided) {
      fail(position_,
           unit_text() + " can be read in two ways after the first \"/\"",
           "write negative powers, such as \"kg*m^-2*s^-1\"");
      return false;
    }
    ++position_;
    skip_spaces();
    return is_quotient;
  }

  void fail_without_symbol() {
    if (position_ == end_) return fail(position_, unit_text() + " ends before its last unit");
    fail_unexpected();
  }

  void fail_unexpected() {
    // Stepping one position may stop inside "deg" for "°", which nothing written stands for.
    std::size_t next = position_ + 1;
    while (next < end_ && text_.written(position_, next).empty()) ++next;
    fail(position_,
         "unexpected character " + quoted(text_.written(position_, next)) + " in the unit " +
             unit_text());
  }

  void fail_between() {
    const char c = text_.at(position_);
    if (!is_letter(c) && c != '%') return fail_unexpected();
    std::string fix = "join units by \"*\" or \"/\"; a formula goes behind: \"mg/L as CaCO3\"";
    const std::string rest = text_.written(position_, end_);
    const bool may_be_formula = c >= 'A' && c <= 'Z' && rest.find_first_of(" */.^") == rest.npos;
    if (may_be_formula) {
      std::string unit = text_.written(begin_, position_);
      while (!unit.empty() && is_space(unit.back())) unit.pop_back();
      fix = "did you mean " + quoted(unit + " as " + rest) + "?";
    }
    fail(position_, "nothing joins the words of the unit " + unit_text(), fix);
  }

  void fail_unknown(std::size_t symbol_begin, std::size_t symbol_end) {
    const UnitAdvice advice =
        advice_on(text_.ascii().substr(symbol_begin, symbol_end - symbol_begin));
    std::string fix = advice.sentence;
    if (!advice.symbol.empty()) {
      fix = "did you mean " +
            quoted(text_.written(begin_, symbol_begin) + advice.symbol +
                   text_.written(symbol_end, end_)) +
            "?";
    }
    fail(symbol_begin, "unknown unit " + unit_text(), fix);
  }

  const QuantityText& text_;
  std::size_t begin_;
  std::size_t end_;
  std::size_t position_;
  UnitExpression unit_;
  int n_factors_ = 0;
  int n_masses_ = 0;
  std::optional<UnitError> error_;
};

/// "%", "% by mass"; what else may follow the sign is refused with advice.
std::variant<UnitExpression, UnitError> read_percent(const QuantityText& text,
                                                     std::size_t begin,
                                                     std::size_t end) {
  UnitExpression percent{0.01, 0, {}, Meaning::ratio};
  if (begin + 1 == end) return percent;
  std::string words;
  for (std::size_t i = text.skip_spaces(begin + 1); i < end; ++i) {
    const bool is_repeated_space = is_space(text.at(i)) && is_space(text.at(i - 1));
    if (!is_repeated_space) words += is_space(text.at(i)) ? ' ' : text.at(i);
  }
  percent.meaning = Meaning::mass_fraction;
  if (words == "by mass") return percent;
  return text.error(begin,
                    "unknown unit " + quoted(text.written(begin, end)),
                    "\"%\" for a share, \"% by mass\" for a mass fraction",
                    words == "by volume" ? "write mL/L for a share of the volume" : "");
}

std::variant<UnitExpression, UnitError> read_ppm(const QuantityText& text,
                                                 std::size_t begin,
                                                 std::optional<PpmMeaning> meaning) {
  if (!meaning) {
    return text.error(begin,
                      "ppm is used for both: mg/L or mg/kg?",
                      "\"mg/L\" or \"mg/kg\"",
                      "write mg/L or mg/kg, or say once what ppm means");
  }
  if (*meaning == PpmMeaning::mg_per_kg) {
    return UnitExpression{1e-6, 0, {}, Meaning::mass_fraction};
  }
  return UnitExpression{1e-3, 0, mass_per_volume, Meaning::plain};
}

}  // namespace

std::variant<UnitExpression, UnitError> read_unit(const QuantityText& text,
                                                  std::size_t begin,
                                                  std::size_t end,
                                                  std::optional<PpmMeaning> ppm) {
  if (text.ascii().substr(begin, end - begin) == "ppm") return read_ppm(text, begin, ppm);
  if (text.at(begin) == '%') return read_percent(text, begin, end);
  return UnitReader(text, begin, end).read();
}

}  // namespace ionledger
