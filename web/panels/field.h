// A text field of our own: one line or several, set in type like everything else on the page.
//
// Example: if (auto text = show_field(hands, "review/title", title, low, high, style)) intent =
// EditReview{...};
#pragma once

#include <optional>
#include <string>

#include "web/panels/hands.h"
#include "web/panels/text.h"

namespace rejoinder {

enum class Frame {
  Box,   // a bordered box
  Line,  // a hairline below, as in a printed form
  Bare   // nothing until it is pointed at or typed in: text on the page that can be changed
};

struct FieldStyle {
  Type type = Type::Body;
  Frame frame = Frame::Box;
  bool many_lines = false;
  bool enter_breaks = false;    // Enter begins a new line; otherwise it ends the typing
  const char* hint = "";        // shown while the field is empty
  std::optional<size_t> point;  // the byte that a message is about, underlined
  ImU32 colour = 0;             // of the text; 0: ink
};

// Room a field's text has around it, on each side.
ImVec2 field_room(const FieldStyle& style);
// How high a field of that width must be to show `text` whole.
float field_height(const FieldStyle& style, const std::string& text, float width);

// Draws the field in [low, high] and types in it while it has the focus. Returns the new text in every frame
// in which the reader changed it. `value` is what the review holds; a value that changes from outside
// replaces what is typed.
std::optional<std::string> show_field(Hands& hands, const std::string& id, const std::string& value,
                                      const ImVec2& low, const ImVec2& high, const FieldStyle& style);

// The keys of a field being typed in, for whoever draws the text in its own way (the cells of the table).
// Enter, Tab and the arrows that would leave one line are left to the caller. Returns whether the text
// changed.
bool type_with_keys(Hands& hands, bool many_lines, bool enter_breaks);

}  // namespace rejoinder
