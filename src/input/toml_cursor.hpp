// A TOML document as a tree of our own and a cursor that reads it strictly: kinds, unknown keys,
// places. Separate so that one source file alone knows the TOML library.
#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "ionledger/diagnostic.hpp"

namespace ionledger {

/// One value of a document and the key it stands under.
struct TomlNode {
  enum class Kind { text, number, boolean, moment, array, table };

  std::string key;  ///< Empty in an array.
  int key_line = 0;
  int key_column = 0;

  Kind kind = Kind::table;
  int line = 0;  ///< Of the first character of the value: for text, the quotation mark.
  int column = 0;
  int text_column = 0;  ///< Of the first character inside the quotation marks; `column` where
                        ///< escapes or several lines make columns inside meaningless.
  std::string text;     ///< Of text, what it says; else as written.
  double number = 0;    ///< Integers too.
  bool boolean = false;
  std::vector<TomlNode> children;  ///< Of a table in file order; of an array in order.
};

/// Errors of one document. At most max_errors are kept: more help no one.
class TomlFindings {
 public:
  static constexpr int max_errors = 1000;

  TomlFindings(std::string file, Diagnostics& diagnostics)
      : file_(std::move(file)), diagnostics_(diagnostics) {}

  void error(int line,
             int column,
             std::string summary,
             std::string found = {},
             std::string expected = {},
             std::string fix = {});
  /// About the document as a whole.
  void error(std::string summary, std::string expected = {}, std::string fix = {});
  [[nodiscard]] bool any() const { return errors_ > 0; }
  [[nodiscard]] bool is_full() const { return errors_ >= max_errors; }
  [[nodiscard]] SourceSpan span(int line, int column) const { return {file_, line, column}; }

 private:
  std::string file_;
  Diagnostics& diagnostics_;
  int errors_ = 0;
};

/// Parses `text` whole, or says at the place why it is not TOML.
/// Expects  readable_text (file_text.hpp) was satisfied with it.
[[nodiscard]] std::optional<TomlNode> parse_toml(std::string_view text, TomlFindings& findings);

/// One value, its path and the errors about it. A cursor on a table remembers which keys were asked
/// for, so that refuse_unknown_keys() can name the others. Refers to the tree; copies share nothing
/// but the tree.
class TomlCursor {
 public:
  TomlCursor(const TomlNode& node, std::string path, TomlFindings& findings);

  // ---- any value
  [[nodiscard]] const std::string& key() const { return node_->key; }
  /// stream.temperature, composition."Ca+2", step[2].dose
  [[nodiscard]] const std::string& path() const { return path_; }
  [[nodiscard]] SourceSpan span() const { return findings_->span(node_->line, node_->column); }
  [[nodiscard]] SourceSpan key_span() const {
    return findings_->span(node_->key_line, node_->key_column);
  }
  [[nodiscard]] bool is(TomlNode::Kind kind) const { return node_->kind == kind; }
  /// As written: `"18 degC"`, `120`, `an array`.
  [[nodiscard]] std::string written() const;
  /// As written, with the path: `"18 degC" for stream.temperature`.
  [[nodiscard]] std::string found() const;

  /// The value, or an error that says `expected`.
  [[nodiscard]] std::optional<std::string> text(const std::string& expected) const;
  [[nodiscard]] std::optional<double> number(const std::string& expected) const;
  [[nodiscard]] std::optional<bool> boolean() const;
  [[nodiscard]] bool must_be_table() const;
  /// The values of an array; none, and an error, when it is something else.
  [[nodiscard]] std::vector<TomlCursor> items(const std::string& expected) const;

  /// An error about the value; `offset` counts bytes into a text.
  void error(std::string summary, std::string expected = {}, std::string fix = {}) const;
  void error_at(std::size_t offset,
                std::string summary,
                std::string found,
                std::string expected,
                std::string fix) const;
  /// An error about the key.
  void key_error(std::string summary, std::string expected = {}, std::string fix = {}) const;

  // ---- a table
  [[nodiscard]] std::optional<TomlCursor> find(std::string_view key);
  [[nodiscard]] bool has(std::string_view key) const;
  /// find(), or an error that it is missing.
  [[nodiscard]] std::optional<TomlCursor> require(std::string_view key,
                                                  const std::string& expected);
  /// The value under `key`, or an error that it is missing, blank or of another kind; then "" or 0.
  /// The lines of a long text become one, joined by spaces.
  [[nodiscard]] std::string text_at(std::string_view key, const std::string& expected);
  [[nodiscard]] double number_at(std::string_view key, const std::string& expected);
  /// The value under `key`, which may be left out.
  [[nodiscard]] std::string text_if(std::string_view key, const std::string& expected);
  [[nodiscard]] std::optional<double> number_if(std::string_view key, const std::string& expected);
  [[nodiscard]] bool flag(std::string_view key, bool if_left_out);
  /// All entries, in file order; marks every key as known.
  [[nodiscard]] std::vector<TomlCursor> entries();
  /// One error for each key nobody asked for, with the nearest of those that were.
  void refuse_unknown_keys() const;

 private:
  const TomlNode* node_;
  std::string path_;
  TomlFindings* findings_;
  std::vector<std::string> asked_;
};

}  // namespace ionledger
