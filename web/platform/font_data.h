// The typeface inside the page, written by .setup/subset_fonts: TrueType files in memory.
#pragma once

namespace rejoinder {

struct FontData {
  const void* bytes;
  int size;  // in bytes
};

FontData regular_face();
FontData bold_face();
FontData mono_face();

}  // namespace rejoinder
