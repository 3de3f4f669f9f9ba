#include "core/judge/correlation_lens.h"

#include <algorithm>
#include <cmath>

#include "core/convex/one_correlation.h"
#include "core/convex/rejecting_share.h"
#include "core/evidence/column_limits.h"

namespace rejoinder {
namespace {

// One combination a1 b1 + a2 b2 = r of two estimates with unknown correlation rho: W = d² / var(rho),
// var(rho) = a1² s1² + a2² s2² + 2 a1 a2 s1 s2 rho, over boxes of d, s1, s2.
struct Pair {
  Interval d;         // a1 b1 + a2 b2 - r
  Interval u1, u2;    // |a1| s1, |a2| s2
  double sign = 1;    // of a1 a2: var grows with sign * rho
  Interval allowed{-1, 1};

  static double variance(double u1, double u2, double rho) { return std::max(0.0, u1 * u1 + u2 * u2 + 2 * rho * u1 * u2); }

  // Greatest variance over the box: convex in (u1, u2) for |rho| <= 1, so at a corner.
  double greatest(double rho) const {
    const double r = sign * rho;
    return std::max({variance(u1.low, u2.low, r), variance(u1.low, u2.high, r), variance(u1.high, u2.low, r), variance(u1.high, u2.high, r)});
  }
  // Least variance: inside an edge where the other size balances it, else at a corner.
  double least(double rho) const {
    const double r = sign * rho;
    double out = kInfinity;
    for (const double a : {u1.low, u1.high}) out = std::min(out, variance(a, std::clamp(-r * a, u2.low, u2.high), r));
    for (const double b : {u2.low, u2.high}) out = std::min(out, variance(std::clamp(-r * b, u1.low, u1.high), b, r));
    return out;
  }
  double least_wald(double rho) const {
    const double d0 = d.mignitude();
    return d0 == 0 ? 0 : d0 * d0 / greatest(rho);
  }
  double greatest_wald(double rho) const {
    const double d1 = d.magnitude(), v = least(rho);
    if (d1 == 0) return 0;
    return v > 0 ? d1 * d1 / v : kInfinity;
  }
};

std::optional<Pair> pair_of(const JointTest& test, const ColumnSet& set) {
  if (test.q != 1 || set.set.size() != 2 || set.pairs_known > 0 || set.in_ratios) return std::nullopt;
  const double a1 = set.R(0, 0), a2 = set.R(0, 1);
  if (a1 == 0 || a2 == 0) return std::nullopt;
  Pair pair;
  pair.d = a1 * set.limits[0].b + a2 * set.limits[1].b - Interval::point(set.r(0));
  pair.u1 = std::fabs(a1) * Interval{set.set.se_low(0), set.set.se_high(0)};
  pair.u2 = std::fabs(a2) * Interval{set.set.se_low(1), set.set.se_high(1)};
  pair.sign = a1 * a2 > 0 ? 1 : -1;
  if (!std::isfinite(pair.d.low) || !std::isfinite(pair.d.high) || !std::isfinite(pair.u1.high) || !std::isfinite(pair.u2.high))
    return std::nullopt;
  pair.allowed = set.set.every_correlation;
  return pair;
}

// The part of [low, high] where holds() is true, for a condition that changes at most once along it.
template <class Holds>
std::optional<Interval> where(const Interval& range, Holds holds) {
  const bool at_low = holds(range.low), at_high = holds(range.high);
  if (at_low && at_high) return range;
  if (!at_low && !at_high) return std::nullopt;
  double a = range.low, b = range.high;
  for (int i = 0; i < 200 && a < b; ++i) {
    const double middle = a + (b - a) / 2;
    if (middle <= a || middle >= b) break;
    (holds(middle) == at_low ? a : b) = middle;
  }
  return at_low ? Interval{range.low, a} : Interval{b, range.high};
}

std::vector<Interval> as_list(const std::optional<Interval>& one) { return one ? std::vector<Interval>{*one} : std::vector<Interval>{}; }

std::vector<Interval> cut(const std::vector<Interval>& sets, const Interval& allowed) {
  std::vector<Interval> out;
  for (const Interval& one : sets)
    if (const auto both = meet(one, allowed)) out.push_back(*both);
  return out;
}

void lens_of_combination(Finding& finding, const Pair& pair, const JointTest& test, const Reported& said, const ColumnSet& set) {
  const double critical = critical_wald(test);
  CorrelationSets lens;
  lens.terms = set.terms;
  lens.does_not_reject = as_list(where(pair.allowed, [&](double rho) { return pair.least_wald(rho) < critical; }));
  Interval wanted{0, kInfinity};
  if (said.wald) wanted = *said.wald;
  if (said.wald_of_p) wanted = meet(wanted, *said.wald_of_p).value_or(Interval{-1, -1});
  if (said.any) {
    const auto low_enough = where(pair.allowed, [&](double rho) { return pair.least_wald(rho) <= wanted.high; });
    const auto high_enough = where(pair.allowed, [&](double rho) { return pair.greatest_wald(rho) >= wanted.low; });
    if (low_enough && high_enough) lens.fits = as_list(meet(*low_enough, *high_enough));
  }
  finding.correlation = std::move(lens);
}

void lens_of_exclusion(Finding& finding, const JointTest& test, const Reported& said, const ColumnSet& set) {
  const Interval allowed = set.set.every_correlation;
  const double critical = critical_wald(test) / test.q;
  CorrelationSets lens;
  lens.terms = set.terms;
  lens.does_not_reject = cut(correlations_with_f(set.ratios[0], set.ratios[1], {0, critical}), allowed);
  if (said.any) {
    Interval wanted{0, kInfinity};
    if (said.wald) wanted = *said.wald;
    if (said.wald_of_p) wanted = meet(wanted, *said.wald_of_p).value_or(Interval{-1, -1});
    if (wanted.high >= 0)
      lens.fits = cut(correlations_with_f(set.ratios[0], set.ratios[1], {wanted.low / test.q, wanted.high / test.q}), allowed);
  }
  finding.correlation = std::move(lens);
}

}  // namespace

std::optional<Interval> turning_correlation(const JointTest& test) {
  if (test.basis != Basis::Column || !test.restrictions) return std::nullopt;
  const ColumnSet set = column_set(test, {false, false});
  const std::optional<Pair> pair = pair_of(test, set);
  if (!pair) return std::nullopt;
  const double critical = critical_wald(test);
  const auto open = where(pair->allowed, [&](double rho) { return pair->least_wald(rho) < critical; });
  const auto rejecting = where(pair->allowed, [&](double rho) { return pair->greatest_wald(rho) >= critical; });
  if (!open || !rejecting) return std::nullopt;
  const auto both = meet(*open, *rejecting);
  if (!both || (*both == pair->allowed)) return std::nullopt;
  return both;
}

void add_correlation_lens(Finding& finding, const JointTest& test, const Reported& said) {
  if (test.basis != Basis::Column || !test.restrictions) return;
  // A fit or a covariance already says what the correlation would: the lens is for what the print leaves open.
  if (std::none_of(finding.evidence.begin(), finding.evidence.end(), [](const Evidence& e) { return e.route == Route::Estimates; })) return;
  const ColumnSet set = column_set(test);
  if (const auto pair = pair_of(test, set)) {
    lens_of_combination(finding, *pair, test, said, set);
    return;
  }
  if (!set.in_ratios || test.q < 2) return;
  for (const Interval& t : set.ratios)
    if (!std::isfinite(t.low) || !std::isfinite(t.high)) return;
  if (test.q == 2 && set.pairs_known == 0) lens_of_exclusion(finding, test, said, set);
  if (!set.assumed_correlations) finding.share_rejecting = share_rejecting(set.ratios, set.set.correlations, critical_wald(test));
}

}  // namespace rejoinder
