// The correlation of two estimates along a line from −1 to 1: where the reported figure can come from, and
// where the print leaves the claim unrejected. Applies to findings with one unknown correlation.
#pragma once

#include "core/judge/finding.h"
#include "imgui.h"

namespace rejoinder {

// False where the correlation decides nothing: the finding has none, or no value of it makes a difference.
bool has_correlation_line(const Finding& finding);
// Contract: has_correlation_line(finding).
float correlation_line_height(const Finding& finding);
void draw_correlation_line(const Finding& finding, const ImVec2& at, float width);

}  // namespace rejoinder
