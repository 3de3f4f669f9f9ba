// One line of a pasted table cut into pieces. Private to core/paste.
#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "core/paste/plain_text.h"

namespace rejoinder {

enum class Divider { Tabs, Commas, Semicolons, Bars, Ampersands, Gaps, Blanks };

// plain[first, last) of a line. A figure is a printed number with what belongs to it: brackets, stars, "<".
struct Piece {
  enum class Kind {
    Words,
    Figure,
    Nothing
  };  // Nothing: a lone dash or dot, which print uses for an empty cell
  Kind kind = Kind::Words;
  int first = 0, last = 0;
  int field = -1;          // which field of a divided line; -1 where blanks divide
  bool bracketed = false;  // the figure stands in brackets
  bool interval = false;   // two numbers in one pair of brackets
  std::string text;        // plain, trimmed
};

// The end of the figure that starts at plain[at], or nothing. "0.131**", "(0.052)", "[-0.2, 0.1]", "- 219.0",
// "<0.001", "-.232* *". The figure ends at a blank, a divider or the end; one raised letter of a footnote is
// allowed.
struct Figure {
  int end = 0;
  bool bracketed = false, interval = false;
};
std::optional<Figure> figure_at(std::string_view plain, int at);

// What parts the columns of the whole text.
Divider divider_of(const std::vector<PlainLine>& lines);

// Pieces from left to right. In divided lines empty fields are left out, but count for `field`.
std::vector<Piece> pieces_of(const PlainLine& line, Divider divider);

// A word that stands for "included" or "left out".
bool is_mark_word(std::string_view plain);

// "(1)", "(a)", "[2]", "II", "Model 3": a column's number and nothing else.
bool is_column_number(std::string_view plain);

}  // namespace rejoinder
