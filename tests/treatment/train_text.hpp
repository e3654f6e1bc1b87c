// Trains for tests, written as a plant file has them.
#pragma once

#include <doctest/doctest.h>

#include <string>

#include "ionledger/readers.hpp"
#include "ionledger/treatment.hpp"
#include "support/water.hpp"

namespace ionledger::testing {

/// A plant file, closed and run.
struct TrainRun {
  Stream stream;
  Water feed;
  Train train;
  std::optional<Plant> plant;
  TrainOutcome outcome;

  [[nodiscard]] const StepOutcome& step(const std::string& name) const {
    for (const StepOutcome& step : outcome.steps) {
      if (step.name == name) return step;
    }
    FAIL("no step ", name);
    return outcome.steps.front();
  }
  [[nodiscard]] const Water& last() const {
    return outcome.steps.empty() ? feed : outcome.steps.back().water;
  }
  [[nodiscard]] const Water& beside(const std::string& name, const std::string& side) const {
    for (const auto& [which, water] : step(name).record.beside) {
      if (which == side) return water;
    }
    FAIL("no ", side);
    return feed;
  }
};

inline PlantFile plant_file(const std::string& text) {
  Diagnostics diagnostics;
  auto file = read_plant_file(text, "test.toml", diagnostics);
  if (!file) FAIL(render(diagnostics));
  return std::move(*file);
}

/// The feed of `text`, and its train, not yet run.
inline TrainRun prepared(const std::string& text, const ActivityModel& model) {
  const Chemistry& chemistry = models().chemistry;
  Diagnostics diagnostics;
  PlantFile file = plant_file(text);
  auto stream = make_stream(file.analysis, chemistry, diagnostics);
  if (!stream) FAIL(render(diagnostics));
  const auto closed = close_stream(*stream, chemistry, model, diagnostics);
  if (!closed) FAIL(render(diagnostics));
  REQUIRE_MESSAGE(closed->status == SolveStatus::converged, closed->reason);
  TrainRun run;
  run.stream = *stream;
  run.feed = water_of(*stream, *closed, chemistry);
  run.train = std::move(file.train);
  run.plant.emplace(plant_of(run.stream, run.feed, chemistry, model, models().supplies));
  return run;
}

/// Checks the train and runs it; `blend` is the water of every Blend.
inline void run_checked(TrainRun& run, const Water* blend = nullptr) {
  Diagnostics diagnostics;
  if (!check_train(run.train,
                   models().chemistry,
                   models().supplies,
                   run.stream.flow.has_value(),
                   diagnostics)) {
    FAIL(render(diagnostics));
  }
  for (Step& step : run.train) {
    if (auto* wanted = std::get_if<Blend>(&step.action)) {
      REQUIRE(blend != nullptr);
      wanted->water = *blend;
    }
  }
  run.outcome = run_train(run.train, run.feed, *run.plant);
}

inline TrainRun run_text(const std::string& text,
                         const Water* blend = nullptr,
                         const ActivityModel& model = default_activity_model()) {
  TrainRun run = prepared(text, model);
  run_checked(run, blend);
  REQUIRE_MESSAGE(run.outcome.is_complete(), run.outcome.failed_step << ": " << run.outcome.reason);
  return run;
}

/// What the checker says about a train.
inline std::string findings(const std::string& text) {
  const TrainRun run = prepared(text, default_activity_model());
  Diagnostics diagnostics;
  const bool good = check_train(
      run.train, models().chemistry, models().supplies, run.stream.flow.has_value(), diagnostics);
  CHECK(good == diagnostics.empty());
  return render(diagnostics);
}

inline double total(const Water& water, const std::string& species) {
  return water.totals[static_cast<std::size_t>(models().chemistry.species_index(species))];
}

}  // namespace ionledger::testing
