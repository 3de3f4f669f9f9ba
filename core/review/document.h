// The review file as written: an ordered tree that loses nothing.
//
// A TOML library reads the text; this tree keeps what the library does not: the order of keys and tables, the
// spelling of unquoted numbers, keys that this version does not know, and the line of everything. Comments
// are not kept. The page edits this tree and reads a Review from it anew after each change, so the digits a
// user typed are never rewritten. read_document(write_document(d)) gives d again.
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "core/result.h"

namespace rejoinder {

struct Place {
  int line = 0;  // from 1; 0 where the node was made by the program
  int column = 0;
};

struct Entry;

struct Node {
  enum class Kind {
    Text,     // a quoted string; `text` is its content
    Literal,  // unquoted: number, boolean, date; `text` is its spelling in the file
    List,     // `items`
    Table     // `entries`, in order
  };
  Kind kind = Kind::Text;
  std::string text;
  std::vector<Node> items;
  std::vector<Entry> entries;
  bool inline_form = true;  // tables: { a = 1 } rather than under a [header]; lists of tables: [ {...} ]
                            // rather than [[header]]
  Place place;

  static Node quoted(std::string text);
  static Node literal(std::string text);
  static Node list(std::vector<Node> items = {});
  static Node table(bool inline_form);

  // The value under `key` of a table, or null. Never creates.
  const Node* find(std::string_view key) const;
  Node* find(std::string_view key);
  // Puts `value` under `key`: in place where the key exists; otherwise at the end, but before the [headers]
  // and
  // [[headers]] that end the table, unless it takes one itself. Contract: a table.
  Node& set(std::string_view key, Node value);
  // Takes the key away; false where it was not there.
  bool erase(std::string_view key);

  // Same content and order; places and layout (inline_form) do not count.
  bool operator==(const Node& other) const;
};

struct Entry {
  std::string key;
  Node value;
  Place place;
};

// `text` is a whole TOML 1.0 file, at most 4 MB, nested at most 64 deep. The Error says line and column and
// how to mend it.
Result<Node> read_document(std::string_view text);

// TOML 1.0 text of a table. Strings are written with the escapes they need, numbers as they were spelled.
// Tables keep their layout where the order of keys allows it: a table under a header cannot be followed by
// plain keys of the table that holds it, so there it is written as dotted keys, and a list of tables in
// brackets.
std::string write_document(const Node& document);

// Whether a value stands under a [header] or under [[headers]] of its own, which no plain key of the same
// table may follow.
bool takes_header(const Node& node);

// Whether `text` is one unquoted TOML value: a number, a boolean or a date. The writer puts anything else in
// quotes.
bool is_literal(std::string_view text);

}  // namespace rejoinder
