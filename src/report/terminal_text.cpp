// Counting columns, cutting and wrapping.
#include "report/terminal_text.hpp"

#include <algorithm>
#include <array>
#include <cstddef>

#include "diagnostic/printable.hpp"

namespace ionledger {
namespace {

struct Range {
  char32_t first, last;
};

template <std::size_t N>
bool is_in(const std::array<Range, N>& ranges, char32_t code_point) {
  return std::any_of(ranges.begin(), ranges.end(), [&](const Range& range) {
    return code_point >= range.first && code_point <= range.last;
  });
}

// Unicode 15, the blocks whose characters have General Category Mn or Cf and turn up in names.
constexpr std::array<Range, 10> without_width = {{{0x0300, 0x036F},
                                                  {0x0483, 0x0489},
                                                  {0x0591, 0x05BD},
                                                  {0x064B, 0x065F},
                                                  {0x200B, 0x200F},
                                                  {0x202A, 0x202E},
                                                  {0x2060, 0x206F},
                                                  {0x20D0, 0x20F0},
                                                  {0xFE00, 0xFE0F},
                                                  {0xFE20, 0xFE2F}}};

// Unicode 15, East Asian Width W and F, by block.
constexpr std::array<Range, 11> wide = {{{0x1100, 0x115F},
                                         {0x231A, 0x231B},
                                         {0x2E80, 0x303E},
                                         {0x3041, 0xA4CF},
                                         {0xA960, 0xA97C},
                                         {0xAC00, 0xD7A3},
                                         {0xF900, 0xFAFF},
                                         {0xFE30, 0xFE6F},
                                         {0xFF00, 0xFF60},
                                         {0xFFE0, 0xFFE6},
                                         {0x1F300, 0x3FFFD}}};

int width_of(char32_t code_point) {
  if (is_in(without_width, code_point)) return 0;
  return is_in(wide, code_point) ? 2 : 1;
}

/// Bytes of `text` that fit into `columns`, marks without width included.
std::size_t fitting_bytes(std::string_view text, int columns) {
  std::size_t bytes = 0;
  for (int used = 0; bytes < text.size();) {
    const CodePoint next = code_point_at(text, bytes);
    used += width_of(next.value);
    if (used > columns) break;
    bytes += next.length;
  }
  return bytes;
}

std::string blanks(int count) {
  return std::string(static_cast<std::size_t>(std::max(count, 0)), ' ');
}

}  // namespace

int display_width(std::string_view text) {
  int width = 0;
  for (std::size_t i = 0; i < text.size();) {
    const CodePoint next = code_point_at(text, i);
    width += width_of(next.value);
    i += next.length;
  }
  return width;
}

std::string clipped(std::string_view text, int columns) {
  if (columns <= 0) return {};
  if (display_width(text) <= columns) return std::string(text);
  return std::string(text.substr(0, fitting_bytes(text, columns - 1))) + "…";
}

std::string padded_right(std::string_view text, int columns) {
  return std::string(text) + blanks(columns - display_width(text));
}

std::string padded_left(std::string_view text, int columns) {
  return blanks(columns - display_width(text)) + std::string(text);
}

std::vector<std::string> wrapped(std::string_view text, int columns) {
  std::vector<std::string> lines(1);
  const auto append = [&](std::string_view word) {
    std::string& line = lines.back();
    const int free_columns = columns - display_width(line) - (line.empty() ? 0 : 1);
    if (display_width(word) <= free_columns) {
      line += (line.empty() ? "" : " ") + std::string(word);
      return;
    }
    if (!line.empty()) lines.emplace_back();
    while (display_width(word) > columns) {
      // A single character wider than the line still has to go somewhere.
      const std::size_t bytes =
          std::max(fitting_bytes(word, columns), code_point_at(word, 0).length);
      lines.back() = word.substr(0, bytes);
      word.remove_prefix(bytes);
      if (!word.empty()) lines.emplace_back();
    }
    lines.back() = word.empty() ? lines.back() : std::string(word);
  };
  while (!text.empty()) {
    const std::size_t end = std::min(text.find(' '), text.size());
    if (end > 0) append(text.substr(0, end));
    text.remove_prefix(std::min(end + 1, text.size()));
  }
  return lines;
}

}  // namespace ionledger
