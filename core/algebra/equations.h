// Restrictions that may multiply or divide terms, as trees: for the delta method and for ratios.
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "core/algebra/expression.h"
#include "core/algebra/restrictions.h"

namespace rejoinder {

// Each restriction says that a gap, left side less right side, is zero.
struct Equations {
  std::vector<TermName> terms;       // p, in the order of first appearance
  std::vector<Expression> gaps;      // as many as restrictions listed; over `terms`
  std::vector<std::string> wording;  // of each: "fare / fuel = 2", as the text has it
  bool linear = true;                // every gap is linear: read_restrictions reads the same text
};

// `slopes` as for read_restrictions. Errors: what cannot be read. Redundant or clashing equations are not
// looked for, as products admit no rank beforehand.
Result<Equations> read_equations(std::string_view text, const std::vector<std::string>& slopes = {});

// Whether the text is nothing but "all" or "all = 0": every slope of the column, whether its terms are listed
// or not.
bool means_all(std::string_view text);

}  // namespace rejoinder
