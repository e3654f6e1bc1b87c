// Recognises the most frequent slips by the library's sentence and the line they stand in.
#include "input/toml_slip.hpp"

#include <fmt/format.h>

#include "input/file_text.hpp"

namespace ionledger {
namespace {

constexpr std::string_view number_signs = "+-.0123456789";

bool contains(std::string_view text, std::string_view part) {
  return text.find(part) != std::string_view::npos;
}

/// The library's sentence without "Error while parsing something: ".
std::string_view core_of(std::string_view description) {
  constexpr std::string_view preamble = "Error while parsing ";
  const std::size_t colon = description.find(": ");
  if (description.substr(0, preamble.size()) != preamble || colon == std::string_view::npos) {
    return description;
  }
  return description.substr(colon + 2);
}

std::string summary_of(std::string_view core, bool is_at_line_end) {
  const std::size_t quote = core.find('\'');
  if (contains(core, "cannot redefine") && quote != std::string_view::npos) {
    return excerpt(core.substr(quote + 1, core.rfind('\'') - quote - 1)) + " is given twice";
  }
  if (contains(core, "maximum nested value depth")) return "values are nested too deeply";
  if (contains(core, "control character")) {
    return is_at_line_end ? "a text is not closed on its line" : "a control character in a text";
  }
  return fmt::format("this is not TOML: {}", core);
}

/// About `value` as it stands behind `key =`.
std::string fix_of_value(std::string_view core, std::string_view key, std::string_view value) {
  if (value.empty()) return fmt::format("write a value behind \"{} =\", or delete the line", key);
  if (value.front() == '"' || value.front() == '\'') return "put a remark behind the sign #";
  if (value.front() == '{' || value.front() == '[') {
    return contains(value, "%") ? "put every value with a unit in quotation marks" : "";
  }
  const bool starts_as_number = contains(number_signs, value.substr(0, 1));
  const std::size_t rest = value.find_first_not_of(number_signs);
  if (starts_as_number && rest != std::string_view::npos && value[rest] == ',') {
    return "write a decimal point, not a comma";
  }
  if (starts_as_number ? rest != std::string_view::npos : contains(core, "value type")) {
    return fmt::format("put the value in quotation marks: {} = \"{}\"", key, value);
  }
  return "";
}

std::string fix_of(std::string_view core, std::string_view line, bool is_at_line_end) {
  if (contains(core, "cannot redefine")) return "keep one of the two";
  if (contains(core, "control character")) {
    return is_at_line_end ? "close it with a quotation mark" : "delete it";
  }
  if (contains(core, "dangling comma")) return "delete the comma before the brace";
  if (contains(core, "leading zero")) return "delete the zero in front";
  if (contains(core, "escape")) return "write \\\\ for a backslash";
  if (contains(core, "after '\\r'")) return "save the file with line ends LF or CR LF";
  if (contains(core, "interpreted") || contains(core, "representable")) {
    return "write a smaller number";
  }
  if (contains(core, "closing '}'") && is_at_line_end)
    return "close the brace on the line it was opened";
  if (line.substr(0, 1) == "[") return "";
  const std::size_t equals = line.find('=');
  if (equals == std::string_view::npos) return "write it as: key = \"value\"";
  const std::string_view key = trimmed(line.substr(0, equals));
  if (contains(core, "expected '='") && !key.empty() && !contains(key, "\"")) {
    return fmt::format("put the key in quotation marks: \"{}\" = ...", key);
  }
  return fix_of_value(core, key, trimmed(line.substr(equals + 1)));
}

}  // namespace

TomlSlip explained(std::string_view description, std::string_view line, bool is_at_line_end) {
  const std::string_view core = core_of(description);
  return {summary_of(core, is_at_line_end), fix_of(core, line, is_at_line_end)};
}

std::string_view trimmed(std::string_view text) {
  const std::size_t begin = text.find_first_not_of(" \t");
  if (begin == std::string_view::npos) return {};
  return text.substr(begin, text.find_last_not_of(" \t") - begin + 1);
}

}  // namespace ionledger
