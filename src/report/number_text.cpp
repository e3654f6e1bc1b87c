// Formatting numbers for people.
#include "report/number_text.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <cstddef>
#include <numeric>
#include <string_view>

namespace ionledger {
namespace {

constexpr std::string_view minus = "\u2212";
constexpr std::string_view thin_gap = "\u202F";

/// Digits with a leading '-' as fmt writes them, to the same with U+2212 and grouped thousands.
std::string typeset(const std::string& digits) {
  const bool is_negative = digits.front() == '-';
  const std::string_view body = std::string_view(digits).substr(is_negative ? 1 : 0);
  const std::size_t whole = std::min(body.find('.'), body.size());
  std::string result(is_negative ? minus : "");
  for (std::size_t i = 0; i < body.size(); ++i) {
    if (i > 0 && i < whole && (whole - i) % 3 == 0) result += thin_gap;
    result += body[i];
  }
  return result;
}

/// True when the digits printed are all zero, so that a sign would mislead.
bool prints_as_zero(const std::string& digits) {
  return digits.find_first_of("123456789") == std::string::npos;
}

std::string superscript(int exponent) {
  constexpr std::array<std::string_view, 10> digits = {
      "⁰", "¹", "²", "³", "⁴", "⁵", "⁶", "⁷", "⁸", "⁹"};
  std::string result(exponent < 0 ? "⁻" : "");
  for (const char c : std::to_string(std::abs(exponent))) result += digits[std::size_t(c - '0')];
  return result;
}

/// "3.2e-03" to "3.2 × 10⁻³".
std::string with_power_of_ten(const std::string& digits) {
  const std::size_t e = digits.find('e');
  return typeset(digits.substr(0, e)) + " × 10" + superscript(std::stoi(digits.substr(e + 1)));
}

}  // namespace

std::string fixed_text(double value, int decimals) {
  if (!std::isfinite(value)) return no_number;
  std::string digits = fmt::format("{:.{}f}", value, decimals);
  if (digits.front() == '-' && prints_as_zero(digits)) digits.erase(0, 1);
  return typeset(digits);
}

std::string signed_text(double value, int decimals) {
  const std::string text = fixed_text(value, decimals);
  return text == no_number || text.compare(0, minus.size(), minus) == 0 ? text : "+" + text;
}

std::string scientific_text(double value, int digits) {
  if (!std::isfinite(value)) return no_number;
  if (value == 0) return "0";
  return with_power_of_ten(fmt::format("{:.{}e}", value, digits - 1));
}

std::string significant_text(double value, int digits) {
  const double size = std::abs(value);
  if (!std::isfinite(value) || value == 0 || size < 1e-4 || size >= 1e6) {
    return scientific_text(value, digits);
  }
  // The exponent after rounding: 9.999 has one digit before the point, but prints as 10.0.
  const std::string rounded = fmt::format("{:.{}e}", value, digits - 1);
  const int exponent = std::stoi(rounded.substr(rounded.find('e') + 1));
  return fixed_text(value, std::max(0, digits - 1 - exponent));
}

std::string plain_text(double value, int digits) {
  if (!std::isfinite(value)) return no_number;
  const std::string text = fmt::format("{:.{}g}", value, digits);
  if (text.find('e') != std::string::npos) return with_power_of_ten(text);
  return typeset(text == "-0" ? "0" : text);
}

std::vector<long long> apportioned(const std::vector<double>& terms, double step) {
  std::vector<long long> steps(terms.size());
  std::vector<double> lost(terms.size());
  for (std::size_t i = 0; i < terms.size(); ++i) {
    steps[i] = static_cast<long long>(std::floor(terms[i] / step));
    lost[i] = terms[i] / step - double(steps[i]);
  }
  const double sum = std::accumulate(terms.begin(), terms.end(), 0.0);
  long long missing = std::llround(sum / step) - std::accumulate(steps.begin(), steps.end(), 0LL);
  std::vector<std::size_t> order(terms.size());
  std::iota(order.begin(), order.end(), std::size_t{0});
  std::stable_sort(
      order.begin(), order.end(), [&](std::size_t a, std::size_t b) { return lost[a] > lost[b]; });
  for (std::size_t i = 0; i < order.size() && missing > 0; ++i, --missing) ++steps[order[i]];
  return steps;
}

}  // namespace ionledger
