// "ionledger models": what the program knows, and who says so.
#include "app/commands.hpp"
#include "app/exit_status.hpp"
#include "app/inputs.hpp"
#include "app/terminal.hpp"
#include "ionledger/report.hpp"

namespace ionledger::app {
namespace {

/// Every name that has a page.
std::vector<std::string> topics_of(const Models& models) {
  std::vector<std::string> topics;
  const auto add_names = [&](const auto& items) {
    for (const auto& item : items) topics.push_back(item.name);
  };
  add_names(models.chemistry.species);
  add_names(models.chemistry.minerals);
  add_names(models.chemistry.gases);
  add_names(models.chemistry.constituents);
  add_names(models.activity_models);
  for (const auto& source : models.chemistry.sources) topics.push_back(source.first);
  return topics;
}

}  // namespace

int models_command(const ModelsOptions& options) {
  Diagnostics diagnostics;
  const std::optional<Models> models = load_models(options.models, diagnostics);
  complain(diagnostics);
  if (!models) return wrong_input;
  TextStyle style;
  style.colour = wants_colour();
  const std::string text = text_models(*models, options.topic, style);
  if (!text.empty()) return print(text);
  const std::string nearest = nearest_word(options.topic, topics_of(*models));
  complain("ionledger: the models hold nothing called \"" + options.topic + "\"" +
           (nearest.empty() ? "; \"ionledger models\" lists what there is"
                            : "; did you mean \"" + nearest + "\"?"));
  return wrong_input;
}

}  // namespace ionledger::app
