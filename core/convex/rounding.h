// A sum that knows how far rounding may have moved it.
//
// Guaranteed bounds are sums of products of doubles. Adding them up together with their absolute values
// bounds the rounding error of the whole by a small multiple of the machine epsilon (Higham 2002, Accuracy
// and Stability of Numerical Algorithms, sec. 3.1; from memory), so that the sum can be reported rounded down
// or up.
#pragma once

#include <cmath>
#include <limits>

#include "core/number/interval.h"

namespace rejoinder {

class TrackedSum {
 public:
  // Adds a term that is itself exact to within `roundings` roundings.
  void add(double term, int roundings = 2) {
    sum_ += term;
    size_ += std::fabs(term);
    roundings_ = roundings > roundings_ ? roundings : roundings_;
    ++terms_;
  }
  // Adds a term known only to lie within `error` of what is given.
  void add_uncertain(double term, double error) {
    add(term);
    error_ += error;
  }
  double value() const { return sum_; }
  double error() const {
    return (terms_ + roundings_ + 2) * std::numeric_limits<double>::epsilon() * size_ + error_ * (1 + 1e-12);
  }
  double lower() const { return step_down(sum_ - error()); }
  double upper() const { return step_up(sum_ + error()); }

 private:
  double sum_ = 0, size_ = 0, error_ = 0;
  int terms_ = 0, roundings_ = 0;
};

}  // namespace rejoinder
