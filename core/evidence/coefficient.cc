#include "core/evidence/coefficient.h"

#include <algorithm>
#include <cmath>

#include "core/number/number_text.h"
#include "core/statistics/tails.h"

namespace rejoinder {
namespace {

// The figures of one coefficient as intervals, each with the key it was printed under.
struct Figures {
  Interval b = Interval::everything(), s{0, kInfinity}, t = Interval::everything();
  bool has_ci = false;
  Interval ci_low, ci_high, ci_quantile;  // the ends of the confidence interval and its multiplier of s
  std::vector<std::string> keys;
};

// |t| that goes with two-sided p in `p`, by t with the df, and by the normal too where the paper may have used it.
Interval ratio_of_p(const Interval& p, double df, bool normal_too) {
  const auto one = [](double value, double at_df) {
    if (value <= 0) return kInfinity;
    if (value >= 1) return 0.0;
    return t_critical(value / 2, at_df);
  };
  Interval out{one(p.high, df), one(p.low, df)};
  if (normal_too) out = join(out, {one(p.high, kInfinity), one(p.low, kInfinity)});
  return out;
}

// Two-sided p that `count` stars say, by the review's levels (largest first).
Interval p_of_stars(const Review& review, int count) {
  std::vector<double> levels = review.stars;
  std::sort(levels.rbegin(), levels.rend());
  const int known = static_cast<int>(levels.size());
  const int m = std::min(count, known);
  return {m < known ? levels[static_cast<std::size_t>(m)] : 0.0, m > 0 ? levels[static_cast<std::size_t>(m - 1)] : 1.0};
}

// Cuts `target` down to what `by` leaves of it; false where nothing is left. Ends that miss each other by floating point noise
// alone, as half units of rounding may, still touch.
bool narrow(Interval& target, const Interval& by) {
  if (const std::optional<Interval> both = meet(target, by)) {
    target = *both;
    return true;
  }
  const double below = target.high < by.low ? target.high : by.high, above = target.high < by.low ? by.low : target.low;
  if (above - below > 1e-12 * std::max(std::fabs(above), std::fabs(below))) return false;
  target = {below, above};
  return true;
}

using Polygon = std::vector<CoefficientPoint>;

// Keeps the part where weight_b b + weight_s s <= limit.
Polygon clip(const Polygon& polygon, double weight_b, double weight_s, double limit) {
  Polygon out;
  const auto excess = [&](const CoefficientPoint& p) { return weight_b * p.b + weight_s * p.s - limit; };
  for (std::size_t i = 0; i < polygon.size(); ++i) {
    const CoefficientPoint &here = polygon[i], &next = polygon[(i + 1) % polygon.size()];
    const double scale = std::fabs(weight_b) * std::max(std::fabs(here.b), std::fabs(next.b)) +
                         std::fabs(weight_s) * std::max(here.s, next.s) + std::fabs(limit);
    const double slack = 1e-13 * scale;
    const double a = excess(here), b = excess(next);
    if (a <= slack) out.push_back(here);
    if ((a < -slack && b > slack) || (a > slack && b < -slack)) {
      const double u = a / (a - b);
      out.push_back({here.b + u * (next.b - here.b), here.s + u * (next.s - here.s)});
    }
  }
  return out;
}

Interval quotient_over(const Polygon& polygon, double r) {
  Interval out{kInfinity, -kInfinity};
  for (const CoefficientPoint& p : polygon) {
    const double d = p.b - r;
    if (p.s <= 0) {
      if (d >= 0) out.high = kInfinity;
      if (d <= 0) out.low = -kInfinity;
      if (d == 0) out = join(out, Interval::point(0));
      continue;
    }
    const double t = d / p.s;
    out.low = std::min(out.low, t);
    out.high = std::max(out.high, t);
  }
  // A polygon that touches s = 0 has t ratios that run off; the corner there gave the infinite end, the others the rest.
  if (out.low > out.high) std::swap(out.low, out.high);
  return out;
}

// Boxes first: what each figure says of the others, until nothing narrows. False where something cannot be met.
bool narrow_boxes(Figures& f) {
  for (int round = 0; round < 4; ++round) {
    if (f.has_ci) {
      // L = b - z s and H = b + z s.
      if (!narrow(f.b, 0.5 * (f.ci_low + f.ci_high))) return false;
      const Interval width = f.ci_high - f.ci_low;
      if (width.high < 0) return false;
      if (!narrow(f.s, Interval{std::max(0.0, width.low), width.high} / (2 * f.ci_quantile))) return false;
    }
    if (std::isfinite(f.b.low) && std::isfinite(f.b.high) && f.s.high > 0 && !narrow(f.t, f.b / f.s)) return false;
    if (std::isfinite(f.s.high) && std::isfinite(f.t.low) && std::isfinite(f.t.high) && !narrow(f.b, f.t * f.s)) return false;
    if (std::isfinite(f.b.low) && std::isfinite(f.b.high) && !f.t.contains(0) && !narrow(f.s, f.b / f.t)) return false;
  }
  return true;
}

// The exact set where b and s are bounded: one polygon for each sign of b, with |b| / s in `size_of_t`.
std::vector<Polygon> pieces_of(const Figures& f, const Interval& size_of_t) {
  std::vector<Polygon> out;
  const Polygon box = {{f.b.low, f.s.low}, {f.b.high, f.s.low}, {f.b.high, f.s.high}, {f.b.low, f.s.high}};
  for (const double sign : {1.0, -1.0}) {
    if (sign > 0 ? f.b.high < 0 : f.b.low > 0) continue;
    Polygon piece = clip(box, -sign, 0, 0);
    if (std::isfinite(size_of_t.high)) piece = clip(piece, sign, -size_of_t.high, 0);
    if (size_of_t.low > 0) piece = clip(piece, -sign, size_of_t.low, 0);
    if (std::isfinite(f.t.high)) piece = clip(piece, 1, -f.t.high, 0);
    if (std::isfinite(f.t.low)) piece = clip(piece, -1, f.t.low, 0);
    if (f.has_ci) {
      // Each end of the interval may be that of either multiplier, so each half-plane takes the weaker one (s >= 0).
      const Interval& z = f.ci_quantile;
      piece = clip(piece, 1, -z.high, f.ci_low.high);
      piece = clip(piece, -1, z.low, -f.ci_low.low);
      piece = clip(piece, 1, z.low, f.ci_high.high);
      piece = clip(piece, -1, -z.high, -f.ci_high.low);
    }
    if (!piece.empty()) out.push_back(std::move(piece));
  }
  return out;
}

struct Reading {
  Printed coef, se, t, p;
  PrintedPair ci;
  double ci_level = 0.95;
  bool ratio = false;
  std::optional<int> stars;
};

std::string joined(const std::vector<std::string>& words) {
  std::string out;
  for (const std::string& word : words) out += (out.empty() ? "" : ", ") + word;
  return out;
}

CoefficientLimits limits(const Review& review, const Column& column, const std::string& name, const Reading& printed,
                         double df, bool use_stars, bool normal_too) {
  CoefficientLimits out;
  Figures f;
  Interval size_of_t{0, kInfinity};
  const auto use = [&](const char* key) {
    f.keys.push_back(key);
    out.cells.push_back({column.id, name, key});
  };
  const auto scale = [&](const Interval& x) { return printed.ratio ? log(x) : x; };
  bool fits = true;
  if (printed.coef) {
    fits = narrow(f.b, scale(printed.coef->possible)) && fits;
    use(printed.ratio ? "ratio" : "coef");
  }
  if (printed.se) {
    fits = narrow(f.s, printed.se->possible) && fits;
    use("se");
  }
  if (printed.t) {
    fits = narrow(f.t, printed.t->possible) && fits;
    use("t");
  }
  if (printed.ci) {
    f.has_ci = true;
    f.ci_low = scale((*printed.ci)[0].possible);
    f.ci_high = scale((*printed.ci)[1].possible);
    f.ci_quantile = ratio_of_p(Interval::point(1 - printed.ci_level), df, normal_too);
    use("ci");
  }
  if (printed.p) {
    fits = static_cast<bool>(meet(size_of_t, ratio_of_p(printed.p->possible, df, normal_too))) && fits;
    size_of_t = meet(size_of_t, ratio_of_p(printed.p->possible, df, normal_too)).value_or(size_of_t);
    use("p");
  }
  if (printed.stars && use_stars) {
    const auto both = meet(size_of_t, ratio_of_p(p_of_stars(review, *printed.stars), df, normal_too));
    fits = both && fits;
    size_of_t = both.value_or(size_of_t);
    use("stars");
  }
  out.known = !f.keys.empty();
  if (!out.known) return out;

  // The sign of t is that of b; where it is known the size of t narrows t itself.
  if (fits && f.b.low >= 0) f.t.low = std::max(f.t.low, 0.0);
  if (fits && f.b.high <= 0) f.t.high = std::min(f.t.high, 0.0);
  if (fits && f.t.low > f.t.high) fits = false;
  if (fits && f.t.low >= 0) fits = narrow(f.t, size_of_t);
  else if (fits && f.t.high <= 0) fits = narrow(f.t, -size_of_t);
  else if (fits && std::isfinite(size_of_t.high)) fits = narrow(f.t, {-size_of_t.high, size_of_t.high});

  fits = fits && narrow_boxes(f);
  if (fits && std::isfinite(f.b.low) && std::isfinite(f.b.high) && std::isfinite(f.s.high)) {
    out.pieces = pieces_of(f, size_of_t);
    fits = !out.pieces.empty();
    if (fits) {
      Interval b{kInfinity, -kInfinity}, s{kInfinity, -kInfinity}, t{kInfinity, -kInfinity};
      for (const Polygon& piece : out.pieces) {
        for (const CoefficientPoint& p : piece) {
          b = {std::min(b.low, p.b), std::max(b.high, p.b)};
          s = {std::min(s.low, p.s), std::max(s.high, p.s)};
        }
        const Interval quotient = quotient_over(piece, 0);
        t = {std::min(t.low, quotient.low), std::max(t.high, quotient.high)};
      }
      f.b = b;
      f.s = {std::max(0.0, s.low), s.high};
      f.t = meet(f.t, t).value_or(t);
    }
  }
  out.b = f.b;
  out.s = f.s;
  out.t = f.t;
  out.consistent = fits;
  if (!fits) {
    Clash clash;
    clash.where = column.id + " / " + name + " / " + joined(f.keys);
    clash.says = "The figures printed for “" + name + "” (" + joined(f.keys) +
                 ") cannot all come from one estimate and one standard error, rounding allowed for.";
    clash.cells = out.cells;
    out.clashes.push_back(std::move(clash));
  }
  return out;
}

// The strict reading first; where its figures do not go together, the innocent conventions that a paper may have used without
// saying so: p and intervals by the normal, then stars of another kind.
CoefficientLimits best_reading(const Review& review, const Column& column, const std::string& name, const Reading& printed,
                               double df) {
  const bool robust = column.errors == Errors::Robust || column.errors == Errors::Clustered;
  const CoefficientLimits strict = limits(review, column, name, printed, df, true, robust);
  if (strict.consistent) return strict;
  const CoefficientLimits normal = limits(review, column, name, printed, df, true, true);
  if (normal.consistent) return normal;
  if (!printed.stars) return strict;
  for (const bool normal_too : {robust, true}) {
    CoefficientLimits rest = limits(review, column, name, printed, df, false, normal_too);
    if (!rest.known || !rest.consistent) continue;
    rest.without_stars = true;
    rest.clashes = strict.clashes;
    for (Clash& clash : rest.clashes) {
      clash.mild = true;
      clash.says += " Without the stars they do; stars may follow another convention, one-sided for example.";
    }
    return rest;
  }
  return strict;
}

}  // namespace

Interval CoefficientLimits::t_about(double r) const {
  if (r == 0) return t;
  if (pieces.empty()) {
    if (!std::isfinite(b.low) && !std::isfinite(b.high)) return Interval::everything();
    return (b - Interval::point(r)) / s;
  }
  Interval out{kInfinity, -kInfinity};
  for (const auto& piece : pieces) {
    const Interval quotient = quotient_over(piece, r);
    out = {std::min(out.low, quotient.low), std::max(out.high, quotient.high)};
  }
  return out;
}

CoefficientLimits coefficient_limits(const Review& review, const Column& column, const Term& term, double denominator_df) {
  Reading printed{term.ratio ? term.ratio : term.coef, term.se, term.t, term.p, term.ci, term.ci_level,
                  term.ratio.has_value(), term.stars};
  return best_reading(review, column, term.name, printed, denominator_df);
}

CoefficientLimits combination_limits(const Review& review, const Column& column, const Fact& fact, double denominator_df) {
  Reading printed{fact.value, fact.se, fact.t, fact.p, fact.ci, fact.ci_level, false, std::nullopt};
  return best_reading(review, column, fact.of, printed, denominator_df);
}

}  // namespace rejoinder
