#include "web/model/box.h"

#include <algorithm>

#include "web/model/document_view.h"
#include "web/model/worked_case.h"

namespace rejoinder {
namespace {

bool blank(const std::string& text) { return text.find_first_not_of(" \t\r\n") == std::string::npos; }

int words_in(const std::string& text) {
  int words = 0;
  bool inside = false;
  for (const char c : text) {
    const bool letter = c != ' ' && c != '\n' && c != '\r' && c != '\t';
    words += letter && !inside;
    inside = letter;
  }
  return words;
}

std::string counted(int count, const char* one, const char* many) {
  return std::to_string(count) + " " + (count == 1 ? one : many);
}

// The pasted columns take the place of the columns that are there. Where their number is the same, ids and
// settings that the table does not print (estimator, errors, fixed effects) stay, so that the claims go on
// resting on them.
Node with_table(const Node& document, const PastedTable& table) {
  const Node pasted = review_from_table(table);
  Node next = document;
  if (const Node* sources = pasted.find("source")) {
    next.set("source", *sources);
    return next;
  }
  const Node* fresh = pasted.find("column");
  if (!fresh) return next;
  Node columns = *fresh;
  if (count_of(document, "column") == static_cast<int>(columns.items.size())) {
    for (std::size_t c = 0; c < columns.items.size(); ++c) {
      const Node* old = row_of(document, "column", static_cast<int>(c));
      if (!old) continue;
      Node& column = columns.items[c];
      for (const char* key : {"id", "outcome", "estimator", "errors", "k", "clusters", "intercept",
                              "fixed_effects", "weights"}) {
        const Node* kept = old->find(key);
        if (kept && (std::string(key) == "id" || !column.find(key))) column.set(key, *kept);
      }
    }
  }
  next.set("column", std::move(columns));
  for (const char* key : {"decimal", "stars"})
    if (const Node* value = pasted.find(key)) next.set(key, *value);
  return next;
}

bool is_worked_case(const Node& document) {
  const Result<Node> worked = read_document(worked_case());
  return worked.ok() && worked.value() == document;
}

}  // namespace

bool looks_like_review(const std::string& text) {
  std::size_t start = 0;
  while (start < text.size()) {
    std::size_t end = text.find('\n', start);
    if (end == std::string::npos) end = text.size();
    std::string line = text.substr(start, end - start);
    std::erase(line, ' ');
    if (line.starts_with("\xEF\xBB\xBF")) line.erase(0, 3);
    if (line.starts_with("rejoinder=") || line.starts_with("[[column]]") || line.starts_with("[[claim]]"))
      return true;
    start = end + 1;
  }
  return false;
}

Result<Node> read_whole_review(const std::string& name, const std::string& text) {
  Result<Node> document = read_document(text);
  if (!document.ok()) {
    Error reason = document.error();
    if (!name.empty()) reason.where = reason.where.empty() ? name : name + ", " + reason.where;
    return reason;
  }
  const Node& root = document.value();
  if (!root.find("rejoinder") && !root.find("column") && !root.find("claim") && !root.find("variables") &&
      !root.find("source"))
    return Error{name, "the text is no review: it has neither columns nor claims",
                 "a review begins with \"rejoinder = 1\""};
  return document;
}

void show_overlay(AppState& state, Overlay overlay) {
  if (state.overlay != Overlay::None && state.overlay != overlay)
    state.drafts[state.overlay] = state.box_text;
  const bool changed = state.overlay != overlay;
  state.overlay = overlay;
  if (overlay == Overlay::None || !changed) return;
  state.box_text.clear();
  if (const auto draft = state.drafts.find(overlay); draft != state.drafts.end())
    state.box_text = draft->second;
  // The review's text is shown as it is now, unless what was typed there could not be read and waits to be
  // mended.
  if (overlay == Overlay::ReviewText) {
    const bool waits = !blank(state.box_text) && !read_whole_review("", state.box_text).ok();
    if (!waits) state.box_text = write_document(state.document);
  }
  read_box(state);
}

void read_box(AppState& state) {
  state.reading = {};
  state.box_note.clear();
  const std::string& text = state.box_text;
  if (blank(text) || (state.overlay != Overlay::PasteBox && state.overlay != Overlay::ReviewText)) return;
  BoxReading& reading = state.reading;
  if (state.overlay == Overlay::ReviewText || looks_like_review(text)) {
    const Result<Node> document = read_whole_review("", text);
    if (document.ok())
      reading.kind = BoxReading::Kind::Review;
    else
      state.box_note = document.error().text();
    return;
  }
  std::optional<ClaimSentence> sentence = read_claim_sentence(text);
  PastedTable table = read_pasted_table(text);
  const bool lines = std::count(text.begin(), text.end(), '\n') >= 3;
  // A sentence that states a test may hold figures that look like a row; a table may state tests in its
  // notes.
  if (!table.empty() && (!sentence || (lines && table.figures() >= 4))) {
    reading.kind = BoxReading::Kind::Table;
    reading.keeps_claims = count_of(state.document, "claim") > 0 && !is_worked_case(state.document);
    const int doubtful = table.doubtful();
    state.box_note = counted(table.figures(), "figure", "figures") + " read in " +
                     counted(static_cast<int>(table.columns.size()), "column", "columns") + ", " +
                     (doubtful == 0 ? std::string("none in doubt") : std::to_string(doubtful) + " in doubt");
    reading.table = std::move(table);
    return;
  }
  if (!sentence && words_in(text) >= 3) {
    // A claim in words alone is a claim too.
    sentence.emplace();
    sentence->says = clean_text(text, false);
  }
  if (sentence) {
    reading.kind = BoxReading::Kind::Sentence;
    reading.sentence = std::move(*sentence);
    return;
  }
  state.box_note =
      "no figures of a table and no sentence were found; paste lines with a label and figures, or a sentence "
      "of the paper";
}

std::optional<Taken> take_box(const AppState& state) {
  switch (state.reading.kind) {
    case BoxReading::Kind::Review: {
      Result<Node> document = read_whole_review("", state.box_text);
      if (!document.ok()) return std::nullopt;
      return Taken{std::move(document).value(), {"", "review taken", std::nullopt}};
    }
    case BoxReading::Kind::Table:
      if (state.reading.keeps_claims)
        return Taken{with_table(state.document, state.reading.table),
                     {"", "table replaced, the claims kept", std::nullopt}};
      return Taken{review_from_table(state.reading.table),
                   {"", "a new review from the table; now add what the paper claims", -1}};
    case BoxReading::Kind::Sentence: {
      Node document = state.document;
      const int column = state.cell ? state.cell->column : column_of_claim(document, state.claim);
      Change change = put_claim(document, claim_from_sentence(state.reading.sentence),
                                column_text(document, column, "id"));
      change.notice = "claim added; say which terms it is about";
      return Taken{std::move(document), std::move(change)};
    }
    case BoxReading::Kind::Nothing:
      break;
  }
  return std::nullopt;
}

}  // namespace rejoinder
