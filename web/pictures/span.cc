#include "web/pictures/span.h"

#include <algorithm>
#include <cmath>

#include "core/number/number_text.h"
#include "web/pictures/labels.h"
#include "web/pictures/scale.h"

namespace rejoinder {
namespace {

constexpr float kBar = 12;   // height of the bar, design pixels
constexpr float kStem = 15;  // from the axis up to the head of the pin
constexpr float kBelow = 9;  // from the axis down to the labels below

struct Plan {
  StatisticScale scale;
  Labels labels{0, 0};
  float axis_y = 0;  // from the top
  float height = 0;
  float head_y = 0;
  float critical_x = -1, critical_top = 0;
};

// Lays the labels out first: their rows decide how high the picture is.
Plan plan_span(const Finding& finding, const std::string& as_printed, const ImVec2& at, float width) {
  Plan plan;
  plan.scale = statistic_scale(finding);
  if (!plan.scale.drawable) return plan;
  const StatisticScale& scale = plan.scale;
  const float line = setting(Type::Small).leading, right = at.x + width;
  const auto x_of = [&](double value) { return at.x + static_cast<float>(scale.share(value)) * width; };
  const Palette& colours = palette();
  using Side = Labels::Side;

  const std::string critical = critical_text(finding), reported = reported_text(finding, as_printed);
  const float critical_x = finding.critical ? x_of(*finding.critical) : -1;
  const float pin_x = finding.reported ? x_of(*finding.reported) : -1;

  // Above: one row where both labels fit beside each other, else two, the pin's label above the other or,
  // where the pin would cross that one, below it.
  enum class Rows { One, PinAbove, PinBelow };
  for (const Rows rows : {Rows::One, Rows::PinAbove, Rows::PinBelow}) {
    const int count = rows == Rows::One ? 1 : 2;
    plan.axis_y = at.y + static_cast<float>(count) * line + px(count == 2 ? kStem - 3 : kStem - 5);
    Labels labels(at.x, right);
    const float lower = at.y + static_cast<float>(count - 1) * line;
    const float rule_top = rows == Rows::PinBelow ? at.y : lower,
                pin_top = rows == Rows::PinBelow ? lower : at.y;
    const bool pin_is_right = pin_x > critical_x;
    std::vector<Box> boxes;
    if (critical_x >= 0) labels.keep_free({critical_x - px(3), rule_top, critical_x + px(3), plan.axis_y});
    if (pin_x >= 0) labels.keep_free({pin_x - px(5), pin_top, pin_x + px(5), plan.axis_y});
    if (critical_x >= 0) {
      const std::vector<Side> sides = pin_x >= 0 && pin_is_right ? std::vector<Side>{Side::Left, Side::Right}
                                                                 : std::vector<Side>{Side::Right, Side::Left};
      boxes.push_back(labels.put(Type::Small, critical, colours.soft, critical_x, px(5), sides, {rule_top}));
    }
    if (pin_x >= 0) {
      const std::vector<Side> sides = pin_is_right ? std::vector<Side>{Side::Right, Side::Left}
                                                   : std::vector<Side>{Side::Left, Side::Right};
      boxes.push_back(labels.put(Type::Small, reported, colours.ink, pin_x, px(8), sides, {pin_top}));
    }
    plan.labels = labels;
    plan.head_y = pin_top + line / 2;
    plan.critical_x = critical_x;
    plan.critical_top = rule_top + px(1);
    const bool clash =
        boxes.size() == 2 &&
        (boxes[0].meets(boxes[1]) ||
         (boxes[1].left < critical_x + px(2) && boxes[1].right > critical_x - px(2) &&
          rows != Rows::PinAbove) ||
         (boxes[0].left < pin_x + px(4) && boxes[0].right > pin_x - px(4) && rows != Rows::PinBelow));
    if (!clash) break;
  }
  plan.axis_y = snap(plan.axis_y);

  // Below: the limits.
  const float below = plan.axis_y + px(kBelow);
  const float low_x = x_of(scale.low), high_x = scale.open || scale.cut ? right : x_of(scale.high);
  const std::string low = low_text(scale), high = high_text(scale);
  Labels& labels = plan.labels;
  if (scale.open) {
    labels.put(Type::Small, "at least " + low, colours.soft, low_x, -px(2), {Side::Right, Side::Left},
               {below});
  } else if (scale.cut) {
    labels.put(Type::Small, "to " + high, colours.soft, right, 0, {Side::Left}, {below});
    labels.put(Type::Small, low, colours.soft, low_x, 0, {Side::Centre, Side::Left}, {below});
  } else if (high_x - low_x < text_width(Type::Small, low + high) + px(24)) {
    labels.put(Type::Small, low == high ? low : low + " to " + high, colours.soft, (low_x + high_x) / 2, 0,
               {Side::Centre}, {below});
  } else {
    labels.put(Type::Small, low, colours.soft, low_x, 0, {Side::Centre}, {below});
    labels.put(Type::Small, high, colours.soft, high_x, 0, {Side::Centre}, {below});
  }
  plan.height = below + line - at.y;
  return plan;
}

}  // namespace

float span_height(const Finding& finding, const std::string& as_printed, float width) {
  return plan_span(finding, as_printed, ImVec2(0, 0), width).height;
}

void draw_pin(float low_x, float high_x, float head_y, float foot_y, ImU32 colour) {
  ImDrawList* const list = ImGui::GetWindowDrawList();
  const float middle = (low_x + high_x) / 2, half = std::max((high_x - low_x) / 2, px(2.5f)),
              thick = px(1.6f);
  const float x = snap(middle - thick / 2);
  list->AddRectFilled(ImVec2(x, head_y), ImVec2(x + thick, foot_y), colour);
  list->AddCircleFilled(ImVec2(x + thick / 2, head_y), px(3.6f), colour, 20);
  list->AddRectFilled(ImVec2(snap(middle - half), foot_y - px(2.5f)), ImVec2(snap(middle + half), foot_y),
                      colour);
}

void draw_critical(float x, float top, float bottom, ImU32 colour) {
  ImDrawList* const list = ImGui::GetWindowDrawList();
  const float dash = px(3), gap = px(2), thick = std::max(hair(), px(1.2f)), left = snap(x - thick / 2);
  for (float y = top; y < bottom; y += dash + gap) {
    list->AddRectFilled(ImVec2(left, y), ImVec2(left + thick, std::min(y + dash, bottom)), colour);
  }
}

void draw_cut_marks(float x, float middle_y, float height, ImU32 colour, ImU32 ground) {
  ImDrawList* const list = ImGui::GetWindowDrawList();
  const float half = height / 2 + px(3), lean = px(2.5f), apart = px(5);
  const ImVec2 gap[] = {{x - lean, middle_y + half},
                        {x + lean, middle_y - half},
                        {x + lean + apart, middle_y - half},
                        {x - lean + apart, middle_y + half}};
  list->AddConvexPolyFilled(gap, 4, ground);
  list->AddLine(gap[0], gap[1], colour, px(1.8f));
  list->AddLine(gap[3], gap[2], colour, px(1.8f));
}

void draw_open_end(float x, float middle_y, float height, ImU32 colour) {
  ImDrawList* const list = ImGui::GetWindowDrawList();
  const float half = height / 2;
  list->PathLineTo(ImVec2(x - half, middle_y - half));
  list->PathLineTo(ImVec2(x, middle_y));
  list->PathLineTo(ImVec2(x - half, middle_y + half));
  list->PathStroke(colour, 0, px(2.2f));
}

void draw_span(const Finding& finding, const std::string& as_printed, const ImVec2& at, float width) {
  const Plan plan = plan_span(finding, as_printed, at, width);
  const StatisticScale& scale = plan.scale;
  if (!scale.drawable) return;
  const Palette& colours = palette();
  ImDrawList* const list = ImGui::GetWindowDrawList();
  const ImU32 tone = accent(finding.state);
  const float right = at.x + width, bar = px(kBar);
  const auto x_of = [&](double value) { return at.x + static_cast<float>(scale.share(value)) * width; };

  draw_rule(ImVec2(at.x, plan.axis_y), width, hair(), colours.edge);
  draw_rule(ImVec2(at.x, plan.axis_y - px(3)), hair(), px(6) + hair(),
            colours.thin_rule);  // where the line begins, at 0

  const bool beyond = scale.open || scale.cut;
  float low_x = x_of(scale.low), high_x = beyond ? right - (scale.open ? px(1) : 0) : x_of(scale.high);
  const float least = px(3);
  if (high_x - low_x < least) {
    const float middle = (low_x + high_x) / 2;
    low_x = middle - least / 2;
    high_x = middle + least / 2;
  }
  const ImVec2 bar_low(low_x, plan.axis_y - bar / 2),
      bar_high(scale.open ? high_x - bar / 2 : high_x, plan.axis_y + bar / 2);
  list->AddRectFilled(bar_low, bar_high, faded(tone, 0.28f));
  const float end = px(2.2f), over = px(3);
  list->AddRectFilled(ImVec2(snap(low_x - end / 2), bar_low.y - over),
                      ImVec2(snap(low_x - end / 2) + end, bar_high.y + over), tone);
  if (scale.open) {
    draw_open_end(high_x, plan.axis_y, bar + 2 * over, tone);
  } else if (scale.cut) {
    draw_cut_marks(right - px(22), plan.axis_y, bar, tone, colours.card);
  } else {
    list->AddRectFilled(ImVec2(snap(high_x - end / 2), bar_low.y - over),
                        ImVec2(snap(high_x - end / 2) + end, bar_high.y + over), tone);
  }
  if (plan.critical_x >= 0) draw_critical(plan.critical_x, plan.critical_top, bar_high.y + over, colours.ink);
  if (finding.reported) {
    const Interval foot = finding.reported_range.value_or(Interval::point(*finding.reported));
    draw_pin(x_of(foot.low), x_of(foot.high), plan.head_y, bar_low.y - px(1), colours.ink);
  }
  plan.labels.draw();
}

}  // namespace rejoinder
