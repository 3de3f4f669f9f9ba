#include "core/convex/least_variance.h"

#include <algorithm>
#include <cmath>

namespace rejoinder {

LeastVariance::LeastVariance(const AdmissibleSet& set) : barrier_(set) {
  barrier_.run();
  if (barrier_.has_interior()) interior_ = barrier_.covariance();
}

LeastVariance::Answer LeastVariance::of(const Eigen::MatrixXd& T) {
  ++calls_;
  barrier_.aim_at(T);
  barrier_.run();
  Answer answer;
  answer.V = barrier_.covariance();
  answer.attained = T.cwiseProduct(answer.V).sum();
  answer.guaranteed = barrier_.guaranteed();
  return answer;
}

LeastVariance::Answer LeastVariance::between(const Eigen::VectorXd& a, const Eigen::VectorXd& b) {
  return of((a * b.transpose() + b * a.transpose()) / 2);
}

int LeastVariance::calls_within(double seconds) const {
  const double p = static_cast<double>(interior_.rows()), unknowns = p * (p + 1) / 2;
  // About 60 steps a call, each a factorisation and an assembly of the Hessian; a billion such operations a
  // second.
  const double work = 60 * (unknowns * unknowns * unknowns / 3 + 15 * unknowns * unknowns + 3000);
  return static_cast<int>(std::clamp(seconds * 1e9 / work, 12.0, 5000.0));
}

}  // namespace rejoinder
