// The verdict on a state, one line for each question. Separate because terminal and pages must say
// the same.
#pragma once

#include <string>

#include "ionledger/assessment.hpp"
#include "report/text_page.hpp"

namespace ionledger {

struct Verdict {
  std::string text;
  Ink ink = Ink::plain;
};

[[nodiscard]] Verdict verdict_on_analysis(const AssessedState& state);
[[nodiscard]] Verdict verdict_on_scale(const AssessedState& state);
[[nodiscard]] Verdict verdict_on_care(const AssessedState& state);

}  // namespace ionledger
