#include "web/panels/allows.h"

#include <algorithm>

#include "core/number/number_text.h"
#include "web/model/document_view.h"
#include "web/panels/drawers.h"
#include "web/panels/parts.h"
#include "web/panels/printed_table.h"
#include "web/pictures/correlation_line.h"
#include "web/pictures/null_curve.h"
#include "web/platform/marks.h"

namespace rejoinder {
namespace {

// The answer in as few lines as the width needs.
void show_answer(const Finding& finding, Pen& pen) {
  const Palette& colours = palette();
  pen.write(Type::Title, colours.ink, finding.headline);
  pen.skip(2);
  std::string below;
  if (finding.df && finding.f) {
    below = finding.statistic == Statistic::ChiSquare
                ? "with " + df_text(finding.df->numerator) +
                      (finding.df->numerator == 1 ? " degree" : " degrees") + " of freedom"
                : "with " + df_text(finding.df->numerator) + " and " + df_text(finding.df->denominator) +
                      " degrees of freedom";
    if (finding.p) below += ", so p is " + p_range_text(*finding.p);
    below += ".";
    if (finding.critical) {
      below += " The " + level_text(finding.level) + " point is " + number_text(*finding.critical) + ".";
    }
  }
  if (!below.empty()) pen.write(Type::Body, colours.soft, below);
  pen.skip(8);
  const float size = px(24), gap = px(10);
  const ImVec2 at = pen.at();
  Pen words{pen.x + size + gap, pen.y + px(1), pen.width - size - gap};
  draw_mark(mark_for(finding.state), accent(finding.state), ImVec2(at.x + size / 2, at.y + size / 2), size);
  // The headline of a claim without a test says the state already.
  if (finding.headline != words_for(finding.state)) {
    words.write(Type::Strong, accent(finding.state), words_for(finding.state));
  }
  if (!finding.sentence.empty()) words.write(Type::Body, colours.soft, finding.sentence);
  pen.y = std::max(at.y + size, words.y);
}

// Figure, degrees of freedom, decision: boxes side by side where there is room, else below each other.
void show_parts(const Finding& finding, Pen& pen) {
  struct Part {
    const char* name;
    std::string says;
  };
  const Part parts[] = {
      {"figure", finding.figure_says},
      {"degrees of freedom", finding.df_says},
      {finding.decision == DecisionPart::NotComputable ? "decision" : "", finding.decision_says}};
  const std::string decision = "decision at " + level_text(finding.level);
  const Palette& colours = palette();
  const bool beside = pen.width >= px(400);
  const float gap = px(8), width = beside ? (pen.width - 2 * gap) / 3 : pen.width, pad = px(10);
  float tallest = 0;
  const auto height_of = [&](const Part& part) {
    return setting(Type::Small).leading + px(2) + text_height(Type::Note, part.says, width - 2 * pad) +
           px(15);
  };
  for (const Part& part : parts) tallest = std::max(tallest, height_of(part));
  float x = pen.x;
  for (const Part& part : parts) {
    const float height = beside ? tallest : height_of(part);
    const ImVec2 low(snap(x), snap(pen.y)), high(snap(x + width), snap(pen.y + height));
    draw_card(low, high, colours.card, colours.edge, hair(), px(5));
    Pen inner{low.x + pad, low.y + px(7), width - 2 * pad};
    inner.write(Type::Small, colours.quiet, part.name[0] ? part.name : decision);
    inner.skip(2);
    inner.write(Type::Note, colours.ink, part.says);
    if (beside) {
      x += width + gap;
    } else {
      pen.y += height + gap;
    }
  }
  if (beside) pen.y += tallest;
}

// Notes that must not be overlooked stand outside every drawer.
void show_cautions(const Finding& finding, Pen& pen) {
  const Palette& colours = palette();
  for (const std::string& caution : finding.cautions) {
    Pen line{pen.x + px(12), pen.y, pen.width - px(12)};
    const float top = pen.y;
    line.write(Type::Note, colours.soft, caution);
    draw_rule(ImVec2(pen.x, top + px(3)), px(3), line.y - top - px(6), colours.undecided);
    pen.y = line.y + px(4);
  }
  if (!finding.assumes.empty()) {
    std::string all = "Assumed, and not to be proved from print: ";
    for (size_t i = 0; i < finding.assumes.size(); ++i) all += (i == 0 ? "" : "; ") + finding.assumes[i];
    pen.write(Type::Small, colours.quiet, all + ".");
  }
}

// What could not be read, outside the cells and claims that show it themselves.
void show_problems(const AppState& state, Pen& pen) {
  const Palette& colours = palette();
  // Those of the chosen claim stand with its finding already.
  const std::string chosen = claim_text(state.document, state.claim, "id");
  std::vector<Problem> problems;
  for (const Problem& problem : state.review.problems) {
    if (problem.claim.empty() || problem.claim != chosen) problems.push_back(problem);
  }
  if (problems.empty()) return;
  pen.write(Type::NoteStrong, colours.soft,
            problems.size() == 1 ? "One thing could not be read"
                                 : std::to_string(problems.size()) + " things could not be read");
  pen.skip(4);
  int shown = 0;
  for (const Problem& problem : problems) {
    if (++shown > 12) {
      pen.write(Type::Small, colours.quiet, "and " + std::to_string(problems.size() - 12) + " more.");
      break;
    }
    pen.write(Type::Note, colours.soft, problem.key);
    pen.write(Type::Small, colours.quiet,
              problem.mend.empty() ? problem.what : problem.what + "; " + problem.mend);
    pen.skip(4);
  }
  pen.skip(10);
}

}  // namespace

Intent show_allows(const AppState& state, Hands& hands, const ImVec2& low, const ImVec2& high) {
  const Palette& colours = palette();
  hands.enter(Group::Allows);
  begin_pane("allows", low, high, colours.paper);
  const float side = px(18);
  const float width = std::min(high.x - low.x - 2 * side - px(4), px(760));
  Pen pen{ImGui::GetCursorScreenPos().x + side, ImGui::GetCursorScreenPos().y + px(16), width};
  Intent intent;
  const auto take = [&](Intent more) {
    if (more.index() != 0) intent = std::move(more);
  };

  if (!hands.view.tabbed) draw_line(Type::NoteStrong, pen.at(), colours.soft, "What the print allows");
  const bool any = state.claim >= 0 && state.claim < static_cast<int>(state.checked.findings.size());
  if (any) {
    const std::string page = claim_text(state.document, state.claim, "page");
    const std::string which = "claim " + std::to_string(state.claim + 1) + (page.empty() ? "" : ", " + page);
    draw_line(Type::Note, ImVec2(pen.right() - text_width(Type::Note, which), pen.y), colours.quiet, which);
  }
  pen.y += setting(Type::NoteStrong).leading + px(10);

  if (any) {
    const Finding& finding = state.checked.findings[static_cast<size_t>(state.claim)];
    const ImVec2 answer_low = pen.at();
    show_answer(finding, pen);
    mark("region/answer", "region", answer_low, ImVec2(pen.right(), pen.y));
    pen.skip(14);
    show_parts(finding, pen);
    pen.skip(12);
    if (has_null_curve(finding)) {
      const std::string printed =
          claim_text(state.document, state.claim, finding.statistic == Statistic::F ? "f" : "chi2");
      const float height = std::min(px(196), std::max(px(150), pen.width * 0.42f));
      const ImVec2 corner(pen.right(), pen.y + height);
      draw_card(pen.at(), corner, colours.card, colours.edge, hair(), px(5));
      draw_null_curve(finding, printed, pen.at(), corner);
      mark("picture/null-curve", "img", pen.at(), corner);
      pen.y += height;
      pen.skip(12);
    }
    if (has_correlation_line(finding)) {
      const float height = correlation_line_height(finding);
      draw_correlation_line(finding, pen.at(), pen.width);
      mark("picture/correlation", "img", pen.at(), ImVec2(pen.right(), pen.y + height));
      pen.y += height;
      pen.skip(10);
    }
    show_cautions(finding, pen);
    pen.skip(14);
    take(show_drawers(state, hands, finding, pen));
  } else {
    pen.write(Type::Title, colours.ink, "Nothing is claimed yet");
    pen.skip(4);
    pen.write(Type::Body, colours.soft,
              "Enter what the paper prints on the left and what it claims in the middle. Two coefficients, "
              "their standard errors and n "
              "are enough for a first answer; every further figure narrows it.");
    pen.skip(12);
    float x = pen.x;
    if (show_button(hands, "button/start-five", "Type five figures", ImVec2(x, pen.y)))
      intent = ShowOverlay{Overlay::FiveFigures};
    x += button_size("Type five figures").x + px(8);
    if (show_button(hands, "button/start-paste", "Paste a table", ImVec2(x, pen.y)))
      intent = ShowOverlay{Overlay::PasteBox};
    pen.y += button_size("x").y + px(16);
  }
  take(show_audit_drawer(state, hands, pen));
  pen.rule(colours.hairline);
  pen.skip(14);
  show_problems(state, pen);
  scroll_by_pages(hands, Group::Allows);
  close_column(pen, 24);
  end_pane();
  return intent;
}

}  // namespace rejoinder
