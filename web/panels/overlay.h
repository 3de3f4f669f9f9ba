// What lies over the page for a while: pasting, five figures, the review as text, the keys, about.
#pragma once

#include "web/model/intent.h"
#include "web/panels/hands.h"
#include "web/panels/parts.h"

namespace rejoinder {

// Draws the overlay that the state asks for, if any. Escape, the button and a click beside it shut it.
Intent show_overlay(const AppState& state, Hands& hands);

// ---- one file each; they draw from `pen` down
Intent show_paste_box(const AppState& state, Hands& hands, Pen& pen);
Intent show_review_text(const AppState& state, Hands& hands, Pen& pen);
Intent show_five_figures(const AppState& state, Hands& hands, Pen& pen);
void show_keys(Pen& pen);
void show_about(Pen& pen);

}  // namespace rejoinder
