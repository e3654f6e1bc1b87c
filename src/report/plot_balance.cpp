// The ion balance as a picture: two bars of equal scale, and the gap on a scale of its own, because
// a gap that passes is thinner than a line.
#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "report/account.hpp"
#include "report/number_text.hpp"
#include "report/plot.hpp"
#include "report/text_sections.hpp"

namespace ionledger {
namespace {

constexpr double bar_tall = 31;          // per cent of the picture
constexpr double narrowest_label = 9.5;  // per cent: holds "SO₄²⁻" and five digits on a phone

std::string unit_text(const Account& account) { return account.unit.prefix + "eq/kg"; }

std::string side_text(const AccountSide& side, const Account& account) {
  std::string text;
  for (const AccountSide::Entry& entry : side.entries) {
    text += (text.empty() ? "" : ", ") + typeset_formula(entry.name) + " " +
            account.unit.text(entry.steps);
  }
  return text;
}

struct Bar {
  std::string name, style;
  double top;  ///< Per cent.
};

void box(HtmlWriter& html, const std::string& style, double x, double width, double top) {
  html.empty("rect",
             {{"class", style},
              {"x", in_percent(x)},
              {"width", in_percent(width)},
              {"y", in_percent(top)},
              {"height", in_percent(bar_tall)}});
}

void draw(HtmlWriter& html, const AccountSide& side, const Account& account, const Bar& bar) {
  const double longest = double(std::max({account.cations.sum, account.anions.sum, 1LL}));
  plot_text(html,
            "total",
            {0, bar.top, 0, -0.5},
            bar.name + " " + account.unit.text(side.sum) + " " + unit_text(account));
  double x = 0;
  for (const AccountSide::Entry& entry : side.entries) {
    const double width = 100 * double(entry.steps) / longest;
    box(html, "segment " + bar.style, x, width, bar.top);
    if (bar.style == "anion") box(html, "hatch", x, width, bar.top);
    const double middle = bar.top + bar_tall / 2;
    if (width >= narrowest_label) {
      plot_text(html, "mid ion", {x + width / 2, middle, 0, -0.25}, typeset_formula(entry.name));
      plot_text(html, "mid", {x + width / 2, middle, 0, 1.0}, account.unit.text(entry.steps));
    }
    x += width;
  }
  if (x < 100) box(html, "gap", x, 100 - x, bar.top);
}

/// What was too narrow to be lettered, in words below the picture.
void write_small(HtmlWriter& html, const Account& account) {
  const double longest = double(std::max({account.cations.sum, account.anions.sum, 1LL}));
  const auto small = [&](const AccountSide& side) {
    AccountSide rest;
    for (const AccountSide::Entry& entry : side.entries) {
      if (100 * double(entry.steps) / longest < narrowest_label) rest.entries.push_back(entry);
    }
    return side_text(rest, account);
  };
  const std::string cations = small(account.cations), anions = small(account.anions);
  if (cations.empty() && anions.empty()) return;
  html.leaf("p",
            {{"class", "note"}},
            "Segments too narrow to letter, in order, " + unit_text(account) + ": " +
                (cations.empty() ? "" : "cations " + cations + (anions.empty() ? "" : "; ")) +
                (anions.empty() ? "" : "anions " + anions) + ".");
}

/// The gap in per cent of both sums against the width that is accepted.
void draw_gap(HtmlWriter& html, const AssessedState& state) {
  const double gap = state.reported_imbalance_percent;
  const double accepted = state.accepted_imbalance_percent;
  const double reach = 1.15 * std::max({accepted, std::abs(gap), 1e-3});
  const PlotAxis axis = axis_around(-reach, reach);
  const bool is_good = is_accepted(gap, accepted);
  html.leaf("h3", {}, "The gap, on a scale of its own");
  open_plot(html,
            "gap",
            {{"class", "plot gapscale"}},
            "Gap between cations and anions against the accepted gap",
            "The gap is " + signed_text(gap, 2) + " % of both sums; accepted is ± " +
                fixed_text(accepted, 2) + " %.");
  html.empty("rect",
             {{"class", "accepted"},
              {"x", in_percent(axis.percent(-accepted))},
              {"width", in_percent(axis.percent(accepted) - axis.percent(-accepted))},
              {"y", "0%"},
              {"height", "100%"}});
  plot_horizontal_axis(html, axis, true, "cations − anions, % of both sums");
  for (const double edge : {-accepted, accepted}) {
    plot_line(html, "limit", {axis.percent(edge), 0, axis.percent(edge), 100});
  }
  plot_mark(html, is_good ? "good" : "bad", axis.percent(gap), 50, "M-6 0L0-9L6 0L0 9Z");
  // Outwards, clear of the line at zero; inwards where the picture ends.
  const bool is_right = (gap > 0) == (std::abs(gap) > axis.high / 2);
  plot_text(html,
            is_right ? "strong end" : "strong",
            {axis.percent(gap), 50, is_right ? -12.0 : 12.0},
            signed_text(gap, 2) + (is_good ? " %, accepted" : " %, not accepted"));
  html.close();
}

}  // namespace

void plot_balance(HtmlWriter& html, const AssessedState& state) {
  const Account account = account_of(state, false);
  open_plot(html,
            "balance",
            {{"class", "plot balance"}},
            "Cations against anions, charge times molality",
            "Cations " + account.unit.text(account.cations.sum) + " " + unit_text(account) + ": " +
                side_text(account.cations, account) + ". Anions " +
                account.unit.text(account.anions.sum) + " " + unit_text(account) + ": " +
                side_text(account.anions, account) + ". Cations minus anions " +
                account.gap_text() + ".");
  {
    const Element defs(html, "defs");
    const Element pattern(html,
                          "pattern",
                          {{"id", "hatching"},
                           {"width", "7"},
                           {"height", "7"},
                           {"patternUnits", "userSpaceOnUse"},
                           {"patternTransform", "rotate(45)"}});
    html.empty("line",
               {{"class", "hatchline"}, {"x1", "0"}, {"y1", "0"}, {"x2", "0"}, {"y2", "7"}});
  }
  draw(html, account.cations, account, {"Cations", "cation", 13});
  draw(html, account.anions, account, {"Anions", "anion", 66});
  html.close();
  write_small(html, account);
  if (!balance_was_spent_on_ph(state)) draw_gap(html, state);
}

}  // namespace ionledger
