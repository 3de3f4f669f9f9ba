// Which of a set of linear restrictions say something new, which are implied, and which cannot hold together.
#pragma once

#include <Eigen/Dense>
#include <optional>
#include <vector>

namespace rejoinder {

struct Clash {
  int row = 0;            // the first row that the ones before it rule out
  std::vector<int> with;  // the fewest earlier rows that rule it out; empty where it rules itself out (0 = 1)
};

struct Elimination {
  std::vector<int> kept;     // independent rows, in order
  std::vector<int> implied;  // rows that follow from kept ones before them
  std::optional<Clash> clash;
};

// rows * b = values, rows m x p. Each row is kept when, after scaling columns and rows to like size, more
// than 1e-10 of it lies outside the span of the kept rows before it (Gram-Schmidt, done twice). Stops at the
// first clash.
Elimination eliminate(const Eigen::MatrixXd& rows, const Eigen::VectorXd& values);

}  // namespace rejoinder
