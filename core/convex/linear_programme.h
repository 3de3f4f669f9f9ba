// Small dense linear programmes, solved to a vertex.
//
//   minimise cost'x   subject to   rows x = limits,  x >= 0
//
// The vertex is what matters: after the simplex method stops, the basis is factorised afresh from the data,
// so that x and the prices carry no error of the pivots before. Sizes of up to about a hundred rows; no
// sparsity is used. Method: the primal simplex method in two phases (Dantzig 1963, Linear Programming and
// Extensions; from memory), with Bland's rule (1977, Math. Oper. Res. 2; from memory) after a run of pivots
// that gain nothing.
#pragma once

#include <Eigen/Dense>
#include <vector>

namespace rejoinder {

struct LinearProgramme {
  Eigen::VectorXd cost;    // n
  Eigen::MatrixXd rows;    // m by n
  Eigen::VectorXd limits;  // m
};

struct LinearSolution {
  enum class Settled {
    Optimal,     // x and prices solve the programme
    Infeasible,  // prices y prove it: y'rows <= 0 in every column while y'limits > 0
    Unbounded,
    No  // neither within the pivot limit
  };
  Settled settled = Settled::No;
  Eigen::VectorXd x;       // n
  Eigen::VectorXd prices;  // m; value = prices'limits, and rows'prices <= cost
  double value = 0;
};

// Never throws and always ends (pivot limit 50 (m + n)). Rows should be scaled to entries of about 1 by the
// caller. Redundant rows are allowed.
LinearSolution solve(const LinearProgramme& programme);

}  // namespace rejoinder
