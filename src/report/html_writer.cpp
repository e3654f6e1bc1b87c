// Escaping, and the balance of elements.
#include "report/html_writer.hpp"

#include <algorithm>
#include <array>
#include <cctype>

#include "diagnostic/printable.hpp"

namespace ionledger {
namespace {

std::string escaped(std::string_view text) {
  std::string result;
  for (const char c : printable(text)) {
    switch (c) {
      case '&':
        result += "&amp;";
        break;
      case '<':
        result += "&lt;";
        break;
      case '>':
        result += "&gt;";
        break;
      case '"':
        result += "&quot;";
        break;
      default:
        result += c;
    }
  }
  return result;
}

bool is_digit(char c) { return std::isdigit(static_cast<unsigned char>(c)) != 0; }

}  // namespace

void HtmlWriter::tag(std::string_view name, const Attributes& attributes, std::string_view end) {
  html_ += '<';
  html_ += name;
  for (const auto& [key, value] : attributes) {
    html_ += ' ';
    html_ += key;
    html_ += "=\"" + escaped(value) + '"';
  }
  html_ += end;
}

void HtmlWriter::open(std::string_view name, const Attributes& attributes) {
  tag(name, attributes, ">");
  open_.emplace_back(name);
}

void HtmlWriter::close() {
  html_ += "</" + open_.back() + ">";
  // Lines for whoever reads the source or compares two pages; not inside a line of text.
  if (open_.back() != "span" && open_.back() != "tspan") html_ += '\n';
  open_.pop_back();
}

void HtmlWriter::text(std::string_view text) { html_ += escaped(text); }

void HtmlWriter::leaf(std::string_view name, const Attributes& attributes, std::string_view body) {
  open(name, attributes);
  text(body);
  close();
}

void HtmlWriter::empty(std::string_view name, const Attributes& attributes) {
  tag(name, attributes, "/>");
}

std::string typeset_formula(std::string_view name) {
  constexpr std::array<std::string_view, 10> below = {
      "₀", "₁", "₂", "₃", "₄", "₅", "₆", "₇", "₈", "₉"};
  constexpr std::array<std::string_view, 10> above = {
      "⁰", "¹", "²", "³", "⁴", "⁵", "⁶", "⁷", "⁸", "⁹"};
  const std::size_t sign = name.find_last_of("+-");
  const bool has_charge = sign != std::string_view::npos &&
                          name.find_first_not_of("0123456789", sign + 1) == std::string_view::npos;
  const std::string_view body = has_charge ? name.substr(0, sign) : name;
  std::string result;
  bool counts_atoms = false;  // "H2" does, the first number of "2 H2O" and of "13 traces" does not
  for (const char c : body) {
    if (is_digit(c) && counts_atoms) {
      result += below[std::size_t(c - '0')];
      continue;
    }
    counts_atoms = std::isalpha(static_cast<unsigned char>(c)) != 0 || c == ')';
    result += c;
  }
  if (!has_charge) return result;
  for (const char digit : name.substr(sign + 1)) result += above[std::size_t(digit - '0')];
  return result + (name[sign] == '+' ? "⁺" : "⁻");
}

std::string typeset_words(std::string_view text) {
  std::string result;
  while (!text.empty()) {
    const std::size_t end = std::min(text.find(' '), text.size());
    const std::string_view word = text.substr(0, end);
    const bool is_formula = !word.empty() && word[0] >= 'A' && word[0] <= 'Z' &&
                            word.find_first_of("0123456789") != std::string_view::npos;
    result += is_formula ? typeset_formula(word) : std::string(word);
    if (end < text.size()) result += ' ';
    text.remove_prefix(std::min(end + 1, text.size()));
  }
  return result;
}

}  // namespace ionledger
