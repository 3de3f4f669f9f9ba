// What follows from the document: the review, its check, and choices that still exist.
#pragma once

#include "web/model/state.h"

namespace rejoinder {

// Reads and checks the review anew. A chosen claim or cell that is gone gives way to a neighbour.
void derive(AppState& state);

// Shares of the width that leave every pane room: each at least 0.15, the middle too.
void set_shares(AppState& state, float left, float right);

}  // namespace rejoinder
