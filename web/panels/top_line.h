// The standing line at the top: the review's name, what is kept and that nothing is sent, and what can be
// done with the whole page. What does not fit goes into a menu. Below it, where the window is narrow, the
// tabs of the panes.
#pragma once

#include <string>
#include <vector>

#include "web/model/intent.h"
#include "web/panels/hands.h"

namespace rejoinder {

// Another review kept on this machine, as the menu names it.
struct OtherReview {
  std::string slot;
  std::string name;  // its title and when it was last written
};

// Whether and when the review was last kept.
std::string kept_words();
inline constexpr const char* kNothingSent = "nothing is sent";

float top_line_height();
Intent show_top_line(const AppState& state, Hands& hands, const std::vector<OtherReview>& others,
                     float width);

float tabs_height();
Intent show_tabs(const AppState& state, Hands& hands, const ImVec2& at, float width);

}  // namespace rejoinder
