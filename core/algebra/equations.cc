#include "core/algebra/equations.h"

#include "core/algebra/parse.h"
#include "core/algebra/tokens.h"

namespace rejoinder {
namespace {

bool has_all(const Part& part) {
  for (const Side& side : part.sides)
    if (side.all) return true;
  return false;
}

void add_gap(const Side& left, const Side& right, Equations& equations) {
  equations.gaps.push_back(difference(left.expression, right.expression, left.character));
  equations.wording.push_back(left.written + " = " + right.written);
  equations.linear = equations.linear && is_linear(equations.gaps.back());
}

}  // namespace

Result<Equations> read_equations(std::string_view text, const std::vector<std::string>& slopes) {
  Result<ParsedRestrictions> read = parse_restrictions(text);
  if (!read.ok()) return read.error();
  const ParsedRestrictions& parsed = read.value();
  Equations equations;
  equations.terms = parsed.terms;
  for (const Part& part : parsed.parts) {
    if (has_all(part)) {
      // The linear reader knows what "all" brings and what it may be put equal to.
      std::string written;
      for (const Side& side : part.sides) written += (written.empty() ? "" : " = ") + side.written;
      const Result<Restrictions> all = read_restrictions(written, slopes);
      if (!all.ok()) return Error{at_character(part.character), all.error().what, all.error().mend};
      for (int i = 0; i < all.value().q(); ++i) {
        const TermName& name = all.value().terms[i];
        int term = 0;
        while (term < static_cast<int>(equations.terms.size()) && !(equations.terms[term] == name)) ++term;
        if (term == static_cast<int>(equations.terms.size())) equations.terms.push_back(name);
        Expression gap;
        gap.steps.push_back({Expression::Op::Term, 0, term, -1, -1, part.character});
        equations.gaps.push_back(std::move(gap));
        equations.wording.push_back(all.value().wording[i]);
      }
      continue;
    }
    int number = -1;
    for (std::size_t i = 0; i < part.sides.size() && number < 0; ++i)
      if (!has_terms(part.sides[i].expression)) number = static_cast<int>(i);
    for (int i = 0; i < static_cast<int>(part.sides.size()); ++i) {
      if (number >= 0 && i != number) add_gap(part.sides[i], part.sides[number], equations);
      if (number < 0 && i > 0) add_gap(part.sides[i - 1], part.sides[i], equations);
    }
  }
  if (equations.gaps.empty())
    return Error{at_character(1), "no restriction is stated", "write one: fare = 0"};
  if (equations.gaps.size() > kMostRestrictions)
    return Error{at_character(1), "more than 200 restrictions", "write those of one test only"};
  return equations;
}

bool means_all(std::string_view text) {
  const Result<ParsedRestrictions> read = parse_restrictions(text);
  if (!read.ok() || read.value().parts.size() != 1) return false;
  bool all = false;
  for (const Side& side : read.value().parts[0].sides) {
    const std::vector<Expression::Step>& steps = side.expression.steps;
    all = all || side.all;
    if (!side.all && !(steps.size() == 1 && steps[0].op == Expression::Op::Number && steps[0].number == 0))
      return false;
  }
  return all;
}

}  // namespace rejoinder
