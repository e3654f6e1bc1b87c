// From the names on the command line to models and a stream: what every command starts with.
#pragma once

#include <optional>
#include <string>

#include "ionledger/readers.hpp"
#include "ionledger/stream.hpp"

namespace ionledger::app {

/// The models of `folder`, or those built in when it is empty.
[[nodiscard]] std::optional<Models> load_models(const std::string& folder,
                                                Diagnostics& diagnostics);

/// A plant file with everything needed to work on it.
struct Inputs {
  Models models;
  Stream stream;
  ActivityModel activity_model;
  Train train;  ///< As written: its blends have no water yet.
};

/// Reads models and plant file, makes the stream, finds the activity model the file asks for.
/// All mistakes of the plant file are collected before it gives up.
[[nodiscard]] std::optional<Inputs> load_inputs(const std::string& file,
                                                const std::string& model_folder,
                                                Diagnostics& diagnostics);

}  // namespace ionledger::app
