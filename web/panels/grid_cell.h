// One cell of the printed table: drawn with its decimal point in line, chosen, typed in.
#pragma once

#include <optional>
#include <string>

#include "web/model/intent.h"
#include "web/panels/hands.h"
#include "web/panels/text.h"

namespace rejoinder {

// The text of a printed figure, split where its decimal point stands; whole numbers end there, words have no
// point.
struct Aligned {
  std::string left, right;
  bool numeric = false;
};
Aligned split_at_point(std::string text, char decimal);
// For drawing only: a hyphen that stands for a minus is drawn as one.
std::string with_minus(std::string text);

// How a cell is set: figures with their decimal points at point_x, headings centred, names of terms from the
// left, both in as many lines as they need.
enum class SetAt { Point, Centre, Left };
struct CellBox {
  ImVec2 low, high;
  SetAt set = SetAt::Point;
  float point_x = 0;
  Type type = Type::Body;
  ImU32 colour = 0;
  bool brackets = false;  // a second figure printed without brackets gets quiet ones
};

struct CellLook {
  bool rests = false;                  // the chosen finding rests on it
  std::string trouble;                 // why its text could not be read
  const char* hint = "";               // what an empty cell shows
  const std::string* shown = nullptr;  // drawn in place of the value, while it is not being typed
};

// What the keys asked for: to leave the cell in a direction.
struct CellMove {
  int columns = 0, lines = 0;
};

struct CellAnswer {
  std::optional<std::string> text;  // changed to this
  bool chosen = false;              // the focus came here in this frame
  bool hovered = false;
  CellMove move;
};

// Draws the cell and answers pointer and keys. `value` is the text as printed.
CellAnswer show_cell(Hands& hands, const std::string& id, const std::string& value, const CellBox& box,
                     const CellLook& look, char decimal);

}  // namespace rejoinder
