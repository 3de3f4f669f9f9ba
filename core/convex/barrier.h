// The barrier method for the two convex problems on admissible (b, V): the least Wald statistic, and the
// least of a linear functional <T, V>.
//
// Long-step path following: minimise kappa * objective + barrier by damped Newton steps, raise kappa
// twelvefold once centred, stop when the gap (complexity / kappa) is below 1e-10 of the value (Nesterov and
// Nemirovskii 1994, Interior-Point Polynomial Algorithms in Convex Programming; from memory). A first phase
// finds an interior point or proves that there is none. Every centred point gives multipliers, and from those
// core/convex/certificate.h makes a guaranteed value; the best one is kept, so stopping at any step leaves a
// valid answer.
//
// One call of step() is one Newton step, O(N^3 / 3) for N = p(p + 1)/2 + p + 1, so that a page can stay
// responsive:
//
//   Barrier barrier(set, R, r);
//   while (!barrier.done()) barrier.step();
//   report(barrier.guaranteed(), barrier.attained());
#pragma once

#include <Eigen/Dense>
#include <memory>

#include "core/convex/barrier_model.h"

namespace rejoinder {

class Barrier {
 public:
  enum class State {
    FindingInterior,
    Descending,
    Settled,       // the gap is closed, or as far as doubles allow
    NoCovariance,  // proven by multipliers()
    NoCoefficients,
    Stopped  // step limit; guaranteed() still holds
  };

  // The least Wald statistic. `R` is q by p with full row rank, `r` is q.
  Barrier(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r);
  // The least <T, V>: only the first phase is run until aim_at() says which T.
  explicit Barrier(const AdmissibleSet& set);
  ~Barrier();

  bool done() const { return state_ != State::FindingInterior && state_ != State::Descending; }
  void step();
  void run();
  State state() const { return state_; }
  int steps() const { return steps_; }

  // For a barrier made without rows, once done(): a new objective, starting from the interior point already
  // found. `T` is p by p and symmetric, without weight on coefficients whose variance nothing bounds.
  void aim_at(const Eigen::MatrixXd& T);
  bool has_interior() const { return has_interior_; }

  // The best guaranteed lower limit so far: W or <T, V> in the units of the print.
  double guaranteed() const { return guaranteed_; }
  // The value at the present point. Where the set has no interior the point lies a little outside it: see
  // offset().
  double attained() const;
  // How much of I (in the scaling of V) had to be added to make room; 0 for a set with interior.
  double offset() const { return tau_; }

  const Eigen::VectorXd& weights() const { return weights_; }      // c, q, of guaranteed()
  const Multipliers& multipliers() const { return multipliers_; }  // of guaranteed(), or the proof
  const ConvexFacts& facts() const { return facts_; }
  Eigen::VectorXd coefficients() const;  // p
  Eigen::MatrixXd covariance() const;    // p by p
  // The coefficients whose entries of V are meant by that: those that the rows or facts shared with them
  // mention.
  const std::vector<int>& taking_part() const { return model_->taking_part(); }

 private:
  void begin();
  void centred(const Eigen::VectorXd& dx, double dtau);
  void leave_first_phase();
  bool with_border() const { return state_ == State::Descending && model_->bordered(); }
  double objective_value() const;

  AdmissibleSet set_;
  ConvexFacts facts_;
  Eigen::MatrixXd R_, T_;
  Eigen::VectorXd r_;
  std::unique_ptr<BarrierModel> model_;
  State state_ = State::FindingInterior;
  bool wald_ = false, has_interior_ = false;
  Eigen::VectorXd x_, interior_, objective_;  // unknowns
  double tau_ = 0, kappa_ = 1, unit_ = 1, guaranteed_ = 0;
  int steps_ = 0, steps_here_ = 0, stalled_ = 0;
  Eigen::VectorXd weights_;
  Multipliers multipliers_;
};

}  // namespace rejoinder
