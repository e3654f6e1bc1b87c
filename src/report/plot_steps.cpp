// A train as a picture: pH and the main saturation indices from state to state, one panel for each,
// because two scales in one panel are read wrongly.
#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <map>

#include "report/number_text.hpp"
#include "report/plot.hpp"

namespace ionledger {
namespace {

constexpr std::size_t most_curves = 5;
constexpr double least_distance = 10;  // of two labels, per cent of a panel: one line on paper
constexpr double lowest_index_drawn = -3;

struct Curve {
  std::string name;
  std::vector<double> values;  ///< NaN where there is none.
};

/// Highest at any state first; curves that stay far below saturation are left out.
std::vector<Curve> index_curves(const std::vector<AssessedState>& states) {
  std::map<std::string, Curve> by_name;
  for (std::size_t i = 0; i < states.size(); ++i) {
    for (const MineralLine& mineral : states[i].minerals) {
      if (!mineral.is_common_scale || !std::isfinite(mineral.saturation_index)) continue;
      Curve& curve = by_name[mineral.mineral];
      curve.name = mineral.mineral;
      curve.values.resize(states.size(), std::nan(""));
      if (mineral.saturation_index >= lowest_index_drawn)
        curve.values[i] = mineral.saturation_index;
    }
  }
  const auto highest = [](const Curve& curve) {
    double most = lowest_index_drawn;
    for (const double value : curve.values) most = std::isnan(value) ? most : std::max(most, value);
    return most;
  };
  std::vector<Curve> curves;
  for (auto& [name, curve] : by_name) {
    if (highest(curve) > lowest_index_drawn) curves.push_back(std::move(curve));
  }
  std::stable_sort(curves.begin(), curves.end(), [&](const Curve& a, const Curve& b) {
    return highest(a) > highest(b);
  });
  curves.resize(std::min(curves.size(), most_curves));
  return curves;
}

PlotAxis axis_of(const std::vector<Curve>& curves, bool with_zero) {
  double low = with_zero ? 0 : 14, high = 0;
  for (const Curve& curve : curves) {
    for (const double value : curve.values) {
      if (std::isnan(value)) continue;
      low = std::min(low, value);
      high = std::max(high, value);
    }
  }
  return axis_around(low, high);
}

class Panel {
 public:
  Panel(HtmlWriter& html, const PlotAxis& axis, std::size_t states)
      : html_(html), axis_(axis), last_(double(std::max<std::size_t>(states - 1, 1))) {}

  void axes(std::string_view name, bool is_signed, bool numbers_the_states) const {
    const Element group(html_, "g", {{"class", "axis"}});
    const PlotTicks ticks = ticks_of(axis_);
    for (const double value : ticks.values) {
      const bool is_zero = is_signed && std::abs(value) < 1e-9;
      plot_line(html_, is_zero ? "zero" : "grid", {0, y(value), 100, y(value)});
      plot_text(html_,
                "end",
                {0, y(value), -8},
                is_zero     ? "0"
                : is_signed ? signed_text(value, ticks.decimals)
                            : fixed_text(value, ticks.decimals));
    }
    plot_text(html_, "yname", {0, 0, 0, -1.0}, name);
    if (!numbers_the_states) return;
    for (double i = 0; i <= last_; ++i) {
      plot_text(html_, "mid", {x(i), 100, 0, 1.5}, fixed_text(i, 0));
    }
    plot_text(html_, "end quiet", {100, 100, 0, 2.8}, "number of the state, as in the table");
  }

  void curve(const Curve& curve, const std::string& style) const {
    std::string points;
    {
      const Element stretch(html_,
                            "svg",
                            {{"width", "100%"},
                             {"height", "100%"},
                             {"viewBox", "0 0 100 100"},
                             {"preserveAspectRatio", "none"},
                             {"class", "at"}});
      for (std::size_t i = 0; i < curve.values.size(); ++i) {
        if (std::isnan(curve.values[i])) continue;
        points += fmt::format("{:.2f},{:.2f} ", x(double(i)), y(curve.values[i]));
      }
      html_.empty("polyline", {{"class", "curve " + style}, {"points", points}});
    }
    for (std::size_t i = 0; i < curve.values.size(); ++i) {
      if (std::isnan(curve.values[i])) continue;
      html_.empty("circle",
                  {{"class", "point " + style},
                   {"cx", in_percent(x(double(i)))},
                   {"cy", in_percent(y(curve.values[i]))},
                   {"r", "3.2"}});
    }
  }

  [[nodiscard]] double y(double value) const { return 100 - axis_.percent(value); }

 private:
  [[nodiscard]] double x(double state) const { return 2 + 96 * state / last_; }

  HtmlWriter& html_;
  PlotAxis axis_;
  double last_;
};

/// Where the names at the right end stand: at the end of their curve, pushed apart.
std::vector<double> label_places(const std::vector<Curve>& curves, const Panel& panel) {
  std::vector<std::pair<double, std::size_t>> wanted;
  for (std::size_t i = 0; i < curves.size(); ++i) {
    double last = 0;
    for (const double value : curves[i].values) last = std::isnan(value) ? last : value;
    wanted.emplace_back(panel.y(last), i);
  }
  std::sort(wanted.begin(), wanted.end());
  for (std::size_t k = 1; k < wanted.size(); ++k) {
    wanted[k].first = std::max(wanted[k].first, wanted[k - 1].first + least_distance);
  }
  // Pushed off the bottom: push back up.
  double lowest = 100;
  for (std::size_t k = wanted.size(); k-- > 0; lowest -= least_distance) {
    wanted[k].first = std::min(wanted[k].first, lowest);
  }
  std::vector<double> places(curves.size());
  for (const auto& [place, curve] : wanted) places[curve] = place;
  return places;
}

std::string description_of(const std::vector<Curve>& curves, bool is_signed) {
  std::string text;
  for (const Curve& curve : curves) {
    text += (text.empty() ? "" : "; ") + curve.name + ":";
    for (std::size_t i = 0; i < curve.values.size(); ++i) {
      text += (i == 0 ? " " : ", ") +
              (is_signed ? signed_text(curve.values[i], 2) : fixed_text(curve.values[i], 2));
    }
  }
  return text + ".";
}

}  // namespace

void plot_steps(HtmlWriter& html, const std::vector<AssessedState>& states) {
  Curve ph{"pH", {}};
  for (const AssessedState& state : states) ph.values.push_back(state.ph);
  const std::vector<Curve> indices = index_curves(states);
  const Panel above(html, axis_of({ph}, false), states.size());
  open_plot(html,
            "steps-ph",
            {{"class", "plot steps low"}},
            "pH from state to state",
            description_of({ph}, false));
  above.axes("pH, no unit", false, indices.empty());
  above.curve(ph, "c-ph");
  plot_text(html, "t-ph", {100, label_places({ph}, above)[0], 8}, "pH");
  html.close();
  if (indices.empty()) return;
  const Panel below(html, axis_of(indices, true), states.size());
  open_plot(html,
            "steps-si",
            {{"class", "plot steps"}},
            "Saturation indices of the main scales from state to state",
            description_of(indices, true));
  below.axes("saturation index, no unit", true, true);
  const std::vector<double> places = label_places(indices, below);
  for (std::size_t i = 0; i < indices.size(); ++i) {
    const std::string number = std::to_string(i + 1);
    below.curve(indices[i], "c-" + number);
    plot_text(html, "t-" + number, {100, places[i], 8}, indices[i].name);
  }
  html.close();
}

}  // namespace ionledger
