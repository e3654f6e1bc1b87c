// What is wrong with a user's input, where, and how to mend it. Separate because every reader
// speaks in it.
#pragma once

#include <cstddef>
#include <string>
#include <vector>

namespace ionledger {

/// A place in a text the user wrote. Lines and columns count from 1, columns in code points;
/// line 0 means "the file as a whole".
struct SourceSpan {
  std::string file;
  int line = 0;
  int column = 0;
};

enum class Severity { error, warning };

/// One finding: what was found, what is accepted, how to mend it.
struct Diagnostic {
  Severity severity = Severity::error;
  SourceSpan where;
  std::string summary;   ///< One sentence, no full stop: `unknown unit "mg/l as CaC03"`.
  std::string found;     ///< What stood there, quoted, with its key path.
  std::string expected;  ///< What is accepted there.
  std::string fix;       ///< How to mend it; empty when there is nothing useful to say.
};

/// Collects every finding of one reading. Value type; not shared between threads.
class Diagnostics {
 public:
  /// Number of findings rendered before the rest is only counted.
  static constexpr std::size_t max_rendered = 20;

  void add(Diagnostic diagnostic);
  void error(SourceSpan where,
             std::string summary,
             std::string found = {},
             std::string expected = {},
             std::string fix = {});
  void warning(SourceSpan where,
               std::string summary,
               std::string found = {},
               std::string expected = {},
               std::string fix = {});

  [[nodiscard]] bool has_errors() const;
  [[nodiscard]] bool empty() const { return items_.empty(); }
  /// Findings in order of file, line and column; equal places keep the order of discovery.
  [[nodiscard]] std::vector<Diagnostic> sorted() const;

 private:
  std::vector<Diagnostic> items_;
};

/// The findings as text, one block each, in the order of Diagnostics::sorted():
///
///     file:line:column: error: sentence
///       found:    ...
///       expected: ...
///       fix:      ...
///
/// Empty lines of a block are left out; line 0 prints as `file: error: sentence`.
[[nodiscard]] std::string render(const Diagnostics& diagnostics);

/// The word of `choices` nearest to `word` in edit distance (Damerau-Levenshtein, letter case
/// ignored), or an empty string when none is within max(2, length/3) or shares a letter in place.
/// Of equally near choices the first.
[[nodiscard]] std::string nearest_word(const std::string& word,
                                       const std::vector<std::string>& choices);

}  // namespace ionledger
