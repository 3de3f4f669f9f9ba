// Restrictions as ticks on the term list, in step with the typed form.
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "core/algebra/restrictions.h"

namespace rejoinder {

// What a claim's restrictions say, where ticks can say it.
struct Ticks {
  std::string form;  // "zero", "equal", "sum"; "" where the text says something that ticks cannot
  std::vector<std::string> terms;  // ticked, in the text's order
  std::string value = "1";         // what a sum adds up to
};

// Reads the text; unfinished texts that write_ticks makes, such as "a =", are understood too.
Ticks read_ticks(std::string_view restrictions);

// The text for the ticks: "a = 0, b = 0", "a = b", "a + b = 1". One term ticked "equal" gives "a =",
// unfinished.
std::string write_ticks(const Ticks& ticks);

}  // namespace rejoinder
