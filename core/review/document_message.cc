#include "core/review/document_message.h"

#include <cctype>

namespace rejoinder {
namespace {

std::string_view trimmed(std::string_view text) {
  const std::size_t first = text.find_first_not_of(" \t");
  if (first == std::string_view::npos) return {};
  return text.substr(first, text.find_last_not_of(" \t") - first + 1);
}

bool holds(std::string_view text, std::string_view part) { return text.find(part) != std::string_view::npos; }

// The byte of the n-th character of a line.
std::size_t byte_of(std::string_view line, int column) {
  std::size_t at = 0;
  for (int i = 1; i < column && at < line.size(); ++i) {
    ++at;
    while (at < line.size() && (static_cast<unsigned char>(line[at]) & 0xC0) == 0x80) ++at;
  }
  return at;
}

// The unquoted piece around the place where reading stopped: up to a comma, a bracket or an equals sign.
std::string_view piece_at(std::string_view line, int column) {
  const std::string_view ends = "=,[]{}#\"";
  std::size_t begin = std::min(byte_of(line, column), line.size()), end = begin;
  while (begin > 0 && !holds(ends, line.substr(begin - 1, 1))) --begin;
  while (end < line.size() && !holds(ends, line.substr(end, 1))) ++end;
  return trimmed(line.substr(begin, end - begin));
}

bool stands_after_equals(std::string_view line, int column) {
  return holds(line.substr(0, std::min(line.size(), byte_of(line, column) + 1)), "=");
}

Error about_value(std::string_view line, int column) {
  std::string piece(piece_at(line, column));
  if (piece.empty())
    return {"", "a value is missing or cannot be read",
            "put text and printed numbers in double quotes: se = \"0.052\""};
  // Digits, signs and brackets begin a number; so does a minus beyond ASCII before a digit or a point.
  const std::size_t after_sign =
      piece.compare(0, 3, "\xE2\x88\x92") == 0 || piece.compare(0, 3, "\xE2\x80\x93") == 0 ? 3 : 0;
  const unsigned char first = static_cast<unsigned char>(after_sign < piece.size() ? piece[after_sign] : 'x');
  const bool number = std::isdigit(first) || holds(".-+(<>", std::string_view(piece).substr(
                                                                 std::min(after_sign, piece.size() - 1), 1));
  if (piece.size() > 60) {
    std::size_t end = 60;
    while (end > 0 && (static_cast<unsigned char>(piece[end]) & 0xC0) == 0x80) --end;
    piece = piece.substr(0, end) + "...";
  }
  if (number)
    return {"", "the number " + piece + " cannot be read without quotes",
            "write it as printed, in quotes: \"" + piece + "\""};
  return {"", "the text " + piece + " stands without quotes", "write it in double quotes: \"" + piece + "\""};
}

}  // namespace

Error document_message(std::string_view complaint, std::string_view line, int column) {
  const auto says = [&](std::string_view part) { return holds(complaint, part); };
  if (says("cannot redefine existing table") || says("array-of-tables"))
    return {"", "this table is there already",
            "give each table one header; [[column]], in two brackets, lists several"};
  if (says("cannot redefine existing"))
    return {"", "this key is there already",
            "keep one of the two; a further column, term or claim begins with its own [[header]]"};
  if (says("cannot insert") || says("existing inline table"))
    return {"", "this adds to a value that is complete already", "write all keys of a table in one place"};
  if (says("escape sequence") || says("surrogate") || says("U+10FFFF") || says("hex digit"))
    return {"", "a backslash in a quoted text begins an unknown sign", "write a backslash twice: \\\\"};
  if (says("control characters"))
    return {"", "a control character, or a quoted text that does not end on its line",
            "close the quote on the same line, and take away what cannot be seen"};
  if (says("multi-line strings"))
    return {"", "a key cannot run over several lines", "write the key on one line"};
  if (says("table header") || says("array-of-table]]"))
    return {"", "this header cannot be read",
            "write [table] or [[list]], names with blanks in double quotes, alone on its line"};
  if (says("saw comma") || says("dangling comma"))
    return {"", "a comma without a value after or before it", "take the comma away"};
  // Text or a number without quotes shows itself in several ways.
  const bool in_value = says("value") || says("digit") || says("leading zeroes") || says("underscore") ||
                        says("integer") || says("float") || says("date") || says("time") ||
                        says("expected a comment") || says("boolean") || says("'inf'") || says("'nan'") ||
                        says("comma or closing");
  if (says("comma or closing"))
    return {"", "a comma or a closing bracket is missing",
            "put a comma between values and close each bracket"};
  if (in_value && stands_after_equals(line, column)) return about_value(line, column);
  if (says("'='") || says("key"))
    return {"", "this line is no key with a value",
            "write key = \"value\"; keys with blanks or signs stand in double quotes"};
  return {"", "this cannot be read", "write key = \"value\" lines under [headers]"};
}

}  // namespace rejoinder
