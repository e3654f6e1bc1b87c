// A table of terminal text: columns as wide as their widest cell, cells padded before they are
// coloured.
#pragma once

#include <string>
#include <vector>

#include "report/text_page.hpp"

namespace ionledger {

enum class Align { left, right };

struct TableColumn {
  std::string title;
  Align align = Align::left;
  /// Gives way, cell by cell with "…", when the page is too narrow for the table.
  bool may_shrink = false;
};

class TextTable {
 public:
  explicit TextTable(std::vector<TableColumn> columns) : columns_(std::move(columns)) {}

  /// One cell per column.
  void row(std::vector<Piece> cells);
  /// A rule under the given columns, single or double.
  void rule(const std::vector<int>& under, bool is_double = false);
  /// Wrapped text across the table, indented under the row before.
  void note(std::string text);

  /// Columns the table wants, the left margin included.
  [[nodiscard]] int natural_width() const;
  /// Title row and rows. A table without rows prints nothing.
  void print(TextPage& page) const;

 private:
  struct Row {
    enum class Kind { cells, single_rule, double_rule, note } kind = Kind::cells;
    std::vector<Piece> cells;  ///< Of a rule: an empty text where no rule is drawn.
  };
  [[nodiscard]] std::vector<int> natural_widths() const;
  void print_cells(TextPage& page, const Row& row, const std::vector<int>& widths) const;

  std::vector<TableColumn> columns_;
  std::vector<Row> rows_;
};

}  // namespace ionledger
