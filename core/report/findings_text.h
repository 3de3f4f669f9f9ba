// Findings as text for a terminal: what was claimed, what the print allows, why, what would settle it.
#pragma once

#include <string>

#include "core/judge/finding.h"

namespace rejoinder {

struct TextChoices {
  bool working = false;  // the arithmetic line by line
  int width = 92;        // columns; words wrap, figures are never cut
};

// UTF-8, no escape codes, ends with a newline. Deterministic.
std::string findings_text(const CheckedReview& checked, const TextChoices& choices = {});

// "4 claims looked at: 1 agrees, 1 does not match, 2 open, 0 without a test".
std::string totals_text(const CheckedReview& checked);

}  // namespace rejoinder
