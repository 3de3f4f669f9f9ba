#include "web/panels/paper.h"

#include <algorithm>
#include <string>
#include <vector>

#include "imgui_internal.h"
#include "web/model/document_view.h"
#include "web/panels/field.h"
#include "web/panels/grid_cell.h"
#include "web/panels/matrix.h"
#include "web/panels/parts.h"
#include "web/panels/printed_table.h"
#include "web/platform/marks.h"
#include "web/platform/services.h"

namespace rejoinder {
namespace {

constexpr float kSide = 18;  // of the pane
constexpr const char* kAddTerm = "add a term";
constexpr float kColumnPad = 7;  // on each side of a column's figures

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

// The grid as the arrows see it: each line's stops, the name of the row first, "" where there is none.
using Stops = std::vector<std::vector<std::string>>;

std::string move_from(const Stops& stops, const std::string& id, const CellMove& move) {
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

struct Grid {
  const AppState& state;
  Hands& hands;
  const TableFacts& facts;
  const PrintedTable& table;
  Intent intent = {};
  Stops stops = {};
  std::vector<Measure> measures = {};
  std::optional<TableCell> pointed = {};  // the cell under the pointer
  std::string moved_from = {};
  CellMove move = {};
  float label_left = 0, label_width = 0;
  bool tight = false;  // smaller type and less air, so that more columns fit
  Type first() const { return tight ? Type::Note : Type::Body; }
  Type second_type() const { return tight ? Type::Small : Type::Note; }
  ImVec2 clip_low = {}, clip_high = {};  // of the figures, right of the names

  void take(const std::string& id, const CellAnswer& answer, const TableCell* cell) {
    if (answer.move.columns || answer.move.lines) {
      moved_from = id;
      move = answer.move;
    }
    if (cell && answer.hovered) pointed = *cell;
    if (cell && answer.chosen) intent = ChooseCell{*cell};
    if (cell && answer.text) intent = EditCell{*cell, *answer.text};
  }

  // A figure of column `c`, in the line that starts at `y`.
  std::string figure(const CellFacts& fact, const std::string& id, float y, float height, Type type,
                     ImU32 colour, bool brackets) {
    const TableCell& cell = fact.cell;
    const Measure& m = measures[static_cast<size_t>(cell.column)];
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
    take(id, show_cell(hands, id, fact.text, box, look, state.review.decimal), &cell);
    return id;
  }
};

const char* const kErrorsKeys[] = {"classical", "robust", "clustered", "unknown"};
const std::vector<std::string> kErrorsWords = {"classical", "robust", "clustered", "not said"};
const char* const kEstimatorKeys[] = {"ols", "iv", "ml", "other"};
const std::vector<std::string> kEstimatorWords = {"OLS", "IV", "ML", "other"};
const char* const kSecondKeys[] = {"se", "t", "p"};
const std::vector<std::string> kSecondWords = {"standard error", "t", "p"};

template <size_t size>
int place_of(const char* const (&keys)[size], std::string_view key, int otherwise) {
  for (size_t i = 0; i < size; ++i) {
    if (key == keys[i]) return static_cast<int>(i);
  }
  return otherwise;
}

int errors_of(const AppState& state, int c) {
  return place_of(kErrorsKeys, column_text(state.document, c, "errors"), 3);
}
int estimator_of(const AppState& state, int c) {
  return place_of(kEstimatorKeys, column_text(state.document, c, "estimator"), 0);
}

// A column's label without the number that stands above it anyway.
std::string heading_of(const AppState& state, int c) {
  std::string label = column_text(state.document, c, "label");
  const std::string number = column_number(c);
  if (label.starts_with(number)) label.erase(0, number.size());
  return label.substr(std::min(label.find_first_not_of(" ,:"), label.size()));
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
float measure_columns(Grid& grid, float room) {
  const AppState& state = grid.state;
  const char decimal = state.review.decimal;
  float widest = text_width(grid.first(), "errors"), word = px(70);
  const auto name = [&](std::string_view text) {
    widest = std::max(widest, text_width(grid.first(), text));
    word = std::max(word, word_width(grid.first(), text));
  };
  for (const TermRow& row : grid.table.rows) name(row.name);
  for (const FootRow& foot : grid.table.foot) name(foot.label);
  word = std::max(word, text_width(Type::Body, kAddTerm));
  const float least = std::min(word + px(16), room * 0.4f);
  grid.label_width =
      std::clamp(widest + px(14), least, std::max(least, room * (grid.table.columns > 2 ? 0.34f : 0.42f)));
  grid.measures.assign(static_cast<size_t>(grid.table.columns), {});
  float all = 0;
  for (int c = 0; c < grid.table.columns; ++c) {
    Measure& m = grid.measures[static_cast<size_t>(c)];
    for (int row = 0; row < static_cast<int>(grid.table.rows.size()); ++row) {
      measure_figure(m.terms, grid.first(), grid.facts.at(grid.facts.coefficients, row, c).text, decimal,
                     false);
      measure_figure(m.terms, grid.second_type(), grid.facts.at(grid.facts.seconds, row, c).text, decimal,
                     true);
    }
    for (int row = 0; row < static_cast<int>(grid.table.foot.size()); ++row) {
      measure_figure(m.foot, grid.first(), grid.facts.at(grid.facts.foot, row, c).text, decimal, false);
    }
    float needed = std::max({m.terms.before + m.terms.after, m.foot.before + m.foot.after, px(46)});
    needed = std::max(needed, std::min(word_width(Type::Note, heading_of(state, c)) + px(2), px(110)));
    needed = std::max(
        needed, chooser_size(kErrorsWords[static_cast<size_t>(errors_of(state, c))], Type::Small).x - px(10));
    m.width = std::ceil(needed + 2 * px(grid.tight ? 4 : kColumnPad));
    all += m.width;
  }
  // Names give way first: they can stand in two lines. Where the table must move sideways all the same, they
  // get a good share of the room instead.
  if (grid.label_width + all > room) {
    grid.label_width = least + all > room ? std::clamp(widest + px(14), least, std::max(least, room * 0.36f))
                                          : std::max(least, room - all);
  }
  return grid.label_width + all;
}

// What room is left goes to the columns in equal parts, up to a point.
void measure(Grid& grid, float room) {
  grid.tight = false;
  float all = measure_columns(grid, room);
  if (all > room) {
    grid.tight = true;
    all = measure_columns(grid, room);
  }
  const float extra =
      std::clamp((room - all) / static_cast<float>(std::max(1, grid.table.columns)), 0.0f, px(36));
  for (Measure& m : grid.measures) m.width = snap(m.width + extra);
}

void place_columns(Grid& grid, float left) {
  grid.label_left = left;
  float x = left + grid.label_width;
  for (Measure& m : grid.measures) {
    m.left = x;
    x += m.width;
  }
}

// What was worked out for the last change, kept while nothing that it depends on is different.
struct Kept {
  int changes = -1;
  bool all_figures = false;
  float room = 0, type_size = 0;
  TableFacts facts;
  std::vector<Measure> measures;
  float label_width = 0;
  bool tight = false;
};

float table_width(const Grid& grid) {
  return grid.measures.empty() ? grid.label_width
                               : grid.measures.back().left + grid.measures.back().width - grid.label_left;
}

void clip_to_figures(const Grid& grid) { ImGui::PushClipRect(grid.clip_low, grid.clip_high, true); }

// The name of a row, over the ground that hides figures scrolled below it.
void name_cell(Grid& grid, const std::string& id, const std::string& name, float y, float height,
               const CellAnswer*& answer, CellAnswer& store) {
  const float left = ImGui::GetWindowPos().x;
  const CellBox box{ImVec2(left, y),
                    ImVec2(left + grid.label_width - px(6), y + height),
                    SetAt::Left,
                    0,
                    grid.first(),
                    palette().ink,
                    false};
  store = show_cell(grid.hands, id, name, box, {}, grid.state.review.decimal);
  answer = &store;
}

void plain_name(Grid& grid, std::string_view name, float y, Type type, ImU32 colour) {
  draw_cut(type, ImVec2(ImGui::GetWindowPos().x + px(4), y), colour, name, grid.label_width - px(10));
}

// ---- the parts of the table, each from `y` down; they return where they end

float show_headings(Grid& grid, float y) {
  const AppState& state = grid.state;
  Hands& hands = grid.hands;
  const Palette& colours = palette();
  const float line = setting(Type::Note).leading;
  const std::string outcome =
      grid.table.columns > 0 ? column_text(state.document, 0, "outcome") : std::string();
  bool same = true;
  for (int c = 1; c < grid.table.columns; ++c)
    same = same && column_text(state.document, c, "outcome") == outcome;
  // Labels below the numbers, where there are any.
  bool labelled = false;
  float lines = 1;
  for (int c = 0; c < grid.table.columns; ++c) {
    const std::string heading = heading_of(state, c);
    const float width = grid.measures[static_cast<size_t>(c)].width - px(8);
    lines = std::max(lines, static_cast<float>(set_in_lines(Type::Note, heading, width).size()));
    labelled = labelled || !heading.empty() || hands.on("column/" + std::to_string(c) + "/label");
  }
  if (!labelled) lines = 0;
  y += px(4);
  clip_to_figures(grid);
  std::vector<std::string> stops = {""};
  for (int c = 0; c < grid.table.columns; ++c) {
    const Measure& m = grid.measures[static_cast<size_t>(c)];
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
    grid.take(id, answer, nullptr);
    if (answer.text) grid.intent = EditColumn{c, "label", *answer.text};
    stops.push_back(id);
  }
  ImGui::PopClipRect();
  y += line + px(4) + lines * line + px(4);
  // What is explained: once where all columns explain the same, else a line of its own.
  if (same && !hands.view.more_figures) {
    const float wide = grid.label_width - px(12), high = text_height(Type::Note, outcome, wide);
    draw_text(Type::Note,
              ImVec2(ImGui::GetWindowPos().x + px(4), y - px(5) - std::min(high, line * (1 + lines))),
              colours.ink, outcome, wide);
    if (labelled) grid.stops.push_back(stops);
    return y + px(2);
  }
  grid.stops.push_back(stops);
  plain_name(grid, "outcome", y + px(1), Type::Note, colours.quiet);
  float outcome_lines = 1;
  for (int c = 0; c < grid.table.columns; ++c) {
    const float width = grid.measures[static_cast<size_t>(c)].width - px(8);
    outcome_lines =
        std::max(outcome_lines,
                 static_cast<float>(
                     set_in_lines(Type::Note, column_text(state.document, c, "outcome"), width).size()));
  }
  const float height = outcome_lines * line + px(2);
  clip_to_figures(grid);
  std::vector<std::string> outcomes = {""};
  for (int c = 0; c < grid.table.columns; ++c) {
    const Measure& m = grid.measures[static_cast<size_t>(c)];
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
    grid.take(id, answer, nullptr);
    if (answer.text) grid.intent = EditColumn{c, "outcome", *answer.text};
    outcomes.push_back(id);
  }
  ImGui::PopClipRect();
  grid.stops.push_back(outcomes);
  return y + height + px(3);
}

float show_term(Grid& grid, int row, float y) {
  const TermRow& term = grid.table.rows[static_cast<size_t>(row)];
  const Palette& colours = palette();
  const float first = setting(grid.first()).leading + px(1),
              second = setting(grid.second_type()).leading + px(1);
  const std::string name_id = "term/" + std::to_string(row);
  const float name_height = text_height(grid.first(), term.name, grid.label_width - px(14)) + px(2);
  const float height = std::max(first + second, name_height);

  const CellAnswer* answer = nullptr;
  CellAnswer store;
  name_cell(grid, name_id, term.name, y, height, answer, store);
  grid.take(name_id, *answer, nullptr);
  if (answer->text) {
    for (int c = 0; c < grid.table.columns; ++c) {
      if (term.term[static_cast<size_t>(c)] < 0) continue;
      grid.intent = answer->text->empty()
                        ? Intent(RemoveTerm{term.name})
                        : Intent(RenameTerm{c, term.term[static_cast<size_t>(c)], *answer->text});
      break;
    }
  }

  clip_to_figures(grid);
  std::vector<std::string> upper = {name_id}, lower = {name_id};
  for (int part = 0; part < 2; ++part) {
    for (int c = 0; c < grid.table.columns; ++c) {
      const CellFacts& fact = grid.facts.at(part == 0 ? grid.facts.coefficients : grid.facts.seconds, row, c);
      if (!fact.listed) {
        (part == 0 ? upper : lower).push_back("");
        continue;
      }
      const std::string id =
          "cell/" + std::to_string(c) + "/" + std::to_string(fact.cell.term) + "/" + fact.cell.key;
      (part == 0 ? upper : lower)
          .push_back(grid.figure(fact, id, part == 0 ? y : y + first, part == 0 ? first : second,
                                 part == 0 ? grid.first() : grid.second_type(),
                                 part == 0 ? colours.ink : colours.quiet, part == 1));
    }
  }
  ImGui::PopClipRect();
  grid.stops.push_back(upper);
  grid.stops.push_back(lower);
  return y + height + px(3);
}

float show_foot(Grid& grid, float y) {
  const AppState& state = grid.state;
  Hands& hands = grid.hands;
  const Palette& colours = palette();
  const float line = setting(grid.first()).leading + px(2);
  y += px(5);
  for (int row = 0; row < static_cast<int>(grid.table.foot.size()); ++row) {
    const FootRow& foot = grid.table.foot[static_cast<size_t>(row)];
    const float height = text_height(grid.first(), foot.label, grid.label_width - px(12)) + px(2);
    draw_text(grid.first(), ImVec2(ImGui::GetWindowPos().x + px(4), y + px(1)), colours.ink, foot.label,
              grid.label_width - px(12));
    clip_to_figures(grid);
    std::vector<std::string> stops = {""};
    for (int c = 0; c < grid.table.columns; ++c) {
      stops.push_back(grid.figure(grid.facts.at(grid.facts.foot, row, c),
                                  "cell/" + std::to_string(c) + "/foot/" + foot.key, y, line, grid.first(),
                                  colours.ink, false));
    }
    ImGui::PopClipRect();
    grid.stops.push_back(stops);
    y += height;
  }
  bool other_estimator = hands.view.more_figures;
  for (int c = 0; c < grid.table.columns; ++c)
    other_estimator = other_estimator || estimator_of(state, c) != 0;
  for (int part = 0; part < (other_estimator ? 2 : 1); ++part) {
    plain_name(grid, part == 0 ? "errors" : "estimator", y + px(2), grid.first(), colours.ink);
    clip_to_figures(grid);
    for (int c = 0; c < grid.table.columns; ++c) {
      const Measure& m = grid.measures[static_cast<size_t>(c)];
      const std::vector<std::string>& words = part == 0 ? kErrorsWords : kEstimatorWords;
      const int chosen = part == 0 ? errors_of(state, c) : estimator_of(state, c);
      const std::string& shown = words[static_cast<size_t>(chosen)];
      const float width = chooser_size(shown, Type::Small).x;
      const char* const key = part == 0 ? "errors" : "estimator";
      const int picked =
          show_chooser(hands, "column/" + std::to_string(c) + "/" + key, shown, words, chosen,
                       ImVec2(m.left + std::max(0.0f, (m.width - width) / 2), y + px(4)), Type::Small);
      if (picked >= 0 && picked != chosen) {
        grid.intent = EditColumn{c, key, part == 0 ? kErrorsKeys[picked] : kEstimatorKeys[picked]};
      }
    }
    ImGui::PopClipRect();
    y += line + px(3);
  }
  return y + px(5);
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
  const float type_size = setting(Type::Body).size;
  const bool fresh = kept.changes != hands.view.changes || kept.all_figures != hands.view.more_figures;
  if (fresh) kept.facts = table_facts(state, hands.view.more_figures);
  Grid grid{state, hands, kept.facts, kept.facts.table};
  if (fresh || kept.room != inner || kept.type_size != type_size) {
    measure(grid, inner);
    kept.changes = hands.view.changes;
    kept.all_figures = hands.view.more_figures;
    kept.room = inner;
    kept.type_size = type_size;
    kept.measures = grid.measures;
    kept.label_width = grid.label_width;
    kept.tight = grid.tight;
  } else {
    grid.measures = kept.measures;
    grid.label_width = kept.label_width;
    grid.tight = kept.tight;
  }
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
    const int kind = place_of(kSecondKeys, grid.facts.second, -1);
    const int picked = show_chooser(hands, "table/second", shown, kSecondWords, kind, ImVec2(left, pen.y));
    if (picked >= 0 && picked != kind) grid.intent = SetSecondFigure{kSecondKeys[picked]};
  }
  pen.y += line + px(12);

  // ---- the table, in a window of its own that scrolls sideways where the columns need more room
  place_columns(grid, pen.x);
  const bool sideways = table_width(grid) > inner + 1;
  const float known = ImGui::GetStateStorage()->GetFloat(ImGui::GetID("height"), px(400));
  ImGui::SetCursorScreenPos(pen.at());
  ImGui::BeginChild("table", ImVec2(inner + px(1), known + (sideways ? ImGui::GetStyle().ScrollbarSize : 0)),
                    0, ImGuiWindowFlags_HorizontalScrollbar | ImGuiWindowFlags_NoNav);
  const ImVec2 corner = ImGui::GetCursorScreenPos();
  const float fixed_left = ImGui::GetWindowPos().x;
  place_columns(grid, corner.x);
  const float wide = sideways ? inner : std::max(table_width(grid), px(120));
  grid.clip_low = ImVec2(fixed_left + grid.label_width - px(6), corner.y);
  grid.clip_high = ImVec2(fixed_left + inner + px(1), corner.y + 1e6f);
  float y = corner.y;
  draw_rule(ImVec2(fixed_left, y), wide, px(1.6f), colours.rule);
  y = show_headings(grid, y + px(1));
  draw_rule(ImVec2(fixed_left, y), wide, hair(), colours.thin_rule);
  y += px(5);
  for (int row = 0; row < static_cast<int>(grid.table.rows.size()); ++row) y = show_term(grid, row, y);
  // A name typed here and Enter adds a term to every column.
  {
    FieldStyle style;
    style.frame = Frame::Bare;
    style.hint = kAddTerm;
    const ImVec2 field_low(fixed_left, y),
        field_high(fixed_left + grid.label_width - px(6), y + field_height(style, "", 0));
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
  ImGui::Dummy(ImVec2(sideways ? table_width(grid) : 1, y - corner.y));
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
    const std::string to = move_from(grid.stops, grid.moved_from, grid.move);
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
