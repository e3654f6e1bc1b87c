// Signs first, exact linear programming when they do not settle it; see feasibility.hpp.
#include "solver/feasibility.hpp"

#include <algorithm>

#include "solver/cone.hpp"

namespace ionledger::solver {
namespace {

using Row = Prepared::Row;

bool is_imposed(const Kernel& kernel, const Prepared& prepared, int column) {
  return column >= kernel.n_species &&
         prepared.rules[column - kernel.n_species] == PhaseRule::imposed;
}

/// Whether every present column that touches row i adds to it; imposed phases can do either.
bool only_adds(const Kernel& kernel, const Prepared& prepared, int i) {
  for (int j = 0; j < kernel.n_species + kernel.n_phases; ++j) {
    if (prepared.present[j] == 0) continue;
    for (int e = kernel.begin[j]; e < kernel.begin[j + 1]; ++e) {
      if (kernel.row[e] != i) continue;
      if (kernel.nu[e] < 0 || is_imposed(kernel, prepared, j)) return false;
    }
  }
  return true;
}

void remove_row(const Kernel& kernel, int i, Prepared& prepared) {
  prepared.rows[i] = Row::absent;
  for (int j = 0; j < kernel.n_species + kernel.n_phases; ++j) {
    for (int e = kernel.begin[j]; e < kernel.begin[j + 1]; ++e) {
      if (kernel.row[e] == i) prepared.present[j] = 0;
    }
  }
}

bool has_present(const Prepared& prepared, int species) {
  return species >= 0 && prepared.present[species] != 0;
}

/// A species of the component alone and one of its inverse: any total can be met.
bool is_two_sided(const Kernel& kernel, const Prepared& prepared, int i) {
  return prepared.rows[i] == Row::fixed || (has_present(prepared, kernel.unit_species[i]) &&
                                            has_present(prepared, kernel.unit_inverse[i]));
}

/// Whether an imposed phase can put any amount into row i and only two-sided rows notice.
bool is_supplied(const Kernel& kernel, const Prepared& prepared, int i) {
  for (int m = 0; m < kernel.n_phases; ++m) {
    const int column = kernel.n_species + m;
    if (prepared.present[column] == 0 || prepared.rules[m] != PhaseRule::imposed) continue;
    bool touches = false;
    bool elsewhere = false;
    for (int e = kernel.begin[column]; e < kernel.begin[column + 1]; ++e) {
      touches = touches || kernel.row[e] == i;
      elsewhere =
          elsewhere || (kernel.row[e] != i && !is_two_sided(kernel, prepared, kernel.row[e]));
    }
    if (touches && !elsewhere) return true;
  }
  return false;
}

Rational exact_total(const Kernel& kernel, const Case& a_case, int i) {
  const auto caller = static_cast<std::size_t>(kernel.order[i]);
  if (caller < a_case.decimal_totals.size() && !a_case.decimal_totals[caller].empty()) {
    if (const auto value = exact_decimal(a_case.decimal_totals[caller])) return *value;
  }
  return exact(a_case.totals[caller]);
}

/// y . column over the balanced rows, numbered by `place`.
Rational project(const ConeColumn& column, const std::vector<Rational>& y) {
  Rational sum = 0;
  for (const auto& [row, value] : column.entries) sum += y[row] * value;
  return sum;
}

void write_conflict(const Kernel& kernel,
                    const std::vector<int>& rows,
                    const std::vector<Rational>& y,
                    FeasibilityFinding& finding) {
  Rational smallest = 0;  // scaled so that the smallest weight is 1
  for (const Rational& value : y) {
    const Rational size = abs(value);
    if (size != 0 && (smallest == 0 || size < smallest)) smallest = size;
  }
  for (std::size_t r = 0; r < rows.size(); ++r) {
    if (y[r] == 0) continue;
    finding.conflict.push_back(kernel.order[rows[r]]);
    finding.conflict_weight.push_back(nearest(y[r] / smallest));
  }
}

/// Rows that no present column touches carry no activity.
void mark_untouched_rows(const Kernel& kernel, Prepared& prepared) {
  std::vector<bool> touched(static_cast<std::size_t>(kernel.n_components), false);
  for (int j = 0; j < kernel.n_species + kernel.n_phases; ++j) {
    if (prepared.present[j] == 0) continue;
    for (int e = kernel.begin[j]; e < kernel.begin[j + 1]; ++e) touched[kernel.row[e]] = true;
  }
  for (int i = 0; i < kernel.n_components; ++i) {
    if (prepared.rows[i] == Row::balanced && !touched[i]) prepared.rows[i] = Row::absent;
  }
}

}  // namespace

bool settle_by_signs(const Kernel& kernel, Prepared& prepared, Feasibility& kind) {
  kind = Feasibility::interior;
  bool again = true;
  while (again) {
    again = false;
    for (int i = 0; i < kernel.n_components; ++i) {
      if (prepared.rows[i] != Row::balanced || prepared.total[i] != 0) continue;
      if (!only_adds(kernel, prepared, i)) continue;
      remove_row(kernel, i, prepared);
      kind = Feasibility::boundary;
      again = true;
    }
  }
  for (int i = 0; i < kernel.n_components; ++i) {
    if (prepared.rows[i] != Row::balanced) continue;
    if (is_two_sided(kernel, prepared, i)) continue;
    if (has_present(prepared, kernel.unit_species[i]) && prepared.total[i] > 0) continue;
    if (prepared.has_phases && has_present(prepared, kernel.unit_species[i]) &&
        is_supplied(kernel, prepared, i)) {
      continue;
    }
    return false;
  }
  return true;
}

FeasibilityFinding settle_exactly(const Kernel& kernel, const Case& a_case, Prepared& prepared) {
  FeasibilityFinding finding;
  std::vector<int> rows;
  std::vector<int> place(static_cast<std::size_t>(kernel.n_components), -1);
  std::vector<Rational> totals;
  for (int i = 0; i < kernel.n_components; ++i) {
    if (prepared.rows[i] != Row::balanced) continue;
    place[i] = static_cast<int>(rows.size());
    rows.push_back(i);
    totals.push_back(exact_total(kernel, a_case, i));
  }
  while (true) {
    std::vector<ConeColumn> columns;
    std::vector<int> numbers;
    for (int j = 0; j < kernel.n_species + kernel.n_phases; ++j) {
      if (prepared.present[j] == 0) continue;
      ConeColumn column;
      for (int e = kernel.begin[j]; e < kernel.begin[j + 1]; ++e) {
        if (place[kernel.row[e]] < 0) continue;
        column.entries.emplace_back(place[kernel.row[e]], exact(kernel.nu[e]));
      }
      column.either_sign = is_imposed(kernel, prepared, j);
      columns.push_back(std::move(column));
      numbers.push_back(j);
    }
    const ConeFinding cone = locate(columns, totals);
    if (cone.place == ConeFinding::Place::inside) break;
    if (cone.place == ConeFinding::Place::outside) {
      finding.kind = Feasibility::infeasible;
      write_conflict(kernel, rows, cone.y, finding);
      return finding;
    }
    finding.kind = Feasibility::boundary;
    for (std::size_t k = 0; k < columns.size(); ++k) {
      if (project(columns[k], cone.y) > 0) prepared.present[numbers[k]] = 0;
    }
  }
  mark_untouched_rows(kernel, prepared);
  return finding;
}

bool read_decimal_totals(const Kernel& kernel, const Case& a_case, Prepared& prepared) {
  for (int i = 0; i < kernel.n_components; ++i) {
    const auto caller = static_cast<std::size_t>(kernel.order[i]);
    if (prepared.rows[i] != Row::balanced || caller >= a_case.decimal_totals.size()) continue;
    if (a_case.decimal_totals[caller].empty()) continue;
    const auto value = exact_decimal(a_case.decimal_totals[caller]);
    if (!value) return false;
    prepared.total[i] = nearest(*value);
    prepared.total_low[i] = nearest(*value - exact(prepared.total[i]));
  }
  return true;
}

}  // namespace ionledger::solver
