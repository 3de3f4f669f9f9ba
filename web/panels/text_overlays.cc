// Overlays that hold a text: a pasted table with what was understood of it, and the review itself.
#include <algorithm>

#include "core/number/number_text.h"
#include "imgui_internal.h"
#include "web/panels/field.h"
#include "web/panels/grid_cell.h"
#include "web/panels/overlay.h"
#include "web/panels/printed_table.h"
#include "web/platform/marks.h"

namespace rejoinder {
namespace {

// Ctrl+Enter takes what the box holds, from anywhere in the overlay.
bool takes_by_key(Hands& hands) {
  return hands.command() && (hands.key(ImGuiKey_Enter, false) || hands.key(ImGuiKey_KeypadEnter, false));
}

std::optional<std::string> show_box(const AppState& state, Hands& hands, const char* id, const char* hint,
                                    const ImVec2& at, float width, float least) {
  FieldStyle style;
  style.type = Type::Mono;
  style.many_lines = true;
  style.enter_breaks = true;
  style.hint = hint;
  const float height = std::max(px(least), field_height(style, state.box_text, width));
  if (hands.focus().empty()) hands.give_focus(id);
  return show_field(hands, id, state.box_text, at, ImVec2(at.x + width, at.y + height), style);
}

float box_height(const AppState& state, float width, float least) {
  FieldStyle style;
  style.type = Type::Mono;
  style.many_lines = true;
  return std::max(px(least), field_height(style, state.box_text, width));
}

// ---- what was understood

struct Preview {
  const PastedTable& table;
  float label_width = 0, column_width = 0;
  float left = 0;
  size_t columns = 0;
  std::vector<float> after;  // the widest text after the decimal point, for each column

  float x_of(int column) const { return left + label_width + static_cast<float>(column) * column_width; }
};

void draw_cell(const Preview& preview, const PastedCell& cell, int column, float y, Type type, ImU32 colour,
               std::string_view brackets) {
  if (cell.empty() || column < 0) return;
  const Palette& colours = palette();
  const float right = preview.x_of(column + 1) - px(8), line = setting(type).leading;
  std::string text = with_minus(cell.text);
  if (!brackets.empty() && text.find_first_of("([") == std::string::npos) text = "(" + text + ")";
  const float width = std::min(text_width(type, text), preview.column_width - px(10));
  if (!cell.doubt.empty()) {
    const ImVec2 low(preview.x_of(column) + px(4), y), high(right + px(4), y + line);
    ImGui::GetWindowDrawList()->AddRectFilled(low, high, colours.rests, px(2));
    ImGui::GetWindowDrawList()->AddRect(low, high, colours.rests_edge, px(2), 0, hair());
    draw_line(Type::SmallStrong, ImVec2(low.x + px(3), y), colours.undecided, "?");
    if (ImGui::IsMouseHoveringRect(low, high)) show_hint(cell.doubt, low, high);
  }
  // Figures stand with their decimal points in line where the column has room for that.
  const Aligned figure = split_at_point(text, preview.table.decimal);
  const float point = right - preview.after[static_cast<size_t>(column)],
              left = point - text_width(type, figure.left);
  if (figure.numeric && left >= preview.x_of(column)) {
    draw_line(type, ImVec2(left, y), colour, figure.left);
    draw_line(type, ImVec2(point, y), colour, figure.right);
    return;
  }
  draw_cut(type, ImVec2(right - width, y), colour, text, preview.column_width - px(10));
}

void show_table_preview(const AppState& state, Hands& hands, Pen& pen, Intent& intent) {
  const PastedTable& table = state.reading.table;
  const Palette& colours = palette();
  const int figures = table.figures(), doubtful = table.doubtful();
  std::string count = std::to_string(figures) + (figures == 1 ? " figure understood" : " figures understood");
  count += doubtful == 0 ? ", none doubtful" : ", " + std::to_string(doubtful) + " doubtful (marked)";
  pen.write(Type::NoteStrong, colours.soft, count);
  if (!table.second.empty()) {
    const char* const keys[] = {"se", "t", "p", "ci"};
    const std::vector<std::string> words = {"standard error", "t", "p", "interval"};
    const std::string label = "second figure:";
    int chosen = 0;
    for (int i = 0; i < 4; ++i) {
      if (table.second == keys[i]) chosen = i;
    }
    pen.skip(4);
    draw_line(Type::Note, pen.at(), colours.quiet, label);
    const std::string& shown = words[static_cast<size_t>(chosen)];
    const int picked = show_chooser(hands, "paste/second", shown, words, chosen,
                                    ImVec2(pen.x + text_width(Type::Note, label) + px(6), pen.y));
    if (picked >= 0 && picked != chosen) intent = SetSecondFigure{keys[picked]};
    pen.y += setting(Type::Note).leading + px(4);
    if (!table.second_reason.empty()) {
      pen.write(Type::Small, table.second_certain ? colours.quiet : colours.undecided,
                table.second_certain ? table.second_reason : "two readings fit: " + table.second_reason);
    }
  }
  for (const std::string& doubt : table.doubts) pen.write(Type::Small, colours.undecided, doubt);
  pen.skip(8);

  Preview preview{table, 0, 0, pen.x, std::max<size_t>(table.columns.size(), 1), {}};
  for (const PastedRow& row : table.rows) {
    preview.columns = std::max(preview.columns, row.cells.size());
    for (const int column : row.more_column)
      preview.columns = std::max(preview.columns, static_cast<size_t>(std::max(column, 0)) + 1);
  }
  preview.after.assign(preview.columns, 0);
  for (const PastedRow& row : table.rows) {
    for (size_t c = 0; c < row.cells.size(); ++c) {
      const Aligned figure = split_at_point(row.cells[c].text, table.decimal);
      if (figure.numeric) preview.after[c] = std::max(preview.after[c], text_width(Type::Note, figure.right));
    }
  }
  for (const PastedRow& row : table.rows)
    preview.label_width = std::max(preview.label_width, text_width(Type::Note, row.label));
  preview.label_width = std::clamp(preview.label_width + px(10), px(60), pen.width * 0.38f);
  preview.column_width =
      std::min(px(110), (pen.width - preview.label_width) / static_cast<float>(preview.columns));
  const float wide = preview.label_width + preview.column_width * static_cast<float>(preview.columns);
  draw_rule(pen.at(), wide, px(1.5f), colours.rule);
  pen.skip(4);
  for (size_t c = 0; c < table.columns.size(); ++c) {
    const std::string& heading = table.columns[c];
    const float room = preview.column_width - px(10), width = std::min(text_width(Type::Note, heading), room);
    draw_cut(Type::Note, ImVec2(preview.x_of(static_cast<int>(c) + 1) - px(8) - width, pen.y), colours.ink,
             heading, room);
  }
  pen.y += setting(Type::Note).leading + px(3);
  draw_rule(pen.at(), wide, hair(), colours.thin_rule);
  pen.skip(3);
  PastedRow::Kind before = PastedRow::Kind::Term;
  for (const PastedRow& row : table.rows) {
    if (row.kind != before && row.kind == PastedRow::Kind::Foot) {
      draw_rule(ImVec2(pen.x, pen.y + px(1)), wide, hair(), colours.thin_rule);
      pen.skip(4);
    }
    before = row.kind;
    draw_cut(Type::Note, pen.at(), colours.ink, row.label, preview.label_width - px(8));
    for (size_t c = 0; c < row.cells.size(); ++c) {
      draw_cell(preview, row.cells[c], static_cast<int>(c), pen.y, Type::Note, colours.ink, "");
    }
    pen.y += setting(Type::Note).leading;
    if (row.more.empty()) continue;
    for (size_t i = 0; i < row.more.size(); ++i) {
      const int column = i < row.more_column.size() ? row.more_column[i] : static_cast<int>(i);
      draw_cell(preview, row.more[i], column, pen.y, Type::Small, colours.quiet, "()");
    }
    pen.y += setting(Type::Small).leading + px(2);
  }
  draw_rule(ImVec2(pen.x, pen.y + px(2)), wide, px(1.5f), colours.rule);
  pen.skip(8);
  if (state.reading.keeps_claims)
    pen.write(Type::Small, colours.quiet,
              "The claims entered so far stay and are checked against this table.");
}

void show_sentence_preview(const ClaimSentence& sentence, Pen& pen) {
  const Palette& colours = palette();
  pen.write(Type::NoteStrong, colours.soft, "A claim");
  pen.skip(4);
  pen.write(Type::Body, colours.ink, "“" + sentence.says + "”");
  pen.skip(6);
  const auto line = [&](const char* name, const std::string& value) {
    if (value.empty()) return;
    draw_line(Type::Note, pen.at(), colours.quiet, name);
    Pen text{pen.x + px(150), pen.y, pen.width - px(150)};
    text.write(Type::Note, colours.ink, value);
    pen.y = text.y;
  };
  line("F", sentence.f);
  line("χ²", sentence.chi2);
  line("degrees of freedom", sentence.df2.empty() ? sentence.df1 : sentence.df1 + " and " + sentence.df2);
  line("p", sentence.p);
  line("page", sentence.page);
  if (sentence.rejects) line("decision", *sentence.rejects ? "rejects" : "does not reject");
  pen.skip(6);
  pen.write(Type::Small, colours.quiet, "What it restricts is yours to say, on its card.");
}

}  // namespace

Intent show_paste_box(const AppState& state, Hands& hands, Pen& pen) {
  Intent intent;
  const Palette& colours = palette();
  pen.write(Type::Note, colours.soft,
            "Text from a PDF, a range of a spreadsheet, CSV, LaTeX or Markdown; or one sentence with a joint "
            "test. Nothing is replaced "
            "before you take it.");
  pen.skip(10);
  const bool beside = pen.width > px(720);
  const float gap = px(24), left_width = beside ? (pen.width - gap) * 0.46f : pen.width;
  const float top = pen.y;
  if (const auto typed =
          show_box(state, hands, "paste/text", "paste here", pen.at(), left_width, beside ? 300 : 150)) {
    intent = EditBox{*typed};
  }
  const float box_bottom = top + box_height(state, left_width, beside ? 300 : 150);
  Pen right = beside ? Pen{pen.x + left_width + gap, top, pen.width - left_width - gap}
                     : Pen{pen.x, box_bottom + px(14), pen.width};
  bool able = true;
  switch (state.reading.kind) {
    case BoxReading::Kind::Table:
      show_table_preview(state, hands, right, intent);
      break;
    case BoxReading::Kind::Sentence:
      show_sentence_preview(state.reading.sentence, right);
      break;
    case BoxReading::Kind::Review:
      right.write(Type::Note, colours.soft,
                  "A whole review. Taking it replaces the one on the page; undo brings that back.");
      break;
    case BoxReading::Kind::Nothing:
      able = false;
      right.write(Type::Note, colours.quiet,
                  state.box_text.empty() ? "What is understood appears here, cell by cell." : state.box_note);
      break;
  }
  if (able && !state.box_note.empty() && state.reading.kind != BoxReading::Kind::Table) {
    right.skip(6);
    right.write(Type::Small, colours.undecided, state.box_note);
  }
  right.skip(12);
  const char* const take = state.reading.kind == BoxReading::Kind::Sentence ? "Add the claim" : "Take it";
  if (show_button(hands, "paste/take", take, right.at(), ButtonKind::Strong, able)) intent = AcceptBox{};
  const float next = right.x + button_size(take).x + px(10);
  draw_line(Type::Small, ImVec2(next, right.y + px(6)), colours.quiet, "Ctrl Enter");
  right.y += button_size(take).y;
  if (able && takes_by_key(hands)) intent = AcceptBox{};
  pen.y = std::max(box_bottom, right.y);
  return intent;
}

Intent show_review_text(const AppState& state, Hands& hands, Pen& pen) {
  Intent intent;
  const Palette& colours = palette();
  pen.write(Type::Note, colours.soft,
            "The whole review as the file holds it. Change it here, take it, and the page follows; undo "
            "brings the other one back.");
  pen.skip(8);
  const bool able = state.reading.kind == BoxReading::Kind::Review;
  if (show_button(hands, "text/take", "Take it", pen.at(), ButtonKind::Strong, able)) intent = AcceptBox{};
  const float next = pen.x + button_size("Take it").x + px(10);
  draw_line(Type::Small, ImVec2(next, pen.y + px(6)), colours.quiet, "Ctrl Enter");
  pen.y += button_size("x").y + px(6);
  if (!state.box_note.empty()) pen.write(Type::Note, colours.undecided, state.box_note);
  pen.skip(6);
  if (const auto typed = show_box(state, hands, "text/review", "", pen.at(), pen.width, 320))
    intent = EditBox{*typed};
  pen.y += box_height(state, pen.width, 320);
  if (able && takes_by_key(hands)) intent = AcceptBox{};
  return intent;
}

}  // namespace rejoinder
