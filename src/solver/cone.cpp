// Revised simplex method in rational numbers; see cone.hpp.
#include "solver/cone.hpp"

namespace ionledger::solver {
namespace {

using Vector = std::vector<Rational>;

/// Variables: columns of the cone, the negatives of those of either sign, +t, -t, artificials.
struct Variable {
  std::vector<std::pair<int, Rational>> entries;
  int gain = 0;  ///< In the objective of the second phase.
  bool artificial = false;
};

class Simplex {
 public:
  Simplex(const std::vector<ConeColumn>& columns, const Vector& totals)
      : n_(totals.size()), level_(totals) {
    std::vector<std::pair<int, Rational>> sum;
    Vector dense(n_, Rational(0));
    for (const ConeColumn& column : columns) {
      variables_.push_back({column.entries});
      if (column.either_sign) {
        variables_.push_back({scaled(column.entries, -1)});
        continue;
      }
      for (const auto& [row, value] : column.entries) dense[row] += value;
    }
    for (std::size_t i = 0; i < n_; ++i) {
      if (dense[i] != 0) sum.emplace_back(static_cast<int>(i), dense[i]);
    }
    variables_.push_back({sum, 1});
    variables_.push_back({scaled(sum, -1), -1});
    inverse_.assign(n_, Vector(n_, Rational(0)));
    for (std::size_t i = 0; i < n_; ++i) {
      const int sign = level_[i] < 0 ? -1 : 1;
      variables_.push_back({{{static_cast<int>(i), Rational(sign)}}, 0, true});
      basic_.push_back(variables_.size() - 1);
      inverse_[i][i] = sign;
      level_[i] *= sign;
    }
  }

  ConeFinding run() {
    ConeFinding finding;
    second_phase_ = false;
    optimise();
    Rational left = 0;
    for (std::size_t r = 0; r < n_; ++r) {
      if (variables_[basic_[r]].artificial) left += level_[r];
    }
    if (left > 0) {
      // The totals are outside of the span of the columns: y . column = 0, y . totals < 0.
      finding.place = ConeFinding::Place::outside;
      finding.y = duals();
      return finding;
    }
    second_phase_ = true;
    drive_out_artificials();
    if (!optimise()) return finding;  // t without bound: the cone is the whole span
    Rational t = 0;
    for (std::size_t r = 0; r < n_; ++r) t += variables_[basic_[r]].gain * level_[r];
    if (t > 0) return finding;
    finding.place = t == 0 ? ConeFinding::Place::edge : ConeFinding::Place::outside;
    finding.y = duals();
    return finding;
  }

 private:
  static std::vector<std::pair<int, Rational>> scaled(std::vector<std::pair<int, Rational>> entries,
                                                      int factor) {
    for (auto& [row, value] : entries) value *= factor;
    return entries;
  }

  /// First phase: maximise -sum of artificials; second: maximise t.
  [[nodiscard]] int gain(const Variable& variable) const {
    if (second_phase_) return variable.gain;
    return variable.artificial ? -1 : 0;
  }

  [[nodiscard]] Vector duals() const {
    Vector y(n_, Rational(0));
    for (std::size_t r = 0; r < n_; ++r) {
      const int g = gain(variables_[basic_[r]]);
      if (g == 0) continue;
      for (std::size_t i = 0; i < n_; ++i) y[i] += g * inverse_[r][i];
    }
    return y;
  }

  [[nodiscard]] Vector in_basis(const Variable& variable) const {
    Vector result(n_, Rational(0));
    for (const auto& [row, value] : variable.entries) {
      for (std::size_t r = 0; r < n_; ++r) {
        if (inverse_[r][row] != 0) result[r] += inverse_[r][row] * value;
      }
    }
    return result;
  }

  void pivot(std::size_t leaving_row, std::size_t entering, const Vector& column) {
    const Rational step = level_[leaving_row] / column[leaving_row];
    for (Rational& value : inverse_[leaving_row]) {
      if (value != 0) value /= column[leaving_row];
    }
    for (std::size_t r = 0; r < n_; ++r) {
      if (r == leaving_row || column[r] == 0) continue;
      level_[r] -= column[r] * step;
      for (std::size_t i = 0; i < n_; ++i) {
        if (inverse_[leaving_row][i] != 0) {
          inverse_[r][i] -= column[r] * inverse_[leaving_row][i];
        }
      }
    }
    level_[leaving_row] = step;
    basic_[leaving_row] = entering;
  }

  /// An artificial left at zero leaves for any column that has a part in its row.
  void drive_out_artificials() {
    for (std::size_t r = 0; r < n_; ++r) {
      if (!variables_[basic_[r]].artificial) continue;
      for (std::size_t v = 0; v < variables_.size(); ++v) {
        if (variables_[v].artificial) continue;
        const Vector column = in_basis(variables_[v]);
        if (column[r] == 0) continue;
        pivot(r, v, column);
        break;
      }
    }
  }

  /// False when the objective has no bound.
  bool optimise() {
    while (true) {
      const Vector y = duals();
      std::size_t entering = variables_.size();
      for (std::size_t v = 0; v < variables_.size() && entering == variables_.size(); ++v) {
        if (variables_[v].artificial) continue;
        Rational price = gain(variables_[v]);
        for (const auto& [row, value] : variables_[v].entries) price -= y[row] * value;
        if (price > 0) entering = v;
      }
      if (entering == variables_.size()) return true;
      const Vector column = in_basis(variables_[entering]);
      std::size_t leaving = n_;
      Rational smallest = 0;
      for (std::size_t r = 0; r < n_; ++r) {
        if (column[r] <= 0) continue;
        const Rational ratio = level_[r] / column[r];
        if (leaving == n_ || ratio < smallest ||
            (ratio == smallest && basic_[r] < basic_[leaving])) {
          leaving = r;
          smallest = ratio;
        }
      }
      if (leaving == n_) return false;
      pivot(leaving, entering, column);
    }
  }

  std::size_t n_;
  std::vector<Variable> variables_;
  std::vector<std::size_t> basic_;  ///< Variable of every row.
  std::vector<Vector> inverse_;
  Vector level_;  ///< Value of the basic variables.
  bool second_phase_ = false;
};

}  // namespace

ConeFinding locate(const std::vector<ConeColumn>& columns, const std::vector<Rational>& totals) {
  return Simplex(columns, totals).run();
}

}  // namespace ionledger::solver
