// A value in meq/L cannot be handed to what wants mmol/L.
// refuses: could not convert|no matching function for call
#include "ionledger/units.hpp"

using namespace ionledger;

double per_litre(AmountPerVolume amount) { return amount.value() / 1000; }

double use(EquivalentPerVolume equivalents, AmountPerVolume moles) {
#ifdef WRONG
  return per_litre(equivalents) + per_litre(moles);
#else
  return equivalents.value() + per_litre(moles);
#endif
}
