// What must hold for the bytes of a file before anything parses them, and how pieces of it are
// quoted in messages. Separate because plant files and model files share it.
#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "ionledger/diagnostic.hpp"

namespace ionledger {

/// `text` without a byte order mark, once it is known to be readable: at most max_file_bytes,
/// UTF-8, not blank, no key nested deeper than the parser may safely follow. Else nullopt and one
/// error.
[[nodiscard]] std::optional<std::string_view> readable_text(std::string_view text,
                                                            const std::string& name,
                                                            Diagnostics& diagnostics);

/// `text` in quotation marks for a message, shortened after 80 code points.
[[nodiscard]] std::string excerpt(std::string_view text);

/// Number of code points of valid UTF-8.
[[nodiscard]] int code_points(std::string_view text);

/// The lines of `text` without their endings; never empty.
[[nodiscard]] std::vector<std::string_view> lines_of(std::string_view text);

/// Line and column from 1, columns in code points.
struct TextPlace {
  int line = 1;
  int column = 1;
};
/// The place of the byte at `offset`; what stands before it is valid UTF-8.
[[nodiscard]] TextPlace place_of(std::string_view text, std::size_t offset);

/// Byte offset in `line_text` of the code point in column `column` (from 1); the length when there
/// is none.
[[nodiscard]] std::size_t byte_of_column(std::string_view line_text, int column);

}  // namespace ionledger
