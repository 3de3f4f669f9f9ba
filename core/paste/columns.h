// Which column each figure of a line belongs to. Private to core/paste.
#pragma once

#include <string>
#include <vector>

#include "core/paste/cells.h"

namespace rejoinder {

// A line cut into its label and what stands in the columns.
struct TableLine {
  int number = 0;  // from 1
  const PlainLine* text = nullptr;
  std::string label;  // plain
  int label_first = 0, label_last = 0;
  bool indented = false;
  bool loose = false;         // label and figures are parted by single blanks only
  std::vector<Piece> values;  // figures, empty marks and words after the label
  int figures() const;        // values that are figures
  bool words_only() const { return values.empty() && !label.empty(); }
  bool blank() const { return values.empty() && label.empty(); }
};

TableLine table_line(const PlainLine& line, int number, Divider divider);

// Where the columns stand. In a divided table a column is a field; else it is a span of characters.
class ColumnPlaces {
 public:
  // `lines` are those that hold figures; `paired` tells that figures in brackets go with the one before them.
  ColumnPlaces(const std::vector<const TableLine*>& lines, Divider divider);

  int count() const { return static_cast<int>(spans_.size()); }

  struct Placed {
    int column = 0;
    std::string doubt;
  };
  // One a piece, in order. `taken`: the columns that hold a coefficient above, for a line of second figures.
  std::vector<Placed> place(const PlainLine& line, const std::vector<Piece>& pieces,
                            const std::vector<int>& taken) const;

 private:
  struct Span {
    double first = 0, last = 0;
    double centre() const { return (first + last) / 2; }
  };
  Divider divider_;
  std::vector<Span> spans_;
};

// The figures of a line that fill columns: unbracketed ones, or all where every one is bracketed.
std::vector<Piece> main_pieces(const std::vector<Piece>& values);

}  // namespace rejoinder
