// Looking into the review's tree by the places the page knows: column 2, term 3, its standard error.
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "web/model/state.h"

namespace rejoinder {

// The list under `key` of the tree ("column", "claim") or null.
const Node* rows_of(const Node& table, std::string_view key);
// One table of that list, or null.
const Node* row_of(const Node& table, std::string_view key, int index);
Node* row_of(Node& table, std::string_view key, int index);
int count_of(const Node& table, std::string_view key);

// A value as one line of text, the way the page shows it in a field: quoted text as it is, unquoted as
// spelled, a list with ", " between its items, a table as "a = 1, b = 2". Empty for null.
std::string shown_text(const Node* value);

// What stands in a cell of the table, in a field of a column, of a claim or of the review. Claim keys may go
// one level down: "restricted_fit.r2".
std::string cell_text(const Node& document, const TableCell& cell);
std::string column_text(const Node& document, int column, std::string_view key);
std::string claim_text(const Node& document, int claim, std::string_view key);
std::string review_text(const Node& document, std::string_view key);

// Names of a column's terms in order; names over all columns, each once, in order of first appearance.
std::vector<std::string> term_names(const Node& document, int column);
std::vector<std::string> all_term_names(const Node& document);

// The row of that term in that column, -1 where the column does not have it.
int term_index(const Node& document, int column, std::string_view name);

// The key of the second figures: the one that most terms have of "se", "t", "p", "ci"; "se" in an empty
// table.
std::string second_key(const Node& document);

// The column that a claim rests on, by its `column`; the first one where it names none, -1 without columns.
int column_of_claim(const Node& document, int claim);

// "claim-3": not among the ids of that list yet.
std::string fresh_id(const Node& document, std::string_view list, const std::string& stem);

// Valid UTF-8 without control characters; line ends and tabs become blanks unless `lines` keeps them.
std::string clean_text(std::string_view text, bool lines);

}  // namespace rejoinder
