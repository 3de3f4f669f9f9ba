// Places the labels of a picture so that none lies on another: measured first, drawn where there is room.
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "web/panels/text.h"

namespace rejoinder {

struct Box {
  float left, top, right, bottom;
  bool meets(const Box& other) const {
    return left < other.right && other.left < right && top < other.bottom && other.top < bottom;
  }
};

class Labels {
 public:
  // Labels stay between `left` and `right` (CSS pixels of the window).
  Labels(float left, float right) : left_(left), right_(right) {}

  // Room that no label may take: a pin, a rule.
  void keep_free(const Box& box) { taken_.push_back(box); }

  // Which side of `x` a label stands on.
  enum class Side { Centre, Right, Left };
  // Puts `text` beside `x`, on the first of `sides` and the first of `rows` (tops of lines) with room; with
  // none, where it covers least. Moved inwards where it would leave the picture. Returns its box.
  Box put(Type type, std::string text, ImU32 colour, float x, float gap, const std::vector<Side>& sides,
          const std::vector<float>& rows);

  void draw() const;

 private:
  struct Label {
    Type type;
    std::string text;
    ImU32 colour;
    Box box;
  };
  float covered(const Box& box) const;

  float left_, right_;
  std::vector<Box> taken_;
  std::vector<Label> labels_;
};

}  // namespace rejoinder
