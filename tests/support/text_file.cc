#include "tests/support/text_file.h"

#include <gtest/gtest.h>

#include <fstream>
#include <sstream>

namespace rejoinder::testing {

std::string text_file(const std::string& name) {
  std::ifstream file(name, std::ios::binary);
  EXPECT_TRUE(file.is_open()) << name;
  std::stringstream text;
  text << file.rdbuf();
  return text.str();
}

}  // namespace rejoinder::testing
