// Parts of the companion text and of the report that both use.
#pragma once

#include <string>
#include <vector>

#include "core/judge/finding.h"

namespace rejoinder {

// "<tag>escaped text</tag>\n", or nothing for empty text.
std::string element(const std::string& tag, std::string_view text);
// A list of escaped items, or nothing.
std::string bullets(const std::vector<std::string>& items, const char* tag = "ul");

// Mark and words of a state: "≠ Does not match the print".
std::string state_words(State state);

// The three parts as a definition list.
std::string parts_html(const Finding& finding);
// Every route with its limits, its assumptions and its grounds, as a table.
std::string evidence_html(const Finding& finding);

// The span as inline SVG: limits as a bar, the critical value as a rule across it, the reported figure as a
// pin whose foot is as wide as its rounding. Empty where the finding has no limits. With a text alternative.
std::string span_svg(const Finding& finding);

}  // namespace rejoinder
