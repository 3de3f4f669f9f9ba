// Where the columns of the printed table stand and how wide they are.
#pragma once

#include <vector>

#include "web/panels/printed_table.h"
#include "web/panels/text.h"

namespace rejoinder {

inline constexpr const char* kAddTerm = "add a term";  // the hint of the field below the last term

// One column's measures: the widest text before and after the decimal point, of the terms and of the foot,
// which keep points of their own; and where the column stands.
struct Measure {
  struct Figures {
    float before = 0, after = 0;
  };
  Figures terms, foot;
  float left = 0, width = 0;
  float point(const Figures& figures) const {
    return left + (width - figures.before - figures.after) / 2 + figures.before;
  }
};

// Names first, then the columns from left to right. All lengths in CSS pixels.
struct TableLayout {
  std::vector<Measure> measures;
  float label_left = 0, label_width = 0;
  bool tight = false;  // smaller type and less air, so that more columns fit

  Type first() const { return tight ? Type::Note : Type::Body; }         // of coefficients and foot
  Type second_type() const { return tight ? Type::Small : Type::Note; }  // of second figures
  float width() const {
    return measures.empty() ? label_width : measures.back().left + measures.back().width - label_left;
  }
  // Puts the columns beside each other, the names at `left`.
  void place(float left);
};

// Measures every text of the table. Where `room` does not do, type gets smaller first, then names go on in
// further lines; beyond that the table is wider than the room. Costs what the table's size says, so it is
// kept between frames.
TableLayout lay_out_table(const AppState& state, const TableFacts& facts, float room);

// A column's label without the number that stands above it anyway.
std::string heading_of(const AppState& state, int column);

// What stands in a column's chooser for its errors and its estimator: its place among the words.
const std::vector<std::string>& errors_words();
const std::vector<std::string>& estimator_words();
int errors_of(const AppState& state, int column);
int estimator_of(const AppState& state, int column);
// The keys of the review file for those places.
const char* errors_key(int place);
const char* estimator_key(int place);

}  // namespace rejoinder
