// What a person most likely did where the TOML library only says what it expected. Separate because
// it is guesswork about people, not about TOML.
#pragma once

#include <string>
#include <string_view>

namespace ionledger {

/// A parse error in words for a person.
struct TomlSlip {
  std::string summary;
  std::string fix;  ///< Empty when there is no telling.
};

/// `description` is the library's sentence, `line` the trimmed line it is about; `is_at_line_end`
/// says that the error stands behind the last character of that line.
[[nodiscard]] TomlSlip explained(std::string_view description,
                                 std::string_view line,
                                 bool is_at_line_end);

/// Without spaces and tabs at both ends.
[[nodiscard]] std::string_view trimmed(std::string_view text);

}  // namespace ionledger
