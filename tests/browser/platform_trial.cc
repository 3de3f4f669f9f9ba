// An app of a few widgets, by which the browser tests try the platform (web/platform) on its own: what
// reaches it is shown in the text region, where the tests read it.
#include "imgui.h"
#include "web/platform/app.h"
#include "web/platform/fonts.h"
#include "web/platform/marks.h"
#include "web/platform/services.h"

#include <cstdio>
#include <string>

namespace rejoinder {
namespace {

char long_text[20000];
char short_text[200];
std::string pasted, file_name, companion;
int undo_keys = 0, moves = 0, slow_frames = 0;
std::size_t other_reviews = 0;
bool unsafe = false;

void set_long_text(std::string_view text) {
  std::snprintf(long_text, sizeof long_text, "%.*s", static_cast<int>(text.size()), text.data());
}

std::string escaped(std::string_view text) {
  std::string all;
  for (const char c : text) {
    if (c == '<')
      all += "&lt;";
    else if (c == '&')
      all += "&amp;";
    else
      all += c;
  }
  return all;
}

std::string paragraph(const char* id, std::string_view text) {
  return std::string("<p id=\"") + id + "\">" + escaped(text) + "</p>";
}

bool button(const char* label, const char* id) {
  const bool pressed = ImGui::Button(label);
  mark(id, "button");
  return pressed;
}

void show_type() {
  for (int face = 0; face < 3; ++face) {
    for (int size = 0; size < 5; ++size) {
      ImGui::PushFont(font(static_cast<Face>(face), static_cast<TextSize>(size)));
      ImGui::TextUnformatted("H₀: β₁ = β₂ = 0, χ² R² ≤ ≥ − × ≈ ≠ → ∞ √ ∑ ▾ ▸ – — “ ” … · † ‡ ✓ ŵ ł é");
      ImGui::PopFont();
    }
  }
}

}  // namespace

bool app_start(const StartInfo& info) {
  other_reviews = info.others.size();
  if (info.kept.starts_with("unreadable")) {
    set_long_text("fresh");
    return false;
  }
  set_long_text(!info.linked.empty() ? info.linked : info.kept);
  return true;
}

std::string app_store() { return long_text; }

void app_open_file(std::string_view name, std::string_view text) {
  file_name = name;
  set_long_text(text);
  keep_soon();
}

bool app_paste(std::string_view text) {
  if (ImGui::GetIO().WantTextInput) return false;
  pasted = text;
  return true;
}

std::string app_copy(bool cut) { return cut ? "cut from the app" : "copied from the app"; }

bool app_companion_changed() {
  std::string html = "<h2>Trial</h2>" + paragraph("long", long_text) + paragraph("short", short_text) +
                     paragraph("pasted", pasted) + paragraph("file", file_name) +
                     paragraph("kept", kept_at()) + paragraph("others", std::to_string(other_reviews)) +
                     paragraph("undo", std::to_string(undo_keys)) + paragraph("moves", std::to_string(moves));
  // What no text of ours should ever come to: the page must drop all but its words.
  if (unsafe) {
    html +=
        "<p id=\"unsafe\" onclick=\"document.title='run'\" style=\"color:red\">words<img src=\"x\" "
        "onerror=\"document.title='run'\"><script>document.title='run'</script><a href=\"x\">kept</a></p>";
  }
  if (html == companion) return false;
  companion = std::move(html);
  return true;
}

std::string app_companion_html() { return companion; }

void app_draw(const FrameInfo& frame) {
  if (ImGui::IsKeyChordPressed(ImGuiMod_Ctrl | ImGuiKey_Z) && !ImGui::GetIO().WantTextInput) ++undo_keys;
  if (ImGui::IsKeyPressed(ImGuiKey_RightArrow)) ++moves;
  if (slow_frames > 0) {
    --slow_frames;
    request_frames(1);
  }

  ImGui::SetNextWindowPos({0, 0});
  ImGui::SetNextWindowSize({frame.width, frame.height});
  ImGui::Begin("trial", nullptr, ImGuiWindowFlags_NoDecoration | ImGuiWindowFlags_NoMove);
  if (ImGui::InputTextMultiline("##long", long_text, sizeof long_text, {400, 80})) keep_soon();
  mark("long", "textbox");
  ImGui::SetNextItemWidth(400);
  ImGui::InputText("##short", short_text, sizeof short_text);
  mark("short", "textbox");

  if (button("Copy", "copy")) copy_to_clipboard("from the button: β ≤ −1");
  ImGui::SameLine();
  if (button("Link", "link")) copy_link(long_text);
  ImGui::SameLine();
  if (button("Save", "save")) offer_download("trial.toml", "application/toml", long_text);
  ImGui::SameLine();
  if (button("Picture", "picture")) {
    offer_png("trial.png", "<svg xmlns=\"http://www.w3.org/2000/svg\" width=\"40\" height=\"20\"/>", 2);
  }
  ImGui::SameLine();
  if (button("Report", "report")) {
    open_report(
        "<!doctype "
        "html><style>p{color:rgb(1,2,3)}</style><p>report</p><script>document.title='run'</script>");
  }
  ImGui::SameLine();
  if (button("Open", "open")) pick_file();
  ImGui::SameLine();
  if (button("Text", "companion")) show_companion(!companion_is_shown());
  ImGui::SameLine();
  if (button("Larger", "larger")) set_text_scale(text_scale() == 1 ? 2 : 1);
  ImGui::SameLine();
  if (button("New", "new")) open_kept("");
  ImGui::SameLine();
  if (button("Work", "work")) slow_frames = 20;
  ImGui::SameLine();
  if (button("Dark", "dark")) set_page_theme(true);
  ImGui::SameLine();
  if (button("Unsafe", "unsafe")) unsafe = true;
  show_type();
  ImGui::End();
}

}  // namespace rejoinder
