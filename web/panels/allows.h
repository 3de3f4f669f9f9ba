// The right pane, "What the print allows": everything about the chosen claim. The answer first and largest,
// then why, its three parts, the picture, on what it rests, and drawers for what one may want to know
// besides.
#pragma once

#include "web/model/intent.h"
#include "web/panels/hands.h"

namespace rejoinder {

Intent show_allows(const AppState& state, Hands& hands, const ImVec2& low, const ImVec2& high);

}  // namespace rejoinder
