// Keys by the names that browsers give them.
#pragma once

#include <string_view>

#include "imgui.h"

namespace rejoinder {

// name: as in KeyboardEvent.key, letters in lower case: "a", "7", "Enter", "ArrowLeft", "F1", " ", "+".
// ImGuiKey_None for keys that the page has no use for.
ImGuiKey key_named(std::string_view name);

}  // namespace rejoinder
