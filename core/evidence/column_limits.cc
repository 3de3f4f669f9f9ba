#include "core/evidence/column_limits.h"

#include <algorithm>
#include <cmath>

#include "core/evidence/hidden_covariances.h"
#include "core/number/number_text.h"

namespace rejoinder {
namespace {

Sharpness sharpness_of(const GreatestWald& greatest) {
  switch (greatest.kind) {
    case GreatestWald::Exact:
    case GreatestWald::Infinite:
      return Sharpness::Exact;
    case GreatestWald::Guaranteed:
      return Sharpness::Guaranteed;
    case GreatestWald::NotBounded:
      break;
  }
  return Sharpness::NotBounded;
}

// Which single term has the largest least |t|, for the sentence that carries most findings.
int leading_term(const ColumnSet& set) {
  int best = -1;
  double most = 0;
  for (int j = 0; j < set.set.size(); ++j) {
    const Interval& t = set.ratios[static_cast<std::size_t>(j)];
    if (t.mignitude() > most) {
      most = t.mignitude();
      best = j;
    }
  }
  return best;
}

void exclusion_working(const JointTest& test, const ColumnSet& set, const Interval& wald, Evidence& e) {
  for (int j = 0; j < set.set.size(); ++j) {
    const Interval& t = set.ratios[static_cast<std::size_t>(j)];
    const std::string& term = set.terms[static_cast<std::size_t>(j)];
    if (std::isfinite(t.low) && std::isfinite(t.high))
      e.working.push_back("t of " + term + " lies between " + number_text(t.low, ShowRounding::Down) + " and " +
                          number_text(t.high, ShowRounding::Up));
    else if (t.mignitude() > 0)
      e.working.push_back("|t| of " + term + " is at least " + number_text(t.mignitude(), ShowRounding::Down));
  }
  if (test.q == 1) {
    e.working.push_back("one restriction: F = t², so F lies between " + number_text(wald.low, ShowRounding::Down) + " and " +
                        number_text(wald.high, ShowRounding::Up));
    return;
  }
  const int lead = leading_term(set);
  if (lead >= 0 && set.pairs_known == 0 && !set.assumed_correlations) {
    const double least = std::sqrt(wald.low);
    e.working.push_back("W is at least the largest t², whatever the covariances: F ≥ " + number_text(least, ShowRounding::Down) +
                        "² / " + std::to_string(test.q) + " = " + number_text(wald.low / test.q, ShowRounding::Down) +
                        ", carried by " + set.terms[static_cast<std::size_t>(lead)]);
  } else {
    e.working.push_back("least W = " + number_text(wald.low, ShowRounding::Down) + ", so F ≥ " +
                        number_text(wald.low / test.q, ShowRounding::Down));
  }
}

// One restriction on several terms: a difference, a sum, any combination.
void combination_working(const ColumnSet& set, const Interval& wald, Evidence& e) {
  Interval d = Interval::point(-set.r(0));
  double most = 0, longest = 0, total_low = 0;
  for (int j = 0; j < set.set.size(); ++j) {
    const double weight = set.R(0, j);
    if (weight == 0) continue;
    const CoefficientLimits& limits = set.limits[static_cast<std::size_t>(j)];
    d = d + weight * limits.b;
    most += std::fabs(weight) * set.set.se_high(j);
    total_low += std::fabs(weight) * set.set.se_high(j);
    longest = std::max(longest, std::fabs(weight) * (set.set.se_low(j) + set.set.se_high(j)));
  }
  const double least = std::max(0.0, longest - total_low);
  if (!std::isfinite(d.low) || !std::isfinite(d.high)) return;
  e.working.push_back("the combination lies between " + number_text(d.low, ShowRounding::Down) + " and " +
                      number_text(d.high, ShowRounding::Up));
  if (set.pairs_known == 0 && !set.assumed_correlations && set.facts == 0 && std::isfinite(most))
    e.working.push_back("its standard error lies between " + number_text(least, ShowRounding::Down) + " and " +
                        number_text(most, ShowRounding::Up) + ", whatever the correlation of the estimates");
  if (std::isinf(wald.high))
    e.working.push_back("so |t| is at least " + number_text(std::sqrt(wald.low), ShowRounding::Down) + ", and F = t²");
  else
    e.working.push_back("so |t| lies between " + number_text(std::sqrt(wald.low), ShowRounding::Down) + " and " +
                        number_text(std::sqrt(wald.high), ShowRounding::Up) + ", and F = t²");
}

void general_working(const JointTest& test, const ColumnSet& set, const LeastWald& least, const Interval& wald, Evidence& e) {
  if (set.facts == 0 && set.pairs_known == 0 && !set.assumed_correlations) {
    const double shift = std::sqrt(wald.low);
    e.working.push_back("for the restrictions to hold, the coefficients must be allowed to move by at least " +
                        number_text(shift, ShowRounding::Down) + " of their standard errors, all at once");
    e.working.push_back("so W ≥ " + number_text(shift, ShowRounding::Down) + "² and F ≥ " +
                        number_text(wald.low / test.q, ShowRounding::Down));
    if (least.shifted.size() == set.set.size())
      for (int j = 0; j < set.set.size(); ++j)
        e.working.push_back("  " + set.terms[static_cast<std::size_t>(j)] + " from " + number_text(set.set.centre(j)) + " to " +
                            number_text(least.shifted(j)));
  } else {
    e.working.push_back("least W = " + number_text(wald.low, ShowRounding::Down) + ", so F ≥ " +
                        number_text(wald.low / test.q, ShowRounding::Down) + " (" + least.method + ")");
  }
}

// W at the figures as printed, for the reader's own calculator.
std::optional<double> printed_wald(const ColumnSet& set) {
  const int p = set.set.size();
  Eigen::MatrixXd V = Eigen::MatrixXd::Zero(p, p);
  for (int i = 0; i < p; ++i) {
    const Interval variance = set.set.variance(i);
    if (!std::isfinite(variance.high) || !std::isfinite(set.set.half_width(i))) return std::nullopt;
    V(i, i) = variance.middle();
  }
  for (const PairInterval& pair : set.set.correlations)
    V(pair.i, pair.j) = V(pair.j, pair.i) = pair.value.middle() * std::sqrt(V(pair.i, pair.i) * V(pair.j, pair.j));
  for (const PairInterval& pair : set.set.covariances) V(pair.i, pair.j) = V(pair.j, pair.i) = pair.value.middle();
  const double wald = wald_at(set.R, set.r, set.set.centre, V);
  if (!std::isfinite(wald) || wald < 0) return std::nullopt;
  return wald;
}

bool as_good_as_exact(const Interval& x) { return x.width() <= 1e-15 * x.magnitude(); }

// Coefficients and covariances printed without rounding: one W, computed and not bounded. Absent where anything is rounded,
// unknown or singular.
std::optional<double> exact_wald(const ColumnSet& set) {
  const int p = set.set.size();
  if (set.pairs_known < set.pairs || set.facts > 0) return std::nullopt;
  Eigen::MatrixXd V = Eigen::MatrixXd::Zero(p, p);
  for (int i = 0; i < p; ++i) {
    const Interval variance = set.set.variance(i);
    if (!(set.set.half_width(i) <= 1e-15 * std::fabs(set.set.centre(i))) || !(variance.width() <= 4e-15 * variance.high)) return std::nullopt;
    V(i, i) = variance.middle();
  }
  for (const PairInterval& pair : set.set.correlations) {
    if (!as_good_as_exact(pair.value)) return std::nullopt;
    V(pair.i, pair.j) = V(pair.j, pair.i) = pair.value.middle() * std::sqrt(V(pair.i, pair.i) * V(pair.j, pair.j));
  }
  for (const PairInterval& pair : set.set.covariances) {
    if (!as_good_as_exact(pair.value)) return std::nullopt;
    V(pair.i, pair.j) = V(pair.j, pair.i) = pair.value.middle();
  }
  const double wald = wald_at(set.R, set.r, set.set.centre, V);
  if (!std::isfinite(wald) || wald < 0) return std::nullopt;
  return wald;
}

LeastWald least_at(double wald) {
  LeastWald out;
  out.status = LimitStatus::Found;
  out.wald = out.attained = wald;
  out.exact = true;
  out.method = "the figures are exact";
  return out;
}

GreatestWald greatest_at(double wald) {
  GreatestWald out;
  out.status = LimitStatus::Found;
  out.attained = out.guaranteed = wald;
  out.kind = GreatestWald::Exact;
  out.method = "the figures are exact";
  return out;
}

// Exclusion with nothing known of the correlations: the largest squared t ratio, which needs no solver and takes half-lines.
LeastWald least_of_ratios(const ColumnSet& set) {
  double most = 0;
  for (const Interval& t : set.ratios) most = std::max(most, t.mignitude());
  LeastWald out;
  out.status = LimitStatus::Found;
  out.wald = out.attained = most * most;
  out.exact = true;
  out.method = "the largest squared t ratio";
  return out;
}

GreatestWald greatest_of_ratio(const ColumnSet& set) {
  GreatestWald out;
  out.status = LimitStatus::Found;
  const double most = set.ratios.front().magnitude();
  out.attained = out.guaranteed = most * most;
  out.kind = std::isinf(most) ? GreatestWald::Infinite : GreatestWald::Exact;
  out.method = "the squared t ratio";
  return out;
}

}  // namespace

RouteAnswer evidence_of(const JointTest& test, const ColumnSet& set, Route route) {
  RouteAnswer out;
  out.clashes = set.clashes;
  out.cautions = set.cautions;
  const bool separate = set.in_ratios && set.pairs_known == 0 && !set.assumed_correlations;
  const std::optional<double> exact = separate ? std::nullopt : exact_wald(set);
  const LeastWald least = separate ? least_of_ratios(set) : exact ? least_at(*exact) : least_wald(set.set, set.R, set.r);
  if (least.status == LimitStatus::NoCovariance || least.status == LimitStatus::NoCoefficients) {
    Clash clash;
    clash.where = test.column->id + " / " + (route == Route::Facts ? "facts" : route == Route::NestedColumns ? "nested columns" : "covariance");
    clash.says = least.status == LimitStatus::NoCovariance
                     ? "No covariance matrix of the tested estimates agrees with all that is printed about them, rounding allowed for."
                     : "The coefficients and the printed combinations of them do not go together, rounding allowed for.";
    clash.cells = set.cells;
    out.clashes.push_back(std::move(clash));
    return out;
  }
  const GreatestWald greatest = separate && test.q == 1 ? greatest_of_ratio(set)
                                : exact                  ? greatest_at(*exact)
                                                         : greatest_wald(set.set, set.R, set.r);
  Evidence e;
  e.route = route;
  e.df = test.df;
  e.wald = {std::max(0.0, least.wald), std::max(greatest.guaranteed, least.wald)};
  e.low = least.exact ? Sharpness::Exact : Sharpness::Guaranteed;
  e.high = sharpness_of(greatest);
  const double attained_high = greatest.kind == GreatestWald::Infinite ? kInfinity : greatest.attained;
  e.attained = Interval{std::min(least.attained, attained_high), std::max(least.attained, attained_high)};
  e.p = p_of_wald(test, e.wald);
  e.rests_on = set.cells;
  if (least.status == LimitStatus::NotSettled)
    e.cautions.push_back("The lower limit could not be made sharp; it is guaranteed, though perhaps lower than need be.");
  if (e.high == Sharpness::NotBounded)
    e.cautions.push_back("The upper limit is not bounded by the method; it is not shown to be infinite.");

  if (set.in_ratios)
    exclusion_working(test, set, e.wald, e);
  else if (test.q == 1 && set.facts == 0 && route != Route::Covariance)
    combination_working(set, e.wald, e);
  else if (route != Route::Covariance)
    general_working(test, set, least, e.wald, e);
  if (route == Route::Covariance) {
    e.working.push_back("W = (Rb − r)′ (R V R′)⁻¹ (Rb − r) with the printed coefficients and covariances");
    if (const auto at_print = printed_wald(set))
      e.working.push_back("at the figures as printed W = " + number_text(*at_print) + ", F = W / " + std::to_string(test.q) + " = " +
                          number_text(*at_print / test.q));
    e.working.push_back("over every rounding F is at least " + number_text(e.wald.low / test.q, ShowRounding::Down) + " (" + least.method + ")");
    e.working.push_back("and " + (std::isinf(e.wald.high) ? std::string("has no upper limit")
                                                           : "at most " + number_text(e.wald.high / test.q, ShowRounding::Up)) +
                        " (" + greatest.method + ")");
  } else if (std::isinf(e.wald.high)) {
    e.working.push_back(e.high == Sharpness::NotBounded
                            ? "no upper limit was found by the method"
                            : "no upper limit: the covariance that the print leaves open can make F as large as one likes");
  } else if (test.q > 1) {
    e.working.push_back("highest F " + number_text(e.wald.high / test.q, ShowRounding::Up) + " (" + greatest.method + ")");
  }

  if (test.statistic == Statistic::ChiSquare || test.column->errors != Errors::Classical)
    e.assumes.push_back("estimates that are normal in large samples");
  if (set.assumed_correlations)
    e.assumes.push_back("correlations of the estimates within " + range_text(*test.column->correlation_within) +
                        ", which is your assumption and not printed");
  if (route == Route::Estimates && test.column->errors == Errors::Unknown)
    e.assumes.push_back("the joint test uses the same kind of standard errors as the table");
  for (const CoefficientLimits& limits : set.limits)
    if (limits.without_stars) {
      e.cautions.push_back("The stars of a tested term do not go with its other figures and were not used.");
      break;
    }
  out.evidence = std::move(e);
  return out;
}

RouteAnswer column_evidence(const JointTest& test) {
  RouteAnswer out;
  if (!test.column || !test.restrictions) return out;
  const ColumnSet set = column_set(test);
  out.clashes = set.clashes;
  if (!set.any_known && !set.variances_by_matrix) return out;
  const bool coefficients_known =
      std::all_of(set.limits.begin(), set.limits.end(), [](const CoefficientLimits& l) { return std::isfinite(l.b.low) && std::isfinite(l.b.high); });
  const bool covariance = set.pairs_known == set.pairs &&
                          (set.variances_by_matrix || (set.pairs > 0 && set.in_ratios) ||
                           (set.pairs > 0 && std::isfinite(set.set.se_high.maxCoeff())));
  if (covariance && (coefficients_known || set.in_ratios)) return evidence_of(test, set, Route::Covariance);

  // Without any standard error, t, p, interval or stars the coefficients alone say nothing of a test.
  bool uncertainty = false;
  for (int j = 0; j < set.set.size(); ++j)
    uncertainty = uncertainty || (set.in_ratios ? set.ratios[static_cast<std::size_t>(j)] != Interval::everything()
                                                : std::isfinite(set.set.se_high(j)));
  if (!uncertainty) return out;
  return evidence_of(test, set, Route::Estimates);
}

namespace {

template <class T>
void append(std::vector<T>& to, const std::vector<T>& from) {
  to.insert(to.end(), from.begin(), from.end());
}

void tell(RouteAnswer& answer, const HiddenFacts& hidden) {
  append(answer.cautions, hidden.cautions);
  if (!answer.evidence || hidden.used == 0) return;
  append(answer.evidence->assumes, hidden.assumes);
  answer.evidence->working.insert(answer.evidence->working.begin(), hidden.working.begin(), hidden.working.end());
  append(answer.evidence->rests_on, hidden.cells);
}

RouteAnswer only_cautions(std::initializer_list<const HiddenFacts*> all) {
  RouteAnswer out;
  for (const HiddenFacts* hidden : all) append(out.cautions, hidden->cautions);
  return out;
}

}  // namespace

RouteAnswer facts_evidence(const JointTest& test) {
  if (!test.column || !test.restrictions) return {};
  ColumnSet set = column_set(test, {true, false});
  const HiddenFacts groups = add_group_sizes(test, set), means = add_means(test, set);
  if (set.facts + groups.used + means.used == 0) return only_cautions({&groups, &means});
  set.facts += groups.used + means.used;
  RouteAnswer out = evidence_of(test, set, Route::Facts);
  tell(out, groups);
  tell(out, means);
  return out;
}

RouteAnswer nested_columns_evidence(const JointTest& test) {
  if (!test.column || !test.restrictions) return {};
  ColumnSet set = column_set(test, {true, false});
  const HiddenFacts nested = add_nested_columns(test, set);
  if (nested.used == 0) return only_cautions({&nested});
  const HiddenFacts groups = add_group_sizes(test, set), means = add_means(test, set);
  set.facts += nested.used + groups.used + means.used;
  RouteAnswer out = evidence_of(test, set, Route::NestedColumns);
  tell(out, nested);
  tell(out, groups);
  tell(out, means);
  return out;
}

}  // namespace rejoinder
