#include "core/convex/convex_facts.h"

#include <algorithm>
#include <cmath>

namespace rejoinder {
namespace {

constexpr double kOutward = 1e-15;  // a few roundings, relative

Interval outward(double low, double high) {
  return {low - kOutward * std::fabs(low), high + kOutward * std::fabs(high)};
}

LinearFact entry(int i, int j, const Interval& value) {
  return {{{std::max(i, j), std::min(i, j), 1}}, value};
}

// sum of A_ij V_ij with the two halves of each pair added up.
LinearFact matrix(const Eigen::MatrixXd& A, const Interval& value) {
  LinearFact fact;
  fact.value = value;
  for (int i = 0; i < A.rows(); ++i)
    for (int j = 0; j <= i; ++j) {
      const double weight = i == j ? A(i, i) : A(i, j) + A(j, i);
      if (weight != 0) fact.terms.push_back({i, j, weight});
    }
  return fact;
}

// V_ij >= range.low * envelope for a range above zero; `sign` -1 turns a range below zero over.
void add_envelope(int i, int j, double least, double sign, const AdmissibleSet& set, ConvexFacts& out) {
  const double xl = set.se_low(i), xu = set.se_high(i), yl = set.se_low(j), yu = set.se_high(j);
  if (xu + xl == 0 || yu + yl == 0) return;
  const struct {
    double x, y;  // the corner, as standard errors, that the plane touches besides the two mixed ones
  } corners[] = {{xl, yl}, {xu, yu}};
  for (const auto& corner : corners) {
    const double along_x = least * corner.y / (xu + xl), along_y = least * corner.x / (yu + yl);
    const double terms[] = {least * corner.x * corner.y, -along_x * corner.x * corner.x,
                            -along_y * corner.y * corner.y};
    // The slopes are themselves rounded: leave room for what that changes over the box.
    const double room =
        4 * kOutward * (std::fabs(terms[0]) + std::fabs(along_x) * xu * xu + std::fabs(along_y) * yu * yu);
    const double constant = terms[0] + terms[1] + terms[2] - room;
    LinearFact fact;
    fact.terms = {{std::max(i, j), std::min(i, j), sign}, {i, i, -along_x}, {j, j, -along_y}};
    fact.value = {constant, kInfinity};
    out.facts.push_back(fact);
  }
}

void add_correlation(int i, int j, const CorrelationRange& range, const AdmissibleSet& set,
                     ConvexFacts& out) {
  using Side = CorrelationCap::Side;
  if (range.low > range.high) {
    out.empty = true;
    return;
  }
  if (range.low <= -1 && range.high >= 1) return;
  const bool unknown = std::isinf(out.scale(i)) || std::isinf(out.scale(j));
  const bool holds_zero = range.low <= 0 && range.high >= 0;
  if (range.low == 0 && range.high == 0) {
    out.facts.push_back(entry(i, j, {0, 0}));
    return;
  }
  if (set.se_low(i) == set.se_high(i) && set.se_low(j) == set.se_high(j)) {
    const double product = set.se_high(i) * set.se_high(j);
    out.facts.push_back(entry(i, j, outward(range.low * product, range.high * product)));
    return;
  }
  if (unknown && !holds_zero) {
    out.exact = false;  // nothing convex is left of it that the solver could use
    return;
  }
  if (range.low == -range.high) {
    out.caps.push_back({i, j, range.high, Side::Both});
    return;
  }
  if (range.low == 0) out.facts.push_back(entry(i, j, {0, kInfinity}));
  if (range.high == 0) out.facts.push_back(entry(i, j, {-kInfinity, 0}));
  if (range.high > 0 && range.high < 1) out.caps.push_back({i, j, range.high, Side::Upper});
  if (range.low < 0 && range.low > -1) out.caps.push_back({i, j, -range.low, Side::Lower});
  if (holds_zero) return;
  out.exact = false;
  // The known ends of the standard errors are those of the set; an implied bound serves where one is missing.
  AdmissibleSet bounded = set;
  bounded.se_high = out.scale;
  if (range.low > 0) add_envelope(i, j, range.low, 1, bounded, out);
  if (range.high < 0) add_envelope(i, j, -range.high, -1, bounded, out);
}

}  // namespace

CorrelationRange correlation_range(const AdmissibleSet& set, int i, int j) {
  CorrelationRange range{std::max(-1.0, set.every_correlation.low),
                         std::min(1.0, set.every_correlation.high)};
  for (const PairInterval& fact : set.correlations)
    if ((fact.i == i && fact.j == j) || (fact.i == j && fact.j == i)) {
      range.low = std::max(range.low, fact.value.low);
      range.high = std::min(range.high, fact.value.high);
    }
  return range;
}

ConvexFacts convex_facts(const AdmissibleSet& set) {
  const int p = set.size();
  ConvexFacts out;
  out.scale = set.se_high;
  for (int j = 0; j < p; ++j)
    if (out.scale(j) == 0) {
      const double h = set.half_width(j);
      out.scale(j) = 1e-9 * std::max({std::isfinite(h) ? h : 0, std::fabs(set.centre(j)), 1e-100});
      out.exact = false;
    }
  // Bounds that printed combinations imply for unknown standard errors, until nothing new follows.
  for (bool found = true; found;) {
    found = false;
    for (const CombinationVariance& fact : set.combination_variances) {
      int unknown = -1, count = 0;
      double rest = std::sqrt(std::max(0.0, fact.value.high));
      for (int i = 0; i < p; ++i) {
        if (fact.a(i) == 0) continue;
        if (std::isinf(out.scale(i)))
          unknown = i, ++count;
        else
          rest += std::fabs(fact.a(i)) * out.scale(i);
      }
      if (count != 1 || !std::isfinite(rest)) continue;
      const double bound = rest / std::fabs(fact.a(unknown)) * (1 + 1e-14);
      out.scale(unknown) = bound > 0 ? bound : 1e-100;
      found = true;
    }
  }
  for (int j = 0; j < p; ++j) {
    Interval variance = set.variance(j);
    variance.high = std::max(variance.high, step_up(out.scale(j) * out.scale(j)));
    if (set.se_high(j) == set.se_low(j) && set.se_low(j) > 0) variance = set.variance(j);
    out.facts.push_back(entry(j, j, variance));
  }
  for (const PairInterval& fact : set.covariances) out.facts.push_back(entry(fact.i, fact.j, fact.value));
  for (const CombinationVariance& fact : set.combination_variances)
    out.facts.push_back(
        matrix(fact.a * fact.a.transpose(), {std::max(0.0, fact.value.low), fact.value.high}));
  for (const MatrixFact& fact : set.matrix_facts) out.facts.push_back(matrix(fact.A, fact.value));
  const bool every = set.every_correlation.low > -1 || set.every_correlation.high < 1;
  for (int i = 0; i < p; ++i)
    for (int j = 0; j < i; ++j) {
      bool spoken_of = every;
      for (const PairInterval& fact : set.correlations)
        spoken_of = spoken_of || (fact.i == i && fact.j == j) || (fact.i == j && fact.j == i);
      if (spoken_of) add_correlation(i, j, correlation_range(set, i, j), set, out);
    }
  return out;
}

}  // namespace rejoinder
