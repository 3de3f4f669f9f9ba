#include "web/panels/hands.h"

#include <algorithm>
#include <utility>

#include "imgui_internal.h"
#include "web/platform/marks.h"
#include "web/platform/services.h"
#include "web/theme.h"

namespace rejoinder {

void Hands::begin() {
  taken_.clear();
  typed_taken_ = false;
  came_ = false;
  last_ = std::move(stops_);
  stops_.clear();

  if (!menu_ && key(ImGuiKey_Tab)) move_focus(shift() ? -1 : 1);
  if (!menu_ && key(ImGuiKey_F4)) move_group(shift() ? -1 : 1);
  if (has_next_) {
    has_next_ = false;
    if (focus_ != next_focus_ && typing_ && typing_->id != next_focus_) stop_typing();
    came_ = true;
    focus_ = std::move(next_focus_);
    by_keyboard_ = next_by_keyboard_;
    reveal_ = next_by_keyboard_;
    request_frames(2);
  }
}

void Hands::end() {
  reveal_ = false;
  if (typing_) ImGui::GetCurrentContext()->WantTextInputNextFrame = 1;
  // What is no longer drawn cannot hold the focus.
  const auto drawn = [this](const std::string& id) {
    return std::any_of(stops_.begin(), stops_.end(), [&](const Stop& stop) { return stop.id == id; });
  };
  if (!has_next_ && !focus_.empty() && !drawn(focus_)) {
    if (typing_ && typing_->id == focus_) stop_typing();
    focus_.clear();
  }
  if (typing_ && !drawn(typing_->id)) stop_typing();
  if (ImGui::GetIO().MouseDelta.x != 0 || ImGui::GetIO().MouseDelta.y != 0 || ImGui::IsMouseClicked(0)) {
    if (ImGui::IsMouseClicked(0)) by_keyboard_ = false;
  }
}

Press Hands::press(std::string_view id, const char* kind, const ImVec2& low, const ImVec2& high,
                   bool answers_keys) {
  stops_.push_back({std::string(id), group_, low.y});
  Press press = drag(id, kind, low, high);
  press.focused = focus_ == id;
  press.ring = press.focused && by_keyboard_;
  if (press.focused) mark(id, "focus", low, high);  // a second mark, of the kind that tells where it stands
  if (press.focused && reveal_) {
    const ImVec2 room(px(12), px(24));
    ImGui::ScrollToRect(
        ImGui::GetCurrentWindow(),
        ImRect(ImVec2(low.x - room.x, low.y - room.y), ImVec2(high.x + room.x, high.y + room.y)),
        ImGuiScrollFlags_KeepVisibleEdgeX | ImGuiScrollFlags_KeepVisibleEdgeY);
  }
  if (press.pressed) {
    if (focus_ != id && typing_ && typing_->id != id) stop_typing();
    if (focus_ != id) came_ = true;
    focus_ = std::string(id);
    by_keyboard_ = false;
    press.focused = true;
  } else if (answers_keys && press.focused && !typing_ && !menu_) {
    if (key(ImGuiKey_Enter, false) || key(ImGuiKey_KeypadEnter, false) || key(ImGuiKey_Space, false)) {
      take_typed();
      press.pressed = true;
    }
  }
  return press;
}

Press Hands::drag(std::string_view id, const char* kind, const ImVec2& low, const ImVec2& high) {
  ImGuiWindow* const window = ImGui::GetCurrentWindow();
  const ImRect rect(low, high);
  const ImGuiID number = window->GetID(id.data(), id.data() + id.size());
  ImGui::ItemAdd(rect, number, nullptr, ImGuiItemFlags_NoNav);
  Press press;
  press.pressed = ImGui::ButtonBehavior(rect, number, &press.hovered, &press.held,
                                        ImGuiButtonFlags_NoNavFocus | ImGuiButtonFlags_AllowOverlap);
  press.twice = press.hovered && ImGui::IsMouseDoubleClicked(0);
  mark(id, kind, low, high);
  return press;
}

void Hands::give_focus(std::string id, bool by_keyboard) {
  next_focus_ = std::move(id);
  has_next_ = true;
  next_by_keyboard_ = by_keyboard;
  request_frames(2);
}

bool Hands::focused_in(Group group) const {
  return std::any_of(last_.begin(), last_.end(),
                     [&](const Stop& stop) { return stop.group == group && stop.id == focus_; });
}

bool Hands::sees(ImGuiKey key) const {
  return std::find(taken_.begin(), taken_.end(), static_cast<int>(key)) == taken_.end() &&
         ImGui::IsKeyPressed(key, true);
}

bool Hands::key(ImGuiKey key, bool repeat) {
  if (!sees(key) || !ImGui::IsKeyPressed(key, repeat)) return false;
  taken_.push_back(static_cast<int>(key));
  return true;
}

bool Hands::command() const {
  const ImGuiIO& io = ImGui::GetIO();
  return io.ConfigMacOSXBehaviors ? io.KeySuper : io.KeyCtrl;
}

bool Hands::shift() const { return ImGui::GetIO().KeyShift; }

std::string Hands::typed() const {
  std::string text;
  if (typed_taken_) return text;
  for (const ImWchar c : ImGui::GetIO().InputQueueCharacters) {
    if (c < 0x20 || c == 0x7F) continue;
    char bytes[5];
    ImTextCharToUtf8(bytes, c);
    text += bytes;
  }
  return text;
}

std::string Hands::take_typed() {
  std::string text = typed();
  typed_taken_ = true;
  return text;
}

void Hands::start_typing(std::string_view id, const std::string& value, EditBuffer buffer) {
  Typing typing;
  typing.id = std::string(id);
  typing.buffer = std::move(buffer);
  typing.at_start = typing.outside = value;
  typing_ = std::move(typing);
  if (focus_ != id) {
    focus_ = std::string(id);
    came_ = true;
  }
  request_frames(2);
}

void Hands::open_menu(Menu menu) {
  stop_typing();
  menu.at = std::max(menu.chosen, 0);
  menu_ = std::move(menu);
  request_frames(2);
}

std::optional<int> Hands::picked(std::string_view owner) {
  if (picked_item_ < 0 || picked_owner_ != owner) return std::nullopt;
  return std::exchange(picked_item_, -1);
}

void Hands::pick(int item) {
  if (!menu_) return;
  picked_owner_ = menu_->owner;
  picked_item_ = item;
  close_menu();
}

void Hands::close_menu() {
  menu_.reset();
  request_frames(2);
}

std::vector<const Hands::Stop*> Hands::reachable() const {
  bool overlay = false;
  for (const Stop& stop : last_) overlay = overlay || stop.group == Group::Overlay;
  std::vector<const Stop*> stops;
  for (const Stop& stop : last_) {
    if (stop.group != Group::Menu && (!overlay || stop.group == Group::Overlay)) stops.push_back(&stop);
  }
  return stops;
}

void Hands::move_focus(int by) {
  const std::vector<const Stop*> stops = reachable();
  if (stops.empty()) return;
  const auto here =
      std::find_if(stops.begin(), stops.end(), [this](const Stop* s) { return s->id == focus_; });
  const int count = static_cast<int>(stops.size());
  const int at = here == stops.end() ? (by > 0 ? -1 : count) : static_cast<int>(here - stops.begin());
  give_focus(stops[static_cast<size_t>((at + by + count) % count)]->id);
}

void Hands::move_group(int by) {
  const std::vector<const Stop*> stops = reachable();
  // The groups in the order of their stops, and which of them has the focus.
  std::vector<const Stop*> first_of;
  int here = -1;
  for (const Stop* stop : stops) {
    if (first_of.empty() || first_of.back()->group != stop->group) first_of.push_back(stop);
    if (stop->id == focus_) here = static_cast<int>(first_of.size()) - 1;
  }
  if (first_of.empty()) return;
  const int count = static_cast<int>(first_of.size());
  const int at = here < 0 ? (by > 0 ? -1 : count) : here;
  give_focus(first_of[static_cast<size_t>((at + by + count) % count)]->id);
}

void draw_ring(const ImVec2& low, const ImVec2& high, float rounding) {
  const float gap = px(2), thick = px(2);
  ImGui::GetWindowDrawList()->AddRect(ImVec2(low.x - gap - thick / 2, low.y - gap - thick / 2),
                                      ImVec2(high.x + gap + thick / 2, high.y + gap + thick / 2),
                                      palette().ink, rounding + gap, 0, thick);
}

}  // namespace rejoinder
