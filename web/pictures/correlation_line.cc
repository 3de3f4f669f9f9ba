#include "web/pictures/correlation_line.h"

#include <algorithm>
#include <string>
#include <vector>

#include "core/number/number_text.h"
#include "web/pictures/labels.h"

namespace rejoinder {
namespace {

constexpr float kRow = 30;

// The row for the reported figure is left out where none is reported or none fits.
bool has_figure_row(const Finding& finding) { return finding.reported && !finding.correlation->fits.empty(); }

// ".31", "−.4": a correlation as papers print it.
std::string correlation_text(double r) {
  if (r <= -1) return "−1";
  if (r >= 1) return "1";
  char digits[16];
  std::snprintf(digits, sizeof digits, "%.2f", r < 0 ? -r : r);
  const std::string text = digits[0] == '0' ? digits + 1 : digits;
  return r < 0 && text != ".00" ? "−" + text : text;
}

void draw_row(const char* name, const std::vector<Interval>& sets, ImU32 tone, const ImVec2& at, float width,
              float left) {
  const Palette& colours = palette();
  ImDrawList* const list = ImGui::GetWindowDrawList();
  const float axis = snap(at.y + px(9)), room = width - left;
  const auto x_of = [&](double r) {
    return at.x + left + static_cast<float>((std::clamp(r, -1.0, 1.0) + 1) / 2) * room;
  };
  draw_line(Type::Small, ImVec2(at.x, axis - setting(Type::Small).leading / 2), colours.soft, name);
  draw_rule(ImVec2(at.x + left, axis), room, hair(), colours.edge);
  Labels labels(at.x + left - px(4), at.x + width + px(4));
  const float below = axis + px(6);
  for (const Interval& set : sets) {
    const float low = x_of(set.low), high = std::max(x_of(set.high), low + px(3));
    list->AddRectFilled(ImVec2(low, axis - px(5)), ImVec2(high, axis + px(5) + hair()), faded(tone, 0.3f));
    for (const float end : {low, high - px(1.6f)}) {
      list->AddRectFilled(ImVec2(snap(end), axis - px(7)), ImVec2(snap(end) + px(1.6f), axis + px(7)), tone);
    }
    const std::string text = correlation_text(set.low) == correlation_text(set.high)
                                 ? correlation_text(set.low)
                                 : correlation_text(set.low) + " to " + correlation_text(set.high);
    labels.put(Type::Small, text, colours.soft, (low + high) / 2, 0, {Labels::Side::Centre}, {below});
  }
  labels.draw();
}

}  // namespace

bool has_correlation_line(const Finding& finding) {
  return finding.correlation && finding.correlation->terms.size() == 2 &&
         (has_figure_row(finding) || !finding.correlation->does_not_reject.empty());
}

float correlation_line_height(const Finding& finding) {
  return px(kRow) * (has_figure_row(finding) ? 2.0f : 1.0f) + px(2) + setting(Type::Small).leading;
}

void draw_correlation_line(const Finding& finding, const ImVec2& at, float width) {
  const CorrelationSets& sets = *finding.correlation;
  const Palette& colours = palette();
  const char* const fits = "gives the reported figure";
  const char* const spares = "need not reject";
  const float left = std::max(text_width(Type::Small, fits), text_width(Type::Small, spares)) + px(12);
  float y = at.y;
  if (has_figure_row(finding)) {
    draw_row(fits, sets.fits, colours.ink, ImVec2(at.x, y), width, left);
    y += px(kRow);
  }
  draw_row(spares, sets.does_not_reject, accent(finding.state), ImVec2(at.x, y), width, left);
  y += px(kRow) + px(2);
  draw_line(Type::Small, ImVec2(at.x + left, y), colours.quiet, "−1");
  const float middle = at.x + left + (width - left) / 2;
  const std::string name = "correlation of " + sets.terms[0] + " and " + sets.terms[1];
  const float room = width - left - px(60), wide = std::min(text_width(Type::Small, name), room);
  draw_cut(Type::Small, ImVec2(middle - wide / 2, y), colours.quiet, name, room + 1);
  draw_line(Type::Small, ImVec2(at.x + width - text_width(Type::Small, "1"), y), colours.quiet, "1");
}

}  // namespace rejoinder
