// All routes that speak about one test narrow one another.
#pragma once

#include <optional>
#include <vector>

#include "core/evidence/evidence.h"

namespace rejoinder {

struct Fused {
  Interval wald{0, kInfinity};
  Sharpness low = Sharpness::Exact, high = Sharpness::Exact;
  std::optional<Interval> attained;
  bool contradict = false;  // two routes share no value; `wald` is then not to be used
  int first = -1, second = -1;  // the two
};

// Intersects the ranges of `evidence` (not empty) and marks those that bind an end. Ends that touch within 1e-9 relative
// still meet.
Fused fuse(std::vector<Evidence>& evidence);

}  // namespace rejoinder
