#include <algorithm>
#include <cmath>

#include "core/convex/ascent.h"
#include "core/convex/closed_forms.h"
#include "core/convex/coefficient_range.h"
#include "core/convex/cones.h"
#include "core/convex/entry_box.h"
#include "core/convex/ratio_form.h"
#include "core/convex/restriction_rows.h"
#include "core/convex/wald_limits.h"
#include "core/convex/witness.h"

namespace rejoinder {
namespace {

GreatestWald infinite(const std::string& method) {
  GreatestWald greatest;
  greatest.status = LimitStatus::Found;
  greatest.kind = GreatestWald::Infinite;
  greatest.attained = kInfinity;
  greatest.method = method;
  return greatest;
}

void settle(GreatestWald& greatest) {
  greatest.status = LimitStatus::Found;
  greatest.guaranteed = std::max(greatest.guaranteed, greatest.attained);
  if (std::isinf(greatest.guaranteed))
    greatest.kind = GreatestWald::NotBounded;
  else if (greatest.guaranteed - greatest.attained <= 1e-8 * greatest.guaranteed)
    greatest.kind = GreatestWald::Exact;
  else
    greatest.kind = GreatestWald::Guaranteed;
}

// The corner as a pair for the whole set: its own entries on the tested coefficients, the middle of what is
// known elsewhere.
WaldWitness corner_witness(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r,
                           const EntryBox& box, const Corners& corners) {
  const int p = set.size(), m = static_cast<int>(box.columns.size());
  Eigen::MatrixXd V = Eigen::MatrixXd::Zero(p, p);
  for (int j = 0; j < p; ++j) {
    const Interval variance = set.variance(j);
    V(j, j) = std::isfinite(variance.high) ? variance.middle() : std::max(1.0, variance.low);
  }
  for (const PairInterval& fact : set.covariances)
    if (std::isfinite(fact.value.low) && std::isfinite(fact.value.high))
      V(fact.i, fact.j) = V(fact.j, fact.i) = fact.value.middle();
  for (const PairInterval& fact : set.correlations)
    V(fact.i, fact.j) = V(fact.j, fact.i) =
        fact.value.middle() * std::sqrt(V(fact.i, fact.i) * V(fact.j, fact.j));
  Eigen::VectorXd b = set.centre;
  for (int x = 0; x < m; ++x) {
    b(box.columns[x]) += box.b_half(x) * corners.signs(x);
    for (int y = 0; y < m; ++y) V(box.columns[x], box.columns[y]) = corners.V(x, y);
  }
  return make_witness(set, R, r, b, V);
}

// The greatest W with every standard error held at one value, where correlations are entries and the set
// convex; from below only. `calls` bounds the work.
WaldWitness with_errors_held(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r,
                             const Eigen::VectorXd& s, const GreatestEffort& effort, int calls) {
  AdmissibleSet held = set;
  held.se_low = held.se_high = s;
  const EntryBox box = entry_box(held, R, r);
  if (box.known && static_cast<int>(box.columns.size()) <= std::min(effort.corner_limit, 8)) {
    const Corners corners = sign_corners(box);
    if (corners.all_definite) {
      const WaldWitness witness = corner_witness(held, R, r, box, corners);
      if (witness.outside <= 1e-9) return witness;
    }
  }
  LeastVariance variance(held);
  if (!variance.usable()) return {};
  return ascend(held, R, r, variance, 2, calls);
}

// Where correlation ranges and rounded standard errors make the set not convex: one standard error after the
// other is moved to its other end while that raises W.
WaldWitness over_errors(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r,
                        const GreatestEffort& effort) {
  Eigen::VectorXd s = (set.se_low + set.se_high) / 2;
  const int calls = 12;
  WaldWitness best = with_errors_held(set, R, r, s, effort, calls);
  for (int pass = 0; pass < 2; ++pass) {
    bool moved = false;
    for (int j = 0; j < set.size(); ++j) {
      if (R.col(j).isZero(0) || set.se_low(j) == set.se_high(j)) continue;
      for (const double end : {set.se_low(j), set.se_high(j)}) {
        if (s(j) == end || end == 0) continue;
        Eigen::VectorXd tried = s;
        tried(j) = end;
        const WaldWitness now = with_errors_held(set, R, r, tried, effort, calls);
        if (now.V.size() == 0 || !(now.wald > best.wald) || now.outside > 1e-9) continue;
        best = now;
        s = tried;
        moved = true;
      }
    }
    if (!moved) break;
  }
  return best;
}

GreatestWald search(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r,
                    const GreatestEffort& effort) {
  GreatestWald greatest;
  const int q = static_cast<int>(R.rows());
  const Eigen::VectorXd no_weight = Eigen::VectorXd::Zero(set.size());
  if (greatest_combination(set, no_weight).b.size() == 0) {
    greatest.status = LimitStatus::NoCoefficients;
    greatest.method = "the facts on the coefficients exclude each other";
    return greatest;
  }

  // 1. The box of entries: exact where its worst corner is a covariance matrix of the set.
  const EntryBox box = entry_box(set, R, r);
  const int m = static_cast<int>(box.columns.size());
  bool definite = false;
  if (box.known && m <= effort.corner_limit) {
    const Corners corners = sign_corners(box);
    definite = corners.all_definite;
    if (definite) {
      greatest.guaranteed = corners.greatest * (1 + 1e-12);
      greatest.method = "sign corners of the entries";
      const WaldWitness witness = corner_witness(set, R, r, box, corners);
      if (witness.outside <= 1e-9) {
        greatest.witness = witness;
        greatest.attained = witness.wald;
        settle(greatest);
        if (greatest.kind == GreatestWald::Exact) return greatest;
      }
    }
  }
  if (!definite) {
    const double cheap = cheap_greatest(box);
    if (std::isfinite(cheap)) {
      greatest.guaranteed = cheap;
      greatest.method = "entries moved by a diagonal bound";
      definite = true;
    }
  }

  // 2. V over the set itself. An unknown standard error is given a wide interval here: what is then attained
  // or singular is so in the set as well, but nothing is guaranteed by it.
  AdmissibleSet inner = set;
  bool widened = false;
  const ConvexFacts facts = convex_facts(set);
  double known = 0;
  for (int j = 0; j < set.size(); ++j)
    if (std::isfinite(facts.scale(j))) known = std::max(known, facts.scale(j));
  for (int j = 0; j < set.size(); ++j)
    if (std::isinf(facts.scale(j))) {
      inner.se_high(j) = std::max({1e3 * known, 10 * set.se_low(j), 1.0});
      widened = true;
    }
  LeastVariance variance(inner);
  if (variance.contradiction()) {
    greatest.status = widened ? LimitStatus::NotSettled : LimitStatus::NoCovariance;
    greatest.method = "the facts on V exclude each other";
    return greatest;
  }
  if (!variance.usable()) {
    greatest.method = "no interior point of the facts on V was found";
    return greatest;
  }
  const int calls = variance.calls_within(0.15);
  if (!definite) {
    if (const auto singular = singular_point(inner, R, r, variance, effort.starts, calls)) {
      GreatestWald answer = infinite("a covariance matrix of the set gives a combination no variance");
      answer.weights = singular->c;
      answer.witness = make_witness(set, R, r, singular->b, singular->V);
      return answer;
    }
  }
  const WaldWitness climbed = ascend(inner, R, r, variance, effort.starts, calls);
  if (climbed.wald > greatest.attained && distance_outside(set, climbed.b, climbed.V) <= 1e-9) {
    greatest.witness = climbed;
    greatest.attained = climbed.wald;
  }
  if (!widened && !facts.exact) {
    const WaldWitness held = over_errors(set, R, r, effort);
    if (held.wald > greatest.attained && distance_outside(set, held.b, held.V) <= 1e-9) {
      greatest.witness = held;
      greatest.attained = held.wald;
    }
  }
  if (!widened && q <= 4) {
    // Over a wider convex set the bound still holds, but there is no use in closing its last digits.
    const ConeSearch cones = search_cones(
        inner, R, r, variance, greatest.attained, facts.exact ? effort.agreement : 1e-3,
        facts.exact ? effort.cone_limit : std::min(effort.cone_limit, 60), variance.calls_within(0.8));
    if (cones.guaranteed < greatest.guaranteed) {
      greatest.guaranteed = cones.guaranteed;
      greatest.method =
          q == 1 ? "least variance by the barrier method" : "branch and bound over combinations";
    }
    if (cones.best.wald > greatest.attained) {
      greatest.attained = cones.best.wald;
      greatest.witness = cones.best;
    }
  }
  settle(greatest);
  if (greatest.method.empty()) greatest.method = "not bounded by the methods tried";
  return greatest;
}

}  // namespace

GreatestWald greatest_wald(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r,
                           const GreatestEffort& effort) {
  GreatestWald greatest;
  if (!independent_rows(set, R)) {
    greatest.status = LimitStatus::Dependent;
    greatest.method = "the restrictions repeat one another";
    return greatest;
  }
  if (const auto reduced = reduced_rows(convex_facts(set).scale, R, r); reduced && reduced->R != R) {
    greatest = greatest_wald(set, reduced->R, reduced->r, effort);
    if (greatest.weights.size() == R.rows())
      greatest.weights = (reduced->mix.transpose() * greatest.weights).eval();
    return greatest;
  }
  if (const auto closed = greatest_wald_of_errors(set, R, r)) return *closed;
  if (const auto closed = greatest_wald_of_capped_exclusion(set, R, r)) return *closed;
  if (set.coefficient_facts.empty())
    for (int j = 0; j < set.size(); ++j)
      if (std::isinf(set.half_width(j)) && !R.col(j).isZero(0))
        return infinite("a tested coefficient is not known");
  if (const auto form = ratio_form(set, R, r)) {
    // W is at least the square of every single ratio, so a ratio without limit leaves W without one.
    if (std::isfinite(form->cut)) {
      if (LeastVariance(form->set).contradiction()) {
        greatest.status = LimitStatus::NoCovariance;
        greatest.method = "the facts on V exclude each other";
        return greatest;
      }
      return infinite("a standard error may be as small as zero");
    }
    greatest = search(form->set, form->R, form->r, effort);
    greatest.method += " on t ratios and correlations";
    if (greatest.witness.V.size() > 0)
      greatest.witness = printed_witness(set, R, r, greatest.witness.b, greatest.witness.V);
    return greatest;
  }
  return search(set, R, r, effort);
}

}  // namespace rejoinder
