#include "core/report/findings_json.h"

#include <cmath>

#include "core/report/json_writer.h"

namespace rejoinder {
namespace {

void pair(JsonWriter& json, const Interval& range) {
  json.begin_list();
  json.number(range.low);
  json.number(range.high);
  json.end_list();
}

void optional_pair(JsonWriter& json, const char* key, const std::optional<Interval>& range) {
  json.key(key);
  if (range)
    pair(json, *range);
  else
    json.null();
}

void string_list(JsonWriter& json, const char* key, const std::vector<std::string>& items) {
  json.key(key);
  json.begin_list();
  for (const std::string& item : items) json.text(item);
  json.end_list();
}

void df_pair(JsonWriter& json, const DegreesOfFreedom& df) {
  json.begin_list();
  json.integer(df.numerator);
  if (std::isfinite(df.denominator) && df.denominator == std::floor(df.denominator) && df.denominator < 9e15)
    json.integer(static_cast<long>(df.denominator));
  else
    json.number(df.denominator);
  json.end_list();
}

void evidence(JsonWriter& json, const Evidence& e) {
  json.begin_object();
  json.key("route");
  json.text(contract_word(e.route));
  json.key("f");
  pair(json, e.f());
  json.key("wald");
  pair(json, e.wald);
  json.key("p");
  pair(json, e.p);
  json.key("df");
  df_pair(json, e.df);
  // The weaker label speaks for both ends; an end that the method could not bound says so under bounds.
  const Sharpness weaker = std::max(e.low, e.high == Sharpness::NotBounded ? Sharpness::Guaranteed : e.high);
  json.key("bound");
  json.text(contract_word(weaker));
  json.key("bounds");
  json.begin_list();
  json.text(contract_word(e.low));
  json.text(contract_word(e.high));
  json.end_list();
  optional_pair(json, "attained", e.attained);
  json.key("binds");
  json.truth(e.binds);
  string_list(json, "assumes", e.assumes);
  string_list(json, "cautions", e.cautions);
  string_list(json, "working", e.working);
  json.end_object();
}

void intervals(JsonWriter& json, const char* key, const std::vector<Interval>& list) {
  json.key(key);
  json.begin_list();
  for (const Interval& one : list) pair(json, one);
  json.end_list();
}

void ask(JsonWriter& json, const Ask& a) {
  json.begin_object();
  json.key("figure");
  json.text(a.figure);
  string_list(json, "terms", a.terms);
  json.key("column");
  json.text(a.column);
  json.key("decides");
  json.truth(a.decides);
  optional_pair(json, "turns_at", a.turns_at);
  json.key("sentence");
  json.text(a.sentence);
  json.end_object();
}

void finding(JsonWriter& json, const Finding& f) {
  json.begin_object();
  json.key("claim");
  json.text(f.claim);
  json.key("says");
  json.text(f.says);
  json.key("page");
  json.text(f.page);
  json.key("restrictions");
  json.text(f.restrictions);
  json.key("q");
  if (f.q > 0)
    json.integer(f.q);
  else
    json.null();
  json.key("statistic");
  json.text(contract_word(f.statistic));
  json.key("state");
  json.text(contract_word(f.state));
  json.key("figure");
  json.text(contract_word(f.figure));
  json.key("df_claimed");
  json.text(contract_word(f.df_claimed));
  json.key("decision");
  json.text(contract_word(f.decision));
  optional_pair(json, "f", f.f);
  optional_pair(json, "wald", f.wald);
  optional_pair(json, "p", f.p);
  json.key("df");
  if (f.df)
    df_pair(json, *f.df);
  else
    json.null();
  json.key("bounds");
  if (f.f) {
    json.begin_list();
    json.text(contract_word(f.low));
    json.text(contract_word(f.high));
    json.end_list();
  } else {
    json.null();
  }
  optional_pair(json, "attained", f.attained);
  json.key("level");
  json.number(f.level);
  json.key("critical");
  if (f.critical)
    json.number(*f.critical);
  else
    json.null();
  json.key("headline");
  json.text(f.headline);
  json.key("sentence");
  json.text(f.sentence);
  json.key("evidence");
  json.begin_list();
  for (const Evidence& e : f.evidence) evidence(json, e);
  json.end_list();
  json.key("ask");
  json.begin_list();
  for (const Ask& a : f.ask) ask(json, a);
  json.end_list();
  json.key("slips");
  json.begin_list();
  for (const Slip& slip : f.slips) {
    json.begin_object();
    json.key("kind");
    json.text(slip.kind);
    json.key("says");
    json.text(slip.says);
    json.end_object();
  }
  json.end_list();
  if (f.correlation) {
    json.key("correlation");
    json.begin_object();
    string_list(json, "terms", f.correlation->terms);
    intervals(json, "fits", f.correlation->fits);
    intervals(json, "does_not_reject", f.correlation->does_not_reject);
    json.end_object();
  }
  if (f.share_rejecting) optional_pair(json, "share_rejecting", f.share_rejecting);
  string_list(json, "assumes", f.assumes);
  string_list(json, "cautions", f.cautions);
  string_list(json, "working", f.working);
  json.key("paragraph");
  json.text(f.paragraph);
  json.end_object();
}

void review(JsonWriter& json, const CheckedReview& checked) {
  json.begin_object();
  json.key("rejoinder");
  json.integer(1);
  json.key("review");
  json.text(checked.title);
  json.key("findings");
  json.begin_list();
  for (const Finding& f : checked.findings) finding(json, f);
  json.end_list();
  json.key("audit");
  json.begin_list();
  for (const AuditLine& line : checked.audit) {
    json.begin_object();
    json.key("where");
    json.text(line.where);
    json.key("match");
    json.text(contract_word(line.match));
    json.key("says");
    json.text(line.says);
    json.end_object();
  }
  json.end_list();
  json.key("problems");
  json.begin_list();
  for (const Problem& problem : checked.problems) {
    json.begin_object();
    json.key("line");
    json.integer(problem.line);
    json.key("key");
    json.text(problem.key);
    json.key("what");
    json.text(problem.what);
    json.key("mend");
    json.text(problem.mend);
    json.end_object();
  }
  json.end_list();
  json.end_object();
}

}  // namespace

std::string findings_json(const CheckedReview& checked) {
  JsonWriter json;
  review(json, checked);
  return json.str() + "\n";
}

std::string findings_json(const std::vector<CheckedReview>& checked) {
  if (checked.size() == 1) return findings_json(checked.front());
  JsonWriter json;
  json.begin_list();
  for (const CheckedReview& one : checked) review(json, one);
  json.end_list();
  return json.str() + "\n";
}

}  // namespace rejoinder
