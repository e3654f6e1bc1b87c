// A number without a unit is no quantity.
// refuses: could not convert|no matching function for call
#include "ionledger/units.hpp"

using namespace ionledger;

double in_bar(Pressure pressure) { return pressure.value() / 1e5; }

double use(double number) {
#ifdef WRONG
  return in_bar(number);
#else
  return in_bar(number * Pressure::unit_type());
#endif
}
