// The texts a person writes, and their values in SI by definition of the units.
#include <doctest/doctest.h>

#include "support/compare.hpp"
#include "units/reading.hpp"

using namespace ionledger;
using namespace ionledger::testing;

namespace {

// A product of two or three exactly rounded factors: a few units in the last place.
constexpr double rounding = 1e-15;

}  // namespace

TEST_SUITE("units/read_quantity") {
  TEST_CASE("number, unit and basis are kept as written") {
    const WrittenQuantity written = read("  212 mg/L as CaCO3 ");
    CHECK(written.number == 212);
    CHECK(written.unit == "mg/L");
    CHECK(written.basis == "CaCO3");
    CHECK(written.value_in_si == rel(0.212, rounding));
    CHECK(written.dimension == DimensionExponents{-3, 1, 0, 0, 0, 0, 0});
    CHECK(written.meaning == Meaning::plain);
    CHECK(read("5 µg / m³").unit == "µg / m³");
    CHECK(read("3 % by mass").unit == "% by mass");
    CHECK(read("96 mg/L").basis.empty());
    CHECK(read("3 % by mass as NaOH").basis == "NaOH");
  }

  TEST_CASE("concentrations per volume are in kg, mol or eq per cubic metre") {
    CHECK(read_as<Density>("96 mg/L").value() == rel(0.096, rounding));
    CHECK(read_as<Density>("850 ug/L").value() == rel(850e-6, rounding));
    CHECK(read_as<Density>("1.1 g/L").value() == rel(1.1, rounding));
    CHECK(read_as<Density>("998 kg/m3").value() == 998);
    CHECK(read_as<Density>("14 mg/L as SiO2").value() == rel(0.014, rounding));
    CHECK(read_as<AmountPerVolume>("2.1 mmol/L").value() == rel(2.1, rounding));
    CHECK(read_as<AmountPerVolume>("0.5 mol/L").value() == rel(500, rounding));
    CHECK(read_as<EquivalentPerVolume>("4.8 meq/L").value() == rel(4.8, rounding));
  }

  TEST_CASE("concentrations per mass are in mol, eq or kg per kg") {
    CHECK(read_as<AmountPerMass>("0.025 mol/kg").value() == 0.025);
    CHECK(read_as<AmountPerMass>("25 mmol/kg").value() == rel(0.025, rounding));
    CHECK(read_as<EquivalentPerMass>("3 meq/kg").value() == rel(0.003, rounding));
    CHECK(read_as<MassFraction>("120 mg/kg").kg_per_kg == rel(120e-6, rounding));
    CHECK(read_as<MassFraction>("35 g/kg").kg_per_kg == rel(0.035, rounding));
    CHECK(read_as<MassFraction>("3 % by mass").kg_per_kg == rel(0.03, rounding));
    CHECK(read_as<MassFraction>("3%  by  mass").kg_per_kg == rel(0.03, rounding));
    CHECK(read_as<Ratio>("30 %").value == rel(0.3, rounding));
  }

  TEST_CASE("hardness degrees are two equivalents per mole of CaO or CaCO3") {
    // DIN 38409-6: 1 degdH = 0.1783 mmol/L of Ca and Mg, printed to four digits; hence 0.3566
    // eq/m3.
    CHECK(read_as<EquivalentPerVolume>("1 degdH").value() == within(0.3566, 1e-4));
    CHECK(read_as<EquivalentPerVolume>("12 degdH").value() ==
          rel(12 * 10 * 2 / (40.078 + 15.999), rounding));
    const double caco3 = 40.078 + 12.011 + 3 * 15.999;
    CHECK(read_as<EquivalentPerVolume>("1 degfH").value() == rel(10 * 2 / caco3, rounding));
    CHECK(read_as<EquivalentPerVolume>("1 degeH").value() == rel(14.254 * 2 / caco3, rounding));
    CHECK(read("12 °dH").value_in_si == read("12 degdH").value_in_si);
  }

  TEST_CASE("temperatures are absolute, whatever their zero") {
    CHECK(in_kelvin(read_as<Temperature>("18 degC")) == rel(291.15, rounding));
    CHECK(in_kelvin(read_as<Temperature>("-40 degC")) ==
          rel(in_kelvin(read_as<Temperature>("-40 degF")), rounding));
    CHECK(in_kelvin(read_as<Temperature>("64 degF")) == rel((64 + 459.67) / 1.8, rounding));
    CHECK(in_celsius(read_as<Temperature>("212 degF")) == within(100, 1e-12));  // K, rounding
    CHECK(in_kelvin(read_as<Temperature>("291 K")) == 291);
    CHECK(in_kelvin(read_as<Temperature>("0 K")) == 0);
    CHECK(in_kelvin(read_as<Temperature>("-273.15 degC")) == 0);
    CHECK(read("18 °C").value_in_si == read("18 degC").value_in_si);
    CHECK(read("18℃").value_in_si == read("18 degC").value_in_si);
    CHECK(read("64 °F").value_in_si == read("64 degF").value_in_si);
    CHECK(in_celsius(celsius(25)) == within(25, 1e-13));  // K, one rounding at 300
  }

  TEST_CASE("flows") {
    CHECK(read_as<VolumeFlow>("42 m3/h").value() == rel(42.0 / 3600, rounding));
    CHECK(read_as<VolumeFlow>("3 L/s").value() == rel(0.003, rounding));
    // NIST SP 811 (2008), appendix B.8: 1 gallon (US) per minute = 6.309 020 E-05 m3/s.
    CHECK(read_as<VolumeFlow>("1 gpm").value() == within(6.309020e-5, 0.5e-11));
    CHECK(read_as<VolumeFlow>("185 gal/min").value() ==
          rel(read_as<VolumeFlow>("185 gpm").value(), rounding));
    CHECK(read_as<MassFlow>("36 kg/h").value() == rel(0.01, rounding));
    CHECK(read_as<MassFlow>("1 lb/h").value() == rel(0.45359237 / 3600, rounding));
    CHECK(read_as<MassFlow>("2 kg/h as Cl2").value() == rel(2.0 / 3600, rounding));
  }

  TEST_CASE("pressures") {
    CHECK(read_as<Pressure>("1.2 bar").value() == rel(1.2e5, rounding));
    CHECK(read_as<Pressure>("1 atm").value() == 101325);
    CHECK(read_as<Pressure>("80 kPa").value() == rel(8e4, rounding));
    CHECK(read_as<Pressure>("900 mbar").value() == rel(9e4, rounding));
    // NIST SP 811 (2008), appendix B.8: 1 psi = 6.894 757 E+03 Pa.
    CHECK(read_as<Pressure>("1 psi").value() == within(6894.757, 0.5e-3));
    CHECK(read_as<Pressure>("14.7 psi").value() == rel(14.7 * 6894.757293168, 1e-12));
    CHECK(read_as<Pressure>("1 kg*m^-1*s^-2").value() == 1);
  }

  TEST_CASE("conductivities and potentials") {
    CHECK(read_as<Conductivity>("912 uS/cm").value() == rel(0.0912, rounding));
    CHECK(read_as<Conductivity>("9.12 mS/cm").value() == rel(0.912, rounding));
    CHECK(read_as<Conductivity>("91.2 mS/m").value() == rel(0.0912, rounding));
    CHECK(read_as<ElectricPotential>("-120 mV").value() == rel(-0.12, rounding));
    CHECK(read_as<ElectricPotential>("0.3 V").value() == 0.3);
  }

  TEST_CASE("a share of volume has no dimension and is neither a ratio nor a mass fraction") {
    const WrittenQuantity written = read("40 mL/m3");
    CHECK(written.value_in_si == rel(40e-6, rounding));
    CHECK(written.dimension == DimensionExponents{});
    CHECK(written.meaning == Meaning::plain);
  }

  TEST_CASE("one unit has many spellings") {
    const double value_in_si = read("850 ug/m3").value_in_si;
    for (const char* text : {"850 \u00B5g/m3",
                             "850 \u03BCg/m3",
                             "850ug/m3",
                             "+850 ug/m^3",
                             "850 ug/m³",
                             "850.0 ug.m-3",
                             "8.5e2 ug*m^-3",
                             "850\u00A0µg·m⁻³",
                             "850 ug / m3",
                             "0.850E+3\tug/m3"}) {
      CAPTURE(text);
      CHECK(read(text).value_in_si == rel(value_in_si, rounding));
      CHECK(read(text).dimension == DimensionExponents{-3, 1, 0, 0, 0, 0, 0});
    }
    CHECK(read("5 ml/l").value_in_si == rel(0.005, rounding));
    CHECK(read("\u22125 mV").number == -5);
  }

  TEST_CASE("numbers are read to the last bit") {
    CHECK(read("0.1 mol/kg").number == 0.1);
    CHECK(read(".5 V").number == 0.5);
    CHECK(read("5. V").number == 5);
    CHECK(read("1.7976931348623157e3 V").number == 1797.6931348623157);
    CHECK(read("-0 V").number == 0);
    CHECK(read("5e-3 V").number == 0.005);
    CHECK(read("2 eq/L").number == 2);  // not an exponent
  }

  TEST_CASE("negative numbers are left to the reader of the file") {
    CHECK(read("-3 mg/L").value_in_si == rel(-0.003, rounding));
  }

  TEST_CASE("ppm means what the caller says") {
    const auto volume =
        std::get<WrittenQuantity>(read_quantity("40 ppm as CaCO3", PpmMeaning::mg_per_litre));
    CHECK(std::get<Density>(to<Density>(volume)).value() == rel(0.04, rounding));
    CHECK(volume.basis == "CaCO3");
    CHECK(volume.unit == "ppm");
    const auto mass = std::get<WrittenQuantity>(read_quantity("40 ppm", PpmMeaning::mg_per_kg));
    CHECK(std::get<MassFraction>(to<MassFraction>(mass)).kg_per_kg == rel(40e-6, rounding));
  }
}
