#include "web/panels/overlay.h"

#include <algorithm>

#include "imgui_internal.h"
#include "web/platform/marks.h"

namespace rejoinder {
namespace {

struct Sheet {
  const char* title;
  float width;
};

Sheet sheet_of(Overlay overlay) {
  switch (overlay) {
    case Overlay::PasteBox:
      return {"Paste a table", 1080};
    case Overlay::FiveFigures:
      return {"Five figures are enough", 560};
    case Overlay::ReviewText:
      return {"The review as text", 860};
    case Overlay::Keys:
      return {"Keys", 660};
    case Overlay::About:
      return {"About Rejoinder", 760};
    case Overlay::None:
      break;
  }
  return {"", 0};
}

}  // namespace

Intent show_overlay(const AppState& state, Hands& hands) {
  Intent intent;
  if (state.overlay == Overlay::None) return intent;
  const Sheet sheet = sheet_of(state.overlay);
  const Palette& colours = palette();
  const ImVec2 window = ImGui::GetIO().DisplaySize;

  ImGui::SetNextWindowPos(ImVec2(0, 0));
  ImGui::SetNextWindowSize(window);
  ImGui::Begin("overlay", nullptr,
               ImGuiWindowFlags_NoDecoration | ImGuiWindowFlags_NoMove | ImGuiWindowFlags_NoSavedSettings |
                   ImGuiWindowFlags_NoNav | ImGuiWindowFlags_NoScrollWithMouse);
  hands.enter(Group::Overlay);
  ImDrawList* const list = ImGui::GetWindowDrawList();
  list->AddRectFilled(ImVec2(0, 0), window, colours.shade);

  // As high as what it holds, as far as the window allows.
  const float width = std::min(px(sheet.width), window.x - px(32));
  const float head = setting(Type::Large).leading + px(30);
  ImGuiStorage* const store = ImGui::GetStateStorage();
  const ImGuiID height_id = ImGui::GetID(sheet.title);
  const float content = store->GetFloat(height_id, px(320));
  const float height = std::min(head + content, window.y - px(48));
  const ImVec2 low(snap((window.x - width) / 2), snap(std::max(px(24), (window.y - height) * 0.4f)));
  const ImVec2 high(low.x + width, low.y + height);
  draw_card(low, high, colours.paper, colours.control, hair(), px(8));

  draw_line(Type::Large, ImVec2(low.x + px(24), low.y + px(18)), colours.ink, sheet.title);
  const float close_width = button_size("Close", ButtonKind::Quiet).x;
  // The first stop after the sheet's own: shutting it must not be what Enter does at once.
  const ImVec2 close_at(high.x - px(18) - close_width, low.y + px(17));

  ImGui::SetCursorScreenPos(ImVec2(low.x + hair(), low.y + head));
  ImGui::BeginChild(sheet.title, ImVec2(width - 2 * hair(), height - head - px(6)), 0,
                    ImGuiWindowFlags_NoNav);
  const ImVec2 origin = ImGui::GetCursorScreenPos();
  Pen pen{origin.x + px(24), origin.y, width - px(48) - px(6)};
  switch (state.overlay) {
    case Overlay::PasteBox:
      intent = show_paste_box(state, hands, pen);
      break;
    case Overlay::ReviewText:
      intent = show_review_text(state, hands, pen);
      break;
    case Overlay::FiveFigures:
      intent = show_five_figures(state, hands, pen);
      break;
    case Overlay::Keys:
      show_keys(pen);
      break;
    case Overlay::About:
      show_about(pen);
      break;
    case Overlay::None:
      break;
  }
  scroll_by_pages(hands, Group::Overlay);
  close_column(pen, 20);
  const float needed = pen.y + px(26) - origin.y;
  if (std::abs(needed - content) > 0.5f) store->SetFloat(height_id, needed);
  ImGui::EndChild();
  mark("region/overlay", "dialog", low, high);

  const bool shut = show_button(hands, "overlay/close", "Close", close_at, ButtonKind::Quiet);
  const bool beside = ImGui::IsMouseClicked(0) && ImGui::IsWindowHovered(ImGuiHoveredFlags_ChildWindows) &&
                      !ImGui::IsMouseHoveringRect(low, high, false) && !hands.menu();
  ImGui::End();
  if (shut || beside || (!hands.typing() && !hands.menu() && hands.key(ImGuiKey_Escape, false))) {
    hands.stop_typing();
    intent = ShowOverlay{Overlay::None};
  }
  return intent;
}

}  // namespace rejoinder
