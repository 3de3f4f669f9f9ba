#include "web/model/derive.h"

#include <algorithm>
#include <cmath>

#include "web/model/document_view.h"

namespace rejoinder {

void derive(AppState& state) {
  state.review = read_review(state.document);
  state.checked = check_review(state.review);
  const int claims = static_cast<int>(state.checked.findings.size());
  state.claim = claims == 0 ? -1 : std::clamp(state.claim, 0, claims - 1);
  if (state.cell) {
    const Node* column = row_of(state.document, "column", state.cell->column);
    if (!column || state.cell->term >= count_of(*column, "term")) state.cell.reset();
  }
}

void set_shares(AppState& state, float left, float right) {
  constexpr float kLeast = 0.15f;
  if (!std::isfinite(left) || !std::isfinite(right)) return;
  state.left_share = std::clamp(left, kLeast, 1 - 2 * kLeast);
  state.right_share = std::clamp(right, kLeast, 1 - kLeast - state.left_share);
}

}  // namespace rejoinder
