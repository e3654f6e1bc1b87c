// See exact.hpp.
#include "solver/exact.hpp"

#include <cmath>
#include <cstdlib>

namespace ionledger::solver {
namespace {

using boost::multiprecision::cpp_int;

Rational power(unsigned base, int exponent) {
  const cpp_int whole =
      boost::multiprecision::pow(cpp_int(base), static_cast<unsigned>(std::abs(exponent)));
  return exponent >= 0 ? Rational(whole) : Rational(1, whole);
}

constexpr int largest_exponent = 4000;  ///< Far beyond a double; keeps a typing error affordable.

}  // namespace

Rational exact(double value) {
  int exponent = 0;
  const double fraction = std::frexp(value, &exponent);
  const auto whole = static_cast<long long>(std::ldexp(fraction, 53));
  return Rational(whole) * power(2, exponent - 53);
}

std::optional<Rational> exact_decimal(const std::string& text) {
  std::size_t place = 0;
  const bool negative = !text.empty() && text[0] == '-';
  if (!text.empty() && (text[0] == '-' || text[0] == '+')) ++place;
  cpp_int digits = 0;
  int n_digits = 0;
  int exponent = 0;
  bool after_point = false;
  for (; place < text.size() && text[place] != 'e' && text[place] != 'E'; ++place) {
    const char c = text[place];
    if (c == '.' && !after_point) {
      after_point = true;
      continue;
    }
    if (c < '0' || c > '9') return std::nullopt;
    digits = digits * 10 + (c - '0');
    ++n_digits;
    if (after_point) --exponent;
  }
  if (n_digits == 0) return std::nullopt;
  if (place < text.size()) {
    char* end = nullptr;
    const long written = std::strtol(text.c_str() + place + 1, &end, 10);
    if (end == text.c_str() + place + 1 || *end != '\0') return std::nullopt;
    if (std::abs(written) > largest_exponent) return std::nullopt;
    exponent += static_cast<int>(written);
  }
  const Rational value = Rational(digits) * power(10, exponent);
  return negative ? Rational(-value) : value;
}

double nearest(const Rational& value) { return value.convert_to<double>(); }

}  // namespace ionledger::solver
