// Numbers as people read them: a true minus sign, grouped thousands, powers of ten written out.
// Separate because terminal and pages must print the same number alike.
#pragma once

#include <string>
#include <vector>

namespace ionledger {

/// Factor from one standard deviation to half of a 95 % interval (normal distribution); "±" always
/// means the latter.
inline constexpr double half_width_95 = 1.96;

/// What stands where there is no number.
inline constexpr const char* no_number = "–";

/// "−1 234.50": U+2212 for minus, U+202F between groups of three digits before the point; never
/// "−0.00". Not finite: no_number.
[[nodiscard]] std::string fixed_text(double value, int decimals);

/// The same, with its sign always: "+0.95", "+0.00".
[[nodiscard]] std::string signed_text(double value, int decimals);

/// "3.20 × 10⁻³" with `digits` significant digits; "0" for zero.
[[nodiscard]] std::string scientific_text(double value, int digits = 3);

/// `digits` significant digits without a power of ten where 1e-4 <= |value| < 1e6, else
/// scientific_text.
[[nodiscard]] std::string significant_text(double value, int digits = 3);

/// At most `digits` significant digits, no trailing zeros: "18", "64.4", "−3".
[[nodiscard]] std::string plain_text(double value, int digits = 6);

/// Terms (>= 0, finite) in whole steps that add up to their sum in whole steps: every term is
/// rounded down, and the steps still missing go to the terms that lost most. Each is then within
/// one step of its value.
[[nodiscard]] std::vector<long long> apportioned(const std::vector<double>& terms, double step);

}  // namespace ionledger
