#include "core/paste/plain_text.h"

#include <cctype>

namespace rejoinder {
namespace {

struct Decoded {
  char32_t code = 0;
  int length = 1;
};

// One character of UTF-8; a byte that starts none stands for itself.
Decoded decode(std::string_view text, std::size_t at) {
  const auto byte = [&](std::size_t i) { return static_cast<unsigned char>(text[i]); };
  const unsigned char first = byte(at);
  const int length = first < 0x80 ? 1 : first >= 0xF0 ? 4 : first >= 0xE0 ? 3 : first >= 0xC2 ? 2 : 0;
  if (length == 0 || at + length > text.size()) return {first, 1};
  if (length == 1) return {first, 1};
  char32_t code = first & (0xFF >> (length + 1));
  for (int i = 1; i < length; ++i) {
    if ((byte(at + i) & 0xC0) != 0x80) return {first, 1};
    code = (code << 6) | (byte(at + i) & 0x3F);
  }
  return {code, length};
}

// What a character becomes; null where it stays as it is.
const char* plain_form(char32_t code) {
  switch (code) {
    case 0x00A0:
    case 0x1680:
    case 0x202F:
    case 0x205F:
    case 0x3000:
      return " ";
    case 0x00AD:
    case 0x200B:
    case 0x200C:
    case 0x200D:
    case 0xFEFF:
    case 0x2060:
      return "";
    case 0x2010:
    case 0x2011:
    case 0x2012:
    case 0x2013:
    case 0x2014:
    case 0x2212:
    case 0xFE63:
    case 0xFF0D:
      return "-";
    case 0x2217:
    case 0x22C6:
    case 0x2605:
    case 0x204E:
    case 0xFF0A:
      return "*";
    case 0x2020:
    case 0x2021:
      return "+";
    case 0x00B9:
      return "1";
    case 0x00B2:
      return "2";
    case 0x00B3:
      return "3";
    case 0x2018:
    case 0x2019:
      return "'";
    case 0x201C:
    case 0x201D:
      return "\"";
    case 0xFB00:
      return "ff";
    case 0xFB01:
      return "fi";
    case 0xFB02:
      return "fl";
    case 0xFB03:
      return "ffi";
    case 0xFB04:
      return "ffl";
    case 0x2264:
      return "<";
    case 0x2265:
      return ">";
    case 0x2248:
      return "=";
    default:
      break;
  }
  if (code >= 0x2000 && code <= 0x200A) return " ";
  static const char* const digits[] = {"0", "1", "2", "3", "4", "5", "6", "7", "8", "9"};
  if (code >= 0x2070 && code <= 0x2079) return digits[code - 0x2070];
  if (code >= 0x2080 && code <= 0x2089) return digits[code - 0x2080];
  return nullptr;
}

PlainLine plain_line(std::string_view pasted) {
  PlainLine line;
  line.pasted = pasted;
  int column = 0;
  for (std::size_t at = 0; at < pasted.size(); ++column) {
    const Decoded character = decode(pasted, at);
    const char* form = character.code >= 0x80 ? plain_form(character.code) : nullptr;
    const std::string_view plain = form ? std::string_view(form) : pasted.substr(at, character.length);
    for (const char c : plain) {
      line.plain += c;
      line.from.push_back(static_cast<int>(at));
      line.to.push_back(static_cast<int>(at) + character.length);
      line.column.push_back(column);
    }
    at += character.length;
  }
  return line;
}

}  // namespace

std::string PlainLine::original(int first, int last) const {
  if (first >= last || first < 0 || last > size()) return {};
  return std::string(pasted.substr(from[first], to[last - 1] - from[first]));
}

std::vector<PlainLine> plain_lines(std::string_view text) {
  std::vector<PlainLine> lines;
  std::size_t start = 0;
  while (start <= text.size()) {
    const std::size_t end = text.find_first_of("\r\n", start);
    lines.push_back(plain_line(text.substr(start, end == std::string_view::npos ? end : end - start)));
    if (end == std::string_view::npos) break;
    start = end + 1;
    if (text[end] == '\r' && start < text.size() && text[start] == '\n') ++start;
  }
  return lines;
}

std::string trimmed(std::string_view text) {
  const std::size_t first = text.find_first_not_of(" \t");
  if (first == std::string_view::npos) return {};
  return std::string(text.substr(first, text.find_last_not_of(" \t") - first + 1));
}

std::string lower_case(std::string_view text) {
  std::string low(text);
  for (char& c : low)
    if (c >= 'A' && c <= 'Z') c = static_cast<char>(c - 'A' + 'a');
  return low;
}

bool starts_with_word(std::string_view text, std::string_view word) {
  if (text.substr(0, word.size()) != word) return false;
  return text.size() == word.size() || !std::isalnum(static_cast<unsigned char>(text[word.size()]));
}

bool contains(std::string_view text, std::string_view part) {
  return text.find(part) != std::string_view::npos;
}

}  // namespace rejoinder
