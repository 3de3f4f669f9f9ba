// Two coefficients, two standard errors and n: the shortest way to a first finding, shown while it is typed.
#include <array>

#include "web/model/update.h"
#include "web/panels/field.h"
#include "web/panels/overlay.h"
#include "web/pictures/span.h"

namespace rejoinder {
namespace {

FiveFigures figures_of(const Hands::View& view) {
  const auto& five = view.five;
  return {five[0], five[1], five[2], five[3], five[4], view.five_equal};
}

bool complete(const Hands::View& view) {
  for (const std::string& figure : view.five) {
    if (figure.empty()) return false;
  }
  return true;
}

// The finding these figures would give, worked out on a state of its own; anew only when a figure changes.
const AppState& trial_of(const Hands::View& view) {
  static std::array<std::string, 5> figures;
  static bool equal = false;
  static AppState trial;
  if (figures != view.five || equal != view.five_equal || trial.checked.findings.empty()) {
    figures = view.five;
    equal = view.five_equal;
    trial = AppState{};
    trial.document = Node::table(false);
    update(trial, figures_of(view));
  }
  return trial;
}

}  // namespace

Intent show_five_figures(const AppState&, Hands& hands, Pen& pen) {
  Intent intent;
  const Palette& colours = palette();
  Hands::View& view = hands.view;
  pen.write(Type::Note, colours.soft, "Each figure exactly as the paper prints it, with all its digits.");
  pen.skip(14);

  const struct {
    const char* id;
    const char* label;
    int row, column;
  } blanks[] = {{"five/coef1", "first coefficient", 0, 0},
                {"five/se1", "its standard error", 0, 1},
                {"five/coef2", "second coefficient", 1, 0},
                {"five/se2", "its standard error", 1, 1},
                {"five/n", "n", 2, 0}};
  FieldStyle style;
  const float gap = px(16), width = (pen.width - gap) / 2;
  const float field = field_height(style, "", 0), row = setting(Type::Small).leading + px(3) + field + px(14);
  if (hands.focus().empty()) hands.give_focus("five/coef1");
  for (size_t i = 0; i < 5; ++i) {
    const float x = pen.x + static_cast<float>(blanks[i].column) * (width + gap),
                y = pen.y + static_cast<float>(blanks[i].row) * row;
    draw_line(Type::Small, ImVec2(x, y), colours.quiet, blanks[i].label);
    const ImVec2 low(x, y + setting(Type::Small).leading + px(3));
    if (const auto typed =
            show_field(hands, blanks[i].id, view.five[i], low, ImVec2(low.x + width, low.y + field), style)) {
      view.five[i] = *typed;
    }
  }
  // What is claimed of the two stands beside n.
  const float x = pen.x + width + gap, y = pen.y + 2 * row;
  draw_line(Type::Small, ImVec2(x, y), colours.quiet, "the claim");
  const std::vector<std::string> claims = {"both are zero", "they are equal"};
  const int picked =
      show_chooser(hands, "five/claim", claims[view.five_equal ? 1 : 0], claims, view.five_equal ? 1 : 0,
                   ImVec2(x, y + setting(Type::Small).leading + px(9)));
  if (picked >= 0) view.five_equal = picked == 1;
  pen.y += 3 * row;
  pen.rule(colours.hairline);
  pen.skip(12);

  const bool ready = complete(view);
  if (ready) {
    const AppState& trial = trial_of(view);
    if (!trial.checked.findings.empty()) {
      const Finding& finding = trial.checked.findings.front();
      pen.write(Type::Title, colours.ink, finding.headline);
      pen.skip(2);
      pen.write(Type::Note, accent(finding.state), words_for(finding.state));
      pen.write(Type::Note, colours.soft, finding.sentence);
      if (const float span = span_height(finding, "", pen.width); span > 0) {
        pen.skip(8);
        draw_span(finding, "", pen.at(), pen.width);
        pen.y += span;
      }
    }
  } else {
    pen.write(Type::Note, colours.quiet, "The first finding appears here with the fifth figure.");
  }
  pen.skip(14);
  if (show_button(hands, "five/begin", "Begin a review with these", pen.at(), ButtonKind::Strong, ready) ||
      (ready && hands.command() && hands.key(ImGuiKey_Enter, false))) {
    intent = figures_of(view);
    hands.stop_typing();
  }
  pen.y += button_size("x").y + px(6);
  pen.write(Type::Small, colours.quiet,
            "It takes the place of the review on the page; undo brings that back.");
  return intent;
}

}  // namespace rejoinder
