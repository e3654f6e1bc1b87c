// Checks a train and reads the other waters that it blends in.
#include "app/train.hpp"

#include <filesystem>

#include "app/files.hpp"
#include "ionledger/equilibrium.hpp"

namespace ionledger::app {
namespace {

std::string beside(const std::string& file, const std::string& other) {
  const std::filesystem::path path(other);
  if (path.is_absolute() || file == "-") return other;
  return (std::filesystem::path(file).parent_path() / path).string();
}

std::optional<Water> feed_of(const std::string& path,
                             const Word& word,
                             const Models& models,
                             const ActivityModel& model,
                             Diagnostics& diagnostics) {
  const std::optional<std::string> text = read_text(path, diagnostics);
  if (!text) return std::nullopt;
  const std::optional<PlantFile> plant = read_plant_file(*text, path, diagnostics);
  if (!plant) return std::nullopt;
  const std::optional<Stream> stream = make_stream(plant->analysis, models.chemistry, diagnostics);
  if (!stream) return std::nullopt;
  const std::optional<ClosedStream> closed =
      close_stream(*stream, models.chemistry, model, diagnostics);
  if (!closed) return std::nullopt;
  if (closed->status != SolveStatus::converged) {
    diagnostics.error(word.span,
                      "the water to blend with has no solution",
                      "\"" + word.text + "\": " + closed->reason,
                      "a plant file that can be assessed by itself");
    return std::nullopt;
  }
  return water_of(*stream, *closed, models.chemistry);
}

}  // namespace

bool prepare_train(const std::string& file, Inputs& inputs, Diagnostics& diagnostics) {
  bool good = check_train(inputs.train,
                          inputs.models.chemistry,
                          inputs.models.supplies,
                          inputs.stream.flow.has_value(),
                          diagnostics);
  for (Step& step : inputs.train) {
    auto* const blend = std::get_if<Blend>(&step.action);
    if (blend == nullptr) continue;
    blend->water = feed_of(beside(file, blend->other.text),
                           blend->other,
                           inputs.models,
                           inputs.activity_model,
                           diagnostics);
    good = good && blend->water.has_value();
  }
  return good;
}

}  // namespace ionledger::app
