// Every file of tests/bad_inputs holds one mistake (or as many as its name says) and stands beside
// exactly what the program says about it.
#include <doctest/doctest.h>

#include <algorithm>
#include <filesystem>
#include <fstream>
#include <sstream>
#include <string>
#include <vector>

#include "ionledger/equilibrium.hpp"
#include "ionledger/readers.hpp"
#include "ionledger/stream.hpp"
#include "support/water.hpp"

namespace ionledger::testing {
namespace {

namespace fs = std::filesystem;

const fs::path folder = fs::path(IONLEDGER_SOURCE_DIR) / "tests" / "bad_inputs";

std::string content(const fs::path& path) {
  std::ifstream file(path, std::ios::binary);
  std::stringstream text;
  text << file.rdbuf();
  return text.str();
}

std::vector<fs::path> bad_inputs() {
  std::vector<fs::path> paths;
  for (const auto& entry : fs::directory_iterator(folder)) {
    if (entry.path().extension() == ".toml") paths.push_back(entry.path());
  }
  std::sort(paths.begin(), paths.end());
  return paths;
}

/// What is said about `path`: by the reader, else by the chemistry, else by the check of its train,
/// else where it is solved.
std::string messages(const fs::path& path) {
  Diagnostics diagnostics;
  const std::string name = "tests/bad_inputs/" + path.filename().string();
  const auto plant = read_plant_file(content(path), name, diagnostics);
  CHECK(plant.has_value() != diagnostics.has_errors());
  if (!plant) return render(diagnostics);
  const Chemistry& chemistry = models().chemistry;
  if (const auto stream = make_stream(plant->analysis, chemistry, diagnostics)) {
    const bool is_sound = check_train(
        plant->train, chemistry, models().supplies, plant->analysis.flow.has_value(), diagnostics);
    if (!is_sound) return render(diagnostics);
    const auto closed = close_stream(*stream, chemistry, default_activity_model(), diagnostics);
    CHECK_FALSE_MESSAGE(closed, "nothing was found wrong in " << name);
  }
  return render(diagnostics);
}

}  // namespace

TEST_SUITE("input/bad_inputs") {
  TEST_CASE("every malformed plant file is refused in exactly the words beside it") {
    const std::vector<fs::path> paths = bad_inputs();
    CHECK(paths.size() >= 100);
    for (const fs::path& path : paths) {
      CAPTURE(path.filename().string());
      CHECK(messages(path) == content(fs::path(path).replace_extension(".expected")));
    }
  }
}

}  // namespace ionledger::testing
