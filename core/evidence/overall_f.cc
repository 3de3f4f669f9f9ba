#include "core/evidence/overall_f.h"

#include <algorithm>
#include <cmath>

#include "core/convex/one_correlation.h"
#include "core/evidence/column_limits.h"
#include "core/evidence/two_slopes.h"
#include "core/number/number_text.h"

namespace rejoinder {
namespace {

struct OverallF {
  Interval f;
  std::vector<Cell> cells;
  std::string from;
};

std::optional<OverallF> overall_f(const Column& column, double k, double df) {
  OverallF out{{0, kInfinity}, {}, ""};
  if (column.overall_f) {
    out.f = column.overall_f->possible;
    out.cells.push_back({column.id, "", "overall_f"});
    out.from = "overall F = " + column.overall_f->text;
  }
  if (column.r2 && column.fixed_effects == 0) {
    const Interval r2{std::max(0.0, column.r2->possible.low), std::min(1.0, column.r2->possible.high)};
    const Interval by_r2 = r2 / (Interval::point(1) - r2) * (Interval::point(df) / Interval::point(k));
    const auto both = meet(out.f, by_r2);
    if (!both) return std::nullopt;  // the fit route tells that these two do not go together
    out.f = *both;
    out.cells.push_back({column.id, "", "r2"});
    out.from += (out.from.empty() ? "" : ", ") + ("R² = " + column.r2->text);
  }
  if (out.cells.empty() || !std::isfinite(out.f.high)) return std::nullopt;
  return out;
}

bool tests_slopes_only(const JointTest& test) {
  return std::none_of(test.restrictions->terms.begin(), test.restrictions->terms.end(), [&](const TermName& name) {
    const Term* term = test.column->term(name.term);
    return term && term->intercept;
  });
}

// Two slopes: their t ratios and the overall F leave at most two ranges for the correlation of the estimates.
RouteAnswer two_slopes(const JointTest& test, const OverallF& whole) {
  RouteAnswer out;
  const Column& column = *test.column;
  std::vector<const Term*> terms;
  for (const Term& term : column.terms)
    if (!term.intercept) terms.push_back(&term);
  if (terms.size() != 2) return out;
  ColumnSet set = column_set(test, {false, false});
  if (set.set.size() != 2 || set.pairs_known > 0) return out;
  std::vector<Interval> t;
  for (const std::string& name : set.terms) {
    const Term* term = column.term(name);
    if (!term) return out;
    const CoefficientLimits limits = coefficient_limits(*test.review, column, *term, test.df.denominator);
    if (!limits.consistent || !std::isfinite(limits.t.low) || !std::isfinite(limits.t.high)) return out;
    t.push_back(limits.t);
  }
  const std::vector<Interval> ranges = correlations_with_f(t[0], t[1], whole.f);
  if (ranges.empty()) {
    Clash clash;
    clash.where = column.id + " / overall_f, t";
    clash.says = "No correlation of the two estimates gives the " + whole.from + " together with their t ratios, rounding allowed for.";
    clash.cells = whole.cells;
    out.clashes.push_back(std::move(clash));
    return out;
  }
  if (test.q != 1) return out;
  TwoSlopes slopes;
  for (std::size_t i = 0; i < 2; ++i) {
    slopes.b[i] = set.limits[i].b;
    slopes.s[i] = set.limits[i].s;
    slopes.a[i] = set.R(0, static_cast<int>(i));
    if (!std::isfinite(slopes.b[i].low) || !std::isfinite(slopes.b[i].high) || !std::isfinite(slopes.s[i].high)) return out;
  }
  slopes.f = whole.f;
  slopes.r = set.r(0);
  const auto limits = two_slopes_limits(slopes);
  if (!limits) return out;
  Evidence e;
  e.route = Route::Facts;
  e.df = test.df;
  e.wald = limits->wald;
  e.attained = limits->attained;
  e.low = e.high = Sharpness::Guaranteed;
  e.p = p_of_wald(test, e.wald);
  std::string roots;
  for (const Interval& range : ranges) roots += (roots.empty() ? "" : " or ") + number_text(range.low) + " to " + number_text(range.high);
  e.working.push_back("two slopes and " + whole.from + ": the correlation of the estimates lies within " + roots);
  e.working.push_back("over these F lies between " + number_text(e.wald.low / test.q, ShowRounding::Down) + " and " +
                      number_text(e.wald.high / test.q, ShowRounding::Up));
  e.rests_on = set.cells;
  e.rests_on.insert(e.rests_on.end(), whole.cells.begin(), whole.cells.end());
  out.evidence = std::move(e);
  return out;
}

}  // namespace

RouteAnswer overall_f_evidence(const JointTest& test) {
  RouteAnswer out;
  if (!test.column || !test.restrictions || test.statistic != Statistic::F) return out;
  const Column& column = *test.column;
  const std::optional<long> k = slopes(column);
  // Where the kind of errors is not stated, the overall F and the table may follow different ones.
  const bool conventional = column.estimator == Estimator::Ols && !column.weights && column.errors == Errors::Classical;
  if (!conventional || !column.k || !k || *k < 1 || !column.intercept || column.fixed_effects > 0 || !tests_slopes_only(test)) return out;
  if (!std::isfinite(test.df.denominator) || test.all_slopes) return out;
  const auto whole = overall_f(column, static_cast<double>(*k), test.df.denominator);
  if (!whole) return out;
  if (*k == 2) {
    out = two_slopes(test, *whole);
    if (out.evidence || !out.clashes.empty()) {
      if (out.evidence) out.evidence->assumes.push_back("the overall F uses the same conventional errors");
      return out;
    }
  }
  if (!test.restrictions->values.isZero(0)) return out;
  Evidence e;
  e.route = Route::Facts;
  e.df = test.df;
  e.wald = {0, step_up(static_cast<double>(*k) * whole->f.high)};
  e.p = p_of_wald(test, e.wald);
  e.low = e.high = Sharpness::Guaranteed;
  e.assumes.push_back("the overall F uses the same conventional errors");
  e.working.push_back("a part cannot beat the whole: W ≤ k × overall F, so F ≤ " + df_text(static_cast<double>(*k)) + " × " +
                      number_text(whole->f.high, ShowRounding::Up) + " / " + std::to_string(test.q) + " = " +
                      number_text(e.wald.high / test.q, ShowRounding::Up) + " (" + whole->from + ")");
  e.rests_on = whole->cells;
  out.evidence = std::move(e);
  return out;
}

}  // namespace rejoinder
