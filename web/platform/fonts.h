// Fonts at the sizes of the page's design, cut for the pixels of the reader's screen.
//
// Example: ImGui::PushFont(font(Face::Bold, TextSize::Large)); ... ImGui::PopFont();
#pragma once

#include "imgui.h"

namespace rejoinder {

enum class Face { Regular, Bold, Mono };
enum class TextSize {
  Small,  // an em of 12.5 CSS pixels at a text scale of 1; lines are 1.164 times as high
  Note,   // 14
  Body,   // 15; regular Body is ImGui's default font
  Large,  // 18
  Title   // 24
};

// The font of that face and size. One that no frame has used yet is answered by Body until it is cut, which
// happens before the frame is shown; so an app need not say beforehand which ones it uses.
ImFont* font(Face face, TextSize size);

// ---- for the platform
// Cuts every font wanted so far for `pixel_ratio` and `text_scale`, and hands the picture of all glyphs to
// the graphics card. Does nothing when nothing changed. Returns whether it did anything.
bool prepare_fonts(float pixel_ratio, float text_scale);
// The graphics card has forgotten everything: cut anew at the next call.
void forget_fonts();
// Whether font() was asked for one that is still to be cut.
bool fonts_are_missing();

}  // namespace rejoinder
