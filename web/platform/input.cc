// The functions that the page's scripts call: events on their way to ImGui and to the app.
//
// Texts arrive as address and length in UTF-8. Texts returned stay valid until the next call.
#include <emscripten.h>

#include <string>
#include <string_view>

#include "imgui.h"
#include "web/platform/app.h"
#include "web/platform/frame.h"
#include "web/platform/keeping.h"
#include "web/platform/keys.h"
#include "web/platform/marks.h"
#include "web/platform/services.h"

// clang-format off
EM_JS(void, page_place_caret, (float x, float y, float height), { Module['host']['placeCaret'](x, y, height); })
// clang-format on

#define CALLED_BY_PAGE extern "C" EMSCRIPTEN_KEEPALIVE

namespace rejoinder {
namespace {

enum Modifier { kCtrl = 1, kShift = 2, kAlt = 4, kSuper = 8 };

StartInfo start_info;
std::string clip_from_page, clip_for_page, answer;
bool clip_was_set = false;

const char* answer_with(std::string text) {
  answer = std::move(text);
  return answer.c_str();
}

// ImGui's own reading and writing of the clipboard. Only the events of the page may touch the real one, so a
// text set outside such an event (from a menu of a text field, say) is handed on as a service.
const char* clip_text(void*) { return clip_from_page.c_str(); }
bool inside_clip_event = false;
void set_clip_text(void*, const char* text) {
  clip_for_page = text;
  clip_was_set = true;
  if (!inside_clip_event) copy_to_clipboard(clip_for_page);
}

// Windows of input methods open where the text is being typed.
void place_caret(ImGuiViewport*, ImGuiPlatformImeData* data) {
  if (data->WantVisible) page_place_caret(data->InputPos.x, data->InputPos.y, data->InputLineHeight);
}

// Presses Ctrl (or Cmd) with a letter and lets ImGui answer at once, while the browser's event still waits.
void press_command(ImGuiKey letter) {
  ImGuiIO& io = ImGui::GetIO();
  const ImGuiKey command = io.ConfigMacOSXBehaviors ? ImGuiMod_Super : ImGuiMod_Ctrl;
  io.AddKeyEvent(command, true);
  io.AddKeyEvent(letter, true);
  draw_frame();
  io.AddKeyEvent(letter, false);
  io.AddKeyEvent(command, false);
  draw_frame();
}

}  // namespace

// ---- starting

CALLED_BY_PAGE void begin_other(const char* slot, const char* kept_at, const char* text, int size) {
  start_info.others.push_back({slot, kept_at, std::string(text, static_cast<std::size_t>(size))});
}

// Starts the app with the kept text and the linked one. Returns 0 when the kept text could not be read.
CALLED_BY_PAGE int begin(const char* kept, int kept_size, const char* linked, int linked_size, int on_mac) {
  ImGuiIO& io = ImGui::GetIO();
  io.ConfigMacOSXBehaviors = on_mac != 0;
  io.GetClipboardTextFn = clip_text;
  io.SetClipboardTextFn = set_clip_text;
  io.SetPlatformImeDataFn = place_caret;
  start_info.kept.assign(kept, static_cast<std::size_t>(kept_size));
  start_info.linked.assign(linked, static_cast<std::size_t>(linked_size));
  const bool readable = app_start(start_info);
  start_info = {};
  return readable;
}

CALLED_BY_PAGE void on_resize(float width, float height, float pixel_ratio) {
  resize_canvas(width, height, pixel_ratio);
}

CALLED_BY_PAGE void on_restore() { restore_canvas(); }

// Draws; returns how many events still wait.
CALLED_BY_PAGE int on_frame() { return draw_frame(); }

// The number of ImGui's cursor, 0 for an arrow.
CALLED_BY_PAGE int wanted_cursor() { return ImGui::GetMouseCursor(); }

// ---- pointer

CALLED_BY_PAGE void on_pointer(float x, float y, int touch) {
  ImGui::GetIO().AddMouseSourceEvent(touch ? ImGuiMouseSource_TouchScreen : ImGuiMouseSource_Mouse);
  ImGui::GetIO().AddMousePosEvent(x, y);
}

// Buttons are numbered as the DOM does: 0 left, 1 middle, 2 right.
CALLED_BY_PAGE void on_button(int button, int down) {
  const int own = button == 1   ? ImGuiMouseButton_Middle
                  : button == 2 ? ImGuiMouseButton_Right
                                : ImGuiMouseButton_Left;
  if (button >= 0 && button <= 2) ImGui::GetIO().AddMouseButtonEvent(own, down != 0);
}

CALLED_BY_PAGE void on_wheel(float x, float y) { ImGui::GetIO().AddMouseWheelEvent(x, y); }

// ---- keys

CALLED_BY_PAGE void on_modifiers(int held) {
  ImGuiIO& io = ImGui::GetIO();
  io.AddKeyEvent(ImGuiMod_Ctrl, held & kCtrl);
  io.AddKeyEvent(ImGuiMod_Shift, held & kShift);
  io.AddKeyEvent(ImGuiMod_Alt, held & kAlt);
  io.AddKeyEvent(ImGuiMod_Super, held & kSuper);
}

// Returns whether ImGui knows the key, so that the page may keep it from the browser.
CALLED_BY_PAGE int on_key(const char* name, int down) {
  const ImGuiKey key = key_named(name);
  if (key == ImGuiKey_None) return 0;
  ImGui::GetIO().AddKeyEvent(key, down != 0);
  return 1;
}

CALLED_BY_PAGE void on_text(const char* text) { ImGui::GetIO().AddInputCharactersUTF8(text); }

CALLED_BY_PAGE void on_focus(int has_it) { ImGui::GetIO().AddFocusEvent(has_it != 0); }

CALLED_BY_PAGE int text_is_wanted() { return ImGui::GetIO().WantTextInput; }

// ---- clipboard

// Whether anything took the paste.
CALLED_BY_PAGE void on_paste(const char* text, int size) {
  const std::string_view pasted(text, static_cast<std::size_t>(size));
  if (app_paste(pasted)) {
    draw_frame();
    return;
  }
  clip_from_page = pasted;
  inside_clip_event = true;
  press_command(ImGuiKey_V);
  inside_clip_event = false;
}

// The text to copy; null where nothing is chosen.
CALLED_BY_PAGE const char* on_copy(int cut) {
  if (!ImGui::GetIO().WantTextInput) {
    std::string text = app_copy(cut != 0);
    draw_frame();
    return text.empty() ? nullptr : answer_with(std::move(text));
  }
  clip_was_set = false;
  inside_clip_event = true;
  press_command(cut ? ImGuiKey_X : ImGuiKey_C);
  inside_clip_event = false;
  return clip_was_set ? clip_for_page.c_str() : nullptr;
}

// ---- files, storage, companion

CALLED_BY_PAGE void on_file(const char* name, const char* text, int size) {
  app_open_file(name, std::string_view(text, static_cast<std::size_t>(size)));
}

CALLED_BY_PAGE const char* text_to_keep() { return answer_with(app_store()); }

CALLED_BY_PAGE void on_kept(const char* time) { note_write(time); }

// The companion's HTML when it changed, else null.
CALLED_BY_PAGE const char* changed_companion() {
  return app_companion_changed() ? answer_with(app_companion_html()) : nullptr;
}

// ---- tests

CALLED_BY_PAGE void watch_marks(int on) { record_marks(on != 0); }
CALLED_BY_PAGE const char* all_marks() { return answer_with(marks_as_json()); }
CALLED_BY_PAGE int count_frames() { return frames_drawn(); }

}  // namespace rejoinder
