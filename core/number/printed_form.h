// The pieces of a number as print spells it, before any of them is given a value.
//
// "(−1,204.5**)" is a minus, the digits 12045, one decimal place and two stars. What the pieces mean as an
// interval is read_printed_number's business. Private to core/number.
#pragma once

#include <string>
#include <string_view>

#include "core/number/printed_number.h"
#include "core/result.h"

namespace rejoinder {

struct PrintedForm {
  Relation relation = Relation::Equal;
  bool not_significant = false;  // "n.s.": no digits at all
  bool negative = false;         // a minus stands before the digits, zeros included
  std::string digits;            // ASCII, thousands marks taken out
  int places = 0;                // digits after the decimal mark, less the exponent
  int stars = 0;
};

// `decimal` is '.' or ','. An Error says what in `text` is no part of a number and how to write it.
Result<PrintedForm> read_printed_form(std::string_view text, char decimal);

// The spelling of an unquoted TOML number that is not inf or nan: an optional sign, digits that underscores
// may part, a point, an exponent. False where `text` has another shape; `form` is then unchanged.
bool read_plain_form(std::string_view text, PrintedForm& form);

}  // namespace rejoinder
