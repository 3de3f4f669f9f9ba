// Everything the page knows. Panels read it and return intents; update() alone changes it.
//
// The document is the truth: the review as a lossless tree. `review` and `checked` are derived from it after
// every change, so nothing on the page can be out of step with the file that is saved.
#pragma once

#include <map>
#include <optional>
#include <set>
#include <string>
#include <vector>

#include "core/judge/finding.h"
#include "core/paste/sentence.h"
#include "core/paste/table_text.h"
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

// What the overlay's text field would become if it were taken now: shown before anything is replaced.
struct BoxReading {
  enum class Kind {
    Nothing,  // the box is empty, or holds nothing that can be taken; box_note says why
    Review,   // a whole review
    Table,    // `table`, cell by cell with its doubts
    Sentence  // `sentence`, to become a claim
  };
  Kind kind = Kind::Nothing;
  PastedTable table;
  ClaimSentence sentence;
  bool keeps_claims = false;  // a table that would come under the claims that are there
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
  std::string box_text;                   // what stands in the overlay's text field, kept while it is shut
  std::string box_note;                   // what could not be read of it, and how to mend it
  BoxReading reading;                     // derived from box_text while PasteBox or ReviewText is shown
  std::map<Overlay, std::string> drafts;  // the text fields of the overlays that are not shown

  Pane pane = Pane::Paper;
  Theme theme = Theme::Light;
  double text_scale = 1.0;                        // 0.8 to 2
  float left_share = 0.34f, right_share = 0.36f;  // of the width

  std::string notice;  // one line for the reader, "copied", "review opened"; replaced by the next
  History history;

  // Stored text that could not be read when the page opened. The page keeps it under another name and never
  // writes over it; empty where there was none.
  std::string set_aside;
};

// What the page must do for the app after an update: in order.
struct Effect {
  enum class Kind {
    Copy,        // `text` to the clipboard
    Download,    // `text` as a file called `name`
    PickFile,    // let the reader choose a file; it comes back as LoadText
    Print,       // the companion text, by the browser
    OpenReport,  // `text`, a whole HTML page, in a tab of its own
    KeepNow      // something changed that must outlive the page: keep stored_text(state)
  };
  Kind kind = Kind::Copy;
  std::string name;  // of the file
  std::string text;
};

}  // namespace rejoinder
