// The lines of the printed table: headings, terms with their second figures, the foot.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "web/model/intent.h"
#include "web/panels/grid_cell.h"
#include "web/panels/hands.h"
#include "web/panels/table_layout.h"

namespace rejoinder {

// The grid as the arrows see it: each line's stops, the name of the row first, "" where there is none.
using Stops = std::vector<std::vector<std::string>>;

// The table while it is being drawn, and what the reader did to it in this frame.
struct TableGrid {
  const AppState& state;
  Hands& hands;
  const TableFacts& facts;
  const TableLayout& layout;
  Intent intent = {};
  Stops stops = {};
  std::optional<TableCell> pointed = {};  // the cell under the pointer
  std::string moved_from = {};
  CellMove move = {};
  ImVec2 clip_low = {}, clip_high = {};  // of the figures, right of the names

  void take(const std::string& id, const CellAnswer& answer);
  // Draws a figure of the term called `name` (empty in the foot) in the line that starts at `y`; returns its
  // stop.
  std::string figure(const CellFacts& fact, const std::string& name, const std::string& id, float y,
                     float height, Type type, ImU32 colour, bool brackets);
  // The stop that `move` leads to from where it was asked for; the same one at the table's edge.
  std::string moved_to() const;
};

// Each draws its lines from `y` down and returns where they end.
float show_headings(TableGrid& grid, float y);
float show_term(TableGrid& grid, int row, float y);
float show_foot(TableGrid& grid, float y);

}  // namespace rejoinder
