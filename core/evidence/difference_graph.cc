#include "core/evidence/difference_graph.h"

#include <algorithm>
#include <cmath>

namespace rejoinder {
namespace {

// Facts may touch at their rounding ends; less than this is floating point noise of the logarithms.
constexpr double kNoise = 1e-12;

struct Edge {
  int from, to;
  double length;
  std::size_t fact;
};

std::vector<Edge> edges_of(const std::vector<DifferenceGraph::Fact>& facts) {
  std::vector<Edge> edges;
  for (std::size_t i = 0; i < facts.size(); ++i) {
    const auto& fact = facts[i];
    if (fact.range.high < kInfinity) edges.push_back({fact.from, fact.to, fact.range.high, i});
    if (fact.range.low > -kInfinity) edges.push_back({fact.to, fact.from, -fact.range.low, i});
  }
  return edges;
}

}  // namespace

void DifferenceGraph::find_clash() {
  // Shortest walks of at most m edges, for growing m: the first negative closed walk has the fewest facts.
  const std::vector<Edge> edges = edges_of(facts_);
  for (int start = 0; start < size_; ++start) {
    // best[m][v]: least length of a walk of m edges from start to v, with the edge that ends it.
    std::vector<std::vector<double>> best(1, std::vector<double>(static_cast<std::size_t>(size_), kInfinity));
    std::vector<std::vector<int>> last(1, std::vector<int>(static_cast<std::size_t>(size_), -1));
    best[0][static_cast<std::size_t>(start)] = 0;
    for (int m = 1; m <= size_; ++m) {
      best.push_back(std::vector<double>(static_cast<std::size_t>(size_), kInfinity));
      last.push_back(std::vector<int>(static_cast<std::size_t>(size_), -1));
      for (std::size_t e = 0; e < edges.size(); ++e) {
        const double walk = best[static_cast<std::size_t>(m - 1)][static_cast<std::size_t>(edges[e].from)] + edges[e].length;
        double& here = best[static_cast<std::size_t>(m)][static_cast<std::size_t>(edges[e].to)];
        if (walk < here) {
          here = walk;
          last[static_cast<std::size_t>(m)][static_cast<std::size_t>(edges[e].to)] = static_cast<int>(e);
        }
      }
      if (!(best[static_cast<std::size_t>(m)][static_cast<std::size_t>(start)] < -kNoise)) continue;
      if (clash_ && static_cast<int>(clash_->size()) <= m) break;
      std::vector<std::size_t> used;
      int at = start;
      for (int step = m; step > 0; --step) {
        const Edge& edge = edges[static_cast<std::size_t>(last[static_cast<std::size_t>(step)][static_cast<std::size_t>(at)])];
        if (std::find(used.begin(), used.end(), edge.fact) == used.end()) used.push_back(edge.fact);
        at = edge.from;
      }
      std::vector<Fact> set;
      for (const std::size_t i : used)
        if (!facts_[i].says.empty()) set.push_back(facts_[i]);
      clash_ = std::move(set);
      break;
    }
  }
}

void DifferenceGraph::solve() {
  length_.assign(static_cast<std::size_t>(size_ * size_), kInfinity);
  for (int i = 0; i < size_; ++i) length(i, i) = 0;
  for (const Edge& edge : edges_of(facts_)) length(edge.from, edge.to) = std::min(length(edge.from, edge.to), edge.length);
  for (int k = 0; k < size_; ++k)
    for (int i = 0; i < size_; ++i)
      for (int j = 0; j < size_; ++j) length(i, j) = std::min(length(i, j), length(i, k) + length(k, j));
  clash_.reset();
  for (int i = 0; i < size_; ++i)
    if (length(i, i) < -kNoise) {
      find_clash();
      return;
    }
}

Interval DifferenceGraph::limits(int from, int to) const {
  const double high = length_[static_cast<std::size_t>(from * size_ + to)];
  const double low = -length_[static_cast<std::size_t>(to * size_ + from)];
  return low <= high ? Interval{low, high} : Interval{high, low};  // crossed within noise
}

}  // namespace rejoinder
