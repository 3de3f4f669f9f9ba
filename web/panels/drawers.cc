#include "web/panels/drawers.h"

#include <algorithm>

#include "core/number/number_text.h"
#include "imgui_internal.h"
#include "web/pictures/shift.h"
#include "web/platform/marks.h"

namespace rejoinder {
namespace {

constexpr float kIndent = 2;  // of the sign
constexpr float kInset = 21;  // of what the drawer holds

// A head with what is in the drawer said at its right; returns whether the drawer is open.
bool show_head(const AppState& state, Hands& hands, Pen& pen, Drawer drawer, const char* id,
               const char* title, const std::string& aside, Intent& intent) {
  const Palette& colours = palette();
  const bool open = state.open_drawers.contains(drawer);
  pen.rule(colours.hairline);
  const float height = setting(Type::Strong).leading + px(16);
  const ImVec2 low(pen.x - px(8), pen.y + px(2)), high(pen.right() + px(8), pen.y + height - px(2));
  const Press press = hands.press(id, open ? "button open" : "button", low, high);
  if (press.hovered || press.held) {
    ImGui::GetWindowDrawList()->AddRectFilled(low, high, press.held ? colours.held : colours.hover, px(4));
  }
  if (press.ring) draw_ring(low, high, px(4));
  // A small bar that stands up while the drawer is shut: plus when shut, minus when open.
  ImDrawList* const list = ImGui::GetWindowDrawList();
  const float arm = px(4.5f), thick = px(1.4f), middle = snap(pen.y + height / 2);
  const float sign_x = pen.x + px(kIndent) + arm;
  list->AddRectFilled(ImVec2(sign_x - arm, middle - thick / 2), ImVec2(sign_x + arm, middle + thick / 2),
                      colours.quiet);
  if (!open) {
    list->AddRectFilled(ImVec2(sign_x - thick / 2, middle - arm), ImVec2(sign_x + thick / 2, middle + arm),
                        colours.quiet);
  }
  const float text_x = pen.x + px(kInset);
  draw_line(Type::Strong, ImVec2(text_x, pen.y + px(8)), colours.ink, title);
  const float title_end = text_x + text_width(Type::Strong, title) + px(14);
  const float room = pen.right() - title_end;
  if (!aside.empty() && room > px(60)) {
    const float wide = std::min(text_width(Type::Note, aside), room);
    const float drop = (setting(Type::Strong).leading - setting(Type::Note).leading) / 2;
    draw_cut(Type::Note, ImVec2(pen.right() - wide, pen.y + px(8) + drop), colours.quiet, aside, room);
  }
  if (press.pressed) intent = ToggleDrawer{drawer};
  pen.y += height;
  if (open) {  // what lies in the drawer stands in line with its title
    pen.x += px(kInset);
    pen.width -= px(kInset);
  }
  return open;
}

void close_drawer(Pen& pen) {
  pen.skip(12);
  pen.x -= px(kInset);
  pen.width += px(kInset);
}

void write_mono(Pen& pen, const std::vector<std::string>& lines) {
  const Palette& colours = palette();
  const float side = px(10), width = pen.width - 2 * side;
  float height = px(14);
  // A line that is too long goes on below, moved in, so that the start of each step is seen.
  const float hang = text_width(Type::Mono, "    ");
  std::vector<std::pair<std::string, float>> shown;
  for (const std::string& line : lines) {
    const size_t lead = std::min(line.find_first_not_of(' '), line.size());
    const std::vector<Line> parts = set_in_lines(Type::Mono, line, width - hang);
    for (size_t i = 0; i < parts.size(); ++i) {
      const float indent =
          i == 0 ? 0 : std::min(hang + text_width(Type::Mono, line.substr(0, lead)), width / 3);
      shown.emplace_back(line.substr(parts[i].begin, parts[i].end - parts[i].begin), indent);
    }
  }
  height += static_cast<float>(shown.size()) * setting(Type::Mono).leading;
  ImGui::GetWindowDrawList()->AddRectFilled(pen.at(), ImVec2(pen.right(), pen.y + height), colours.inset,
                                            px(4));
  float y = pen.y + px(7);
  for (const auto& [text, indent] : shown) {
    draw_line(Type::Mono, ImVec2(pen.x + side + indent, y), colours.soft, text);
    y += setting(Type::Mono).leading;
  }
  pen.y += height;
}

const char* words_for(Sharpness sharpness) {
  switch (sharpness) {
    case Sharpness::Exact:
      return "attained by some table that prints so";
    case Sharpness::Guaranteed:
      return "guaranteed, perhaps a touch wide";
    case Sharpness::Estimated:
      return "estimated";
    case Sharpness::NotBounded:
      break;
  }
  return "not bounded by this route";
}

std::string range_words(const Evidence& evidence, Statistic statistic) {
  const bool chi = statistic == Statistic::ChiSquare;
  const Interval range = chi || evidence.df.numerator <= 0 ? evidence.wald : evidence.f();
  return std::string(chi ? "χ² " : "F ") + range_text(range);
}

void show_evidence(const Finding& finding, Pen& pen) {
  const Palette& colours = palette();
  for (const Evidence& evidence : finding.evidence) {
    const float top = pen.y;
    Pen line{pen.x + px(12), pen.y, pen.width - px(12)};
    const std::string name = contract_word(evidence.route);
    draw_line(Type::NoteStrong, line.at(), colours.ink, name);
    const std::string range = range_words(evidence, finding.statistic) + "   p " + p_range_text(evidence.p);
    const float wide = text_width(Type::Note, range);
    const float name_wide = text_width(Type::NoteStrong, name) + px(14);
    if (name_wide + wide <= line.width) {
      draw_line(Type::Note, ImVec2(line.right() - wide, line.y), colours.ink, range);
      line.y += setting(Type::Note).leading;
    } else {
      line.y += setting(Type::Note).leading;
      line.write(Type::Note, colours.ink, range);
    }
    std::string quality = std::string("low end ") + words_for(evidence.low);
    if (evidence.low == evidence.high) {
      quality = std::string("both ends ") + words_for(evidence.low);
    } else {
      quality += std::string("; high end ") + words_for(evidence.high);
    }
    if (evidence.binds && finding.evidence.size() > 1) quality += "; gives the finding an end";
    line.write(Type::Small, colours.quiet, quality);
    for (const std::string& assumed : evidence.assumes)
      line.write(Type::Small, colours.quiet, "assumes " + assumed);
    // A stroke at the side ties the lines of one route together.
    draw_rule(ImVec2(pen.x, top + px(2)), px(2), line.y - top - px(4),
              evidence.binds ? colours.ink : colours.control);
    pen.y = line.y + px(8);
  }
}

void show_asks(const Finding& finding, Pen& pen) {
  const Palette& colours = palette();
  if (finding.ask.empty()) {
    pen.write(Type::Note, colours.soft, "Nothing more is needed for this claim.");
    return;
  }
  int number = 0;
  for (const Ask& ask : finding.ask) {
    const std::string lead = std::to_string(++number);
    Pen line{pen.x + px(22), pen.y, pen.width - px(22)};
    draw_line(Type::NoteStrong, pen.at(), colours.quiet, lead);
    line.write(Type::NoteStrong, colours.ink, ask.figure);
    const bool told = ask.figure.find("turns at") != std::string::npos;
    if (ask.turns_at && !told) {
      const bool point = number_text(ask.turns_at->low) == number_text(ask.turns_at->high);
      line.write(Type::Note, colours.soft,
                 point ? "the decision turns at " + number_text(ask.turns_at->low)
                       : "the decision turns between " + number_text(ask.turns_at->low, ShowRounding::Down) +
                             " and " + number_text(ask.turns_at->high, ShowRounding::Up));
    } else if (ask.decides && !told) {
      line.write(Type::Note, colours.soft, "would leave one decision only");
    }
    if (!ask.sentence.empty()) line.write(Type::Note, colours.quiet, "“" + ask.sentence + "”");
    pen.y = line.y + px(7);
  }
}

void show_slips(const Finding& finding, Pen& pen) {
  const Palette& colours = palette();
  for (const Slip& slip : finding.slips) {
    pen.write(Type::NoteStrong, colours.ink, slip.kind);
    pen.write(Type::Note, colours.soft, slip.says);
    pen.skip(6);
  }
  if (finding.slips_tried > 0) {
    const std::string tried =
        std::to_string(finding.slips_tried) + (finding.slips_tried == 1 ? " slip" : " slips") + " tried";
    pen.write(Type::Small, colours.quiet,
              finding.slips.empty() ? tried + "; none gives the reported figure."
                                    : tried + ". Each is a question, never a proof.");
  } else if (finding.slips.empty()) {
    pen.write(Type::Note, colours.soft,
              finding.state == State::Conflicts ? "No ordinary slip was found that gives the reported figure."
                                                : "There is no misfit to explain.");
  }
}

}  // namespace

Intent show_drawers(const AppState& state, Hands& hands, const Finding& finding, Pen& pen) {
  Intent intent;
  const Palette& colours = palette();

  // What could explain it comes first where there is something to explain.
  const auto explain = [&] {
    std::string aside = finding.slips.empty()
                            ? (finding.state == State::Conflicts ? "nothing found" : "nothing to explain")
                            : finding.slips.front().kind;
    if (finding.slips.size() > 1) aside += " and " + std::to_string(finding.slips.size() - 1) + " more";
    if (show_head(state, hands, pen, Drawer::WhatCouldExplain, "drawer/explain", "What could explain it?",
                  aside, intent)) {
      show_slips(finding, pen);
      close_drawer(pen);
    }
  };
  const auto settle = [&] {
    const std::string aside = finding.ask.empty() ? "nothing more is needed" : finding.ask.front().figure;
    if (show_head(state, hands, pen, Drawer::WhatWouldSettle, "drawer/settle", "What would settle it", aside,
                  intent)) {
      show_asks(finding, pen);
      close_drawer(pen);
    }
  };
  // Nothing is said of slips where none was looked for.
  const bool looked = finding.slips_tried > 0 || !finding.slips.empty();
  if (looked && finding.state == State::Conflicts) explain();
  if (finding.state == State::Undecided || finding.state == State::NotComputable) settle();

  const std::string lines =
      finding.working.empty() ? "nothing was computed" : std::to_string(finding.working.size()) + " lines";
  if (show_head(state, hands, pen, Drawer::Working, "drawer/working", "Working", lines, intent)) {
    if (finding.working.empty()) {
      pen.write(Type::Note, colours.soft, "Nothing was computed for this claim.");
    } else {
      write_mono(pen, finding.working);
    }
    close_drawer(pen);
  }
  std::string routes;
  for (const Evidence& evidence : finding.evidence)
    routes += (routes.empty() ? "" : ", ") + std::string(contract_word(evidence.route));
  if (show_head(state, hands, pen, Drawer::Evidence, "drawer/evidence", "What it rests on", routes, intent)) {
    if (finding.evidence.empty())
      pen.write(Type::Note, colours.soft, "No printed figure bears on this claim.");
    show_evidence(finding, pen);
    if (hands.view.shift_claim != state.claim) {
      hands.view.shift_claim = state.claim;
      hands.view.shift = -1;
    }
    if (const Shift shift = shift_of(state, state.claim); !shift.rows.empty()) {
      pen.skip(4);
      const float height = shift_height(shift, pen.width);
      show_shift(shift, hands, pen.at(), pen.width);
      pen.y += height;
    }
    close_drawer(pen);
  }
  if (finding.state != State::Undecided && finding.state != State::NotComputable) settle();
  if (finding.state != State::Conflicts && !finding.slips.empty()) explain();

  if (show_head(state, hands, pen, Drawer::WordsForReport, "drawer/words", "Words for the report",
                "claimed · used · allows · asks", intent)) {
    pen.write(Type::Body, colours.soft, finding.paragraph);
    pen.skip(8);
    if (show_button(hands, "button/copy-words", "Copy the paragraph", pen.at())) {
      intent = CopyText{finding.paragraph, "the paragraph"};
    }
    const float next = pen.x + button_size("Copy the paragraph").x + px(8);
    if (show_button(hands, "button/report", "Whole report in a tab", ImVec2(next, pen.y)))
      intent = OpenReport{};
    pen.y += button_size("x").y;
    close_drawer(pen);
  }
  return intent;
}

Intent show_audit_drawer(const AppState& state, Hands& hands, Pen& pen) {
  Intent intent;
  const Palette& colours = palette();
  const std::vector<AuditLine>& lines = state.checked.audit;
  int conflicts = 0, strained = 0;
  for (const AuditLine& line : lines) {
    conflicts += line.match == Match::Conflicts;
    strained += line.match == Match::Strained;
  }
  std::string aside =
      lines.empty() ? "nothing to set against each other" : std::to_string(lines.size()) + " looked at";
  if (conflicts > 0)
    aside += ", " + std::to_string(conflicts) + (conflicts == 1 ? " conflicts" : " conflict");
  if (strained > 0) aside += ", " + std::to_string(strained) + " strained";
  if (conflicts + strained == 0 && !lines.empty()) aside += ", all fit";
  if (!show_head(state, hands, pen, Drawer::Audit, "drawer/audit", "Do the figures fit together?", aside,
                 intent))
    return intent;
  // Conflicts first: they are what a reader looks for.
  for (const Match match : {Match::Conflicts, Match::Strained, Match::CannotTell, Match::Fits}) {
    for (const AuditLine& line : lines) {
      if (line.match != match) continue;
      const float word_width = px(78);
      draw_line(Type::NoteStrong, pen.at(), accent(match), contract_word(match));
      Pen text{pen.x + word_width, pen.y, pen.width - word_width};
      text.write(Type::Note, colours.ink, line.where);
      text.write(Type::Small, colours.quiet, line.says);
      pen.y = text.y + px(5);
    }
  }
  if (lines.empty())
    pen.write(Type::Note, colours.soft,
              "Two figures that must agree are not printed together anywhere in this table.");
  close_drawer(pen);
  return intent;
}

}  // namespace rejoinder
