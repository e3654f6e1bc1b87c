// Laying out the columns of a table.
#include "report/text_table.hpp"

#include <algorithm>
#include <cstddef>
#include <numeric>

#include "diagnostic/printable.hpp"
#include "report/terminal_text.hpp"

namespace ionledger {
namespace {

constexpr int left_margin = 2;
constexpr int gap = 2;
constexpr int note_indent = 6;
constexpr int narrowest_column = 6;

int total_width(const std::vector<int>& widths) {
  return left_margin + std::accumulate(widths.begin(), widths.end(), 0) +
         gap * (static_cast<int>(widths.size()) - 1);
}

}  // namespace

void TextTable::row(std::vector<Piece> cells) {
  for (Piece& cell : cells) cell.text = printable(cell.text);
  rows_.push_back({Row::Kind::cells, std::move(cells)});
}

void TextTable::rule(const std::vector<int>& under, bool is_double) {
  std::vector<Piece> cells(columns_.size());
  for (const int column : under) {
    cells[static_cast<std::size_t>(column)] = {is_double ? "═" : "─", Ink::quiet};
  }
  rows_.push_back({is_double ? Row::Kind::double_rule : Row::Kind::single_rule, std::move(cells)});
}

void TextTable::note(std::string text) {
  rows_.push_back({Row::Kind::note, {{std::move(text), Ink::quiet}}});
}

std::vector<int> TextTable::natural_widths() const {
  std::vector<int> widths;
  for (const TableColumn& column : columns_) widths.push_back(display_width(column.title));
  for (const Row& row : rows_) {
    if (row.kind != Row::Kind::cells) continue;
    for (std::size_t i = 0; i < widths.size(); ++i) {
      widths[i] = std::max(widths[i], display_width(row.cells[i].text));
    }
  }
  return widths;
}

int TextTable::natural_width() const { return total_width(natural_widths()); }

void TextTable::print_cells(TextPage& page, const Row& row, const std::vector<int>& widths) const {
  std::vector<Piece> pieces = {{repeated(" ", left_margin)}};
  for (std::size_t i = 0; i < widths.size(); ++i) {
    const Piece& cell = row.cells[i];
    const bool is_rule = row.kind != Row::Kind::cells && !cell.text.empty();
    const std::string text =
        is_rule ? repeated(cell.text, widths[i]) : clipped(cell.text, widths[i]);
    pieces.push_back({columns_[i].align == Align::left ? padded_right(text, widths[i])
                                                       : padded_left(text, widths[i]),
                      cell.ink});
    if (i + 1 < widths.size()) pieces.push_back({repeated(" ", gap)});
  }
  page.line(pieces);
}

void TextTable::print(TextPage& page) const {
  if (rows_.empty()) return;
  std::vector<int> widths = natural_widths();
  for (std::size_t i = 0; i < widths.size(); ++i) {
    const int excess = total_width(widths) - page.width();
    if (columns_[i].may_shrink && excess > 0) {
      widths[i] = std::max(std::min(widths[i], narrowest_column), widths[i] - excess);
    }
  }
  Row titles;
  for (const TableColumn& column : columns_) titles.cells.push_back({column.title, Ink::quiet});
  print_cells(page, titles, widths);
  for (const Row& row : rows_) {
    if (row.kind == Row::Kind::note) {
      page.paragraph(row.cells.front().text, note_indent, row.cells.front().ink);
    } else {
      print_cells(page, row, widths);
    }
  }
}

}  // namespace ionledger
