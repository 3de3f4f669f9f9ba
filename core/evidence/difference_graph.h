// Exact limits of differences of unknowns from limits on some of the differences.
//
// Every usual figure of a least-squares fit bounds the difference of two logarithms (of residual sums of squares and the
// total). Such facts form a graph; shortest paths between all pairs give the exact range of every difference, and a
// cycle of negative length means that the facts cannot all hold, the cycle naming them (Bellman 1958, Quarterly of
// Applied Mathematics 16; Floyd 1962, Communications of the ACM 5; both from memory).
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "core/evidence/evidence.h"

namespace rejoinder {

class DifferenceGraph {
 public:
  // Unknowns 0 .. size - 1; add one that stands for zero where a fact speaks of one unknown alone.
  explicit DifferenceGraph(int size) : size_(size) {}

  struct Fact {
    int from = 0, to = 0;  // x_to - x_from lies in `range`
    Interval range;
    std::string says;  // "R² of column (2) = 0.341"
    std::vector<Cell> cells;
  };
  // Infinite ends say nothing. A fact with an empty `says` is an identity (nesting) and never blamed.
  void add(Fact fact) { facts_.push_back(std::move(fact)); }

  // Contract: called before limits() and clash().
  void solve();

  // The facts that cannot all hold, fewest first found; nothing when all can.
  const std::optional<std::vector<Fact>>& clash() const { return clash_; }
  // Exact range of x_to - x_from; contract: no clash.
  Interval limits(int from, int to) const;
  const std::vector<Fact>& facts() const { return facts_; }

 private:
  double& length(int i, int j) { return length_[static_cast<std::size_t>(i * size_ + j)]; }
  void find_clash();

  int size_;
  std::vector<Fact> facts_;
  std::vector<double> length_;  // size x size, greatest value of x_j - x_i
  std::optional<std::vector<Fact>> clash_;
};

}  // namespace rejoinder
