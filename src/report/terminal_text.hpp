// UTF-8 text measured and cut in terminal columns. Separate because bytes, code points and columns
// differ as soon as a title holds "µ" or "°".
#pragma once

#include <string>
#include <string_view>
#include <vector>

namespace ionledger {

/// Columns `text` takes in a terminal: combining marks 0, East Asian wide characters and emoji 2,
/// everything else 1. Expects text made printable (diagnostic/printable.hpp).
[[nodiscard]] int display_width(std::string_view text);

/// At most `columns` columns of `text`; a cut is shown by a last "…".
[[nodiscard]] std::string clipped(std::string_view text, int columns);

/// `text` filled with blanks to `columns`, on its right or on its left; longer text is unchanged.
[[nodiscard]] std::string padded_right(std::string_view text, int columns);
[[nodiscard]] std::string padded_left(std::string_view text, int columns);

/// `text` broken at blanks into lines of at most `columns` (>= 1) columns; a longer word is split.
/// Never empty: no words give one empty line.
[[nodiscard]] std::vector<std::string> wrapped(std::string_view text, int columns);

}  // namespace ionledger
