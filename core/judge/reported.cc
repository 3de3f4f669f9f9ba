#include "core/judge/reported.h"

#include <algorithm>
#include <cmath>

#include "core/number/number_text.h"
#include "core/statistics/tails.h"

namespace rejoinder {
namespace {

bool overlap(const Interval& a, const Interval& b) {
  const auto slack = [](double x) { return std::isinf(x) ? 0.0 : 1e-9 * std::fabs(x) + 1e-15; };
  return a.low <= b.high + slack(b.high) && b.low <= a.high + slack(a.high);
}

// The two-sided p that stars of a claim say.
Interval p_of_claimed_stars(const Review& review, int count) {
  std::vector<double> levels = review.stars;
  std::sort(levels.rbegin(), levels.rend());
  const int m = std::min(count, static_cast<int>(levels.size()));
  return {m < static_cast<int>(levels.size()) ? levels[static_cast<std::size_t>(m)] : 0.0,
          m > 0 ? levels[static_cast<std::size_t>(m - 1)] : 1.0};
}

// Where every value of `range` lies against `line`: true above, false below, nothing when it straddles or touches.
std::optional<bool> above(const Interval& range, double line) {
  if (range.low > line) return true;
  if (range.high < line) return false;
  return std::nullopt;
}

}  // namespace

Reported reported(const JointTest& test) {
  const Claim& claim = *test.claim;
  Reported out;
  const bool by_chi_square = claim.chi2.has_value() && !claim.f;
  // The reported p belongs to the statistic that is reported.
  JointTest judged = test;
  if (by_chi_square) {
    judged.statistic = Statistic::ChiSquare;
    judged.df.denominator = kInfinity;
  }
  if (claim.f) {
    out.any = true;
    out.wald = Interval{std::max(0.0, claim.f->possible.low) * test.q, std::max(0.0, claim.f->possible.high) * test.q};
  }
  if (claim.chi2) {
    out.any = true;
    const Interval wald{std::max(0.0, claim.chi2->possible.low), std::max(0.0, claim.chi2->possible.high)};
    // Both forms reported: they must be one figure; an empty meeting shows as outside every limit.
    out.wald = out.wald ? meet(*out.wald, wald).value_or(Interval{-1, -1}) : wald;
  }
  if (claim.p) out.p = claim.p->possible;
  if (claim.stars) {
    const Interval stars = p_of_claimed_stars(*test.review, *claim.stars);
    out.p = out.p ? meet(*out.p, stars).value_or(*out.p) : stars;
  }
  if (out.p) {
    out.any = true;
    out.wald_of_p = wald_of_p(judged, *out.p);
    // Another common convention of the df moves p: an innocent explanation is tried before anything is called outside.
    if (!by_chi_square && test.statistic == Statistic::F)
      for (const double other : test.df_argument.other)
        if (!claim.df2 || *claim.df2 == other) {
          judged.df.denominator = other;
          out.wald_of_p = join(*out.wald_of_p, wald_of_p(judged, *out.p));
        }
  }

  if (claim.rejects) {
    out.rejects = claim.rejects;
  } else if (out.any) {
    std::optional<bool> by_statistic, by_p;
    if (out.wald) by_statistic = above(*out.wald, by_chi_square ? chi_square_critical(test.level, test.q) : critical_wald(test));
    if (out.p) {
      by_p = above(*out.p, test.level);
      if (by_p) by_p = !*by_p;
      // "p < 0.05" says that the test rejects at 5 %, though its interval touches the level.
      if (!by_p && claim.p && claim.p->relation == Relation::Below && claim.p->possible.high <= test.level) by_p = true;
      if (!by_p && claim.p && claim.p->relation == Relation::Above && claim.p->possible.low >= test.level) by_p = false;
      if (!by_p && !claim.p && claim.stars) by_p = out.p->high <= test.level;
    }
    if (by_p && by_statistic && *by_p != *by_statistic)
      out.rejects = std::nullopt;
    else
      out.rejects = by_p ? by_p : by_statistic;
  }
  return out;
}

bool within(const Reported& reported, const Interval& limits) {
  Interval left = limits;
  for (const auto& set : {reported.wald, reported.wald_of_p}) {
    if (!set) continue;
    if (!overlap(left, *set)) return false;
    left = meet(left, *set).value_or(Interval::point(std::clamp(set->low, left.low, left.high)));
  }
  return true;
}

DfCheck check_df(const JointTest& test) {
  const Claim& claim = *test.claim;
  DfCheck out;
  if (!claim.df1 && !claim.df2) {
    out.says = "not stated";
    return out;
  }
  const auto pair = [](long q, double df) { return "(" + df_text(static_cast<double>(q)) + ", " + df_text(df) + ")"; };
  const long q = claim.df1.value_or(test.q);
  if (q != test.q) {
    out.part = DfPart::Differs;
    out.conflicts = true;
    out.says = std::to_string(q) + " restrictions are stated; " + std::to_string(test.q) + " are independent";
  }
  if (claim.df2 && *claim.df2 != test.df.denominator) {
    const bool chi_square_form = test.statistic == Statistic::F && claim.chi2 && !claim.f && std::isinf(*claim.df2);
    if (!chi_square_form) {
      const bool classical = test.column && test.column->estimator == Estimator::Ols &&
                             (test.column->errors == Errors::Classical || test.column->errors == Errors::Unknown);
      const auto& other = test.df_argument.other;
      const bool convention =
          !classical && (!test.df_argument.known || test.statistic == Statistic::ChiSquare ||
                         std::find(other.begin(), other.end(), *claim.df2) != other.end());
      out.part = DfPart::Differs;
      out.conflicts = out.conflicts || !convention;
      if (!out.says.empty()) out.says += "; ";
      out.says += df_text(*claim.df2) + " denominator df are stated; the print gives " + df_text(test.df.denominator);
      if (convention) out.says += " by one common convention, and other conventions exist";
    }
  }
  if (out.part == DfPart::NotStated) {
    out.part = DfPart::AsClaimed;
    out.says = test.statistic == Statistic::ChiSquare || !claim.df2 ? std::to_string(test.q) + ", as stated"
                                                                    : pair(test.q, test.df.denominator) + ", as stated";
  }
  return out;
}

}  // namespace rejoinder
