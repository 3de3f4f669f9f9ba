#include "web/panels/paper.h"

#include <algorithm>
#include <string>
#include <vector>

#include "imgui_internal.h"
#include "web/panels/field.h"
#include "web/panels/matrix.h"
#include "web/panels/parts.h"
#include "web/panels/table_rows.h"
#include "web/platform/marks.h"
#include "web/platform/services.h"

namespace rejoinder {
namespace {

constexpr float kSide = 18;  // of the pane

const char* const kSecondKeys[] = {"se", "t", "p"};
const std::vector<std::string> kSecondWords = {"standard error", "t", "p"};

// What was worked out for the last change, kept while nothing that it depends on is different.
struct Kept {
  int changes = -1;
  bool all_figures = false;
  float room = 0, type_size = 0;
  TableFacts facts;
  TableLayout layout;
};

void refresh(Kept& kept, const AppState& state, const Hands& hands, float room) {
  const float type_size = setting(Type::Body).size;
  const bool fresh = kept.changes != hands.view.changes || kept.all_figures != hands.view.more_figures;
  if (fresh) kept.facts = table_facts(state, hands.view.more_figures);
  if (fresh || kept.room != room || kept.type_size != type_size)
    kept.layout = lay_out_table(state, kept.facts, room);
  kept.changes = hands.view.changes;
  kept.all_figures = hands.view.more_figures;
  kept.room = room;
  kept.type_size = type_size;
}

// The line at the pane's foot: what the cell under the pointer, or the chosen one, stands for.
std::string words_on(const AppState& state, const std::optional<TableCell>& cell) {
  if (!cell) {
    const bool any = state.claim >= 0 && state.claim < static_cast<int>(state.checked.findings.size()) &&
                     !state.checked.findings[static_cast<size_t>(state.claim)].rests_on.empty();
    return any ? "Marked cells carry the chosen claim." : "Choose a cell to see what its figure stands for.";
  }
  const std::string text = text_in(state, *cell);
  const std::string where = column_number(cell->column) + " ";
  if (const std::string trouble = trouble_in(state, *cell); !trouble.empty()) return where + trouble + ".";
  std::string words;
  if (const PrintedNumber* number = number_in(state, *cell)) {
    words = stands_for(*number) + ".";
  } else if (!text.empty()) {
    words = text + " is taken as exact.";
  } else {
    words = "Nothing is printed here.";
  }
  const std::vector<int> claims = feeds(state, *cell);
  if (!claims.empty()) {
    words += claims.size() == 1 ? " Claim " : " Claims ";
    for (size_t i = 0; i < claims.size(); ++i) {
      words += (i == 0 ? "" : i + 1 == claims.size() ? " and " : ", ") + std::to_string(claims[i] + 1);
    }
    words += claims.size() == 1 ? " rests on it." : " rest on it.";
  }
  return words;
}

}  // namespace

Intent show_paper(const AppState& state, Hands& hands, const ImVec2& low, const ImVec2& high) {
  const Palette& colours = palette();
  hands.enter(Group::Paper);
  const float strip = 2 * setting(Type::Note).leading + px(18);
  begin_pane("paper", low, ImVec2(high.x, high.y - strip), colours.paper);
  const float inner = high.x - low.x - 2 * px(kSide) - px(4);
  Pen pen{ImGui::GetCursorScreenPos().x + px(kSide), ImGui::GetCursorScreenPos().y + px(16), inner};

  static Kept kept;
  refresh(kept, state, hands, inner);
  TableLayout& layout = kept.layout;
  TableGrid grid{state, hands, kept.facts, layout};
  const float line = setting(Type::NoteStrong).leading;
  if (!hands.view.tabbed) draw_line(Type::NoteStrong, pen.at(), colours.soft, "From the paper");
  {
    const std::string shown = second_figure_words(grid.facts.second), label = "second figure: ";
    const ImVec2 size = chooser_size(shown);
    const float left = pen.right() - size.x;
    if (left - text_width(Type::Note, label) >
        pen.x + text_width(Type::NoteStrong, "From the paper") + px(12)) {
      draw_line(Type::Note, ImVec2(left - text_width(Type::Note, label), pen.y), colours.quiet, label);
    }
    int kind = -1;
    for (int i = 0; i < 3; ++i) {
      if (grid.facts.second == kSecondKeys[i]) kind = i;
    }
    const int picked = show_chooser(hands, "table/second", shown, kSecondWords, kind, ImVec2(left, pen.y));
    if (picked >= 0 && picked != kind) grid.intent = SetSecondFigure{kSecondKeys[picked]};
  }
  pen.y += line + px(12);

  // ---- the table, in a window of its own that scrolls sideways where the columns need more room
  layout.place(pen.x);
  const bool sideways = layout.width() > inner + 1;
  const float known = ImGui::GetStateStorage()->GetFloat(ImGui::GetID("height"), px(400));
  ImGui::SetCursorScreenPos(pen.at());
  ImGui::BeginChild("table", ImVec2(inner + px(1), known + (sideways ? ImGui::GetStyle().ScrollbarSize : 0)),
                    0, ImGuiWindowFlags_HorizontalScrollbar | ImGuiWindowFlags_NoNav);
  const ImVec2 corner = ImGui::GetCursorScreenPos();
  const float fixed_left = ImGui::GetWindowPos().x;
  layout.place(corner.x);
  const float wide = sideways ? inner : std::max(layout.width(), px(120));
  grid.clip_low = ImVec2(fixed_left + layout.label_width - px(6), corner.y);
  grid.clip_high = ImVec2(fixed_left + inner + px(1), corner.y + 1e6f);
  float y = corner.y;
  draw_rule(ImVec2(fixed_left, y), wide, px(1.6f), colours.rule);
  y = show_headings(grid, y + px(1));
  draw_rule(ImVec2(fixed_left, y), wide, hair(), colours.thin_rule);
  y += px(5);
  for (int row = 0; row < static_cast<int>(grid.facts.table.rows.size()); ++row) y = show_term(grid, row, y);
  // A name typed here and Enter adds a term to every column.
  {
    FieldStyle style;
    style.frame = Frame::Bare;
    style.hint = kAddTerm;
    const ImVec2 field_low(fixed_left, y),
        field_high(fixed_left + layout.label_width - px(6), y + field_height(style, "", 0));
    const bool entered =
        hands.types_in("term/new") && (hands.sees(ImGuiKey_Enter) || hands.sees(ImGuiKey_KeypadEnter));
    if (const auto text = show_field(hands, "term/new", hands.view.new_term, field_low, field_high, style)) {
      hands.view.new_term = *text;
    }
    if (entered && !hands.view.new_term.empty()) {
      grid.intent = AddTerm{hands.view.new_term};
      hands.view.new_term.clear();
      hands.start_typing("term/new", "", EditBuffer());
    }
    y = field_high.y + px(4);
  }
  draw_rule(ImVec2(fixed_left, y), wide, hair(), colours.thin_rule);
  y = show_foot(grid, y);
  draw_rule(ImVec2(fixed_left, y), wide, px(1.6f), colours.rule);
  y += px(3);
  ImGui::SetCursorScreenPos(corner);
  ImGui::Dummy(ImVec2(sideways ? layout.width() : 1, y - corner.y));
  ImGui::EndChild();
  if (std::abs(known - (y - corner.y)) > 0.5f) {
    ImGui::GetStateStorage()->SetFloat(ImGui::GetID("height"), y - corner.y);
    request_frames(1);
  }
  pen.y += y - corner.y + (sideways ? ImGui::GetStyle().ScrollbarSize : 0) + px(8);
  const std::string more = hands.view.more_figures ? "fewer figures" : "more figures";
  const float more_width = button_size(more, ButtonKind::Quiet).x;
  if (show_button(hands, "button/more-figures", more, ImVec2(pen.x - px(2), pen.y), ButtonKind::Quiet)) {
    hands.view.more_figures = !hands.view.more_figures;
  }
  if (show_button(hands, "button/add-column", "add a column", ImVec2(pen.x + more_width + px(8), pen.y),
                  ButtonKind::Quiet)) {
    grid.intent = AddColumn{};
  }
  pen.y += button_size(more, ButtonKind::Quiet).y + px(14);
  if (grid.move.columns || grid.move.lines) {
    const std::string to = grid.moved_to();
    if (to != grid.moved_from) hands.give_focus(to);
  }

  if (Intent matrix = show_matrix(state, hands, pen); matrix.index() != 0) grid.intent = std::move(matrix);
  scroll_by_pages(hands, Group::Paper);
  close_column(pen, 24);
  end_pane();

  // ---- the strip
  const ImVec2 strip_low(low.x, high.y - strip);
  ImDrawList* const list = ImGui::GetWindowDrawList();
  list->AddRectFilled(strip_low, high, colours.paper);
  draw_rule(ImVec2(strip_low.x + px(kSide), strip_low.y), high.x - low.x - 2 * px(kSide), hair(),
            colours.hairline);
  const std::optional<TableCell> told = grid.pointed ? grid.pointed : state.cell;
  const std::string words = words_on(state, told);
  draw_text(Type::Note, ImVec2(strip_low.x + px(kSide), strip_low.y + px(8)), colours.quiet, words,
            high.x - low.x - 2 * px(kSide));
  mark("region/cell-note", "region", strip_low, high);
  return grid.intent;
}

}  // namespace rejoinder
