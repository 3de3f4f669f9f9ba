#include "web/panels/claims.h"

#include <algorithm>
#include <array>

#include "core/number/number_text.h"
#include "imgui_internal.h"
#include "web/model/document_view.h"
#include "web/panels/claim_form.h"
#include "web/panels/parts.h"
#include "web/panels/printed_table.h"
#include "web/pictures/span.h"
#include "web/platform/marks.h"
#include "web/platform/services.h"

namespace rejoinder {
namespace {

constexpr float kCardPad = 13;

const Finding* finding_of(const AppState& state, int claim) {
  return claim >= 0 && claim < static_cast<int>(state.checked.findings.size())
             ? &state.checked.findings[static_cast<size_t>(claim)]
             : nullptr;
}

// What the claim restricts, and in which column: `fare = "fuel price" = 0   in (2)`.
std::string restriction_line(const AppState& state, int claim) {
  const std::string restrictions = claim_text(state.document, claim, "restrictions");
  const int column = column_at(state, claim_text(state.document, claim, "column"));
  const int against = column_at(state, claim_text(state.document, claim, "restricted"));
  const std::string in = column < 0 ? std::string() : column_number(column);
  if (restrictions.empty()) {
    if (column >= 0 && against >= 0) return in + " against " + column_number(against);
    const Finding* const finding = finding_of(state, claim);
    return finding ? finding->restrictions : std::string();
  }
  std::string line = restrictions;
  if (!in.empty()) line += "   in " + in;
  if (against >= 0) line += " against " + column_number(against);
  return line;
}

// ".086" gives "p = .086", "<.05" gives "p < .05".
std::string p_words(const std::string& printed) {
  const bool relation = !printed.empty() && (printed[0] == '<' || printed[0] == '>');
  if (!relation) return "p = " + printed;
  const size_t digits = std::min(printed.find_first_not_of(" ", 1), printed.size());
  return "p " + printed.substr(0, 1) + " " + printed.substr(digits);
}

// The three parts in one quiet line.
std::string parts_line(const Finding& finding, const std::string& p_printed, double usual_level) {
  std::string line;
  const auto add = [&](const std::string& part) { line += (line.empty() ? "" : "  ·  ") + part; };
  if (finding.figure == FigurePart::WithinLimits)
    add(finding.reported ? "figure within limits" : p_words(p_printed) + " within limits");
  if (finding.figure == FigurePart::OutsideLimits)
    add(finding.reported ? "figure outside limits" : p_words(p_printed) + " outside limits");
  if (finding.figure == FigurePart::NotClaimed) add("no figure reported");
  if (finding.df_claimed == DfPart::AsClaimed) add("df as claimed");
  if (finding.df_claimed == DfPart::Differs) add("df differ");
  const std::string level = finding.level == usual_level ? "" : " at " + level_text(finding.level);
  if (finding.decision == DecisionPart::Rejects) add("rejects" + level);
  if (finding.decision == DecisionPart::DoesNotReject) add("does not reject" + level);
  if (finding.decision == DecisionPart::Open) add("decision open" + level);
  return line;
}

struct Total {
  std::optional<State> state;  // absent: all
  const char* id;
  const char* one;   // words after "1"
  const char* many;  // and after any other number
};
constexpr Total kTotals[] = {
    {std::nullopt, "filter/all", "looked at", "looked at"},
    {State::Agrees, "filter/agrees", "agrees", "agree"},
    {State::Conflicts, "filter/conflicts", "does not match", "do not match"},
    {State::Undecided, "filter/undecided", "open", "open"},
    {State::NotComputable, "filter/not-computable", "without a test", "without a test"}};

// How many there are of each state; pressing one shows these alone.
Intent show_totals(const AppState& state, Hands& hands, Pen& pen) {
  Intent intent;
  std::array<int, 4> counts{};
  for (const Finding& finding : state.checked.findings) ++counts[static_cast<size_t>(finding.state)];
  const Palette& colours = palette();
  const float line = setting(Type::Note).leading + px(6), mark_size = px(15);
  float x = pen.x;
  for (const Total& total : kTotals) {
    const int count = total.state ? counts[static_cast<size_t>(*total.state)]
                                  : static_cast<int>(state.checked.findings.size());
    if (total.state && count == 0 && state.only != total.state) continue;
    const std::string words = std::to_string(count) + " " + (count == 1 ? total.one : total.many);
    const float lead = total.state ? mark_size + px(6) : 0;
    const float width = lead + text_width(Type::Note, words) + px(14);
    if (x > pen.x && x + width > pen.right()) {
      x = pen.x;
      pen.y += line + px(2);
    }
    const ImVec2 low(x - px(7), pen.y), high(x + width - px(7), pen.y + line);
    const Press press = hands.press(total.id, "button", low, high);
    const bool only = state.only == total.state;
    if (press.hovered || press.held) {
      ImGui::GetWindowDrawList()->AddRectFilled(low, high, press.held ? colours.held : colours.hover, px(4));
    }
    if (press.ring) draw_ring(low, high, px(4));
    const float middle = pen.y + line / 2;
    if (total.state) {
      draw_mark(mark_for(*total.state), accent(*total.state), ImVec2(x + mark_size / 2, middle), mark_size);
    }
    draw_line(Type::Note, ImVec2(x + lead, pen.y + px(3)), only && total.state ? colours.ink : colours.quiet,
              words);
    if (only && (total.state || state.only)) {
      draw_rule(ImVec2(x, high.y - px(2)), width - px(14), px(1.5f), colours.ink);
    }
    if (press.pressed) intent = FilterState{only ? std::nullopt : total.state};
    x += width + px(4);
  }
  pen.y += line;
  return intent;
}

// The buttons of the chosen card.
Intent show_actions(const AppState& state, Hands& hands, int claim, Pen& pen) {
  Intent intent;
  const std::string id = "claim/" + std::to_string(claim) + "/";
  float x = pen.x - px(6);
  const float height = button_size("x", ButtonKind::Quiet).y;
  const auto button = [&](const char* name, const char* label, bool able) {
    const float width = button_size(label, ButtonKind::Quiet).x;
    if (x > pen.x && x + width > pen.right() + px(6)) {
      x = pen.x - px(6);
      pen.y += height;
    }
    const bool pressed = show_button(hands, id + name, label, ImVec2(x, pen.y), ButtonKind::Quiet, able);
    x += width + px(2);
    return pressed;
  };
  const bool open = hands.view.editing_claim == claim;
  if (button("change", open ? "done" : "change", true)) {
    hands.view.editing_claim = open ? -1 : claim;
    if (!open) hands.give_focus(id + "says");
  }
  if (button("repeat", "repeat", true)) intent = DuplicateClaim{claim};
  if (button("up", "up", claim > 0)) intent = MoveClaim{claim, -1};
  if (button("down", "down", claim + 1 < count_of(state.document, "claim"))) intent = MoveClaim{claim, 1};
  if (button("remove", "take out", true)) intent = RemoveClaim{claim};
  pen.y += height;
  return intent;
}

Intent show_card(const AppState& state, Hands& hands, int claim, Pen& pen) {
  Intent intent;
  const std::string id = "claim/" + std::to_string(claim);
  const Finding* const finding = finding_of(state, claim);
  const bool chosen = state.claim == claim;
  const Palette& colours = palette();
  ImDrawList* const list = ImGui::GetWindowDrawList();

  // The height is known from the frame before: the card itself must be laid down first.
  ImGuiStorage* const store = ImGui::GetStateStorage();
  const ImGuiID height_id = ImGui::GetID((id + "/height").c_str());
  const float known = store->GetFloat(height_id, px(120));
  const ImVec2 low(pen.x, pen.y), high(pen.right(), pen.y + known);
  const Press press = hands.press(id, "listitem", low, high);
  if ((press.pressed || hands.just_came(id)) && !chosen) intent = ChooseClaim{claim};
  if (press.twice && hands.view.editing_claim != claim) {
    hands.view.editing_claim = claim;
    hands.give_focus(id + "/says", false);
  }
  if (press.focused && !hands.typing() && !hands.menu()) {
    const bool move = hands.command();
    if (hands.key(ImGuiKey_UpArrow)) {
      if (move) {
        intent = MoveClaim{claim, -1};
        if (claim > 0) hands.give_focus("claim/" + std::to_string(claim - 1));
      } else if (claim > 0) {
        hands.give_focus("claim/" + std::to_string(claim - 1));
      }
    }
    if (hands.key(ImGuiKey_DownArrow)) {
      const bool more = claim + 1 < count_of(state.document, "claim");
      if (move) intent = MoveClaim{claim, 1};
      if (more) hands.give_focus("claim/" + std::to_string(claim + 1));
    }
    if (hands.key(ImGuiKey_F2, false)) {
      hands.view.editing_claim = claim;
      hands.give_focus(id + "/says");
    }
    if (hands.key(ImGuiKey_Delete, false)) intent = RemoveClaim{claim};
  }

  const float thick = chosen ? px(2) : hair();
  draw_card(low, high, colours.card,
            chosen          ? colours.ink
            : press.hovered ? colours.thin_rule
                            : colours.edge,
            thick, px(6));
  if (press.held && !chosen) list->AddRectFilled(low, high, colours.hover, px(6));
  if (press.ring) draw_ring(low, high, px(6));
  if (chosen && hands.view.claim_in_sight != claim) {
    hands.view.claim_in_sight = claim;
    ImGui::ScrollToRect(ImGui::GetCurrentWindow(),
                        ImRect(ImVec2(low.x, low.y - px(16)), ImVec2(high.x, high.y + px(16))),
                        ImGuiScrollFlags_KeepVisibleEdgeY);
    request_frames(2);
  }

  Pen inner{pen.x + px(kCardPad), pen.y + px(11), pen.width - 2 * px(kCardPad)};
  if (chosen && hands.view.editing_claim == claim) {
    if (Intent changed = show_claim_form(state, hands, claim, inner); changed.index() != 0)
      intent = std::move(changed);
    inner.skip(4);
  } else {
    const std::string says = claim_text(state.document, claim, "says");
    if (says.empty()) {
      inner.write(Type::Body, colours.quiet, "no sentence yet");
    } else {
      inner.write(Type::Body, colours.ink, "“" + says + "”");
    }
    const std::string restriction = restriction_line(state, claim);
    if (!restriction.empty()) {
      inner.skip(2);
      inner.write(Type::Mono, colours.quiet, restriction);
    }
  }
  if (finding) {
    const std::string printed =
        claim_text(state.document, claim, finding->statistic == Statistic::F ? "f" : "chi2");
    const float span = span_height(*finding, printed, inner.width);
    if (span > 0) {
      inner.skip(7);
      draw_span(*finding, printed, inner.at(), inner.width);
      mark(id + "/span", "img", inner.at(), ImVec2(inner.right(), inner.y + span));
      inner.y += span;
    }
    inner.skip(8);
    const float size = px(22), gap = px(9);
    draw_mark(mark_for(finding->state), accent(finding->state),
              ImVec2(inner.x + size / 2, inner.y + size / 2), size);
    Pen words{inner.x + size + gap, inner.y + (size - setting(Type::Note).leading) / 2,
              inner.width - size - gap};
    words.write(Type::Note, accent(finding->state), words_for(finding->state));
    const std::string parts =
        parts_line(*finding, claim_text(state.document, claim, "p"), state.review.level);
    if (!parts.empty()) words.write(Type::Small, colours.quiet, parts);
    const bool told = chosen && hands.view.editing_claim == claim;  // by the form, where the text is
    if (finding->state == State::NotComputable && !finding->sentence.empty() && !told) {
      words.write(Type::Small, colours.quiet, finding->sentence);
    }
    inner.y = std::max(inner.y + size, words.y);
  }
  if (chosen) {
    inner.skip(6);
    if (Intent acted = show_actions(state, hands, claim, inner); acted.index() != 0)
      intent = std::move(acted);
    inner.skip(-4);
  }
  const float height = snap(inner.y + px(11) - pen.y);
  if (height != known) {
    store->SetFloat(height_id, height);
    request_frames(1);
  }
  pen.y += height;
  return intent;
}

}  // namespace

Intent show_claims(const AppState& state, Hands& hands, const ImVec2& low, const ImVec2& high) {
  const Palette& colours = palette();
  hands.enter(Group::Claims);
  begin_pane("claims", low, high, colours.desk);
  const float side = px(18);
  const float width = std::min(high.x - low.x - 2 * side - px(4), px(720));
  Pen pen{ImGui::GetCursorScreenPos().x + side, ImGui::GetCursorScreenPos().y + px(16), width};
  Intent intent;
  const auto take = [&](Intent more) {
    if (more.index() != 0) intent = std::move(more);
  };

  if (!hands.view.tabbed) draw_line(Type::NoteStrong, pen.at(), colours.soft, "Claims");
  const char* const add = "add a claim";
  const float add_width = button_size(add, ButtonKind::Quiet).x;
  if (show_button(hands, "button/add-claim", add, ImVec2(pen.right() - add_width + px(6), pen.y - px(3)),
                  ButtonKind::Quiet)) {
    intent = AddClaim{""};
    hands.view.editing_claim = count_of(state.document, "claim");
    hands.give_focus("claim/" + std::to_string(hands.view.editing_claim) + "/says");
  }
  pen.y += setting(Type::NoteStrong).leading + px(4);
  const int count = count_of(state.document, "claim");
  if (count > 0) {
    take(show_totals(state, hands, pen));
    pen.skip(8);
  }
  int shown = 0;
  for (int i = 0; i < count; ++i) {
    const Finding* const finding = finding_of(state, i);
    if (state.only && finding && finding->state != *state.only) continue;
    take(show_card(state, hands, i, pen));
    pen.skip(11);
    ++shown;
  }
  if (count == 0) {
    pen.skip(8);
    pen.write(
        Type::Body, colours.soft,
        "Copy the sentence that reports a joint test out of the paper and paste it anywhere on this page. "
        "“F(2, 410) = 4.21, p = .015” fills itself in.");
    pen.skip(6);
    pen.write(Type::Note, colours.quiet, "Or add a claim and write what it says of the coefficients.");
  } else if (shown == 0) {
    pen.skip(8);
    pen.write(Type::Note, colours.quiet, "No claim is in this state now.");
  }
  scroll_by_pages(hands, Group::Claims);
  close_column(pen, 20);
  end_pane();
  return intent;
}

}  // namespace rejoinder
