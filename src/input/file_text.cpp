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
constexpr std::string_view byte_order_mark = "\xEF\xBB\xBF";

bool is_utf8(std::string_view text, const std::string& name, Diagnostics& diagnostics) {
  for (std::size_t i = 0; i < text.size();) {
    const CodePoint point = code_point_at(text, i);
    if (!point.is_valid) {
      const TextPlace place = place_of(text, i);
      diagnostics.error({name, place.line, place.column},
                        "the file is not UTF-8 text",
                        fmt::format("byte 0x{:02X}", static_cast<std::uint8_t>(text[i])),
                        "UTF-8, the encoding of the web and of current editors",
                        "save the file as UTF-8; signs such as the degree sign differ otherwise");
      return false;
    }
    i += point.length;
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
  if (!is_utf8(text, name, diagnostics)) return std::nullopt;
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

TextPlace place_of(std::string_view text, std::size_t offset) {
  const std::string_view before = text.substr(0, offset);
  const std::size_t line_end = before.rfind('\n');
  const std::size_t line_begin = line_end == std::string_view::npos ? 0 : line_end + 1;
  return {1 + static_cast<int>(std::count(before.begin(), before.end(), '\n')),
          1 + code_points(before.substr(line_begin))};
}

std::size_t byte_of_column(std::string_view line_text, int column) {
  std::size_t at = 0;
  for (int i = 1; i < column && at < line_text.size(); ++i) {
    at += code_point_at(line_text, at).length;
  }
  return at;
}

}  // namespace ionledger
