// Every unit the program can read, as data; adding one means adding a row in unit_table.cpp.
#pragma once

#include <string>
#include <string_view>

#include "ionledger/units.hpp"

namespace ionledger {

/// SI value of x units: (x + zero) * factor, in coherent units (m, kg, s, A, K, mol, eq).
struct KnownUnit {
  const char* symbol = "";
  double factor = 1;
  DimensionExponents dimension{};
  double zero = 0;            ///< Of the scale, in the unit: 273.15 for degC.
  bool stands_alone = false;  ///< No products and powers: degrees of temperature and hardness, %.
  Meaning meaning = Meaning::plain;  ///< When the unit is alone.
};

/// The unit of that symbol, or nullptr. A final small l is a litre ("ml"); case matters otherwise.
[[nodiscard]] const KnownUnit* find_unit(std::string_view symbol);

/// How to mend a word that is no unit here.
struct UnitAdvice {
  std::string symbol;    ///< To be written instead; or empty,
  std::string sentence;  ///< and then this says what to do; or empty too.
};

/// Advice for words that are often met, else the nearest symbol, else nothing.
[[nodiscard]] UnitAdvice advice_on(std::string_view word);

}  // namespace ionledger
