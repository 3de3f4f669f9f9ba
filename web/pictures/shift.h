// The shift: let every tested coefficient move by t of its standard errors at once, until the claim becomes
// possible. The t at which it does is the square root of the least W that separate standard errors allow, so
// one handle shows without any matrix what they alone can promise.
#pragma once

#include <string>
#include <vector>

#include "web/model/state.h"
#include "web/panels/hands.h"

namespace rejoinder {

// What the picture shows; empty rows where it does not apply: other restrictions than "all zero" and "all
// equal", a standard error missing, or a finding that does not rest on estimates with unknown covariance.
struct Shift {
  struct Row {
    std::string term;
    double value = 0, standard_error = 0;
  };
  std::vector<Row> rows;
  bool equal = false;   // else all zero
  double turns_at = 0;  // the t from which the claim is possible, by the finding's own evidence
};
Shift shift_of(const AppState& state, int claim);

float shift_height(const Shift& shift, float width);
// Draws the picture with its handle; the handle's place is kept in `hands`.
void show_shift(const Shift& shift, Hands& hands, const ImVec2& at, float width);

}  // namespace rejoinder
