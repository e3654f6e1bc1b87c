// The model files as they were at build time; the source behind it is written by
// embed_models.cmake.
#pragma once

#include <string>
#include <string_view>
#include <vector>

namespace ionledger {

struct ModelText {
  std::string name;       ///< File name, e.g. "carbonate.toml".
  std::string_view text;  ///< Whole file, UTF-8, static lifetime.
};

/// Every file of models/, sorted by name.
[[nodiscard]] std::vector<ModelText> embedded_models();

}  // namespace ionledger
