// The middle pane, "Claims": one card a claim, with its sentence, its restriction, its span and its state,
// and above them how many were looked at, so that one conflict among ten is seen as one among ten.
#pragma once

#include "web/model/intent.h"
#include "web/panels/hands.h"

namespace rejoinder {

Intent show_claims(const AppState& state, Hands& hands, const ImVec2& low, const ImVec2& high);

}  // namespace rejoinder
