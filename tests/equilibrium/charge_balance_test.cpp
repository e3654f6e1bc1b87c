// Facts of the trade about charge balance, checked on the species themselves.
#include <doctest/doctest.h>

#include <cmath>

#include "equilibrium/system.hpp"
#include "support/compare.hpp"
#include "support/water.hpp"

namespace ionledger::testing {
namespace {

/// Sum of z m over all species, relative to the sum of |z| m.
double ledger_residual(const Solution& solution) {
  const Chemistry& chemistry = models().chemistry;
  double sum = 0;
  double gross = 0;
  for (std::size_t s = 0; s < chemistry.species.size(); ++s) {
    sum += chemistry.species[s].charge_number * solution.molality[s];
    gross += std::abs(chemistry.species[s].charge_number) * solution.molality[s];
  }
  return std::abs(sum) / gross;
}

const std::vector<std::string> all_models = {"davies", "extended-debye-huckel", "truesdell-jones"};

}  // namespace

TEST_SUITE("equilibrium/charge_balance") {
  TEST_CASE("in a strong acid alone [H+] = [A-] + [OH-]") {
    for (const std::string& model : all_models) {
      for (const double molal : {1e-9, 1e-7, 1e-5, 1e-3, 0.1}) {
        const Solution s = solved({{"Cl-", molal}}, 25, activity_model(model));
        CHECK(molality(s, "H+") == rel(molality(s, "Cl-") + molality(s, "OH-"), 1e-12));
        CHECK(ledger_residual(s) < 1e-12);
      }
    }
  }
  TEST_CASE("in a divalent strong base alone 2 [M+2] + [MOH+] + [H+] = [OH-]") {
    for (const std::string& model : all_models) {
      for (const double molal : {1e-8, 1e-6, 1e-4, 1e-2}) {
        const Solution s = solved({{"Ba+2", molal}}, 25, activity_model(model));
        double hydroxide_pair = 0;
        if (models().chemistry.species_index("BaOH+") >= 0) hydroxide_pair = molality(s, "BaOH+");
        CHECK(2 * molality(s, "Ba+2") + hydroxide_pair + molality(s, "H+") ==
              rel(molality(s, "OH-"), 1e-12));
        CHECK(ledger_residual(s) < 1e-12);
      }
    }
  }
  TEST_CASE(
      "in trisodium phosphate [Na+] + [H+] = 3 [PO4-3] + 2 [HPO4-2] + [H2PO4-] + [OH-] + pairs") {
    for (const std::string& model : all_models) {
      for (const double molal : {1e-6, 1e-4, 1e-2, 0.1}) {
        const Solution s =
            solved({{"Na+", 3 * molal}, {"PO4-3", molal}}, 25, activity_model(model));
        double pairs = 0;
        for (const auto& [name, charge] : {std::pair{"NaPO4-2", 2}, {"NaHPO4-", 1}}) {
          if (models().chemistry.species_index(name) >= 0) pairs += charge * molality(s, name);
        }
        CHECK(molality(s, "Na+") + molality(s, "H+") ==
              rel(3 * molality(s, "PO4-3") + 2 * molality(s, "HPO4-2") + molality(s, "H2PO4-") +
                      molality(s, "OH-") + pairs,
                  1e-12));
        CHECK(ledger_residual(s) < 1e-12);
      }
    }
  }
  TEST_CASE("pure water is neutral at half its ion product") {
    for (const double degc : {0.0, 25.0, 60.0, 100.0}) {
      const Solution s = solved({}, degc, default_activity_model());
      CHECK(molality(s, "H+") == rel(molality(s, "OH-"), 1e-12));
      CHECK(s.ph() == within(-0.5 * water_log10_ion_product(celsius(degc)), 1e-3));
    }
  }
}

}  // namespace ionledger::testing
