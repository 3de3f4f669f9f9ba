// Restriction text to expression trees: what stands on each side of each sign of equality.
//
//   restrictions = part { ("," | ";") part }        part = "all" | side { "=" side }
//   side = ["+"|"-"] product { ("+"|"-") product }  product = factor { ("*"|"/") factor }
//   factor = number | name | column "." name | "(" side ")", each with a power of a plain number if wanted
//
// A number directly before a name or a bracket multiplies it: 0.5 a, 2(a - b), 1/2 b.
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "core/algebra/expression.h"
#include "core/algebra/restrictions.h"

namespace rejoinder {

struct Side {
  Expression expression;  // empty where `all`
  bool all = false;
  int character = 1;
  std::string written;  // as the text has it
};

struct Part {
  std::vector<Side> sides;  // at least one
  int character = 1;
};

struct ParsedRestrictions {
  std::vector<TermName> terms;  // in the order of first appearance; expressions hold indices into it
  std::vector<Part> parts;      // empty parts (a comma too many) are left out
};

inline constexpr int kMostTerms = 200;
inline constexpr int kMostRestrictions = 200;

// Errors name the character. Brackets nest at most 64 deep.
Result<ParsedRestrictions> parse_restrictions(std::string_view text);

// One expression without "=": a single part with a single side, never `all`.
Result<ParsedRestrictions> parse_combination(std::string_view text);

// `left` less `right`, as one tree.
Expression difference(const Expression& left, const Expression& right, int character);

}  // namespace rejoinder
