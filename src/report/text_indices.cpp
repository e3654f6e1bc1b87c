// The indices of the trade: one line each; with everything asked for, formula, inputs and source.
#include <cmath>

#include "report/number_text.hpp"
#include "report/text_sections.hpp"
#include "report/text_table.hpp"

namespace ionledger {
namespace {

constexpr int decimals_of_an_index = 2;
constexpr int digits_of_an_amount = 3;

std::string value_text(const IndexLine& line) {
  if (!line.value) return no_number;
  return line.unit.empty() ? fixed_text(*line.value, decimals_of_an_index)
                           : significant_text(*line.value, digits_of_an_amount) + " " + line.unit;
}

std::string input_text(const IndexInput& input) {
  const std::string value =
      input.unit.empty() ? fixed_text(input.value, decimals_of_an_index)
                         : significant_text(input.value, digits_of_an_amount) + " " + input.unit;
  return input.name + " " + value;
}

void print_evidence(TextPage& page, const IndexLine& line) {
  std::string inputs;
  for (const IndexInput& input : line.inputs) {
    inputs += (inputs.empty() ? "" : ", ") + input_text(input);
  }
  page.paragraph(line.title, 2);
  page.paragraph(line.formula + "; " + line.source, 4, Ink::quiet);
  page.paragraph(inputs.empty() ? "missing: " + line.missing : "from " + inputs, 4, Ink::quiet);
}

}  // namespace

void print_indices(TextPage& page, const AssessedState& state) {
  std::size_t without = 0;
  TextTable table({{"index", Align::left, true}, {"value", Align::right}});
  for (const IndexLine& line : state.indices) {
    without += line.value ? 0 : 1;
    if (line.value || page.shows_all()) table.row({{line.title}, {value_text(line)}});
  }
  if (state.indices.size() == without) return;
  page.heading("Indices", "by their published formulas");
  table.print(page);
  if (page.shows_all()) {
    for (const IndexLine& line : state.indices) print_evidence(page, line);
  } else if (without > 0) {
    page.paragraph(
        "Left out: " + counted(without, "index", "indices") + " without an input.", 2, Ink::quiet);
  }
}

}  // namespace ionledger
