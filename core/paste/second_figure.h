// What the figure under a coefficient is, when the notes do not say. Private to core/paste.
#pragma once

#include "core/paste/table_text.h"

namespace rejoinder {

// Settles `second` of a table whose notes are silent, by what the figures themselves say: a negative one is
// no standard error, a pair is an interval, and the stars must follow from the right reading. Sets
// second_reason and second_certain.
void infer_second_figure(PastedTable& table);

// Gives every second figure the key that the table's reading implies, and a doubt where coefficient, second
// figure and stars do not go together under it: most often a figure that slid under its neighbour.
void tell_misfits(PastedTable& table);

}  // namespace rejoinder
