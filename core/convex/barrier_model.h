// The set of admissible (b, V) written as blocks and slacks for the barrier method.
//
// V is scaled to variances of at most 1 and b to standard errors from its centre, every interval to width 1,
// so that units and entries that differ by many orders of size do not matter. All unknowns sit in one
// symmetric matrix
//
//   X = [ V  b ]      and the bordered block is   Z = [ S  d ],   S = R V R',  d = Rb - r,
//       [ b' w ]                                      [ d' w ]
//
// which has no negative eigenvalue exactly when w >= d' S^-1 d: w is the Wald statistic to be made least.
// Both V and Z are linear in X, so one formula serves for all second derivatives of -log det.
//
// Letters: m coefficients taking part, q rows, n unknowns (entries of X and one helper a one-sided
// correlation cap).
#pragma once

#include <Eigen/Dense>
#include <utility>
#include <vector>

#include "core/convex/certificate.h"

namespace rejoinder {

class BarrierModel {
 public:
  // With rows: the bordered block belongs to the model. `R` may have 0 rows for a model of V alone.
  BarrierModel(const AdmissibleSet& set, const ConvexFacts& facts, const Eigen::MatrixXd& R,
               const Eigen::VectorXd& r);

  int unknowns() const { return static_cast<int>(places_.size()); }
  bool bordered() const { return rows_ > 0; }
  const std::vector<int>& taking_part() const { return taking_part_; }  // m columns of the set, ascending
  int border_unknown() const { return border_unknown_; }                // of w; -1 without rows
  double complexity(bool with_border) const;  // the sum of the orders of all blocks and slacks

  // A start: middles of intervals, w left at 0. `equality_residual` is what the exact facts leave
  // unsatisfied.
  Eigen::VectorXd start() const { return start_; }
  double equality_residual() const { return equality_residual_; }
  // Directions that keep the exact facts: n by (free unknowns), without w. Columns are orthonormal or unit
  // vectors.
  const Eigen::MatrixXd& directions() const { return directions_; }
  bool directions_are_units() const { return direction_units_.size() > 0 || directions_.cols() == 0; }
  const std::vector<int>& direction_units() const { return direction_units_; }

  // How far `tau` must at least be for V + tau I, the caps and the slacks to hold.
  double least_tau(const Eigen::VectorXd& x) const;
  // w at which the bordered block is just singular: the scaled Wald statistic.
  double scaled_wald(const Eigen::VectorXd& x, double tau) const;
  double wald_unit() const { return distance_unit_ * distance_unit_; }  // W = scaled value times this

  // The barrier; infinite outside. tau is added to V, caps and slacks.
  double barrier(const Eigen::VectorXd& x, double tau, bool with_border) const;
  // Gradient (n + 1) and Hessian (n + 1 square) of the barrier; the last place is tau.
  void derivatives(const Eigen::VectorXd& x, double tau, bool with_border, Eigen::VectorXd& gradient,
                   Eigen::MatrixXd& hessian) const;
  // J (rows by n + 1) with J'J the Hessian: for the last steps, where the Hessian itself has lost its digits.
  Eigen::MatrixXd hessian_root(const Eigen::VectorXd& x, double tau, bool with_border) const;

  // Multipliers of the point x with Newton step dx, dtau at weight kappa: the change of each block to first
  // order is taken in, which makes them satisfy the dual equations up to rounding. `objective` (n) is what is
  // minimised.
  struct Dual {
    Eigen::VectorXd c;  // of the rows given to the constructor; empty without them
    Multipliers multipliers;
  };
  Dual dual(const Eigen::VectorXd& x, double tau, const Eigen::VectorXd& dx, double dtau, double kappa,
            bool with_border, const Eigen::VectorXd& objective) const;
  // Multipliers that prove the exact facts to exclude each other, where equality_residual() is not small.
  Multipliers equality_proof() const;

  // In the units of the print. Coefficients that take no part are at the middle of what the set says,
  // uncorrelated.
  Eigen::VectorXd coefficients(const Eigen::VectorXd& x) const;
  Eigen::MatrixXd covariance(const Eigen::VectorXd& x) const;
  // The objective <T, V> in the unknowns (n), for T in the units of the print (p by p); `unit` is its size.
  Eigen::VectorXd functional(const Eigen::MatrixXd& T, double& unit) const;

 private:
  struct Place {
    int i, j;  // entry of X, i >= j; i = -1 for a helper
  };
  enum class Origin { Fact, Box, CoefficientFact, Cap };
  // constant + cells * x + tau >= 0. `sign` -1 for a lower end; multiplier / unit is in the units of the
  // print.
  struct Slack {
    std::vector<std::pair<int, double>> cells;
    double constant;
    Origin origin;
    int index;
    double sign, unit;
  };
  struct Equality {
    std::vector<std::pair<int, double>> cells;
    double value;
    Origin origin;
    int index;
    double unit;
  };
  struct CapBlock {
    int first, second, off;  // unknowns
    double limit;
    int index;
  };

  void place_unknowns();
  void add_facts();
  void add_caps();
  void add_coefficients();
  void find_directions();
  void add_range(const std::vector<std::pair<int, double>>& cells, const Interval& value, double natural,
                 Origin origin, int index);
  int unknown(int i, int j) const { return index_(std::max(i, j), std::min(i, j)); }
  Eigen::MatrixXd shifted(const Eigen::VectorXd& x, double tau) const;  // V + tau I, m by m
  // Z, q + 1 square; with a zero offset it is linear and so serves for changes too.
  Eigen::MatrixXd border(const Eigen::VectorXd& x, double tau, const Eigen::VectorXd& offset) const;
  Eigen::Matrix2d cap_matrix(const CapBlock& cap, const Eigen::VectorXd& x, double tau) const;
  double slack_value(const Slack& slack, const Eigen::VectorXd& x, double tau) const;

  const AdmissibleSet& set_;
  const ConvexFacts& facts_;
  std::vector<int> taking_part_;  // m: columns of the set
  Eigen::VectorXd scale_;         // m
  int size_ = 0, rows_ = 0;       // m, q after rows with unknown coefficients are taken out
  Eigen::MatrixXd row_mix_;       // rows given by q: R_used = row_mix' R, already brought to length one
  Eigen::MatrixXd R_;             // q by m, scaled
  Eigen::VectorXd offset_;        // q: R b0 - r in the same scaling, over distance_unit_
  double distance_unit_ = 1;
  std::vector<Place> places_;  // n
  Eigen::MatrixXi index_;      // m + 1 square, lower: entry of X -> unknown, -1 for none
  int border_unknown_ = -1;
  std::vector<Slack> slacks_;
  std::vector<Equality> equalities_;
  std::vector<CapBlock> caps_;
  std::vector<int> fixed_coefficients_;  // unknowns of exact coefficients
  Eigen::VectorXd start_;
  Eigen::MatrixXd directions_;
  std::vector<int> direction_units_;
  double equality_residual_ = 0;
  Eigen::VectorXd equality_gap_;
};

}  // namespace rejoinder
