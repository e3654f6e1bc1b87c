// Which unknown gives way so that the charges of a stream balance, and what that makes of its
// totals.
#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <functional>
#include <limits>

#include "equilibrium/system.hpp"
#include "ionledger/equilibrium.hpp"

namespace ionledger {
namespace {

constexpr int max_root_steps = 100;
constexpr double root_tolerance = 1e-14;  // relative to the scale of the residual
constexpr double rounding = 1e-13;        // of the gross charge: no one has to close this
constexpr double worth_a_caution = 0.02;  // relative difference of two alkalinities
constexpr double test_share =
    0.01;  // of the ion sum, to show what an error of the analysis does to pH
constexpr double ph_shift_worth_telling = 0.1;

/// Root of an increasing function on [0, infinity): secant steps kept inside a shrinking bracket.
/// Returns NaN when the function is positive at 0 already, or stays negative however far it is
/// followed.
double increasing_root(const std::function<double(double)>& residual, double start, double scale) {
  double low = 0;
  double f_low = residual(0);
  if (!(f_low <= 0))
    return f_low <= root_tolerance * scale ? 0 : std::numeric_limits<double>::quiet_NaN();
  double high = std::max(start, 1e-12);
  double f_high = residual(high);
  for (int i = 0; i < max_root_steps && f_high < 0; ++i) {
    low = high;
    f_low = f_high;
    high *= 2;
    f_high = residual(high);
    if (high > 1e4) return std::numeric_limits<double>::quiet_NaN();
  }
  if (!(f_high >= 0)) return std::numeric_limits<double>::quiet_NaN();
  // Illinois variant of regula falsi: superlinear, never leaves the bracket.
  int side = 0;
  double x = high;
  for (int i = 0; i < max_root_steps; ++i) {
    x = (f_high * low - f_low * high) / (f_high - f_low);
    if (!(x > low && x < high)) x = 0.5 * (low + high);
    const double f = residual(x);
    if (std::abs(f) <= root_tolerance * scale || high - low <= root_tolerance * high) break;
    if (f < 0) {
      low = x;
      f_low = f;
      if (side == -1) f_high /= 2;
      side = -1;
    } else {
      high = x;
      f_high = f;
      if (side == 1) f_low /= 2;
      side = 1;
    }
  }
  return x;
}

class StreamCloser {
 public:
  StreamCloser(const Stream& stream,
               const Chemistry& chemistry,
               const ActivityModel& model,
               Diagnostics& diagnostics)
      : stream_(stream),
        chemistry_(chemistry),
        model_(model),
        diagnostics_(diagnostics),
        ph_temperature_(stream.ph && stream.ph->temperature ? *stream.ph->temperature
                                                            : stream.temperature),
        at_ph_(chemistry, model, ph_temperature_),
        totals_(stream.totals) {}

  std::optional<ClosedStream> close() {
    if (!is_determined()) return std::nullopt;
    const bool known = stream_.ph ? close_with_ph() : close_without_ph();
    if (contradiction_) return std::nullopt;
    if (!known) return std::move(result_);
    result_.totals = totals_;
    solve_at_stream_temperature();
    return std::move(result_);
  }

 private:
  void error(const SourceSpan& where,
             std::string summary,
             std::string found,
             std::string expected,
             std::string fix) {
    diagnostics_.error(
        where, std::move(summary), std::move(found), std::move(expected), std::move(fix));
    contradiction_ = true;
  }

  bool fail(SolveStatus status, std::string reason) {
    result_.status = status;
    result_.reason = std::move(reason);
    return false;
  }

  [[nodiscard]] bool knows_carbon() const { return stream_.inorganic_carbon_is_known; }
  [[nodiscard]] bool knows_alkalinity() const { return stream_.alkalinity_eq_per_kg.has_value(); }

  /// As many equations as unknowns, or a diagnostic.
  bool is_determined() {
    if (!stream_.ph && knows_alkalinity() && !knows_carbon()) {
      error(stream_.alkalinity_span,
            "alkalinity without pH leaves the stream undetermined",
            "alkalinity, but neither pH nor inorganic_carbon",
            "alkalinity with pH, or alkalinity with inorganic_carbon",
            "add stream.pH, as measured, with its temperature: pH = \"7.62 at 25 degC\"");
    }
    if (stream_.ph && stream_.closed_by == Closure::By::ph) {
      error(stream_.closure_span,
            "pH cannot be measured and also close the charge balance",
            fmt::format("closed_by = \"pH\" beside pH = {}", stream_.ph->value),
            "either a measured pH or closed_by = \"pH\"",
            "leave out stream.pH to compute it, or close by an ion such as \"sodium\"");
    }
    if (!stream_.ph && stream_.closed_by == Closure::By::constituent &&
        !(knows_alkalinity() && knows_carbon())) {
      error(stream_.closure_span,
            "the charge balance cannot give both pH and a constituent",
            fmt::format("closed_by = \"{}\" without pH", closing_name()),
            "a measured pH, or alkalinity together with inorganic_carbon",
            "add stream.pH, or leave out closed_by and the charge balance gives pH");
    }
    if (!stream_.ph && stream_.closed_by == Closure::By::ph && knows_alkalinity()) {
      error(stream_.closure_span,
            "alkalinity and inorganic carbon fix the pH, so it cannot close the charge balance",
            "closed_by = \"pH\" beside alkalinity and inorganic_carbon",
            "an ion such as \"sodium\", or \"nothing\"",
            "close by an ion, or leave out one of alkalinity and inorganic_carbon");
    }
    if (knows_alkalinity() && stream_.closing_component == stream_.carbon_component &&
        stream_.closing_component >= 0) {
      error(stream_.closure_span,
            "alkalinity fixes the inorganic carbon, so it cannot close the charge balance",
            fmt::format("closed_by = \"{}\" beside alkalinity", closing_name()),
            "another ion, such as \"sodium\" or \"chloride\"",
            "close by another ion, or leave out the alkalinity");
    }
    return !contradiction_;
  }

  /// Sum of |z| T over what was reported: what a charge is small against.
  [[nodiscard]] double gross_charge() const {
    double gross = 0;
    for (std::size_t i = 1; i < totals_.size(); ++i) {
      gross += std::abs(chemistry_.species[i].charge_number) * totals_[i];
    }
    return gross;
  }

  [[nodiscard]] std::string closing_name() const {
    if (stream_.closing_component < 0) return "";
    const std::string& species =
        chemistry_.species[static_cast<std::size_t>(stream_.closing_component)].name;
    for (const Constituent& constituent : chemistry_.constituents) {
      if (constituent.basis_species == species) return constituent.name;
    }
    return species;
  }

  bool close_without_ph() {
    if (knows_alkalinity() && knows_carbon()) {
      totals_[0] = 0;
      totals_[0] = alkalinity(chemistry_, totals_) - *stream_.alkalinity_eq_per_kg;
      result_.ph_from = ClosedStream::PHFrom::alkalinity_and_carbon;
      result_.imbalance_eq_per_kg = net_charge(chemistry_, totals_);
      return stream_.closed_by != Closure::By::constituent || close_by_shift();
    }
    totals_[0] = 0;
    totals_[0] = -net_charge(chemistry_, totals_);
    result_.ph_from = ClosedStream::PHFrom::charge_balance;
    result_.imbalance_eq_per_kg = 0;
    return true;
  }

  /// With every total known, a change d of one of them changes the charge by z d, and, where it
  /// takes part in alkalinity, the hydrogen total by reference_protons d.
  bool close_by_shift() {
    const auto component = static_cast<std::size_t>(stream_.closing_component);
    const double slope =
        chemistry_.species[component].charge_number + chemistry_.reference_protons[component];
    if (slope == 0) return refuse_closure(std::numeric_limits<double>::quiet_NaN());
    const double change = -result_.imbalance_eq_per_kg / slope;
    const double closed = totals_[component] + change;
    if (closed < -rounding * gross_charge()) return refuse_closure(closed);
    totals_[component] = std::max(closed, 0.0);
    totals_[0] += chemistry_.reference_protons[component] * change;
    book_closure(change);
    return true;
  }

  void book_closure(double change) {
    result_.closed_by = closing_name();
    result_.closing_change_mol_per_kg = change;
  }

  bool refuse_closure(double closed) {
    const double imbalance = 1000 * result_.imbalance_eq_per_kg;
    const std::string ions = imbalance > 0 ? "cations" : "anions";
    return fail(
        SolveStatus::infeasible,
        std::isnan(closed)
            ? fmt::format(
                  "no amount of {} closes the charge balance: {} are {:.4g} meq/kg in excess",
                  closing_name(),
                  ions,
                  std::abs(imbalance))
            : fmt::format("{} would have to be {:.4g} mmol/kg to close the charge balance: {} are "
                          "{:.4g} meq/kg in excess; close by an ion of the other sign, or add what "
                          "is missing",
                          closing_name(),
                          1000 * closed,
                          ions,
                          std::abs(imbalance)));
  }

  bool close_with_ph() {
    result_.ph_from = ClosedStream::PHFrom::measured;
    if (knows_alkalinity() && knows_carbon() && !agrees_with_carbon()) return false;
    if (!settle_carbon()) return false;
    Solution solution = impose_ph();
    if (solution.status != SolveStatus::converged) return fail(solution.status, solution.reason);
    totals_[0] = solution.totals[0];
    result_.imbalance_eq_per_kg = net_charge(chemistry_, totals_);
    if (stream_.closed_by == Closure::By::constituent) {
      if (!close_by_search()) return false;
      solution = impose_ph();
      totals_[0] = solution.totals[0];
    }
    if (in_kelvin(ph_temperature_) != in_kelvin(stream_.temperature)) {
      result_.at_ph_temperature = std::move(solution);
    }
    return true;
  }

  Solution impose_ph() {
    Problem problem;
    problem.temperature = ph_temperature_;
    problem.totals = totals_;
    problem.ph = stream_.ph->value;
    return at_ph_.solve(problem);
  }

  /// Alkalinity that the totals have at the measured pH, eq per kg; NaN when there is no solution.
  double alkalinity_at_ph() {
    const Solution solution = impose_ph();
    if (solution.status != SolveStatus::converged) return std::numeric_limits<double>::quiet_NaN();
    return alkalinity(chemistry_, solution.totals);
  }

  bool agrees_with_carbon() {
    const double reported = *stream_.alkalinity_eq_per_kg;
    const double computed = alkalinity_at_ph();
    const double difference =
        std::abs(computed - reported) / std::max({std::abs(computed), std::abs(reported), 1e-12});
    const std::string numbers = fmt::format(
        "pH {:.2f} and inorganic carbon {:.4g} mmol/kg make an alkalinity of {:.4g} meq/kg; "
        "reported is {:.4g}",
        stream_.ph->value,
        1000 * totals_[carbon()],
        1000 * computed,
        1000 * reported);
    if (!(difference <= consistency_tolerance)) {
      error(stream_.alkalinity_span,
            "pH, alkalinity and inorganic carbon contradict each other",
            numbers,
            fmt::format("agreement within {:g} % of the alkalinity", 100 * consistency_tolerance),
            "leave out the one you trust least");
      return false;
    }
    if (difference > worth_a_caution) {
      result_.cautions.push_back({"alkalinity", numbers + ". pH and alkalinity were used."});
    }
    return true;
  }

  [[nodiscard]] std::size_t carbon() const {
    return static_cast<std::size_t>(stream_.carbon_component);
  }

  /// With pH imposed, the carbonate total that has the reported alkalinity.
  bool settle_carbon() {
    if (!knows_alkalinity()) return true;
    const double reported = *stream_.alkalinity_eq_per_kg;
    double base = 0;
    const double root = increasing_root(
        [&](double carbon_total) {
          totals_[carbon()] = carbon_total;
          const double computed = alkalinity_at_ph();
          if (carbon_total == 0) base = computed;
          return computed - reported;
        },
        reported,
        reported);
    totals_[carbon()] = root;
    if (!std::isnan(root)) return true;
    error(stream_.alkalinity_span,
          "alkalinity and pH contradict each other",
          fmt::format(
              "an alkalinity of {:.4g} meq/kg at pH {:.2f}, where the other constituents and water "
              "alone have {:.4g}",
              1000 * reported,
              stream_.ph->value,
              1000 * base),
          "an alkalinity that leaves room for carbonate",
          "check the unit of the alkalinity and the pH");
    return false;
  }

  /// With pH imposed, the total of the closing constituent at which the charges balance.
  bool close_by_search() {
    const auto component = static_cast<std::size_t>(stream_.closing_component);
    const double sign = chemistry_.species[component].charge_number > 0 ? 1 : -1;
    const double before = totals_[component];
    const double scale = gross_charge();
    if (std::abs(result_.imbalance_eq_per_kg) <= rounding * scale) return true;
    const double root = increasing_root(
        [&](double total) {
          totals_[component] = total;
          if (component != carbon() && !settle_carbon())
            return std::numeric_limits<double>::quiet_NaN();
          const Solution solution = impose_ph();
          if (solution.status != SolveStatus::converged) {
            return std::numeric_limits<double>::quiet_NaN();
          }
          return sign * net_charge(chemistry_, solution.totals);
        },
        before - sign * result_.imbalance_eq_per_kg,
        scale);
    totals_[component] = std::isnan(root) ? before : root;
    if (contradiction_) return false;
    if (std::isnan(root)) {
      const double z = chemistry_.species[component].charge_number;
      return refuse_closure(before - result_.imbalance_eq_per_kg / z);
    }
    book_closure(root - before);
    return true;
  }

  void solve_at_stream_temperature() {
    Problem problem;
    problem.temperature = stream_.temperature;
    problem.totals = totals_;
    const EquilibriumSystem system(chemistry_, model_, stream_.temperature);
    result_.solution = system.solve(problem);
    result_.status = result_.solution.status;
    result_.reason = result_.solution.reason;
    if (result_.status == SolveStatus::converged &&
        result_.ph_from == ClosedStream::PHFrom::charge_balance) {
      tell_what_an_error_does(system, problem);
    }
  }

  /// A pH from charge balance carries every error of the analysis; show how much one per cent is.
  void tell_what_an_error_does(const EquilibriumSystem& system, const Problem& problem) {
    const double gross = gross_charge();
    double shift = 0;
    for (const double sign : {-1.0, 1.0}) {
      Problem shifted = problem;
      shifted.totals[0] += sign * test_share * gross / 2;
      const Solution solution = system.solve(shifted);
      if (solution.status != SolveStatus::converged) return;
      shift = std::max(shift, std::abs(solution.ph() - result_.solution.ph()));
    }
    if (shift < ph_shift_worth_telling) return;
    result_.cautions.push_back(
        {"pH",
         fmt::format(
             "Computed from the charge balance, so every error of the analysis is in it: an error "
             "of 1 % of cations or anions moves it by up to {:.1f}. Measure it if you can.",
             shift)});
  }

  const Stream& stream_;
  const Chemistry& chemistry_;
  const ActivityModel& model_;
  Diagnostics& diagnostics_;
  Temperature ph_temperature_;
  EquilibriumSystem at_ph_;
  std::vector<double> totals_;
  ClosedStream result_;
  bool contradiction_ = false;
};

}  // namespace

std::optional<ClosedStream> close_stream(const Stream& stream,
                                         const Chemistry& chemistry,
                                         const ActivityModel& model,
                                         Diagnostics& diagnostics) {
  return StreamCloser(stream, chemistry, model, diagnostics).close();
}

}  // namespace ionledger
