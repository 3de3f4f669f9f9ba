#include "core/evidence/printed_test.h"

#include <algorithm>

#include "core/number/number_text.h"

namespace rejoinder {

RouteAnswer printed_test_evidence(const JointTest& test) {
  RouteAnswer out;
  const Claim& claim = *test.claim;
  Evidence e;
  e.route = Route::PrintedTest;
  e.df = test.df;
  const std::string df = test.statistic == Statistic::F
                             ? "F(" + std::to_string(test.q) + ", " + df_text(test.df.denominator) + ")"
                             : "χ²(" + std::to_string(test.q) + ")";
  if (claim.f || claim.chi2) {
    const PrintedNumber& printed = claim.f ? *claim.f : *claim.chi2;
    // An F divides W by q; a chi-square is W itself.
    const double scale = claim.f ? test.q : 1;
    e.wald = {std::max(0.0, printed.possible.low * scale), std::max(0.0, printed.possible.high * scale)};
    e.p = p_of_wald(test, e.wald);
    e.working.push_back(df + " = " + printed.text + " stands for " + range_text(printed.possible));
    e.working.push_back("p that belongs to it: " + p_range_text(e.p));
    e.rests_on.push_back({"", "", claim.f ? "f" : "chi2"});
  } else if (claim.p) {
    e.wald = wald_of_p(test, claim.p->possible);
    e.p = claim.p->possible;
    e.working.push_back("p = " + claim.p->text + " belongs to " + df + " " + range_text(e.f()));
    e.rests_on.push_back({"", "", "p"});
  } else {
    return out;
  }
  e.attained = e.wald;
  e.low = e.high = Sharpness::Exact;
  e.assumes.push_back("the sentence as printed");
  e.cautions.push_back("This checks the sentence only against itself: the table prints nothing that bears on it.");
  out.evidence = std::move(e);
  return out;
}

}  // namespace rejoinder
