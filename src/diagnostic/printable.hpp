// Text of a user made fit for one line of a message; separate because the decoding of UTF-8 in it
// serves the reading of units too.
#pragma once

#include <cstddef>
#include <string>
#include <string_view>

namespace ionledger {

/// One code point of a text.
struct CodePoint {
  char32_t value = 0;
  std::size_t length = 1;  ///< Bytes it takes.
  bool is_valid = false;   ///< False for a byte that begins no well-formed UTF-8 sequence.
};

/// The code point that begins at `offset`, which must be less than the size of the text.
[[nodiscard]] CodePoint code_point_at(std::string_view text, std::size_t offset);

/// `text` with control characters and bytes that are not UTF-8 written as \xNN (a line break as
/// \n), so that a message stays on its line and no terminal obeys it.
[[nodiscard]] std::string printable(std::string_view text);

}  // namespace ionledger
