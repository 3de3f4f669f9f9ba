// A first look at a review file, before the TOML library reads it: how deep it nests, what is left open, and
// a few forms that the library takes for granted instead of refusing them.
//
// The library frees its tables by recursion, so a file with a key of a million dots could exhaust the stack.
// What is left open says better than the file's last line where a quote or a bracket is missing.
#pragma once

#include <cstdint>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "core/review/document.h"

namespace rejoinder {

struct DocumentScan {
  enum class Stop {
    None,
    TooDeep,   // nesting passes the limit
    NoKey,     // a header begins with no key
    Bracket,   // a bracket of the other kind closes a list or an inline table
    NotAscii,  // a sign beyond ASCII stands outside of quotes and comments
  };
  Stop stop = Stop::None;
  std::size_t at = 0;               // byte where it stops
  std::optional<std::size_t> open;  // byte of the quote or bracket that the end of the file leaves open
};

DocumentScan scan_document(std::string_view text, int deepest);

// Bytes for the library's places, and places for bytes: lines and columns count from 1, columns in
// characters.
class Places {
 public:
  explicit Places(std::string_view text);
  // The text's size for a place beyond its end.
  std::size_t byte_at(int line, int column) const;
  Place place_of(std::size_t byte) const;
  std::string_view line(int line) const;

 private:
  std::string_view text_;
  std::vector<std::uint32_t> lines_;  // first byte of each line
  std::vector<std::uint32_t>
      characters_;  // first byte of each character; empty for plain ASCII, where they are equal
  std::vector<std::uint32_t> line_characters_;  // number of the first character of each line
};

}  // namespace rejoinder
