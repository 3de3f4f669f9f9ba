// The left pane, "From the paper": the printed table as an editable grid.
//
// Laid out as papers lay a table out: terms down, columns across, the coefficient with its second figure
// beneath it, figures of the fit at the foot, decimal points in line. Tab, arrows, Enter, F2 and Escape move
// and edit as in any grid; every keystroke in a cell is an intent of its own.
#pragma once

#include "web/model/intent.h"
#include "web/panels/hands.h"

namespace rejoinder {

Intent show_paper(const AppState& state, Hands& hands, const ImVec2& low, const ImVec2& high);

}  // namespace rejoinder
