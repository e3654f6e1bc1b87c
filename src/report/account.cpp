// Rounding both sides of the charge ledger so that they add up.
#include "report/account.hpp"

#include <algorithm>
#include <cmath>
#include <iterator>

#include "report/number_text.hpp"
#include "report/text_sections.hpp"

namespace ionledger {
namespace {

/// Ions below this share of their side are lumped into one line, unless everything is asked for.
constexpr double trace_share = 1e-3;
/// Significant digits of the larger sum: one more than an analysis defends, so that sums close.
constexpr int sum_digits = 5;
constexpr int most_decimals = 6;

std::vector<LedgerLine> lines_of(const AssessedState& state, bool cations) {
  std::vector<LedgerLine> lines;
  std::copy_if(state.ledger.begin(),
               state.ledger.end(),
               std::back_inserter(lines),
               [&](const LedgerLine& line) {
                 return (line.charge > 0) == cations && line.charge != 0 &&
                        std::isfinite(line.eq_per_kg);
               });
  return lines;
}

double sum_of(const std::vector<LedgerLine>& lines) {
  double sum = 0;
  for (const LedgerLine& line : lines) sum += std::abs(line.eq_per_kg);
  return sum;
}

AccountUnit unit_for(double largest_sum) {
  AccountUnit unit;
  if (largest_sum > 0 && largest_sum < 1e-5) unit = {1e6, "µ", 3};
  const double printed = largest_sum * unit.per_unit;
  if (printed <= 0) return unit;
  const int exponent = static_cast<int>(std::floor(std::log10(printed)));
  unit.decimals = std::clamp(sum_digits - 1 - exponent, 0, most_decimals);
  return unit;
}

AccountSide side_of(const std::vector<LedgerLine>& lines, const AccountUnit& unit, bool shows_all) {
  const double limit = shows_all ? 0.0 : trace_share * sum_of(lines);
  std::vector<double> terms;
  AccountSide side;
  std::size_t traces = 0;
  double trace_sum = 0;
  for (const LedgerLine& line : lines) {
    const double equivalents = std::abs(line.eq_per_kg);
    if (equivalents < limit) {
      ++traces;
      trace_sum += equivalents;
      continue;
    }
    terms.push_back(equivalents);
    side.entries.push_back({line.species,
                            std::abs(line.charge),
                            fixed_text(line.molality * unit.per_unit, unit.decimals)});
  }
  if (traces > 0) {
    terms.push_back(trace_sum);
    side.entries.push_back({counted(traces, "trace", "traces"), 0, ""});
  }
  const std::vector<long long> steps = apportioned(terms, unit.step());
  for (std::size_t i = 0; i < steps.size(); ++i) {
    side.entries[i].steps = steps[i];
    side.sum += steps[i];
  }
  return side;
}

}  // namespace

double AccountUnit::step() const { return std::pow(10.0, -decimals) / per_unit; }

std::string AccountUnit::text(long long steps) const {
  return fixed_text(double(steps) * std::pow(10.0, -decimals), decimals);
}

std::string Account::gap_text() const { return (gap > 0 ? "+" : "") + unit.text(gap); }

Account account_of(const AssessedState& state, bool shows_all) {
  const std::vector<LedgerLine> cations = lines_of(state, true);
  const std::vector<LedgerLine> anions = lines_of(state, false);
  Account account;
  account.unit = unit_for(std::max(sum_of(cations), sum_of(anions)));
  account.cations = side_of(cations, account.unit, shows_all);
  account.anions = side_of(anions, account.unit, shows_all);
  account.gap = account.cations.sum - account.anions.sum;
  account.closes =
      account.gap == 0 ||
      is_accepted(100.0 * double(account.gap) / double(account.cations.sum + account.anions.sum),
                  state.accepted_imbalance_percent);
  return account;
}

}  // namespace ionledger
