#include "web/panels/table_rows.h"

#include <algorithm>

#include "imgui_internal.h"
#include "web/model/document_view.h"
#include "web/panels/parts.h"

namespace rejoinder {
namespace {

void clip_to_figures(const TableGrid& grid) { ImGui::PushClipRect(grid.clip_low, grid.clip_high, true); }

// The name of a row, over the ground that hides figures scrolled below it.
void name_cell(TableGrid& grid, const std::string& id, const std::string& name, float y, float height,
               const CellAnswer*& answer, CellAnswer& store) {
  const float left = ImGui::GetWindowPos().x;
  const CellBox box{ImVec2(left, y),
                    ImVec2(left + grid.layout.label_width - px(6), y + height),
                    SetAt::Left,
                    0,
                    grid.layout.first(),
                    palette().ink,
                    false};
  store = show_cell(grid.hands, id, name, box, {}, grid.state.review.decimal);
  answer = &store;
}

void plain_name(TableGrid& grid, std::string_view name, float y, Type type, ImU32 colour) {
  draw_cut(type, ImVec2(ImGui::GetWindowPos().x + px(4), y), colour, name, grid.layout.label_width - px(10));
}

}  // namespace

void TableGrid::take(const std::string& id, const CellAnswer& answer) {
  if (!answer.move.columns && !answer.move.lines) return;
  moved_from = id;
  move = answer.move;
}

std::string TableGrid::figure(const CellFacts& fact, const std::string& name, const std::string& id, float y,
                              float height, Type type, ImU32 colour, bool brackets) {
  const TableCell& cell = fact.cell;
  const Measure& m = layout.measures[static_cast<size_t>(cell.column)];
  CellBox box{ImVec2(m.left, y),
              ImVec2(m.left + m.width, y + height),
              SetAt::Point,
              m.point(cell.term < 0 ? m.foot : m.terms),
              type,
              colour,
              brackets};
  CellLook look;
  look.rests = fact.rests;
  look.trouble = fact.trouble;
  const CellAnswer answer = show_cell(hands, id, fact.text, box, look, state.review.decimal);
  take(id, answer);
  if (answer.hovered) pointed = cell;
  // A cell whose column does not list the term is none of the review's until something is typed into it.
  if (answer.chosen) intent = ChooseCell{fact.listed ? std::optional(cell) : std::nullopt};
  if (answer.text) {
    intent = fact.listed ? Intent(EditCell{cell, *answer.text})
                         : Intent(EditFigure{cell.column, name, cell.key, *answer.text});
  }
  return id;
}

std::string TableGrid::moved_to() const {
  const std::string& id = moved_from;
  const int lines = static_cast<int>(stops.size());
  for (int line = 0; line < lines; ++line) {
    const std::vector<std::string>& row = stops[static_cast<size_t>(line)];
    const auto here = std::find(row.begin(), row.end(), id);
    if (here == row.end()) continue;
    int column = static_cast<int>(here - row.begin());
    int at = line;
    while (true) {
      at += move.lines;
      column += move.columns;
      if (at < 0 || at >= lines || column < 0 || column >= static_cast<int>(row.size())) return id;
      const std::string& stop = stops[static_cast<size_t>(at)][static_cast<size_t>(column)];
      if (!stop.empty() && stop != id) return stop;
    }
  }
  return id;
}

float show_headings(TableGrid& grid, float y) {
  const AppState& state = grid.state;
  Hands& hands = grid.hands;
  const Palette& colours = palette();
  const float line = setting(Type::Note).leading;
  const std::string outcome =
      grid.facts.table.columns > 0 ? column_text(state.document, 0, "outcome") : std::string();
  bool same = true;
  for (int c = 1; c < grid.facts.table.columns; ++c)
    same = same && column_text(state.document, c, "outcome") == outcome;
  // Labels below the numbers, where there are any.
  bool labelled = false;
  float lines = 1;
  for (int c = 0; c < grid.facts.table.columns; ++c) {
    const std::string heading = heading_of(state, c);
    const float width = grid.layout.measures[static_cast<size_t>(c)].width - px(8);
    lines = std::max(lines, static_cast<float>(set_in_lines(Type::Note, heading, width).size()));
    labelled = labelled || !heading.empty() || hands.on("column/" + std::to_string(c) + "/label");
  }
  if (!labelled) lines = 0;
  y += px(4);
  clip_to_figures(grid);
  std::vector<std::string> stops = {""};
  for (int c = 0; c < grid.facts.table.columns; ++c) {
    const Measure& m = grid.layout.measures[static_cast<size_t>(c)];
    const std::string number = std::to_string(c), id = "column/" + number + "/label";
    // The number of the column opens what can be done with it.
    const std::string menu = "column/" + number + "/menu", shown = column_number(c);
    const ImVec2 size(text_width(Type::Note, shown) + px(16), line + px(4));
    const ImVec2 low(m.left + (m.width - size.x) / 2, y), high(low.x + size.x, low.y + size.y);
    const Press press = hands.press(menu, "button", low, high);
    if (press.hovered || press.held) {
      ImGui::GetWindowDrawList()->AddRectFilled(low, high, press.held ? colours.held : colours.hover, px(3));
    }
    if (press.ring) draw_ring(low, high, px(3));
    draw_line(Type::Note, ImVec2(low.x + px(8), low.y + px(2)), colours.ink, shown);
    if (press.pressed) {
      Hands::Menu items;
      items.owner = menu;
      items.low = low;
      items.high = high;
      items.items = {"Change the label", "Covariances of its estimates", "-", "Take the column out"};
      hands.open_menu(items);
    }
    if (const std::optional<int> picked = hands.picked(menu)) {
      if (*picked == 0) {
        hands.view.label_column = c;
        const std::string label = column_text(state.document, c, "label");
        hands.start_typing(id, label, EditBuffer(label, true));
      }
      if (*picked == 1) hands.view.matrix_column = c;
      if (*picked == 3) grid.intent = RemoveColumn{c};
    }
    if (!labelled) continue;
    const CellBox box{ImVec2(m.left, y + size.y),
                      ImVec2(m.left + m.width, y + size.y + lines * line + px(2)),
                      SetAt::Centre,
                      0,
                      Type::Note,
                      colours.ink,
                      false};
    CellLook look;
    const std::string heading = heading_of(state, c);
    look.shown = &heading;
    const CellAnswer answer =
        show_cell(hands, id, column_text(state.document, c, "label"), box, look, state.review.decimal);
    grid.take(id, answer);
    if (answer.text) grid.intent = EditColumn{c, "label", *answer.text};
    stops.push_back(id);
  }
  ImGui::PopClipRect();
  y += line + px(4) + lines * line + px(4);
  // What is explained: once where all columns explain the same, else a line of its own.
  if (same && !hands.view.more_figures) {
    const float wide = grid.layout.label_width - px(12), high = text_height(Type::Note, outcome, wide);
    draw_text(Type::Note,
              ImVec2(ImGui::GetWindowPos().x + px(4), y - px(5) - std::min(high, line * (1 + lines))),
              colours.ink, outcome, wide);
    if (labelled) grid.stops.push_back(stops);
    return y + px(2);
  }
  grid.stops.push_back(stops);
  plain_name(grid, "outcome", y + px(1), Type::Note, colours.quiet);
  float outcome_lines = 1;
  for (int c = 0; c < grid.facts.table.columns; ++c) {
    const float width = grid.layout.measures[static_cast<size_t>(c)].width - px(8);
    outcome_lines =
        std::max(outcome_lines,
                 static_cast<float>(
                     set_in_lines(Type::Note, column_text(state.document, c, "outcome"), width).size()));
  }
  const float height = outcome_lines * line + px(2);
  clip_to_figures(grid);
  std::vector<std::string> outcomes = {""};
  for (int c = 0; c < grid.facts.table.columns; ++c) {
    const Measure& m = grid.layout.measures[static_cast<size_t>(c)];
    const std::string id = "column/" + std::to_string(c) + "/outcome";
    const CellBox box{ImVec2(m.left, y),
                      ImVec2(m.left + m.width, y + height),
                      SetAt::Centre,
                      0,
                      Type::Note,
                      colours.quiet,
                      false};
    const CellAnswer answer =
        show_cell(hands, id, column_text(state.document, c, "outcome"), box, {}, state.review.decimal);
    grid.take(id, answer);
    if (answer.text) grid.intent = EditColumn{c, "outcome", *answer.text};
    outcomes.push_back(id);
  }
  ImGui::PopClipRect();
  grid.stops.push_back(outcomes);
  return y + height + px(3);
}

float show_term(TableGrid& grid, int row, float y) {
  const TermRow& term = grid.facts.table.rows[static_cast<size_t>(row)];
  const Palette& colours = palette();
  const float first = setting(grid.layout.first()).leading + px(1),
              second = setting(grid.layout.second_type()).leading + px(1);
  const std::string name_id = "term/" + std::to_string(row);
  const float name_height =
      text_height(grid.layout.first(), term.name, grid.layout.label_width - px(14)) + px(2);
  const float height = std::max(first + second, name_height);

  const CellAnswer* answer = nullptr;
  CellAnswer store;
  name_cell(grid, name_id, term.name, y, height, answer, store);
  grid.take(name_id, *answer);
  // An emptied name changes nothing while it is typed; Delete on the name takes the term out.
  const bool emptied = answer->text && answer->text->empty();
  if (answer->text && !(emptied && grid.hands.types_in(name_id))) {
    for (int c = 0; c < grid.facts.table.columns; ++c) {
      if (term.term[static_cast<size_t>(c)] < 0) continue;
      grid.intent = emptied ? Intent(RemoveTerm{term.name})
                            : Intent(RenameTerm{c, term.term[static_cast<size_t>(c)], *answer->text});
      break;
    }
  }

  clip_to_figures(grid);
  std::vector<std::string> upper = {name_id}, lower = {name_id};
  for (int part = 0; part < 2; ++part) {
    for (int c = 0; c < grid.facts.table.columns; ++c) {
      const CellFacts& fact = grid.facts.at(part == 0 ? grid.facts.coefficients : grid.facts.seconds, row, c);
      const std::string id = "cell/" + std::to_string(c) + "/" + term.stop + "/" + fact.cell.key;
      (part == 0 ? upper : lower)
          .push_back(grid.figure(fact, term.name, id, part == 0 ? y : y + first, part == 0 ? first : second,
                                 part == 0 ? grid.layout.first() : grid.layout.second_type(),
                                 part == 0 ? colours.ink : colours.quiet, part == 1));
    }
  }
  ImGui::PopClipRect();
  grid.stops.push_back(upper);
  grid.stops.push_back(lower);
  return y + height + px(3);
}

float show_foot(TableGrid& grid, float y) {
  const AppState& state = grid.state;
  Hands& hands = grid.hands;
  const Palette& colours = palette();
  const float line = setting(grid.layout.first()).leading + px(2);
  y += px(5);
  for (int row = 0; row < static_cast<int>(grid.facts.table.foot.size()); ++row) {
    const FootRow& foot = grid.facts.table.foot[static_cast<size_t>(row)];
    const float height =
        text_height(grid.layout.first(), foot.label, grid.layout.label_width - px(12)) + px(2);
    draw_text(grid.layout.first(), ImVec2(ImGui::GetWindowPos().x + px(4), y + px(1)), colours.ink,
              foot.label, grid.layout.label_width - px(12));
    clip_to_figures(grid);
    std::vector<std::string> stops = {""};
    for (int c = 0; c < grid.facts.table.columns; ++c) {
      stops.push_back(grid.figure(grid.facts.at(grid.facts.foot, row, c), "",
                                  "cell/" + std::to_string(c) + "/foot/" + foot.key, y, line,
                                  grid.layout.first(), colours.ink, false));
    }
    ImGui::PopClipRect();
    grid.stops.push_back(stops);
    y += height;
  }
  bool other_estimator = hands.view.more_figures;
  for (int c = 0; c < grid.facts.table.columns; ++c)
    other_estimator = other_estimator || estimator_of(state, c) != 0;
  for (int part = 0; part < (other_estimator ? 2 : 1); ++part) {
    plain_name(grid, part == 0 ? "errors" : "estimator", y + px(2), grid.layout.first(), colours.ink);
    clip_to_figures(grid);
    for (int c = 0; c < grid.facts.table.columns; ++c) {
      const Measure& m = grid.layout.measures[static_cast<size_t>(c)];
      const std::vector<std::string>& words = part == 0 ? errors_words() : estimator_words();
      const int chosen = part == 0 ? errors_of(state, c) : estimator_of(state, c);
      const std::string& shown = words[static_cast<size_t>(chosen)];
      const float width = chooser_size(shown, Type::Small).x;
      const char* const key = part == 0 ? "errors" : "estimator";
      const int picked =
          show_chooser(hands, "column/" + std::to_string(c) + "/" + key, shown, words, chosen,
                       ImVec2(m.left + std::max(0.0f, (m.width - width) / 2), y + px(4)), Type::Small);
      if (picked >= 0 && picked != chosen) {
        grid.intent = EditColumn{c, key, part == 0 ? errors_key(picked) : estimator_key(picked)};
      }
    }
    ImGui::PopClipRect();
    y += line + px(3);
  }
  return y + px(5);
}

}  // namespace rejoinder
