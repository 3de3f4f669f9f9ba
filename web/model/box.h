// The overlays' text field: what it would become, and taking it.
#pragma once

#include <string>

#include "web/model/edit_review.h"

namespace rejoinder {

// Shows `overlay`; the text that stood in the one shown before is kept as its draft.
void show_overlay(AppState& state, Overlay overlay);

// Reads box_text anew: fills state.reading and state.box_note.
void read_box(AppState& state);

// A review's text: starts like one, whatever may be unreadable further down.
bool looks_like_review(const std::string& text);

// The document that taking the box would give, with the notice and the claim to choose. Nothing where the box
// holds nothing that can be taken.
struct Taken {
  Node document;
  Change change;
};
std::optional<Taken> take_box(const AppState& state);

// `text` as a whole review, or the reason why it is none, naming the file.
Result<Node> read_whole_review(const std::string& name, const std::string& text);

}  // namespace rejoinder
