// Text on the page: measured, set in lines, drawn. Nothing here knows what the text means.
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "web/theme.h"

namespace rejoinder {

// A line of a text as it is set: the bytes [begin, end) of it, without the blank or line end it was broken
// at.
struct Line {
  size_t begin, end;
};

// `text` broken into lines no wider than `width` (CSS pixels; 0: only at its own line ends). Never empty. A
// word wider than a line is cut.
std::vector<Line> set_in_lines(Type type, std::string_view text, float width);

float text_width(Type type, std::string_view text);
// Of the whole block: lines times leading.
float text_height(Type type, std::string_view text, float width);

// Draws one line; `at` is its upper left, in a line of the style's leading.
void draw_line(Type type, const ImVec2& at, ImU32 colour, std::string_view text);
// Draws one line in no more than `width`; what does not fit ends in "…". Returns whether it was cut.
bool draw_cut(Type type, const ImVec2& at, ImU32 colour, std::string_view text, float width);
// Draws a block set in lines. Returns its height.
float draw_text(Type type, const ImVec2& at, ImU32 colour, std::string_view text, float width);

// A rule, `thickness` high, on the device's grid.
void draw_rule(const ImVec2& at, float width, float thickness, ImU32 colour);
// A filled card with a border inside its edge.
void draw_card(const ImVec2& low, const ImVec2& high, ImU32 fill, ImU32 edge, float thickness,
               float rounding);

}  // namespace rejoinder
