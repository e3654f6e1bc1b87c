// What must not reach the TOML library, found before it parses. Separate because it is about the
// limits of that library and nothing else.
#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <string_view>

namespace ionledger {

/// Why a text is not given to the library; `offset` counts bytes.
struct ScanError {
  std::size_t offset = 0;
  std::string summary;
  std::string expected;
  std::string fix;
};

/// The first thing in `text`, valid UTF-8, that the library cannot be trusted with:
///  - more than 50 dots in one dotted key: every level becomes a table inside a table, and those
///  are
///    taken down by recursion, so that a key of a million dots would exhaust the stack;
///  - a character beyond ASCII outside quotation marks and comments, or behind a backslash that
///  ends
///    a line of a text: version 3.3 classifies those with undefined behaviour. TOML knows no use
///    for the first; the second (a line ended by a backslash) is legal TOML that is refused here.
/// Exact up to the first error of TOML in the text, which is as far as the library reads.
[[nodiscard]] std::optional<ScanError> scan_toml(std::string_view text);

}  // namespace ionledger
