#include "core/number/glyphs.h"

#include <cstddef>
#include <cstdint>

namespace rejoinder {
namespace {

struct Meaning {
  char32_t code;
  Glyph glyph;
};

// Code points beyond ASCII, by their Unicode names.
constexpr Meaning kMeanings[] = {
    {0x00A0, {Mark::Blank}},           // no-break space
    {0x00B2, {Mark::RaisedDigit, 2}},  // superscript two
    {0x00B3, {Mark::RaisedDigit, 3}},  // superscript three
    {0x00B4, {Mark::Apostrophe}},      // acute accent
    {0x00B7, {Mark::RaisedPoint}},     // middle dot
    {0x00B9, {Mark::RaisedDigit, 1}},  // superscript one
    {0x00D7, {Mark::Times}},           // multiplication sign
    {0x02BC, {Mark::Apostrophe}},      // modifier letter apostrophe
    {0x0387, {Mark::RaisedPoint}},     // Greek ano teleia
    {0x2010, {Mark::Minus}},           // hyphen
    {0x2011, {Mark::Minus}},           // non-breaking hyphen
    {0x2012, {Mark::Minus}},           // figure dash
    {0x2013, {Mark::Minus}},           // en dash
    {0x2014, {Mark::Minus}},           // em dash
    {0x2018, {Mark::Apostrophe}},      // left single quotation mark
    {0x2019, {Mark::Apostrophe}},      // right single quotation mark
    {0x2020, {Mark::Star, 1}},         // dagger
    {0x2021, {Mark::Star, 2}},         // double dagger
    {0x2032, {Mark::Apostrophe}},      // prime
    {0x204E, {Mark::Star, 1}},         // low asterisk
    {0x2051, {Mark::Star, 2}},         // two asterisks aligned vertically
    {0x2070, {Mark::RaisedDigit, 0}},  // superscript zero
    {0x207A, {Mark::RaisedPlus}},      // superscript plus sign
    {0x207B, {Mark::RaisedMinus}},     // superscript minus
    {0x2212, {Mark::Minus}},           // minus sign
    {0x2217, {Mark::Star, 1}},         // asterisk operator
    {0x2219, {Mark::RaisedPoint}},     // bullet operator
    {0x2264, {Mark::Below}},           // less-than or equal to
    {0x2265, {Mark::Above}},           // greater-than or equal to
    {0x2266, {Mark::Below}},           // less-than over equal to
    {0x2267, {Mark::Above}},           // greater-than over equal to
    {0x22C5, {Mark::RaisedPoint}},     // dot operator
    {0x22C6, {Mark::Star, 1}},         // star operator
    {0x2605, {Mark::Star, 1}},         // black star
    {0x2715, {Mark::Times}},           // multiplication x
    {0x2731, {Mark::Star, 1}},         // heavy asterisk
    {0x2A7D, {Mark::Below}},           // less-than or slanted equal to
    {0x2A7E, {Mark::Above}},           // greater-than or slanted equal to
    {0x3000, {Mark::Blank}},           // ideographic space
    {0xFE61, {Mark::Star, 1}},         // small asterisk
    {0xFE63, {Mark::Minus}},           // small hyphen-minus
    {0xFEFF, {Mark::Blank}},           // zero width no-break space
    {0xFF0A, {Mark::Star, 1}},         // fullwidth asterisk
    {0xFF0D, {Mark::Minus}},           // fullwidth hyphen-minus
};

Glyph meaning_of_ascii(char c) {
  if (c >= '0' && c <= '9') return {Mark::Digit, static_cast<char>(c - '0')};
  if (c >= 'a' && c <= 'z') return {Mark::Letter, c};
  if (c >= 'A' && c <= 'Z') return {Mark::Letter, static_cast<char>(c - 'A' + 'a')};
  switch (c) {
    case '.':
      return {Mark::Point};
    case ',':
      return {Mark::Comma};
    case '\'':
      return {Mark::Apostrophe};
    case ' ':
    case '\t':
    case '\n':
    case '\r':
      return {Mark::Blank};
    case '-':
      return {Mark::Minus};
    case '+':
      return {Mark::Plus};
    case '*':
      return {Mark::Star, 1};
    case '(':
    case '[':
    case '{':
      return {Mark::Open, c};
    case ')':
      return {Mark::Close, '('};
    case ']':
      return {Mark::Close, '['};
    case '}':
      return {Mark::Close, '{'};
    case '<':
      return {Mark::Below};
    case '>':
      return {Mark::Above};
    case '=':
      return {Mark::Equals};
    case '^':
      return {Mark::Caret};
    case '%':
      return {Mark::Percent};
    default:
      return {};
  }
}

Glyph meaning_of(char32_t code) {
  if (code < 0x80) return meaning_of_ascii(static_cast<char>(code));
  if (code >= 0x2074 && code <= 0x2079) return {Mark::RaisedDigit, static_cast<char>(code - 0x2070)};
  if (code >= 0x2000 && code <= 0x200B) return {Mark::Blank};  // en quad to zero width space
  if (code == 0x202F || code == 0x205F || code == 0x2060) return {Mark::Blank};
  for (const Meaning& meaning : kMeanings)
    if (meaning.code == code) return meaning.glyph;
  return {};
}

// The code point at `at`, which moves past it. A byte that starts no character counts as one unknown
// character.
char32_t next_code_point(std::string_view text, std::size_t& at) {
  const auto byte = [&](std::size_t i) -> std::uint8_t {
    return i < text.size() ? static_cast<std::uint8_t>(text[i]) : 0;
  };
  const std::uint8_t lead = byte(at);
  const std::size_t length = lead < 0x80       ? 1
                             : lead >> 5 == 6  ? 2
                             : lead >> 4 == 14 ? 3
                             : lead >> 3 == 30 ? 4
                                               : 0;
  char32_t code = length == 1 ? lead : lead & (0xFF >> (length + 1));
  for (std::size_t i = 1; i < length; ++i) {
    if (byte(at + i) >> 6 != 2) {
      ++at;
      return 0xFFFD;
    }
    code = code << 6 | (byte(at + i) & 0x3F);
  }
  at += length == 0 ? 1 : length;
  return length == 0 ? 0xFFFD : code;
}

}  // namespace

std::vector<Glyph> read_glyphs(std::string_view text) {
  std::vector<Glyph> glyphs;
  glyphs.reserve(text.size());
  for (std::size_t at = 0; at < text.size();) glyphs.push_back(meaning_of(next_code_point(text, at)));
  return glyphs;
}

}  // namespace rejoinder
