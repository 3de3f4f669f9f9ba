#include "web/platform/marks.h"

#include <algorithm>
#include <cstdio>
#include <vector>

#include "imgui.h"
#include "imgui_internal.h"

namespace rejoinder {
namespace {

struct Mark {
  std::string id, kind;
  ImVec2 low, high;
};
std::vector<Mark> marks;
bool recording = false;

std::string quoted(std::string_view text) {
  std::string all = "\"";
  for (const char c : text) {
    if (c == '"' || c == '\\') all += '\\';
    all += static_cast<unsigned char>(c) < 0x20 ? ' ' : c;
  }
  return all + '"';
}

}  // namespace

void record_marks(bool on) { recording = on; }

void begin_marks() { marks.clear(); }

void mark(std::string_view id, std::string_view kind) {
  if (recording) mark(id, kind, ImGui::GetItemRectMin(), ImGui::GetItemRectMax());
}

void mark(std::string_view id, std::string_view kind, const ImVec2& low, const ImVec2& high) {
  if (!recording) return;
  const ImRect clip = ImGui::GetCurrentWindow()->ClipRect;
  const ImVec2 from(std::max(low.x, clip.Min.x), std::max(low.y, clip.Min.y));
  const ImVec2 to(std::max(from.x, std::min(high.x, clip.Max.x)),
                  std::max(from.y, std::min(high.y, clip.Max.y)));
  marks.push_back({std::string(id), std::string(kind), from, to});
}

std::string marks_as_json() {
  std::string all = "[";
  for (const Mark& mark : marks) {
    char place[128];
    std::snprintf(place, sizeof place, ",\"x\":%g,\"y\":%g,\"w\":%g,\"h\":%g}", mark.low.x, mark.low.y,
                  mark.high.x - mark.low.x, mark.high.y - mark.low.y);
    all += (all.size() > 1 ? ",{\"id\":" : "{\"id\":") + quoted(mark.id) + ",\"kind\":" + quoted(mark.kind) +
           place;
  }
  return all + "]";
}

}  // namespace rejoinder
