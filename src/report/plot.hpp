// The plotting room: pictures as SVG, positions in per cent of the plot and lettering in the units
// of the page, so that one picture serves screen, phone and paper and no letter is ever stretched.
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "ionledger/assessment.hpp"
#include "report/html_writer.hpp"

namespace ionledger {

// ---- what every picture is made of --------------------------------------------------------------

/// A straight axis.
struct PlotAxis {
  double low = 0, high = 1;
  [[nodiscard]] double percent(double value) const { return 100 * (value - low) / (high - low); }
  [[nodiscard]] bool holds(double value) const { return value >= low && value <= high; }
};

/// An axis that holds the values and begins and ends at a tick.
[[nodiscard]] PlotAxis axis_around(double low, double high);

/// Where an axis is labelled: 4 to 7 places in steps of 1, 2 or 5 times a power of ten.
struct PlotTicks {
  std::vector<double> values;
  int decimals = 0;
};
[[nodiscard]] PlotTicks ticks_of(const PlotAxis& axis);

/// "12.50%"
[[nodiscard]] std::string in_percent(double percent);

/// Opens an SVG with a title that says what it is and a description that gives its numbers in
/// reading order; `name` makes their ids unique. The caller closes it.
void open_plot(HtmlWriter& html,
               const std::string& name,
               const Attributes& attributes,
               const std::string& title,
               const std::string& description);

struct PlotLine {
  double x1, y1, x2, y2;  ///< Per cent.
};
void plot_line(HtmlWriter& html, std::string_view style, const PlotLine& line);

/// Text at a place, moved by `dx` px and `dy` em.
struct PlotText {
  double x, y;  ///< Per cent.
  double dx_px = 0, dy_em = 0.35;
};
void plot_text(HtmlWriter& html,
               std::string_view style,
               const PlotText& place,
               std::string_view text);

/// A path in px around a place.
void plot_mark(HtmlWriter& html, std::string_view style, double x, double y, std::string_view path);

/// Grid lines and numbers of a horizontal axis under the plot, its name under the right end. The
/// line at zero is drawn darker.
void plot_horizontal_axis(HtmlWriter& html,
                          const PlotAxis& axis,
                          bool is_signed,
                          std::string_view name);

// ---- the pictures -------------------------------------------------------------------------------

/// Cations against anions in equivalents, every ion a segment, and the gap on a scale of its own
/// against what is accepted.
void plot_balance(HtmlWriter& html, const AssessedState& state);

/// Saturation indices of the minerals, as bars from saturation with 95 % whiskers.
/// `name` makes ids unique on the page.
void plot_minerals(HtmlWriter& html,
                   const std::vector<MineralLine>& minerals,
                   const std::string& name);

/// pH and the main saturation indices from state to state.
void plot_steps(HtmlWriter& html, const std::vector<AssessedState>& states);

}  // namespace ionledger
