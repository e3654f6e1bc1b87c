// Reading models and plant file.
#include "app/inputs.hpp"

#include <utility>

#include "app/files.hpp"

namespace ionledger::app {
namespace {

/// The model the plant file asks for; nullptr, with an error that lists what there is, when there
/// is none of that name.
const ActivityModel* chosen_model(const PlantFile& plant,
                                  const Models& models,
                                  Diagnostics& diagnostics) {
  const bool is_default = plant.activity_model.empty();
  const std::string& name = is_default ? models.default_activity_model : plant.activity_model;
  const ActivityModel* model = models.activity_model(name);
  if (model != nullptr) return model;
  std::vector<std::string> names;
  std::string listed;
  for (const ActivityModel& known : models.activity_models) {
    names.push_back(known.name);
    listed += (listed.empty() ? "\"" : ", \"") + known.name + "\"";
  }
  const std::string nearest = nearest_word(name, names);
  diagnostics.error(plant.activity_span,
                    "unknown activity model \"" + name + "\"",
                    "\"" + name + "\" for model.activity",
                    "one of " + listed,
                    nearest.empty() ? "" : "did you mean \"" + nearest + "\"?");
  return nullptr;
}

}  // namespace

std::optional<Models> load_models(const std::string& folder, Diagnostics& diagnostics) {
  if (folder.empty()) return read_models(built_in_models(), diagnostics);
  const auto files = read_model_folder(folder, diagnostics);
  if (!files) return std::nullopt;
  return read_models(*files, diagnostics);
}

std::optional<Inputs> load_inputs(const std::string& file,
                                  const std::string& model_folder,
                                  Diagnostics& diagnostics) {
  std::optional<Models> models = load_models(model_folder, diagnostics);
  const std::optional<std::string> text = read_text(file, diagnostics);
  if (!models || !text) return std::nullopt;
  std::optional<PlantFile> plant = read_plant_draft(*text, shown_name(file), diagnostics);
  if (!plant) return std::nullopt;
  const ActivityModel* model = chosen_model(*plant, *models, diagnostics);
  std::optional<Stream> stream = make_stream(plant->analysis, models->chemistry, diagnostics);
  if (model == nullptr || !stream || diagnostics.has_errors()) return std::nullopt;
  ActivityModel activity_model = *model;
  return Inputs{
      std::move(*models), std::move(*stream), std::move(activity_model), std::move(plant->train)};
}

}  // namespace ionledger::app
