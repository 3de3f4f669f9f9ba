// The findings JSON: the contract that other programs read (review format page).
#pragma once

#include <string>
#include <vector>

#include "core/judge/finding.h"

namespace rejoinder {

// One object for one review; keys in a fixed order, numbers in the shortest form that reads back the same double, infinity
// as the string "inf", what does not exist as null. Deterministic.
std::string findings_json(const CheckedReview& checked);

// An array of the reviews' objects for several files, the object alone for one.
std::string findings_json(const std::vector<CheckedReview>& checked);

}  // namespace rejoinder
