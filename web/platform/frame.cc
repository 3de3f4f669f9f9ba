#include "web/platform/frame.h"

#include <GLES3/gl3.h>
#include <emscripten/html5.h>

#include <algorithm>
#include <cmath>

#include "backends/imgui_impl_opengl3.h"
#include "imgui.h"
#include "imgui_internal.h"
#include "web/platform/app.h"
#include "web/platform/fonts.h"
#include "web/platform/marks.h"
#include "web/platform/services.h"

namespace rejoinder {
namespace {

constexpr const char* kShaderVersion = "#version 300 es";

EMSCRIPTEN_WEBGL_CONTEXT_HANDLE canvas = 0;
float pixel_ratio = 1, scale_of_text = 1;
double last_frame = 0;  // seconds
int drawn = 0;
bool drawing = false;

void draw_once() {
  ImGuiIO& io = ImGui::GetIO();
  const double time = now();
  // Frames come only when asked for. A long rest must not count as one long frame, nor may time stand still.
  io.DeltaTime = std::clamp(static_cast<float>(time - last_frame), 1e-4f, 0.1f);
  last_frame = time;

  ImGui_ImplOpenGL3_NewFrame();
  ImGui::NewFrame();
  begin_marks();
  app_draw({io.DisplaySize.x, io.DisplaySize.y, pixel_ratio, prefers_dark(), time});
  ImGui::Render();
}

}  // namespace

bool open_canvas() {
  EmscriptenWebGLContextAttributes attributes;
  emscripten_webgl_init_context_attributes(&attributes);
  attributes.majorVersion = 2;
  attributes.alpha = attributes.antialias = attributes.depth = attributes.stencil = false;
  attributes.powerPreference = EM_WEBGL_POWER_PREFERENCE_LOW_POWER;
  canvas = emscripten_webgl_create_context("#drawing", &attributes);
  if (canvas <= 0) return false;
  emscripten_webgl_make_context_current(canvas);

  ImGui::CreateContext();
  ImGuiIO& io = ImGui::GetIO();
  io.IniFilename = nullptr;
  io.ConfigFlags |= ImGuiConfigFlags_NavEnableKeyboard;
  io.ConfigInputTextCursorBlink = false;  // a blinking cursor would draw for ever
  io.BackendPlatformName = "page";
  ImGui_ImplOpenGL3_Init(kShaderVersion);
  return true;
}

void restore_canvas() {
  ImGui_ImplOpenGL3_Shutdown();
  ImGui_ImplOpenGL3_Init(kShaderVersion);
  forget_fonts();
}

void resize_canvas(float width, float height, float ratio) {
  ImGuiIO& io = ImGui::GetIO();
  io.DisplaySize = ImVec2(width, height);
  io.DisplayFramebufferScale = ImVec2(ratio, ratio);
  pixel_ratio = ratio;
}

bool canvas_has_size() { return ImGui::GetCurrentContext() && ImGui::GetIO().DisplaySize.x > 0; }

int draw_frame() {
  // A file picker or a print preview opened from within app_draw may deliver events before it returns.
  if (drawing || !canvas_has_size() || emscripten_is_webgl_context_lost(canvas)) return 0;
  drawing = true;
  prepare_fonts(pixel_ratio, scale_of_text);
  draw_once();
  if (fonts_are_missing()) {
    prepare_fonts(pixel_ratio, scale_of_text);
    draw_once();
  }
  const ImVec2 size = ImGui::GetIO().DisplaySize;
  glViewport(0, 0, static_cast<int>(std::lround(size.x * pixel_ratio)),
             static_cast<int>(std::lround(size.y * pixel_ratio)));
  glClearColor(1, 1, 1, 1);
  glClear(GL_COLOR_BUFFER_BIT);
  ImGui_ImplOpenGL3_RenderDrawData(ImGui::GetDrawData());
  ++drawn;
  drawing = false;
  return ImGui::GetCurrentContext()->InputEventsQueue.Size;
}

int frames_drawn() { return drawn; }

float text_scale() { return scale_of_text; }

void set_text_scale(float scale) {
  scale = std::clamp(scale, 0.8f, 2.0f);
  if (scale == scale_of_text) return;
  scale_of_text = scale;
  request_frames(2);
}

}  // namespace rejoinder
