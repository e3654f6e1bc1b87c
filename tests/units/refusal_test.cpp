// Texts that are no quantities: each is refused at the right byte, in words that help.
#include <doctest/doctest.h>

#include <string>

#include "units/reading.hpp"

using namespace ionledger;
using namespace ionledger::testing;

namespace {

bool contains(const std::string& text, const std::string& part) {
  return text.find(part) != std::string::npos;
}

}  // namespace

TEST_SUITE("units/refusal") {
  TEST_CASE("an empty text is no quantity") {
    for (const char* text : {"", "   ", "\t", "\u00A0"}) {
      const UnitError error = refuse(text);
      CHECK(error.offset == 0);
      CHECK(error.summary == "an empty text is not a quantity");
      CHECK(contains(error.expected, "\"96 mg/L\""));
    }
  }

  TEST_CASE("a number without a unit is refused at its end") {
    const UnitError error = refuse("96");
    CHECK(error.offset == 2);
    CHECK(error.summary == "\"96\" has no unit");
    CHECK(error.found == "\"96\"");
    CHECK(error.fix == "write the unit behind it");
    CHECK(refuse("96 as CaCO3").summary == "\"96 as CaCO3\" has no unit");
  }

  TEST_CASE("a comma in a number is refused with the readings it allows") {
    const UnitError decimal = refuse("1,5 mg/L");
    CHECK(decimal.offset == 1);
    CHECK(decimal.summary == "a comma in the number \"1,5\"");
    CHECK(decimal.fix == "write \"1.5\"");
    CHECK(refuse("1,234 mg/L").fix == "write \"1.234\" or \"1234\"");
    CHECK(refuse("1.234,5 mg/L").fix == "write \"1234.5\"");
    CHECK(refuse("1,234.5 mg/L").fix == "write \"1234.5\"");
    CHECK(refuse("1,234,567 mg/L").fix == "write \"1234567\"");
    CHECK(refuse("1.234.567 mg/L").fix == "write \"1234567\"");
  }

  TEST_CASE("blanks, apostrophes and underscores do not group digits") {
    const UnitError blank = refuse("10 000 mg/L");
    CHECK(blank.offset == 2);
    CHECK(blank.summary == "a separator in the number \"10 000\"");
    CHECK(blank.fix == "write \"10000\"");
    CHECK(refuse("10'000 mg/L").fix == "write \"10000\"");
    CHECK(refuse("10_000 mg/L").fix == "write \"10000\"");
    CHECK(refuse("10\u202F000 mg/L").fix == "write \"10000\"");
  }

  TEST_CASE("what is not a finite decimal number is refused") {
    CHECK(refuse("nan mg/L").summary == "\"nan mg/L\" is not a finite number");
    CHECK(refuse("-Inf mg/L").summary == "\"-Inf mg/L\" is not a finite number");
    CHECK(refuse("0x1F mg/L").summary == "hexadecimal numbers are not read");
    CHECK(refuse("1e999 mg/L").summary == "\"1e999\" is beyond the numbers this program can hold");
    CHECK(refuse("1e-999 mg/L").fix == "check the exponent");
    CHECK(refuse("1e-320 mg/L").fix == "check the exponent");
    CHECK(refuse("1e308 t/mm9").fix == "check the exponent");
    CHECK(refuse("1e-300 mm9").fix == "check the exponent");
    CHECK(refuse("mg/L").summary == "\"mg/L\" does not begin with a number");
    CHECK(refuse("--5 mg/L").summary == "\"--5 mg/L\" does not begin with a number");
    CHECK(refuse(". mg/L").summary == "\". mg/L\" does not begin with a number");
    CHECK(refuse("10^3 mg/L").fix == "write \"1.5e3\" for 1.5*10^3");
    CHECK(refuse("1.5 x 10³ mg/L").summary == "powers of ten are written with e");
    CHECK(refuse("10³ mg/L").summary == "powers of ten are written with e");
  }

  TEST_CASE("bounds and ranges are not values") {
    const UnitError below = refuse("< 0.5 mg/L");
    CHECK(below.summary == "\"< 0.5 mg/L\" is a bound, not a value");
    CHECK(contains(below.fix, "half the detection limit"));
    CHECK(refuse("5-10 mg/L").summary == "\"5-10 mg/L\" is more than one number");
    CHECK(refuse("5 +- 1 mg/L").offset == 2);
    CHECK(refuse("5 ± 1 mg/L").summary == "\"5 ± 1 mg/L\" is more than one number");
  }

  TEST_CASE("an unknown unit brings the nearest known one") {
    const UnitError error = refuse("96 mgg/L");
    CHECK(error.offset == 3);
    CHECK(error.summary == "unknown unit \"mgg/L\"");
    CHECK(error.found == "\"96 mgg/L\"");
    CHECK(contains(error.expected, "\"mg/L\""));
    CHECK(error.fix == "did you mean \"mg/L\"?");
    CHECK(refuse("42 m3/hr").fix == "did you mean \"m3/h\"?");
    CHECK(refuse("42 m³/hr").offset == 7);
    CHECK(refuse("42 m³/hr").fix == "did you mean \"m³/h\"?");
    CHECK(refuse("4.8 mEq/L").fix == "did you mean \"meq/L\"?");
    CHECK(refuse("18 C").fix == "did you mean \"degC\"?");
    CHECK(refuse("18 ° C").fix == "write degC or degF, in one word");
    CHECK(refuse("18 Celsius").fix == "did you mean \"degC\"?");
    CHECK(refuse("3 wt%").fix == "did you mean \"% by mass\"?");
    CHECK(refuse("4.2 cycles").summary == "unknown unit \"cycles\"");
    CHECK(refuse("4.2 cycles").fix.empty());
  }

  TEST_CASE("words that two trades read differently are refused with the question") {
    CHECK(refuse("5 ppm").summary == "ppm is used for both: mg/L or mg/kg?");
    CHECK(refuse("5 ppm").offset == 2);
    CHECK(refuse("5 ppb").fix == "write ug/L or ug/kg");
    CHECK(contains(refuse("5 Mg/L").fix, "write mg for milligrams"));
    CHECK(contains(refuse("2 barg").fix, "absolute pressure"));
    CHECK(contains(refuse("20 °f").fix, "degfH"));
    CHECK(refuse("0.1 M").fix == "write mol/L");
    CHECK(std::holds_alternative<UnitError>(read_quantity("5 ppb", PpmMeaning::mg_per_kg)));
    CHECK(std::holds_alternative<UnitError>(read_quantity("5 ppm/h", PpmMeaning::mg_per_kg)));
  }

  TEST_CASE("a digit zero in a formula is taken for the letter O") {
    const UnitError error = refuse("5 mg/l as CaC03");
    CHECK(error.offset == 13);
    CHECK(error.summary == "unknown unit \"mg/l as CaC03\"");
    CHECK(error.fix == "did you mean \"mg/l as CaCO3\"? (the letter O, not the digit 0)");
    CHECK(read("5 mg/L as C10H22").basis == "C10H22");
  }

  TEST_CASE("the formula behind as is one word") {
    CHECK(refuse("5 mg/L as").offset == 9);
    CHECK(refuse("5 mg/L as").summary == "\"5 mg/L as\" ends behind \"as\"");
    CHECK(refuse("5 mg/L as Ca CO3").summary == "unexpected \"CO3\" behind the formula");
    CHECK(refuse("5 mg/L as CaCO3, total").summary == "\"CaCO3,\" is not a formula");
    CHECK(refuse("5 mg/L as CaCO₃").fix == "use plain letters and digits");
    CHECK(refuse("5 mg/L CaCO3").fix == "did you mean \"mg/L as CaCO3\"?");
    CHECK(contains(refuse("5 mg CaCO3/L").fix, "a formula goes behind"));
    CHECK(refuse("5 mg-N/L").summary == "unexpected character \"-\" in the unit \"mg-N/L\"");
    CHECK(refuse("18 degC as CaCO3").summary == "a temperature cannot be \"as\" a formula");
    CHECK(refuse("3 % as NaOH").fix == "write \"% by mass as ...\"");
  }

  TEST_CASE("units are joined by one quotient at most, powers are small whole numbers") {
    CHECK(refuse("5 kg/m2/s").offset == 7);
    CHECK(contains(refuse("5 kg/m2*s").summary, "can be read in two ways"));
    CHECK(refuse("5 mg/").summary == "\"mg/\" ends before its last unit");
    CHECK(refuse("5 mg//L").summary == "unexpected character \"/\" in the unit \"mg//L\"");
    CHECK(refuse("5 mg/(L)").summary == "unexpected character \"(\" in the unit \"mg/(L)\"");
    CHECK(refuse("5 mg L").summary == "nothing joins the words of the unit \"mg L\"");
    CHECK(contains(refuse("5 m0").summary, "power"));
    CHECK(contains(refuse("5 m^").summary, "power"));
    CHECK(contains(refuse("5 m10").summary, "power"));
    CHECK(contains(refuse("5 m99999999999999999999").summary, "power"));
    CHECK(contains(refuse("5 mm9*mm9*mm9*mm9*mm9*mm9*mm9*mm9*mm9*mm9*mm9*mm9*mm9").summary,
                   "powers"));
    CHECK(refuse("5 degC/h").summary == "\"degC\" cannot be part of a product, quotient or power");
    CHECK(refuse("5 m3*degC").offset == 5);
    CHECK(contains(refuse("5 degdH2").summary, "cannot be part"));
    CHECK(refuse("5 % by volume").fix == "write mL/L for a share of the volume");
    CHECK(refuse("75 % recovery").summary == "unknown unit \"% recovery\"");
  }

  TEST_CASE("no temperature lies below absolute zero") {
    const UnitError error = refuse("-273.16 degC");
    CHECK(error.offset == 0);
    CHECK(error.summary == "\"-273.16 degC\" is below absolute zero");
    CHECK(contains(refuse("-460 degF").summary, "absolute zero"));
    CHECK(contains(refuse("-1 K").summary, "absolute zero"));
  }

  TEST_CASE("a long text is refused unread, its beginning quoted") {
    const std::string fits = "5 mg/L" + std::string(max_quantity_text - 6, ' ');
    CHECK(std::holds_alternative<WrittenQuantity>(read_quantity(fits)));
    const UnitError error = refuse(fits + " ");
    CHECK(error.offset == max_quantity_text);
    CHECK(error.summary == "a text of 201 bytes is too long for a quantity");
    CHECK(error.found.size() < 60);
  }

  TEST_CASE("signs with no meaning here are quoted, whatever their bytes") {
    CHECK(refuse("5 €/L").summary == "unexpected character \"€\" in the unit \"€/L\"");
    CHECK(refuse("5 \xB5g/L").offset == 2);  // Latin-1
    CHECK(refuse(std::string_view("5 mg\0L", 6)).offset == 4);
    CHECK(refuse("5 mg/L\n").offset == 6);
  }

  TEST_CASE("every beginning of a good text is refused or read, never worse") {
    const std::string text = "-1.25e-1 µmol·m⁻³ as CaSO4";
    for (std::size_t length = 0; length <= text.size(); ++length) {
      const auto result = read_quantity(text.substr(0, length));
      if (const auto* error = std::get_if<UnitError>(&result)) {
        CHECK(error->offset <= length);
        CHECK_FALSE(error->summary.empty());
        CHECK_FALSE(error->expected.empty());
      }
    }
  }
}
