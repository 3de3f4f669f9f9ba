// Where the characters of a UTF-8 text end.
#pragma once

#include <cstddef>
#include <string_view>

namespace rejoinder {

// The bytes of the character that begins at `at`, 1 to 4; 0 where the bytes are no UTF-8 (cut short,
// overlong, a surrogate, beyond U+10FFFF). Contract: at < text.size().
std::size_t character_length(std::string_view text, std::size_t at);

// The first byte that is no UTF-8, or npos.
std::size_t first_bad_byte(std::string_view text);

}  // namespace rejoinder
