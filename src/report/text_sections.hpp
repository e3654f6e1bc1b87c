// The sections of the terminal report, each in a file of its own; text_report.cpp puts them in
// order.
#pragma once

#include <string>
#include <vector>

#include "ionledger/assessment.hpp"
#include "report/text_page.hpp"

namespace ionledger {

/// What a saturation index means in words. `near` when it does not tell which side of saturation
/// the water is on.
enum class Saturation { would_form, near, dissolves, unknown };

/// Half width around 0 in which a saturation index decides nothing, at least: a measured pH is
/// hardly known better than 0.1, and the index of a carbonate follows it one to one. The 95 %
/// interval from the constant replaces it where that is wider.
inline constexpr double narrowest_near_saturation = 0.10;
[[nodiscard]] Saturation saturation_of(const MineralLine& mineral);

/// Whether an imbalance in percent is within what the acceptance criterion allows.
[[nodiscard]] bool is_accepted(double imbalance_percent, double accepted_percent);

/// True when hydrogen took up the whole imbalance, so that the balance cannot test the analysis.
[[nodiscard]] bool balance_was_spent_on_ph(const AssessedState& state);

/// What matters, unless everything is asked for: minerals near saturation or past it, species above
/// a thousandth of the most abundant, gases that can be noticed. In the order of the state.
[[nodiscard]] std::vector<MineralLine> minerals_shown(const AssessedState& state,
                                                      bool common,
                                                      bool all);
[[nodiscard]] std::vector<SpeciesLine> species_shown(const AssessedState& state, bool all);
[[nodiscard]] std::vector<GasLine> gases_shown(const AssessedState& state, bool all);

/// What the step that led to this state added, removed and deposited; nothing for a water as
/// received.
void print_step(TextPage& page, const AssessedState& state);
/// One line a state: what a train does at a glance.
void print_train(TextPage& page, const std::vector<AssessedState>& states);
void print_ledger(TextPage& page, const AssessedState& state);
void print_minerals(TextPage& page, const AssessedState& state);
void print_species(TextPage& page, const AssessedState& state);
void print_gases(TextPage& page, const AssessedState& state);
void print_indices(TextPage& page, const AssessedState& state);

/// Cautions of an assessment or of a balance; `has_authority` adds the line about whose word
/// counts.
void print_cautions(TextPage& page, const std::vector<Caution>& cautions, bool has_authority);

}  // namespace ionledger
