// Exact decimals, and the doubles next to them.
//
// A printed number means a decimal, which seldom is a double. Whatever is read is kept exactly, as whole
// units of a decimal place, until the very last step, which takes the two doubles around it. Private to
// core/number: other folders see PrintedNumber only.
#pragma once

#include <boost/multiprecision/cpp_int.hpp>
#include <string_view>

#include "core/number/interval.h"

namespace rejoinder {

// units / 10^places; places may be negative ("12e3" is 12 with places -3).
struct Decimal {
  boost::multiprecision::cpp_int units;
  int places = 0;
};

// Contract: digits are ASCII digits, any number of them; none gives zero.
Decimal decimal_of(std::string_view digits, int places, bool negative);

// `value` moved by `halves` half units of its last place: 131 at 3 places and 1 half give 1315 at 4 places.
Decimal moved_by_halves(const Decimal& value, int halves);

// The doubles around a decimal: the largest not above it, the nearest (ties to the even one), the smallest
// not below it. Beyond the largest double `nearest` is infinite and the inner neighbour is the largest
// double.
struct Neighbours {
  double below = 0;
  double nearest = 0;
  double above = 0;
};
Neighbours neighbours(const Decimal& value);

}  // namespace rejoinder
