// The page as words: for screen readers, find-in-page, printing and copying, and for whoever has no canvas.
#pragma once

#include <string>

#include "web/model/state.h"

namespace rejoinder {

// Everything the workbench shows, as a fragment of HTML for the page's own DOM: the table, the claims with
// their findings, evidence, working, what would settle each, the audit, and what could not be read. Headings
// start at level 1; tables have headers with scope; every state stands in words beside its mark. No styles,
// no scripts, no links; every text of the user's is escaped. Same state, same bytes.
std::string companion_html(const AppState& state);

// The report as a whole HTML page that needs nothing else: for printing, filing, handing on. One paragraph a
// claim, the span drawn, the figures used and the working.
std::string report_page(const AppState& state);

// Text for HTML: & < > " ' escaped.
std::string escaped(std::string_view text);

}  // namespace rejoinder
