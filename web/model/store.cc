// What is kept between visits, as a TOML table of its own: the review's text as one string, and the view's
// choices.
//
//   rejoinder_page = 1
//   review = "..."
//   theme = "dark"
#include <cmath>
#include <cstdlib>

#include "web/model/box.h"
#include "web/model/derive.h"
#include "web/model/document_view.h"
#include "web/model/update.h"
#include "web/model/worked_case.h"

namespace rejoinder {
namespace {

constexpr int kVersion = 1;

template <class Value>
struct Word {
  Value value;
  const char* word;
};

constexpr Word<Pane> kPanes[] = {{Pane::Paper, "paper"}, {Pane::Claims, "claims"}, {Pane::Allows, "allows"}};
constexpr Word<Drawer> kDrawers[] = {{Drawer::WhatWouldSettle, "what would settle"},
                                     {Drawer::Working, "working"},
                                     {Drawer::WhatCouldExplain, "what could explain"},
                                     {Drawer::WordsForReport, "words for report"},
                                     {Drawer::Evidence, "evidence"},
                                     {Drawer::Audit, "audit"}};
constexpr Word<Overlay> kBoxes[] = {{Overlay::PasteBox, "paste"}, {Overlay::ReviewText, "text"}};

template <class Value, std::size_t kCount>
std::string word_for(const Word<Value> (&words)[kCount], Value value) {
  for (const auto& word : words)
    if (word.value == value) return word.word;
  return {};
}

template <class Value, std::size_t kCount>
std::optional<Value> value_for(const Word<Value> (&words)[kCount], const std::string& text) {
  for (const auto& word : words)
    if (text == word.word) return word.value;
  return std::nullopt;
}

std::string decimal(double x) {
  char text[32];
  std::snprintf(text, sizeof text, "%.4f", x);
  return text;
}

std::optional<double> number(const Node& stored, std::string_view key) {
  const std::string text = review_text(stored, key);
  char* end = nullptr;
  const double x = std::strtod(text.c_str(), &end);
  if (text.empty() || *end != '\0' || !std::isfinite(x)) return std::nullopt;
  return x;
}

void open_worked_case(AppState& state) {
  Result<Node> worked = read_document(worked_case());
  state.document = worked.ok() ? std::move(worked).value() : Node::table(false);
}

// The worked case opens at a claim that does not match, where there is most to see.
void choose_first_conflict(AppState& state) {
  const auto& findings = state.checked.findings;
  for (std::size_t i = findings.size(); i-- > 0;)
    if (findings[i].state == State::Conflicts) state.claim = static_cast<int>(i);
}

// The view's choices. A value that cannot be read leaves the usual one.
void read_view(AppState& state, const Node& stored) {
  if (review_text(stored, "theme") == "dark") state.theme = Theme::Dark;
  if (const auto scale = number(stored, "text_scale"))
    state.text_scale = std::min(2.0, std::max(0.8, *scale));
  const auto left = number(stored, "left_share"), right = number(stored, "right_share");
  if (left && right) set_shares(state, static_cast<float>(*left), static_cast<float>(*right));
  if (const auto pane = value_for(kPanes, review_text(stored, "pane"))) state.pane = *pane;
  if (const auto claim = number(stored, "claim"))
    state.claim = static_cast<int>(std::min(1e6, std::max(-1.0, *claim)));
  if (const Node* open = rows_of(stored, "open")) {
    state.open_drawers.clear();
    for (const Node& item : open->items)
      if (const auto drawer = value_for(kDrawers, item.text)) state.open_drawers.insert(*drawer);
  }
  for (const auto& box : kBoxes)
    if (const Node* draft = stored.find(std::string("draft_") + box.word);
        draft && draft->kind == Node::Kind::Text)
      state.drafts[box.value] = draft->text;
}

}  // namespace

std::string stored_text(const AppState& state) {
  Node stored = Node::table(false);
  stored.set("rejoinder_page", Node::literal(std::to_string(kVersion)));
  stored.set("review", Node::quoted(write_document(state.document)));
  stored.set("claim", Node::literal(std::to_string(state.claim)));
  stored.set("theme", Node::quoted(state.theme == Theme::Dark ? "dark" : "light"));
  stored.set("text_scale", Node::literal(decimal(state.text_scale)));
  stored.set("left_share", Node::literal(decimal(state.left_share)));
  stored.set("right_share", Node::literal(decimal(state.right_share)));
  stored.set("pane", Node::quoted(word_for(kPanes, state.pane)));
  std::vector<Node> open;
  for (const Drawer drawer : state.open_drawers) open.push_back(Node::quoted(word_for(kDrawers, drawer)));
  stored.set("open", Node::list(std::move(open)));
  for (const auto& box : kBoxes) {
    const auto draft = state.drafts.find(box.value);
    const std::string& text = state.overlay == box.value    ? state.box_text
                              : draft == state.drafts.end() ? std::string()
                                                            : draft->second;
    if (!text.empty()) stored.set(std::string("draft_") + box.word, Node::quoted(text));
  }
  return write_document(stored);
}

AppState first_state(const std::string& text) {
  AppState state;
  if (text.empty()) {
    open_worked_case(state);
    state.notice = "a worked case, invented; paste a table or open a review to begin";
    derive(state);
    choose_first_conflict(state);
    return state;
  }
  const Result<Node> stored = read_document(text);
  if (!stored.ok()) {
    state.set_aside = text;
    open_worked_case(state);
    state.notice =
        "what was kept on this machine could not be read; it is set aside under another name, nothing is "
        "lost";
    derive(state);
    return state;
  }
  const Node& root = stored.value();
  const Node* review = root.find("review");
  if (!root.find("rejoinder_page") || !review || review->kind != Node::Kind::Text) {
    // A review kept by itself is taken as one.
    if (Result<Node> alone = read_whole_review("", text); alone.ok()) {
      state.document = std::move(alone).value();
      state.notice = "your review, as you left it";
    } else {
      state.set_aside = text;
      open_worked_case(state);
      state.notice =
          "what was kept on this machine is no review; it is set aside under another name, nothing is lost";
    }
    derive(state);
    return state;
  }
  read_view(state, root);
  Result<Node> document = read_document(review->text);
  if (document.ok()) {
    state.document = std::move(document).value();
    state.notice = "your review, as you left it";
    // A page of a later version may have kept more than this one knows.
    if (number(root, "rejoinder_page").value_or(0) > kVersion) {
      state.set_aside = text;
      state.notice += "; a later version kept it, so a copy is set aside";
    }
    derive(state);
    return state;
  }
  state.set_aside = text;
  open_worked_case(state);
  derive(state);
  show_overlay(state, Overlay::ReviewText);
  state.box_text = review->text;
  read_box(state);
  state.notice =
      "the review kept on this machine could not be read; its text stands here to be mended, and a copy is "
      "set aside";
  return state;
}

}  // namespace rejoinder
