#include "core/convex/coefficient_range.h"

#include <cmath>

#include "core/convex/certificate.h"
#include "core/convex/linear_programme.h"

namespace rejoinder {
namespace {

// Columns: y_j in [0, 2] with b_j = centre_j + h_j (y_j - 1), the rest of that, then one slack a fact end.
GreatestCombination by_programme(const AdmissibleSet& set, const Eigen::VectorXd& a) {
  const int p = set.size();
  struct Row {
    int fact;
    double end, slack;  // the slack's sign; 0 for an exact fact
  };
  std::vector<Row> rows;
  for (int k = 0; k < static_cast<int>(set.coefficient_facts.size()); ++k) {
    const Interval& value = set.coefficient_facts[k].value;
    if (std::isfinite(value.low)) rows.push_back({k, value.low, value.is_point() ? 0.0 : -1.0});
    if (std::isfinite(value.high) && !value.is_point()) rows.push_back({k, value.high, 1.0});
  }
  const int m = static_cast<int>(rows.size());
  LinearProgramme programme;
  programme.cost = Eigen::VectorXd::Zero(2 * p + m);
  programme.rows = Eigen::MatrixXd::Zero(p + m, 2 * p + m);
  programme.limits = Eigen::VectorXd::Constant(p + m, 2);
  Eigen::VectorXd unit(p), scale = Eigen::VectorXd::Ones(m);
  for (int j = 0; j < p; ++j) {
    // An unknown coefficient is given a very wide box; the guaranteed value does not rest on it.
    unit(j) = std::isfinite(set.half_width(j)) ? set.half_width(j) : 1e6 * (1 + std::fabs(set.centre(j)));
    programme.rows(j, j) = programme.rows(j, p + j) = 1;
  }
  const Eigen::VectorXd weights = a.cwiseProduct(unit);
  const double size = std::max(1e-300, weights.cwiseAbs().maxCoeff());
  programme.cost.head(p) = -weights / size;
  for (int i = 0; i < m; ++i) {
    const CoefficientFact& fact = set.coefficient_facts[rows[i].fact];
    programme.limits(p + i) = rows[i].end - fact.a.dot(set.centre - unit);
    programme.rows.row(p + i).head(p) = fact.a.cwiseProduct(unit).transpose();
    scale(i) = std::max(1e-300, programme.rows.row(p + i).cwiseAbs().maxCoeff());
    programme.rows.row(p + i) /= scale(i);
    programme.limits(p + i) /= scale(i);
    programme.rows(p + i, 2 * p + i) = rows[i].slack;
  }
  const LinearSolution solution = solve(programme);
  GreatestCombination answer;
  if (solution.settled != LinearSolution::Settled::Optimal) return answer;
  answer.b = set.centre + unit.cwiseProduct(solution.x.head(p) - Eigen::VectorXd::Ones(p));
  // -a'b is bounded from below with the prices of the facts.
  Eigen::VectorXd z = Eigen::VectorXd::Zero(set.coefficient_facts.size());
  for (int i = 0; i < m; ++i) z(rows[i].fact) += solution.prices(p + i) / scale(i) * size;
  answer.guaranteed =
      -least_distance(set, a.transpose(), Eigen::VectorXd::Zero(1), -Eigen::VectorXd::Ones(1), z);
  return answer;
}

}  // namespace

GreatestCombination greatest_combination(const AdmissibleSet& set, const Eigen::VectorXd& a) {
  if (!set.coefficient_facts.empty()) return by_programme(set, a);
  GreatestCombination answer;
  answer.b = set.centre;
  for (int j = 0; j < set.size(); ++j)
    if (a(j) != 0 && std::isfinite(set.half_width(j)))
      answer.b(j) += a(j) > 0 ? set.half_width(j) : -set.half_width(j);
  answer.guaranteed = -least_distance(set, a.transpose(), Eigen::VectorXd::Zero(1), -Eigen::VectorXd::Ones(1),
                                      Eigen::VectorXd(0));
  return answer;
}

FarthestDistance farthest_distance(const AdmissibleSet& set, const Eigen::MatrixXd& R,
                                   const Eigen::VectorXd& r, const Eigen::VectorXd& c) {
  const Eigen::VectorXd a = R.transpose() * c;
  const GreatestCombination up = greatest_combination(set, a), down = greatest_combination(set, -a);
  FarthestDistance answer;
  if (up.b.size() == 0 || down.b.size() == 0) return answer;
  const double above = c.dot(R * up.b - r), below = -c.dot(R * down.b - r);
  answer.b = above >= below ? up.b : down.b;
  // c'r and a are rounded once more than greatest_combination knows of.
  const double shift = c.dot(r);
  const double room = 4 * (static_cast<double>(R.rows()) + 2) * std::numeric_limits<double>::epsilon() *
                      (c.cwiseAbs().dot(r.cwiseAbs()) +
                       c.cwiseAbs().dot(R.cwiseAbs() * (set.centre.cwiseAbs() + set.half_width)));
  answer.guaranteed = std::max({0.0, up.guaranteed - shift, down.guaranteed + shift}) + room;
  if (std::isnan(answer.guaranteed)) answer.guaranteed = kInfinity;
  return answer;
}

}  // namespace rejoinder
