// The least variance of combinations over all V of the set, many combinations in turn.
#pragma once

#include <Eigen/Dense>

#include "core/convex/barrier.h"

namespace rejoinder {

// min <T, V> with the V that reaches it and the guaranteed value. One interior point is found once and
// shared.
class LeastVariance {
 public:
  explicit LeastVariance(const AdmissibleSet& set);

  // Proven that no V satisfies the facts.
  bool contradiction() const { return barrier_.state() == Barrier::State::NoCovariance; }
  bool usable() const { return barrier_.has_interior(); }

  struct Answer {
    Eigen::MatrixXd V;               // p by p
    double attained = 0;             // <T, V>
    double guaranteed = -kInfinity;  // rounded down
  };
  // `T` is p by p and symmetric.
  Answer of(const Eigen::MatrixXd& T);
  // T = the symmetric part of a b', so <T, V> = a'Vb.
  Answer between(const Eigen::VectorXd& a, const Eigen::VectorXd& b);

  Eigen::MatrixXd interior() const { return interior_; }  // p by p
  int calls() const { return calls_; }
  // How many calls fit into about `seconds` on a plain machine, from the size of the problem.
  int calls_within(double seconds) const;

 private:
  Barrier barrier_;
  Eigen::MatrixXd interior_;
  int calls_ = 0;
};

}  // namespace rejoinder
