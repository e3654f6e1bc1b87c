// Exactly what the laboratory reported: every value with its unit, basis, uncertainty and place in
// the file.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "ionledger/diagnostic.hpp"
#include "ionledger/units.hpp"

namespace ionledger {

/// One line of the report.
struct ReportedValue {
  std::string key;   ///< As written: "calcium" or "Ca".
  std::string text;  ///< As written: "96 mg/L".
  WrittenQuantity quantity;
  /// One standard uncertainty, relative ("3 %") or in the unit of the value ("2 mg/L" -> in SI).
  std::optional<double> relative_uncertainty;
  std::optional<double> si_uncertainty;
  SourceSpan key_span;
  SourceSpan value_span;
};

/// A measured pH and the temperature it was measured at.
struct MeasuredPH {
  double value = 0;                        ///< -log10 of the activity of H+.
  std::optional<Temperature> temperature;  ///< Where none is written, that of the stream.
  SourceSpan span;
};

/// Which quantity gives way so that the charges balance.
struct Closure {
  enum class By { nothing, ph, constituent };
  By by = By::nothing;
  std::string constituent;  ///< As written, when by == constituent.
  SourceSpan span;
};

/// A stream as reported, before any chemistry.
struct Analysis {
  std::string title;
  Temperature temperature = celsius(25.0);
  Pressure pressure = 101325.0 * Pressure::unit_type();
  std::optional<VolumeFlow> flow;
  std::optional<MeasuredPH> ph;
  std::optional<Conductivity> conductivity;  ///< Measured, at 25 degC as laboratories report it.
  std::optional<Density> density;  ///< Measured; else computed from the composition at 25 degC.
  std::vector<ReportedValue> values;
  Closure closure;
  SourceSpan stream_span;  ///< Where to point when something about the whole stream is wrong.
};

}  // namespace ionledger
