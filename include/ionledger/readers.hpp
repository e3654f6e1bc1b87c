// From text to the types of analysis.hpp, chemistry.hpp and activity.hpp. Every mistake of a file
// is collected in one run, each with place, finding, expectation and remedy.
#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "ionledger/activity.hpp"
#include "ionledger/analysis.hpp"
#include "ionledger/chemistry.hpp"
#include "ionledger/treatment.hpp"

namespace ionledger {

/// Everything one plant file says.
struct PlantFile {
  Analysis analysis;
  std::string activity_model;  ///< Empty: the default of the chemistry.
  SourceSpan activity_span;
  Train train;  ///< A Blend still lacks its water: the other file is for the caller to read.
};

/// Largest file that is read, in bytes; larger ones are refused without parsing.
inline constexpr std::size_t max_file_bytes = 4u << 20;

/// Reads a plant file from `text`; `name` stands in the messages.
/// Errors   not UTF-8, too large, not TOML, unknown key (with the nearest known), wrong type, wrong
///          dimension, missing unit, number negative or not finite, missing [analysis].
[[nodiscard]] std::optional<PlantFile> read_plant_file(std::string_view text,
                                                       const std::string& name,
                                                       Diagnostics& diagnostics);

/// The same, but returns what could be read beside the mistakes, so that the checks of the
/// chemistry can add theirs and a file is refused once. Not fit for solving while `diagnostics` has
/// errors.
[[nodiscard]] std::optional<PlantFile> read_plant_draft(std::string_view text,
                                                        const std::string& name,
                                                        Diagnostics& diagnostics);

/// A file of models/: its name and its text.
struct ModelFile {
  std::string name;
  std::string text;
};

/// What models/ holds.
struct Models {
  Chemistry chemistry;
  Supplies supplies;
  std::vector<ActivityModel> activity_models;
  std::string default_activity_model;
  /// By name; nullptr when there is none.
  [[nodiscard]] const ActivityModel* activity_model(std::string_view name) const;
};

/// Reads and checks all model files: every reaction balanced in elements and charge, every constant
/// sourced, no duplicates, every function within `max_step_at_25` of its value at 25 degC unless
/// the entry states the difference, all numbers finite, every key known.
inline constexpr double max_step_at_25 = 0.02;
[[nodiscard]] std::optional<Models> read_models(const std::vector<ModelFile>& files,
                                                Diagnostics& diagnostics);

/// The model files embedded at build time.
[[nodiscard]] std::vector<ModelFile> built_in_models();

}  // namespace ionledger
