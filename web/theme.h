// The look of the page: colours, type, spacing. Every measure on the page comes from here.
//
// Lengths are design pixels: CSS pixels at a text scale of 1. px() turns them into pixels of the window,
// grown by the text scale and set on the device's own grid, so that a hairline is never smeared over two
// rows.
#pragma once

#include "core/judge/finding.h"
#include "imgui.h"
#include "web/model/state.h"

namespace rejoinder {

struct Palette {
  ImU32 paper;      // ground of the outer panes
  ImU32 desk;       // ground of the middle pane and behind everything
  ImU32 card;       // whatever lies on the ground
  ImU32 ink;        // text, first strength
  ImU32 soft;       // second: sentences that explain
  ImU32 quiet;      // third: labels, hints; still 4.5:1 on every ground
  ImU32 rule;       // the outer rules of a table
  ImU32 thin_rule;  // its inner rules, and the axis of a picture
  ImU32 hairline;   // between panes and drawers
  ImU32 edge;       // of a card
  ImU32 control;    // of a button or a field
  ImU32 hover;      // laid over what the pointer is on
  ImU32 held;       // and over what is pressed
  ImU32 inset;      // ground of working and other set-apart text
  ImU32 rests;      // ground of the printed cells that the chosen finding rests on
  ImU32 rests_edge;
  ImU32 selection;                           // of text in a field
  ImU32 shade;                               // over the page below an overlay
  ImU32 agrees, conflicts, undecided, none;  // never alone: mark and words always stand beside them
};

const Palette& palette();

// The accent of a state or of an audit line.
ImU32 accent(State state);
ImU32 accent(Match match);
// The same colour, `share` of its strength.
ImU32 faded(ImU32 colour, float share);

// Type: five sizes, two weights, one face of equal width.
enum class Type {
  Small,  // labels inside pictures, units
  SmallStrong,
  Note,        // labels, second figures, buttons
  NoteStrong,  // heads of panes
  Body,
  Strong,  // heads of drawers
  Large,   // heads of overlays
  Title,   // the answer
  Mono     // restrictions and working
};

// The face of a style, the size it is drawn at and the distance between its lines, in CSS pixels.
struct TypeSetting {
  ImFont* font;
  float size, leading;
};
TypeSetting setting(Type type);

// Design pixels to CSS pixels on the device's grid.
float px(float design_pixels);
// A coordinate moved to the device's grid.
float snap(float coordinate);
// A hairline: about a CSS pixel, in whole device pixels.
float hair();

// To be called at the start of a frame, before anything is measured.
void set_theme(Theme theme, float text_scale, float pixel_ratio);

}  // namespace rejoinder
