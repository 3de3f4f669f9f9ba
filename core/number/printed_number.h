// A number exactly as a paper prints it, with every value that prints that way.
//
// "0.50" and "0.5" are one number but two pieces of evidence: the first was rounded to hundredths, the second to
// tenths. So the text and its last decimal place are kept, never just a double.
#pragma once

#include <string>
#include <string_view>

#include "core/number/interval.h"
#include "core/result.h"

namespace rejoinder {

enum class Rounding {
  Nearest,    // half a unit in the last place either side, ends included
  Truncated,  // [v, v + one unit) away from zero
  Unknown     // the union: half a unit towards zero, one unit away from it
};

// How "<" and ">" stand in print.
enum class Relation { Equal, Below, Above };

// What a field of the review tells the reader of its numbers.
struct NumberReading {
  char decimal = '.';  // '.' or ','; the other one, blanks and apostrophes are then thousands marks
  Rounding rounding = Rounding::Nearest;
  Interval natural = Interval::everything();  // the field's own range: [0, 1] for p, [0, inf] for an s.e.
};

struct PrintedNumber {
  std::string text;              // as printed, stars and brackets included
  bool exact = false;            // written without quotes, or a field that is exact even in quotes
  double value = 0;              // the double nearest to the digits printed; the end named for "<" and ">"
  int decimal_places = 0;        // digits after the point, an exponent taken into account; "1.2e-3" has 4
  int stars = 0;                 // stars and daggers glued to the number
  Relation relation = Relation::Equal;
  Interval possible;             // every value that prints as `text`, within the field's natural range

  bool operator==(const PrintedNumber&) const = default;
};

// Reads the forms of the review format's page on printed numbers: "0.131" gives [0.1305, 0.1315]; minus signs of
// any kind, brackets, stars and daggers, thousands marks, exponents ("1.2e-3", "1.2×10^-3", "1.2·10−3"), "<.001",
// "p < .05", ">0.10", "n.s." (above the level 0.10 is not implied: it gives (natural.low, natural.high]).
// The ends are computed in exact decimals and moved outward to a neighbouring double where no double is exact.
// Up to 40 digits and any exponent that a double can hold. "-0.000" gives [-0.0005, 0]. A value that lies wholly
// outside the natural range, or text that is no number, is an Error whose `where` is left to the caller.
Result<PrintedNumber> read_printed_number(std::string_view text, const NumberReading& how = {});

// A number without rounding: `literal` is the spelling of an unquoted TOML number ("0.05", "1_000", "inf"), or a
// quoted one in a field that is exact even in quotes. possible is the point, or the two doubles around it.
Result<PrintedNumber> read_exact_number(std::string_view literal, const NumberReading& how = {});

// Counts (n, k, clusters, df, group sizes): exact even in quotes, "1,284" reads by how.decimal. Not negative.
Result<long> read_count(std::string_view text, const NumberReading& how = {});

}  // namespace rejoinder
