#include "web/panels/top_line.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <functional>
#include <vector>

#include "core/number/number_text.h"
#include "imgui_internal.h"
#include "web/model/document_view.h"
#include "web/panels/field.h"
#include "web/panels/parts.h"
#include "web/platform/marks.h"
#include "web/platform/services.h"

namespace rejoinder {
namespace {

constexpr double kScales[] = {0.8, 0.9, 1.0, 1.1, 1.25, 1.5, 1.75, 2.0};
const std::vector<std::string> kScaleWords = {"80 %",  "90 %",  "100 %", "110 %",
                                              "125 %", "150 %", "175 %", "200 %"};
const char* const kLevels[] = {"0.10", "0.05", "0.01", "0.001"};
const std::vector<std::string> kLevelWords = {"10 %", "5 %", "1 %", "0.1 %"};

int scale_place(double scale) {
  int best = 2;
  for (int i = 0; i < 8; ++i) {
    if (std::fabs(kScales[i] - scale) < std::fabs(kScales[best] - scale)) best = i;
  }
  return best;
}

int level_place(double level) {
  for (int i = 0; i < 4; ++i) {
    if (std::fabs(std::atof(kLevels[i]) - level) < 1e-12) return i;
  }
  return -1;
}

constexpr const char* kLinkButton = "button/link";

// One thing that can be done from here: a button of its own where it fits, else a line of the menu "More".
struct Action {
  const char* id;
  std::string label;
  Intent intent;                     // what it asks for
  std::vector<std::string> choices;  // it opens a menu instead
  int chosen = -1;
  bool able = true;
};

Intent picked_level(int item) { return EditReview{"level", kLevels[item]}; }
Intent picked_scale(int item) { return SetTextScale{kScales[item]}; }

std::vector<Action> all_actions(const AppState& state, const std::vector<OtherReview>& others) {
  const int scale = scale_place(state.text_scale);
  std::vector<Action> actions;
  const auto add = [&](const char* id, std::string label, Intent intent, bool able = true) {
    actions.push_back({id, std::move(label), std::move(intent), {}, -1, able});
  };
  add("button/paste", "Paste a table", ShowOverlay{Overlay::PasteBox});
  if (others.empty()) {
    add("button/open", "Open", OpenFile{});
  } else {
    std::vector<std::string> choices = {"A file", "-"};
    for (const OtherReview& other : others) choices.push_back(other.name);
    actions.push_back({"button/open", "Open", {}, choices, -1, true});
  }
  add("button/save", "Save", SaveReview{});
  add("button/undo", "Undo", Undo{}, !state.history.past.empty());
  add("button/redo", "Redo", Redo{}, !state.history.future.empty());
  actions.push_back({"button/level",
                     "Level " + level_text(state.review.level),
                     {},
                     kLevelWords,
                     level_place(state.review.level),
                     true});
  actions.push_back(
      {"button/text-size", "Text " + kScaleWords[static_cast<size_t>(scale)], {}, kScaleWords, scale, true});
  const bool dark = state.theme == Theme::Dark;
  add("button/theme", dark ? "Light" : "Dark", SetTheme{dark ? Theme::Light : Theme::Dark});
  add("button/keys", "Keys", ShowOverlay{Overlay::Keys});
  add("button/about", "About", ShowOverlay{Overlay::About});
  // These are rarer and live in the menu however wide the window is.
  add("button/five", "Type five figures", ShowOverlay{Overlay::FiveFigures});
  add("button/text", "The review as text", ShowOverlay{Overlay::ReviewText});
  add("button/new", "Begin an empty review", NewReview{});
  add(kLinkButton, "Copy a link to this review", {});
  add("button/report", "Whole report in a tab", OpenReport{});
  add("button/save-report", "Save the report", SaveReport{});
  add("button/print", "Print the findings", PrintPage{});
  return actions;
}
constexpr size_t kAlwaysInMenu = 7;  // of those, the last

void show_status(const AppState& state, float left, float right, float y) {
  const Palette& colours = palette();
  const std::string kept = kept_words();
  // The newest notice first, then what always holds; whatever has no room is left out.
  std::string line;
  for (const std::string& part : {state.notice, kept, std::string(kNothingSent)}) {
    if (part.empty()) continue;
    const std::string longer = line.empty() ? part : line + "  ·  " + part;
    if (left + text_width(Type::Note, longer) > right) continue;
    line = longer;
  }
  if (line.empty() && right - left > px(120)) {
    draw_cut(Type::Note, ImVec2(left, y), colours.quiet, state.notice.empty() ? kept : state.notice,
             right - left);
    return;
  }
  draw_line(Type::Note, ImVec2(left, y), colours.quiet, line);
  mark("region/status", "status", ImVec2(left, y),
       ImVec2(left + text_width(Type::Note, line), y + setting(Type::Note).leading));
}

}  // namespace

std::string kept_words() {
  if (!keeping_works()) return "this browser keeps nothing: save the review as a file";
  return kept_at().empty() ? "not kept yet" : "kept on this machine, " + kept_at();
}

float top_line_height() { return px(46); }
float tabs_height() { return px(40); }

Intent show_top_line(const AppState& state, Hands& hands, const std::vector<OtherReview>& others,
                     float width) {
  Intent intent;
  hands.enter(Group::Top);
  const Palette& colours = palette();
  const float height = top_line_height(), side = px(18), gap = px(6);
  ImDrawList* const list = ImGui::GetWindowDrawList();
  list->AddRectFilled(ImVec2(0, 0), ImVec2(width, height), colours.paper);
  draw_rule(ImVec2(0, height - hair()), width, hair(), colours.hairline);

  // ---- name and title
  const float body = (height - setting(Type::Strong).leading) / 2;
  float x = side;
  draw_line(Type::Strong, ImVec2(x, body), colours.ink, "Rejoinder");
  x += text_width(Type::Strong, "Rejoinder") + px(14);
  FieldStyle style;
  style.frame = Frame::Bare;
  style.hint = "title of the review";
  const std::string title = review_text(state.document, "title");
  const std::string measured = hands.types_in("review/title") ? hands.typing()->buffer.text()
                               : title.empty()                ? std::string(style.hint)
                                                              : title;
  const float widest = std::clamp(width * 0.24f, px(150), px(420));
  const float title_width =
      std::min(text_width(Type::Body, measured) + 2 * field_room(style).x + px(4), widest);
  const float field_top = (height - field_height(style, "", 0)) / 2;
  if (const auto typed = show_field(hands, "review/title", title, ImVec2(x, field_top),
                                    ImVec2(x + title_width, field_top + field_height(style, "", 0)), style)) {
    intent = EditReview{"title", *typed};
  }
  x += title_width + px(12);

  // ---- actions, as many as fit
  const std::vector<Action> actions = all_actions(state, others);
  const std::string more = "More";
  const float more_width = button_size(more).x;
  const float status_room =
      width > px(1150) ? text_width(Type::Note, "kept on this machine, 00:00  ·  nothing is sent") + px(20)
                       : 0;
  size_t shown = 0;
  float taken = side + more_width;
  while (shown < actions.size() - kAlwaysInMenu) {
    const float next = button_size(actions[shown].label).x + gap;
    if (x + status_room + taken + next > width) break;
    taken += next;
    ++shown;
  }
  const float buttons_left = width - taken;
  float at = buttons_left;
  const float top = (height - button_size(more).y) / 2;
  const auto answer = [&](size_t i, int item) {
    const std::string_view id = actions[i].id;
    if (id == kLinkButton) {
      copy_link(write_document(state.document));
    } else if (actions[i].choices.empty()) {
      intent = actions[i].intent;
    } else if (id == "button/open") {
      if (item == 0) intent = OpenFile{};
      if (item >= 2 && item - 2 < static_cast<int>(others.size()))
        open_kept(others[static_cast<size_t>(item - 2)].slot);
    } else {
      intent = id == "button/level" ? picked_level(item) : picked_scale(item);
    }
  };
  for (size_t i = 0; i < shown; ++i) {
    const Action& action = actions[i];
    if (action.choices.empty()) {
      if (show_button(hands, action.id, action.label, ImVec2(at, top), ButtonKind::Plain, action.able))
        intent = action.intent;
    } else {
      const int picked =
          show_menu_button(hands, action.id, action.label, action.choices, action.chosen, ImVec2(at, top));
      if (picked >= 0) answer(i, picked);
    }
    at += button_size(action.label).x + gap;
  }
  std::vector<std::string> rest;
  for (size_t i = shown; i < actions.size(); ++i) {
    if (i == actions.size() - kAlwaysInMenu && i > shown) rest.push_back("-");
    rest.push_back(actions[i].label);
  }
  const int picked = show_menu_button(hands, "button/more", more, rest, -1, ImVec2(at, top));
  if (picked >= 0) {
    // Skips the rule where there is one.
    const size_t in_menu = actions.size() - kAlwaysInMenu - shown;
    const size_t item = static_cast<size_t>(picked);
    const size_t i = shown + (in_menu > 0 && item > in_menu ? item - 1 : item);
    if (i < actions.size()) {
      if (actions[i].choices.empty()) {
        if (actions[i].able) answer(i, 0);
      } else {
        Hands::Menu menu;
        menu.owner = actions[i].id;
        menu.low = ImVec2(at, top);
        menu.high = ImVec2(at + more_width, top + button_size(more).y);
        menu.items = actions[i].choices;
        menu.chosen = actions[i].chosen;
        hands.open_menu(menu);
      }
    }
  }
  for (size_t i = shown; i < actions.size(); ++i) {
    if (actions[i].choices.empty()) continue;
    if (const std::optional<int> item = hands.picked(actions[i].id)) answer(i, *item);
  }

  show_status(state, x, buttons_left - px(14), (height - setting(Type::Note).leading) / 2);
  return intent;
}

Intent show_tabs(const AppState& state, Hands& hands, const ImVec2& at, float width) {
  Intent intent;
  const Palette& colours = palette();
  ImDrawList* const list = ImGui::GetWindowDrawList();
  const float height = tabs_height();
  list->AddRectFilled(at, ImVec2(at.x + width, at.y + height), colours.paper);
  draw_rule(ImVec2(at.x, at.y + height - hair()), width, hair(), colours.hairline);
  const struct {
    Pane pane;
    const char* id;
    const char* label;
  } tabs[] = {{Pane::Paper, "tab/paper", "From the paper"},
              {Pane::Claims, "tab/claims", "Claims"},
              {Pane::Allows, "tab/allows", "What the print allows"}};
  float x = at.x + px(18);
  for (const auto& tab : tabs) {
    const bool here = state.pane == tab.pane;
    const Type type = here ? Type::NoteStrong : Type::Note;
    const float wide = text_width(type, tab.label);
    const ImVec2 low(x - px(10), at.y + px(4)), high(x + wide + px(10), at.y + height - px(4));
    const Press press = hands.press(tab.id, here ? "tab on" : "tab", low, high);
    if (press.hovered || press.held)
      list->AddRectFilled(low, high, press.held ? colours.held : colours.hover, px(4));
    if (press.ring) draw_ring(low, high, px(4));
    draw_line(type, ImVec2(x, at.y + (height - setting(type).leading) / 2),
              here ? colours.ink : colours.quiet, tab.label);
    if (here) draw_rule(ImVec2(x, at.y + height - px(2.5f)), wide, px(2.5f), colours.ink);
    if (press.pressed) intent = ShowPane{tab.pane};
    const int step = press.focused && !hands.typing() && !hands.menu() ? (hands.key(ImGuiKey_RightArrow)  ? 1
                                                                          : hands.key(ImGuiKey_LeftArrow) ? -1
                                                                                                          : 0)
                                                                       : 0;
    if (step != 0) {
      const int to = (static_cast<int>(tab.pane) + step + 3) % 3;
      intent = ShowPane{tabs[to].pane};
      hands.give_focus(tabs[to].id);
    }
    x += wide + px(28);
  }
  return intent;
}

}  // namespace rejoinder
