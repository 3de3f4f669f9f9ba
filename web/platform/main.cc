// The page's program: opens the canvas and leaves. Everything after that is done by events (input.cc).
#include <emscripten.h>

#include "web/platform/frame.h"

static bool canvas_is_drawable = false;

extern "C" EMSCRIPTEN_KEEPALIVE int canvas_is_open() { return canvas_is_drawable; }

int main() {
  canvas_is_drawable = rejoinder::open_canvas();
  return 0;
}
