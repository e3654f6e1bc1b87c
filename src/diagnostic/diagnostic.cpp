// Findings collected, put in order and rendered as text; the one place that knows their layout.
#include "ionledger/diagnostic.hpp"

#include <algorithm>
#include <tuple>
#include <utility>

#include "diagnostic/printable.hpp"

namespace ionledger {
namespace {

std::string place(const SourceSpan& where) {
  std::string text = where.file.empty() ? "" : printable(where.file) + ":";
  if (where.line > 0) text += std::to_string(where.line) + ":";
  if (where.line > 0 && where.column > 0) text += std::to_string(where.column) + ":";
  return text.empty() ? "" : text + " ";
}

void append_line(std::string& text, const char* label, const std::string& content) {
  if (content.empty()) return;
  text += label + printable(content) + "\n";
}

std::string block(const Diagnostic& finding) {
  const char* severity = finding.severity == Severity::error ? "error: " : "warning: ";
  std::string text = place(finding.where) + severity + printable(finding.summary) + "\n";
  append_line(text, "  found:    ", finding.found);
  append_line(text, "  expected: ", finding.expected);
  append_line(text, "  fix:      ", finding.fix);
  return text;
}

}  // namespace

void Diagnostics::add(Diagnostic diagnostic) { items_.push_back(std::move(diagnostic)); }

void Diagnostics::error(SourceSpan where,
                        std::string summary,
                        std::string found,
                        std::string expected,
                        std::string fix) {
  add({Severity::error,
       std::move(where),
       std::move(summary),
       std::move(found),
       std::move(expected),
       std::move(fix)});
}

void Diagnostics::warning(SourceSpan where,
                          std::string summary,
                          std::string found,
                          std::string expected,
                          std::string fix) {
  add({Severity::warning,
       std::move(where),
       std::move(summary),
       std::move(found),
       std::move(expected),
       std::move(fix)});
}

bool Diagnostics::has_errors() const {
  return std::any_of(items_.begin(), items_.end(), [](const Diagnostic& item) {
    return item.severity == Severity::error;
  });
}

std::vector<Diagnostic> Diagnostics::sorted() const {
  std::vector<Diagnostic> result = items_;
  std::stable_sort(result.begin(), result.end(), [](const Diagnostic& a, const Diagnostic& b) {
    return std::tie(a.where.file, a.where.line, a.where.column) <
           std::tie(b.where.file, b.where.line, b.where.column);
  });
  return result;
}

std::string render(const Diagnostics& diagnostics) {
  const std::vector<Diagnostic> findings = diagnostics.sorted();
  const std::size_t shown = std::min(findings.size(), Diagnostics::max_rendered);
  std::string text;
  for (std::size_t i = 0; i < shown; ++i) text += block(findings[i]);
  if (shown < findings.size()) {
    text += "... and " + std::to_string(findings.size() - shown) + " more\n";
  }
  return text;
}

}  // namespace ionledger
