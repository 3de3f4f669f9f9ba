// The particulars of a claim, written as a sentence with blanks to fill in: what it restricts, on which
// column it rests, what the paper reports.
#pragma once

#include "web/model/intent.h"
#include "web/panels/hands.h"
#include "web/panels/parts.h"

namespace rejoinder {

// Draws the particulars of claim `claim` from `pen` down and moves the pen past them.
Intent show_claim_form(const AppState& state, Hands& hands, int claim, Pen& pen);

}  // namespace rejoinder
