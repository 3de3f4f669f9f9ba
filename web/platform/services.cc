#include "web/platform/services.h"

#include <emscripten.h>

#include <cstdlib>

#include "web/platform/keeping.h"

// Each call goes to a function of the same meaning on the page's object `host` (page.js and the files after
// it). Texts pass as address and length in UTF-8; texts returned are allocated by the page and freed here.
// clang-format off
EM_JS(void, page_copy, (const char* text, int size), { Module['host']['copy'](UTF8ToString(text, size)); })
EM_JS(void, page_copy_link, (const char* text, int size), { Module['host']['copyLink'](UTF8ToString(text, size)); })
EM_JS(void, page_download, (const char* name, int name_size, const char* mime, int mime_size, const char* text, int size), {
  Module['host']['download'](UTF8ToString(name, name_size), UTF8ToString(mime, mime_size), UTF8ToString(text, size));
})
EM_JS(void, page_download_png, (const char* name, int name_size, const char* svg, int svg_size, float scale), {
  Module['host']['downloadPng'](UTF8ToString(name, name_size), UTF8ToString(svg, svg_size), scale);
})
EM_JS(void, page_pick_file, (), { Module['host']['pickFile'](); })
EM_JS(void, page_open_report, (const char* html, int size), { Module['host']['openReport'](UTF8ToString(html, size)); })
EM_JS(void, page_print, (), { Module['host']['print'](); })
EM_JS(void, page_set_title, (const char* text, int size), { Module['host']['setTitle'](UTF8ToString(text, size)); })
EM_JS(void, page_announce, (const char* text, int size), { Module['host']['announce'](UTF8ToString(text, size)); })
EM_JS(void, page_show_companion, (int shown), { Module['host']['showCompanion'](!!shown); })
EM_JS(int, page_companion_is_shown, (), { return Module['host']['companionIsShown']() ? 1 : 0; })
EM_JS(void, page_keep_soon, (), { Module['host']['keepSoon'](); })
EM_JS(void, page_open_kept, (const char* slot, int size), { Module['host']['openKept'](UTF8ToString(slot, size)); })
EM_JS(void, page_forget_kept, (const char* slot, int size), { Module['host']['forgetKept'](UTF8ToString(slot, size)); })
EM_JS(void, page_remember, (const char* name, int name_size, const char* value, int size), {
  Module['host']['remember'](UTF8ToString(name, name_size), UTF8ToString(value, size));
})
EM_JS(char*, page_remembered, (const char* name, int size), {
  return Module['host']['allocate'](Module['host']['remembered'](UTF8ToString(name, size)));
})
EM_JS(int, page_prefers_dark, (), { return Module['host']['prefersDark']() ? 1 : 0; })
EM_JS(void, page_set_theme, (int dark), { Module['host']['setTheme'](!!dark); })
EM_JS(void, page_request_frames, (int count), { Module['host']['requestFrames'](count); })
EM_JS(char*, page_local_time, (), { return Module['host']['allocate'](Module['host']['localTime']()); })
// clang-format on

namespace rejoinder {
namespace {

int length(std::string_view text) { return static_cast<int>(text.size()); }

std::string take(char* from_page) {
  std::string text = from_page ? from_page : "";
  std::free(from_page);
  return text;
}

std::string time_of_last_write;
bool writes_arrive = true;

}  // namespace

void copy_to_clipboard(std::string_view text) { page_copy(text.data(), length(text)); }

void copy_link(std::string_view text) { page_copy_link(text.data(), length(text)); }

void offer_download(std::string_view name, std::string_view mime, std::string_view text) {
  page_download(name.data(), length(name), mime.data(), length(mime), text.data(), length(text));
}

void offer_png(std::string_view name, std::string_view svg, float scale) {
  page_download_png(name.data(), length(name), svg.data(), length(svg), scale);
}

void pick_file() { page_pick_file(); }

void open_report(std::string_view html) { page_open_report(html.data(), length(html)); }

void print_page() { page_print(); }

void set_title(std::string_view text) { page_set_title(text.data(), length(text)); }

void announce(std::string_view text) { page_announce(text.data(), length(text)); }

void show_companion(bool shown) { page_show_companion(shown); }

bool companion_is_shown() { return page_companion_is_shown() != 0; }

void keep_soon() { page_keep_soon(); }

std::string kept_at() { return time_of_last_write; }

bool keeping_works() { return writes_arrive; }

void note_write(std::string_view time) {
  writes_arrive = !time.empty();
  if (writes_arrive) time_of_last_write = time;
}

void open_kept(std::string_view slot) { page_open_kept(slot.data(), length(slot)); }

void forget_kept(std::string_view slot) { page_forget_kept(slot.data(), length(slot)); }

void remember(std::string_view name, std::string_view value) {
  page_remember(name.data(), length(name), value.data(), length(value));
}

std::string remembered(std::string_view name) { return take(page_remembered(name.data(), length(name))); }

bool prefers_dark() { return page_prefers_dark() != 0; }

void set_page_theme(bool dark) { page_set_theme(dark); }

void request_frames(int count) { page_request_frames(count); }

double now() { return emscripten_get_now() / 1000; }

std::string local_time() { return take(page_local_time()); }

}  // namespace rejoinder
