// The workbench: one state, the panels that show it, and the intents they return, carried out one by one.
#include "web/platform/app.h"

#include <algorithm>
#include <string>
#include <utility>
#include <vector>

#include "imgui.h"
#include "imgui_internal.h"
#include "web/model/companion.h"
#include "web/model/document_view.h"
#include "web/model/update.h"
#include "web/panels/allows.h"
#include "web/panels/claims.h"
#include "web/panels/hands.h"
#include "web/panels/overlay.h"
#include "web/panels/paper.h"
#include "web/panels/parts.h"
#include "web/panels/top_line.h"
#include "web/platform/marks.h"
#include "web/platform/services.h"
#include "web/theme.h"

namespace rejoinder {
namespace {

constexpr float kTabsBelow = 1000;  // design pixels: narrower windows show one pane at a time

AppState state;
Hands hands;
bool companion_is_stale = true;
std::string told_notice;  // the last notice that was announced
std::string told_kept;    // what the text region says of the keeping
std::vector<OtherReview> others;

std::string mime_of(const std::string& name) {
  const std::string_view ending = std::string_view(name).substr(std::min(name.rfind('.'), name.size()));
  return ending == ".html"   ? "text/html"
         : ending == ".svg"  ? "image/svg+xml"
         : ending == ".toml" ? "application/toml"
                             : "text/plain";
}

void carry_out(const Intent& intent) {
  if (intent.index() == 0) return;
  const Overlay before = state.overlay;
  for (const Effect& effect : update(state, intent)) {
    switch (effect.kind) {
      case Effect::Kind::Copy:
        copy_to_clipboard(effect.text);
        break;
      case Effect::Kind::Download:
        offer_download(effect.name, mime_of(effect.name), effect.text);
        break;
      case Effect::Kind::PickFile:
        pick_file();
        break;
      case Effect::Kind::Print:
        print_page();
        break;
      case Effect::Kind::OpenReport:
        open_report(effect.text);
        break;
      case Effect::Kind::KeepNow:
        keep_soon();
        break;
    }
  }
  // Five figures make a review of their own, and their sheet has done its work.
  if (std::holds_alternative<FiveFigures>(intent)) update(state, ShowOverlay{Overlay::None});
  // An overlay takes the focus for itself, and gives it back to nothing in particular.
  if (state.overlay != before) hands.give_focus("", false);
  companion_is_stale = true;
  ++hands.view.changes;
  request_frames(2);
}

void adopt_look() {
  set_text_scale(static_cast<float>(state.text_scale));
  set_page_theme(state.theme == Theme::Dark);
  const std::string title = review_text(state.document, "title");
  set_title(title.empty() ? "Rejoinder" : title + " – Rejoinder");
  if (state.notice != told_notice) {
    told_notice = state.notice;
    if (!told_notice.empty()) announce(told_notice);
  }
}

// The kept reviews of other visits, by title and time.
std::vector<OtherReview> named(const std::vector<KeptReview>& kept) {
  std::vector<OtherReview> names;
  for (const KeptReview& review : kept) {
    const Result<Node> stored = read_document(review.text);
    const Node* const text = stored.ok() ? stored.value().find("review") : nullptr;
    const Result<Node> document = text ? read_document(text->text) : stored;
    const std::string title = document.ok() ? review_text(document.value(), "title") : std::string();
    names.push_back(
        {review.slot, (title.empty() ? "a review without a title" : title) + ", " + review.kept_at});
  }
  return names;
}

// A line between two panes that can be moved; returns how far the pointer took it.
float show_divider(const char* id, float x, float top, float bottom) {
  const float reach = px(5);
  const Press press = hands.drag(id, "separator", ImVec2(x - reach, top), ImVec2(x + reach, bottom));
  const Palette& colours = palette();
  draw_rule(ImVec2(x - hair() / 2, top), hair(), bottom - top, colours.hairline);
  if (press.hovered || press.held) {
    ImGui::SetMouseCursor(ImGuiMouseCursor_ResizeEW);
    draw_rule(ImVec2(x - px(1), top), px(2), bottom - top, press.held ? colours.ink : colours.thin_rule);
  }
  return press.held ? ImGui::GetIO().MouseDelta.x : 0;
}

Intent show_panes(float width, float top, float bottom) {
  Intent intent;
  const auto take = [&](Intent more) {
    if (more.index() != 0) intent = std::move(more);
  };
  hands.view.tabbed = width < px(kTabsBelow);
  if (hands.view.tabbed) {
    take(show_tabs(state, hands, ImVec2(0, top), width));
    const ImVec2 low(0, top + tabs_height()), high(width, bottom);
    switch (state.pane) {
      case Pane::Paper:
        take(show_paper(state, hands, low, high));
        break;
      case Pane::Claims:
        take(show_claims(state, hands, low, high));
        break;
      case Pane::Allows:
        take(show_allows(state, hands, low, high));
        break;
    }
    return intent;
  }
  const float left = snap(width * state.left_share), right = snap(width * (1 - state.right_share));
  take(show_paper(state, hands, ImVec2(0, top), ImVec2(left, bottom)));
  take(show_claims(state, hands, ImVec2(left, top), ImVec2(right, bottom)));
  take(show_allows(state, hands, ImVec2(right, top), ImVec2(width, bottom)));
  // Drawn last, so that the dividers lie over the panes.
  ImGui::SetCursorScreenPos(ImVec2(left - px(5), top));
  ImGui::BeginChild("dividers-left", ImVec2(px(10), bottom - top), 0,
                    ImGuiWindowFlags_NoNav | ImGuiWindowFlags_NoScrollWithMouse);
  const float by_left = show_divider("divider/left", left, top, bottom);
  ImGui::EndChild();
  ImGui::SetCursorScreenPos(ImVec2(right - px(5), top));
  ImGui::BeginChild("dividers-right", ImVec2(px(10), bottom - top), 0,
                    ImGuiWindowFlags_NoNav | ImGuiWindowFlags_NoScrollWithMouse);
  const float by_right = show_divider("divider/right", right, top, bottom);
  ImGui::EndChild();
  if (by_left != 0 || by_right != 0)
    intent = SetShares{state.left_share + by_left / width, state.right_share - by_right / width};
  return intent;
}

// Keys that work wherever the focus is, after everything else had its chance.
Intent global_keys() {
  if (hands.menu()) return {};
  if (hands.key(ImGuiKey_F1, false))
    return ShowOverlay{state.overlay == Overlay::Keys ? Overlay::None : Overlay::Keys};
  if (!hands.command()) return {};
  if (hands.key(ImGuiKey_Z)) {
    hands.stop_typing();
    return hands.shift() ? Intent(Redo{}) : Intent(Undo{});
  }
  if (hands.key(ImGuiKey_Y)) {
    hands.stop_typing();
    return Redo{};
  }
  if (hands.key(ImGuiKey_S, false)) return SaveReview{};
  if (hands.key(ImGuiKey_O, false)) return OpenFile{};
  return {};
}

}  // namespace

bool app_start(const StartInfo& info) {
  // Focus and its keys are the page's own (hands.h); ImGui must not move a second one.
  ImGui::GetIO().ConfigFlags &= ~ImGuiConfigFlags_NavEnableKeyboard;
  ImGui::GetCurrentContext()->ConfigNavWindowingKeyNext = 0;
  ImGui::GetCurrentContext()->ConfigNavWindowingKeyPrev = 0;
  state = first_state(info.kept);
  others = named(info.others);
  if (info.kept.empty() && prefers_dark()) state.theme = Theme::Dark;
  if (!info.linked.empty()) carry_out(LoadText{"", info.linked});
  return state.set_aside.empty();
}

void app_draw(const FrameInfo& frame) {
  set_theme(state.theme, static_cast<float>(state.text_scale), frame.pixel_ratio);
  adopt_look();
  hands.begin();

  ImGui::SetNextWindowPos(ImVec2(0, 0));
  ImGui::SetNextWindowSize(ImVec2(frame.width, frame.height));
  ImGui::Begin("page", nullptr,
               ImGuiWindowFlags_NoDecoration | ImGuiWindowFlags_NoMove | ImGuiWindowFlags_NoSavedSettings |
                   ImGuiWindowFlags_NoBringToFrontOnFocus | ImGuiWindowFlags_NoNav |
                   ImGuiWindowFlags_NoScrollWithMouse);
  ImGui::GetWindowDrawList()->AddRectFilled(ImVec2(0, 0), ImVec2(frame.width, frame.height), palette().desk);
  std::vector<Intent> intents;
  intents.push_back(show_top_line(state, hands, others, frame.width));
  intents.push_back(show_panes(frame.width, top_line_height(), frame.height));
  ImGui::End();
  intents.push_back(show_overlay(state, hands));
  show_menu(hands);
  intents.push_back(global_keys());
  hands.end();
  for (const Intent& intent : intents) carry_out(intent);
}

std::string app_store() { return stored_text(state); }

bool app_companion_changed() {
  if (kept_words() != told_kept) companion_is_stale = true;
  return std::exchange(companion_is_stale, false);
}

std::string app_companion_html() {
  told_kept = kept_words();
  return companion_html(state) + "<p>The review: " + escaped(told_kept) + "; " + kNothingSent + ".</p>\n";
}

void app_open_file(std::string_view name, std::string_view text) {
  carry_out(LoadText{std::string(name), std::string(text)});
}

bool app_paste(std::string_view text) {
  // A table pasted while a cell's text is being typed is meant for the page.
  const bool table = text.find('\n') != std::string_view::npos || text.find('\t') != std::string_view::npos;
  if (hands.typing() && !(table && hands.typing()->id.starts_with("cell/"))) return false;
  hands.stop_typing();
  carry_out(PasteText{std::string(text)});
  return true;
}

std::string app_copy(bool cut) {
  if (state.cell && hands.focus().starts_with("cell/")) {
    const std::string text = cell_text(state.document, *state.cell);
    if (cut) carry_out(EditCell{*state.cell, ""});
    return text;
  }
  const bool any = state.claim >= 0 && state.claim < static_cast<int>(state.checked.findings.size());
  return any ? state.checked.findings[static_cast<size_t>(state.claim)].paragraph : std::string();
}

}  // namespace rejoinder
