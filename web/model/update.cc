#include "web/model/update.h"

#include <algorithm>
#include <cmath>

#include "web/model/box.h"
#include "web/model/companion.h"
#include "web/model/derive.h"
#include "web/model/document_view.h"
#include "web/model/edit_review.h"
#include "web/model/history.h"

namespace rejoinder {
namespace {

// A name for a saved file: the title's letters and digits.
std::string file_name(const Node& document, const std::string& ending) {
  std::string name;
  for (const char c : review_text(document, "title")) {
    const bool keep = (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z') || (c >= '0' && c <= '9');
    if (keep)
      name += c >= 'A' && c <= 'Z' ? static_cast<char>(c - 'A' + 'a') : c;
    else if (!name.empty() && name.back() != '-')
      name += '-';
    if (name.size() >= 48) break;
  }
  while (!name.empty() && name.back() == '-') name.pop_back();
  return (name.empty() ? "review" : name) + ending;
}

class Updater {
 public:
  explicit Updater(AppState& state) : state_(state) {}

  std::vector<Effect> effects;

  void operator()(std::monostate) {}

  // ---- the review: all of these go through one door
  template <class Edit>
  requires requires(Node& document, const Edit& edit) { carry_out(document, edit); }
  void operator()(const Edit& intent) {
    Node next = state_.document;
    const Change change = carry_out(next, intent);
    put(std::move(next), change);
  }

  void operator()(const EditFigure& intent) {
    Node next = state_.document;
    const Change change = carry_out(next, intent);
    const int term = term_index(next, intent.column, intent.term);
    // Before the change: what is chosen belongs to the step of undo.
    if (term >= 0) operator()(ChooseCell{TableCell{intent.column, term, intent.key}});
    put(std::move(next), change);
  }

  void operator()(const AddClaim& intent) {
    Node next = state_.document;
    Node claim = Node::table(false);
    claim.set("restrictions", Node::quoted(clean_text(intent.restrictions, false)));
    const int column = state_.cell ? state_.cell->column : column_of_claim(next, state_.claim);
    const Change change = put_claim(next, claim, column_text(next, column, "id"));
    put(std::move(next), change);
  }

  void operator()(const SetSecondFigure& intent) {
    if (state_.overlay == Overlay::PasteBox && state_.reading.kind == BoxReading::Kind::Table) {
      state_.reading.table = with_second_figure(std::move(state_.reading.table), intent.key);
      return;
    }
    Node next = state_.document;
    const Change change = carry_out(next, intent);
    put(std::move(next), change);
  }

  void operator()(const LoadText& intent) {
    const std::string text = clean_text(intent.text, true);
    Result<Node> document = read_whole_review(intent.name, text);
    if (document.ok()) {
      put(std::move(document).value(),
          {"", intent.name.empty() ? "review opened" : intent.name + " opened", 0});
      state_.overlay = Overlay::None;
      return;
    }
    // A table saved from a spreadsheet opens in the paste box; anything else waits in the editor of the
    // review.
    const bool table = !looks_like_review(text) && !read_pasted_table(text).empty();
    show_overlay(state_, table ? Overlay::PasteBox : Overlay::ReviewText);
    state_.box_text = text;
    read_box(state_);
    if (!table) state_.box_note = document.error().text();
    state_.notice = table ? intent.name + ": read as a table" : document.error().text();
  }

  void operator()(const PasteText& intent) {
    const std::string text = clean_text(intent.text, true);
    if (text.find_first_not_of(" \n\t") == std::string::npos) return;
    if (looks_like_review(text)) {
      Result<Node> document = read_whole_review("", text);
      if (document.ok()) {
        put(std::move(document).value(), {"", "review pasted", 0});
        return;
      }
      show_overlay(state_, Overlay::ReviewText);
    } else {
      if (state_.cell && paste_into_cells(text)) return;
      show_overlay(state_, Overlay::PasteBox);
    }
    state_.box_text = text;
    read_box(state_);
  }

  void operator()(const Undo&) {
    move(step_back(state_.history, state_.document), "undone", "nothing to undo");
  }
  void operator()(const Redo&) {
    move(step_on(state_.history, state_.document), "done again", "nothing to do again");
  }

  // ---- the view
  void operator()(const ChooseClaim& intent) {
    end_step(state_.history);
    const int count = count_of(state_.document, "claim");
    state_.claim = count == 0 ? -1 : std::clamp(intent.claim, 0, count - 1);
    keep();
  }
  void operator()(const ChooseCell& intent) {
    if (intent.cell != state_.cell) end_step(state_.history);
    state_.cell = intent.cell;
  }
  void operator()(const ShowOverlay& intent) {
    show_overlay(state_, intent.overlay);
    keep();
  }
  void operator()(const EditBox& intent) {
    state_.box_text = clean_text(intent.text, true);
    read_box(state_);
    keep();
  }
  void operator()(const AcceptBox&) {
    std::optional<Taken> taken = take_box(state_);
    if (!taken) {
      if (state_.box_note.empty()) state_.box_note = "there is nothing to take yet; paste or type first";
      return;
    }
    state_.box_text.clear();
    state_.drafts.erase(state_.overlay);
    state_.overlay = Overlay::None;
    state_.reading = {};
    state_.box_note.clear();
    put(std::move(taken->document), taken->change);
  }
  void operator()(const ToggleDrawer& intent) {
    if (!state_.open_drawers.erase(intent.drawer)) state_.open_drawers.insert(intent.drawer);
    keep();
  }
  void operator()(const FilterState& intent) { state_.only = intent.only; }
  void operator()(const ShowPane& intent) {
    state_.pane = intent.pane;
    keep();
  }
  void operator()(const SetTheme& intent) {
    state_.theme = intent.theme;
    keep();
  }
  void operator()(const SetTextScale& intent) {
    state_.text_scale = std::isfinite(intent.scale) ? std::clamp(intent.scale, 0.8, 2.0) : 1.0;
    keep();
  }
  void operator()(const SetShares& intent) {
    set_shares(state_, intent.left, intent.right);
    keep();
  }

  // ---- out of the page
  void operator()(const CopyText& intent) {
    effects.push_back({Effect::Kind::Copy, "", intent.text});
    state_.notice = intent.what.empty() ? "copied" : intent.what + " copied";
  }
  void operator()(const SaveReview&) {
    effects.push_back(
        {Effect::Kind::Download, file_name(state_.document, ".toml"), write_document(state_.document)});
    state_.notice = "saved as " + effects.back().name;
  }
  void operator()(const SaveReport&) {
    effects.push_back(
        {Effect::Kind::Download, file_name(state_.document, "-report.html"), report_page(state_)});
    state_.notice = "report saved as " + effects.back().name;
  }
  void operator()(const OpenReport&) {
    effects.push_back(
        {Effect::Kind::OpenReport, file_name(state_.document, "-report.html"), report_page(state_)});
  }
  void operator()(const OpenFile&) { effects.push_back({Effect::Kind::PickFile, "", ""}); }
  void operator()(const PrintPage&) { effects.push_back({Effect::Kind::Print, "", ""}); }

 private:
  // Every change of the review: the history first, then the tree, then all that follows from it.
  void put(Node next, const Change& change) {
    const bool changed = !(next == state_.document);
    // A notice of an earlier change says nothing of this one.
    if (changed || !change.notice.empty()) state_.notice = change.notice;
    if (!changed) return;
    remember(state_.history, state_.document, change.edit);
    state_.document = std::move(next);
    if (change.claim) state_.claim = *change.claim;
    derive(state_);
    keep();
  }

  void move(std::optional<Node> document, const char* done, const char* nothing) {
    state_.notice = document ? done : nothing;
    if (!document) return;
    state_.document = std::move(*document);
    derive(state_);
    keep();
  }

  // A figure, or a rectangle of them, into the table at the chosen cell.
  bool paste_into_cells(const std::string& text) {
    std::vector<std::vector<std::string>> block = read_block(text);
    if (block.empty()) {
      const std::size_t first = text.find_first_not_of(" \n\t"), last = text.find_last_not_of(" \n\t");
      const std::string figure = text.substr(first, last - first + 1);
      if (figure.find('\n') != std::string::npos || figure.size() > 40) return false;
      block = {{figure}};
    }
    for (const std::vector<std::string>& row : block)
      for (const std::string& cell : row)
        if (!cell.empty() && cell.find_first_of("0123456789") == std::string::npos) return false;
    Node next = state_.document;
    const std::optional<Change> change = put_block(next, *state_.cell, block);
    if (!change) return false;
    put(std::move(next), *change);
    return true;
  }

  void keep() {
    if (effects.empty() || effects.back().kind != Effect::Kind::KeepNow)
      effects.push_back({Effect::Kind::KeepNow, "", ""});
  }

  AppState& state_;
};

}  // namespace

std::vector<Effect> update(AppState& state, const Intent& intent) {
  Updater updater(state);
  std::visit(updater, intent);
  return std::move(updater.effects);
}

}  // namespace rejoinder
