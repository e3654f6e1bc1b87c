// mol/L and eq/L do not add up: the charge number stands between them.
// refuses: no match for .*operator\+|invalid operands to binary
#include "ionledger/units.hpp"

using namespace ionledger;

AmountPerVolume sum(AmountPerVolume moles, EquivalentPerVolume equivalents) {
#ifdef WRONG
  return moles + equivalents;
#else
  constexpr double equivalents_per_mole = 2;
  return moles + AmountPerVolume::from_value(equivalents.value() / equivalents_per_mole);
#endif
}
