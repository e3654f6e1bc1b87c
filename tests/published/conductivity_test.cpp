// Conductivity against published standards and handbook values, and against reports of mixed
// waters.
#include "ionledger/conductivity.hpp"

#include <doctest/doctest.h>

#include <array>
#include <cmath>

#include "stream/volume.hpp"
#include "support/compare.hpp"
#include "support/water.hpp"

namespace ionledger::testing {
namespace {

constexpr double us_per_cm_per_s_per_m = 1e4;

double us_per_cm(const Solution& solution) {
  return us_per_cm_per_s_per_m * conductivity(models().chemistry, solution).value();
}

/// Litres that one kg of water and its solutes fill.
double litres_of(const Solution& solution) {
  return solution_volume_l(
      models().chemistry, solution.molality, solution.ionic_strength_molal, solution.temperature);
}

/// `salt` holds moles of basis species in one equivalent; the solution has `eq_per_l` of it.
Solution salt_solution(const Totals& salt, double eq_per_l, double degc) {
  double eq_per_kg = eq_per_l;
  Solution solution;
  for (int i = 0; i < 6; ++i) {  // each pass gains three digits: the volume hardly depends on it
    Totals totals;
    for (const auto& [species, moles] : salt) totals[species] = moles * eq_per_kg;
    solution = solved(totals, degc, default_activity_model());
    eq_per_kg = eq_per_l * litres_of(solution);
  }
  return solution;
}

double equivalent_conductivity(const Totals& salt, double eq_per_l) {
  return us_per_cm(salt_solution(salt, eq_per_l, 25)) / (1000 * eq_per_l);
}

}  // namespace

TEST_SUITE("published/conductivity") {
  TEST_CASE("potassium chloride standards are reproduced from 0 to 50 degC within 1 %") {
    // Wu, Koch and Pratt, J. Res. NIST 96 (1991) 191; Pratt et al., Pure Appl. Chem. 73 (2001)
    // 1783: uS/cm of 0.01 and 0.1 mol/kg, uncertain by 0.04 %, the CO2 of the water subtracted.
    struct Row {
      double degc, dilute, strong;
    };
    const std::array<Row, 12> rows = {{{0, 772.92, 7116.85},
                                       {5, 890.96, 8183.70},
                                       {10, 1013.95, 9291.72},
                                       {15, 1141.45, 10437.1},
                                       {18, 1219.93, 11140.6},
                                       {20, 1273.03, 11615.9},
                                       {25, 1408.23, 12824.6},
                                       {30, 1546.63, 14059.2},
                                       {35, 1687.79, 15316.0},
                                       {40, 1831.27, 16591.0},
                                       {45, 1976.62, 17880.6},
                                       {50, 2123.43, 19180.9}}};
    for (const Row& row : rows) {
      CAPTURE(row.degc);
      const auto of = [&](double molality) {
        return us_per_cm(
            solved({{"K+", molality}, {"Cl-", molality}}, row.degc, default_activity_model()));
      };
      CHECK(of(0.01) == rel(row.dilute, 0.01));
      CHECK(of(0.1) == rel(row.strong, 0.01));
    }
  }

  TEST_CASE("single salts at 25 degC are within 1.5 % up to 0.1 eq/L") {
    // S cm2 per equivalent. HCl: Hamer and DeWane, NSRDS-NBS 33 (1970). The others: CRC Handbook of
    // Chemistry and Physics, equivalent conductivity of electrolytes, from memory.
    struct Row {
      const char* name;
      Totals salt;
      std::vector<std::pair<double, double>> values;
    };
    const std::array<Row, 6> rows = {
        {{"HCl",
          {{"Cl-", 1}},
          {{0.001, 421.2}, {0.005, 415.7}, {0.01, 411.9}, {0.05, 398.9}, {0.1, 391.1}}},
         {"NaCl",
          {{"Na+", 1}, {"Cl-", 1}},
          {{0.001, 123.68},
           {0.005, 120.59},
           {0.01, 118.45},
           {0.02, 115.70},
           {0.05, 111.01},
           {0.1, 106.69}}},
         {"KCl",
          {{"K+", 1}, {"Cl-", 1}},
          {{0.001, 146.88},
           {0.005, 143.48},
           {0.01, 141.20},
           {0.02, 138.27},
           {0.05, 133.30},
           {0.1, 128.90}}},
         {"CaCl2",
          {{"Ca+2", 0.5}, {"Cl-", 1}},
          {{0.001, 130.30},
           {0.005, 124.19},
           {0.01, 120.30},
           {0.02, 115.59},
           {0.05, 108.42},
           {0.1, 102.41}}},
         {"MgCl2",
          {{"Mg+2", 0.5}, {"Cl-", 1}},
          {{0.001, 124.15},
           {0.005, 118.25},
           {0.01, 114.49},
           {0.02, 109.99},
           {0.05, 103.03},
           {0.1, 97.05}}},
         {"Na2SO4",
          {{"Na+", 1}, {"SO4-2", 0.5}},
          {{0.001, 124.09},
           {0.005, 117.09},
           {0.01, 112.38},
           {0.02, 106.73},
           {0.05, 97.70},
           {0.1, 89.94}}}}};
    for (const Row& row : rows) {
      CAPTURE(row.name);
      for (const auto& value : row.values) {  // clang 14 captures no structured binding
        const double eq_per_l = value.first;
        CAPTURE(eq_per_l);
        REQUIRE(eq_per_l <= conductivity_tested_eq_per_l);
        CHECK(equivalent_conductivity(row.salt, eq_per_l) ==
              rel(value.second, conductivity_max_error));
      }
    }
  }

  TEST_CASE("pure water has 0.0550 uS/cm at 25 degC") {
    // T. S. Light et al., Electrochem. Solid-State Lett. 8 (2005) E16: 0.05501, from memory.
    CHECK(us_per_cm(solved(Totals{}, 25, default_activity_model())) == rel(0.0550, 0.005));
  }

  TEST_CASE("the limiting slope is Onsager's: 60.2 + 0.229 lambda for a 1:1 salt") {
    // Robinson and Stokes, Electrolyte Solutions, 1959: the constants at 25 degC as handbooks print
    // them, 0.7 % from those with the present permittivity and viscosity of water.
    const double eq_per_l = 1e-4;
    const Solution solution = salt_solution({{"K+", 1}, {"Cl-", 1}}, eq_per_l, 25);
    const Chemistry& chemistry = models().chemistry;
    const auto limit_of = [&](const char* ion) {
      return limiting_conductivity_s_cm2_per_eq(
          chemistry, chemistry.species_index(ion), celsius(25));
    };
    double carried = us_per_cm(solution) / 1000;
    for (const char* ion : {"H+", "OH-"}) {  // water's own ions carry current beside the salt
      carried -= limit_of(ion) * molality(solution, ion) / litres_of(solution);
    }
    const double limit = limit_of("K+") + limit_of("Cl-");
    const double root_i = std::sqrt(eq_per_l);
    const double finite_size = 1 + 0.329 * 4.25 * root_i;
    CHECK(limit - carried / eq_per_l == rel((60.2 + 0.229 * limit) * root_i / finite_size, 0.015));
  }

  TEST_CASE("one per cent solutions at 20 degC have the conductivity of the handbook") {
    // CRC Handbook of Chemistry and Physics, electrical conductivity of aqueous solutions, mS/cm of
    // 1 % by mass; calcium chloride read, the others from memory. 3 %: two digits in print, and
    // 0.12 to 0.18 eq/L is beyond conductivity_tested_eq_per_l.
    const auto ms_per_cm = [](const Totals& per_mole, double g_per_mol) {
      Totals totals;
      for (const auto& [species, moles] : per_mole) {
        totals[species] = moles * 10.0 / 990.0 * 1000 / g_per_mol;
      }
      return us_per_cm(solved(totals, 20, default_activity_model())) / 1000;
    };
    CHECK(ms_per_cm({{"Na+", 1}, {"Cl-", 1}}, 58.443) == rel(16.0, 0.03));
    CHECK(ms_per_cm({{"Ca+2", 1}, {"Cl-", 2}}, 110.98) == rel(15.7, 0.03));
    CHECK(ms_per_cm({{"Na+", 1}, {"CO3-2", 1}}, 84.007) == rel(8.2, 0.03));
  }

  TEST_CASE("a neutral species carries nothing and an unlisted ion what its charge does") {
    const Chemistry& chemistry = models().chemistry;
    const auto limit = [&](const char* species) {
      return limiting_conductivity_s_cm2_per_eq(
          chemistry, chemistry.species_index(species), celsius(25));
    };
    CHECK(limit("CaCO3") == 0);
    CHECK(limit("CaHCO3+") == chemistry.conductivity.unlisted_s_cm2_per_eq.front());
    CHECK(limit("NaSO4-") == 45.0);
  }

  TEST_CASE("conductivity rises by about 2 % per degree, less where hydrogen ions carry it") {
    // Light slopes at 25 degC: 1.9 to 2.1 % for salts, 1.3 to 1.6 % for acids (Lange's table of
    // limiting conductivities at 18 and 25 degC).
    const auto slope = [&](const Totals& totals) {
      const double low = us_per_cm(solved(totals, 24, default_activity_model()));
      const double high = us_per_cm(solved(totals, 26, default_activity_model()));
      return 50 * std::log(high / low);
    };
    CHECK(slope({{"Na+", 0.01}, {"Cl-", 0.01}}) == within(2.0, 0.1));
    CHECK(slope({{"Cl-", 0.01}}) == within(1.45, 0.15));
  }
}

}  // namespace ionledger::testing
