// An amount per kilogram of water is no amount per litre: the density stands between them.
// refuses: could not convert|no viable conversion
#include "ionledger/units.hpp"

using namespace ionledger;

AmountPerVolume convert(AmountPerMass molality, Density density) {
#ifdef WRONG
  (void)density;
  return molality;
#else
  return molality * density;
#endif
}
