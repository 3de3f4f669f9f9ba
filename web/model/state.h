// Everything the page knows. Panels read it and return intents; update() alone changes it.
//
// The document is the truth: the review as a lossless tree. `review` and `checked` are derived from it after every
// change, so nothing on the page can be out of step with the file that is saved.
#pragma once

#include <optional>
#include <set>
#include <string>
#include <vector>

#include "core/judge/finding.h"
#include "core/review/document.h"
#include "core/review/edit.h"
#include "core/review/review.h"

namespace rejoinder {

enum class Theme { Light, Dark };
enum class Pane { Paper, Claims, Allows };  // the three panes; tabs where the window is narrow
enum class Overlay {
  None,
  PasteBox,     // a table or a whole review pasted as text, previewed before anything is replaced
  FiveFigures,  // two coefficients, two standard errors, n
  ReviewText,   // the review as a file, editable
  Keys,         // the list of keys
  About         // version, licences, methods, limits
};
enum class Drawer { WhatWouldSettle, Working, WhatCouldExplain, WordsForReport, Evidence, Audit };

// A cell of the printed table: which figure of which term or of the foot. `term` is -1 for the foot.
struct TableCell {
  int column = 0;
  int term = -1;
  std::string key;  // "coef", "se", "t", "p", "n", "k", "r2", ...
  bool operator==(const TableCell&) const = default;
};

// Undo and redo: whole documents as text, bounded in bytes (the oldest go first).
struct History {
  std::vector<std::string> past, future;
  std::string last_edit;  // what the newest entry changed: typing on in the same cell adds no new step
};

struct AppState {
  Node document;
  Review review;          // derived
  CheckedReview checked;  // derived; one finding a claim, in the claims' order

  int claim = 0;  // the chosen claim; -1 where there is none
  std::optional<TableCell> cell;
  std::set<Drawer> open_drawers = {Drawer::Working, Drawer::WhatWouldSettle};
  std::optional<State> only;  // claims of this state alone are shown

  Overlay overlay = Overlay::None;
  std::string box_text;  // what stands in the overlay's text field, kept while it is shut
  std::string box_note;  // what could not be read of it, and how to mend it

  Pane pane = Pane::Paper;
  Theme theme = Theme::Light;
  double text_scale = 1.0;  // 0.8 to 2
  float left_share = 0.34f, right_share = 0.36f;  // of the width

  std::string notice;  // one line for the reader, "copied", "review opened"; replaced by the next
  History history;
};

// What the page must do for the app after an update: in order.
struct Effect {
  enum class Kind { Copy, Download, PickFile, Print, OpenReport, KeepNow };
  Kind kind = Kind::Copy;
  std::string name;  // of the file
  std::string text;
};

}  // namespace rejoinder
