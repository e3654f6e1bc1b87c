#include <doctest/doctest.h>

#include <cmath>
#include <string>

#include "ionledger/readers.hpp"
#include "support/compare.hpp"

namespace ionledger::testing {
namespace {

const std::string example = R"(title = "Cooling loop, winter"
ppm_means = "mg/L"

[model]
activity = "davies"

[stream]
temperature = "18 degC"
pH   = "7.62 at 25 degC"
flow = "42 m3/h"
pressure = "2.5 bar"
conductivity = "850 uS/cm"
density = "1.002 kg/L"

[analysis]
sodium     = "41 ppm"
calcium    = "96 mg/L"
alkalinity = "212 mg/L as CaCO3"
chloride   = { value = "88 mg/L", uncertainty = "3 %" }
nitrate    = { value = "0.2 mmol/L", uncertainty = "10 umol/L" }
"Mg+2"     = "9,0 mg/L"

[balance]
closed_by = "sodium"
)";

/// The example with its one mistake, the comma, mended.
std::string mended() {
  std::string text = example;
  text.replace(text.find("9,0"), 3, "9.0");
  return text;
}

PlantFile read(const std::string& text) {
  Diagnostics diagnostics;
  auto plant = read_plant_file(text, "example.toml", diagnostics);
  REQUIRE_MESSAGE(plant, render(diagnostics));
  CHECK(diagnostics.empty());
  return std::move(*plant);
}

std::string refusal(const std::string& text) {
  Diagnostics diagnostics;
  CHECK_FALSE(read_plant_file(text, "example.toml", diagnostics));
  return render(diagnostics);
}

/// A small plant file whose [stream] has `line` besides a temperature.
std::string with_stream_line(const std::string& line) {
  return "[stream]\ntemperature = \"20 degC\"\n" + line + "\n[analysis]\n";
}

}  // namespace

TEST_SUITE("input/plant_file") {
  TEST_CASE("every key of a plant file arrives where it belongs") {
    const PlantFile plant = read(mended());
    const Analysis& analysis = plant.analysis;
    CHECK(analysis.title == "Cooling loop, winter");
    CHECK(plant.activity_model == "davies");
    CHECK(plant.activity_span.line == 5);
    CHECK(plant.activity_span.column == 12);
    CHECK(in_celsius(analysis.temperature) == within(18, 1e-12));
    REQUIRE(analysis.ph);
    CHECK(analysis.ph->value == 7.62);
    REQUIRE(analysis.ph->temperature);
    CHECK(in_celsius(*analysis.ph->temperature) == within(25, 1e-12));
    REQUIRE(analysis.flow);
    CHECK(analysis.flow->value() == rel(42.0 / 3600, 1e-14));
    CHECK(analysis.pressure.value() == rel(2.5e5, 1e-14));
    REQUIRE(analysis.conductivity);
    CHECK(analysis.conductivity->value() == rel(0.085, 1e-14));
    REQUIRE(analysis.density);
    CHECK(analysis.density->value() == rel(1002, 1e-14));
    CHECK(analysis.closure.by == Closure::By::constituent);
    CHECK(analysis.closure.constituent == "sodium");
    CHECK(analysis.closure.span.line == 24);
    CHECK(analysis.stream_span.line == 7);
  }

  TEST_CASE("reported values keep their order, their words and their places") {
    const PlantFile plant = read(mended());
    const auto& values = plant.analysis.values;
    REQUIRE(values.size() == 6);
    CHECK(values[0].key == "sodium");
    CHECK(values[2].text == "212 mg/L as CaCO3");
    CHECK(values[2].quantity.basis == "CaCO3");
    CHECK(values[2].quantity.value_in_si == rel(0.212, 1e-14));
    CHECK(values[2].key_span.line == 18);
    CHECK(values[2].key_span.column == 1);
    CHECK(values[2].value_span.column == 14);
    CHECK(values[5].key == "Mg+2");
  }

  TEST_CASE("ppm is what ppm_means says") {
    CHECK(read(mended()).analysis.values[0].quantity.value_in_si == rel(0.041, 1e-14));
  }

  TEST_CASE("an uncertainty is a share or a quantity of the same kind") {
    const PlantFile plant = read(mended());
    const auto& values = plant.analysis.values;
    CHECK_FALSE(values[0].relative_uncertainty);
    REQUIRE(values[3].relative_uncertainty);
    CHECK(*values[3].relative_uncertainty == rel(0.03, 1e-14));
    CHECK_FALSE(values[3].si_uncertainty);
    CHECK(values[3].text == "88 mg/L");
    CHECK(values[3].value_span.column == 24);
    REQUIRE(values[4].si_uncertainty);
    CHECK(*values[4].si_uncertainty == rel(0.01, 1e-14));
    CHECK_FALSE(values[4].relative_uncertainty);
  }

  TEST_CASE("what is left out takes its default") {
    const PlantFile plant = read("[stream]\ntemperature = \"20 degC\"\n[analysis]\n");
    CHECK(plant.analysis.title.empty());
    CHECK(plant.activity_model.empty());
    CHECK(plant.analysis.pressure.value() == 101325.0);
    CHECK_FALSE(plant.analysis.ph);
    CHECK_FALSE(plant.analysis.flow);
    CHECK_FALSE(plant.analysis.conductivity);
    CHECK_FALSE(plant.analysis.density);
    CHECK(plant.analysis.values.empty());
    CHECK(plant.analysis.closure.by == Closure::By::nothing);
  }

  TEST_CASE("pH may be a whole number, a number or text") {
    CHECK(read(with_stream_line("pH = 7")).analysis.ph->value == 7);
    CHECK(read(with_stream_line("pH = -1.5")).analysis.ph->value == -1.5);
    const PlantFile plant = read(with_stream_line("pH = \"7.62\""));
    CHECK(plant.analysis.ph->value == 7.62);
    CHECK_FALSE(plant.analysis.ph->temperature);
  }

  TEST_CASE("the ends of the range of pH are allowed and nothing beyond") {
    CHECK(read(with_stream_line("pH = -2")).analysis.ph->value == -2);
    CHECK(read(with_stream_line("pH = 16")).analysis.ph->value == 16);
    CHECK(refusal(with_stream_line("pH = 16.01")).find("not possible") != std::string::npos);
    CHECK(refusal(with_stream_line("pH = -2.01")).find("not possible") != std::string::npos);
  }

  TEST_CASE("nothing and pH close the balance in their own way") {
    const std::string base = with_stream_line("") + "[balance]\nclosed_by = ";
    CHECK(read(base + "\"nothing\"").analysis.closure.by == Closure::By::nothing);
    CHECK(read(base + "\"pH\"").analysis.closure.by == Closure::By::ph);
  }

  TEST_CASE("every unit of concentration is taken, and zero too") {
    for (const char* value : {"0 mg/L",
                              "1 mmol/L",
                              "1 meq/L",
                              "1 mmol/kg",
                              "1 meq/kg",
                              "1 mg/kg",
                              "1 % by mass",
                              "1 degdH",
                              "0 ug/L"}) {
      CAPTURE(value);
      CHECK(read(with_stream_line("") + "x = \"" + value + "\"").analysis.values.size() == 1);
    }
  }

  TEST_CASE("temperatures below freezing are the chemistry's business") {
    const PlantFile plant = read("[stream]\ntemperature = \"-3 degC\"\n[analysis]\n");
    CHECK(in_celsius(plant.analysis.temperature) == within(-3, 1e-12));
  }

  TEST_CASE("a byte order mark and line ends of two characters change nothing") {
    std::string text = "\xEF\xBB\xBF";
    for (const char c : example) text += c == '\n' ? std::string("\r\n") : std::string(1, c);
    CHECK(refusal(text) == refusal(example));
  }

  TEST_CASE("a mistake inside a text is found at its own column") {
    CHECK(refusal(example).substr(0, 25) == "example.toml:21:16: error");
  }

  TEST_CASE("a file beyond the limit is refused unread") {
    CHECK(refusal(std::string(max_file_bytes + 1, '\xFF')) ==
          "example.toml: error: the file is too large\n"
          "  found:    4194305 bytes\n"
          "  expected: at most 4194304 bytes\n");
  }

  TEST_CASE("dotted keys mean the same as sections") {
    const PlantFile plant = read("stream.temperature = \"20 degC\"\nanalysis.sodium = \"1 g/L\"\n");
    CHECK(in_celsius(plant.analysis.temperature) == within(20, 1e-12));
    CHECK(plant.analysis.values.size() == 1);
  }

  TEST_CASE("every beginning of a plant file is read or refused with a reason") {
    const std::string text = mended();
    int refused = 0;
    for (std::size_t length = 0; length <= text.size(); ++length) {
      Diagnostics diagnostics;
      const auto plant = read_plant_file(text.substr(0, length), "example.toml", diagnostics);
      CAPTURE(length);
      CHECK(plant.has_value() != diagnostics.has_errors());
      refused += plant ? 0 : 1;
    }
    CHECK(refused > 200);
  }

  TEST_CASE("no row of dots or brackets exhausts the stack") {
    const std::string dots = "a" + [] {
      std::string levels;
      for (int i = 0; i < 1000000; ++i) levels += ".a";
      return levels;
    }();
    CHECK(refusal(dots + " = 1").find("too many levels") != std::string::npos);
    CHECK(refusal(dots + " = !").find("too many levels") != std::string::npos);
    CHECK(refusal("a = " + std::string(1000000, '[')).find("nested too deeply") !=
          std::string::npos);
  }

  TEST_CASE("of countless mistakes a bounded number is kept") {
    std::string text = with_stream_line("");
    for (int i = 0; i < 5000; ++i) text += "x" + std::to_string(i) + " = 1\n";
    Diagnostics diagnostics;
    CHECK_FALSE(read_plant_file(text, "example.toml", diagnostics));
    CHECK(diagnostics.sorted().size() == 1000);
  }
}

}  // namespace ionledger::testing
