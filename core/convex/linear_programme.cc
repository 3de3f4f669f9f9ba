#include "core/convex/linear_programme.h"

#include <algorithm>
#include <cmath>

namespace rejoinder {
namespace {

constexpr double kPivot = 1e-9;  // smaller elements are taken for round-off
constexpr double kCost = 1e-11;  // a reduced cost above -kCost counts as none

// The tableau B^-1 [rows | I | limits]; the identity columns are artificial, one a row, and let prices be
// read off.
class Simplex {
 public:
  Simplex(const LinearProgramme& programme)
      : programme_(programme),
        m_(static_cast<int>(programme.rows.rows())),
        n_(static_cast<int>(programme.rows.cols())),
        start_(m_, n_ + m_),
        limits_(programme.limits),
        basis_(m_) {
    start_.leftCols(n_) = programme.rows;
    start_.rightCols(m_).setIdentity();
    for (int i = 0; i < m_; ++i) {
      if (limits_(i) < 0) {
        start_.row(i).head(n_) *= -1;
        limits_(i) *= -1;
      }
      basis_[i] = n_ + i;
    }
    start_limits_ = limits_;
    table_ = start_;
    // A column that is positive in one row only can start in the basis and save an artificial pivot.
    for (int j = 0; j < n_; ++j) {
      int row = -1, count = 0;
      for (int i = 0; i < m_; ++i)
        if (start_(i, j) != 0) ++count, row = i;
      if (count == 1 && start_(row, j) > kPivot && basis_[row] >= n_) pivot(row, j);
    }
  }

  LinearSolution run() {
    LinearSolution solution;
    budget_ = 50 * (m_ + n_);
    Eigen::VectorXd artificial = Eigen::VectorXd::Zero(n_ + m_);
    artificial.tail(m_).setOnes();
    if (!descend(artificial, n_)) return solution;
    refresh();
    double left = 0;
    for (int i = 0; i < m_; ++i)
      if (basis_[i] >= n_) left += std::fabs(limits_(i));
    if (left > 1e-10 * (1 + start_limits_.cwiseAbs().maxCoeff())) {
      solution.settled = LinearSolution::Settled::Infeasible;
      read(artificial, solution);
      return solution;
    }
    expel_artificials();
    Eigen::VectorXd cost = Eigen::VectorXd::Zero(n_ + m_);
    cost.head(n_) = programme_.cost;
    for (int round = 0; round < 5; ++round) {
      if (!descend(cost, n_)) {
        solution.settled = unbounded_ ? LinearSolution::Settled::Unbounded : LinearSolution::Settled::No;
        return solution;
      }
      // Factorise afresh; if the true reduced costs are not all in order, go on from there.
      refresh();
      read(cost, solution);
      const double worst = (programme_.cost - programme_.rows.transpose() * solution.prices).minCoeff();
      solution.settled = LinearSolution::Settled::Optimal;
      if (worst > -1e-10 && limits_.minCoeff() > -1e-9) return solution;
    }
    return solution;
  }

 private:
  void pivot(int row, int column) {
    const double element = table_(row, column);
    table_.row(row) /= element;
    limits_(row) /= element;
    for (int i = 0; i < m_; ++i) {
      const double factor = table_(i, column);
      if (i == row || factor == 0) continue;
      table_.row(i) -= factor * table_.row(row);
      limits_(i) -= factor * limits_(row);
      table_(i, column) = 0;
    }
    basis_[row] = column;
  }

  // Pivots until no column below `usable` lowers the cost; false when unbounded or out of pivots.
  bool descend(const Eigen::VectorXd& cost, int usable) {
    int idle = 0;
    unbounded_ = false;
    while (budget_-- > 0) {
      Eigen::VectorXd basic(m_);
      for (int i = 0; i < m_; ++i) basic(i) = cost(basis_[i]);
      const Eigen::VectorXd reduced = cost.head(usable) - table_.leftCols(usable).transpose() * basic;
      int column = -1;
      for (int j = 0; j < usable; ++j) {
        if (reduced(j) >= -kCost) continue;
        if (column < 0 || reduced(j) < reduced(column)) column = j;
        if (idle > 2 * m_ + 20) break;  // Bland: the first one
      }
      if (column < 0) return true;
      // The row that reaches zero first; among near ties the largest pivot, under Bland the lowest index.
      double least = -1;
      for (int i = 0; i < m_; ++i) {
        if (table_(i, column) <= kPivot) continue;
        const double ratio = std::max(0.0, limits_(i)) / table_(i, column);
        if (least < 0 || ratio < least) least = ratio;
      }
      if (least < 0) {
        unbounded_ = true;
        return false;
      }
      int row = -1;
      for (int i = 0; i < m_; ++i) {
        if (table_(i, column) <= kPivot) continue;
        if (std::max(0.0, limits_(i)) / table_(i, column) > least * (1 + 1e-12) + 1e-14) continue;
        if (row < 0) {
          row = i;
        } else if (idle > 2 * m_ + 20) {
          if (basis_[i] < basis_[row]) row = i;
        } else if (table_(i, column) > table_(row, column)) {
          row = i;
        }
      }
      idle = least * -reduced(column) > 1e-13 ? 0 : idle + 1;
      pivot(row, column);
    }
    return false;
  }

  // An artificial left in the basis at zero is swapped for any real column of its row; a row without one is
  // redundant.
  void expel_artificials() {
    for (int i = 0; i < m_; ++i) {
      if (basis_[i] < n_) continue;
      Eigen::Index column = 0;
      if (table_.row(i).head(n_).cwiseAbs().maxCoeff(&column) > kPivot) {
        pivot(i, static_cast<int>(column));
      }
    }
  }

  Eigen::MatrixXd basis_matrix() const {
    Eigen::MatrixXd B(m_, m_);
    for (int i = 0; i < m_; ++i) B.col(i) = start_.col(basis_[i]);
    return B;
  }

  // The tableau recomputed from the data.
  void refresh() {
    const Eigen::FullPivLU<Eigen::MatrixXd> lu(basis_matrix());
    if (!lu.isInvertible()) return;
    table_ = lu.solve(start_);
    limits_ = lu.solve(start_limits_);
    limits_ += lu.solve(start_limits_ - basis_matrix() * limits_);
  }

  void read(const Eigen::VectorXd& cost, LinearSolution& solution) const {
    const Eigen::MatrixXd B = basis_matrix();
    Eigen::VectorXd basic(m_);
    for (int i = 0; i < m_; ++i) basic(i) = cost(basis_[i]);
    const Eigen::FullPivLU<Eigen::MatrixXd> lu(B.transpose());
    Eigen::VectorXd prices = lu.solve(basic);
    prices += lu.solve(basic - B.transpose() * prices);
    for (int i = 0; i < m_; ++i)
      if (programme_.limits(i) < 0) prices(i) *= -1;  // the row was turned over
    solution.prices = prices;
    solution.x = Eigen::VectorXd::Zero(n_);
    for (int i = 0; i < m_; ++i)
      if (basis_[i] < n_) solution.x(basis_[i]) = std::max(0.0, limits_(i));
    solution.value = programme_.cost.dot(solution.x);
  }

  const LinearProgramme& programme_;
  const int m_, n_;
  Eigen::MatrixXd start_, table_;  // m by n + m
  Eigen::VectorXd limits_, start_limits_;
  std::vector<int> basis_;
  int budget_ = 0;
  bool unbounded_ = false;
};

}  // namespace

LinearSolution solve(const LinearProgramme& programme) {
  LinearSolution solution;
  if (programme.rows.rows() == 0) {
    solution.x = Eigen::VectorXd::Zero(programme.cost.size());
    solution.settled = programme.cost.size() == 0 || programme.cost.minCoeff() >= 0
                           ? LinearSolution::Settled::Optimal
                           : LinearSolution::Settled::Unbounded;
    return solution;
  }
  return Simplex(programme).run();
}

}  // namespace rejoinder
