// Drawers: a head that opens, and what lies in it.
#pragma once

#include "web/model/intent.h"
#include "web/panels/hands.h"
#include "web/panels/parts.h"

namespace rejoinder {

// The drawers about one finding, from `pen` down.
Intent show_drawers(const AppState& state, Hands& hands, const Finding& finding, Pen& pen);
// The drawer about the whole table: printed figures set against each other.
Intent show_audit_drawer(const AppState& state, Hands& hands, Pen& pen);

}  // namespace rejoinder
