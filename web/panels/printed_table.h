// The columns of a review as one printed table: which rows there are and what each cell holds.
//
// Read from the document, not from the review, so that text which cannot be read stays visible as typed.
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "web/model/state.h"

namespace rejoinder {

// A line with coefficients. `term[c]` is the place of the term in column c's own list, -1 where it is not
// listed.
struct TermRow {
  std::string name;
  std::vector<int> term;
  std::string stop;  // the name, or the place where that is no name of its own: for focus and marks
};

// A line of the foot.
struct FootRow {
  const char* key;    // of the review file
  const char* label;  // as shown
};

struct PrintedTable {
  int columns = 0;
  std::vector<TermRow> rows;  // every term of every column once, in the order papers would print them
  std::vector<FootRow> foot;  // the figures that some column has, and the few that all need
};

// `all_figures`: the foot shows every line it can hold.
PrintedTable printed_table(const AppState& state, bool all_figures);

// Everything the grid shows of the table, so that it is worked out once for each change and not for each
// frame.
struct CellFacts {
  TableCell cell;
  bool listed = true;   // false where the column does not have the term
  std::string text;     // as printed
  std::string trouble;  // why it could not be read
  bool rests = false;   // the chosen finding rests on it
};
struct TableFacts {
  PrintedTable table;
  std::string second;                            // the key of what stands under the coefficients
  std::vector<CellFacts> coefficients, seconds;  // rows by columns, row after row
  std::vector<CellFacts> foot;                   // foot lines by columns
  const CellFacts& at(const std::vector<CellFacts>& cells, int row, int column) const {
    return cells[static_cast<size_t>(row) * static_cast<size_t>(table.columns) + static_cast<size_t>(column)];
  }
};
TableFacts table_facts(const AppState& state, bool all_figures);

// What the document holds in a cell, a ratio standing for a coefficient; empty where it holds nothing.
std::string text_in(const AppState& state, const TableCell& cell);
// The key that a cell for coefficients has in that term: "ratio" where the paper prints one, else "coef".
std::string coefficient_key(const AppState& state, int column, int term);
// The name by which a column is spoken of: "(2)".
std::string column_number(int column);
// The place of the column with that id, or -1.
int column_at(const AppState& state, std::string_view id);

// Which figure stands under the coefficients: "se", "t", "p" or "ci".
std::string second_figure(const AppState& state);
// "standard error", "t", "p", "interval"
const char* second_figure_words(std::string_view key);

// The number that the review understood in a cell; null where it holds none.
const PrintedNumber* number_in(const AppState& state, const TableCell& cell);
// Why the text of a cell could not be read; empty where it could, or where there is none.
std::string trouble_in(const AppState& state, const TableCell& cell);

// The same cell as findings name it.
Cell named_cell(const AppState& state, const TableCell& cell);
// Whether the chosen finding rests on it.
bool rests_on(const AppState& state, const TableCell& cell);
// The claims, by place, whose findings rest on it.
std::vector<int> feeds(const AppState& state, const TableCell& cell);
// "0.341 stands for 0.3405 to 0.3415"; empty for text without a number.
std::string stands_for(const PrintedNumber& number);

}  // namespace rejoinder
