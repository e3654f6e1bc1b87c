#include "ionledger/indices.hpp"

#include <doctest/doctest.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <numbers>

#include "ionledger/dissolved_solids.hpp"
#include "support/compare.hpp"
#include "support/water.hpp"

namespace ionledger::testing {
namespace {

Solution water(const Totals& totals, double degc = 25) {
  return solved(totals, degc, default_activity_model());
}

/// A hard water: 2 mmol/kg calcium, 1 magnesium, 3 sodium, 2 chloride, 1 sulfate, 5 bicarbonate.
const Totals hard = {
    {"Ca+2", 2e-3}, {"Mg+2", 1e-3}, {"Na+", 3e-3}, {"Cl-", 2e-3}, {"SO4-2", 1e-3}, {"CO3-2", 5e-3}};

std::vector<IndexLine> indices(const Solution& solution) {
  const Chemistry& chemistry = models().chemistry;
  std::vector<bool> known;
  for (const double total : solution.totals) known.push_back(total > 0);
  return indices_of({solution, 1.0, dissolved_solids_mg_per_l(chemistry, solution, 1.0), known},
                    chemistry,
                    default_activity_model());
}

IndexLine index(const Solution& solution, const std::string& key) {
  for (IndexLine& line : indices(solution)) {
    if (line.key == key) return line;
  }
  FAIL("no index " << key);
  return {};
}

double value(const Solution& solution, const std::string& key) {
  const IndexLine line = index(solution, key);
  REQUIRE_MESSAGE(line.value, key << " misses " << line.missing);
  return *line.value;
}

double input(const IndexLine& line, const std::string& name) {
  for (const IndexInput& candidate : line.inputs) {
    if (candidate.name == name) return candidate.value;
  }
  FAIL("no input " << name);
  return 0;
}

int calcite() {
  return models().chemistry.mineral_index(models().chemistry.roles.calcium_carbonate);
}

double precipitation_potential(const Solution& solution) {
  const auto amount = precipitation_potential_mol_per_kg(
      solution, calcite(), models().chemistry, default_activity_model());
  REQUIRE(amount);
  return *amount;
}

double titrated(const Solution& solution, double end_ph) {
  const auto eq =
      titrated_alkalinity_eq_per_kg(solution, end_ph, models().chemistry, default_activity_model());
  REQUIRE(eq);
  return *eq;
}

}  // namespace

TEST_SUITE("assessment/indices") {
  TEST_CASE("the practice formula gives the worked example of the corrosion handbooks") {
    // P. R. Roberge, Handbook of Corrosion Engineering, 2000: pH 7.5, TDS 320, Ca 150, alkalinity
    // 34; printed pHs 8.2 and 7.2, LSI -0.7 and +0.3, RSI 8.9 and 6.9, the last from rounded pHs.
    const double at_25 = practice_saturation_ph(320, 150, 34, celsius(25));
    const double at_82 = practice_saturation_ph(320, 150, 34, celsius(82));
    CHECK(at_25 == within(8.2, 0.05));
    CHECK(at_82 == within(7.2, 0.05));
    CHECK(7.5 - at_25 == within(-0.7, 0.05));
    CHECK(7.5 - at_82 == within(0.3, 0.05));
    CHECK(ryznar_index(at_25, 7.5) == within(8.9, 0.1));
    CHECK(ryznar_index(at_82, 7.5) == within(6.9, 0.1));
    // To two decimals, the formula evaluated by hand.
    CHECK(at_25 == within(8.23, 0.005));
    CHECK(at_82 == within(7.23, 0.005));
  }

  TEST_CASE("the practice formula stands 0.08 above the chart of the membrane standard") {
    // Water Treatment Plant Design (AWWA/ASCE), example of ASTM D3739: 20 degC, TDS 5000, Ca 800,
    // HCO3 774.8, pH 8.19; with the chart's C = 2.37 pHs 6.28, index +1.91.
    const double ph_s = practice_saturation_ph(5000, 800, 774.8, celsius(20));
    CHECK(ph_s == within(6.36, 0.005));
    CHECK(ph_s - 6.28 == within(0.08, 0.01));
  }

  TEST_CASE("the activity-corrected saturation pH of the same example is lower by 0.2") {
    // By hand with I = 0.008, pK2 10.329, pKs 8.480 at 25 degC; 10.132 and 9.021 at 82.
    SaturationPH example;
    example.ph = 7.5;
    example.calcium_mol_per_l = 150 / 100.087e3;
    example.carbonate_alkalinity_eq_per_l = 34 / 50.0435e3;
    example.ionic_strength_mol_per_l = 0.008;
    example.pk2 = 10.329;
    example.pks = 8.480;
    CHECK(langelier_saturation_ph(example) == within(8.045, 0.005));
    example.pk2 = 10.132;
    example.pks = 9.021;
    example.temperature = celsius(82);
    CHECK(langelier_saturation_ph(example) == within(7.341, 0.005));
    // Where pH equals pK2 of an ideal water, a third of the alkalinity is bicarbonate.
    example.ionic_strength_mol_per_l = 0;
    example.ph = 0;
    const double acid = langelier_saturation_ph(example);
    example.ph = example.pk2;
    CHECK(langelier_saturation_ph(example) - acid == within(std::log10(3.0), 1e-9));
  }

  TEST_CASE("pfm has the slopes of Standard Methods 2330 B") {
    struct Row {
      double degc, a;
    };
    for (const Row& row : {Row{5, .4944}, Row{25, .5108}, Row{50, .5365}, Row{80, .5758}}) {
      CAPTURE(row.degc);
      const double i = 0.01;
      const double slope = langelier_pfm(i, celsius(row.degc)) / (0.1 / 1.1 - 0.3 * i);
      CHECK(slope == within(row.a, 5e-5));
    }
  }

  TEST_CASE("pK2 and pKs are those of Standard Methods 2330 from 5 to 80 degC") {
    // Table 2330:II, calcite; printed to two decimals.
    struct Row {
      double degc, pk2, pks;
    };
    for (const Row& row : std::array<Row, 6>{{{5, 10.55, 8.39},
                                              {15, 10.43, 8.43},
                                              {25, 10.33, 8.48},
                                              {40, 10.22, 8.58},
                                              {60, 10.14, 8.76},
                                              {80, 10.13, 8.99}}}) {
      CAPTURE(row.degc);
      const IndexLine line = index(water(hard, row.degc), "langelier");
      CHECK(input(line, "pK2") == within(row.pk2, 0.006));
      CHECK(input(line, "pKs") == within(row.pks, 0.006));
    }
  }

  TEST_CASE("Ryznar and Puckorius give the worked example of the cooling-water manual") {
    // UFC 3-240-13FN, 2005, appendix B: LSI +1.43, RSI 5.34, PSI 6.07, hence pHs 6.77, pH 8.20 and
    // pHeq 7.47, the table's value for an alkalinity of 100.
    CHECK(8.20 - 6.77 == within(1.43, 0.005));
    CHECK(ryznar_index(6.77, 8.20) == within(5.34, 0.005));
    CHECK(puckorius_equilibrium_ph(100) == within(7.47, 0.005));
    CHECK(2 * 6.77 - puckorius_equilibrium_ph(100) == within(6.07, 0.005));
  }

  TEST_CASE("the Larson-Skold index follows from milligrams as the rule books write it") {
    // (Cl/35.5 + SO4/48)/(alkalinity/50), 35 Ill. Adm. Code 604.900.
    CHECK(larson_skold_index(71 / 35.5, 96 / 48.0, 200 / 50.0) == within(1.0, 1e-12));
    const Solution solution = water(hard);
    CHECK(value(solution, "larson_skold") == within(0.8, 0.02));  // 4 / 5, less CO2
  }

  TEST_CASE("the aggressive index takes the logarithm of the product") {
    CHECK(aggressive_index(7.5, 100, 100) == within(11.5, 1e-12));  // AWWA C400
  }

  TEST_CASE("the sodium adsorption ratio follows the example of the irrigation guideline") {
    // Ayers and Westcot, FAO Irrigation and Drainage Paper 29, 1985: Ca 2.32, Mg 1.44, Na 7.73
    // me/L; the digits from memory, the quotient by hand.
    CHECK(sodium_adsorption_ratio(7.73, 2.32, 1.44) == within(5.64, 0.005));
    CHECK(value(water(hard), "sodium_adsorption_ratio") == within(3 / std::sqrt(3.0), 1e-6));
  }

  TEST_CASE("hardness has the factors of Standard Methods 2340 B") {
    // 2.497 mg/L per mg/L of calcium, 4.118 of magnesium.
    const double expected = 2.497 * 40.078 * 2 + 4.118 * 24.305 * 1;
    CHECK(value(water(hard), "total_hardness_mg_per_L_as_CaCO3") == rel(expected, 5e-4));
    CHECK(value(water(hard), "carbonate_hardness_mg_per_L_as_CaCO3") ==
          rel(250.2, 1e-3));  // the alkalinity, 5 meq, is the smaller
  }

  TEST_CASE("Langelier's index is near the saturation index of calcite in a dilute water") {
    const Solution solution = water(hard);
    const double si = saturation_index(solution, "calcite");
    CHECK(value(solution, "langelier") == within(si, 0.15));  // it leaves ion pairs out
    CHECK(value(solution, "langelier") > si);
    CHECK(value(solution, "ryznar") ==
          within(solution.ph() - 2 * value(solution, "langelier"), 1e-9));
    CHECK(value(solution, "langelier_practice") == within(si, 0.3));
  }

  TEST_CASE("the precipitation potential is zero in equilibrium with calcite and moves with it") {
    const Chemistry& chemistry = models().chemistry;
    Problem problem = neutral_water(hard);
    const double before = precipitation_potential(water(hard));
    problem.minerals = {{calcite(), 0}};
    const Solution settled = solved(problem, default_activity_model());
    REQUIRE(settled.deposited[0] > 0);
    CHECK(before == rel(settled.deposited[0], 1e-9));
    Problem clear = neutral_water(hard);
    clear.totals = settled.totals;
    // The amount of calcite added to look for the equilibrium, 1e-3, times the balance's 1e-12.
    CHECK(std::abs(precipitation_potential(solved(clear, default_activity_model()))) < 1e-10);
    for (std::size_t i = 0; i < clear.totals.size(); ++i) {
      clear.totals[i] -=
          3e-4 * chemistry.minerals[static_cast<std::size_t>(calcite())].dissolution[i];
    }
    CHECK(precipitation_potential(solved(clear, default_activity_model())) == rel(-3e-4, 1e-7));
  }

  TEST_CASE("the precipitation potential keeps its sign with the saturation index") {
    const Solution soft = water({{"Ca+2", 1e-4}, {"CO3-2", 3e-4}});
    CHECK(saturation_index(soft, "calcite") < 0);
    CHECK(value(soft, "ccpp_mg_per_L_as_CaCO3") < 0);
    const Solution limed = water({{"Ca+2", 3e-3}, {"CO3-2", 3e-3}});
    CHECK(saturation_index(limed, "calcite") > 0);
    CHECK(value(limed, "ccpp_mg_per_L_as_CaCO3") > 0);
  }

  TEST_CASE("p and m follow the rule that tells hydroxide, carbonate and bicarbonate apart") {
    // Standard Methods 2320 B: P = M for hydroxide, M/2 for carbonate, 0 for bicarbonate.
    const Solution soda_lye = water({{"Na+", 0.01}});
    CHECK(titrated(soda_lye, 8.3) == rel(0.01, 1e-3));
    CHECK(titrated(soda_lye, 4.5) == rel(0.01, 5e-3));
    const Solution soda = water({{"Na+", 0.02}, {"CO3-2", 0.01}});
    CHECK(titrated(soda, 8.3) / titrated(soda, 4.5) == within(0.5, 0.01));
    const Solution bicarbonate = water({{"Na+", 0.01}, {"CO3-2", 0.01}});
    CHECK(titrated(bicarbonate, 8.3) < 2e-4);
    CHECK(titrated(bicarbonate, 4.5) == rel(0.01, 0.02));
    CHECK(titrated(water({{"Cl-", 0.001}}), 4.5) == 0);
    CHECK(value(soda, "m_alkalinity_mg_per_L_as_CaCO3") == rel(50043 * titrated(soda, 4.5), 1e-3));
  }

  TEST_CASE("buffer intensity is Van Slyke's for water and for a polyprotic acid") {
    const auto intensity = [](const Solution& solution) {
      const auto beta =
          buffer_intensity_eq_per_kg(solution, models().chemistry, default_activity_model());
      REQUIRE(beta);
      return *beta;
    };
    const Solution pure = water({});
    const double ions = molality(pure, "H+") + molality(pure, "OH-");
    CHECK(intensity(pure) == rel(std::numbers::ln10 * ions, 1e-3));
    // 2.303 (H + OH + C (mean z^2 - mean z ^2)), z = protons lost, among potassium chloride, which
    // hardly pairs and keeps the activity coefficients where they are.
    const Solution soda = water({{"K+", 0.1015}, {"Cl-", 0.1}, {"CO3-2", 0.001}});
    const double c1 = molality(soda, "HCO3-");
    const double c2 = molality(soda, "CO3-2");
    const double spread = c1 + 4 * c2 - (c1 + 2 * c2) * (c1 + 2 * c2) / 0.001;
    const double expected =
        std::numbers::ln10 * (molality(soda, "H+") + molality(soda, "OH-") + spread);
    CHECK(intensity(soda) == rel(expected, 0.002));
  }

  TEST_CASE("an index without its inputs has no value and says what is missing") {
    const Solution softened = water({{"Na+", 0.002}, {"Cl-", 0.002}});
    for (const char* key : {"langelier",
                            "langelier_practice",
                            "ryznar",
                            "ryznar_practice",
                            "puckorius",
                            "ccpp_mg_per_L_as_CaCO3",
                            "larson_skold",
                            "aggressive",
                            "total_hardness_mg_per_L_as_CaCO3",
                            "sodium_adsorption_ratio"}) {
      const IndexLine line = index(softened, key);
      CAPTURE(key);
      CHECK(!line.value);
      CHECK(line.missing != "");
      CHECK(line.inputs.empty());
    }
    CHECK(index(softened, "langelier").missing == "calcium, carbonate alkalinity");
    CHECK(index(softened, "m_alkalinity_mg_per_L_as_CaCO3").value);
  }

  TEST_CASE("every index of a full analysis has a value, a formula, a source and its inputs") {
    for (const IndexLine& line : indices(water(hard))) {
      CAPTURE(line.key);
      CHECK(line.value);
      CHECK(line.formula != "");
      CHECK(line.source != "");
      CHECK(!line.inputs.empty());
    }
  }
}

}  // namespace ionledger::testing
