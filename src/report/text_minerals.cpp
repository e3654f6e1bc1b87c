// Minerals ranked, species and gases that matter.
#include <algorithm>
#include <cmath>
#include <cstddef>

#include "report/number_text.hpp"
#include "report/text_sections.hpp"
#include "report/text_table.hpp"

namespace ionledger {
namespace {

/// Half of the bar, in columns, and what one column is worth.
constexpr int bar_columns = 8;
constexpr double index_per_column = 0.5;
/// Common scales are shown down to this index, and never fewer than `fewest_minerals`.
constexpr double lowest_index_shown = -1.0;
constexpr std::size_t fewest_minerals = 3;
/// Species are shown down to this share of the most abundant one.
constexpr double smallest_share = 1e-3;
/// Gases are shown down to a tenth of a millionth of an atmosphere: some are hazards from there on.
constexpr double lowest_pressure_bar = 1e-7;

/// A bar from the middle to the right above saturation, to the left below it; an arrow where the
/// index lies beyond the end.
std::string bar_of(double index) {
  const double length = std::abs(index) / index_per_column;
  if (!std::isfinite(length)) return repeated(" ", bar_columns) + "│" + repeated(" ", bar_columns);
  const bool is_beyond = length > bar_columns;
  const int halves = is_beyond ? 2 * bar_columns - 2 : static_cast<int>(std::lround(2 * length));
  const int full = halves / 2;
  const bool has_half = halves % 2 == 1;
  const int used = full + (has_half || is_beyond ? 1 : 0);
  const std::string rest = repeated(" ", bar_columns - used);
  const std::string solid = repeated("█", full);
  if (index > 0) {
    const std::string end = is_beyond ? "►" : has_half ? "▌" : "";
    return repeated(" ", bar_columns) + "│" + solid + end + rest;
  }
  const std::string end = is_beyond ? "◄" : has_half ? "▐" : "";
  return rest + end + solid + "│" + repeated(" ", bar_columns);
}

std::string words_for(Saturation saturation, bool is_common_scale) {
  switch (saturation) {
    case Saturation::would_form:
      return is_common_scale ? "would form" : "past saturation";
    case Saturation::near:
      return "near saturation";
    case Saturation::dissolves:
      return "dissolves";
    case Saturation::unknown:
      return "not known";
  }
  return "";
}

Ink ink_for(Saturation saturation, bool is_common_scale) {
  switch (saturation) {
    case Saturation::would_form:
      return is_common_scale ? Ink::alarm : Ink::plain;
    case Saturation::near:
      return Ink::watch;
    case Saturation::dissolves:
    case Saturation::unknown:
      return Ink::plain;
  }
  return Ink::plain;
}

void add_mineral(TextTable& table, const MineralLine& mineral) {
  const Saturation saturation = saturation_of(mineral);
  const Ink ink = ink_for(saturation, mineral.is_common_scale);
  table.row({{mineral.mineral, Ink::strong},
             {signed_text(mineral.saturation_index, 2), ink},
             {"±" + fixed_text(half_width_95 * mineral.uncertainty, 2), Ink::quiet},
             {bar_of(mineral.saturation_index), ink},
             {words_for(saturation, mineral.is_common_scale), ink}});
  if (mineral.deposit_mol_per_kg > 0) {
    table.note("Deposited: " + significant_text(mineral.deposit_mol_per_kg * 1e3) + " mmol/kg.");
  }
  if (mineral.saturation_index > 0 && !mineral.remark.empty()) table.note(mineral.remark);
}

TextTable mineral_table() {
  return TextTable({{"mineral", Align::left, true},
                    {"index", Align::right},
                    {"95 %", Align::right},
                    {"under   │    over"},
                    {""}});
}

void print_left_out(TextPage& page, std::size_t count, const std::string& what) {
  if (count > 0) page.paragraph(what + " Add --all to see everything.", 2, Ink::quiet);
}

}  // namespace

std::vector<MineralLine> minerals_shown(const AssessedState& state, bool common, bool all) {
  std::vector<MineralLine> shown;
  for (const MineralLine& mineral : state.minerals) {
    if (mineral.is_common_scale != common) continue;
    const bool matters =
        common ? mineral.saturation_index >= lowest_index_shown || shown.size() < fewest_minerals
               : mineral.saturation_index > 0;
    if (all || matters) shown.push_back(mineral);
  }
  return shown;
}

std::vector<SpeciesLine> species_shown(const AssessedState& state, bool all) {
  double most = 0;
  for (const SpeciesLine& line : state.species) most = std::max(most, line.molality);
  std::vector<SpeciesLine> shown;
  for (const SpeciesLine& line : state.species) {
    if (all || line.molality >= smallest_share * most) shown.push_back(line);
  }
  return shown;
}

std::vector<GasLine> gases_shown(const AssessedState& state, bool all) {
  std::vector<GasLine> shown;
  for (const GasLine& gas : state.gases) {
    if (all || gas.partial_pressure_bar >= lowest_pressure_bar) shown.push_back(gas);
  }
  return shown;
}

Saturation saturation_of(const MineralLine& mineral) {
  const double index = mineral.saturation_index;
  if (std::isnan(index)) return Saturation::unknown;
  const double undecided = std::max(narrowest_near_saturation, half_width_95 * mineral.uncertainty);
  if (std::abs(index) <= undecided) return Saturation::near;
  return index > 0 ? Saturation::would_form : Saturation::dissolves;
}

void print_minerals(TextPage& page, const AssessedState& state) {
  page.heading("Minerals", "saturation index, log10(Q/K); ± from the constant alone");
  const auto common = minerals_shown(state, true, page.shows_all());
  const auto uncommon = minerals_shown(state, false, page.shows_all());
  if (state.minerals.empty()) {
    page.paragraph("No mineral can form from what was reported.");
    return;
  }
  TextTable table = mineral_table();
  for (const MineralLine& mineral : common) add_mineral(table, mineral);
  table.print(page);
  if (!uncommon.empty()) {
    if (!common.empty()) page.blank();
    page.paragraph("These rarely form by themselves in a plant:");
    TextTable rare = mineral_table();
    for (const MineralLine& mineral : uncommon) add_mineral(rare, mineral);
    rare.print(page);
  }
  const std::size_t left_out = state.minerals.size() - common.size() - uncommon.size();
  print_left_out(page,
                 left_out,
                 "Left out: " + counted(left_out, "mineral", "minerals") +
                     " further below saturation or slow to form.");
}

void print_species(TextPage& page, const AssessedState& state) {
  if (state.species.empty()) return;
  page.heading("Species", "molality and activity in mol/kg of water; γ has no unit");
  const auto shown = species_shown(state, page.shows_all());
  TextTable table({{"species", Align::left, true},
                   {"charge", Align::right},
                   {"molality", Align::right},
                   {"γ", Align::right},
                   {"activity", Align::right}});
  for (const SpeciesLine& line : shown) {
    table.row({{line.species},
               {line.charge == 0 ? "0" : signed_text(line.charge, 0)},
               {scientific_text(line.molality)},
               {fixed_text(line.activity_coefficient, 3)},
               {scientific_text(line.activity)}});
  }
  table.print(page);
  const std::size_t left_out = state.species.size() - shown.size();
  print_left_out(page,
                 left_out,
                 "Left out: " + counted(left_out, "species", "species") +
                     ", each below 0.1 % of the most abundant.");
}

void print_gases(TextPage& page, const AssessedState& state) {
  if (state.gases.empty()) return;
  TextTable table({{"gas", Align::left, true}, {"formula"}, {"bar", Align::right}});
  for (const GasLine& gas : gases_shown(state, page.shows_all())) {
    table.row({{gas.gas}, {gas.formula}, {scientific_text(gas.partial_pressure_bar)}});
  }
  page.heading("Gases", "partial pressure in balance with the water");
  table.print(page);
  const std::size_t left_out = state.gases.size() - gases_shown(state, page.shows_all()).size();
  print_left_out(
      page, left_out, "Left out: " + counted(left_out, "gas", "gases") + " below 10⁻⁷ bar.");
}

}  // namespace ionledger
