#include "core/evidence/two_slopes.h"

#include <algorithm>
#include <cmath>
#include <queue>
#include <vector>

#include "core/convex/one_correlation.h"

namespace rejoinder {
namespace {

using Box = std::array<Interval, 4>;  // b1, b2, s1, s2

// Least and greatest of u1² + u2² + 2 rho u1 u2 for u in a box of non-negative sizes and rho in a range.
Interval variance_over(const Interval& u1, const Interval& u2, const Interval& rho) {
  const auto at = [](double x, double y, double r) { return x * x + y * y + 2 * r * x * y; };
  double least = kInfinity, most = 0;
  // Convex in (u1, u2) for each rho and rising in rho: the most at a corner, the least at rho.low on an edge or a corner.
  for (const double x : {u1.low, u1.high})
    for (const double y : {u2.low, u2.high}) most = std::max(most, at(x, y, rho.high));
  for (const double x : {u1.low, u1.high}) least = std::min(least, at(x, std::clamp(-rho.low * x, u2.low, u2.high), rho.low));
  for (const double y : {u2.low, u2.high}) least = std::min(least, at(std::clamp(-rho.low * y, u1.low, u1.high), y, rho.low));
  return {std::max(0.0, least * (1 - 1e-14)), most * (1 + 1e-14)};
}

// W over a part, all fitting correlations joined; nothing where none fits.
std::optional<Interval> wald_over(const TwoSlopes& slopes, const Box& box) {
  const Interval t1 = box[0] / box[2], t2 = box[1] / box[3];
  if (!std::isfinite(t1.low) || !std::isfinite(t1.high) || !std::isfinite(t2.low) || !std::isfinite(t2.high)) return Interval{0, kInfinity};
  const Interval d = slopes.a[0] * box[0] + slopes.a[1] * box[1] - Interval::point(slopes.r);
  const Interval u1 = std::fabs(slopes.a[0]) * box[2], u2 = std::fabs(slopes.a[1]) * box[3];
  const bool opposite = slopes.a[0] * slopes.a[1] < 0;
  std::optional<Interval> out;
  for (const Interval& rho : correlations_with_f(t1, t2, slopes.f)) {
    const Interval variance = variance_over(u1, u2, opposite ? -rho : rho);
    const double least = d.mignitude(), most = d.magnitude();
    const Interval here{variance.high > 0 ? least * least / variance.high : 0, variance.low > 0 ? most * most / variance.low : kInfinity};
    out = out ? join(*out, here) : here;
  }
  return out;
}

struct Part {
  Box box;
  double bound;  // of W on the part: the least for the low end, the greatest for the high end
};

// One end by best-first search: the part with the most promising bound is halved along its relatively widest side.
struct End {
  double guaranteed, attained;
};

std::optional<End> search(const TwoSlopes& slopes, const Box& whole, bool high, double agreement, int parts) {
  const double sign = high ? 1 : -1;
  const auto worse = [&](const Part& x, const Part& y) { return sign * x.bound < sign * y.bound; };
  std::priority_queue<Part, std::vector<Part>, decltype(worse)> open(worse);
  const auto first = wald_over(slopes, whole);
  if (!first) return std::nullopt;
  open.push({whole, high ? first->high : first->low});
  double attained = high ? -kInfinity : kInfinity;
  std::array<double, 4> size;
  for (int i = 0; i < 4; ++i) size[static_cast<std::size_t>(i)] = std::max(whole[static_cast<std::size_t>(i)].width(), 1e-300);
  for (int done = 0; done < parts && !open.empty(); ++done) {
    const Part part = open.top();
    if (std::isfinite(attained) && std::fabs(part.bound - attained) <= agreement * std::fabs(attained)) break;
    open.pop();
    // The middle and the corners of the part are points: their own narrow enclosures hold values that are attained.
    for (int corner = -1; corner < 16; ++corner) {
      Box point;
      for (int i = 0; i < 4; ++i) {
        const Interval& side = part.box[static_cast<std::size_t>(i)];
        point[static_cast<std::size_t>(i)] = Interval::point(corner < 0 ? side.middle() : (corner >> i) & 1 ? side.high : side.low);
      }
      if (const auto here = wald_over(slopes, point)) attained = high ? std::max(attained, here->high) : std::min(attained, here->low);
      if (corner < 0 && done > 500) break;  // deep parts: their middle is as good
    }
    int widest = 0;
    double most = -1;
    for (int i = 0; i < 4; ++i) {
      const double relative = part.box[static_cast<std::size_t>(i)].width() / size[static_cast<std::size_t>(i)];
      if (size[static_cast<std::size_t>(i)] > 1e-300 && relative > most) {
        most = relative;
        widest = i;
      }
    }
    const Interval side = part.box[static_cast<std::size_t>(widest)];
    if (side.width() <= 0) {
      open.push(part);
      break;
    }
    for (const Interval& half : {Interval{side.low, side.middle()}, Interval{side.middle(), side.high}}) {
      Part next = part;
      next.box[static_cast<std::size_t>(widest)] = half;
      const auto bound = wald_over(slopes, next.box);
      if (!bound) continue;
      next.bound = high ? std::min(bound->high, part.bound) : std::max(bound->low, part.bound);
      open.push(next);
    }
  }
  if (open.empty()) return std::isfinite(attained) ? std::optional<End>({attained, attained}) : std::nullopt;
  return End{open.top().bound, attained};
}

}  // namespace

std::optional<TwoSlopesLimits> two_slopes_limits(const TwoSlopes& slopes, double agreement, int parts) {
  const Box whole = {slopes.b[0], slopes.b[1], slopes.s[0], slopes.s[1]};
  const auto low = search(slopes, whole, false, agreement, parts), high = search(slopes, whole, true, agreement, parts);
  if (!low || !high) return std::nullopt;
  TwoSlopesLimits out;
  out.wald = {std::max(0.0, low->guaranteed), std::max(low->guaranteed, high->guaranteed)};
  const double from = std::clamp(low->attained, out.wald.low, out.wald.high), to = std::clamp(high->attained, out.wald.low, out.wald.high);
  out.attained = {std::min(from, to), std::max(from, to)};
  return out;
}

}  // namespace rejoinder
