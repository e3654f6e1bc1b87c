// Reads the [[step]] tables of a plant file.
#pragma once

#include <optional>
#include <vector>

#include "input/toml_cursor.hpp"
#include "ionledger/treatment.hpp"

namespace ionledger {

/// Each table reads as a sentence: an optional name, one action key, its amounts. What the words
/// name is checked later, by check_train.
/// Errors   no action key or two of them, unknown keys, wrong kinds, text that is no quantity.
[[nodiscard]] Train read_steps(const TomlCursor& steps, std::optional<PpmMeaning> ppm);

}  // namespace ionledger
