// The train: one chart over all states, then what each step did; and the cautions of every state.
#include <map>

#include "report/number_text.hpp"
#include "report/page_sections.hpp"
#include "report/plot.hpp"
#include "report/text_page.hpp"
#include "report/text_sections.hpp"
#include "report/verdict.hpp"

namespace ionledger {
namespace {

std::string optional_text(const std::optional<double>& value) {
  return value ? significant_text(*value) : no_number;
}

void write_overview(HtmlWriter& html, const std::vector<AssessedState>& train) {
  std::vector<std::vector<std::string>> rows;
  for (std::size_t i = 0; i < train.size(); ++i) {
    const AssessedState& state = train[i];
    const MineralLine* const first = state.minerals.empty() ? nullptr : &state.minerals.front();
    rows.push_back({std::to_string(i),
                    shown_words(state.name),
                    plain_text(state.temperature_degc),
                    fixed_text(state.ph, 2),
                    significant_text(state.ionic_strength),
                    optional_text(state.flow_m3_per_h),
                    first != nullptr && first->is_common_scale ? first->mineral : no_number,
                    first != nullptr && first->is_common_scale
                        ? signed_text(first->saturation_index, 2)
                        : no_number});
  }
  write_table(html,
              "",
              {{"No.", "", true},
               {"State", "", true},
               {"Temperature", "°C"},
               {"pH", "no unit"},
               {"Ionic strength", "mol/kg"},
               {"Flow", "m³/h"},
               {"Highest scale", "", true},
               {"Its index", "no unit"}},
              rows);
}

void write_moves(HtmlWriter& html, const AssessedState& state) {
  std::vector<std::vector<std::string>> rows;
  const auto add = [&](const std::string& verb, const std::vector<Portion>& portions) {
    for (const Portion& portion : portions) {
      rows.push_back({portion.what,
                      verb,
                      significant_text(portion.mg_per_l),
                      optional_text(portion.kg_per_h),
                      optional_text(portion.mm_per_month)});
    }
  };
  add("added", state.added);
  add("removed", state.removed);
  add(state.solids_stay ? "formed, stays suspended" : "deposited", state.deposited);
  if (rows.empty()) return;
  write_table(
      html,
      "What the step moved, per litre of the water before it. Growth is of a compact layer, "
      "if all of it sticks.",
      {{"Substance", "", true},
       {"What happened", "", true},
       {"Amount", "mg/L"},
       {"Rate", "kg/h"},
       {"Growth", "mm per month"}},
      rows);
}

void write_state(HtmlWriter& html, const std::vector<AssessedState>& states, std::size_t i) {
  const AssessedState& state = states[i];
  const Element article(html, "article", {{"class", "state"}});
  html.leaf("h3",
            {},
            shown_words(state.name) + (is_beside(states, i) ? ", beside the train" : "") + ": " +
                plain_text(state.temperature_degc) + " °C, pH " + fixed_text(state.ph, 2) +
                ", ionic strength " + significant_text(state.ionic_strength) + " mol/kg");
  const Verdict verdict = verdict_on_scale(state);
  html.leaf("p", {{"class", verdict.ink == Ink::alarm ? "alarm" : "watch"}}, verdict.text + ".");
  write_moves(html, state);
  const std::vector<MineralLine> shown = minerals_shown(state, true, false);
  if (shown.empty()) return;
  html.leaf("h4", {}, "Common scales in this state");
  plot_minerals(html, shown, "scales-" + std::to_string(i));
}

}  // namespace

bool is_beside(const std::vector<AssessedState>& states, std::size_t i) {
  for (std::size_t k = 0; k < i; ++k) {
    for (const char* side : {"_permeate", "_concentrate", "_membrane"}) {
      if (states[i].name == states[k].name + side) return true;
    }
  }
  return false;
}

void write_steps(HtmlWriter& html, int number, const std::vector<AssessedState>& states) {
  std::vector<AssessedState> train;
  for (std::size_t i = 0; i < states.size(); ++i) {
    if (!is_beside(states, i)) train.push_back(states[i]);
  }
  const AssessedState& last = train.back();
  const Section section(html,
                        number,
                        "steps-section",
                        "Step by step",
                        "From pH " + fixed_text(train.front().ph, 2) + " to pH " +
                            fixed_text(last.ph, 2) + " over " +
                            counted(train.size() - 1, "step", "steps") + ". At its end, " +
                            shown_words(last.name) + ": " + verdict_on_scale(last).text + ".");
  if (train.size() > 1) plot_steps(html, train);
  write_overview(html, train);
  for (std::size_t i = 1; i < states.size(); ++i) write_state(html, states, i);
}

void write_cautions(HtmlWriter& html, int number, const std::vector<AssessedState>& states) {
  const Section section(html, number, "cautions", "Cautions", "");
  const Element list(html, "ul");
  // One caution of several states is said once, with their names.
  std::vector<Caution> cautions;
  std::map<std::string, std::string> names;
  for (const AssessedState& state : states) {
    for (const Caution& caution : state.cautions) {
      std::string& where = names[caution.about + "\n" + caution.says];
      if (where.empty()) cautions.push_back(caution);
      where += (where.empty() ? "" : ", ") + shown_words(state.name);
    }
  }
  for (const Caution& caution : cautions) {
    const Element item(html, "li");
    const std::string& where = names[caution.about + "\n" + caution.says];
    html.leaf("b", {}, shown_words(caution.about) + (states.size() > 1 ? ": " + where : ""));
    html.text(caution.says);
  }
  const Element item(html, "li");
  html.leaf("b", {}, "This page advises; it does not authorise.");
  html.text("Local codes, permits and a licensed engineer's judgement come first.");
}

}  // namespace ionledger
