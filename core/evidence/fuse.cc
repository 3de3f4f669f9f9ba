#include "core/evidence/fuse.h"

#include <algorithm>

namespace rejoinder {

Fused fuse(std::vector<Evidence>& evidence) {
  Fused out;
  int low_from = 0, high_from = 0;
  for (int i = 1; i < static_cast<int>(evidence.size()); ++i) {
    if (evidence[static_cast<std::size_t>(i)].wald.low > evidence[static_cast<std::size_t>(low_from)].wald.low) low_from = i;
    if (evidence[static_cast<std::size_t>(i)].wald.high < evidence[static_cast<std::size_t>(high_from)].wald.high) high_from = i;
  }
  Evidence &low = evidence[static_cast<std::size_t>(low_from)], &high = evidence[static_cast<std::size_t>(high_from)];
  out.wald = {low.wald.low, high.wald.high};
  out.low = low.low;
  out.high = high.high;
  if (out.wald.low > out.wald.high) {
    if (out.wald.low > out.wald.high * (1 + 1e-9) + 1e-12) {
      out.contradict = true;
      out.first = low_from;
      out.second = high_from;
      return out;
    }
    std::swap(out.wald.low, out.wald.high);
  }
  low.binds = high.binds = true;
  // What two routes attain apart need not be attained together, so only a single route's attained values are passed on.
  if (evidence.size() == 1) {
    out.attained = evidence[0].attained;
  } else {
    if (low_from != high_from || std::count_if(evidence.begin(), evidence.end(), [](const Evidence& e) { return e.binds; }) > 1) {
      out.low = std::max(out.low, Sharpness::Guaranteed);
      if (out.high == Sharpness::Exact) out.high = Sharpness::Guaranteed;
    } else {
      out.attained = low.attained;
    }
  }
  return out;
}

}  // namespace rejoinder
