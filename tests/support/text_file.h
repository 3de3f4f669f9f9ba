// The whole of a file as text; a missing file is a failure of the test that asks and gives "".
#pragma once

#include <string>

namespace rejoinder::testing {

std::string text_file(const std::string& name);

}  // namespace rejoinder::testing
