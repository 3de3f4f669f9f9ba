#include "web/pictures/shift.h"

#include <algorithm>
#include <cmath>

#include "core/number/number_text.h"
#include "web/model/document_view.h"
#include "web/model/ticks.h"
#include "web/panels/text.h"
#include "web/pictures/labels.h"
#include "web/platform/marks.h"

namespace rejoinder {
namespace {

constexpr float kRow = 20;
constexpr size_t kMostRows = 10;

std::string words_at(const Shift& shift, double t) {
  const bool possible = t >= shift.turns_at * (1 - 1e-9);
  const std::string all = shift.rows.size() == 2 ? "both" : "all of them";
  const std::string claim = shift.equal ? all + " can be equal" : all + " can be zero";
  return "Let every coefficient move by " + number_text(t) + " standard errors: " +
         (possible ? claim + "."
                   : "not yet; " + claim + " from " + number_text(shift.turns_at, ShowRounding::Up) + " on.");
}

double greatest_t(const Shift& shift) { return std::max(3.0, 1.4 * shift.turns_at); }

}  // namespace

Shift shift_of(const AppState& state, int claim) {
  Shift shift;
  if (claim < 0 || claim >= static_cast<int>(state.checked.findings.size())) return shift;
  const Evidence* estimates = nullptr;
  for (const Evidence& evidence : state.checked.findings[static_cast<size_t>(claim)].evidence) {
    if (evidence.route == Route::Estimates) estimates = &evidence;
  }
  const Ticks ticks = read_ticks(claim_text(state.document, claim, "restrictions"));
  const int place = column_of_claim(state.document, claim);
  if (!estimates || (ticks.form != "zero" && ticks.form != "equal") || ticks.terms.size() < 2 || place < 0 ||
      place >= static_cast<int>(state.review.columns.size()) || ticks.terms.size() > kMostRows) {
    return shift;
  }
  const Column& column = state.review.columns[static_cast<size_t>(place)];
  for (const std::string& name : ticks.terms) {
    const Term* const term = column.term(name);
    if (!term || !term->coef || !term->se) return Shift{};
    shift.rows.push_back({name, term->coef->value, term->se->value});
  }
  shift.equal = ticks.form == "equal";
  shift.turns_at = std::sqrt(std::max(0.0, estimates->wald.low));
  return shift;
}

float shift_height(const Shift& shift, float width) {
  const float words = text_height(Type::Small, words_at(shift, shift.turns_at), width);
  return words + px(8) + px(kRow) * static_cast<float>(shift.rows.size()) + px(34) +
         setting(Type::Small).leading;
}

void show_shift(const Shift& shift, Hands& hands, const ImVec2& at, float width) {
  const Palette& colours = palette();
  ImDrawList* const list = ImGui::GetWindowDrawList();
  const double most = greatest_t(shift);
  double& t = hands.view.shift;
  if (t < 0 || t > most) t = shift.turns_at;

  float y = at.y;
  y += draw_text(Type::Small, ImVec2(at.x, y), colours.soft, words_at(shift, t), width) + px(8);

  // ---- one line a coefficient: where it is printed, and how far it may have moved
  float names = 0;
  for (const Shift::Row& row : shift.rows) names = std::max(names, text_width(Type::Small, row.term));
  names = std::min(names, width * 0.34f) + px(14);
  double low = 0, high = 0;
  for (size_t i = 0; i < shift.rows.size(); ++i) {
    const Shift::Row& row = shift.rows[i];
    const double reach = row.standard_error * most;
    low = i == 0 && shift.equal ? row.value - reach : std::min(low, row.value - reach);
    high = i == 0 && shift.equal ? row.value + reach : std::max(high, row.value + reach);
  }
  if (high <= low) high = low + 1;
  const float left = at.x + names, room = width - names;
  const auto x_of = [&](double value) {
    return left + static_cast<float>((value - low) / (high - low)) * room;
  };
  const float top = y, bottom = y + px(kRow) * static_cast<float>(shift.rows.size());
  const bool possible = t >= shift.turns_at * (1 - 1e-9);
  double common_low = -kInfinity, common_high = kInfinity;
  for (const Shift::Row& row : shift.rows) {
    common_low = std::max(common_low, row.value - t * row.standard_error);
    common_high = std::min(common_high, row.value + t * row.standard_error);
  }
  if (shift.equal) {
    if (possible && common_low <= common_high) {
      const float from = x_of(common_low), to = std::max(x_of(common_high), from + px(2));
      list->AddRectFilled(ImVec2(from, top), ImVec2(to, bottom), faded(colours.ink, 0.14f));
    }
  } else {
    draw_rule(ImVec2(x_of(0) - hair() / 2, top), hair(), bottom - top, colours.ink);
  }
  for (const Shift::Row& row : shift.rows) {
    const float middle = snap(y + px(kRow) / 2), reach_low = x_of(row.value - t * row.standard_error),
                reach_high = x_of(row.value + t * row.standard_error);
    draw_cut(Type::Small, ImVec2(at.x, middle - setting(Type::Small).leading / 2), colours.soft, row.term,
             names - px(10));
    draw_rule(ImVec2(left, middle), room, hair(), colours.edge);
    list->AddRectFilled(ImVec2(reach_low, middle - px(4)), ImVec2(reach_high, middle + px(4) + hair()),
                        faded(colours.agrees, 0.3f));
    for (const float end : {reach_low, reach_high}) {
      draw_rule(ImVec2(end - px(0.8f), middle - px(5)), px(1.6f), px(10) + hair(), colours.agrees);
    }
    list->AddCircleFilled(ImVec2(x_of(row.value), middle + hair() / 2), px(3), colours.ink, 16);
    y += px(kRow);
  }

  // ---- the handle
  y += px(14);
  const float track = snap(y);
  const auto t_x = [&](double value) { return left + static_cast<float>(value / most) * room; };
  const Press press = hands.press("shift/handle", "slider", ImVec2(left - px(8), track - px(10)),
                                  ImVec2(left + room + px(8), track + px(10)), false);
  if (press.held && room > 0)
    t = std::clamp(static_cast<double>((ImGui::GetMousePos().x - left) / room), 0.0, 1.0) * most;
  if (press.focused && !hands.typing() && !hands.menu()) {
    if (hands.key(ImGuiKey_RightArrow)) t = std::min(most, t + most / 60);
    if (hands.key(ImGuiKey_LeftArrow)) t = std::max(0.0, t - most / 60);
    if (hands.key(ImGuiKey_Home)) t = 0;
    if (hands.key(ImGuiKey_End)) t = most;
    if (hands.key(ImGuiKey_Enter, false)) t = shift.turns_at;
  }
  draw_rule(ImVec2(left, track), room, hair(), colours.thin_rule);
  const float turn = t_x(shift.turns_at);
  draw_rule(ImVec2(turn - hair() / 2, track - px(6)), hair(), px(12), colours.ink);
  const ImVec2 knob(t_x(t), track + hair() / 2);
  list->AddCircleFilled(knob, px(7), press.held ? colours.ink : colours.card, 24);
  list->AddCircle(knob, px(7), colours.ink, 24, px(press.hovered || press.ring ? 2.2f : 1.6f));
  if (press.ring)
    draw_ring(ImVec2(knob.x - px(7), knob.y - px(7)), ImVec2(knob.x + px(7), knob.y + px(7)), px(7));
  Labels labels(at.x, left + room + px(4));
  const float below = track + px(10);
  labels.put(Type::Small, "possible from t = " + number_text(shift.turns_at), colours.soft, turn, 0,
             {Labels::Side::Centre}, {below});
  labels.put(Type::Small, "0", colours.quiet, left, 0, {Labels::Side::Centre}, {below});
  labels.draw();
  mark("picture/shift", "img", at, ImVec2(at.x + width, bottom));
}

}  // namespace rejoinder
