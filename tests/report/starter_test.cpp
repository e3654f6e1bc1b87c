// The plant file people start from must be one.
#include <string>

#include "ionledger/report.hpp"
#include "ionledger/stream.hpp"
#include "support/compare.hpp"
#include "support/water.hpp"

using namespace ionledger;
using ionledger::testing::within;

namespace {

/// Takes the "# " off every line that is a commented-out key, as a user would.
std::string with_options_on(std::string text) {
  for (const char* key : {"ppm_means", "conductivity", "density", "pressure"}) {
    const std::string commented = std::string("# ") + key + " = ";
    const std::size_t at = text.find(commented);
    REQUIRE(at != std::string::npos);
    text.erase(at, 2);
  }
  return text;
}

}  // namespace

TEST_SUITE("report/starter") {
  TEST_CASE("The starter file is valid, with its options on or off") {
    for (const std::string& text : {starter_plant_file(), with_options_on(starter_plant_file())}) {
      Diagnostics diagnostics;
      const auto plant = read_plant_file(text, "starter.toml", diagnostics);
      INFO(render(diagnostics));
      REQUIRE(plant.has_value());
      CHECK(diagnostics.empty());
      CHECK(plant->analysis.values.size() == 9);
      CHECK(testing::models().activity_model(plant->activity_model) != nullptr);
    }
  }

  TEST_CASE("Its analysis balances within 1 %") {
    Diagnostics diagnostics;
    const auto plant = read_plant_file(starter_plant_file(), "starter.toml", diagnostics);
    REQUIRE(plant.has_value());
    const Chemistry& chemistry = testing::models().chemistry;
    const auto stream = make_stream(plant->analysis, chemistry, diagnostics);
    INFO(render(diagnostics));
    REQUIRE(stream.has_value());
    // By hand, meq/L: Ca 4.791, Mg 1.240, Na 1.740, K 0.120 against alkalinity 4.236, Cl 1.750,
    // SO4 1.749, NO3 0.200: 7.891 against 7.935, -0.28 %.
    CHECK(balance_of_report(*stream, chemistry).imbalance_percent == within(-0.28, 0.02));
  }
}
