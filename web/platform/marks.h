// Where each widget stands, for tests that move the real mouse there.
//
// Example: if (ImGui::Button("Open")) ...;  mark("open", "button");
#pragma once

#include <string>
#include <string_view>

struct ImVec2;

namespace rejoinder {

// Records the last item under `id`, unique in a frame: "claim 2", "cell 1 3 se". kind says what it is, in the
// words of accessibility roles: "button", "textbox", "cell", "tab", "link", "checkbox", "slider", "region".
void mark(std::string_view id, std::string_view kind);
// Records a rectangle, in CSS pixels, that is no single item.
void mark(std::string_view id, std::string_view kind, const ImVec2& low, const ImVec2& high);

// ---- for the platform
// Nothing is recorded, and marking costs nothing, until a test asks.
void record_marks(bool on);
void begin_marks();
// [{"id": ..., "kind": ..., "x": ..., "y": ..., "w": ..., "h": ...}, ...]: the part inside the clip
// rectangle, so what is scrolled out of sight has w or h 0.
std::string marks_as_json();

}  // namespace rejoinder
