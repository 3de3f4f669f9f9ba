#include "web/panels/text.h"

#include <algorithm>

#include "imgui_internal.h"

namespace rejoinder {
namespace {

// ImGui sets text at whole pixels of its own; the gap between size and leading is split above and below.
void draw_at(const TypeSetting& how, const ImVec2& at, ImU32 colour, std::string_view text) {
  if (text.empty()) return;
  const ImVec2 place(snap(at.x), snap(at.y + (how.leading - how.size) / 2));
  ImGui::GetWindowDrawList()->AddText(how.font, how.size, place, colour, text.data(),
                                      text.data() + text.size());
}

float width_of(const TypeSetting& how, std::string_view text) {
  return how.font->CalcTextSizeA(how.size, FLT_MAX, 0, text.data(), text.data() + text.size()).x;
}

// A blank that must not end a line: "5 %", "p = .03" and "F < 1" stay together.
bool holds_together(std::string_view text, size_t blank) {
  const auto sign = [](char c) { return c == '=' || c == '<' || c == '>'; };
  const char after = blank + 1 < text.size() ? text[blank + 1] : ' ';
  if (after == '%' || sign(after)) return true;
  if (blank >= 2 && text[blank - 1] == ',' && after >= '0' && after <= '9') {  // "F(2, 410)"
    size_t at = blank - 1;
    while (at > 0 && text[at - 1] >= '0' && text[at - 1] <= '9') --at;
    if (at > 0 && text[at - 1] == '(') return true;
  }
  return blank >= 2 && sign(text[blank - 1]) && text[blank - 2] == ' ';
}

// Breaks text[begin, end) where it grows wider than `width`: at blanks, or inside a word that is wider than a
// line.
void break_paragraph(const TypeSetting& how, bool together, std::string_view text, size_t begin, size_t end,
                     float width, std::vector<Line>& lines) {
  const float scale = how.size / how.font->FontSize;
  size_t from = begin;                    // of the line
  size_t blank = std::string_view::npos;  // the last place where it may be broken
  float wide = 0;
  for (size_t at = begin; at < end;) {
    unsigned int letter = 0;
    const int bytes = std::max(1, ImTextCharFromUtf8(&letter, text.data() + at, text.data() + end));
    const float step = how.font->GetCharAdvance(static_cast<ImWchar>(letter)) * scale;
    if (letter == ' ' && !(together && holds_together(text, at))) {
      blank = at;
    } else if (wide + step > width && at > from) {
      const bool at_blank = blank != std::string_view::npos && blank >= from;
      size_t stop = at_blank ? blank : at;
      const size_t next = at_blank ? blank + 1 : at;
      while (stop > from && text[stop - 1] == ' ') --stop;
      lines.push_back({from, stop});
      from = next;
      while (from < end && text[from] == ' ') ++from;
      blank = std::string_view::npos;
      wide = 0;
      at = from;
      continue;
    }
    wide += step;
    at += static_cast<size_t>(bytes);
  }
  lines.push_back({from, end});
}

}  // namespace

std::vector<Line> set_in_lines(Type type, std::string_view text, float width) {
  const TypeSetting how = setting(type);
  std::vector<Line> lines;
  size_t begin = 0;
  while (true) {
    const size_t line_end = std::min(text.find('\n', begin), text.size());
    if (width > 0) {
      break_paragraph(how, type != Type::Mono, text, begin, line_end, width, lines);
    } else {
      lines.push_back({begin, line_end});
    }
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

void draw_card(const ImVec2& low, const ImVec2& high, ImU32 fill, ImU32 edge, float thickness,
               float rounding) {
  ImDrawList* const list = ImGui::GetWindowDrawList();
  // Two filled shapes keep the border crisp at every pixel ratio.
  const ImVec2 outer_low(snap(low.x), snap(low.y)), outer_high(snap(high.x), snap(high.y));
  list->AddRectFilled(outer_low, outer_high, edge, rounding);
  list->AddRectFilled(ImVec2(outer_low.x + thickness, outer_low.y + thickness),
                      ImVec2(outer_high.x - thickness, outer_high.y - thickness), fill,
                      std::max(0.0f, rounding - thickness));
}

}  // namespace rejoinder
