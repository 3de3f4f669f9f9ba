// Undo and redo over the review's text.
#pragma once

#include <cstddef>
#include <optional>
#include <string>

#include "web/model/state.h"

namespace rejoinder {

// What past and future may hold together. The oldest steps go first.
inline constexpr std::size_t kHistoryBytes = std::size_t{64} << 20;

// Keeps `document` as it is before a change. `edit` names what is about to change ("cell full/fare/se");
// typing on in the same place is one step, so a second call with the same name keeps nothing. An empty name
// always starts a step.
void remember(History& history, const Node& document, const std::string& edit);

// The next change starts a new step, even in the same place: the reader has looked elsewhere in between.
void end_step(History& history);

// The document one step back or on, or nothing where there is none. `now` goes to the other side.
std::optional<Node> step_back(History& history, const Node& now);
std::optional<Node> step_on(History& history, const Node& now);

// As remember, undo and redo, with another bound; tests use a small one.
void trim(History& history, std::size_t bytes);

}  // namespace rejoinder
