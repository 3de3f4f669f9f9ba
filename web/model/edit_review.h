// Intents that change the review, carried out on its tree.
#pragma once

#include <string>

#include "web/model/intent.h"

namespace rejoinder {

// What a change was: `edit` names its place, so that typing on there stays one step of undo (empty: always a
// step of its own); `notice` is a line for the reader; `claim` is the claim to choose, where the change says.
struct Change {
  std::string edit, notice;
  std::optional<int> claim;
};

// Each changes `document` as asked and leaves it as it was where the place does not exist. Text that cannot
// be read as its field wants it is kept as typed: reading the review lists it under the problems.
Change carry_out(Node& document, const EditCell& intent);
// The term is put where the other columns have it, so that the rows of the table stay in order.
Change carry_out(Node& document, const EditFigure& intent);
Change carry_out(Node& document, const RenameTerm& intent);
Change carry_out(Node& document, const AddTerm& intent);
Change carry_out(Node& document, const RemoveTerm& intent);
Change carry_out(Node& document, const AddColumn& intent);
Change carry_out(Node& document, const RemoveColumn& intent);
Change carry_out(Node& document, const EditColumn& intent);
Change carry_out(Node& document, const EditReview& intent);
Change carry_out(Node& document, const EditClaim& intent);
Change carry_out(Node& document, const TickTerms& intent);
Change carry_out(Node& document, const RemoveClaim& intent);
Change carry_out(Node& document, const DuplicateClaim& intent);
Change carry_out(Node& document, const MoveClaim& intent);
Change carry_out(Node& document, const NewReview& intent);
Change carry_out(Node& document, const FiveFigures& intent);
// Other keys for all second figures: "se" to "t", say.
Change carry_out(Node& document, const SetSecondFigure& intent);

// A claim on `column` (an id; empty for none), with a fresh id.
Change put_claim(Node& document, const Node& claim, const std::string& column);

// A rectangle of figures put into the table at `cell`, going right and down: coefficients and second figures
// take turns as they stand on the page. Nothing where the rectangle is larger than the table from there on.
std::optional<Change> put_block(Node& document, const TableCell& cell,
                                const std::vector<std::vector<std::string>>& block);

}  // namespace rejoinder
