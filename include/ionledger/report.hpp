// An assessment as text, JSON or a page. Pure builders: they compute nothing and print nothing.
#pragma once

#include <string>

#include "ionledger/assessment.hpp"
#include "ionledger/readers.hpp"

namespace ionledger {

/// How the terminal wants it.
struct TextStyle {
  bool colour = false;  ///< ANSI colours.
  int width = 80;       ///< Columns; never exceeded.
  bool all = false;     ///< Every species and mineral, not only what matters.
};

[[nodiscard]] std::string text_report(const Assessment& assessment, const TextStyle& style);
[[nodiscard]] std::string text_balance(const ReportBalance& balance,
                                       const std::string& title,
                                       const TextStyle& style);

/// The object "ionledger/assessment/1"; numbers with 17 significant digits, null where not
/// computed.
[[nodiscard]] std::string json_report(const Assessment& assessment);
/// The object "ionledger/balance/1", in the same manner.
[[nodiscard]] std::string json_balance(const ReportBalance& balance, const std::string& title);

/// One self-contained HTML file: no script, nothing fetched, for screen and paper.
[[nodiscard]] std::string html_report(const Assessment& assessment);

/// What is inside the models; `topic` empty for the overview, else a species, mineral, gas,
/// constituent, activity model or source key. Empty result: nothing of that name.
[[nodiscard]] std::string text_models(const Models& models,
                                      const std::string& topic,
                                      const TextStyle& style);

/// A commented starter plant file.
[[nodiscard]] std::string starter_plant_file();

}  // namespace ionledger
