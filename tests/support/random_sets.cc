#include "tests/support/random_sets.h"

#include <cmath>

namespace rejoinder::test {

Interval rounded(double x, int digits) {
  if (x == 0) return {-0.5, 0.5};
  const double unit = std::pow(10.0, std::floor(std::log10(std::fabs(x))) - digits + 1);
  const double value = std::round(x / unit) * unit;
  return {value - unit / 2, value + unit / 2};
}

// Own transformations: the standard library's differ between platforms, the engine itself does not.
double RandomSets::uniform(double low, double high) {
  return low + (high - low) * (static_cast<double>(engine_()) + 0.5) / 4294967296.0;
}
double RandomSets::normal() {
  return std::sqrt(-2 * std::log(uniform(0, 1))) * std::cos(2 * M_PI * uniform(0, 1));
}
int RandomSets::below(int n) { return static_cast<int>(uniform(0, n)); }

RandomCase RandomSets::draw(int p, int q, Facts facts, int digits, double spread, bool exclusion) {
  RandomCase made;
  made.set = AdmissibleSet(p);
  Eigen::MatrixXd X(p + 3, p);
  for (int i = 0; i < X.rows(); ++i)
    for (int j = 0; j < p; ++j) X(i, j) = normal();
  Eigen::MatrixXd C = X.transpose() * X;
  const Eigen::VectorXd unit = C.diagonal().cwiseSqrt().cwiseInverse();
  C = (unit.asDiagonal() * C * unit.asDiagonal()).eval();
  Eigen::VectorXd s(p);
  for (int j = 0; j < p; ++j) s(j) = std::pow(spread, uniform(-0.5, 0.5));
  if (facts == Facts::Cap) {
    const double c = uniform(0.2, 0.7);
    made.set.every_correlation = {-c, c};
    C = 0.9 * c * C;
    C.diagonal().setOnes();
  }
  made.V = s.asDiagonal() * C * s.asDiagonal();
  made.b.resize(p);
  for (int j = 0; j < p; ++j) made.b(j) = s(j) * uniform(-3, 3);
  for (int j = 0; j < p; ++j) {
    made.set.set_coefficient(j, rounded(made.b(j), digits));
    if (facts == Facts::AllCovariances)
      made.set.set_variance(j, rounded(made.V(j, j), digits));
    else
      made.set.set_se(j, rounded(s(j), digits));
  }
  for (int i = 0; i < p; ++i)
    for (int j = 0; j < i; ++j) {
      const bool covariance = facts == Facts::AllCovariances ||
                              (facts == Facts::SomeCovariances && below(2) == 0) ||
                              (facts == Facts::Combinations && i + j < 3 && p > 3);
      if (covariance) made.set.covariances.push_back({i, j, rounded(made.V(i, j), digits)});
      if (facts == Facts::Correlations) made.set.correlations.push_back({i, j, rounded(C(i, j), digits)});
      if (facts == Facts::ZeroRanges && below(2) == 0)
        made.set.correlations.push_back(
            {i,
             j,
             {std::max(-1.0, std::min(0.0, C(i, j) - 0.1)), std::min(1.0, std::max(0.0, C(i, j) + 0.05))}});
    }
  if (facts == Facts::Combinations)
    for (int k = 0; k + 1 < p && k < 2; ++k) {
      Eigen::VectorXd a = Eigen::VectorXd::Zero(p);
      a(p - 1 - k) = 1;
      a(p - 2 - k) = -1;
      const Interval se = rounded(std::sqrt(a.dot(made.V * a)), digits);
      made.set.combination_variances.push_back({a, {se.low * se.low, se.high * se.high}});
    }
  made.R = Eigen::MatrixXd::Zero(q, p);
  made.r = Eigen::VectorXd::Zero(q);
  for (int i = 0; i < q; ++i)
    for (int j = 0; j < p; ++j) made.R(i, j) = exclusion ? (j == i + p - q) : below(3) - 1;
  if (!exclusion)
    for (int i = 0; i < q; ++i) made.R(i, i) += made.R(i, i) == 0 ? 1 : made.R(i, i);
  return made;
}

}  // namespace rejoinder::test
