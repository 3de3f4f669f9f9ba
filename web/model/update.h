// The one function that changes the state.
#pragma once

#include "web/model/intent.h"

namespace rejoinder {

// Carries out `intent`. Whatever changes the document goes through the history, re-reads the review and
// checks it anew. Returns what the page must do besides. Nothing the user typed is ever lost: text that
// cannot be read stays in its cell as typed and is listed under the review's problems.
std::vector<Effect> update(AppState& state, const Intent& intent);

// The state for a stored text (as app_store keeps it) or, when that is empty, the worked case that opens
// first.
AppState first_state(const std::string& stored);

// What is kept between visits: the review's text and the view's choices.
std::string stored_text(const AppState& state);

}  // namespace rejoinder
