#include "core/convex/cones.h"

#include <algorithm>
#include <cmath>
#include <map>
#include <queue>

#include "core/convex/coefficient_range.h"
#include "core/convex/witness.h"

namespace rejoinder {
namespace {

struct Generator {
  Eigen::VectorXd gamma;  // q, in whitened coordinates, unit length
  Eigen::VectorXd a;      // p
  double distance;        // n
  Eigen::VectorXd b;
};

class Search {
 public:
  Search(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r,
         LeastVariance& variance, double attained)
      : set_(set), R_(R), r_(r), variance_(variance), attained_(attained) {
    // Whitened: c = L^-T gamma with LL' = R V R' at an interior V, so that l is of order one in every
    // direction.
    const Eigen::LLT<Eigen::MatrixXd> llt(R * variance.interior() * R.transpose());
    usable_ = llt.info() == Eigen::Success;
    if (usable_) unwhiten_ = llt.matrixL().transpose().solve(Eigen::MatrixXd::Identity(R.rows(), R.rows()));
  }

  ConeSearch run(double agreement, int node_limit, int calls) {
    ConeSearch result;
    if (!usable_) return result;
    const int limit = variance_.calls() + calls;
    for (const std::vector<int>& cone : first_cones()) push(cone);
    double settled = 0;  // the largest bound of cones that need no further halving
    while (!queue_.empty()) {
      const Node node = queue_.top();
      if (node.bound <= attained_ * (1 + agreement)) break;
      if (result.nodes >= node_limit || variance_.calls() >= limit) break;
      queue_.pop();
      ++result.nodes;
      if (!halve(node.cone)) settled = std::max(settled, node.bound);
    }
    const double open = queue_.empty() ? 0 : queue_.top().bound;
    result.guaranteed = std::max({settled, open, attained_});
    result.best = best_;
    return result;
  }

 private:
  struct Node {
    double bound;
    std::vector<int> cone;
    bool operator<(const Node& other) const { return bound < other.bound; }
  };

  int generator(const Eigen::VectorXd& direction) {
    Generator made;
    made.gamma = direction.normalized();
    const Eigen::VectorXd c = unwhiten_ * made.gamma;
    made.a = R_.transpose() * c;
    const FarthestDistance far = farthest_distance(set_, R_, r_, c);
    made.distance = far.guaranteed;
    made.b = far.b;
    generators_.push_back(made);
    return static_cast<int>(generators_.size()) - 1;
  }

  double least(int i, int j) {
    const auto key = std::minmax(i, j);
    const auto found = known_.find(key);
    if (found != known_.end()) return found->second;
    const LeastVariance::Answer answer = variance_.between(generators_[i].a, generators_[j].a);
    known_[key] = answer.guaranteed;
    for (const int k : {i, j}) {
      if (generators_[k].b.size() == 0) continue;
      const WaldWitness now = make_witness(set_, R_, r_, generators_[k].b, answer.V);
      if (std::isfinite(now.wald) && now.wald > best_.wald && now.outside < 1e-9) {
        best_ = now;
        attained_ = std::max(attained_, now.wald);
      }
    }
    return answer.guaranteed;
  }

  void push(const std::vector<int>& cone) {
    const int q = static_cast<int>(cone.size());
    Eigen::VectorXd n(q);
    Eigen::MatrixXd L(q, q);
    for (int i = 0; i < q; ++i) {
      n(i) = generators_[cone[i]].distance;
      for (int j = 0; j <= i; ++j) L(i, j) = L(j, i) = least(cone[i], cone[j]);
    }
    queue_.push({greatest_ratio(n, L), cone});
  }

  // False when the cone is too thin to be halved further.
  bool halve(const std::vector<int>& cone) {
    const int q = static_cast<int>(cone.size());
    if (q == 1) return false;
    int first = 0, second = 1;
    double longest = -1;
    for (int i = 0; i < q; ++i)
      for (int j = 0; j < i; ++j) {
        const double edge = (generators_[cone[i]].gamma - generators_[cone[j]].gamma).norm();
        if (edge > longest) longest = edge, first = i, second = j;
      }
    if (longest < 1e-7) return false;
    const auto key = std::minmax(cone[first], cone[second]);
    auto found = middles_.find(key);
    if (found == middles_.end())
      found =
          middles_.emplace(key, generator(generators_[cone[first]].gamma + generators_[cone[second]].gamma))
              .first;
    for (const int replaced : {first, second}) {
      std::vector<int> half = cone;
      half[replaced] = found->second;
      push(half);
    }
    return true;
  }

  // Half of all directions, since c and -c are one: with two rows the plane cut where a distance or a weight
  // changes sign, because n is linear in between; otherwise the orthants.
  std::vector<std::vector<int>> first_cones() {
    const int q = static_cast<int>(R_.rows());
    std::vector<std::vector<int>> cones;
    if (q == 1) return {{generator(Eigen::VectorXd::Ones(1))}};
    if (q == 2) {
      std::vector<double> cuts = {0, M_PI / 2};
      const auto cut_at = [&](const Eigen::VectorXd& normal) {
        const Eigen::VectorXd g = unwhiten_.transpose() * normal;
        if (g.norm() == 0) return;
        double angle = std::atan2(-g(0), g(1));
        if (angle < 0) angle += M_PI;
        if (angle >= M_PI) angle -= M_PI;
        cuts.push_back(angle);
      };
      for (int j = 0; j < R_.cols() && j < 40; ++j) cut_at(R_.col(j));
      cut_at(R_ * set_.centre - r_);
      std::sort(cuts.begin(), cuts.end());
      std::vector<double> apart;
      for (const double angle : cuts)
        if (apart.empty() || angle - apart.back() > 1e-9) apart.push_back(angle);
      std::vector<int> made;
      for (const double angle : apart)
        made.push_back(generator(Eigen::Vector2d(std::cos(angle), std::sin(angle))));
      made.push_back(generator(-generators_[made[0]].gamma));
      for (std::size_t k = 0; k + 1 < made.size(); ++k) cones.push_back({made[k], made[k + 1]});
      return cones;
    }
    std::vector<int> plus, minus;
    for (int i = 0; i < q; ++i) {
      plus.push_back(generator(Eigen::VectorXd::Unit(q, i)));
      minus.push_back(generator(-Eigen::VectorXd::Unit(q, i)));
    }
    for (int pattern = 0; pattern < (1 << (q - 1)); ++pattern) {
      std::vector<int> cone = {plus[0]};
      for (int i = 1; i < q; ++i) cone.push_back((pattern >> (i - 1)) & 1 ? minus[i] : plus[i]);
      cones.push_back(cone);
    }
    return cones;
  }

  const AdmissibleSet& set_;
  const Eigen::MatrixXd& R_;
  const Eigen::VectorXd& r_;
  LeastVariance& variance_;
  bool usable_ = false;
  double attained_ = 0;
  WaldWitness best_;
  Eigen::MatrixXd unwhiten_;  // q by q
  std::vector<Generator> generators_;
  std::map<std::pair<int, int>, double> known_;
  std::map<std::pair<int, int>, int> middles_;
  std::priority_queue<Node> queue_;
};

}  // namespace

ConeSearch search_cones(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r,
                        LeastVariance& variance, double attained, double agreement, int node_limit,
                        int calls) {
  return Search(set, R, r, variance, attained).run(agreement, node_limit, calls);
}

double greatest_ratio(const Eigen::VectorXd& n, const Eigen::MatrixXd& L) {
  const int q = static_cast<int>(n.size());
  if (!L.allFinite() || !n.allFinite()) return kInfinity;
  // Face by face: the ratio is stationary inside a face where L_ss x = n_s has a solution x >= 0. On the way
  // strict copositivity is settled, by the stationary points of x'Lx on the simplex: L_ss x = 1 with all x
  // negative means a negative value inside the face.
  double best = 0;
  for (int face = 1; face < (1 << q); ++face) {
    std::vector<int> at;
    for (int i = 0; i < q; ++i)
      if ((face >> i) & 1) at.push_back(i);
    const int k = static_cast<int>(at.size());
    Eigen::MatrixXd block(k, k);
    Eigen::VectorXd side(k);
    for (int i = 0; i < k; ++i) {
      side(i) = n(at[i]);
      for (int j = 0; j < k; ++j) block(i, j) = L(at[i], at[j]);
    }
    if (k == 1) {
      if (!(block(0, 0) > 0)) return kInfinity;
      best = std::max(best, side(0) * side(0) / block(0, 0));
      continue;
    }
    // A block without negative entries (the diagonal is positive here) is strictly copositive and has its
    // greatest value bounded by the cruder (max n)^2 / min L when it is singular.
    const Eigen::FullPivLU<Eigen::MatrixXd> lu(block);
    const double size = block.cwiseAbs().maxCoeff();
    if (std::fabs(lu.matrixLU().diagonal().cwiseAbs().minCoeff()) < 1e-12 * size) {
      if (!(block.minCoeff() > 0)) return kInfinity;
      best = std::max(best, side.maxCoeff() * side.maxCoeff() / block.minCoeff());
      continue;
    }
    const Eigen::VectorXd ones = lu.solve(Eigen::VectorXd::Ones(k));
    if (ones.maxCoeff() <= 1e-12 * ones.cwiseAbs().maxCoeff()) return kInfinity;
    const Eigen::VectorXd x = lu.solve(side);
    if (x.minCoeff() >= -1e-9 * x.cwiseAbs().maxCoeff()) best = std::max(best, side.dot(x));
  }
  return best * (1 + 1e-11);
}

}  // namespace rejoinder
