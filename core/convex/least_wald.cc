#include <algorithm>
#include <cmath>

#include "core/convex/barrier.h"
#include "core/convex/closed_forms.h"
#include "core/convex/ratio_form.h"
#include "core/convex/restriction_rows.h"
#include "core/convex/wald_limits.h"
#include "core/convex/witness.h"

namespace rejoinder {
namespace {

bool agree(double guaranteed, double attained) {
  return attained - guaranteed <= 1e-8 * std::max(attained, 1e-8);
}

// V of the barrier on the coefficients that take part; any V of the set on the others, to which no fact ties
// them.
Eigen::MatrixXd completed(const AdmissibleSet& set, const Barrier& barrier) {
  const Eigen::MatrixXd V = barrier.covariance();
  const std::vector<int>& part = barrier.taking_part();
  if (static_cast<int>(part.size()) == set.size() || distance_outside(set, barrier.coefficients(), V) < 1e-9)
    return V;
  Barrier whole(set);
  whole.run();
  if (!whole.has_interior()) return V;
  Eigen::MatrixXd all = whole.covariance();
  for (const int i : part)
    for (int j = 0; j < set.size(); ++j) all(i, j) = all(j, i) = V(i, j);
  return all;
}

LeastWald by_barrier(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r) {
  Barrier barrier(set, R, r);
  barrier.run();
  LeastWald least;
  least.multipliers = barrier.multipliers();
  least.method = "barrier method";
  if (barrier.state() == Barrier::State::NoCovariance) {
    least.status = LimitStatus::NoCovariance;
    least.method = "proof that the facts on V exclude each other";
    return least;
  }
  if (barrier.state() == Barrier::State::NoCoefficients) {
    least.status = LimitStatus::NoCoefficients;
    least.method = "proof that the facts on the coefficients exclude each other";
    return least;
  }
  least.status = barrier.state() == Barrier::State::Settled ? LimitStatus::Found : LimitStatus::NotSettled;
  least.wald = barrier.guaranteed();
  least.weights = barrier.weights();
  least.attained = barrier.attained();
  least.exact = barrier.facts().exact && agree(least.wald, least.attained);
  if (std::isfinite(least.attained))
    least.witness = make_witness(set, R, r, barrier.coefficients(), completed(set, barrier));
  // The standard errors alone, or with a common cap, may prove a little more with the same combination.
  const double from_errors =
      guaranteed_wald_from_errors(set, R, r, least.weights, least.multipliers.coefficient_facts);
  if (from_errors > least.wald) {
    least.wald = from_errors;
    least.exact = barrier.facts().exact && agree(least.wald, least.attained);
  }
  return least;
}

}  // namespace

LeastWald least_wald(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r) {
  LeastWald least;
  if (!independent_rows(set, R)) {
    least.status = LimitStatus::Dependent;
    least.method = "the restrictions repeat one another";
    return least;
  }
  if (const auto closed = least_wald_of_exclusion(set, R, r)) return *closed;
  if (const auto reduced = reduced_rows(convex_facts(set).scale, R, r); reduced && reduced->R != R) {
    least = least_wald(set, reduced->R, reduced->r);
    if (least.weights.size() == R.rows() && !least.in_ratios)
      least.weights = (reduced->mix.transpose() * least.weights).eval();
    return least;
  }
  const LeastWald from_errors = least_wald_of_errors(set, R, r);
  if (!set.has_covariance_facts() || from_errors.status == LimitStatus::NoCoefficients) return from_errors;

  if (const auto form = ratio_form(set, R, r)) {
    least = by_barrier(form->set, form->R, form->r);
    least.in_ratios = true;
    least.method += " on t ratios and correlations";
    if (least.witness.V.size() > 0)
      least.witness = printed_witness(set, R, r, least.witness.b, least.witness.V);
    if (std::isfinite(form->cut)) {
      least.wald = std::min(least.wald, form->cut * form->cut * (1 - 1e-15));
      least.exact = least.exact && agree(least.wald, least.attained);
    }
  } else {
    least = by_barrier(set, R, r);
  }
  const bool contradiction =
      least.status == LimitStatus::NoCovariance || least.status == LimitStatus::NoCoefficients;
  if (!contradiction && from_errors.wald > least.wald * (1 + 1e-9)) {
    // The facts add nothing, or the barrier stopped early: the programme alone proves more.
    const bool exact = least.exact || agree(from_errors.wald, least.attained);
    const double attained = least.attained;
    const WaldWitness witness = least.witness;
    const LimitStatus status = least.status;
    least = from_errors;
    least.attained = attained;
    least.witness = witness;
    least.exact = exact && std::isfinite(attained);
    least.status = status;
  }
  return least;
}

}  // namespace rejoinder
