// Pasted text with the typesetter's characters made plain, and the way back.
//
// A PDF or a web page gives many kinds of blank, minus sign, star and ligature. The readers of tables and
// sentences compare plain characters only; the places let them quote the text exactly as it was pasted.
#pragma once

#include <string>
#include <string_view>
#include <vector>

namespace rejoinder {

// One line. `plain` holds one byte for each visible unit: blanks of every width are ' ', tabs stay tabs,
// every kind of minus is '-', stars are '*', daggers '+', raised digits plain digits, ligatures their
// letters; any other character beyond ASCII stays as its UTF-8 bytes. `from[i]` and `to[i]` are the bytes of
// the pasted line that plain[i] stands for, and `column[i]` is the character's place in the line, counted
// from 0, each character once.
struct PlainLine {
  std::string_view pasted;  // without the end of line
  std::string plain;
  std::vector<int> from, to, column;

  int size() const { return static_cast<int>(plain.size()); }
  // The pasted text behind plain[first, last).
  std::string original(int first, int last) const;
};

// The lines of `text`, which must outlive them. Ends of line: \n, \r\n, \r. Malformed UTF-8 is kept byte by
// byte.
std::vector<PlainLine> plain_lines(std::string_view text);

// Small helpers for plain ASCII text.
std::string trimmed(std::string_view text);
std::string lower_case(std::string_view text);
bool starts_with_word(std::string_view text, std::string_view word);  // the word, then no letter or digit
bool contains(std::string_view text, std::string_view part);

}  // namespace rejoinder
