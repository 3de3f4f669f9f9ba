#include "web/panels/matrix.h"

#include <algorithm>

#include "web/model/document_view.h"
#include "web/panels/grid_cell.h"
#include "web/panels/printed_table.h"

namespace rejoinder {
namespace {

struct Shown {
  int column = -1;
  const char* key = nullptr;  // "covariance" or "correlation"
};

Shown matrix_of(const AppState& state, int column) {
  const Node* const node = row_of(state.document, "column", column);
  for (const char* key : {"covariance", "correlation"}) {
    if (node && node->find(key)) return {column, key};
  }
  return {};
}

// The column asked for, else the one the chosen claim rests on.
Shown choose(const AppState& state, const Hands& hands) {
  if (hands.view.matrix_column >= 0) {
    const Shown asked = matrix_of(state, hands.view.matrix_column);
    return asked.key ? asked : Shown{hands.view.matrix_column, nullptr};
  }
  return state.claim < 0 ? Shown{} : matrix_of(state, column_of_claim(state.document, state.claim));
}

}  // namespace

Intent show_matrix(const AppState& state, Hands& hands, Pen& pen) {
  Intent intent;
  const Shown shown = choose(state, hands);
  const Palette& colours = palette();
  if (shown.column < 0) return intent;
  const Node* const column = row_of(state.document, "column", shown.column);
  if (!column) return intent;
  const std::string number = column_number(shown.column);
  if (!shown.key) {
    pen.write(Type::Note, colours.quiet,
              "No covariances of the estimates in " + number +
                  " are entered. Where the paper prints them, "
                  "they decide most: write them into the review's text.");
    pen.skip(4);
    if (show_button(hands, "button/matrix-text", "Open the review's text", pen.at()))
      intent = ShowOverlay{Overlay::ReviewText};
    pen.y += button_size("x").y + px(8);
    return intent;
  }
  const Node* const matrix = column->find(shown.key);
  const Node* const terms = rows_of(*matrix, "terms");
  const Node* const lower = rows_of(*matrix, "lower");
  if (!terms || !lower) return intent;
  const bool covariance = std::string_view(shown.key) == "covariance";
  pen.write(Type::NoteStrong, colours.soft,
            (covariance ? "Covariances of the estimates in " : "Correlations of the estimates in ") + number);
  pen.skip(6);
  const int size = static_cast<int>(terms->items.size());
  // The widest name, and the widest figure on each side of its decimal point.
  float names = 0, before = 0, after = 0;
  const char decimal = state.review.decimal;
  for (const Node& term : terms->items) names = std::max(names, text_width(Type::Note, term.text));
  for (const Node& row : lower->items) {
    for (const Node& cell : row.items) {
      const Aligned figure = split_at_point(cell.text, decimal);
      before = std::max(before, text_width(Type::Note, figure.left));
      after = std::max(after, text_width(Type::Note, figure.right));
    }
  }
  names = std::min(names, pen.width * 0.35f) + px(14);
  const float wide = std::ceil(before + after) + px(22), line = setting(Type::Note).leading + px(3);
  const bool all = names + wide * static_cast<float>(size) <= pen.width;
  pen.rule(colours.thin_rule);
  pen.skip(4);
  const Finding* const finding =
      state.claim >= 0 && state.claim < static_cast<int>(state.checked.findings.size())
          ? &state.checked.findings[static_cast<size_t>(state.claim)]
          : nullptr;
  ImGui::PushClipRect(ImVec2(pen.x, pen.y), ImVec2(pen.right() + 1, pen.y + 1e5f), true);
  for (int i = 0; i < size && i < static_cast<int>(lower->items.size()); ++i) {
    const std::string& name = terms->items[static_cast<size_t>(i)].text;
    draw_cut(Type::Note, ImVec2(pen.x + px(4), pen.y + px(1)), colours.ink, name, names - px(10));
    const Node& row = lower->items[static_cast<size_t>(i)];
    for (int j = 0; j < static_cast<int>(row.items.size()); ++j) {
      const float left = pen.x + names + static_cast<float>(j) * wide;
      const std::string& text = row.items[static_cast<size_t>(j)].text;
      if (finding) {
        const Cell cell{column_text(state.document, shown.column, "id"), name, shown.key};
        if (std::find(finding->rests_on.begin(), finding->rests_on.end(), cell) != finding->rests_on.end()) {
          ImGui::GetWindowDrawList()->AddRectFilled(ImVec2(left, pen.y), ImVec2(left + wide, pen.y + line),
                                                    colours.rests);
        }
      }
      const Aligned figure = split_at_point(text, decimal);
      const float point = left + px(11) + before;
      std::string shown_left = figure.left;
      if (!shown_left.empty() && shown_left[0] == '-') shown_left.replace(0, 1, "−");
      draw_line(Type::Note, ImVec2(point - text_width(Type::Note, shown_left), pen.y + px(1)), colours.ink,
                shown_left);
      draw_line(Type::Note, ImVec2(point, pen.y + px(1)), colours.ink, figure.right);
    }
    pen.y += line;
  }
  ImGui::PopClipRect();
  pen.skip(4);
  pen.rule(colours.thin_rule);
  pen.skip(4);
  if (!all) pen.write(Type::Small, colours.quiet, "The columns beyond the edge are in the review's text.");
  if (show_button(hands, "button/matrix-text", "change it in the review's text", ImVec2(pen.x - px(2), pen.y),
                  ButtonKind::Quiet)) {
    intent = ShowOverlay{Overlay::ReviewText};
  }
  pen.y += button_size("x", ButtonKind::Quiet).y + px(8);
  return intent;
}

}  // namespace rejoinder
