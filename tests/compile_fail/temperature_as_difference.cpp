// An absolute temperature is no temperature difference.
// refuses: could not convert|no matching function for call
#include "ionledger/units.hpp"

using namespace ionledger;

double heat_per_mass(TemperatureDifference rise) { return 4184 * rise.value(); }

double use(Temperature cold, Temperature hot) {
#ifdef WRONG
  return heat_per_mass(hot) + in_kelvin(cold);
#else
  return heat_per_mass(hot - cold);
#endif
}
