// How the platform's storage tells the services what became of a write.
#pragma once

#include <string_view>

namespace rejoinder {

// A write ended at local time `time`, "14:02"; an empty `time` says that the browser refused it.
void note_write(std::string_view time);

}  // namespace rejoinder
