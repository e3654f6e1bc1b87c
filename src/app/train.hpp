// From the steps of a plant file to the states they lead to; reads the other waters they blend in.
#pragma once

#include <string>

#include "app/inputs.hpp"

namespace ionledger::app {

/// Checks the train of `inputs` and gives every blend the feed of its plant file; relative names
/// are looked for beside `file`. False, with errors, when something is wrong.
[[nodiscard]] bool prepare_train(const std::string& file, Inputs& inputs, Diagnostics& diagnostics);

}  // namespace ionledger::app
