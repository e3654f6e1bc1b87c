// The sections of the page, each in the order in which page.cpp calls them.
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "ionledger/assessment.hpp"
#include "report/html_writer.hpp"

namespace ionledger {

/// A section with its number, its heading and one finding: what it shows, not what it is.
class Section {
 public:
  Section(HtmlWriter& html,
          int number,
          const std::string& style,
          const std::string& heading,
          const std::string& finding);

 private:
  Element element_;
};

/// A column of a table; the unit stands below the name, so that cells hold numbers only.
struct PageColumn {
  std::string name, unit;
  bool is_text = false;
};
/// The first column names its row.
void write_table(HtmlWriter& html,
                 const std::string& caption,
                 const std::vector<PageColumn>& columns,
                 const std::vector<std::vector<std::string>>& rows);

/// "as_received" to "as received".
[[nodiscard]] std::string shown_words(std::string_view key);

/// True for a water beside the train, such as a permeate: the next step does not continue it.
[[nodiscard]] bool is_beside(const std::vector<AssessedState>& states, std::size_t i);

void write_header(HtmlWriter& html, const Assessment& assessment);
void write_verdict(HtmlWriter& html, const AssessedState& state);
void write_balance(HtmlWriter& html, int number, const AssessedState& state);
void write_minerals(HtmlWriter& html, int number, const AssessedState& state);
void write_species(HtmlWriter& html, int number, const AssessedState& state);
void write_properties(HtmlWriter& html, int number, const Assessment& assessment);
void write_steps(HtmlWriter& html, int number, const std::vector<AssessedState>& states);
void write_cautions(HtmlWriter& html, int number, const std::vector<AssessedState>& states);
void write_equation(HtmlWriter& html, int number, const AssessedState& state);
void write_record(HtmlWriter& html, int number, const Assessment& assessment);

}  // namespace ionledger
