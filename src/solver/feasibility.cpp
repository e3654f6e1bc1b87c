// The quick part of the feasibility check; see feasibility.hpp.
#include "solver/feasibility.hpp"

namespace ionledger::solver {
namespace {

using Row = Prepared::Row;

/// Whether every present column that touches row i adds to it; imposed phases can do either.
bool only_adds(const Kernel& kernel, const Prepared& prepared, int i) {
  const int n_columns = kernel.n_species + kernel.n_phases;
  for (int j = 0; j < n_columns; ++j) {
    if (prepared.present[j] == 0) continue;
    const bool imposed =
        j >= kernel.n_species && prepared.rules[j - kernel.n_species] == PhaseRule::imposed;
    for (int e = kernel.begin[j]; e < kernel.begin[j + 1]; ++e) {
      if (kernel.row[e] == i && (imposed || kernel.nu[e] < 0)) return false;
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
    if (!has_present(prepared, kernel.unit_species[i])) return false;
    if (prepared.total[i] > 0 || has_present(prepared, kernel.unit_inverse[i])) continue;
    return false;
  }
  return true;
}

}  // namespace ionledger::solver
