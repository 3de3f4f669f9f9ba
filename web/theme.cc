#include "web/theme.h"

#include <algorithm>
#include <cmath>

#include "web/platform/fonts.h"

namespace rejoinder {
namespace {

// 0xRRGGBB, opaque unless said otherwise.
constexpr ImU32 colour(unsigned rgb, unsigned alpha = 255) {
  return IM_COL32((rgb >> 16) & 255, (rgb >> 8) & 255, rgb & 255, alpha);
}

// The accents are darker (on paper) and lighter (on slate) relatives of the palette of Okabe and Ito that
// stays distinct under the common colour-vision deficiencies (from memory).
constexpr Palette kLight = {
    .paper = colour(0xFBFAF7),
    .desk = colour(0xF3F1EB),
    .card = colour(0xFFFFFF),
    .ink = colour(0x1E2226),
    .soft = colour(0x43484D),
    .quiet = colour(0x62666B),
    .rule = colour(0x3A3D40),
    .thin_rule = colour(0x8E8A80),
    .hairline = colour(0xD8D3C8),
    .edge = colour(0xDCD7CC),
    .control = colour(0xC2BCAE),
    .hover = colour(0x1E2226, 12),
    .held = colour(0x1E2226, 30),
    .inset = colour(0xF3F1EB),
    .rests = colour(0xFFF1C9),
    .rests_edge = colour(0xE0BC58),
    .selection = colour(0xBBD7EE),
    .shade = colour(0x2B2820, 110),
    .agrees = colour(0x005B99),
    .conflicts = colour(0xB54700),
    .undecided = colour(0x7A5C00),
    .none = colour(0x5C6166),
};

constexpr Palette kDark = {
    .paper = colour(0x1B1D20),
    .desk = colour(0x151719),
    .card = colour(0x24272B),
    .ink = colour(0xECEAE4),
    .soft = colour(0xC9C7C0),
    .quiet = colour(0xA6A49D),
    .rule = colour(0xB9B6AD),
    .thin_rule = colour(0x76756F),
    .hairline = colour(0x35383C),
    .edge = colour(0x3A3E43),
    .control = colour(0x555A60),
    .hover = colour(0xFFFFFF, 14),
    .held = colour(0xFFFFFF, 32),
    .inset = colour(0x151719),
    .rests = colour(0x3C3417),
    .rests_edge = colour(0x8A742A),
    .selection = colour(0x2D4C66),
    .shade = colour(0x000000, 150),
    .agrees = colour(0x74B9EA),
    .conflicts = colour(0xF4976A),
    .undecided = colour(0xDDB952),
    .none = colour(0xA6A49D),
};

const Palette* current = &kLight;
float scale = 1, ratio = 1;

ImVec4 vec(ImU32 c) { return ImGui::ColorConvertU32ToFloat4(c); }

}  // namespace

const Palette& palette() { return *current; }

ImU32 accent(State state) {
  switch (state) {
    case State::Agrees:
      return current->agrees;
    case State::Conflicts:
      return current->conflicts;
    case State::Undecided:
      return current->undecided;
    case State::NotComputable:
      break;
  }
  return current->none;
}

ImU32 accent(Match match) {
  switch (match) {
    case Match::Fits:
      return current->agrees;
    case Match::Strained:
      return current->undecided;
    case Match::Conflicts:
      return current->conflicts;
    case Match::CannotTell:
      break;
  }
  return current->none;
}

ImU32 faded(ImU32 colour, float share) {
  const unsigned alpha = (colour >> IM_COL32_A_SHIFT) & 255;
  const auto less = static_cast<unsigned>(std::lround(alpha * std::clamp(share, 0.0f, 1.0f)));
  return (colour & ~IM_COL32_A_MASK) | (less << IM_COL32_A_SHIFT);
}

TypeSetting setting(Type type) {
  struct Row {
    Face face;
    TextSize size;
    float leading;  // in sizes
  };
  constexpr Row kRows[] = {
      {Face::Regular, TextSize::Small, 1.35f}, {Face::Bold, TextSize::Small, 1.35f},
      {Face::Regular, TextSize::Note, 1.4f},   {Face::Bold, TextSize::Note, 1.4f},
      {Face::Regular, TextSize::Body, 1.45f},  {Face::Bold, TextSize::Body, 1.45f},
      {Face::Bold, TextSize::Large, 1.35f},    {Face::Regular, TextSize::Title, 1.3f},
      {Face::Mono, TextSize::Note, 1.45f},
  };
  const Row& row = kRows[static_cast<int>(type)];
  ImFont* const face = font(row.face, row.size);
  const float size = face->FontSize * ImGui::GetIO().FontGlobalScale;
  return {face, size, snap(size * row.leading)};
}

float snap(float coordinate) { return std::round(coordinate * ratio) / ratio; }

float px(float design_pixels) {
  const float grown = snap(design_pixels * scale);
  return design_pixels > 0 ? std::max(grown, 1 / ratio) : grown;
}

float hair() { return std::max(1.0f, std::round(ratio)) / ratio; }

void set_theme(Theme theme, float text_scale, float pixel_ratio) {
  current = theme == Theme::Dark ? &kDark : &kLight;
  scale = text_scale;
  ratio = std::max(pixel_ratio, 0.25f);

  ImGuiStyle& style = ImGui::GetStyle();
  style.WindowPadding = style.FramePadding = style.ItemSpacing = ImVec2(0, 0);
  style.WindowBorderSize = style.ChildBorderSize = style.PopupBorderSize = style.FrameBorderSize = 0;
  style.WindowRounding = style.ChildRounding = 0;
  style.WindowMinSize = ImVec2(1, 1);
  style.ScrollbarSize = px(10);
  style.ScrollbarRounding = px(5);
  style.GrabMinSize = px(28);
  style.AntiAliasedLinesUseTex = false;
  ImVec4* const colours = style.Colors;
  colours[ImGuiCol_Text] = vec(current->ink);
  colours[ImGuiCol_WindowBg] = colours[ImGuiCol_ChildBg] = colours[ImGuiCol_PopupBg] = ImVec4(0, 0, 0, 0);
  colours[ImGuiCol_Border] = vec(current->edge);
  colours[ImGuiCol_ScrollbarBg] = ImVec4(0, 0, 0, 0);
  colours[ImGuiCol_ScrollbarGrab] = vec(faded(current->thin_rule, 0.45f));
  colours[ImGuiCol_ScrollbarGrabHovered] = vec(faded(current->thin_rule, 0.75f));
  colours[ImGuiCol_ScrollbarGrabActive] = vec(current->thin_rule);
}

}  // namespace rejoinder
