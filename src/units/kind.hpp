// What a dimension is called, and which units fit it: the words of the messages about units.
#pragma once

#include "ionledger/units.hpp"

namespace ionledger {

struct Kind {
  DimensionExponents dimension;
  Meaning meaning;
  const char* name;   ///< With its article: "a temperature".
  const char* units;  ///< Units that fit, for a person to choose from.
  bool takes_basis;   ///< "as CaCO3" makes sense.
};

/// The kind of that dimension and meaning; for an unnamed one "a quantity of another kind".
[[nodiscard]] const Kind& kind_of(const DimensionExponents& dimension, Meaning meaning);

}  // namespace ionledger
