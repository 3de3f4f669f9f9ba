#include "core/convex/ascent.h"

#include <cmath>
#include <cstdint>

#include "core/convex/coefficient_range.h"
#include "core/convex/witness.h"

namespace rejoinder {
namespace {

// A fixed sequence of numbers in [-1, 1], the same on every machine (the 64-bit mixing of splitmix; from
// memory).
class Numbers {
 public:
  double next() {
    state_ += 0x9E3779B97F4A7C15ull;
    std::uint64_t z = state_;
    z = (z ^ (z >> 30)) * 0xBF58476D1CE4E5B9ull;
    z = (z ^ (z >> 27)) * 0x94D049BB133111EBull;
    z ^= z >> 31;
    return static_cast<double>(z >> 11) * 0x1p-52 - 1;
  }

 private:
  std::uint64_t state_ = 1;
};

Eigen::VectorXd start(Numbers& numbers, const Eigen::VectorXd& row_size) {
  Eigen::VectorXd c(row_size.size());
  for (int i = 0; i < c.size(); ++i) c(i) = numbers.next() / row_size(i);
  return c;
}

// Standard errors of the rows at the interior point: brings the rows to one scale.
Eigen::VectorXd row_sizes(const Eigen::MatrixXd& R, const Eigen::MatrixXd& V) {
  return (R * V * R.transpose()).diagonal().cwiseMax(1e-300).cwiseSqrt();
}

}  // namespace

WaldWitness ascend(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r,
                   LeastVariance& variance, int starts, int calls) {
  WaldWitness best;
  Numbers numbers;
  const Eigen::VectorXd size = row_sizes(R, variance.interior());
  for (int k = 0; k < starts && calls > 0; ++k) {
    Eigen::VectorXd c = start(numbers, size);
    if (k == 0) {
      const Eigen::MatrixXd S = R * variance.interior() * R.transpose();
      c = S.ldlt().solve(R * set.centre - r);
      if (!c.allFinite() || c.isZero(0)) c = start(numbers, size);
    }
    double last = -1;
    for (int round = 0; round < 30 && calls > 0; ++round, --calls) {
      const FarthestDistance far = farthest_distance(set, R, r, c);
      if (far.b.size() == 0) return best;
      const Eigen::VectorXd a = R.transpose() * c;
      const LeastVariance::Answer least = variance.between(a, a);
      const WaldWitness now = make_witness(set, R, r, far.b, least.V);
      if (std::isfinite(now.wald) && now.wald > best.wald && now.outside < 1e-9) best = now;
      if (!std::isfinite(now.wald) || now.wald <= last * (1 + 1e-12)) break;
      last = now.wald;
      c = (R * least.V * R.transpose()).ldlt().solve(R * far.b - r);
      if (!c.allFinite()) break;
    }
  }
  return best;
}

namespace {

// Where l(c) is tiny: takes the combination out of V altogether, in units of standard errors, and sees
// whether the set allows what is left.
std::optional<SingularPoint> without_variance(const AdmissibleSet& set, const Eigen::MatrixXd& R,
                                              const Eigen::VectorXd& r, const Eigen::VectorXd& c,
                                              const Eigen::MatrixXd& V) {
  const Eigen::VectorXd a = R.transpose() * c;
  const Eigen::VectorXd s = V.diagonal().cwiseMax(1e-300).cwiseSqrt();
  const Eigen::VectorXd along = a.cwiseProduct(s).normalized();
  const Eigen::MatrixXd C = s.cwiseInverse().asDiagonal() * V * s.cwiseInverse().asDiagonal();
  const Eigen::MatrixXd P = Eigen::MatrixXd::Identity(a.size(), a.size()) - along * along.transpose();
  const Eigen::MatrixXd left = s.asDiagonal() * (P * C * P) * s.asDiagonal();
  const FarthestDistance far = farthest_distance(set, R, r, c);
  if (far.b.size() == 0) return std::nullopt;
  const double rounding = 1e-13 * c.cwiseAbs().dot(R.cwiseAbs() * far.b.cwiseAbs() + r.cwiseAbs());
  if (!(std::fabs(c.dot(R * far.b - r)) > rounding)) return std::nullopt;
  if (!(distance_outside(set, far.b, left) <= 1e-10)) return std::nullopt;
  return SingularPoint{c, far.b, left};
}

}  // namespace

std::optional<SingularPoint> singular_point(const AdmissibleSet& set, const Eigen::MatrixXd& R,
                                            const Eigen::VectorXd& r, LeastVariance& variance, int starts,
                                            int calls) {
  Numbers numbers;
  const Eigen::VectorXd size = row_sizes(R, variance.interior());
  std::vector<Eigen::VectorXd> edges;  // where the search came to rest, in units of the rows
  std::optional<SingularPoint> found;
  // l at c against its size at the interior point, and the V that reaches it; settles `found` on the way.
  const auto look = [&](const Eigen::VectorXd& c, Eigen::MatrixXd& V) {
    --calls;
    const Eigen::VectorXd a = R.transpose() * c;
    const LeastVariance::Answer least = variance.between(a, a);
    V = least.V;
    const double relative = least.attained / a.dot(variance.interior() * a);
    if (relative < 1e-8) found = without_variance(set, R, r, c, V);
    return relative;
  };
  for (int k = 0; k < starts && calls > 0; ++k) {
    Eigen::VectorXd c = start(numbers, size);
    double last = kInfinity;
    for (int round = 0; round < 30 && calls > 0; ++round) {
      Eigen::MatrixXd V;
      const double relative = look(c, V);
      if (found) return found;
      if (round > 0 && !(relative < 0.7 * last)) break;
      last = relative;
      // Next: the direction in which R V R' is smallest against its diagonal.
      Eigen::MatrixXd S = R * V * R.transpose();
      const Eigen::VectorXd unit = S.diagonal().cwiseMax(1e-300).cwiseSqrt().cwiseInverse();
      S = (unit.asDiagonal() * S * unit.asDiagonal()).eval();
      const Eigen::SelfAdjointEigenSolver<Eigen::MatrixXd> parts(S);
      if (parts.info() != Eigen::Success) break;
      c = unit.cwiseProduct(parts.eigenvectors().col(0));
    }
    if (!(last < 1e-3)) continue;
    // The search comes to rest at the rim of the combinations without variance; their inside lies between two
    // rims.
    const Eigen::VectorXd edge = c.cwiseProduct(size).normalized();
    for (const Eigen::VectorXd& other : edges) {
      const Eigen::VectorXd middle = edge + (edge.dot(other) < 0 ? -other : other);
      if (calls <= 0) break;
      if ((edge - middle / 2).norm() < 1e-9) continue;
      Eigen::MatrixXd V;
      look(middle.cwiseQuotient(size), V);
      if (found) return found;
    }
    if (edges.size() < 6) edges.push_back(edge);
  }
  return std::nullopt;
}

}  // namespace rejoinder
