// Quantities asked for as the wrong type: told what they are, what was wanted, and which units fit.
#include <doctest/doctest.h>

#include <string>

#include "support/compare.hpp"
#include "units/dimension_of.hpp"
#include "units/reading.hpp"

using namespace ionledger;
using namespace ionledger::testing;

// Products are of the types they ought to be: no power of zero lingers in a dimension.
static_assert(std::is_same_v<decltype(Density() * VolumeFlow()), MassFlow>);
static_assert(std::is_same_v<decltype(AmountPerMass() * Density()), AmountPerVolume>);
static_assert(units::dimension_of<Pressure> == DimensionExponents{-1, 1, -2, 0, 0, 0, 0});
static_assert(units::dimension_of<Temperature> == DimensionExponents{0, 0, 0, 0, 1, 0, 0});
static_assert(units::dimension_of<EquivalentPerMass> == DimensionExponents{0, -1, 0, 0, 0, 0, 1});
static_assert(units::dimension_of<Conductivity> == DimensionExponents{-3, -1, 3, 2, 0, 0, 0});

TEST_SUITE("units/convert") {
  TEST_CASE("a temperature is no concentration") {
    const UnitError error = refuse_as<AmountPerVolume>("18 degC");
    CHECK(error.summary == "\"18 degC\" is a temperature, not an amount concentration");
    CHECK(error.found == "\"18 degC\"");
    CHECK(error.expected == "an amount concentration, in units such as \"mmol/L\" or \"mol/m3\"");
  }

  TEST_CASE("the basis is echoed, and otherwise left to chemistry") {
    CHECK(refuse_as<VolumeFlow>("212 mg/L as CaCO3").summary ==
          "\"212 mg/L as CaCO3\" is a mass concentration or density, not a volume flow");
    CHECK(read_as<Density>("212 mg/L as CaCO3").value() == rel(0.212, 1e-15));
  }

  TEST_CASE("equivalents never become moles by themselves") {
    const UnitError error = refuse_as<AmountPerVolume>("4.8 meq/L");
    CHECK(error.summary ==
          "\"4.8 meq/L\" is an equivalent concentration, not an amount concentration");
    CHECK(error.fix ==
          "equivalents and moles differ by the charge number; write the one asked for");
    CHECK(refuse_as<EquivalentPerMass>("2 mmol/kg").fix == error.fix);
    CHECK(refuse_as<AmountPerVolume>("12 degdH").fix == error.fix);
  }

  TEST_CASE("a share and a mass fraction are told apart") {
    CHECK(refuse_as<MassFraction>("3 %").fix == "write \"3 % by mass\"");
    CHECK(refuse_as<Ratio>("3 % by mass").fix == "write \"3 %\"");
    CHECK(refuse_as<Ratio>("120 mg/kg").summary == "\"120 mg/kg\" is a mass fraction, not a ratio");
    CHECK(refuse_as<Ratio>("40 mL/m3").summary ==
          "\"40 mL/m3\" is a share of volume or amount, not a ratio");
  }

  TEST_CASE("a temperature and a difference of temperatures never mix") {
    CHECK(read_as<TemperatureDifference>("5 K").value() == 5);
    const UnitError error = refuse_as<TemperatureDifference>("5 degC");
    CHECK(error.summary == "\"5 degC\" is a temperature, not a temperature difference");
    CHECK(error.fix == "write the difference in kelvin: 9 degF of difference are 5 K");
    CHECK(refuse_as<Temperature>("5 K*m/m").summary ==
          "\"5 K*m/m\" is a temperature difference, not a temperature");
  }

  TEST_CASE("a dimension without a name of its own is still refused in words") {
    CHECK(refuse_as<Pressure>("5 m2").summary == "\"5 m2\" is an area, not a pressure");
    CHECK(refuse_as<Pressure>("5 m7").summary ==
          "\"5 m7\" is a quantity of another kind, not a pressure");
  }

  TEST_CASE("every type takes its own unit and refuses those of all others") {
    const char* const texts[] = {"18 degC",
                                 "1 bar",
                                 "1 m3/h",
                                 "1 kg/h",
                                 "1 mg/L",
                                 "1 mmol/L",
                                 "1 meq/L",
                                 "1 mol/kg",
                                 "1 meq/kg",
                                 "1 uS/cm",
                                 "1 mV",
                                 "1 % by mass",
                                 "1 %",
                                 "1 K*m/m"};
    for (const char* text : texts) {
      CAPTURE(text);
      const WrittenQuantity written = read(text);
      const auto fits = [&]<class Q>(std::type_identity<Q>) {
        return std::holds_alternative<Q>(to<Q>(written)) ? 1 : 0;
      };
      const int n_types =
          fits(std::type_identity<Temperature>{}) +
          fits(std::type_identity<TemperatureDifference>{}) + fits(std::type_identity<Pressure>{}) +
          fits(std::type_identity<VolumeFlow>{}) + fits(std::type_identity<MassFlow>{}) +
          fits(std::type_identity<Density>{}) + fits(std::type_identity<AmountPerVolume>{}) +
          fits(std::type_identity<EquivalentPerVolume>{}) +
          fits(std::type_identity<AmountPerMass>{}) +
          fits(std::type_identity<EquivalentPerMass>{}) + fits(std::type_identity<Conductivity>{}) +
          fits(std::type_identity<ElectricPotential>{}) + fits(std::type_identity<MassFraction>{}) +
          fits(std::type_identity<Ratio>{});
      CHECK(n_types == 1);
    }
  }
}
