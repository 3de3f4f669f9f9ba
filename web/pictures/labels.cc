#include "web/pictures/labels.h"

#include <algorithm>
#include <cmath>
#include <utility>

namespace rejoinder {

float Labels::covered(const Box& box) const {
  float area = 0;
  for (const Box& other : taken_) {
    if (!box.meets(other)) continue;
    area += (std::min(box.right, other.right) - std::max(box.left, other.left)) *
            (std::min(box.bottom, other.bottom) - std::max(box.top, other.top));
  }
  return area;
}

Box Labels::put(Type type, std::string text, ImU32 colour, float x, float gap, const std::vector<Side>& sides,
                const std::vector<float>& rows) {
  const float width = std::ceil(text_width(type, text)), height = setting(type).leading;
  Box best{};
  float least = -1;
  for (const float row : rows) {
    for (const Side side : sides) {
      float left = side == Side::Right ? x + gap : side == Side::Left ? x - gap - width : x - width / 2;
      const float inside = std::clamp(left, left_, std::max(left_, right_ - width));
      // A label pushed inwards may lie on its own tick; that counts as covering unless it is centred anyway.
      const float pushed = side == Side::Centre ? 0 : std::fabs(inside - left) * height;
      const Box box{inside, row, inside + width, row + height};
      const float cost = covered(box) + pushed;
      if (least < 0 || cost < least) {
        least = cost;
        best = box;
      }
      if (cost == 0) break;
    }
    if (least == 0) break;
  }
  taken_.push_back({best.left - px(3), best.top, best.right + px(3), best.bottom});
  labels_.push_back({type, std::move(text), colour, best});
  return best;
}

void Labels::draw() const {
  for (const Label& label : labels_)
    draw_line(label.type, ImVec2(label.box.left, label.box.top), label.colour, label.text);
}

}  // namespace rejoinder
