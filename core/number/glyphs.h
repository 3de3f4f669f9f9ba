// The characters that print uses around numbers: many minus signs, blanks, stars and raised digits.
//
// Text from a page or a PDF carries the typesetter's characters, not the keyboard's. Here each gets one plain
// meaning, so that the reader of numbers never compares bytes. Private to core/number.
#pragma once

#include <string_view>
#include <vector>

namespace rejoinder {

enum class Mark {
  Digit,        // 0 to 9; value holds it
  RaisedDigit,  // superscript 0 to 9; value holds it
  Point,        // .
  Comma,        // ,
  RaisedPoint,  // · and its kin: a decimal mark in some journals, "times" before a power of ten
  Apostrophe,   // ' and the typographic one
  Blank,        // blanks of every width, tabs
  Minus,        // hyphen, minus, en dash and their kin
  RaisedMinus,
  Plus,
  RaisedPlus,
  Times,   // × and its kin
  Star,    // value holds how many stars it stands for: † one, ‡ two
  Open,    // ( [ {; value holds the character
  Close,   // ) ] }; value holds the opening partner
  Below,   // < and ≤
  Above,   // > and ≥
  Equals,  // =
  Caret,   // ^
  Percent,
  Letter,  // a to z, capitals made small; value holds it. The x of "x10" is a Letter.
  Other    // anything else, malformed UTF-8 included
};

struct Glyph {
  Mark mark = Mark::Other;
  char value = 0;
};

// One Glyph for each character of UTF-8 text.
std::vector<Glyph> read_glyphs(std::string_view text);

}  // namespace rejoinder
