#include "web/platform/fonts.h"

#include <algorithm>
#include <cmath>

#include "backends/imgui_impl_opengl3.h"
#include "web/platform/font_data.h"

namespace rejoinder {
namespace {

constexpr int kFaces = 3, kSizes = 5;
constexpr float kPixels[kSizes] = {12.5f, 14, 15, 18, 24};
// Those are sizes of the em, as in print and on web pages. ImGui counts from the highest to the lowest point of the
// face, which for DejaVu is (1901 + 483) / 2048 em.
constexpr float kHeightOfEm = 1.164f;
// Finer than this no eye sees, and the picture of all glyphs would outgrow what graphics cards take.
constexpr float kGreatestDensity = 4;

// The same ranges as in .setup/subset_fonts.
constexpr ImWchar kRanges[] = {0x0020, 0x007E, 0x00A0, 0x017F, 0x0370, 0x03FF, 0x2010, 0x2027, 0x2030,
                               0x203A, 0x2070, 0x209C, 0x2190, 0x2199, 0x21D0, 0x21D5, 0x2200, 0x2265,
                               0x25A0, 0x25CF, 0x26A0, 0x26A0, 0x2713, 0x2718, 0};

struct Cut {
  bool wanted = false;
  ImFont* font = nullptr;
};
Cut cuts[kFaces][kSizes];
bool missing = true;
float cut_ratio = 0, cut_scale = 0;

Cut& body() { return cuts[static_cast<int>(Face::Regular)][static_cast<int>(TextSize::Body)]; }

FontData data_of(int face) {
  switch (static_cast<Face>(face)) {
    case Face::Bold:
      return bold_face();
    case Face::Mono:
      return mono_face();
    case Face::Regular:
      break;
  }
  return regular_face();
}

}  // namespace

ImFont* font(Face face, TextSize size) {
  Cut& cut = cuts[static_cast<int>(face)][static_cast<int>(size)];
  if (!cut.wanted) cut.wanted = missing = true;
  return cut.font ? cut.font : body().font;
}

bool fonts_are_missing() { return missing; }

void forget_fonts() { cut_ratio = 0; }

bool prepare_fonts(float pixel_ratio, float text_scale) {
  if (!missing && pixel_ratio == cut_ratio && text_scale == cut_scale) return false;
  missing = false;
  cut_ratio = pixel_ratio;
  cut_scale = text_scale;
  body().wanted = true;

  ImGuiIO& io = ImGui::GetIO();
  ImGui_ImplOpenGL3_DestroyFontsTexture();
  io.Fonts->Clear();
  // Glyphs are cut in device pixels and drawn at 1 / density, so that each texel meets one pixel.
  const float density = std::min(pixel_ratio, kGreatestDensity / text_scale);
  ImFontConfig config;
  config.FontDataOwnedByAtlas = false;
  config.OversampleH = density >= 1.5f ? 1 : 2;
  config.OversampleV = 1;
  config.PixelSnapH = true;
  for (int face = 0; face < kFaces; ++face) {
    const FontData data = data_of(face);
    for (int size = 0; size < kSizes; ++size) {
      Cut& cut = cuts[face][size];
      cut.font = nullptr;
      if (!cut.wanted) continue;
      const float pixels = std::round(kPixels[size] * kHeightOfEm * text_scale * density);
      cut.font =
          io.Fonts->AddFontFromMemoryTTF(const_cast<void*>(data.bytes), data.size, pixels, &config, kRanges);
    }
  }
  io.FontDefault = body().font;
  io.FontGlobalScale = 1 / density;
  ImGui_ImplOpenGL3_CreateFontsTexture();
  // The card has its copy; ours would only take memory.
  io.Fonts->ClearTexData();
  return true;
}

}  // namespace rejoinder
