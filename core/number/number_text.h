// Numbers as the product shows them. What a paper printed is never passed through here: it is shown as text.
#pragma once

#include <string>

#include "core/number/interval.h"

namespace rejoinder {

// Which way the last shown digit goes. Limits are shown outward (the low end Down, the high end Up), so that a shown
// range never leaves out what the print allows.
enum class ShowRounding { Nearest, Down, Up };

// About three significant digits, never fewer than two decimals between 1 and 100: 0.0123, 2.90, 13.37, 144.2, 1,284.
// Minus is U+2212, infinity "∞".
std::string number_text(double x, ShowRounding way = ShowRounding::Nearest);

// A probability in the trade's way: ".027", ".0041", "< .001" below a thousandth unless `full`, then "4.1 × 10⁻⁶".
std::string p_text(double p, ShowRounding way = ShowRounding::Nearest, bool full = false);

// "2.90 to 3.11"; "at least 2.15" where the high end is infinite; one number where the shown ends agree.
std::string range_text(const Interval& range);
// ".027 to .036"; "at most .062" where the low end is 0.
std::string p_range_text(const Interval& range);

// Degrees of freedom: "212", "12.5", "∞".
std::string df_text(double df);

// A level as the trade says it: 0.05 gives "5 %".
std::string level_text(double level);

// Shortest decimal form that reads back as the same double; "inf", "-inf". For files and working that must be exact.
std::string exact_text(double x);

}  // namespace rejoinder
