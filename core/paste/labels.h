// What the words of a pasted table mean: labels of foot lines, headings, notes. Private to core/paste.
#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace rejoinder {

// Small letters and digits only, single blanks between words: "R² (adj.)" with its raised digit made plain
// gives "r2 adj".
std::string plain_label(std::string_view label);

// The review's key for a foot line, "n" for "Observations", "r2" for "R-squared"; empty where the label is
// not known.
std::string foot_key(std::string_view label);

bool is_intercept_label(std::string_view label);

// "coef", "se", "t", "p", "ci" for a heading such as "Std. err."; empty where it is none of them.
std::string heading_key(std::string_view heading);

// "ss", "df", "ms", "f", "p" for a heading of an analysis of variance table; empty otherwise.
std::string source_key(std::string_view heading);

// "OR (95% CI)", "Hazard ratio", ...: figures under it are ratios.
bool is_ratio_heading(std::string_view heading);

// What notes under the table say of the figures in brackets: "se", "t", "p", "ci", or "".
std::string second_figure_in(std::string_view note);

// "* p<0.10, ** p<0.05, *** p<0.01" gives {0.10, 0.05, 0.01}; percent signs divide by a hundred. Empty where
// the note states no levels. Needs plain stars.
std::vector<double> star_levels_in(std::string_view note);

// "clustered", "robust" or "".
std::string errors_in(std::string_view note);

// A figure stated inside words, "(n = 180 fields)", "R2 = 0.278;": its text, or "".
std::string figure_in(std::string_view note, std::string_view name);

}  // namespace rejoinder
