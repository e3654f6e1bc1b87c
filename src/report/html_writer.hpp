// Writes HTML that is well-formed XML too. Separate so that no section of a page can forget to
// escape a text or to close an element.
#pragma once

#include <string>
#include <string_view>
#include <utility>
#include <vector>

namespace ionledger {

using Attributes = std::vector<std::pair<std::string_view, std::string>>;

class HtmlWriter {
 public:
  void open(std::string_view tag, const Attributes& attributes = {});
  void close();
  /// Text made printable and escaped.
  void text(std::string_view text);
  /// An element with nothing but text in it.
  void leaf(std::string_view tag, const Attributes& attributes, std::string_view text);
  /// An element with nothing in it, closed in its own tag: "<meta ... />", "<line ... />".
  void empty(std::string_view tag, const Attributes& attributes);
  /// Ours, not a user's: the document type and the style sheet.
  void trusted(std::string_view markup) { html_ += markup; }

  [[nodiscard]] std::string html() && { return std::move(html_); }

 private:
  void tag(std::string_view name, const Attributes& attributes, std::string_view end);

  std::string html_;
  std::vector<std::string> open_;
};

/// Opens an element and closes it at the end of its scope.
class Element {
 public:
  Element(HtmlWriter& html, std::string_view tag, const Attributes& attributes = {}) : html_(html) {
    html_.open(tag, attributes);
  }
  ~Element() { html_.close(); }
  Element(const Element&) = delete;
  Element& operator=(const Element&) = delete;

 private:
  HtmlWriter& html_;
};

/// A species or formula as chemists print it: "SO4-2" to "SO₄²⁻", "CaSO4(H2O)2" to "CaSO₄(H₂O)₂".
/// In Unicode, so that it serves tables, pictures and their descriptions alike.
[[nodiscard]] std::string typeset_formula(std::string_view name);

/// The same for every formula among words: "105 mg/L as CaCO3".
[[nodiscard]] std::string typeset_words(std::string_view text);

}  // namespace ionledger
