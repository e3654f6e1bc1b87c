// What would form, ranked: a bar from saturation to the index, its whisker, and the state in a
// word.
#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "report/number_text.hpp"
#include "report/plot.hpp"
#include "report/text_sections.hpp"

namespace ionledger {
namespace {

/// Beyond this the axis ends, and an arrow stands for the rest: a rare mineral at +13 must not
/// press all others together.
constexpr double widest_index = 3;
constexpr double narrowest_axis = 1;

/// Class and word of a state; the word never leaves the mark alone.
struct Look {
  std::string style, word;
};

Look look_of(const MineralLine& mineral) {
  switch (saturation_of(mineral)) {
    case Saturation::would_form:
      return mineral.is_common_scale ? Look{"forms", "would form"} : Look{"slow", "slow to form"};
    case Saturation::near:
      return {"near", "near saturation"};
    case Saturation::dissolves:
      return {"under", "dissolves"};
    case Saturation::unknown:
      break;
  }
  return {"under", "not known"};
}

PlotAxis axis_of(const std::vector<MineralLine>& minerals) {
  double low = -narrowest_axis, high = narrowest_axis;
  for (const MineralLine& mineral : minerals) {
    if (!std::isfinite(mineral.saturation_index)) continue;
    low = std::min(low, mineral.saturation_index);
    high = std::max(high, mineral.saturation_index);
  }
  return axis_around(std::max(low, -widest_index), std::min(high, widest_index));
}

std::string value_of(const MineralLine& mineral) {
  return signed_text(mineral.saturation_index, 2) + " ± " +
         fixed_text(half_width_95 * mineral.uncertainty, 2);
}

std::string description_of(const std::vector<MineralLine>& minerals) {
  std::string text;
  for (const MineralLine& mineral : minerals) {
    text += (text.empty() ? "" : "; ") + mineral.mineral + " " + value_of(mineral) + ", " +
            look_of(mineral).word;
  }
  return text + ".";
}

void whisker(HtmlWriter& html, const MineralLine& mineral, const PlotAxis& axis, double y) {
  const double half = half_width_95 * mineral.uncertainty;
  const double ends[] = {mineral.saturation_index - half, mineral.saturation_index + half};
  plot_line(html,
            "whisker",
            {axis.percent(std::max(ends[0], axis.low)),
             y,
             axis.percent(std::min(ends[1], axis.high)),
             y});
  for (const double end : ends) {
    if (axis.holds(end)) plot_mark(html, "whisker", axis.percent(end), y, "M0-4.5V4.5");
  }
}

/// A dot, a ring with a core, a small ring, or at the end of the axis an arrow.
void marker(HtmlWriter& html, const std::string& style, const PlotAxis& axis, double si, double y) {
  if (!axis.holds(si)) {
    plot_mark(html,
              "arrow",
              axis.percent(si > 0 ? axis.high : axis.low),
              y,
              si > 0 ? "M0-5L9 0L0 5Z" : "M0-5L-9 0L0 5Z");
    return;
  }
  const auto circle = [&](std::string_view kind, double radius) {
    html.empty("circle",
               {{"class", std::string(kind)},
                {"cx", in_percent(axis.percent(si))},
                {"cy", in_percent(y)},
                {"r", fmt::format("{:g}", radius)}});
  };
  if (style == "forms" || style == "slow") {
    circle("dot", 4.5);
  } else {
    circle("ring", style == "near" ? 5 : 3.8);
    if (style == "near") circle("dot", 2);
  }
}

void row(
    HtmlWriter& html, const MineralLine& mineral, const PlotAxis& axis, double y, double tall) {
  const Look look = look_of(mineral);
  const Element group(html, "g", {{"class", "m-" + look.style}});
  if (std::isfinite(mineral.saturation_index)) {
    const double zero = axis.percent(0);
    const double end = axis.percent(std::clamp(mineral.saturation_index, axis.low, axis.high));
    html.empty("rect",
               {{"class", "bar"},
                {"x", in_percent(std::min(zero, end))},
                {"width", in_percent(std::abs(end - zero))},
                {"y", in_percent(y - 0.2 * tall)},
                {"height", in_percent(0.4 * tall)}});
    if (axis.holds(mineral.saturation_index)) whisker(html, mineral, axis, y);
    marker(html, look.style, axis, mineral.saturation_index, y);
  }
  plot_text(html, "name", {0, y}, mineral.mineral);
  plot_text(html, "value end", {100, y}, value_of(mineral));
  plot_text(html, "state", {100, y}, look.word);
}

}  // namespace

void plot_minerals(HtmlWriter& html,
                   const std::vector<MineralLine>& minerals,
                   const std::string& name) {
  const PlotAxis axis = axis_of(minerals);
  open_plot(html,
            name,
            {{"class", "plot minerals"}, {"style", "--rows:" + std::to_string(minerals.size())}},
            "Saturation indices, highest first, with 95 % intervals from the constants",
            description_of(minerals));
  plot_horizontal_axis(html, axis, true, "saturation index, log₁₀(Q/K), no unit");
  const double tall = 100.0 / double(minerals.size());
  for (std::size_t i = 0; i < minerals.size(); ++i) {
    row(html, minerals[i], axis, (double(i) + 0.5) * tall, tall);
  }
  html.close();
}

}  // namespace ionledger
