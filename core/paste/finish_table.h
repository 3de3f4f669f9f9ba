// What a pasted table says as a whole, once its lines have been read. Private to core/paste.
#pragma once

#include <vector>

#include "core/paste/columns.h"
#include "core/paste/table_text.h"

namespace rejoinder {

// A line of figures: nothing but figures, empty marks and words that mark inclusion stand after the label.
bool is_data(const TableLine& line);

// Where plain[first, last) of a line stands in the extract.
TextPlace place_of(const TableLine& line, int first, int last);

// Settles the decimal mark, takes figures that stand in words ("n = 180"), reads the notes on stars, errors
// and second figures, and tells the doubts about the whole.
void finish_table(PastedTable& table, const std::vector<TableLine>& lines, Divider divider);

}  // namespace rejoinder
