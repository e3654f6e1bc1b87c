// Reading and writing files with a message for everything that can go wrong.
#include "app/files.hpp"

#include <algorithm>
#include <array>
#include <cerrno>
#include <cstdio>
#include <filesystem>
#include <memory>
#include <system_error>
#include <utility>

namespace ionledger::app {
namespace {

namespace fs = std::filesystem;

struct CloseFile {
  void operator()(std::FILE* file) const {
    if (file != stdin) std::fclose(file);
  }
};
using File = std::unique_ptr<std::FILE, CloseFile>;

std::string reason(int error_number) { return std::generic_category().message(error_number); }

std::string in_mib(std::size_t bytes) { return std::to_string(bytes >> 20) + " MiB"; }

/// An open file, or nothing and an error.
File open_to_read(const std::string& path, Diagnostics& diagnostics) {
  if (path == "-") return File(stdin);
  std::error_code ignored;
  const fs::file_status status = fs::status(path, ignored);
  if (fs::is_directory(status)) {
    diagnostics.error(
        {path}, "this is a folder, not a file", {}, "a plant file", "name the file inside it");
    return nullptr;
  }
  File file(std::fopen(path.c_str(), "rb"));
  if (file == nullptr) {
    const bool is_missing = errno == ENOENT;
    diagnostics.error(
        {path},
        is_missing ? "there is no such file" : "cannot be opened",
        is_missing ? "" : reason(errno),
        {},
        is_missing ? "check the path; \"ionledger new FILE\" writes one to start from" : "");
  }
  return file;
}

bool write_and_close(File file,
                     const std::string& path,
                     const std::string& text,
                     Diagnostics& diagnostics) {
  const bool is_written = std::fwrite(text.data(), 1, text.size(), file.get()) == text.size();
  if (std::fclose(file.release()) == 0 && is_written) return true;
  diagnostics.error({path}, "cannot be written", reason(errno));
  return false;
}

}  // namespace

std::string shown_name(const std::string& path) { return path == "-" ? standard_input_name : path; }

std::optional<std::string> read_text(const std::string& path, Diagnostics& diagnostics) {
  const File file = open_to_read(path, diagnostics);
  if (file == nullptr) return std::nullopt;
  std::string text;
  std::array<char, 1 << 16> buffer{};
  while (text.size() <= max_file_bytes) {
    const std::size_t wanted = std::min(buffer.size(), max_file_bytes + 1 - text.size());
    const std::size_t got = std::fread(buffer.data(), 1, wanted, file.get());
    text.append(buffer.data(), got);
    if (got == 0) break;
  }
  if (std::ferror(file.get()) != 0) {
    diagnostics.error({shown_name(path)}, "cannot be read", reason(errno));
    return std::nullopt;
  }
  if (text.size() > max_file_bytes) {
    diagnostics.error({shown_name(path)},
                      "the file is too large",
                      "more than " + in_mib(max_file_bytes),
                      "at most " + in_mib(max_file_bytes),
                      "is this the file you meant?");
    return std::nullopt;
  }
  return text;
}

std::optional<std::vector<ModelFile>> read_model_folder(const std::string& folder,
                                                        Diagnostics& diagnostics) {
  std::error_code failure;
  std::vector<fs::path> paths;
  for (fs::directory_iterator it(folder, failure), end; !failure && it != end;
       it.increment(failure)) {
    if (it->path().extension() == ".toml") paths.push_back(it->path());
  }
  if (failure) {
    diagnostics.error({folder},
                      "the folder of models cannot be read",
                      failure.message(),
                      "a folder with model files (*.toml)");
    return std::nullopt;
  }
  if (paths.empty()) {
    diagnostics.error({folder},
                      "there are no model files in this folder",
                      {},
                      "files that end in .toml",
                      "leave out --models to use the models built into the program");
    return std::nullopt;
  }
  std::sort(paths.begin(), paths.end());
  std::vector<ModelFile> files;
  for (const fs::path& path : paths) {
    std::optional<std::string> text = read_text(path.string(), diagnostics);
    if (text) files.push_back({path.filename().string(), std::move(*text)});
  }
  if (files.size() != paths.size()) return std::nullopt;
  return files;
}

bool write_new_file(const std::string& path, const std::string& text, Diagnostics& diagnostics) {
  // "x" makes the test for an existing file and its creation one step.
  File file(std::fopen(path.c_str(), "wbx"));
  if (file == nullptr) {
    const bool exists = errno == EEXIST;
    diagnostics.error({path},
                      exists ? "the file exists and is left as it is" : "cannot be created",
                      exists ? "" : reason(errno),
                      {},
                      exists ? "choose another name" : "");
    return false;
  }
  return write_and_close(std::move(file), path, text, diagnostics);
}

bool write_page(const std::string& path, const std::string& text, Diagnostics& diagnostics) {
  if (fs::path(path).extension() != ".html") {
    diagnostics.error({path},
                      "a report is written as a page only",
                      "\"" + path + "\" for --report",
                      "a name that ends in .html",
                      "add .html to the name");
    return false;
  }
  File file(std::fopen(path.c_str(), "wb"));
  if (file == nullptr) {
    diagnostics.error({path}, "cannot be created", reason(errno));
    return false;
  }
  return write_and_close(std::move(file), path, text, diagnostics);
}

}  // namespace ionledger::app
