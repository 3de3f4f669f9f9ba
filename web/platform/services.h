// What the page offers to the app (app.h): everything that only a browser can do.
//
// Clipboard, picker, downloads and new windows work while the reader's click or key is being answered; frames
// drawn by a click run inside it, so calling these from app_draw is right.
#pragma once

#include <string>
#include <string_view>

namespace rejoinder {

// ---- clipboard, files, windows
void copy_to_clipboard(std::string_view text);
// Puts the page's own address on the clipboard, with `text` deflated into its fragment. Whoever opens that
// address with the page at the same place gets `text` as StartInfo::linked. Nothing travels but what the
// reader sends.
void copy_link(std::string_view text);
// Saves text as a file. mime: "application/toml", "text/plain", "text/html", "image/svg+xml" ...
void offer_download(std::string_view name, std::string_view mime, std::string_view text);
// Saves an SVG picture as PNG, `scale` device pixels for each of its own.
void offer_png(std::string_view name, std::string_view svg, float scale);
// Lets the reader choose a file; app_open_file() follows.
void pick_file();
// Opens a whole HTML document in a new tab, for printing or saving. The page's policy holds there too: no
// scripts, no requests.
void open_report(std::string_view html);
// Prints the findings as text.
void print_page();

// ---- text beside the drawing
void set_title(std::string_view text);
// One sentence for a screen reader, said when it has finished speaking.
void announce(std::string_view text);
// Shows or hides the findings as text over the right of the page.
void show_companion(bool shown);
bool companion_is_shown();

// ---- storage
// The app's state changed: app_store() is called and its text written a moment after the last such call.
void keep_soon();
// Local time of the last completed write, "14:02"; empty before the first.
std::string kept_at();
// False once the browser refused to keep the text (storage shut off or full).
bool keeping_works();
// Leaves the review shown where it is kept and opens another kept one, or an empty page with slot "": reloads
// the page.
void open_kept(std::string_view slot);
void forget_kept(std::string_view slot);
// Small choices that outlive reviews: theme, text scale. Names of letters only.
void remember(std::string_view name, std::string_view value);
std::string remembered(std::string_view name);

// ---- looks and time
bool prefers_dark();
// Tells the text region and the browser's own parts which theme the app draws in.
void set_page_theme(bool dark);
// Text size, 0.8 to 2; fonts are cut anew before the next frame. Layout is the app's business.
void set_text_scale(float scale);
float text_scale();
// Draws at least `count` more frames: 1 in each frame while work remains, more for an animation.
void request_frames(int count);
// Seconds since the page began.
double now();
// "2026-03-04 14:02"
std::string local_time();

// Licence texts of everything inside the page.
std::string_view licences();

}  // namespace rejoinder
