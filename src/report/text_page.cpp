// Clipping, wrapping and colouring lines.
#include "report/text_page.hpp"

#include <algorithm>

#include "diagnostic/printable.hpp"
#include "report/terminal_text.hpp"

namespace ionledger {
namespace {

constexpr int label_columns = 17;

/// ANSI "select graphic rendition" (ECMA-48): 1 bold, 2 faint, 31 red, 33 yellow.
std::string_view switch_on(Ink ink) {
  switch (ink) {
    case Ink::plain:
      return "";
    case Ink::strong:
      return "\x1b[1m";
    case Ink::alarm:
      return "\x1b[1;31m";
    case Ink::watch:
      return "\x1b[33m";
    case Ink::quiet:
      return "\x1b[2m";
  }
  return "";
}
constexpr std::string_view switch_off = "\x1b[0m";

}  // namespace

void TextPage::line(const std::vector<Piece>& pieces) {
  int free_columns = width();
  std::vector<Piece> fitting;
  for (const Piece& piece : pieces) {
    fitting.push_back({clipped(printable(piece.text), free_columns), piece.ink});
    free_columns -= display_width(fitting.back().text);
  }
  // No blanks at the end of a line, and none coloured there either.
  while (!fitting.empty()) {
    std::string& last = fitting.back().text;
    last.erase(last.find_last_not_of(' ') + 1);
    if (!last.empty()) break;
    fitting.pop_back();
  }
  for (const Piece& piece : fitting) {
    const bool is_coloured = style_.colour && piece.ink != Ink::plain && !piece.text.empty();
    if (is_coloured) text_ += switch_on(piece.ink);
    text_ += piece.text;
    if (is_coloured) text_ += switch_off;
  }
  text_ += '\n';
}

void TextPage::paragraph(std::string_view text, int indent, Ink ink) {
  const int left = std::min(indent, width() / 2);
  for (const std::string& part : wrapped(printable(text), std::max(1, width() - left))) {
    line({{repeated(" ", left)}, {part, ink}});
  }
}

void TextPage::labelled(const std::string& label, std::string_view text, Ink ink) {
  const int left = std::min(2 + label_columns, width() / 2);
  std::string head = padded_right(clipped("  " + printable(label), left - 1), left);
  for (const std::string& part : wrapped(printable(text), std::max(1, width() - left))) {
    line({{head, Ink::quiet}, {part, ink}});
    head = repeated(" ", left);
  }
}

void TextPage::heading(const std::string& title, const std::string& note) {
  const std::string name = clipped(printable(title), width());
  const std::string tail = note.empty() ? "" : " " + printable(note);
  const int free_columns = width() - display_width(name) - 1;
  const int rule_columns = free_columns - display_width(tail);
  if (!text_.empty()) blank();
  // A note that leaves no room for a rule goes below.
  if (rule_columns >= 3) {
    line({{name, Ink::strong}, {" " + repeated("─", rule_columns) + tail, Ink::quiet}});
  } else {
    line({{name, Ink::strong}, {" " + repeated("─", free_columns), Ink::quiet}});
    if (!note.empty()) paragraph(note, 2, Ink::quiet);
  }
}

void TextPage::rule(bool is_double) {
  line({{repeated(is_double ? "═" : "─", width()), Ink::quiet}});
}

std::string repeated(std::string_view unit, int count) {
  std::string result;
  for (int i = 0; i < count; ++i) result += unit;
  return result;
}

std::string counted(std::size_t count, const std::string& one, const std::string& many) {
  return std::to_string(count) + " " + (count == 1 ? one : many);
}

}  // namespace ionledger
