// Changes to a review file as the page makes them: small steps on the tree that keep every other byte of
// meaning.
//
// Each function changes `document` in place and answers whether it could. A Path leads from the top of the
// file to a value: {{"column", 0}, {"term", 2}, {"se"}}. Text is kept as typed: printed numbers go into
// quotes; only counts and booleans, where quotes add nothing, are written as TOML values when they are
// spelled like one.
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "core/review/document.h"

namespace rejoinder {

struct Step {
  std::string key;
  int index = -1;  // of a list: which item, from 0; -1: the value itself
};
using Path = std::vector<Step>;

// The value a path leads to, or null.
const Node* find_value(const Node& document, const Path& path);
Node* find_value(Node& document, const Path& path);

// Puts `text` at `path`. Tables on the way that do not exist are made (an index one past the end of a list
// adds an item). An empty text takes the key away; as an item of a list it becomes "". Unquoted are: true and
// false under intercept, weights and rejects; whole numbers under n, k, clusters, fixed_effects, df, sided,
// base, observations and in size. All else is quoted. False where a step meets a value of another kind or an
// index out of reach.
bool set_value(Node& document, const Path& path, std::string_view text);
// The same with a ready value.
bool set_node(Node& document, const Path& path, Node value);
// Takes away the key or list item; a list of tables that becomes empty goes too. False where nothing was
// there.
bool erase_value(Node& document, const Path& path);

// Each adds an empty table under its [[header]] and answers its index. The id is the one asked for, with "
// (2)" and so on where it is taken.
int add_column(Node& document, std::string_view id);
int add_term(Node& document, int column, std::string_view name);  // -1: no such column
int add_fact(Node& document, int column);                         // -1: no such column
int add_source(Node& document, std::string_view name);
int add_claim(Node& document, std::string_view id);

bool remove_column(Node& document, int column);
bool remove_term(Node& document, int column, int term);
bool remove_claim(Node& document, int claim);
// Moves an item of the list at `list_path` (its last step without index) to another index of the same list.
bool move_item(Node& document, const Path& list_path, int from, int to);
bool move_claim(Node& document, int from, int to);
// A copy right after the claim, with an id of its own. -1: no such claim.
int duplicate_claim(Node& document, int claim);

// Gives a term of a column another name, everywhere it is meant: the term itself, covariance and correlation,
// means, group sizes, facts, and the restrictions of claims on that column. False where there is no such
// term, the new name is empty or already taken in the column.
bool rename_term(Node& document, int column, int term, std::string_view new_name);
// Gives a column another id, in claims too.
bool rename_column(Node& document, int column, std::string_view new_id);

// `restrictions` with every name `from` of column `column` written `to`: names are compared whole, as the
// language reads them. With an empty `column` names without a column are meant; otherwise names that carry
// it. Text that cannot be read stays as it is.
std::string renamed_in_restrictions(std::string_view restrictions, std::string_view column,
                                    std::string_view from, std::string_view to);
std::string column_renamed_in_restrictions(std::string_view restrictions, std::string_view from,
                                           std::string_view to);

}  // namespace rejoinder
