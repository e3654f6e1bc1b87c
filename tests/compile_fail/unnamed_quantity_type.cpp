// Text is read into the quantity types of units.hpp only; a bare double would lose the unit.
// refuses: no matching function for call to .*to
#include "ionledger/units.hpp"

using namespace ionledger;

bool use(const WrittenQuantity& written) {
#ifdef WRONG
  return to<double>(written).index() == 0;
#else
  return to<Ratio>(written).index() == 0;
#endif
}
