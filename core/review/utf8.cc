#include "core/review/utf8.h"

namespace rejoinder {

std::size_t character_length(std::string_view text, std::size_t at) {
  const auto byte = [&](std::size_t i) { return i < text.size() ? static_cast<unsigned char>(text[i]) : 0u; };
  const unsigned first = byte(at), second = byte(at + 1);
  const auto follows = [&](std::size_t i) { return (byte(i) & 0xC0) == 0x80; };
  if (first < 0x80) return 1;
  if (first >= 0xC2 && first < 0xE0) return follows(at + 1) ? 2 : 0;
  if (first >= 0xE0 && first < 0xF0) {
    const bool sound = first == 0xE0 ? second >= 0xA0 : first == 0xED ? second < 0xA0 : true;
    return sound && follows(at + 1) && follows(at + 2) ? 3 : 0;
  }
  if (first >= 0xF0 && first < 0xF5) {
    const bool sound = first == 0xF0 ? second >= 0x90 : first == 0xF4 ? second < 0x90 : true;
    return sound && follows(at + 1) && follows(at + 2) && follows(at + 3) ? 4 : 0;
  }
  return 0;
}

std::size_t first_bad_byte(std::string_view text) {
  for (std::size_t i = 0; i < text.size();) {
    const std::size_t length = character_length(text, i);
    if (length == 0) return i;
    i += length;
  }
  return std::string_view::npos;
}

}  // namespace rejoinder
