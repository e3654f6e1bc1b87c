// Files in and out. Separate because everything that can go wrong with a file has its message here.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "ionledger/diagnostic.hpp"
#include "ionledger/readers.hpp"

namespace ionledger::app {

/// Name of standard input in messages.
inline constexpr const char* standard_input_name = "<standard input>";

/// How `path` is called in messages: itself, or standard_input_name for "-".
[[nodiscard]] std::string shown_name(const std::string& path);

/// The whole file, or standard input for "-". Never reads more than max_file_bytes + 1 bytes.
/// Errors   no such file, a directory, not readable, larger than max_file_bytes.
[[nodiscard]] std::optional<std::string> read_text(const std::string& path,
                                                   Diagnostics& diagnostics);

/// Every *.toml file directly in `folder`, by name.
/// Errors   no such folder, not a folder, none in it, and those of read_text.
[[nodiscard]] std::optional<std::vector<ModelFile>> read_model_folder(const std::string& folder,
                                                                      Diagnostics& diagnostics);

/// Writes `text` to a file that does not exist yet. False, with an error, when it does or when
/// writing fails.
[[nodiscard]] bool write_new_file(const std::string& path,
                                  const std::string& text,
                                  Diagnostics& diagnostics);

/// Writes `text` to a page, in place of an older one. Only names that end in ".html" are written,
/// so that a slip cannot replace a plant file. False, with an error, when it is not or writing
/// fails.
[[nodiscard]] bool write_page(const std::string& path,
                              const std::string& text,
                              Diagnostics& diagnostics);

}  // namespace ionledger::app
