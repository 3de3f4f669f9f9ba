// The covariances or correlations of a column's estimates, as the triangle that papers print.
#pragma once

#include "web/model/intent.h"
#include "web/panels/hands.h"
#include "web/panels/parts.h"

namespace rejoinder {

// Draws the matrix of the column in question below the table and moves `pen` past it; nothing where the print
// gives none and none is asked for.
Intent show_matrix(const AppState& state, Hands& hands, Pen& pen);

}  // namespace rejoinder
