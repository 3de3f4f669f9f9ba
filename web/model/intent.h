// What a reader asks for. Panels return these; update() carries them out.
#pragma once

#include <string>
#include <variant>

#include "web/model/state.h"

namespace rejoinder {

// ---- the review
struct EditCell {
  TableCell cell;
  std::string text;
};  // empty text takes the figure away
struct EditFigure {
  int column;
  std::string term;
  std::string key;
  std::string text;
};  // the same by the term's name; a term that the column does not list yet is added to it
struct RenameTerm {
  int column;
  int term;
  std::string name;
};  // in every column that has it, and in restrictions
struct AddTerm {
  std::string name;
};  // to the end of every column's list
struct RemoveTerm {
  std::string name;
};
struct AddColumn {};
struct RemoveColumn {
  int column;
};
struct EditColumn {
  int column;
  std::string key;
  std::string text;
};  // label, outcome, errors, estimator, ...
struct EditReview {
  std::string key;
  std::string text;
};  // title, level, decimal, rounding, note
struct AddClaim {
  std::string restrictions;
};
struct EditClaim {
  int claim;
  std::string key;
  std::string text;
};  // says, column, restrictions, f, p, df, rejects, ...
struct TickTerms {
  int claim;
  std::string form;
  std::vector<std::string> terms;
};  // form: "zero", "equal", "sum"
struct RemoveClaim {
  int claim;
};
struct DuplicateClaim {
  int claim;
};
struct MoveClaim {
  int claim;
  int by;
};
struct NewReview {};
struct LoadText {
  std::string name;
  std::string text;
};  // a file opened or dropped
struct PasteText {
  std::string text;
};  // pasted while no text field had the focus
struct FiveFigures {
  std::string coef1, se1, coef2, se2, n;
  bool equal = false;
};  // else both zero
struct Undo {};
struct Redo {};

// ---- the view
struct ChooseClaim {
  int claim;
};
struct ChooseCell {
  std::optional<TableCell> cell;
};
struct ShowOverlay {
  Overlay overlay;
};
struct EditBox {
  std::string text;
};
struct AcceptBox {};  // take what the overlay's text field holds, as state.reading shows it
struct SetSecondFigure {
  std::string key;
};  // "se", "t", "p": of the reading in the box; else of the whole table
struct ToggleDrawer {
  Drawer drawer;
};
struct FilterState {
  std::optional<State> only;
};
struct ShowPane {
  Pane pane;
};
struct SetTheme {
  Theme theme;
};
struct SetTextScale {
  double scale;
};
struct SetShares {
  float left, right;
};

// ---- out of the page
struct CopyText {
  std::string text;
  std::string what;
};                     // what: "the paragraph", for the notice
struct SaveReview {};  // the review as a file
struct SaveReport {};  // the report as an HTML file of its own
struct OpenReport {};  // the same in a tab
struct OpenFile {};
struct PrintPage {};

using Intent = std::variant<std::monostate, EditCell, EditFigure, RenameTerm, AddTerm, RemoveTerm, AddColumn,
                            RemoveColumn, EditColumn, EditReview, AddClaim, EditClaim, TickTerms, RemoveClaim,
                            DuplicateClaim, MoveClaim, NewReview, LoadText, PasteText, FiveFigures, Undo,
                            Redo, ChooseClaim, ChooseCell, ShowOverlay, EditBox, AcceptBox, ToggleDrawer,
                            FilterState, ShowPane, SetSecondFigure, OpenReport, SetTheme, SetTextScale,
                            SetShares, CopyText, SaveReview, SaveReport, OpenFile, PrintPage>;

}  // namespace rejoinder
