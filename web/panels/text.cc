#include "web/panels/text.h"

#include <algorithm>

namespace rejoinder {
namespace {

// ImGui sets text at whole pixels of its own; the gap between size and leading is split above and below.
void draw_at(const TypeSetting& how, const ImVec2& at, ImU32 colour, std::string_view text) {
  if (text.empty()) return;
  const ImVec2 place(snap(at.x), snap(at.y + (how.leading - how.size) / 2));
  ImGui::GetWindowDrawList()->AddText(how.font, how.size, place, colour, text.data(), text.data() + text.size());
}

float width_of(const TypeSetting& how, std::string_view text) {
  return how.font->CalcTextSizeA(how.size, FLT_MAX, 0, text.data(), text.data() + text.size()).x;
}

}  // namespace

std::vector<Line> set_in_lines(Type type, std::string_view text, float width) {
  const TypeSetting how = setting(type);
  std::vector<Line> lines;
  size_t begin = 0;
  while (true) {
    const size_t line_end = std::min(text.find('\n', begin), text.size());
    // One paragraph of the text, broken where it grows too wide.
    size_t from = begin;
    while (width > 0 && from < line_end) {
      const char* const first = text.data() + from;
      const char* const stop =
          how.font->CalcWordWrapPositionA(how.size / how.font->FontSize, first, text.data() + line_end, width);
      size_t cut = static_cast<size_t>(stop - text.data());
      if (cut >= line_end) break;
      if (cut <= from) {  // not even one letter fits: take one all the same
        cut = from + 1;
        while (cut < line_end && (static_cast<unsigned char>(text[cut]) & 0xC0) == 0x80) ++cut;
      }
      size_t end = cut;
      while (end > from && text[end - 1] == ' ') --end;
      lines.push_back({from, end});
      from = cut;
      while (from < line_end && text[from] == ' ') ++from;
    }
    lines.push_back({from, line_end});
    if (line_end == text.size()) return lines;
    begin = line_end + 1;
  }
}

float text_width(Type type, std::string_view text) { return width_of(setting(type), text); }

float text_height(Type type, std::string_view text, float width) {
  return static_cast<float>(set_in_lines(type, text, width).size()) * setting(type).leading;
}

void draw_line(Type type, const ImVec2& at, ImU32 colour, std::string_view text) {
  draw_at(setting(type), at, colour, text);
}

bool draw_cut(Type type, const ImVec2& at, ImU32 colour, std::string_view text, float width) {
  const TypeSetting how = setting(type);
  if (width_of(how, text) <= width) {
    draw_at(how, at, colour, text);
    return false;
  }
  const float room = width - width_of(how, "…");
  const char* stop = text.data();
  how.font->CalcTextSizeA(how.size, std::max(room, 0.0f), 0, text.data(), text.data() + text.size(), &stop);
  std::string shown(text.data(), stop);
  while (!shown.empty() && shown.back() == ' ') shown.pop_back();
  draw_at(how, at, colour, shown + "…");
  return true;
}

float draw_text(Type type, const ImVec2& at, ImU32 colour, std::string_view text, float width) {
  const TypeSetting how = setting(type);
  ImVec2 place = at;
  for (const Line& line : set_in_lines(type, text, width)) {
    draw_at(how, place, colour, text.substr(line.begin, line.end - line.begin));
    place.y += how.leading;
  }
  return place.y - at.y;
}

void draw_rule(const ImVec2& at, float width, float thickness, ImU32 colour) {
  const ImVec2 low(snap(at.x), snap(at.y));
  ImGui::GetWindowDrawList()->AddRectFilled(low, ImVec2(snap(at.x + width), low.y + thickness), colour);
}

void draw_card(const ImVec2& low, const ImVec2& high, ImU32 fill, ImU32 edge, float thickness, float rounding) {
  ImDrawList* const list = ImGui::GetWindowDrawList();
  // Two filled shapes keep the border crisp at every pixel ratio.
  const ImVec2 outer_low(snap(low.x), snap(low.y)), outer_high(snap(high.x), snap(high.y));
  list->AddRectFilled(outer_low, outer_high, edge, rounding);
  list->AddRectFilled(ImVec2(outer_low.x + thickness, outer_low.y + thickness),
                      ImVec2(outer_high.x - thickness, outer_high.y - thickness), fill,
                      std::max(0.0f, rounding - thickness));
}

}  // namespace rejoinder
