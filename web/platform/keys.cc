#include "web/platform/keys.h"

namespace rejoinder {

ImGuiKey key_named(std::string_view name) {
  if (name.size() == 1) {
    const char c = name[0];
    if (c >= 'a' && c <= 'z') return static_cast<ImGuiKey>(ImGuiKey_A + (c - 'a'));
    if (c >= '0' && c <= '9') return static_cast<ImGuiKey>(ImGuiKey_0 + (c - '0'));
  }
  static constexpr struct {
    std::string_view name;
    ImGuiKey key;
  } kNamed[] = {
      {"ArrowLeft", ImGuiKey_LeftArrow},
      {"ArrowRight", ImGuiKey_RightArrow},
      {"ArrowUp", ImGuiKey_UpArrow},
      {"ArrowDown", ImGuiKey_DownArrow},
      {"Tab", ImGuiKey_Tab},
      {"Enter", ImGuiKey_Enter},
      {"NumpadEnter", ImGuiKey_KeypadEnter},
      {"Escape", ImGuiKey_Escape},
      {"Backspace", ImGuiKey_Backspace},
      {"Delete", ImGuiKey_Delete},
      {"Home", ImGuiKey_Home},
      {"End", ImGuiKey_End},
      {"PageUp", ImGuiKey_PageUp},
      {"PageDown", ImGuiKey_PageDown},
      {"Insert", ImGuiKey_Insert},
      {" ", ImGuiKey_Space},
      {"F1", ImGuiKey_F1},
      {"F2", ImGuiKey_F2},
      {"F4", ImGuiKey_F4},
      {",", ImGuiKey_Comma},
      {".", ImGuiKey_Period},
      {"+", ImGuiKey_Equal},
      {"=", ImGuiKey_Equal},
      {"-", ImGuiKey_Minus},
      {"/", ImGuiKey_Slash},
      {"?", ImGuiKey_Slash},
      {"[", ImGuiKey_LeftBracket},
      {"]", ImGuiKey_RightBracket},
  };
  for (const auto& row : kNamed) {
    if (row.name == name) return row.key;
  }
  return ImGuiKey_None;
}

}  // namespace rejoinder
