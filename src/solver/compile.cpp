// Turns a System and Conditions into the tables of the kernel. Separate because it runs once per
// temperature, the rest of the kernel thousands of times.
#include <algorithm>
#include <cmath>
#include <map>
#include <set>
#include <utility>

#include "solver/kernel.hpp"

namespace ionledger::solver {
namespace {

using Pattern = std::vector<std::set<int>>;  ///< Neighbours of every component.

Pattern hessian_pattern(const System& system) {
  const int n = system.n_components;
  Pattern pattern(static_cast<std::size_t>(n));
  for (int j = 0; j < system.n_species; ++j) {
    const double* const nu = &system.stoichiometry[static_cast<std::size_t>(j * n)];
    for (int a = 0; a < n; ++a) {
      for (int b = 0; b < n; ++b) {
        if (a != b && nu[a] != 0 && nu[b] != 0) pattern[a].insert(b);
      }
    }
  }
  return pattern;
}

/// Minimum degree: eliminate the component with the fewest neighbours, which become a clique.
std::vector<int> elimination_order(Pattern pattern) {
  std::vector<int> order;
  std::vector<bool> done(pattern.size(), false);
  while (order.size() < pattern.size()) {
    int best = -1;
    for (int i = 0; i < static_cast<int>(pattern.size()); ++i) {
      if (!done[i] && (best < 0 || pattern[i].size() < pattern[best].size())) best = i;
    }
    done[best] = true;
    order.push_back(best);
    for (const int a : pattern[best]) {
      pattern[a].erase(best);
      for (const int b : pattern[best]) {
        if (a != b) pattern[a].insert(b);
      }
    }
  }
  return order;
}

void add_column(const double* nu_of_caller, Kernel& kernel) {
  for (int i = 0; i < kernel.n_components; ++i) {
    const double nu = nu_of_caller[kernel.order[i]];
    if (nu == 0) continue;
    kernel.row.push_back(i);
    kernel.nu.push_back(nu);
    kernel.is_whole = kernel.is_whole && nu == std::round(nu);
  }
  kernel.begin.push_back(static_cast<int>(kernel.row.size()));
}

void add_columns(const System& system, Kernel& kernel) {
  const int n = system.n_components;
  kernel.begin.push_back(0);
  for (int j = 0; j < system.n_species; ++j) {
    add_column(&system.stoichiometry[static_cast<std::size_t>(j * n)], kernel);
  }
  for (int m = 0; m < system.n_phases; ++m) {
    add_column(&system.phase_stoichiometry[static_cast<std::size_t>(m * n)], kernel);
  }
  for (int i = 0; i < n; ++i) {
    kernel.row.push_back(i);
    kernel.nu.push_back(1);
    kernel.begin.push_back(static_cast<int>(kernel.row.size()));
  }
}

void find_unit_species(Kernel& kernel) {
  kernel.unit_species.assign(static_cast<std::size_t>(kernel.n_components), -1);
  kernel.unit_inverse = kernel.unit_species;
  for (int j = 0; j < kernel.n_species; ++j) {
    const int e = kernel.begin[j];
    if (kernel.begin[j + 1] != e + 1) continue;
    if (kernel.nu[e] == 1 && kernel.unit_species[kernel.row[e]] < 0) {
      kernel.unit_species[kernel.row[e]] = j;
    }
    if (kernel.nu[e] == -1 && kernel.unit_inverse[kernel.row[e]] < 0) {
      kernel.unit_inverse[kernel.row[e]] = j;
    }
  }
}

/// Index of X_i^exponent in the table of powers; a whole exponent is reached one step at a time.
int power_index(int component,
                double exponent,
                std::map<std::pair<int, double>, int>& known,
                Kernel& kernel) {
  const auto found = known.find({component, exponent});
  if (found != known.end()) return found->second;
  Kernel::Power power{component, exponent};
  if (exponent == std::round(exponent) && std::abs(exponent) > 1) {
    const double unit = exponent > 0 ? 1 : -1;
    power.previous = power_index(component, exponent - unit, known, kernel);
    power.step = power_index(component, unit, known, kernel);
  }
  kernel.powers.push_back(power);
  const int index = static_cast<int>(kernel.powers.size()) - 1;
  known[{component, exponent}] = index;
  return index;
}

void add_powers_and_factors(Kernel& kernel) {
  std::map<std::pair<int, double>, int> known_powers;
  std::map<std::pair<int, double>, int> known_factors;
  for (int j = 0; j < kernel.n_species; ++j) {
    for (int e = kernel.begin[j]; e < kernel.begin[j + 1]; ++e) {
      const double nu = kernel.nu[e];
      kernel.terms.push_back({std::abs(nu),
                              2 * kernel.row[e] + (nu < 0),
                              power_index(kernel.row[e], nu, known_powers, kernel)});
    }
    const Kernel::Factor factor{kernel.activity_class[j], kernel.solvent_exponent[j]};
    const auto [place, is_new] =
        known_factors.insert({{factor.activity_class, factor.solvent_exponent},
                              static_cast<int>(kernel.factors.size())});
    if (is_new) kernel.factors.push_back(factor);
    kernel.factor.push_back(place->second);
  }
}

/// Slots of the lower triangle, filled in as elimination does, and the operations on them.
void add_factorisation(const System& system, Kernel& kernel) {
  const int n = kernel.n_components;
  const Pattern pattern = hessian_pattern(system);
  Pattern lower(static_cast<std::size_t>(n));  // rows below the diagonal of every column
  for (int i = 0; i < n; ++i) {
    for (const int neighbour : pattern[kernel.order[i]]) {
      const int k = kernel.position[neighbour];
      if (k > i) lower[i].insert(k);
    }
  }
  for (int i = 0; i < n; ++i) {
    for (const int a : lower[i]) {
      for (const int b : lower[i]) {
        if (b > a) lower[a].insert(b);
      }
    }
  }
  std::map<std::pair<int, int>, int> slot;  // (row, column), row > column
  int next = n;
  for (int i = 0; i < n; ++i) {
    kernel.below_begin.push_back(static_cast<int>(kernel.below.size()));
    for (const int k : lower[i]) {
      slot[{k, i}] = next;
      kernel.below.push_back(k);
      ++next;
    }
  }
  kernel.below_begin.push_back(static_cast<int>(kernel.below.size()));
  kernel.n_hessian = next;
  for (int i = 0; i < n; ++i) {
    kernel.update_begin.push_back(static_cast<int>(kernel.updates.size()));
    for (const int a : lower[i]) {
      for (const int b : lower[i]) {
        if (b < a) continue;
        const int target = a == b ? a : slot[{b, a}];
        kernel.updates.push_back({target, slot[{a, i}], slot[{b, i}]});
      }
    }
  }
  kernel.update_begin.push_back(static_cast<int>(kernel.updates.size()));
  for (int i = 0; i < n; ++i) {
    kernel.touching_begin.push_back(static_cast<int>(kernel.touching.size()));
    for (const auto& [place, index] : slot) {
      if (place.first == i || place.second == i) kernel.touching.push_back(index);
    }
  }
  kernel.touching_begin.push_back(static_cast<int>(kernel.touching.size()));
  for (int j = 0; j < kernel.n_species; ++j) {
    kernel.product_begin.push_back(static_cast<int>(kernel.products.size()));
    for (int a = kernel.begin[j]; a < kernel.begin[j + 1]; ++a) {
      for (int b = a + 1; b < kernel.begin[j + 1]; ++b) {
        kernel.products.push_back(
            {slot[{kernel.row[b], kernel.row[a]}], kernel.nu[a] * kernel.nu[b]});
      }
    }
  }
  kernel.product_begin.push_back(static_cast<int>(kernel.products.size()));
}

}  // namespace

Kernel compile(const System& system, const Conditions& conditions) {
  Kernel kernel;
  kernel.n_components = system.n_components;
  kernel.n_species = system.n_species;
  kernel.n_phases = system.n_phases;
  kernel.order = elimination_order(hessian_pattern(system));
  kernel.position.resize(kernel.order.size());
  for (std::size_t i = 0; i < kernel.order.size(); ++i) {
    kernel.position[kernel.order[i]] = static_cast<int>(i);
  }
  add_columns(system, kernel);
  find_unit_species(kernel);

  kernel.ln_k = conditions.ln_k;
  for (const double ln_k : kernel.ln_k) kernel.k.push_back(std::exp(ln_k));
  kernel.solvent_exponent = system.solvent_exponent;
  kernel.ionic_weight = system.ionic_weight;
  kernel.solute_weight = system.solute_weight;
  kernel.ln_k_phase = conditions.ln_k_phase;
  kernel.phase_solvent_exponent = system.phase_solvent_exponent;
  kernel.classes = conditions.classes;
  kernel.activity_class = system.activity_class;
  kernel.solvent_slope = conditions.solvent_slope;
  const auto n_species = static_cast<std::size_t>(system.n_species);
  kernel.solvent_exponent.resize(n_species, 0);
  kernel.ionic_weight.resize(n_species, 0);
  kernel.solute_weight.resize(n_species, 0);
  kernel.activity_class.resize(n_species, 0);
  kernel.phase_solvent_exponent.resize(static_cast<std::size_t>(system.n_phases), 0);
  for (int j = 0; j < system.n_species; ++j) {
    kernel.all_solutes = kernel.all_solutes && kernel.solute_weight[j] == 1;
    if (kernel.solvent_exponent[j] != 0) kernel.with_solvent.push_back(j);
  }
  if (kernel.classes.empty()) kernel.classes.emplace_back();
  for (const double weight : kernel.ionic_weight) {
    kernel.largest_ionic_weight = std::max(kernel.largest_ionic_weight, weight);
  }
  add_powers_and_factors(kernel);
  add_factorisation(system, kernel);
  return kernel;
}

}  // namespace ionledger::solver
