#include "web/panels/field.h"

#include <algorithm>
#include <cmath>

#include "imgui_internal.h"
#include "web/platform/services.h"

namespace rejoinder {
namespace {

// Byte of `line` nearest to `x`, measured from the line's left end.
size_t byte_at(Type type, std::string_view text, const Line& line, float x) {
  size_t best = line.begin;
  float nearest = std::fabs(x);
  for (size_t at = line.begin; at < line.end;) {
    ++at;
    while (at < line.end && (static_cast<unsigned char>(text[at]) & 0xC0) == 0x80) ++at;
    const float distance = std::fabs(text_width(type, text.substr(line.begin, at - line.begin)) - x);
    if (distance > nearest) break;
    nearest = distance;
    best = at;
  }
  return best;
}

size_t line_of(const std::vector<Line>& lines, size_t byte) {
  for (size_t i = lines.size(); i-- > 0;) {
    if (byte >= lines[i].begin) return i;
  }
  return 0;
}

struct Block {
  std::string_view text;
  std::vector<Line> lines;
  ImVec2 at;  // upper left of the first line
  Type type;

  float x_of(size_t byte) const {
    const Line& line = lines[line_of(lines, byte)];
    const size_t end = std::clamp(byte, line.begin, line.end);
    return at.x + text_width(type, text.substr(line.begin, end - line.begin));
  }
  float y_of(size_t byte) const {
    return at.y + static_cast<float>(line_of(lines, byte)) * setting(type).leading;
  }
  size_t byte_under(const ImVec2& point) const {
    const auto row = static_cast<int>(std::floor((point.y - at.y) / setting(type).leading));
    const Line& line = lines[static_cast<size_t>(std::clamp(row, 0, static_cast<int>(lines.size()) - 1))];
    return byte_at(type, text, line, point.x - at.x);
  }
};

void draw_selection(const Block& block, size_t begin, size_t end) {
  ImDrawList* const list = ImGui::GetWindowDrawList();
  const float leading = setting(block.type).leading;
  for (size_t i = 0; i < block.lines.size(); ++i) {
    const Line& line = block.lines[i];
    if (end < line.begin || begin > line.end) continue;
    const size_t from = std::max(begin, line.begin), to = std::min(end, line.end);
    const float left = text_width(block.type, block.text.substr(line.begin, from - line.begin));
    float right = text_width(block.type, block.text.substr(line.begin, to - line.begin));
    if (end > line.end && i + 1 < block.lines.size()) right += px(4);  // the line end is selected too
    const float y = block.at.y + static_cast<float>(i) * leading;
    list->AddRectFilled(ImVec2(block.at.x + left, y), ImVec2(block.at.x + right, y + leading),
                        palette().selection);
  }
}

// Up and Down inside a text of several lines. Returns whether the key was ours.
void move_between_lines(Hands& hands, const Block& block) {
  Hands::Typing& typing = *hands.typing();
  const size_t row = line_of(block.lines, typing.buffer.caret());
  const bool up = row > 0 && hands.key(ImGuiKey_UpArrow);
  const bool down = !up && row + 1 < block.lines.size() && hands.key(ImGuiKey_DownArrow);
  if (!up && !down) return;
  if (typing.goal_x < 0) typing.goal_x = block.x_of(typing.buffer.caret()) - block.at.x;
  const float goal = typing.goal_x;
  typing.buffer.move_to(byte_at(block.type, block.text, block.lines[up ? row - 1 : row + 1], goal),
                        hands.shift());
  typing.goal_x = goal;
}

void draw_frame_of(const ImVec2& low, const ImVec2& high, const FieldStyle& style, bool hovered, bool typing,
                   bool ring) {
  const Palette& colours = palette();
  const float round = px(3);
  if (style.frame == Frame::Box) {
    draw_card(low, high, colours.card,
              typing    ? colours.ink
              : hovered ? colours.thin_rule
                        : colours.control,
              typing ? px(1.5f) : hair(), round);
    return;
  }
  ImDrawList* const list = ImGui::GetWindowDrawList();
  if (typing || hovered || ring) list->AddRectFilled(low, high, typing ? colours.card : colours.hover, round);
  if (style.frame == Frame::Line || typing) {
    draw_rule(ImVec2(low.x, high.y - (typing ? px(1.5f) : hair())), high.x - low.x,
              typing ? px(1.5f) : hair(), typing ? colours.ink : colours.thin_rule);
  }
}

}  // namespace

ImVec2 field_room(const FieldStyle& style) {
  switch (style.frame) {
    case Frame::Box:
      return {px(8), px(4)};
    case Frame::Line:
      return {px(4), px(1)};
    case Frame::Bare:
      break;
  }
  return {px(4), px(2)};
}

float field_height(const FieldStyle& style, const std::string& text, float width) {
  const ImVec2 room = field_room(style);
  const float inner = style.many_lines ? width - 2 * room.x : 0;
  return text_height(style.type, style.many_lines ? std::string_view(text) : std::string_view("x"), inner) +
         2 * room.y;
}

bool type_with_keys(Hands& hands, bool many_lines, bool enter_breaks) {
  Hands::Typing& typing = *hands.typing();
  EditBuffer& buffer = typing.buffer;
  const std::string before = buffer.text();
  const size_t caret_before = buffer.caret();
  const bool command = hands.command(), shift = hands.shift();
  const ImGuiIO& io = ImGui::GetIO();
  const bool by_word = io.ConfigMacOSXBehaviors ? io.KeyAlt : io.KeyCtrl;

  if (command) {
    if (hands.key(ImGuiKey_A, false)) buffer.select_all();
    const bool cut = hands.key(ImGuiKey_X, false);
    if (cut || hands.key(ImGuiKey_C, false)) {
      if (const std::string chosen = buffer.selected(); !chosen.empty()) {
        ImGui::SetClipboardText(chosen.c_str());
        if (cut) buffer.insert("");
      }
    }
    if (hands.key(ImGuiKey_V, false)) {
      std::string pasted = ImGui::GetClipboardText() ? ImGui::GetClipboardText() : "";
      if (!many_lines) {
        std::replace(pasted.begin(), pasted.end(), '\n', ' ');
        std::replace(pasted.begin(), pasted.end(), '\t', ' ');
        while (!pasted.empty() && pasted.back() == ' ') pasted.pop_back();
      }
      buffer.insert(pasted);
    }
  }
  if (hands.key(ImGuiKey_LeftArrow)) buffer.move_left(by_word, shift);
  if (hands.key(ImGuiKey_RightArrow)) buffer.move_right(by_word, shift);
  if (hands.key(ImGuiKey_Backspace)) buffer.erase_backward(by_word);
  if (hands.key(ImGuiKey_Delete)) buffer.erase_forward(by_word);
  const std::string& text = buffer.text();
  if (hands.key(ImGuiKey_Home)) {
    const size_t line =
        buffer.caret() == 0 || command ? std::string::npos : text.rfind('\n', buffer.caret() - 1);
    buffer.move_to(line == std::string::npos ? 0 : line + 1, shift);
  }
  if (hands.key(ImGuiKey_End)) {
    buffer.move_to(command ? text.size() : std::min(text.find('\n', buffer.caret()), text.size()), shift);
  }
  if (enter_breaks && !command && (hands.key(ImGuiKey_Enter) || hands.key(ImGuiKey_KeypadEnter)))
    buffer.insert("\n");
  if (!command) {
    if (const std::string typed = hands.take_typed(); !typed.empty()) buffer.insert(typed);
  }
  const bool changed = buffer.text() != before;
  if (changed || buffer.caret() != caret_before) typing.goal_x = -1;
  return changed;
}

std::optional<std::string> show_field(Hands& hands, const std::string& id, const std::string& value,
                                      const ImVec2& low, const ImVec2& high, const FieldStyle& style) {
  const Press press = hands.press(id, "textbox", low, high);
  std::optional<std::string> answer;
  const bool was_typing = hands.types_in(id);
  // Arriving by Tab selects everything; by pointer, the caret goes where it points.
  const bool clicked = press.hovered && ImGui::IsMouseClicked(0);
  if (!was_typing && ((press.focused && hands.just_came(id)) || clicked)) {
    hands.start_typing(id, value, EditBuffer(value, !clicked));
  }
  const bool typing = hands.types_in(id);

  if (typing) {
    Hands::Typing& state = *hands.typing();
    if (value != state.outside && value != state.buffer.text()) state.buffer = EditBuffer(value);
    state.outside = value;
  }

  const size_t caret_before = typing ? hands.typing()->buffer.caret() : 0;
  const ImVec2 room = field_room(style);
  const ImVec2 inner_low(low.x + room.x, low.y + room.y), inner_high(high.x - room.x, high.y - room.y);
  const auto lay_out = [&](std::string_view text) {
    return Block{
        text, set_in_lines(style.type, text, style.many_lines ? inner_high.x - inner_low.x : 0),
        ImVec2(inner_low.x - (typing && !style.many_lines ? hands.typing()->scroll : 0), inner_low.y),
        style.type};
  };
  if (typing) {
    Hands::Typing& state = *hands.typing();
    if (style.many_lines) move_between_lines(hands, lay_out(state.buffer.text()));
    if (type_with_keys(hands, style.many_lines, style.enter_breaks)) answer = state.buffer.text();
    if (hands.key(ImGuiKey_Escape, false)) {
      if (state.buffer.text() != state.at_start) answer = state.at_start;
      hands.stop_typing();
    } else if (!style.enter_breaks && !hands.command() &&
               (hands.key(ImGuiKey_Enter, false) || hands.key(ImGuiKey_KeypadEnter, false))) {
      hands.stop_typing();
    }
  } else if (press.focused && hands.key(ImGuiKey_F2, false)) {
    hands.start_typing(id, value, EditBuffer(value));
  }
  const bool still = typing && hands.types_in(id);
  if (answer) request_frames(2);

  // ---- the pointer
  const std::string shown = still ? hands.typing()->buffer.text() : answer ? *answer : value;
  const Block block = lay_out(shown);
  if (still) {
    Hands::Typing& state = *hands.typing();
    const size_t under = block.byte_under(ImGui::GetMousePos());
    if (clicked) {
      const int clicks = ImGui::GetMouseClickedCount(0);
      if (clicks == 2) {
        state.buffer.select_word(under);
      } else if (clicks >= 3) {
        state.buffer.select_all();
      } else {
        state.buffer.move_to(under, hands.shift());
      }
      state.dragging = clicks == 1;
    } else if (press.held && state.dragging && ImGui::IsMouseDragging(0, 2)) {
      state.buffer.move_to(under, true);
    }
    if (!ImGui::IsMouseDown(0)) state.dragging = false;
  }
  if (press.hovered) ImGui::SetMouseCursor(ImGuiMouseCursor_TextInput);

  // ---- drawing
  draw_frame_of(low, high, style, press.hovered, still, press.ring && !still);
  if (press.ring && !still) draw_ring(low, high, px(3));
  ImGui::PushClipRect(ImVec2(low.x + 1, low.y), ImVec2(high.x - 1, high.y), true);
  if (still) {
    Hands::Typing& state = *hands.typing();
    // A line longer than the field moves so that the caret stays in sight.
    const float caret = block.x_of(state.buffer.caret()) - block.at.x, width = inner_high.x - inner_low.x;
    if (!style.many_lines) {
      const float scroll =
          std::clamp(state.scroll, std::max(0.0f, caret - width + px(2)), std::max(0.0f, caret - px(2)));
      if (scroll != state.scroll) {
        state.scroll = scroll;
        request_frames(1);
      }
    }
    if (state.buffer.caret() != state.buffer.anchor()) {
      draw_selection(block, state.buffer.selection_begin(), state.buffer.selection_end());
    }
  }
  const float leading = setting(style.type).leading;
  if (shown.empty() && style.hint[0] != '\0') {
    draw_cut(style.type, inner_low, palette().quiet, style.hint, inner_high.x - inner_low.x);
  }
  const ImU32 colour = style.colour ? style.colour : palette().ink;
  for (size_t i = 0; i < block.lines.size(); ++i) {
    const Line& line = block.lines[i];
    const ImVec2 at(block.at.x, block.at.y + static_cast<float>(i) * leading);
    const std::string_view part = block.text.substr(line.begin, line.end - line.begin);
    if (still) {
      draw_line(style.type, at, colour, part);
    } else {
      draw_cut(style.type, at, colour, part, inner_high.x - inner_low.x + px(2));
    }
  }
  if (style.point) {
    const size_t at = std::min(*style.point, shown.size());
    const float x = block.x_of(at), y = block.y_of(at) + leading - px(2);
    EditBuffer next(shown);
    next.move_to(at, false);
    next.move_right(false, true);
    const float wide = std::max(px(6), text_width(style.type, next.selected()));
    draw_rule(ImVec2(x, y), wide, px(2), palette().conflicts);
  }
  if (still) {
    const size_t caret = hands.typing()->buffer.caret();
    const float x = snap(block.x_of(caret)), y = block.y_of(caret);
    ImGui::GetWindowDrawList()->AddRectFilled(ImVec2(x - px(0.5f), y + px(2)),
                                              ImVec2(x + px(1), y + leading - px(2)), palette().ink);
    // The window of an input method opens here.
    ImGuiPlatformImeData& input_method = ImGui::GetCurrentContext()->PlatformImeData;
    input_method.WantVisible = true;
    input_method.InputPos = ImVec2(x, y);
    input_method.InputLineHeight = leading;
    if (caret != caret_before) {
      ImGui::ScrollToRect(ImGui::GetCurrentWindow(),
                          ImRect(ImVec2(x - px(8), y - px(8)), ImVec2(x + px(8), y + leading + px(8))),
                          ImGuiScrollFlags_KeepVisibleEdgeX | ImGuiScrollFlags_KeepVisibleEdgeY);
    }
  }
  ImGui::PopClipRect();
  return answer;
}

}  // namespace rejoinder
