// The span: the picture of a finding in one bar.
//
// From the lowest to the highest statistic that the print admits, the critical value as a rule across it, the
// reported figure as a pin from above whose foot is as wide as its rounding. An infinite end is open, an
// arrow; a finite end beyond the picture is cut by two short strokes and its value written. State colours
// never speak alone: the words of the state stand beside the picture.
#pragma once

#include <string>

#include "core/judge/finding.h"
#include "imgui.h"

namespace rejoinder {

// Height that the span of `finding` takes in `width` CSS pixels; 0 where the finding has no limits.
float span_height(const Finding& finding, const std::string& reported_as_printed, float width);
void draw_span(const Finding& finding, const std::string& reported_as_printed, const ImVec2& at, float width);

// The reported figure as a pin with its head at `head_y` and its foot, from `low_x` to `high_x`, on `foot_y`.
void draw_pin(float low_x, float high_x, float head_y, float foot_y, ImU32 colour);
// The critical value: a dashed rule from `top` to `bottom`.
void draw_critical(float x, float top, float bottom, ImU32 colour);
// Two short strokes that cut a bar at `x`, `ground` between them.
void draw_cut_marks(float x, float middle_y, float height, ImU32 colour, ImU32 ground);
// The open end of a bar without upper limit, its tip at `x`.
void draw_open_end(float x, float middle_y, float height, ImU32 colour);

}  // namespace rejoinder
