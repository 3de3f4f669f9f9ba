#include "web/panels/claim_form.h"

#include <algorithm>

#include "core/algebra/restrictions.h"
#include "core/number/number_text.h"
#include "web/model/document_view.h"
#include "web/model/ticks.h"
#include "web/panels/field.h"
#include "web/panels/printed_table.h"

namespace rejoinder {
namespace {

// Words and blanks in running lines, as in a printed form.
class Flow {
 public:
  explicit Flow(Pen& pen) : pen_(pen), x_(pen.x), line_(setting(Type::Note).leading + px(8)) {}

  void words(std::string_view text) {
    // Word by word, so that the line can break anywhere between two.
    size_t begin = 0;
    while (begin < text.size()) {
      const size_t end = std::min(text.find(' ', begin), text.size());
      const std::string_view word = text.substr(begin, end - begin);
      const ImVec2 at = room(text_width(Type::Note, word));
      draw_line(Type::Note, ImVec2(at.x, at.y + px(4)), palette().soft, word);
      begin = end + 1;
    }
  }
  // Upper left of a blank that is `width` wide.
  ImVec2 room(float width) {
    if (x_ > pen_.x && x_ + width > pen_.right()) {
      pen_.y += line_;
      x_ = pen_.x;
    }
    const ImVec2 at(x_, pen_.y);
    x_ += width + px(5);
    return at;
  }
  float line() const { return line_; }
  void end() {
    if (x_ > pen_.x) pen_.y += line_;
    x_ = pen_.x;
  }

 private:
  Pen& pen_;
  float x_, line_;
};

struct Form {
  const AppState& state;
  Hands& hands;
  int claim;
  Intent intent;

  std::string text(const char* key) const { return claim_text(state.document, claim, key); }
  std::string id(const char* key) const { return "claim/" + std::to_string(claim) + "/" + key; }

  // A blank with the words before it, never parted from them.
  void blank(Flow& flow, const char* words, const char* key, float width, const char* hint) {
    FieldStyle style;
    style.type = Type::Note;
    style.frame = Frame::Line;
    style.hint = hint;
    const std::string value = text(key);
    const float wide = std::min(std::max(px(width), text_width(Type::Note, value) + px(12)), px(220));
    const float lead = text_width(Type::Note, words) + px(5);
    ImVec2 at = flow.room(lead + wide);
    draw_line(Type::Note, ImVec2(at.x, at.y + px(4)), palette().soft, words);
    at.x += lead;
    const ImVec2 low(at.x, at.y + px(3)), high(at.x + wide, at.y + flow.line() - px(2));
    if (const auto typed = show_field(hands, id(key), value, low, high, style))
      intent = EditClaim{claim, key, *typed};
  }

  int choice(Flow& flow, const char* key, const std::string& shown, const std::vector<std::string>& items,
             int chosen) {
    const ImVec2 at = flow.room(chooser_size(shown).x);
    return show_chooser(hands, id(key), shown, items, chosen, ImVec2(at.x, at.y + px(4)));
  }
};

// The byte at which character `number` of `text` begins, counted from 1.
size_t byte_of_character(const std::string& text, int number) {
  size_t at = 0;
  for (int i = 1; i < number && at < text.size(); ++i) {
    ++at;
    while (at < text.size() && (static_cast<unsigned char>(text[at]) & 0xC0) == 0x80) ++at;
  }
  return at;
}

std::optional<size_t> pointed_byte(const std::string& text, const std::string& where) {
  const size_t at = where.find("character ");
  if (at == std::string::npos) return std::nullopt;
  return byte_of_character(text, std::atoi(where.c_str() + at + 10));
}

std::string column_words(const AppState& state, int column) {
  const std::string label = column_text(state.document, column, "label");
  const std::string number = column_number(column);
  return label.empty() || label == number ? number : number + " " + label;
}

void show_ticks(Form& form, Pen& pen) {
  const Palette& colours = palette();
  const Ticks ticks = read_ticks(form.text("restrictions"));
  const char* const forms[] = {"zero", "equal", "sum"};
  const std::vector<std::string> words = {"all of these are zero", "these are all equal", "these add up to"};
  int chosen = form.hands.view.tick_form;
  for (int i = 0; i < 3; ++i) {
    if (ticks.form == forms[i]) chosen = i;
  }
  const int column = column_of_claim(form.state.document, form.claim);
  std::vector<std::string> terms =
      column < 0 ? all_term_names(form.state.document) : term_names(form.state.document, column);

  Flow flow(pen);
  for (const std::string& term : terms) {
    if (term.empty()) continue;
    const bool ticked = std::find(ticks.terms.begin(), ticks.terms.end(), term) != ticks.terms.end();
    const ImVec2 at = flow.room(tick_size(term).x + px(6));
    if (show_tick(form.hands, form.id("tick/") + term, term, ticked, ImVec2(at.x - px(2), at.y + px(2)))) {
      std::vector<std::string> now = ticks.terms;
      if (ticked) {
        now.erase(std::remove(now.begin(), now.end(), term), now.end());
      } else {
        now.push_back(term);
      }
      form.intent = TickTerms{form.claim, forms[chosen], now};
    }
  }
  flow.end();
  Flow kinds(pen);
  const std::string shown = words[static_cast<size_t>(chosen)] + (chosen == 2 ? " " + ticks.value : "");
  const int picked = form.choice(kinds, "tick-form", shown, words, chosen);
  if (picked >= 0) {
    form.hands.view.tick_form = picked;
    if (!ticks.terms.empty()) form.intent = TickTerms{form.claim, forms[picked], ticks.terms};
  }
  kinds.end();
  if (ticks.form.empty() && !form.text("restrictions").empty()) {
    pen.write(Type::Small, colours.quiet, "What is written says more than ticks can; ticking begins anew.");
  }
  pen.skip(2);
}

}  // namespace

Intent show_claim_form(const AppState& state, Hands& hands, int claim, Pen& pen) {
  Form form{state, hands, claim, {}};
  const Palette& colours = palette();

  FieldStyle sentence;
  sentence.many_lines = true;
  sentence.hint = "the sentence, word for word";
  const std::string says = form.text("says");
  const float height = field_height(sentence, says, pen.width);
  if (const auto typed =
          show_field(hands, form.id("says"), says, pen.at(), ImVec2(pen.right(), pen.y + height), sentence)) {
    form.intent = EditClaim{claim, "says", *typed};
  }
  pen.y += height + px(8);

  // ---- what it restricts
  const std::string restrictions = form.text("restrictions");
  const bool compares = !form.text("restricted").empty();
  FieldStyle mono;
  mono.type = Type::Mono;
  mono.many_lines = true;
  mono.hint = compares ? "the added terms are zero" : "fare = 0, \"fuel price\" = 0";
  std::optional<Error> trouble;
  if (!restrictions.empty()) {
    const int column = column_of_claim(state.document, claim);
    const Result<Restrictions> read = read_restrictions(
        restrictions, column < 0 ? std::vector<std::string>{} : term_names(state.document, column));
    if (!read.ok()) trouble = read.error();
  }
  if (trouble) mono.point = pointed_byte(restrictions, trouble->where);
  const float mono_height = field_height(mono, restrictions, pen.width);
  if (const auto typed = show_field(hands, form.id("restrictions"), restrictions, pen.at(),
                                    ImVec2(pen.right(), pen.y + mono_height), mono)) {
    form.intent = EditClaim{claim, "restrictions", *typed};
  }
  pen.y += mono_height + px(4);
  if (trouble) {
    pen.write(Type::Small, colours.conflicts, trouble->text());
    pen.skip(2);
  }
  const bool open = hands.view.ticked_claim == claim;
  if (show_button(hands, form.id("ticks"), open ? "hide the list of terms" : "tick terms instead",
                  ImVec2(pen.x - px(6), pen.y), ButtonKind::Quiet)) {
    hands.view.ticked_claim = open ? -1 : claim;
  }
  pen.y += button_size("x", ButtonKind::Quiet).y + px(2);
  if (open) show_ticks(form, pen);

  // ---- where it rests and what is reported
  Flow flow(pen);
  std::vector<std::string> columns;
  const int count = count_of(state.document, "column");
  for (int c = 0; c < count; ++c) columns.push_back(column_words(state, c));
  const int in = column_at(state, form.text("column"));
  if (count > 0) {
    flow.words("in column");
    const int picked =
        form.choice(flow, "column", in < 0 ? "choose one" : columns[static_cast<size_t>(in)], columns, in);
    if (picked >= 0) form.intent = EditClaim{claim, "column", column_text(state.document, picked, "id")};
    flow.words("against");
    std::vector<std::string> others = {"no other column", "-"};
    others.insert(others.end(), columns.begin(), columns.end());
    const int against = column_at(state, form.text("restricted"));
    const std::string shown = against < 0 ? others[0] : columns[static_cast<size_t>(against)];
    const int other = form.choice(flow, "restricted", shown, others, against < 0 ? 0 : against + 2);
    if (other == 0) form.intent = EditClaim{claim, "restricted", ""};
    if (other >= 2)
      form.intent = EditClaim{claim, "restricted", column_text(state.document, other - 2, "id")};
  }
  flow.end();
  Flow reported(pen);
  form.blank(reported, "reported: F", "f", 58, "");
  form.blank(reported, "or χ²", "chi2", 58, "");
  form.blank(reported, "p", "p", 58, "");
  form.blank(reported, "df", "df", 66, "3, 205");
  reported.end();
  Flow decision(pen);
  decision.words("the text");
  const std::string rejects = form.text("rejects");
  const std::vector<std::string> decisions = {"leaves the decision open", "rejects", "does not reject"};
  const int said = rejects == "true" ? 1 : rejects == "false" ? 2 : 0;
  const int picked = form.choice(decision, "rejects", decisions[static_cast<size_t>(said)], decisions, said);
  if (picked >= 0 && picked != said) {
    form.intent = EditClaim{claim, "rejects", picked == 0 ? "" : picked == 1 ? "true" : "false"};
  }
  form.blank(decision, "at", "level", 46, "0.05");
  form.blank(decision, "on page", "page", 58, "p. 14");
  decision.end();
  return form.intent;
}

}  // namespace rejoinder
