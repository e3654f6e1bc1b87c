// 18 degC and 20 degC have no sum; their difference is one, and may be added.
// refuses: no match for .*operator\+|invalid operands to binary
#include "ionledger/units.hpp"

using namespace ionledger;

auto use(Temperature cold, Temperature hot) {
#ifdef WRONG
  return cold + hot;
#else
  return cold + (hot - cold);
#endif
}
