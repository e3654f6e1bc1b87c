// "3 % by mass" cannot stand where a share of a mixture or a relative uncertainty is wanted.
// refuses: could not convert|no matching function for call
#include "ionledger/units.hpp"

using namespace ionledger;

double blend(Ratio share) { return share.value; }

double use(MassFraction fraction, Ratio share) {
#ifdef WRONG
  return blend(fraction) + share.value;
#else
  return fraction.kg_per_kg + blend(share);
#endif
}
