// A small reader of JSON for the reference files, the same in the native and the wasm test program.
#pragma once

#include <string>
#include <string_view>
#include <utility>
#include <vector>

namespace rejoinder::testing {

struct Json {
  enum class Kind { Null, Text, Number, True, False, List, Object };
  Kind kind = Kind::Null;
  std::string text;                                   // of a Text, or the spelling of a Number
  std::vector<Json> items;                            // of a List
  std::vector<std::pair<std::string, Json>> members;  // of an Object, in the order of the file

  bool has(std::string_view name) const;
  // The member, or a Null where there is none.
  const Json& at(std::string_view name) const;
};

// The whole of `text` as JSON; a Null where it is not well formed.
Json read_json(std::string_view text);

}  // namespace rejoinder::testing
