// The small parts that panels are made of: buttons, choosers, ticks, heads of drawers, the marks of the
// states.
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "web/panels/hands.h"
#include "web/panels/text.h"

namespace rejoinder {

enum class ButtonKind {
  Plain,   // hairline border on card ground
  Strong,  // ink ground: the one thing an overlay is for
  Quiet    // words alone until it is pointed at
};

// Size of a button with that label.
ImVec2 button_size(std::string_view label, ButtonKind kind = ButtonKind::Plain, Type type = Type::Note);
// Draws a button at `at` and returns whether it was pressed. `able` false: drawn faint, cannot be pressed.
bool show_button(Hands& hands, const std::string& id, std::string_view label, const ImVec2& at,
                 ButtonKind kind = ButtonKind::Plain, bool able = true, Type type = Type::Note);

// A word that opens a menu: the chosen item with a small arrow, underlined as a blank in a printed form.
// `items[i]` of
// "-" is a rule. Returns the item picked, else -1. `at` is the upper left, in a line of the style's leading.
ImVec2 chooser_size(std::string_view shown, Type type = Type::Note);
int show_chooser(Hands& hands, const std::string& id, std::string_view shown,
                 const std::vector<std::string>& items, int chosen, const ImVec2& at, Type type = Type::Note);
// A button that opens a menu.
int show_menu_button(Hands& hands, const std::string& id, std::string_view label,
                     const std::vector<std::string>& items, int chosen, const ImVec2& at);

// A box to tick with its label. Returns whether it was pressed.
ImVec2 tick_size(std::string_view label, Type type = Type::Note);
bool show_tick(Hands& hands, const std::string& id, std::string_view label, bool ticked, const ImVec2& at,
               Type type = Type::Note);

// The mark of a state in its ring, `diameter` wide, centred at `centre`.
void draw_mark(const char* mark, ImU32 colour, const ImVec2& centre, float diameter);

// The menu that is open, if one is, over everything else. To be called after all panels and overlays.
void show_menu(Hands& hands);

// A small text under the pointer, beside `low`..`high`, kept inside the window.
void show_hint(std::string_view text, const ImVec2& low, const ImVec2& high);

// A pane: a scrolling window with its own ground. Everything drawn between begin and end is clipped to it.
void begin_pane(const char* id, const ImVec2& low, const ImVec2& high, ImU32 ground);
void end_pane();
// Page Up and Page Down move the pane of `group` while the focus is in it.
void scroll_by_pages(Hands& hands, Group group);

// A pen that goes down a column of the page.
struct Pen {
  float x = 0, y = 0, width = 0;

  float right() const { return x + width; }
  ImVec2 at() const { return {x, y}; }
  void skip(float design_pixels) { y += px(design_pixels); }
  // Draws text over the pen's width and moves below it.
  void write(Type type, ImU32 colour, std::string_view text);
  void rule(ImU32 colour);
};
// Tells the pane how far down its content goes, so that it can scroll there.
void close_column(const Pen& pen, float room_below);

}  // namespace rejoinder
