// Axes, ticks, lines and letters.
#include "report/plot.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "report/number_text.hpp"

namespace ionledger {
namespace {

constexpr double most_steps = 6;  // between the first tick and the last

/// The smallest of 1, 2, 5 times a power of ten that divides `range` into at most six.
double tick_step(double range) {
  const double least = range / most_steps;
  const double power = std::pow(10.0, std::floor(std::log10(least)));
  for (const double factor : {1.0, 2.0, 5.0}) {
    // A little less, so that rounding does not skip a step that fits exactly.
    if (factor * power >= least * (1 - 1e-9)) return factor * power;
  }
  return 10 * power;
}

}  // namespace

PlotAxis axis_around(double low, double high) {
  constexpr double narrowest = 1e-6;
  if (!(high - low > narrowest)) {
    low -= 0.5;
    high += 0.5;
  }
  double step = tick_step(high - low);
  while (true) {
    const PlotAxis axis = {step * std::floor(low / step + 1e-9),
                           step * std::ceil(high / step - 1e-9)};
    // Rounded outwards, the axis may ask for wider steps than the values did.
    const double wider = tick_step(axis.high - axis.low);
    if (wider <= step * (1 + 1e-9)) return axis;
    step = wider;
  }
}

PlotTicks ticks_of(const PlotAxis& axis) {
  const double step = tick_step(axis.high - axis.low);
  PlotTicks ticks;
  ticks.decimals = std::max(0, static_cast<int>(-std::floor(std::log10(step) + 1e-9)));
  for (double k = std::ceil(axis.low / step - 1e-9); k * step <= axis.high + 1e-9 * step; ++k) {
    ticks.values.push_back(k * step);
  }
  return ticks;
}

std::string in_percent(double percent) { return fmt::format("{:.2f}%", percent); }

void open_plot(HtmlWriter& html,
               const std::string& name,
               const Attributes& attributes,
               const std::string& title,
               const std::string& description) {
  Attributes all = {{"role", "img"}, {"aria-labelledby", name + "-t " + name + "-d"}};
  all.insert(all.end(), attributes.begin(), attributes.end());
  html.open("svg", all);
  html.leaf("title", {{"id", name + "-t"}}, title);
  html.leaf("desc", {{"id", name + "-d"}}, description);
}

void plot_line(HtmlWriter& html, std::string_view style, const PlotLine& line) {
  html.empty("line",
             {{"class", std::string(style)},
              {"x1", in_percent(line.x1)},
              {"y1", in_percent(line.y1)},
              {"x2", in_percent(line.x2)},
              {"y2", in_percent(line.y2)}});
}

void plot_text(HtmlWriter& html,
               std::string_view style,
               const PlotText& place,
               std::string_view text) {
  html.leaf("text",
            {{"class", std::string(style)},
             {"x", in_percent(place.x)},
             {"y", in_percent(place.y)},
             {"dx", fmt::format("{:g}", place.dx_px)},
             {"dy", fmt::format("{:g}em", place.dy_em)}},
            text);
}

void plot_mark(
    HtmlWriter& html, std::string_view style, double x, double y, std::string_view path) {
  const Element place(html,
                      "svg",
                      {{"x", in_percent(x)},
                       {"y", in_percent(y)},
                       {"width", "1"},
                       {"height", "1"},
                       {"class", "at"}});
  html.empty("path", {{"class", std::string(style)}, {"d", std::string(path)}});
}

void plot_horizontal_axis(HtmlWriter& html,
                          const PlotAxis& axis,
                          bool is_signed,
                          std::string_view name) {
  const PlotTicks ticks = ticks_of(axis);
  const Element group(html, "g", {{"class", "axis"}});
  for (const double value : ticks.values) {
    const double x = axis.percent(value);
    const bool is_zero = std::abs(value) < 1e-9;
    plot_line(html, is_zero ? "zero" : "grid", {x, 0, x, 100});
    const std::string label = is_signed && !is_zero
                                  ? signed_text(value, ticks.decimals)
                                  : fixed_text(value, is_zero ? 0 : ticks.decimals);
    plot_text(html, "mid", {x, 100, 0, 1.3}, label);
  }
  plot_text(html, "end quiet", {100, 100, 0, 2.6}, name);
}

}  // namespace ionledger
