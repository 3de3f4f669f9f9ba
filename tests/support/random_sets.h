// Admissible sets with a known point inside, for tests against sampling.
//
// A hidden (b, V) is drawn, then rounded facts about it are "printed": the set is never empty, and every
// convex combination of points of the set that tests come across is again a point, which makes sampling
// cheap.
#pragma once

#include <Eigen/Dense>
#include <random>

#include "core/convex/admissible_set.h"

namespace rejoinder::test {

enum class Facts {
  Errors,           // standard errors only
  SomeCovariances,  // about half of the covariances, rounded
  AllCovariances,   // every covariance
  Cap,              // |correlation| <= c for all pairs
  Combinations,     // two covariances and the standard errors of two differences
  ZeroRanges,       // correlation ranges that hold zero, lopsided
  Correlations      // every correlation, rounded
};

struct RandomCase {
  AdmissibleSet set{1};
  Eigen::MatrixXd R;  // q by p
  Eigen::VectorXd r;  // q
  Eigen::VectorXd b;  // the hidden point
  Eigen::MatrixXd V;
};

class RandomSets {
 public:
  explicit RandomSets(unsigned seed) : engine_(seed) {}
  // `digits`: significant digits kept of every figure. `spread`: standard errors differ by up to this factor.
  RandomCase draw(int p, int q, Facts facts, int digits = 2, double spread = 10, bool exclusion = false);
  double uniform(double low, double high);
  double normal();
  int below(int n);

 private:
  std::mt19937 engine_;
};

// x as printed with so many significant digits: half a unit either side.
Interval rounded(double x, int digits);

}  // namespace rejoinder::test
