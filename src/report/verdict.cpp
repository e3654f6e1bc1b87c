// Judging a state in three lines.
#include "report/verdict.hpp"

#include <set>
#include <vector>

#include "report/number_text.hpp"
#include "report/text_sections.hpp"

namespace ionledger {
namespace {

std::string with_index(const MineralLine& mineral) {
  return mineral.mineral + " (" + signed_text(mineral.saturation_index, 2) + ")";
}

}  // namespace

Verdict verdict_on_analysis(const AssessedState& state) {
  if (balance_was_spent_on_ph(state)) {
    return {"not tested: the charge balance was used to find the pH", Ink::watch};
  }
  const std::string gap = signed_text(state.reported_imbalance_percent, 2) + " %, accepted ±" +
                          fixed_text(state.accepted_imbalance_percent, 2) + " %";
  if (is_accepted(state.reported_imbalance_percent, state.accepted_imbalance_percent)) {
    return {"balances: " + gap, Ink::plain};
  }
  return {"does not balance: " + gap + "; find out why first", Ink::alarm};
}

Verdict verdict_on_scale(const AssessedState& state) {
  std::vector<MineralLine> forming, near;
  const MineralLine* nearest = nullptr;
  for (const MineralLine& mineral : state.minerals) {
    if (!mineral.is_common_scale) continue;
    const Saturation saturation = saturation_of(mineral);
    if (saturation == Saturation::would_form) forming.push_back(mineral);
    if (saturation == Saturation::near) near.push_back(mineral);
    if (nearest == nullptr && saturation == Saturation::dissolves) nearest = &mineral;
  }
  if (!forming.empty()) {
    std::string text = with_index(forming[0]) + " would form";
    if (forming.size() > 1) text += ", then " + with_index(forming[1]);
    if (forming.size() > 2) text += " and " + std::to_string(forming.size() - 2) + " more";
    return {text, Ink::alarm};
  }
  if (!near.empty())
    return {with_index(near[0]) + " is near saturation; nothing is past it", Ink::watch};
  if (nearest != nullptr) return {"nothing would form; the nearest is " + with_index(*nearest)};
  return {"no common scale can form from what was reported"};
}

Verdict verdict_on_care(const AssessedState& state) {
  if (state.cautions.empty()) return {"the calculation raised no caution"};
  std::string subjects;
  std::set<std::string> named;
  for (const Caution& caution : state.cautions) {
    if (named.insert(caution.about).second) {
      subjects += (subjects.empty() ? "" : ", ") + caution.about;
    }
  }
  return {counted(state.cautions.size(), "caution", "cautions") + " below: " + subjects,
          Ink::watch};
}

}  // namespace ionledger
