// What is said about the states of a train.
#include <doctest/doctest.h>

#include "ionledger/assessment.hpp"
#include "support/compare.hpp"
#include "treatment/train_text.hpp"

namespace ionledger::testing {

TEST_SUITE("assessment/assess_train") {
  TEST_CASE("the states stand in order, each with what its step moved and the water beside it") {
    const TrainRun run = run_text(R"(
[stream]
temperature = "15 degC"
pH = 7.7
flow = "50 m3/h"
[analysis]
calcium = "62 mg/L"
magnesium = "9 mg/L"
sodium = "20 mg/L"
potassium = "2 mg/L"
chloride = "31 mg/L"
sulfate = "40 mg/L"
alkalinity = "160 mg/L as CaCO3"
[[step]]
name = "acid"
dose = "sulfuric acid 96 %"
amount = "20 mg/L"
[[step]]
concentrate = "50 % recovery"
[[step]]
heat_to = "60 degC"
[[step]]
name = "scale"
settle = ["calcite"]
)");
    Assessment assessment;
    assess_train(run.outcome, run.stream, *run.plant, assessment);
    REQUIRE(assessment.states.size() == 5);
    const char* const names[] = {"acid", "step_2", "step_2_permeate", "step_3", "scale"};
    for (std::size_t k = 0; k < 5; ++k) CHECK(assessment.states[k].name == names[k]);
    CHECK(assessment.states[0].added.front().kg_per_h.value() == rel(1.0, 1e-9));
    CHECK(assessment.states[0].flow_m3_per_h.value() == rel(50, 1e-4));
    CHECK(assessment.states[0].ph_from == "the balance of hydrogen through the steps");
    CHECK(assessment.states[0].cautions.front().about == "sulfuric acid 96 %");
    CHECK(assessment.states[1].water_kg_per_kg_feed == rel(0.5, 1e-4));
    const AssessedState& scale = assessment.states[4];
    CHECK(scale.deposited.front().what == "calcite");
    for (const MineralLine& line : scale.minerals) {
      if (line.mineral != "calcite") continue;
      CHECK(line.saturation_index == within(0, 1e-9));
      CHECK(line.deposit_mol_per_kg * scale.water_kg_per_kg_feed ==
            rel(scale.deposited.front().mol, 1e-9));
    }
    for (const AssessedState& state : assessment.states) {
      for (const Caution& caution : state.cautions) CHECK(caution.about != "missing ions");
    }
  }
}

}  // namespace ionledger::testing
