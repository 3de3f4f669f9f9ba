// A pasted regression table, read cell by cell.
//
// The extract is never altered: every cell says where in it it stands. What was understood can be shown,
// corrected and refused before any of it enters a review; a cell that may have been read otherwise says why
// in `doubt`.
//
// Understood: columns parted by tabs, by commas or semicolons (CSV, quotes allowed), by |, by & (LaTeX), by
// two blanks or more, or, failing these, by single blanks. Coefficients with their second figure beneath them
// in brackets, or on the same line, or under headings such as "Std. err."; stars and daggers glued or apart;
// foot lines (n, R², adjusted R², F, log-likelihood, ...); minus signs of any kind with a gap after them;
// decimal commas, decided once per table.
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "core/review/document.h"

namespace rejoinder {

// Characters of one line of the extract: line from 1, characters from 1, both ends included. line 0: nowhere.
struct TextPlace {
  int line = 0, first = 0, last = 0;
  bool operator==(const TextPlace&) const = default;
};

struct PastedCell {
  std::string text;   // as pasted; empty where the table has nothing
  std::string key;    // "coef", "se", "t", "p", "ci"; "n", "r2", ... in foot lines
  std::string doubt;  // why it may have been read otherwise; empty where there is no doubt
  TextPlace place;
  bool empty() const { return text.empty(); }
};

struct PastedRow {
  enum class Kind { Term, Foot, Mark };  // Mark: a line of words, "Constant  yes  yes"
  Kind kind = Kind::Term;
  std::string label;
  std::string key;                // of a foot line; "" otherwise
  std::vector<PastedCell> cells;  // one a column: coefficient or foot figure
  std::vector<PastedCell> more;   // second figures, any number; each names its column by `more_column`
  std::vector<int> more_column;   // parallel to `more`
  bool intercept = false;
  TextPlace place;
};

struct PastedTable {
  std::string extract;               // the text as pasted
  std::vector<std::string> columns;  // headings
  std::string outcome;               // a line over the headings that names one, else empty
  std::string title;                 // first line of words
  std::vector<PastedRow> rows;
  std::vector<std::string> notes;  // lines that belong to no row, in order
  std::string second;  // what stands under the coefficients: "se", "t", "p", "ci"; "" where nothing does
  std::string second_reason;   // how that was settled
  bool second_certain = true;  // false: two readings fit the stars equally well; ask
  char decimal = '.';
  std::vector<double> stars;        // levels of one, two, three stars where the notes state them
  std::string errors;               // "robust", "clustered" where the notes say so
  std::vector<std::string> doubts;  // about the table as a whole

  int figures() const;  // cells that hold one
  int doubtful() const;
  bool empty() const { return rows.empty(); }
  bool variance_table() const;  // headings are sums of squares, df, mean squares, F, p
};

// Never refuses: text without any table gives a table without rows. At most 400 lines are read.
PastedTable read_pasted_table(std::string_view text);

// The table with another reading of the second figures ("se", "t", "p", "ci"), misfits told anew.
PastedTable with_second_figure(PastedTable table, const std::string& key);

// A review that holds the table and no claim: `rejoinder`, `title`, and a [[column]] for each column, or a
// [[source]] for each line of an analysis of variance table. k is set only where it is printed.
Node review_from_table(const PastedTable& table);

// The cells of a rectangular block without headings, row by row: a range copied from a spreadsheet. Empty
// where the text has neither tabs nor the form of CSV. A single line without tabs is no block.
std::vector<std::vector<std::string>> read_block(std::string_view text);

}  // namespace rejoinder
