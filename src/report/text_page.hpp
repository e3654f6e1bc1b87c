// A page of terminal text: the one place that keeps lines within the width and that knows colour.
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "ionledger/report.hpp"

namespace ionledger {

/// How a piece of text stands out. Colour never works alone: a word says the same.
enum class Ink {
  plain,
  strong,  ///< The one thing to read in a line.
  alarm,   ///< Fails a limit, or would form.
  watch,   ///< Near a limit.
  quiet,   ///< Rules, units, sources.
};

struct Piece {
  std::string text;
  Ink ink = Ink::plain;
};

/// Collects lines. All text is made printable and cut to the width before it is coloured.
class TextPage {
 public:
  explicit TextPage(const TextStyle& style) : style_(style) {}

  [[nodiscard]] int width() const { return style_.width; }
  [[nodiscard]] bool shows_all() const { return style_.all; }

  /// One line; what does not fit is cut off with "…".
  void line(const std::vector<Piece>& pieces);
  void blank() { text_ += '\n'; }

  /// Wrapped text, every line `indent` columns from the left.
  void paragraph(std::string_view text, int indent = 2, Ink ink = Ink::plain);

  /// A label in a column of its own, the text wrapped beside it.
  void labelled(const std::string& label, std::string_view text, Ink ink = Ink::plain);

  /// A blank line unless it is the first, then the title, a rule and at its end a short note such
  /// as the unit.
  void heading(const std::string& title, const std::string& note = {});

  /// A rule across the page, single or double.
  void rule(bool is_double);

  [[nodiscard]] std::string text() && { return std::move(text_); }

 private:
  TextStyle style_;
  std::string text_;
};

/// `count` times `unit`, for rules and bars.
[[nodiscard]] std::string repeated(std::string_view unit, int count);

/// "1 mineral", "3 minerals".
[[nodiscard]] std::string counted(std::size_t count,
                                  const std::string& one,
                                  const std::string& many);

}  // namespace ionledger
