// The parts of read_review, one for each kind of table. Private to core/review.
#pragma once

#include <set>
#include <string>

#include "core/review/fields.h"

namespace rejoinder {

// `number` counts columns and claims from 1 and names those without an id.
Column read_column(const Section& top, const Node& table, int number);
Source read_source(const Section& top, const Node& table, int number);
std::optional<Variables> read_variables(const Section& top, const Node& table);
Claim read_claim(const Section& top, const Node& table, int number);

struct KnownNames {
  std::set<std::string> columns, sources, variables;
  explicit KnownNames(const Review& review);
};
// What a claim names must be in the review. Lists what is not.
void check_names(const Section& top, const KnownNames& known, const Claim& claim);

}  // namespace rejoinder
