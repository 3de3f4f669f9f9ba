#include "web/panels/grid_cell.h"

#include <algorithm>

#include "imgui_internal.h"
#include "web/panels/field.h"
#include "web/platform/services.h"

namespace rejoinder {
namespace {

bool is_digit(char c) { return c >= '0' && c <= '9'; }

void draw_words(const CellBox& box, std::string_view text, ImU32 colour) {
  const float width = box.high.x - box.low.x - px(8), leading = setting(box.type).leading;
  float y = box.low.y + px(1);
  for (const Line& line : set_in_lines(box.type, text, width)) {
    const std::string_view part = text.substr(line.begin, line.end - line.begin);
    const float x = box.set == SetAt::Left
                        ? box.low.x + px(4)
                        : box.low.x + px(4) + std::max(0.0f, (width - text_width(box.type, part)) / 2);
    draw_line(box.type, ImVec2(x, y), colour, part);
    y += leading;
  }
}

void draw_figure(const CellBox& box, const std::string& value, char decimal) {
  const Aligned figure = split_at_point(with_minus(value), decimal);
  const float y = box.low.y + (box.high.y - box.low.y - setting(box.type).leading) / 2;
  if (!figure.numeric) {
    const float width = text_width(box.type, value), right = box.high.x - px(6);
    draw_cut(box.type, ImVec2(std::max(box.low.x + px(4), right - width), y), box.colour, value,
             right - box.low.x - px(4));
    return;
  }
  const float left = text_width(box.type, figure.left), right = text_width(box.type, figure.right);
  draw_line(box.type, ImVec2(box.point_x - left, y), box.colour, figure.left);
  draw_line(box.type, ImVec2(box.point_x, y), box.colour, figure.right);
  if (box.brackets && value.find_first_of("([{") == std::string::npos) {
    draw_line(box.type, ImVec2(box.point_x - left - text_width(box.type, "("), y), faded(box.colour, 0.75f),
              "(");
    draw_line(box.type, ImVec2(box.point_x + right, y), faded(box.colour, 0.75f), ")");
  }
}

// Moves asked for by keys while the cell is chosen but not typed in.
CellMove move_by_keys(Hands& hands) {
  CellMove move;
  if (hands.key(ImGuiKey_LeftArrow)) move.columns = -1;
  if (hands.key(ImGuiKey_RightArrow)) move.columns = 1;
  if (hands.key(ImGuiKey_UpArrow)) move.lines = -1;
  if (hands.key(ImGuiKey_DownArrow)) move.lines = 1;
  return move;
}

}  // namespace

Aligned split_at_point(std::string text, char decimal) {
  Aligned split;
  const size_t first = text.find_first_of("0123456789");
  const size_t point = text.find(decimal);
  if (first == std::string::npos) {
    split.left = std::move(text);
    return split;
  }
  split.numeric = true;
  size_t at = point;
  const bool has_point = point != std::string::npos && point + 1 < text.size() && is_digit(text[point + 1]);
  if (!has_point) {  // a whole number ends where its point would stand
    at = first;
    while (at < text.size() && (is_digit(text[at]) || text[at] == ',' || text[at] == '.' || text[at] == '\''))
      ++at;
  }
  split.left = text.substr(0, at);
  split.right = text.substr(at);
  return split;
}

std::string with_minus(std::string text) {
  const size_t at = text.find_first_not_of("([ ");
  if (at != std::string::npos && text[at] == '-' && at + 1 < text.size() &&
      (is_digit(text[at + 1]) || text[at + 1] == '.')) {
    text.replace(at, 1, "−");
  }
  return text;
}

CellAnswer show_cell(Hands& hands, const std::string& id, const std::string& value, const CellBox& box,
                     const CellLook& look, char decimal) {
  const Palette& colours = palette();
  CellAnswer answer;
  ImDrawList* const list = ImGui::GetWindowDrawList();

  if (hands.types_in(id)) {
    FieldStyle style;
    style.type = box.type;
    const float needed =
        text_width(box.type, hands.typing()->buffer.text()) + 2 * field_room(style).x + px(6);
    const float grow = std::max(0.0f, px(30) - (box.high.y - box.low.y)) / 2;
    // The field stands in the cell's first line, and reaches to the right for a text that needs more room.
    const float bottom =
        box.set == SetAt::Point ? box.high.y + grow : box.low.y + setting(box.type).leading + px(8);
    const ImVec2 low(box.low.x, box.low.y - (box.set == SetAt::Point ? grow : px(2)));
    const ImVec2 high(std::max(box.high.x, box.low.x + needed), bottom);
    const bool enter = hands.sees(ImGuiKey_Enter) || hands.sees(ImGuiKey_KeypadEnter);
    const bool up = hands.sees(ImGuiKey_UpArrow), down = hands.sees(ImGuiKey_DownArrow);
    answer.text = show_field(hands, id, value, low, high, style);
    if (enter || up || down) {
      hands.stop_typing();
      answer.move.lines = up || (enter && hands.shift()) ? -1 : 1;
    }
    return answer;
  }

  const Press press = hands.press(id, "cell", box.low, box.high, false);
  answer.hovered = press.hovered;
  const bool clicked = press.hovered && ImGui::IsMouseClicked(0);
  if (clicked && !press.focused) hands.give_focus(id, false);
  answer.chosen = hands.just_came(id);

  if (look.rests) {
    list->AddRectFilled(box.low, box.high, colours.rests);
    list->AddRect(box.low, box.high, faded(colours.rests_edge, 0.8f), 0, 0, hair());
  }
  if (press.hovered) list->AddRectFilled(box.low, box.high, colours.hover);
  if (press.focused) {
    const float thick = px(2);
    list->AddRect(ImVec2(box.low.x + thick / 2, box.low.y + thick / 2),
                  ImVec2(box.high.x - thick / 2, box.high.y - thick / 2), colours.ink, px(2), 0, thick);
  }
  const std::string& shown = look.shown ? *look.shown : value;
  if (shown.empty()) {
    if (look.hint[0] != '\0') draw_words(box, look.hint, colours.quiet);
  } else if (box.set == SetAt::Point) {
    draw_figure(box, shown, decimal);
  } else {
    draw_words(box, shown, box.colour);
  }
  if (!look.trouble.empty()) {
    // Marked by a query at the cell's side and an underline of dots; the reason is written beside it.
    const float y = box.high.y - px(3);
    for (float x = box.low.x + px(6); x < box.high.x - px(6); x += px(4)) {
      list->AddRectFilled(ImVec2(snap(x), snap(y)), ImVec2(snap(x) + px(2), snap(y) + px(1.5f)),
                          colours.conflicts);
    }
    draw_line(Type::SmallStrong, ImVec2(box.low.x + px(3), box.low.y), colours.conflicts, "?");
  }

  if (press.focused && !hands.typing() && !hands.menu()) {
    if (press.twice || hands.key(ImGuiKey_F2, false) || hands.key(ImGuiKey_Enter, false) ||
        hands.key(ImGuiKey_KeypadEnter, false)) {
      hands.start_typing(id, value, EditBuffer(value));
    } else if (hands.key(ImGuiKey_Delete) || hands.key(ImGuiKey_Backspace)) {
      answer.text = "";
    } else if (!hands.command() && !hands.typed().empty()) {
      const std::string typed = hands.take_typed();
      hands.start_typing(id, value, EditBuffer(typed));
      answer.text = typed;
    } else if (!hands.command()) {
      answer.move = move_by_keys(hands);
    }
  }
  return answer;
}

}  // namespace rejoinder
