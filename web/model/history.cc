#include "web/model/history.h"

namespace rejoinder {
namespace {

std::optional<Node> step(std::vector<std::string>& from, std::vector<std::string>& to, const Node& now) {
  while (!from.empty()) {
    Result<Node> document = read_document(from.back());
    from.pop_back();
    // A text that this program wrote is readable; should one ever not be, the step before it still is.
    if (!document.ok()) continue;
    to.push_back(write_document(now));
    return std::move(document).value();
  }
  return std::nullopt;
}

}  // namespace

void remember(History& history, const Node& document, const std::string& edit) {
  history.future.clear();
  if (!edit.empty() && edit == history.last_edit && !history.past.empty()) return;
  history.last_edit = edit;
  history.past.push_back(write_document(document));
  trim(history, kHistoryBytes);
}

void end_step(History& history) { history.last_edit.clear(); }

std::optional<Node> step_back(History& history, const Node& now) {
  end_step(history);
  return step(history.past, history.future, now);
}

std::optional<Node> step_on(History& history, const Node& now) {
  end_step(history);
  return step(history.future, history.past, now);
}

void trim(History& history, std::size_t bytes) {
  std::size_t held = 0;
  for (const std::string& text : history.past) held += text.size();
  for (const std::string& text : history.future) held += text.size();
  std::size_t drop = 0;
  while (held > bytes && drop < history.past.size()) held -= history.past[drop++].size();
  history.past.erase(history.past.begin(), history.past.begin() + static_cast<std::ptrdiff_t>(drop));
}

}  // namespace rejoinder
