// The least and the greatest Wald statistic that a printed column allows.
//
//   W = (Rb - r)' (R V R')^-1 (Rb - r),   (b, V) in the admissible set;   F = W / q
//
// The least is a convex problem: its value is found by a closed form, a linear programme or the barrier
// method and comes with multipliers from which core/convex/certificate.h recomputes a guaranteed value. The
// greatest is not convex: closed forms where they exist, sign corners, branch and bound for few restrictions,
// otherwise an attained value below and a guaranteed value above. Sizes: p coefficients, q restrictions, R is
// q by p of full row rank, r is q.
//
// Example: two coefficients, both said to be zero, standard errors only.
//
//   const LeastWald least = least_wald(set, Eigen::MatrixXd::Identity(2, 2), Eigen::VectorXd::Zero(2));
//   if (least.status == LimitStatus::Found) report(least.wald / 2);
#pragma once

#include <Eigen/Dense>
#include <string>

#include "core/convex/admissible_set.h"
#include "core/convex/certificate.h"

namespace rejoinder {

enum class LimitStatus {
  Found,
  NoCovariance,    // proven: no V satisfies the facts; `multipliers` hold the proof
  NoCoefficients,  // proven: no b satisfies the coefficient facts; `multipliers.coefficient_facts` hold the
                   // proof
  Dependent,       // the rows of R are linearly dependent (1e-10 after scaling): the caller drops rows first
  NotSettled       // neither within the step limit; `wald` (least) or `guaranteed` (greatest) still holds
};

// A pair (b, V) in the units of the print. `wald` is W recomputed there, `outside` how far it misses the set
// as distance_outside() measures (about 1e-10 is rounding). Empty matrices where no pair is at hand.
struct WaldWitness {
  Eigen::VectorXd b;  // p
  Eigen::MatrixXd V;  // p by p
  double wald = 0;
  double outside = 0;
};

struct LeastWald {
  LimitStatus status = LimitStatus::NotSettled;
  // Guaranteed: no admissible (b, V) has less. Rounded down; may be infinite.
  double wald = 0;
  // Reached, or approached near a singular V. Where the set is not convex it belongs to the wider set that
  // was used: witness.outside tells by how much.
  double attained = kInfinity;
  // Both agree to 1e-8 and the set was used as it is, without a wider one around it.
  bool exact = false;
  Eigen::VectorXd weights;  // c, q: the combination of the rows whose t ratio sets the limit
  Eigen::VectorXd shifted;  // beta, p: the nearest coefficients with R beta = r; only from the programme
  WaldWitness witness;
  Multipliers multipliers;  // with `weights`, what guaranteed_wald() needs; empty where errors alone decide
  bool in_ratios = false;   // `weights` and `multipliers` belong to ratio_form() of the problem
  std::string method;       // in words, for the working
};

LeastWald least_wald(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r);

struct GreatestWald {
  enum Kind {
    Exact,       // attained and guaranteed agree to 1e-8
    Guaranteed,  // a guaranteed value above, an attained one below, a gap between
    NotBounded,  // no guaranteed value was found; nothing is said about infinity. guaranteed = infinity
    Infinite     // proven: admissible V come as near as one likes to one that makes R V R' singular
  };
  LimitStatus status = LimitStatus::NotSettled;
  double attained = 0;            // some admissible (b, V) has at least this
  double guaranteed = kInfinity;  // none has more; rounded up
  Kind kind = NotBounded;
  std::string method;
  WaldWitness witness;      // of `attained`; for Infinite, V is singular on the rows
  Eigen::VectorXd weights;  // c, q: for Infinite, the combination without variance
};

// Effort for the greatest value; the defaults answer within about a second at p = 10.
struct GreatestEffort {
  int starts = 20;          // of the ascent
  int corner_limit = 14;    // signs enumerated: 2^14 corners
  int cone_limit = 400;     // nodes of branch and bound
  double agreement = 1e-8;  // relative gap at which branch and bound stops
};

GreatestWald greatest_wald(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r,
                           const GreatestEffort& effort = {});

}  // namespace rejoinder
