// The number in front of a unit: strict, because "1,234" means two things in two countries.
#include "units/number.hpp"

#include <fast_float/fast_float.h>

#include <algorithm>
#include <cmath>
#include <iterator>
#include <optional>
#include <string>

namespace ionledger {
namespace {

constexpr const char* number_form =
    "a number with a decimal point and no thousands separators, such as \"1234.5\" or \"1.2e-3\"";

bool is_separator(char c) { return c == ',' || c == '\'' || c == '_'; }

std::size_t skip_digits(const QuantityText& text, std::size_t position) {
  while (is_digit(text.at(position))) ++position;
  return position;
}

std::size_t skip_sign(const QuantityText& text, std::size_t position) {
  return text.at(position) == '+' || text.at(position) == '-' ? position + 1 : position;
}

/// Position behind the longest run at `begin` that has the form of a number.
std::size_t number_end(const QuantityText& text, std::size_t begin) {
  std::size_t end = skip_digits(text, begin);
  if (text.at(end) == '.') end = skip_digits(text, end + 1);
  if (text.at(end) == 'e' || text.at(end) == 'E') {
    const std::size_t exponent = skip_sign(text, end + 1);
    if (is_digit(text.at(exponent))) end = skip_digits(text, exponent);
  }
  return end;
}

UnitError not_a_number(const QuantityText& text, std::size_t begin) {
  std::string word;
  for (std::size_t i = skip_sign(text, begin); is_letter(text.at(i)) && word.size() < 3; ++i) {
    word += static_cast<char>(text.at(i) | 0x20);  // to lower case
  }
  if (word == "nan" || word == "inf") {
    return text.error(begin, quoted(text.original()) + " is not a finite number", number_form);
  }
  if (text.at(begin) == '<' || text.at(begin) == '>' || text.at(begin) == '~') {
    return text.error(begin,
                      quoted(text.original()) + " is a bound, not a value",
                      number_form,
                      "write the value to calculate with, for instance half the detection limit");
  }
  return text.error(begin, quoted(text.original()) + " does not begin with a number", number_form);
}

/// Digits, points and separators from `begin` on, as a person may write a long number.
std::string grouped_digits(const QuantityText& text, std::size_t begin) {
  std::string run;
  for (std::size_t i = begin;; ++i) {
    const char c = text.at(i);
    const bool is_gap = is_space(c) && is_digit(text.at(i + 1));
    if (!is_digit(c) && c != '.' && !is_separator(c) && !is_gap) return run;
    run += c;
  }
}

/// "1.234,5" to "1234.5": only the last mark can be the decimal one.
std::string with_point(const std::string& run, bool last_mark_is_decimal) {
  const std::size_t last = run.find_last_not_of("0123456789");
  std::string plain;
  for (std::size_t i = 0; i < run.size(); ++i) {
    if (is_digit(run[i])) plain += run[i];
    if (i == last && last_mark_is_decimal) plain += '.';
  }
  return plain;
}

/// The ways to read `run` ("1,5", "1,234", "1.234,5", "10 000"), as advice; may be empty.
std::string readings(const std::string& run) {
  std::string marks;
  std::copy_if(
      run.begin(), run.end(), std::back_inserter(marks), [](char c) { return !is_digit(c); });
  if (marks.empty()) return "";
  const char last = marks.back();
  const bool may_be_decimal =
      (last == ',' || last == '.') && std::count(marks.begin(), marks.end(), last) == 1;
  const bool may_be_groups =
      marks.find_first_not_of(last) == std::string::npos && run.size() - run.rfind(last) == 4;
  std::string advice;
  if (may_be_decimal) advice = "write " + quoted(with_point(run, true));
  if (may_be_groups) {
    advice += (advice.empty() ? "write " : " or ") + quoted(with_point(run, false));
  }
  return advice;
}

UnitError grouped(const QuantityText& text, std::size_t begin, std::size_t mark) {
  std::string run = grouped_digits(text, skip_sign(text, begin));
  while (!run.empty() && !is_digit(run.back())) run.pop_back();
  const std::string what = text.at(mark) == ',' ? "a comma" : "a separator";
  return text.error(mark, what + " in the number " + quoted(run), number_form, readings(run));
}

/// What is wrong with the characters right behind a number, if anything.
std::optional<UnitError> bad_follower(const QuantityText& text,
                                      std::size_t begin,
                                      std::size_t end) {
  const std::size_t next = text.skip_spaces(end);
  if (is_separator(text.at(end)) || text.at(end) == '.') return grouped(text, begin, end);
  if (next > end && is_digit(text.at(next))) return grouped(text, begin, end);
  const bool is_hexadecimal =
      text.ascii().substr(begin, end - begin) == "0" && (text.at(end) | 0x20) == 'x';
  if (is_hexadecimal) {
    return text.error(begin, "hexadecimal numbers are not read", number_form);
  }
  const char c = text.at(next);
  const bool is_power_of_ten =
      c == '^' || ((c == '*' || c == 'x') && is_digit(text.at(text.skip_spaces(next + 1))));
  if (is_power_of_ten) {
    return text.error(
        next, "powers of ten are written with e", number_form, "write \"1.5e3\" for 1.5*10^3");
  }
  const bool is_plus_minus = next < text.size() && text.written(next, next + 1) == "±";
  if (c == '+' || c == '-' || is_plus_minus) {
    return text.error(next,
                      quoted(text.original()) + " is more than one number",
                      number_form,
                      "give one value here; an uncertainty has its own place");
  }
  return std::nullopt;
}

}  // namespace

std::variant<Number, UnitError> read_number(const QuantityText& text, std::size_t begin) {
  const std::size_t digits = skip_sign(text, begin);
  const bool starts_well =
      is_digit(text.at(digits)) || (text.at(digits) == '.' && is_digit(text.at(digits + 1)));
  if (!starts_well) return not_a_number(text, begin);
  const std::size_t end = number_end(text, digits);
  if (const auto error = bad_follower(text, begin, end)) return *error;

  const std::string_view spelling = text.ascii().substr(digits, end - digits);
  double value = 0;
  fast_float::from_chars(spelling.data(), spelling.data() + spelling.size(), value);
  const std::string_view mantissa = spelling.substr(0, spelling.find_first_of("eE"));
  const bool is_zero = mantissa.find_first_of("123456789") == std::string_view::npos;
  if (!std::isfinite(value) || (!is_zero && !std::isnormal(value))) {
    return text.error(begin,
                      quoted(spelling) + " is beyond the numbers this program can hold",
                      "a number between 1e-300 and 1e300",
                      "check the exponent");
  }
  return Number{text.at(begin) == '-' ? -value : value, end};
}

}  // namespace ionledger
