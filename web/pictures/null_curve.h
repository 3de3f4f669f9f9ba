// What the statistic would do if the claim's restrictions held: its distribution, with everything the finding
// says laid on it: the critical value and the tail beyond it, the range the print allows, the reported
// figure.
#pragma once

#include <string>

#include "core/judge/finding.h"
#include "imgui.h"

namespace rejoinder {

// False where the finding has no limits or no degrees of freedom.
bool has_null_curve(const Finding& finding);
// Draws into [low, high], on card ground.
void draw_null_curve(const Finding& finding, const std::string& reported_as_printed, const ImVec2& low,
                     const ImVec2& high);

}  // namespace rejoinder
