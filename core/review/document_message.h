// What the TOML library says about text it cannot read, in words that tell a user how to mend it.
#pragma once

#include <string>
#include <string_view>

#include "core/result.h"

namespace rejoinder {

// `complaint` is the library's own sentence, `line` the line of the file it stops at, `column` counted in
// characters from 1. `where` is left empty.
Error document_message(std::string_view complaint, std::string_view line, int column);

}  // namespace rejoinder
