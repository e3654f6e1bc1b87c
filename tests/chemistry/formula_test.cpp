#include "chemistry/formula.hpp"

#include <doctest/doctest.h>

#include <string>

#include "support/compare.hpp"

namespace ionledger::testing {

TEST_SUITE("chemistry/formula") {
  TEST_CASE("a formula counts its atoms through parentheses") {
    const auto composition = composition_of("Mg(NH4)PO4(H2O)6");
    REQUIRE(composition);
    CHECK(composition->at("H") == 16);
    CHECK(composition->at("O") == 10);
    CHECK(composition->at("N") == 1);
  }
  TEST_CASE("the charge of a name is not part of its atoms") {
    CHECK(composition_of("Al(OH)4-") == composition_of("Al(OH)4"));
    CHECK(composition_of("SO4-2")->at("O") == 4);
  }
  TEST_CASE("what is not a formula is refused") {
    for (const char* text : {"", "Xx", "Ca(OH", "CaOH)", "caco3", "Ca CO3", "((((((H))))))"}) {
      CAPTURE(std::string(text));
      CHECK_FALSE(composition_of(text));
    }
  }
  TEST_CASE("calcium carbonate weighs 100.09 g/mol and water 18.015") {
    // IUPAC standard atomic weights: Ca 40.078, C 12.011, O 15.999, H 1.008.
    CHECK(molar_mass_g_per_mol(*composition_of("CaCO3")) == within(100.086, 0.001));
    CHECK(molar_mass_g_per_mol(*composition_of("H2O")) == within(18.015, 0.001));
  }
  TEST_CASE("charges stand at the end of a name") {
    CHECK(charge_of("Ca+2") == 2);
    CHECK(charge_of("HCO3-") == -1);
    CHECK(charge_of("CaCO3") == 0);
    CHECK_FALSE(charge_of("Ca+2x"));
    CHECK_FALSE(charge_of("Ca+0"));
  }
  TEST_CASE("a reaction is read with products positive") {
    const auto reaction = read_reaction("CO2 + H2O = 2 H+ + CO3-2");
    REQUIRE(reaction);
    CHECK(*reaction == std::vector<Term>{{"CO2", -1}, {"H2O", -1}, {"H+", 2}, {"CO3-2", 1}});
  }
  TEST_CASE("what is not a reaction is refused") {
    for (const char* text : {"", "A", "A = ", " = B", "A = B = C", "0 A = B", "A + = B"}) {
      CAPTURE(std::string(text));
      CHECK_FALSE(read_reaction(text));
    }
  }
}

}  // namespace ionledger::testing
