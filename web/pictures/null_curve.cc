#include "web/pictures/null_curve.h"

#include <algorithm>
#include <cmath>
#include <optional>
#include <vector>

#include "core/number/number_text.h"
#include "core/statistics/tails.h"
#include "web/pictures/labels.h"
#include "web/pictures/scale.h"
#include "web/pictures/span.h"

namespace rejoinder {
namespace {

constexpr int kSteps = 180;

// Mean height of the density over each of kSteps equal stretches of [0, end], the greatest shown being 1.
// Taken from differences of the tail, so it is finite even where the density is not (q = 1 at zero).
struct Curve {
  double numerator = 0, denominator = 0, end = 0;
  bool chi_square = false;
  std::vector<float> heights;
};

const Curve& curve_for(const DegreesOfFreedom& df, bool chi_square, double end) {
  static Curve curve;  // of the chosen finding; made anew when another is chosen or its figures change
  if (curve.numerator == df.numerator && curve.denominator == df.denominator && curve.end == end &&
      curve.chi_square == chi_square) {
    return curve;
  }
  curve = {static_cast<double>(df.numerator), df.denominator, end, chi_square, {}};
  const auto tail = [&](double x) {
    return chi_square ? chi_square_upper_tail(x, df.numerator)
                      : f_upper_tail(x, df.numerator, df.denominator);
  };
  double before = 1;
  std::vector<double> mass;
  for (int i = 1; i <= kSteps; ++i) {
    const double after = tail(end * i / kSteps);
    mass.push_back(before - after);
    before = after;
  }
  // One restriction's curve runs up beside zero; its first stretch may stand higher than the picture.
  double greatest = 0;
  for (int i = df.numerator <= 2 ? 3 : 0; i < kSteps; ++i)
    greatest = std::max(greatest, mass[static_cast<size_t>(i)]);
  if (df.numerator == 2) greatest = std::max(greatest, mass[0]);
  for (const double m : mass) curve.heights.push_back(static_cast<float>(greatest > 0 ? m / greatest : 0));
  return curve;
}

}  // namespace

bool has_null_curve(const Finding& finding) {
  return statistic_scale(finding).drawable && finding.df && finding.df->numerator > 0 &&
         !(finding.df->denominator <= 0);
}

void draw_null_curve(const Finding& finding, const std::string& as_printed, const ImVec2& low,
                     const ImVec2& high) {
  const StatisticScale scale = statistic_scale(finding);
  const Palette& colours = palette();
  ImDrawList* const list = ImGui::GetWindowDrawList();
  const ImU32 tone = accent(finding.state);
  const float line = setting(Type::Small).leading, side = px(16);
  const float left = low.x + side, right = high.x - side, width = right - left;
  const float axis = snap(high.y - line - px(8)), top = low.y + px(10);
  const float peak =
      std::min(top + 2 * line + px(6), axis - px(40));  // the curve leaves room for labels above it
  const auto x_of = [&](double value) { return left + static_cast<float>(scale.share(value)) * width; };

  const Curve& curve = curve_for(*finding.df, scale.chi_square, scale.end);
  const float step = width / kSteps;
  const auto y_of = [&](int i) {
    return axis - std::min(curve.heights[static_cast<size_t>(i)], 1.12f) * (axis - peak);
  };

  // What the print allows, the whole height of the picture so that a narrow range is not overlooked.
  float range_low = x_of(scale.low),
        range_high = scale.open || scale.cut ? high.x - hair() : x_of(scale.high);
  if (range_high - range_low < px(3)) {
    const float middle = (range_low + range_high) / 2;
    range_low = middle - px(1.5f);
    range_high = middle + px(1.5f);
  }
  const float range_top = top + line + px(2);
  list->AddRectFilled(ImVec2(range_low, range_top), ImVec2(range_high, axis), faded(tone, 0.2f));
  const float edge = px(1.4f);
  list->AddRectFilled(ImVec2(snap(range_low), range_top), ImVec2(snap(range_low) + edge, axis), tone);
  if (!scale.open && !scale.cut) {
    list->AddRectFilled(ImVec2(snap(range_high) - edge, range_top), ImVec2(snap(range_high), axis), tone);
  }

  // The tail beyond the critical value, then the curve over everything.
  if (finding.critical) {
    const float from = x_of(*finding.critical);
    for (int i = 0; i < kSteps; ++i) {
      const float x = left + static_cast<float>(i) * step;
      if (x + step <= from) continue;
      list->AddRectFilled(ImVec2(std::max(x, from), y_of(i)), ImVec2(x + step, axis),
                          faded(colours.ink, 0.22f));
    }
  }
  for (int i = 0; i < kSteps; ++i) {
    list->PathLineTo(ImVec2(left + (static_cast<float>(i) + 0.5f) * step, y_of(i)));
  }
  list->PathStroke(colours.soft, 0, px(1.6f));
  draw_rule(ImVec2(left, axis), width, hair(), colours.thin_rule);

  // ---- labels
  using Side = Labels::Side;
  Labels labels(left - px(6), right + px(6));
  const float row1 = top, row2 = top + line + px(3), row3 = row2 + line;
  const float critical_x = finding.critical ? x_of(*finding.critical) : -1;
  if (critical_x >= 0) labels.keep_free({critical_x - px(2), row2, critical_x + px(2), axis});
  std::string range = scale.open ? "print: at least " + low_text(scale)
                      : low_text(scale) == high_text(scale)
                          ? "print: " + low_text(scale)
                          : "print: " + low_text(scale) + " to " + high_text(scale);
  labels.put(Type::Small, range, tone,
             scale.open || scale.cut ? (range_low + range_high) / 2 : (range_low + range_high) / 2, 0,
             {Side::Centre}, {row1});
  labels.keep_free({range_low, row2, range_high, axis});
  const float head = row3 + line / 2;
  std::optional<Box> reported;
  if (finding.reported) {
    const Interval foot = finding.reported_range.value_or(Interval::point(*finding.reported));
    const float x = x_of(*finding.reported);
    labels.keep_free({x - px(5), head - px(4), x + px(5), axis});
    draw_pin(x_of(foot.low), x_of(foot.high), head, axis, colours.ink);
    reported = labels.put(Type::Small, reported_text(finding, as_printed), colours.ink, x, px(8),
                          x > critical_x ? std::vector<Side>{Side::Right, Side::Left}
                                         : std::vector<Side>{Side::Left, Side::Right},
                          {head - line / 2, head + line / 2, row2});
  }
  if (critical_x >= 0) {
    const Box box = labels.put(Type::Small, critical_text(finding), colours.soft, critical_x, px(6),
                               {Side::Left, Side::Right}, {row2, row1, row3, row3 + line});
    draw_critical(critical_x, std::min(box.top + px(2), row2 + px(2)), axis + px(4), colours.ink);
    // A label that finds no room beside the rule interrupts it.
    if (reported && reported->left < critical_x && reported->right > critical_x) {
      list->AddRectFilled(ImVec2(reported->left - px(2), reported->top),
                          ImVec2(reported->right + px(2), reported->bottom), colours.card);
    }
  }
  labels.draw();

  const std::string name = scale.chi_square ? "χ²(" + df_text(finding.df->numerator) + ")"
                                            : "F(" + df_text(finding.df->numerator) + ", " +
                                                  df_text(finding.df->denominator) + ")";
  draw_line(Type::Small, ImVec2(left - px(3), axis + px(4)), colours.quiet, "0");
  draw_line(Type::Small, ImVec2(right - text_width(Type::Small, name), axis + px(4)), colours.quiet,
            name + "");
  if (scale.open || scale.cut) {
    const std::string on = scale.open ? "no upper limit →" : "to " + high_text(scale) + " →";
    const float x = right - text_width(Type::Small, name) - px(14) - text_width(Type::Small, on);
    draw_line(Type::Small, ImVec2(x, axis + px(4)), tone, on);
  }
}

}  // namespace rejoinder
