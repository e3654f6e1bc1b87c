// One function for each word after the program's name. They print, and return the exit status.
#pragma once

#include <string>

namespace ionledger::app {

/// `file` "-" is standard input; `models` empty means the models built into the program.
struct AssessOptions {
  std::string file;
  std::string models;
  std::string report;  ///< Where the page goes; empty: no page is written.
  bool json = false;
  bool all = false;
};
[[nodiscard]] int assess_command(const AssessOptions& options);

struct CheckOptions {
  std::string file;
  std::string models;
  bool json = false;
};
[[nodiscard]] int check_command(const CheckOptions& options);

struct ModelsOptions {
  std::string topic;  ///< Empty: the overview.
  std::string models;
};
[[nodiscard]] int models_command(const ModelsOptions& options);

struct NewOptions {
  std::string file;  ///< Empty or "-": standard output.
};
[[nodiscard]] int new_command(const NewOptions& options);

}  // namespace ionledger::app
