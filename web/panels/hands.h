// What the reader's hands are doing: where the focus stands, what is pressed, which text is being typed.
//
// The page keeps its own focus rather than ImGui's, so that one order of stops runs through all panes, every
// stop is scrolled into sight, and the cells of the table can move as cells of a table do. A stop is anything
// that can be focused; it has the name that the tests know it by: "button/save", "claim/2",
// "cell/0/fare/coef".
#pragma once

#include <array>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "imgui.h"
#include "web/panels/edit_buffer.h"

struct ImGuiWindow;

namespace rejoinder {

struct Press {
  bool hovered = false;
  bool held = false;     // the pointer is down on it
  bool pressed = false;  // clicked, or Enter or Space while focused
  bool twice = false;    // by a double click
  bool focused = false;
  bool ring = false;  // focused, and the focus is to be shown: the keyboard brought it here
};

// What a stop belongs to: F4 moves from group to group, an overlay keeps the focus inside.
enum class Group { Top, Paper, Claims, Allows, Overlay, Menu };

class Hands {
 public:
  // Once a frame, before the first panel: Tab and F4 move the focus.
  void begin();
  // Once a frame, after the last panel.
  void end();

  // The group of the stops that follow.
  void enter(Group group) { group_ = group; }
  Group group() const { return group_; }

  // A rectangle of the current window that can be pressed and focused. `kind` as for mark(): "button",
  // "cell", ... `answers_keys` false: Enter and Space are left to the caller.
  Press press(std::string_view id, const char* kind, const ImVec2& low, const ImVec2& high,
              bool answers_keys = true);
  // The same for one the keyboard never stops at: dividers, axes.
  Press drag(std::string_view id, const char* kind, const ImVec2& low, const ImVec2& high);

  const std::string& focus() const { return focus_; }
  bool on(std::string_view id) const { return focus_ == id; }
  // Whether the focus stood in that group when the frame began.
  bool focused_in(Group group) const;
  // From the next frame on.
  void give_focus(std::string id, bool by_keyboard = true);
  // True in the first frame in which `id` has the focus.
  bool just_came(std::string_view id) const { return came_ && focus_ == id; }

  // Whether `key` was pressed and nobody before took it. Whoever asks first and gets true has it.
  bool key(ImGuiKey key, bool repeat = true);
  // Looks without taking.
  bool sees(ImGuiKey key) const;
  bool command() const;  // Ctrl, or Cmd on a Mac
  bool shift() const;
  // Characters typed in this frame, as UTF-8, control characters left out; empty once taken.
  std::string take_typed();
  std::string typed() const;

  // ---- the field being typed in
  struct Typing {
    std::string id;
    EditBuffer buffer;
    std::string at_start;  // what Escape brings back
    std::string outside;   // the value as last seen in the review
    float scroll = 0;      // of a field of one line
    float goal_x = -1;     // where Up and Down want the caret
    bool dragging = false;
  };
  std::optional<Typing>& typing() { return typing_; }
  bool types_in(std::string_view id) const { return typing_ && typing_->id == id; }
  void start_typing(std::string_view id, const std::string& value, EditBuffer buffer);
  void stop_typing() { typing_.reset(); }

  // ---- an open menu
  struct Menu {
    std::string owner;
    ImVec2 low, high;                // of what it hangs from
    std::vector<std::string> items;  // an item of "-" is a rule
    int chosen = -1;
    int at = 0;  // under the keyboard
    bool fresh = true;
  };
  std::optional<Menu>& menu() { return menu_; }
  void open_menu(Menu menu);
  // The item picked from the menu of `owner`, once.
  std::optional<int> picked(std::string_view owner);
  void pick(int item);
  void close_menu();

  // ---- small things that a frame leaves for the next
  struct View {
    int changes = 0;            // counts what was carried out, so that panels know when to look anew
    int editing_claim = -1;     // the card whose particulars are open
    bool tabbed = false;        // one pane at a time, its name on its tab
    bool more_figures = false;  // the table's foot shows all it can hold
    int matrix_column = -1;     // the column whose covariances are shown; -1: the chosen claim's
    int label_column = -1;      // the column whose label is being changed
    int claim_in_sight = -2;    // the chosen card that was last scrolled into sight
    std::string new_term;       // the name being typed for a term to add
    int tick_form = 0;          // 0 all zero, 1 all equal, 2 adds up to
    double shift = -1;          // standard errors every coefficient is let move; negative: where it turns
    int shift_claim = -1;       // of this claim
    int ticked_claim = -1;      // the card whose list of terms is open
    std::array<std::string, 5> five;  // coefficient, s.e., coefficient, s.e., n, as typed
    bool five_equal = false;          // the claim on them: equal, else both zero
  };
  View view;

 private:
  struct Stop {
    std::string id;
    Group group;
    float y;
  };
  void move_focus(int by);
  void move_group(int by);
  std::vector<const Stop*> reachable() const;

  std::vector<Stop> stops_, last_;  // of this frame and of the one before
  std::vector<int> taken_;
  Group group_ = Group::Top;
  std::string focus_, next_focus_;
  bool has_next_ = false, next_by_keyboard_ = false;
  bool by_keyboard_ = false, came_ = false, reveal_ = false;
  bool typed_taken_ = false;
  std::optional<Typing> typing_;
  std::optional<Menu> menu_;
  std::string picked_owner_;
  int picked_item_ = -1;
};

// The ring around what has the keyboard.
void draw_ring(const ImVec2& low, const ImVec2& high, float rounding);

}  // namespace rejoinder
