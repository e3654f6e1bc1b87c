// The charge ledger as an account whose printed terms add up to its printed sums. Separate because
// terminal and pages must print the same account.
#pragma once

#include <cstddef>
#include <string>
#include <vector>

#include "ionledger/assessment.hpp"

namespace ionledger {

/// The unit of a ledger and how many decimals it prints.
struct AccountUnit {
  double per_unit = 1e3;  ///< Printed units in one mol or eq.
  std::string prefix = "m";
  int decimals = 3;
  [[nodiscard]] double step() const;
  [[nodiscard]] std::string text(long long steps) const;
};

/// One side of the account, in steps of the last digit printed.
struct AccountSide {
  struct Entry {
    std::string name;
    int charges = 0;       ///< Of one ion; 0 for the lumped traces.
    std::string molality;  ///< "3.2041"; empty for the lumped traces.
    long long steps = 0;
  };
  std::vector<Entry> entries;
  long long sum = 0;
};

struct Account {
  AccountUnit unit;
  AccountSide cations, anions;
  long long gap = 0;    ///< Cations minus anions.
  bool closes = false;  ///< The gap is zero, or within what the acceptance criterion allows.
  [[nodiscard]] std::string gap_text() const;  ///< With its sign, without a unit.
};

/// `shows_all` false: ions below a thousandth of their side are lumped into one entry.
[[nodiscard]] Account account_of(const AssessedState& state, bool shows_all);

}  // namespace ionledger
