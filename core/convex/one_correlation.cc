#include "core/convex/one_correlation.h"

#include <algorithm>
#include <cmath>

namespace rejoinder {
namespace {

// Range of F over the box of t ratios at one correlation. 2F is convex in (t1, t2), so its maximum is at a
// corner; its minimum is 0 where the box holds the origin, else on an edge: at t2 = rho t1 for a fixed t1
// (value t1² / 2), or at a corner.
Interval f_over_box(const Interval& t1, const Interval& t2, double rho) {
  Interval out{kInfinity, 0};
  for (const double a : {t1.low, t1.high})
    for (const double b : {t2.low, t2.high}) {
      const double f = f_at_correlation(a, b, rho);
      out.low = std::min(out.low, f);
      out.high = std::max(out.high, f);
    }
  if (t1.contains(0) && t2.contains(0)) out.low = 0;
  for (const double a : {t1.low, t1.high})
    if (t2.contains(rho * a)) out.low = std::min(out.low, a * a / 2);
  for (const double b : {t2.low, t2.high})
    if (t1.contains(rho * b)) out.low = std::min(out.low, b * b / 2);
  return out;
}

// Where membership may change: F equal to an end of `f` at a corner, and the ratios at which an edge's inner
// minimum enters.
std::vector<double> candidates(const Interval& t1, const Interval& t2, const Interval& f) {
  std::vector<double> out = {-1, 1};
  const auto add = [&](double rho) {
    if (rho > -1 && rho < 1) out.push_back(rho);
  };
  for (const double a : {t1.low, t1.high})
    for (const double b : {t2.low, t2.high}) {
      for (const double k : {f.low, f.high})
        if (std::isfinite(k))
          if (const auto roots = correlations_below(a, b, k)) {
            add(roots->low);
            add(roots->high);
          }
      if (a != 0) add(b / a);
      if (b != 0) add(a / b);
    }
  std::sort(out.begin(), out.end());
  out.erase(std::unique(out.begin(), out.end()), out.end());
  return out;
}

}  // namespace

double f_at_correlation(double t1, double t2, double rho) {
  const double away = (1 - rho) * (1 + rho);
  if (away <= 0) {
    const double along = rho > 0 ? t1 - t2 : t1 + t2;
    return along == 0 ? t1 * t1 / 2 : kInfinity;
  }
  // (t1 - rho t2)² / (1 - rho²) + t2² is a sum of squares; the larger t stands apart so that nothing cancels.
  if (std::fabs(t1) > std::fabs(t2)) std::swap(t1, t2);
  const double rest = t1 - rho * t2;
  return (rest * rest / away + t2 * t2) / 2;
}

std::optional<Interval> correlations_below(double t1, double t2, double k) {
  const double two_k = 2 * k, larger = std::max(t1 * t1, t2 * t2);
  if (two_k < larger * (1 - 4e-16)) return std::nullopt;
  if (two_k == 0) return Interval{-1, 1};  // both ratios are zero, and so is F everywhere
  const double root = std::sqrt(two_k);
  const double product = std::max(0.0, (root - std::fabs(t1)) * (root + std::fabs(t1))) *
                         std::max(0.0, (root - std::fabs(t2)) * (root + std::fabs(t2)));
  const double swing = std::sqrt(product), centre = t1 * t2;
  return Interval{std::clamp((centre - swing) / two_k, -1.0, 1.0),
                  std::clamp((centre + swing) / two_k, -1.0, 1.0)};
}

std::vector<Interval> correlations_with_f(const Interval& t1, const Interval& t2, const Interval& f) {
  std::vector<Interval> out;
  // An exact box and the range "up to k" is one interval by the closed form, equal ratios included.
  if (t1.is_point() && t2.is_point() && f.low <= 0 && std::isfinite(f.high)) {
    if (const auto one = correlations_below(t1.low, t2.low, f.high)) out.push_back(*one);
    return out;
  }
  const auto member = [&](double rho) {
    const Interval range = f_over_box(t1, t2, rho);
    return range.low <= f.high && range.high >= f.low;
  };
  const std::vector<double> cuts = candidates(t1, t2, f);
  for (std::size_t i = 0; i + 1 < cuts.size(); ++i) {
    if (!member(cuts[i] + (cuts[i + 1] - cuts[i]) / 2)) continue;
    if (!out.empty() && out.back().high == cuts[i])
      out.back().high = cuts[i + 1];
    else
      out.push_back({cuts[i], cuts[i + 1]});
  }
  return out;
}

}  // namespace rejoinder
