// A text in plain ASCII, with the way back to what was written; separate so that the readers of
// numbers and units need not know the many signs for micro, degrees and powers.
#pragma once

#include <cstddef>
#include <string>
#include <string_view>
#include <vector>

#include "ionledger/units.hpp"

namespace ionledger {

/// "12 µg/m³" spelt "12 ug/m^3". A character with no ASCII spelling becomes `unreadable`.
class QuantityText {
 public:
  static constexpr char unreadable = '\x1A';

  explicit QuantityText(std::string_view original);

  [[nodiscard]] std::string_view ascii() const { return ascii_; }
  [[nodiscard]] std::size_t size() const { return ascii_.size(); }
  /// The character at `position`, or '\0' beyond the end.
  [[nodiscard]] char at(std::size_t position) const {
    return position < ascii_.size() ? ascii_[position] : '\0';
  }
  /// What was written for the spelling from `begin` up to `end`.
  [[nodiscard]] std::string written(std::size_t begin, std::size_t end) const;
  [[nodiscard]] std::string_view original() const { return original_; }

  /// First position from `begin` on that is not a space.
  [[nodiscard]] std::size_t skip_spaces(std::size_t begin) const;

  /// A finding at `position` of the spelling; `found` is the whole text.
  [[nodiscard]] UnitError error(std::size_t position,
                                std::string summary,
                                std::string expected,
                                std::string fix = {}) const;

 private:
  std::string original_;
  std::string ascii_;
  std::vector<std::size_t> offsets_;  // Of each ASCII character in the original, and of its end.
};

// ASCII only and the same in every locale, unlike <cctype>.
[[nodiscard]] constexpr bool is_digit(char c) { return c >= '0' && c <= '9'; }
[[nodiscard]] constexpr bool is_letter(char c) {
  return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z');
}
[[nodiscard]] constexpr bool is_space(char c) { return c == ' ' || c == '\t'; }

/// The text in straight double quotes.
[[nodiscard]] std::string quoted(std::string_view text);

}  // namespace ionledger
