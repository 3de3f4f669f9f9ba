// One frame, and what outlives it: the drawing context, the size of the window, the text scale.
#pragma once

namespace rejoinder {

// Makes the canvas drawable. Returns false where the browser offers no WebGL 2.
bool open_canvas();
// The browser took the graphics card away and gave it back: every texture and buffer must be made anew.
void restore_canvas();
// Size in CSS pixels, and device pixels for each of them.
void resize_canvas(float width, float height, float pixel_ratio);
// False before the first resize_canvas: until then ImGui must be sent nothing.
bool canvas_has_size();
// Draws one frame now; a second one at once where the first asked for a font that was not cut yet. Returns
// how many input events still wait: ImGui answers a press and its release in frames of their own.
int draw_frame();
int frames_drawn();

}  // namespace rejoinder
