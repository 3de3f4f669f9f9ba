// The words of the restriction language: names, numbers and signs, each with the character where it stands.
//
// A name is a run of letters, digits and underscores that does not start with a digit, or anything in double
// quotes with \" and \\ inside. Every kind of printed minus, times and division sign is read; blanks of any
// kind separate. Used by the parser, and by the page to mark a name inside a restriction or to rename it
// there.
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "core/result.h"

namespace rejoinder {

struct Token {
  enum class Kind {
    Name,    // `text` without quotes and escapes
    Number,  // `number`
    Plus,
    Minus,
    Times,
    Divide,
    Power,
    Equals,
    Separator,  // comma or semicolon
    Open,
    Close,
    Dot,  // between a column and a term
    End
  };
  Kind kind = Kind::End;
  std::string text;                // a name's content; of all others the text as written
  double number = 0;               // of a Number; at most the greatest double
  bool quoted = false;             // of a Name
  bool after_blank = false;        // a blank stands before it
  bool after_break = false;        // a line break stands before it
  int character = 1;               // where it begins, counted from 1 in characters
  std::size_t begin = 0, end = 0;  // its bytes in the text
};

// The tokens of `text`, the last one of kind End. Errors name the character in `where`. At most 200,000
// bytes.
Result<std::vector<Token>> read_tokens(std::string_view text);

// Whether `name` may stand without quotes: letters, digits, underscores, not starting with a digit, not
// "all".
bool is_plain_name(std::string_view name);

// `name` as the language writes it, in quotes where it needs them.
std::string written_name(std::string_view name);

// "character 8", the form in which every Error of the language says where.
std::string at_character(int character);

}  // namespace rejoinder
