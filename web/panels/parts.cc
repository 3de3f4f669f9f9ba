#include "web/panels/parts.h"

#include <algorithm>
#include <cmath>

#include "imgui_internal.h"
#include "web/platform/marks.h"
#include "web/platform/services.h"

namespace rejoinder {
namespace {

constexpr float kButtonRound = 4;

void draw_small_arrow(const ImVec2& centre, float size, ImU32 colour) {
  ImDrawList* const list = ImGui::GetWindowDrawList();
  list->PathLineTo(ImVec2(centre.x - size, centre.y - size * 0.5f));
  list->PathLineTo(ImVec2(centre.x, centre.y + size * 0.5f));
  list->PathLineTo(ImVec2(centre.x + size, centre.y - size * 0.5f));
  list->PathStroke(colour, 0, px(1.4f));
}

void open_below(Hands& hands, const std::string& id, const std::vector<std::string>& items, int chosen,
                const ImVec2& low, const ImVec2& high) {
  Hands::Menu menu;
  menu.owner = id;
  menu.low = low;
  menu.high = high;
  menu.items = items;
  menu.chosen = chosen;
  hands.open_menu(std::move(menu));
}

void lay_veil(const Press& press, const ImVec2& low, const ImVec2& high, float round) {
  if (press.hovered || press.held) {
    ImGui::GetWindowDrawList()->AddRectFilled(low, high, press.held ? palette().held : palette().hover,
                                              round);
  }
}

}  // namespace

ImVec2 button_size(std::string_view label, ButtonKind kind, Type type) {
  const float side = kind == ButtonKind::Quiet ? 6 : 11;
  return {std::ceil(text_width(type, label)) + 2 * px(side), setting(type).leading + 2 * px(3)};
}

bool show_button(Hands& hands, const std::string& id, std::string_view label, const ImVec2& at,
                 ButtonKind kind, bool able, Type type) {
  const ImVec2 size = button_size(label, kind, type);
  const ImVec2 low(snap(at.x), snap(at.y)), high(low.x + size.x, low.y + size.y);
  const Press press = able ? hands.press(id, "button", low, high) : Press{};
  const Palette& colours = palette();
  const float round = px(kButtonRound);
  ImU32 ink = colours.ink;
  switch (kind) {
    case ButtonKind::Plain:
      draw_card(low, high, colours.card, press.hovered ? colours.thin_rule : colours.control, hair(), round);
      break;
    case ButtonKind::Strong:
      ImGui::GetWindowDrawList()->AddRectFilled(low, high, able ? colours.ink : colours.control, round);
      ink = colours.card;
      break;
    case ButtonKind::Quiet:
      ink = press.hovered || press.ring ? colours.ink : colours.quiet;
      break;
  }
  lay_veil(press, low, high, round);
  if (press.ring) draw_ring(low, high, round);
  if (!able) ink = faded(ink, kind == ButtonKind::Strong ? 0.7f : 0.5f);
  const float side = (size.x - text_width(type, label)) / 2;
  draw_line(type, ImVec2(low.x + side, low.y + px(3) + (press.held ? hair() : 0)), ink, label);
  if (!able) mark(id, "button off", low, high);
  return press.pressed;
}

ImVec2 chooser_size(std::string_view shown, Type type) {
  return {std::ceil(text_width(type, shown)) + px(4 + 14 + 2), setting(type).leading + px(2)};
}

int show_chooser(Hands& hands, const std::string& id, std::string_view shown,
                 const std::vector<std::string>& items, int chosen, const ImVec2& at, Type type) {
  const ImVec2 size = chooser_size(shown, type);
  const ImVec2 low(snap(at.x), snap(at.y - px(1))), high(low.x + size.x, low.y + size.y);
  const Press press = hands.press(id, "combobox", low, high);
  const Palette& colours = palette();
  const bool open = hands.menu() && hands.menu()->owner == id;
  lay_veil(press, low, high, px(3));
  if (press.ring) draw_ring(low, high, px(3));
  draw_line(type, ImVec2(low.x + px(4), low.y + px(1)), colours.ink, shown);
  draw_small_arrow(ImVec2(high.x - px(9), low.y + size.y / 2 + px(0.5f)), px(3.2f),
                   press.hovered || open ? colours.ink : colours.quiet);
  draw_rule(ImVec2(low.x, high.y - hair()), size.x, hair(),
            press.hovered || open ? colours.ink : colours.control);
  const bool down = press.focused && !hands.typing() && !hands.menu() && hands.key(ImGuiKey_DownArrow);
  if (press.pressed || down) open_below(hands, id, items, chosen, low, high);
  return hands.picked(id).value_or(-1);
}

int show_menu_button(Hands& hands, const std::string& id, std::string_view label,
                     const std::vector<std::string>& items, int chosen, const ImVec2& at) {
  const ImVec2 size = button_size(label);
  if (show_button(hands, id, label, at)) {
    open_below(hands, id, items, chosen, at, ImVec2(at.x + size.x, at.y + size.y));
  }
  return hands.picked(id).value_or(-1);
}

ImVec2 tick_size(std::string_view label, Type type) {
  const float box = px(14);
  return {box + px(8) + std::ceil(text_width(type, label)) + px(4), setting(type).leading + px(4)};
}

bool show_tick(Hands& hands, const std::string& id, std::string_view label, bool ticked, const ImVec2& at,
               Type type) {
  const ImVec2 size = tick_size(label, type);
  const ImVec2 low(snap(at.x), snap(at.y)), high(low.x + size.x, low.y + size.y);
  const Press press = hands.press(id, ticked ? "checkbox on" : "checkbox off", low, high);
  const Palette& colours = palette();
  const float box = px(14);
  const ImVec2 box_low(low.x + px(2), snap(low.y + (size.y - box) / 2)),
      box_high(box_low.x + box, box_low.y + box);
  draw_card(box_low, box_high, ticked ? colours.ink : colours.card,
            ticked || press.hovered ? colours.ink : colours.thin_rule, hair(), px(3));
  if (press.held) ImGui::GetWindowDrawList()->AddRectFilled(box_low, box_high, colours.held, px(3));
  if (ticked) {
    ImDrawList* const list = ImGui::GetWindowDrawList();
    list->PathLineTo(ImVec2(box_low.x + box * 0.24f, box_low.y + box * 0.52f));
    list->PathLineTo(ImVec2(box_low.x + box * 0.43f, box_low.y + box * 0.72f));
    list->PathLineTo(ImVec2(box_low.x + box * 0.77f, box_low.y + box * 0.30f));
    list->PathStroke(colours.card, 0, px(1.8f));
  }
  if (press.ring) draw_ring(low, high, px(3));
  draw_line(type, ImVec2(box_high.x + px(7), low.y + px(2)), colours.ink, label);
  return press.pressed;
}

void draw_mark(const char* mark, ImU32 colour, const ImVec2& centre, float diameter) {
  ImDrawList* const list = ImGui::GetWindowDrawList();
  const float thick = diameter * 0.09f;
  list->AddCircle(centre, (diameter - thick) / 2, colour, 0, thick);
  // The signs are drawn, not set: a letter would sit a little off the middle.
  const float half = diameter * 0.21f, stroke = diameter * 0.095f;
  const auto bar = [&](float y) {
    list->AddRectFilled(ImVec2(centre.x - half, centre.y + y - stroke / 2),
                        ImVec2(centre.x + half, centre.y + y + stroke / 2), colour);
  };
  const std::string_view sign = mark;
  if (sign == "=" || sign == "≠") {
    bar(-diameter * 0.1f);
    bar(diameter * 0.1f);
    if (sign == "≠") {
      list->AddLine(ImVec2(centre.x + half * 0.62f, centre.y - diameter * 0.25f),
                    ImVec2(centre.x - half * 0.62f, centre.y + diameter * 0.25f), colour, stroke);
    }
  } else if (sign == "–") {
    bar(0);
  } else {
    const TypeSetting how = setting(Type::NoteStrong);
    const float size = diameter * 0.68f;
    const char* const end = mark + sign.size();
    const ImVec2 box = how.font->CalcTextSizeA(size, FLT_MAX, 0, mark, end);
    list->AddText(how.font, size, ImVec2(centre.x - box.x / 2, centre.y - box.y / 2), colour, mark, end);
  }
}

void show_menu(Hands& hands) {
  if (!hands.menu()) return;
  Hands::Menu& menu = *hands.menu();
  const ImVec2 window = ImGui::GetIO().DisplaySize;
  const Palette& colours = palette();
  const Type type = Type::Note;
  const float row = setting(type).leading + px(6), rule = px(9), edge = px(5);
  float width = menu.high.x - menu.low.x, height = 2 * edge + 2 * hair();
  for (const std::string& item : menu.items) {
    width = std::max(width, std::ceil(text_width(type, item)) + px(46));
    height += item == "-" ? rule : row;
  }
  width = std::min(width, window.x - px(16));
  ImVec2 low(std::clamp(menu.low.x, px(8), std::max(px(8), window.x - width - px(8))), menu.high.y + px(4));
  const float room = window.y - px(16);
  if (low.y + height > window.y - px(8)) low.y = menu.low.y - height - px(4);
  low.y = std::max(low.y, px(8));
  const ImVec2 high(low.x + width, low.y + std::min(height, room));

  ImGui::SetNextWindowPos(ImVec2(0, 0));
  ImGui::SetNextWindowSize(window);
  if (menu.fresh) ImGui::SetNextWindowFocus();
  ImGui::Begin("menu", nullptr,
               ImGuiWindowFlags_NoDecoration | ImGuiWindowFlags_NoMove | ImGuiWindowFlags_NoSavedSettings |
                   ImGuiWindowFlags_NoNav | ImGuiWindowFlags_NoScrollWithMouse);
  hands.enter(Group::Menu);
  ImDrawList* const list = ImGui::GetWindowDrawList();
  list->AddRectFilled(ImVec2(low.x, low.y + px(2)), ImVec2(high.x, high.y + px(3)),
                      faded(colours.shade, 0.35f), px(6));
  draw_card(low, high, colours.card, colours.control, hair(), px(5));
  ImGui::SetCursorScreenPos(ImVec2(low.x + hair(), low.y + hair()));
  ImGui::BeginChild("items", ImVec2(width - 2 * hair(), high.y - low.y - 2 * hair()), 0,
                    ImGuiWindowFlags_NoNav);
  const ImVec2 origin = ImGui::GetCursorScreenPos();
  float y = origin.y + edge;
  const int count = static_cast<int>(menu.items.size());
  const auto step = [&](int by) {
    do {
      menu.at = (menu.at + by + count) % count;
    } while (menu.items[static_cast<size_t>(menu.at)] == "-");
  };
  const bool down = hands.key(ImGuiKey_DownArrow), up = hands.key(ImGuiKey_UpArrow);
  if (count > 0 && down) step(1);
  if (count > 0 && up) step(-1);
  int picked = -1;
  for (int i = 0; i < count; ++i) {
    const std::string& item = menu.items[static_cast<size_t>(i)];
    if (item == "-") {
      draw_rule(ImVec2(origin.x, y + rule / 2), width, hair(), colours.hairline);
      y += rule;
      continue;
    }
    const ImVec2 item_low(origin.x + px(4), y), item_high(origin.x + width - px(6), y + row);
    const Press press = hands.drag("menu/" + item, "menuitem", item_low, item_high);
    if (press.hovered && (ImGui::GetIO().MouseDelta.x != 0 || ImGui::GetIO().MouseDelta.y != 0)) menu.at = i;
    if (menu.at == i) {
      ImGui::GetWindowDrawList()->AddRectFilled(item_low, item_high,
                                                press.held ? colours.held : colours.hover, px(3));
      if (down || up) {
        ImGui::ScrollToRect(ImGui::GetCurrentWindow(), ImRect(item_low, item_high),
                            ImGuiScrollFlags_KeepVisibleEdgeY);
      }
    }
    if (i == menu.chosen) {
      const float mid = y + row / 2;
      ImGui::GetWindowDrawList()->AddCircleFilled(ImVec2(item_low.x + px(10), mid), px(2.6f), colours.ink);
    }
    draw_cut(type, ImVec2(item_low.x + px(20), y + px(3)), colours.ink, item,
             item_high.x - item_low.x - px(24));
    if (press.pressed) picked = i;
    y += row;
  }
  ImGui::SetCursorScreenPos(origin);
  ImGui::Dummy(ImVec2(1, y + edge - origin.y));
  ImGui::EndChild();
  const bool inside = ImGui::IsMouseHoveringRect(low, high, false);
  const bool away = !menu.fresh && ImGui::IsMouseClicked(0) && !inside;
  menu.fresh = false;
  ImGui::End();
  if (picked < 0 && count > 0 &&
      (hands.key(ImGuiKey_Enter, false) || hands.key(ImGuiKey_KeypadEnter, false) ||
       hands.key(ImGuiKey_Space, false))) {
    picked = menu.at;
  }
  hands.take_typed();
  if (picked >= 0) {
    hands.pick(picked);
  } else if (away || hands.key(ImGuiKey_Escape, false) || hands.key(ImGuiKey_Tab, false)) {
    hands.close_menu();
  }
}

void show_hint(std::string_view text, const ImVec2& low, const ImVec2& high) {
  const ImVec2 window = ImGui::GetIO().DisplaySize;
  const float widest = std::min(px(340), window.x - px(40));
  float width = 0;
  for (const Line& line : set_in_lines(Type::Note, text, widest)) {
    width = std::max(width, text_width(Type::Note, text.substr(line.begin, line.end - line.begin)));
  }
  const ImVec2 size(std::ceil(width) + px(20), text_height(Type::Note, text, widest) + px(12));
  ImVec2 at(std::clamp(low.x, px(8), std::max(px(8), window.x - size.x - px(8))), high.y + px(6));
  if (at.y + size.y > window.y - px(8)) at.y = low.y - size.y - px(6);
  ImDrawList* const list = ImGui::GetForegroundDrawList();
  const ImVec2 corner(snap(at.x), snap(at.y));
  list->AddRectFilled(corner, ImVec2(corner.x + size.x, corner.y + size.y), palette().ink, px(4));
  const TypeSetting how = setting(Type::Note);
  float y = corner.y + px(6) + (how.leading - how.size) / 2;
  for (const Line& line : set_in_lines(Type::Note, text, widest)) {
    const std::string_view part = text.substr(line.begin, line.end - line.begin);
    list->AddText(how.font, how.size, ImVec2(corner.x + px(10), snap(y)), palette().card, part.data(),
                  part.data() + part.size());
    y += how.leading;
  }
}

void begin_pane(const char* id, const ImVec2& low, const ImVec2& high, ImU32 ground) {
  ImGui::GetWindowDrawList()->AddRectFilled(low, high, ground);
  ImGui::SetCursorScreenPos(low);
  ImGui::BeginChild(id, ImVec2(high.x - low.x, high.y - low.y), 0, ImGuiWindowFlags_NoNav);
}

void end_pane() { ImGui::EndChild(); }

void scroll_by_pages(Hands& hands, Group group) {
  if (hands.typing() || hands.menu() || !hands.focused_in(group)) return;
  const float page = ImGui::GetWindowHeight() * 0.85f;
  const float by = hands.key(ImGuiKey_PageDown) ? page : hands.key(ImGuiKey_PageUp) ? -page : 0;
  if (by == 0) return;
  ImGui::SetScrollY(std::clamp(ImGui::GetScrollY() + by, 0.0f, ImGui::GetScrollMaxY()));
  request_frames(2);
}

void Pen::write(Type type, ImU32 colour, std::string_view text) {
  y += draw_text(type, at(), colour, text, width);
}

void Pen::rule(ImU32 colour) {
  draw_rule(at(), width, hair(), colour);
  y += hair();
}

void close_column(const Pen& pen, float room_below) {
  ImGui::SetCursorScreenPos(ImVec2(pen.x, pen.y));
  ImGui::Dummy(ImVec2(1, px(room_below)));
}

}  // namespace rejoinder
