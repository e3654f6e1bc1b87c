// The only file that includes the TOML library: parses a document into TomlNode and reads that
// strictly.
// Some assertions of the library do not hold for malformed text, where its next lines would report
// an error properly; with NDEBUG it would even let the compiler assume them. Switched off both
// ways.
#undef NDEBUG
#define TOML_ASSERT(expression) static_assert(true)
#define TOML_IMPLEMENTATION
#define TOML_EXCEPTIONS 0
#define TOML_MAX_NESTED_VALUES 32
#include "input/toml_cursor.hpp"

#include <fmt/format.h>
#include <toml++/toml.h>

#include <algorithm>
#include <cmath>

#include "input/file_text.hpp"
#include "input/toml_scan.hpp"
#include "input/toml_slip.hpp"

namespace ionledger {
namespace {

/// Columns beyond this are not searched for the text as written; keeps long lines linear.
constexpr int max_searched_column = 2000;
/// Keys longer than this are not compared with known ones.
constexpr std::size_t max_compared_key = 100;

bool is_bare_key(std::string_view key) {
  return !key.empty() && std::all_of(key.begin(), key.end(), [](char c) {
    return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z') || (c >= '0' && c <= '9') || c == '_' ||
           c == '-';
  });
}

std::string path_to(const std::string& parent, const std::string& key) {
  const std::string step = is_bare_key(key) ? key : excerpt(key);
  return parent.empty() ? step : parent + "." + step;
}

/// Turns the library's tree into ours. Reads it in place: a copied node loses its position.
class Converter {
 public:
  explicit Converter(std::string_view text) : lines_(lines_of(text)) {}

  [[nodiscard]] TomlNode convert(const toml::node& source) const {
    TomlNode node;
    node.line = static_cast<int>(source.source().begin.line);
    node.column = static_cast<int>(source.source().begin.column);
    node.text_column = node.column;
    node.kind = kind_of(source);
    if (const auto* table = source.as_table()) {
      for (const auto& [key, value] : *table) {
        TomlNode child = convert(value);
        child.key = key.str();
        child.key_line = static_cast<int>(key.source().begin.line);
        child.key_column = static_cast<int>(key.source().begin.column);
        node.children.push_back(std::move(child));
      }
      std::sort(node.children.begin(), node.children.end(), is_earlier);
    } else if (const auto* array = source.as_array()) {
      for (const auto& item : *array) node.children.push_back(convert(item));
    } else {
      scalar(source, node);
    }
    return node;
  }

 private:
  static bool is_earlier(const TomlNode& a, const TomlNode& b) {
    return std::pair(a.key_line, a.key_column) < std::pair(b.key_line, b.key_column);
  }

  static TomlNode::Kind kind_of(const toml::node& source) {
    if (source.is_table()) return TomlNode::Kind::table;
    if (source.is_array()) return TomlNode::Kind::array;
    if (source.is_string()) return TomlNode::Kind::text;
    if (source.is_number()) return TomlNode::Kind::number;
    if (source.is_boolean()) return TomlNode::Kind::boolean;
    return TomlNode::Kind::moment;
  }

  void scalar(const toml::node& source, TomlNode& node) const {
    const std::string_view written = written_at(source.source());
    if (const auto* text = source.as_string()) {
      node.text = text->get();
      // Only where quotation marks enclose the very same characters do columns inside mean
      // anything.
      if (written.size() == node.text.size() + 2 &&
          written.substr(1, node.text.size()) == node.text) {
        node.text_column = node.column + 1;
      }
      return;
    }
    node.text = written;
    // value_exact<double> would refuse 120, so integers are taken by themselves.
    if (const auto* integer = source.as_integer())
      node.number = static_cast<double>(integer->get());
    if (const auto* number = source.as_floating_point()) node.number = number->get();
    if (const auto* boolean = source.as_boolean()) node.boolean = boolean->get();
  }

  /// What stands between the two ends of a value on one line; empty when it is further away.
  [[nodiscard]] std::string_view written_at(const toml::source_region& region) const {
    const auto line = static_cast<std::size_t>(region.begin.line);
    if (region.end.line != region.begin.line || line == 0 || line > lines_.size() ||
        region.end.column > max_searched_column) {
      return {};
    }
    const std::string_view text = lines_[line - 1];
    const std::size_t begin = byte_of_column(text, static_cast<int>(region.begin.column));
    const std::size_t end = byte_of_column(text, static_cast<int>(region.end.column));
    return text.substr(begin, end - begin);
  }

  std::vector<std::string_view> lines_;
};

/// The library's error with what it is likely to be about.
void refuse(const toml::parse_error& parse_error, std::string_view text, TomlFindings& findings) {
  const auto position = parse_error.source().begin;
  const auto lines = lines_of(text);
  const std::size_t index = std::min<std::size_t>(position.line, lines.size());
  const std::string_view whole_line = index == 0 ? std::string_view() : lines[index - 1];
  const std::string_view line = trimmed(whole_line);
  const bool is_at_line_end =
      byte_of_column(whole_line, static_cast<int>(position.column)) == whole_line.size();
  const TomlSlip slip = explained(parse_error.description(), line, is_at_line_end);
  findings.error(static_cast<int>(position.line),
                 static_cast<int>(position.column),
                 slip.summary,
                 line.empty() ? "" : excerpt(line),
                 "",
                 slip.fix);
}

std::string joined(const std::vector<std::string>& words) {
  std::string text;
  for (const std::string& word : words) text += (text.empty() ? "" : ", ") + word;
  return text;
}

}  // namespace

void TomlFindings::error(int line,
                         int column,
                         std::string summary,
                         std::string found,
                         std::string expected,
                         std::string fix) {
  if (++errors_ > max_errors) return;
  diagnostics_.error(span(line, column),
                     std::move(summary),
                     std::move(found),
                     std::move(expected),
                     std::move(fix));
}

void TomlFindings::error(std::string summary, std::string expected, std::string fix) {
  error(0, 0, std::move(summary), "", std::move(expected), std::move(fix));
}

std::optional<TomlNode> parse_toml(std::string_view text, TomlFindings& findings) {
  if (const auto trouble = scan_toml(text)) {
    const TextPlace place = place_of(text, trouble->offset);
    const std::string_view line = lines_of(text)[static_cast<std::size_t>(place.line) - 1];
    findings.error(place.line,
                   place.column,
                   trouble->summary,
                   excerpt(trimmed(line)),
                   trouble->expected,
                   trouble->fix);
    return std::nullopt;
  }
  const toml::parse_result result = toml::parse(text);
  if (!result) {
    refuse(result.error(), text, findings);
    return std::nullopt;
  }
  return Converter(text).convert(result.table());
}

TomlCursor::TomlCursor(const TomlNode& node, std::string path, TomlFindings& findings)
    : node_(&node), path_(std::move(path)), findings_(&findings) {}

std::string TomlCursor::written() const {
  switch (node_->kind) {
    case TomlNode::Kind::text:
      return excerpt(node_->text);
    case TomlNode::Kind::array:
      return "an array";
    case TomlNode::Kind::table:
      return "a table";
    default:
      return node_->text.empty() ? "a value" : node_->text;
  }
}

std::string TomlCursor::found() const {
  return path_.empty() ? written() : fmt::format("{} for {}", written(), path_);
}

std::optional<std::string> TomlCursor::text(const std::string& expected) const {
  if (is(TomlNode::Kind::text)) return node_->text;
  error(fmt::format("{} must be text in quotation marks", path_), expected);
  return std::nullopt;
}

std::optional<double> TomlCursor::number(const std::string& expected) const {
  if (!is(TomlNode::Kind::number)) {
    error(fmt::format("{} must be a number", path_), expected);
    return std::nullopt;
  }
  if (!std::isfinite(node_->number)) {
    error(fmt::format("{} is not a finite number", path_), expected);
    return std::nullopt;
  }
  return node_->number;
}

std::optional<bool> TomlCursor::boolean() const {
  if (is(TomlNode::Kind::boolean)) return node_->boolean;
  error(fmt::format("{} must be true or false", path_), "true or false");
  return std::nullopt;
}

bool TomlCursor::must_be_table() const {
  if (is(TomlNode::Kind::table)) return true;
  error(fmt::format("{} must be a table", path_),
        fmt::format("[{}] and lines of key = value", path_));
  return false;
}

std::vector<TomlCursor> TomlCursor::items(const std::string& expected) const {
  std::vector<TomlCursor> result;
  if (!is(TomlNode::Kind::array)) {
    error(fmt::format("{} must be an array", path_), expected);
    return result;
  }
  for (const TomlNode& child : node_->children) {
    result.emplace_back(child, fmt::format("{}[{}]", path_, result.size() + 1), *findings_);
  }
  return result;
}

void TomlCursor::error(std::string summary, std::string expected, std::string fix) const {
  findings_->error(
      node_->line, node_->column, std::move(summary), found(), std::move(expected), std::move(fix));
}

void TomlCursor::error_at(std::size_t offset,
                          std::string summary,
                          std::string found,
                          std::string expected,
                          std::string fix) const {
  int column = node_->text_column;
  if (column != node_->column) {
    column += code_points(std::string_view(node_->text).substr(0, offset));
  }
  findings_->error(node_->line,
                   column,
                   std::move(summary),
                   fmt::format("{} for {}", found, path_),
                   std::move(expected),
                   std::move(fix));
}

void TomlCursor::key_error(std::string summary, std::string expected, std::string fix) const {
  findings_->error(node_->key_line,
                   node_->key_column,
                   std::move(summary),
                   excerpt(node_->key),
                   std::move(expected),
                   std::move(fix));
}

std::optional<TomlCursor> TomlCursor::find(std::string_view key) {
  if (std::find(asked_.begin(), asked_.end(), key) == asked_.end()) asked_.emplace_back(key);
  for (const TomlNode& child : node_->children) {
    if (child.key == key) return TomlCursor(child, path_to(path_, child.key), *findings_);
  }
  return std::nullopt;
}

bool TomlCursor::has(std::string_view key) const {
  return std::any_of(node_->children.begin(), node_->children.end(), [&](const TomlNode& child) {
    return child.key == key;
  });
}

std::optional<TomlCursor> TomlCursor::require(std::string_view key, const std::string& expected) {
  auto value = find(key);
  if (!value) {
    const std::string name(key);
    findings_->error(node_->line,
                     node_->column,
                     fmt::format("{} is missing", path_to(path_, name)),
                     "",
                     expected);
  }
  return value;
}

namespace {

/// A text over several lines is one paragraph.
std::string one_line(std::string text) {
  std::replace(text.begin(), text.end(), '\n', ' ');
  return text;
}

}  // namespace

std::string TomlCursor::text_at(std::string_view key, const std::string& expected) {
  const auto value = require(key, expected);
  if (!value) return "";
  const auto text = value->text(expected);
  if (text && text->empty()) value->error(fmt::format("{} is blank", value->path_), expected);
  return one_line(text.value_or(""));
}

double TomlCursor::number_at(std::string_view key, const std::string& expected) {
  const auto value = require(key, expected);
  return value ? value->number(expected).value_or(0) : 0;
}

std::string TomlCursor::text_if(std::string_view key, const std::string& expected) {
  const auto value = find(key);
  return value ? one_line(value->text(expected).value_or("")) : "";
}

std::optional<double> TomlCursor::number_if(std::string_view key, const std::string& expected) {
  const auto value = find(key);
  return value ? value->number(expected) : std::nullopt;
}

bool TomlCursor::flag(std::string_view key, bool if_left_out) {
  const auto value = find(key);
  return value ? value->boolean().value_or(if_left_out) : if_left_out;
}

std::vector<TomlCursor> TomlCursor::entries() {
  std::vector<TomlCursor> result;
  for (const TomlNode& child : node_->children) {
    asked_.push_back(child.key);
    result.emplace_back(child, path_to(path_, child.key), *findings_);
  }
  return result;
}

void TomlCursor::refuse_unknown_keys() const {
  for (const TomlNode& child : node_->children) {
    if (findings_->is_full()) return;
    if (std::find(asked_.begin(), asked_.end(), child.key) != asked_.end()) continue;
    const std::string nearest =
        child.key.size() > max_compared_key ? "" : nearest_word(child.key, asked_);
    findings_->error(
        child.key_line,
        child.key_column,
        fmt::format("unknown key {}", excerpt(child.key)),
        path_.empty() ? excerpt(child.key) : fmt::format("{} in {}", excerpt(child.key), path_),
        "one of " + joined(asked_),
        nearest.empty() ? "" : fmt::format("did you mean \"{}\"?", nearest));
  }
}

}  // namespace ionledger
