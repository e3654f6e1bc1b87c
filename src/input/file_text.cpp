// Checks bytes before they are parsed and quotes them in messages.
#include "input/file_text.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cstdint>

#include "diagnostic/printable.hpp"
#include "ionledger/readers.hpp"

namespace ionledger {
namespace {

constexpr int max_quoted = 80;  // code points
/// Dots that may follow each other in one dotted key; bounds the depth of what is built from it.
constexpr int max_key_dots = 50;
constexpr std::string_view byte_order_mark = "\xEF\xBB\xBF";

/// A place while walking through a text.
struct Walk {
  int line = 1;
  int column = 1;
  void step(char c) {
    if (c == '\n') {
      ++line;
      column = 1;
    } else {
      ++column;
    }
  }
};

bool is_utf8(std::string_view text, const std::string& name, Diagnostics& diagnostics) {
  Walk walk;
  for (std::size_t i = 0; i < text.size();) {
    const CodePoint point = code_point_at(text, i);
    if (!point.is_valid) {
      diagnostics.error({name, walk.line, walk.column},
                        "the file is not UTF-8 text",
                        fmt::format("byte 0x{:02X}", static_cast<std::uint8_t>(text[i])),
                        "UTF-8, the encoding of the web and of current editors",
                        "save the file as UTF-8; signs such as the degree sign differ otherwise");
      return false;
    }
    walk.step(text[i]);
    i += point.length;
  }
  return true;
}

/// Every level of a dotted key becomes a table inside a table, and those are taken down by
/// recursion: a key of a million dots would exhaust the stack. Dots inside text count too, which
/// harms no text that has a comma, an equals sign or a line end now and then.
bool is_shallow(std::string_view text, const std::string& name, Diagnostics& diagnostics) {
  constexpr std::string_view ends = ",=[]{}\n";
  Walk walk;
  int dots = 0;
  for (std::size_t i = 0; i < text.size(); i += code_point_at(text, i).length) {
    if (ends.find(text[i]) != std::string_view::npos) dots = 0;
    if (text[i] == '.' && ++dots > max_key_dots) {
      diagnostics.error({name, walk.line, walk.column},
                        "too many dots in a row of names",
                        excerpt(lines_of(text)[static_cast<std::size_t>(walk.line) - 1]),
                        fmt::format("at most {} in one key or text", max_key_dots));
      return false;
    }
    walk.step(text[i]);
  }
  return true;
}

}  // namespace

std::optional<std::string_view> readable_text(std::string_view text,
                                              const std::string& name,
                                              Diagnostics& diagnostics) {
  const SourceSpan whole_file = {name, 0, 0};
  if (text.size() > max_file_bytes) {
    diagnostics.error(whole_file,
                      "the file is too large",
                      fmt::format("{} bytes", text.size()),
                      fmt::format("at most {} bytes", max_file_bytes));
    return std::nullopt;
  }
  if (text.substr(0, byte_order_mark.size()) == byte_order_mark) {
    text.remove_prefix(byte_order_mark.size());
  }
  if (!is_utf8(text, name, diagnostics) || !is_shallow(text, name, diagnostics)) {
    return std::nullopt;
  }
  if (text.find_first_not_of(" \t\r\n") == std::string_view::npos) {
    diagnostics.error(whole_file, "the file is empty");
    return std::nullopt;
  }
  return text;
}

std::string excerpt(std::string_view text) {
  const std::size_t end = byte_of_column(text, max_quoted + 1);
  return fmt::format("\"{}{}\"", text.substr(0, end), end < text.size() ? "..." : "");
}

int code_points(std::string_view text) {
  return static_cast<int>(std::count_if(text.begin(), text.end(), [](char c) {
    return (static_cast<std::uint8_t>(c) & 0xC0) != 0x80;
  }));
}

std::vector<std::string_view> lines_of(std::string_view text) {
  std::vector<std::string_view> lines;
  while (true) {
    const std::size_t end = text.find('\n');
    std::string_view line = text.substr(0, end);
    if (!line.empty() && line.back() == '\r') line.remove_suffix(1);
    lines.push_back(line);
    if (end == std::string_view::npos) return lines;
    text.remove_prefix(end + 1);
  }
}

std::size_t byte_of_column(std::string_view line_text, int column) {
  std::size_t at = 0;
  for (int i = 1; i < column && at < line_text.size(); ++i) {
    at += code_point_at(line_text, at).length;
  }
  return at;
}

}  // namespace ionledger
