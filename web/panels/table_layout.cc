#include "web/panels/table_layout.h"

#include <algorithm>
#include <cmath>

#include "web/model/document_view.h"
#include "web/panels/grid_cell.h"
#include "web/panels/parts.h"

namespace rejoinder {
namespace {

constexpr float kColumnPad = 7;  // on each side of a column's figures

const char* const kErrorsKeys[] = {"classical", "robust", "clustered", "unknown"};
const char* const kEstimatorKeys[] = {"ols", "iv", "ml", "other"};

template <size_t size>
int place_of(const char* const (&keys)[size], std::string_view key, int otherwise) {
  for (size_t i = 0; i < size; ++i) {
    if (key == keys[i]) return static_cast<int>(i);
  }
  return otherwise;
}

void measure_figure(Measure::Figures& m, Type type, const std::string& text, char decimal, bool brackets) {
  if (text.empty()) return;
  const Aligned figure = split_at_point(text, decimal);
  if (!figure.numeric) {
    m.after = std::max(m.after, text_width(type, text) - m.before);
    return;
  }
  const float bracket = brackets ? text_width(type, "(") : 0;
  m.before = std::max(m.before, text_width(type, figure.left) + bracket);
  m.after = std::max(m.after, text_width(type, figure.right) + bracket);
}

// Of the widest single word, since words are not broken.
float word_width(Type type, std::string_view text) {
  float widest = 0;
  for (size_t begin = 0; begin < text.size();) {
    const size_t end = std::min(text.find(' ', begin), text.size());
    widest = std::max(widest, text_width(type, text.substr(begin, end - begin)));
    begin = end + 1;
  }
  return widest;
}

// Widths of all columns. Returns that of the whole table.
float measure_columns(const AppState& state, const TableFacts& facts, TableLayout& layout, float room) {
  const char decimal = state.review.decimal;
  float widest = text_width(layout.first(), "errors"), word = px(70);
  const auto name = [&](std::string_view text) {
    widest = std::max(widest, text_width(layout.first(), text));
    word = std::max(word, word_width(layout.first(), text));
  };
  for (const TermRow& row : facts.table.rows) name(row.name);
  for (const FootRow& foot : facts.table.foot) name(foot.label);
  word = std::max(word, text_width(Type::Body, kAddTerm));
  const float least = std::min(word + px(16), room * 0.4f);
  layout.label_width =
      std::clamp(widest + px(14), least, std::max(least, room * (facts.table.columns > 2 ? 0.34f : 0.42f)));
  layout.measures.assign(static_cast<size_t>(facts.table.columns), {});
  float all = 0;
  for (int c = 0; c < facts.table.columns; ++c) {
    Measure& m = layout.measures[static_cast<size_t>(c)];
    for (int row = 0; row < static_cast<int>(facts.table.rows.size()); ++row) {
      measure_figure(m.terms, layout.first(), facts.at(facts.coefficients, row, c).text, decimal, false);
      measure_figure(m.terms, layout.second_type(), facts.at(facts.seconds, row, c).text, decimal, true);
    }
    for (int row = 0; row < static_cast<int>(facts.table.foot.size()); ++row) {
      measure_figure(m.foot, layout.first(), facts.at(facts.foot, row, c).text, decimal, false);
    }
    float needed = std::max({m.terms.before + m.terms.after, m.foot.before + m.foot.after, px(46)});
    needed = std::max(needed, std::min(word_width(Type::Note, heading_of(state, c)) + px(2), px(110)));
    needed = std::max(
        needed,
        chooser_size(errors_words()[static_cast<size_t>(errors_of(state, c))], Type::Small).x - px(10));
    m.width = std::ceil(needed + 2 * px(layout.tight ? 4 : kColumnPad));
    all += m.width;
  }
  // Names give way first: they can stand in two lines. Where the table must move sideways all the same, they
  // get a good share of the room instead.
  if (layout.label_width + all > room) {
    layout.label_width = least + all > room
                             ? std::clamp(widest + px(14), least, std::max(least, room * 0.36f))
                             : std::max(least, room - all);
  }
  return layout.label_width + all;
}

}  // namespace

const std::vector<std::string>& errors_words() {
  static const std::vector<std::string> words = {"classical", "robust", "clustered", "not said"};
  return words;
}

const std::vector<std::string>& estimator_words() {
  static const std::vector<std::string> words = {"OLS", "IV", "ML", "other"};
  return words;
}

const char* errors_key(int place) { return kErrorsKeys[place]; }
const char* estimator_key(int place) { return kEstimatorKeys[place]; }

int errors_of(const AppState& state, int column) {
  return place_of(kErrorsKeys, column_text(state.document, column, "errors"), 3);
}
int estimator_of(const AppState& state, int column) {
  return place_of(kEstimatorKeys, column_text(state.document, column, "estimator"), 0);
}

std::string heading_of(const AppState& state, int column) {
  std::string label = column_text(state.document, column, "label");
  const std::string number = column_number(column);
  if (label.starts_with(number)) label.erase(0, number.size());
  return label.substr(std::min(label.find_first_not_of(" ,:"), label.size()));
}

void TableLayout::place(float left) {
  label_left = left;
  float x = left + label_width;
  for (Measure& m : measures) {
    m.left = x;
    x += m.width;
  }
}

TableLayout lay_out_table(const AppState& state, const TableFacts& facts, float room) {
  TableLayout layout;
  float all = measure_columns(state, facts, layout, room);
  if (all > room) {
    layout.tight = true;
    all = measure_columns(state, facts, layout, room);
  }
  // What room is left goes to the columns in equal parts, up to a point.
  const float extra =
      std::clamp((room - all) / static_cast<float>(std::max(1, facts.table.columns)), 0.0f, px(36));
  for (Measure& m : layout.measures) m.width = snap(m.width + extra);
  return layout;
}

}  // namespace rejoinder
