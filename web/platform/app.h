// What the page asks of the app it carries: the seam between web/platform and the workbench.
//
// The platform owns the browser: canvas, keys, clipboard, files, storage. It calls the functions below, which
// the app implements (web/app.cc), and offers those of services.h in return. Everything runs on one thread,
// and no frame is drawn unless something asks for one: input, a change of size or theme, or request_frames().
#pragma once

#include <string>
#include <string_view>
#include <vector>

namespace rejoinder {

// Another review kept on this machine, from an earlier visit or another window.
struct KeptReview {
  std::string slot;     // names it for open_kept() and forget_kept()
  std::string kept_at;  // local date and time of its last write, "2026-03-04 14:02"
  std::string text;     // as app_store() gave it
};

struct StartInfo {
  std::string kept;                // what app_store() gave last time; empty on a first visit
  std::string linked;              // a review carried by the page's address (see copy_link); usually empty
  std::vector<KeptReview> others;  // newest first
};

struct FrameInfo {
  float width = 0, height = 0;  // of the window, in CSS pixels: ImGui's unit too
  float pixel_ratio = 1;        // device pixels for each of them
  bool prefers_dark = false;    // what the reader's system asks for; the app decides
  double seconds = 0;           // since the page began
};

// Called once, after ImGui's context exists and before the first frame. A linked review comes with an empty
// `kept`, so that it displaces nothing. Returns false where `kept` cannot be read: the platform then sets it
// aside under another name and never overwrites it.
bool app_start(const StartInfo& info);

// Draws one frame, between ImGui::NewFrame and ImGui::Render.
void app_draw(const FrameInfo& frame);

// The text to keep. Called some time after keep_soon(), and when the page is left.
std::string app_store();

// The findings as HTML for the page's text region, which screen readers, find-in-page, printing and copying
// read. Asked for after a frame in which app_companion_changed() is true. Text must be escaped; elements
// other than headings, paragraphs, lists, tables, sections, line breaks and emphasis are dropped, attributes
// too save id, class, scope, colspan, rowspan and lang.
bool app_companion_changed();
std::string app_companion_html();

// A file was opened or dropped: its name and its text, line ends as "\n".
void app_open_file(std::string_view name, std::string_view text);

// A paste, line ends as "\n". Returns true if the app takes it; else it goes to ImGui's active text field. So
// an app returns false while ImGui::GetIO().WantTextInput, save where it wants to take a table pasted into a
// small field.
bool app_paste(std::string_view text);

// The text for a copy (or cut) while no text field is active; empty where there is none.
std::string app_copy(bool cut);

}  // namespace rejoinder
