// The review that the page opens with: an invented paper with findings of every kind.
#pragma once

namespace rejoinder {

// The text of demo/mountain-huts.toml, byte for byte; a test compares them.
const char* worked_case();

}  // namespace rejoinder
