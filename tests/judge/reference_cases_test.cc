// Whole reviews from reference cases: each finding against limits, states and degrees of freedom worked out elsewhere.
//
// Source of every case: its own "source" field and tests/reference/README.md. Tolerances are those of the cases.
#include <gtest/gtest.h>

#include <cmath>
#include <cstdio>
#include <cstdlib>
#include <map>
#include <string>

#include "core/judge/finding.h"
#include "core/report/findings_json.h"
#include "core/review/review.h"
#include "tests/support/json.h"
#include "tests/support/text_file.h"

namespace rejoinder::testing {
namespace {

double number(const Json& json) { return json.text == "inf" ? kInfinity : std::strtod(json.text.c_str(), nullptr); }

bool near(double mine, double theirs, double relative, double floor) {
  if (std::isinf(mine) || std::isinf(theirs)) return mine == theirs;
  return std::fabs(mine - theirs) <= relative * std::max(std::fabs(theirs), floor);
}

// The finding as another program reads it.
class Shown {
 public:
  explicit Shown(const Json& json) : json_(json) {}
  const std::string& text(const char* key) const { return json_.at(key).text; }
  bool has_range(const char* key) const { return json_.at(key).items.size() == 2; }
  Interval range(const std::string& key) const {
    const Json& pair = json_.at(key);
    if (pair.items.size() != 2) {
      ADD_FAILURE() << "no range " << key << " (" << text("state") << ": " << text("sentence") << ")";
      return {std::nan(""), std::nan("")};
    }
    return {number(pair.items[0]), number(pair.items[1])};
  }
  const Json& json() const { return json_; }

 private:
  const Json& json_;
};

// One end: `outward` says how much wider than theirs, `inward` how much narrower it may be.
void expect_end(double mine, double theirs, double sign, double outward, double inward, double floor, const char* which) {
  if (std::isinf(theirs) || std::isinf(mine)) {
    if (mine != theirs) {
      EXPECT_TRUE(std::isinf(theirs) && std::isinf(inward)) << which << " " << mine << ", expected " << theirs;
    }
    return;
  }
  const bool wider = sign * (theirs - mine) > 0;
  const double allowed = wider ? outward : inward;
  EXPECT_TRUE(std::isinf(allowed) || near(mine, theirs, allowed, floor))
      << which << " " << mine << (wider ? " is wider than " : " is narrower than ") << theirs;
}

void expect_range(const Shown& shown, const Json& want) {
  const Interval mine = shown.range(want.at("key").text);
  const double outward = number(want.at("outward")), inward = number(want.at("inward")), floor = number(want.at("floor"));
  expect_end(mine.low, number(want.at("low")), 1, outward, inward, floor, "low");
  expect_end(mine.high, number(want.at("high")), -1, outward, inward, floor, "high");
}

// Limits known by a value that is attained, perhaps with a guaranteed one beyond it.
void expect_ends(const Shown& shown, const Json& ends) {
  const Interval f = shown.range("f");
  for (const char* side : {"low", "high"}) {
    if (!ends.has(side)) continue;
    const Json& end = ends.at(side);
    const bool low = std::string(side) == "low";
    const double mine = low ? f.low : f.high, attained = number(end.at("value")), sign = low ? 1 : -1;
    if (end.has("guaranteed")) {
      const double guard = number(end.at("guaranteed"));
      EXPECT_LE(sign * (mine - attained), 1e-6 * std::fabs(attained)) << side << " leaves out " << attained << ", which is attained";
      const double slack = std::max(1e-4, 2 * std::fabs(guard - attained) / std::fabs(attained)) * std::fabs(attained);
      EXPECT_LE(sign * (guard - mine), slack) << side << " is wider than " << guard;
    } else {
      EXPECT_TRUE(near(mine, attained, low ? 1e-7 : 1e-6, 1e-3)) << side << " " << mine << ", expected " << attained;
    }
    if (end.has("p")) {
      const Interval p = shown.range("p");
      EXPECT_TRUE(near(low ? p.high : p.low, number(end.at("p")), 1e-5, 1e-12)) << "p at the " << side << " end";
    }
  }
}

void expect_intervals(const Json& mine, const Json& want) {
  ASSERT_EQ(mine.items.size(), want.items.size());
  for (std::size_t i = 0; i < want.items.size(); ++i)
    for (std::size_t end = 0; end < 2; ++end)
      EXPECT_NEAR(number(mine.items[i].items[end]), number(want.items[i].items[end]), 1e-9);
}

void compare(const Json& want, const Json& report) {
  ASSERT_EQ(report.at("findings").items.size(), 1u);
  const Shown shown(report.at("findings").items[0]);
  for (const char* key : {"state", "decision", "figure", "df_claimed", "statistic", "q"})
    if (want.has(key)) {
      EXPECT_EQ(shown.text(key), want.at(key).text) << key;
    }
  if (want.has("df")) {
    ASSERT_EQ(shown.json().at("df").items.size(), 2u);
    for (std::size_t i = 0; i < 2; ++i) EXPECT_EQ(number(shown.json().at("df").items[i]), number(want.at("df").items[i])) << "df";
  }
  if (want.has("level")) {
    EXPECT_DOUBLE_EQ(number(shown.json().at("level")), number(want.at("level")));
  }
  if (want.has("critical")) {
    EXPECT_TRUE(near(number(shown.json().at("critical")), number(want.at("critical")),
                     want.has("critical_rel") ? number(want.at("critical_rel")) : 1e-5, 1e-3))
        << "critical " << shown.text("critical");
  }
  if (want.at("asks").kind == Json::Kind::True) {
    EXPECT_FALSE(shown.json().at("ask").items.empty()) << "nothing to ask for";
  }
  if (want.has("range")) expect_range(shown, want.at("range"));
  if (want.has("ends")) expect_ends(shown, want.at("ends"));
  if (want.has("p")) {
    const Interval p = shown.range("p");
    const double relative = number(want.at("p").at("rel")), floor = number(want.at("p").at("floor"));
    EXPECT_TRUE(near(p.low, number(want.at("p").at("low")), relative, floor)) << "p low " << p.low;
    EXPECT_TRUE(near(p.high, number(want.at("p").at("high")), relative, floor)) << "p high " << p.high;
  }
  for (const Json& hold : want.at("holds").items) {
    const Interval mine = shown.range(hold.at("key").text);
    const double value = number(hold.at("value")), slack = number(hold.at("slack"));
    EXPECT_LE(mine.low, value * (1 + slack) + 1e-12) << "the true value is left out";
    EXPECT_LE(value, mine.high * (1 + slack) + 1e-12) << "the true value is left out";
  }
  if (want.has("not_below")) {
    EXPECT_GE(shown.range(want.at("not_below").at("key").text).low, number(want.at("not_below").at("value")) * (1 - 1e-6) - 1e-12)
        << "below what one restriction alone guarantees";
  }
  if (want.has("not_above")) {
    EXPECT_LE(shown.range(want.at("not_above").at("key").text).high, number(want.at("not_above").at("value")) * 1.001)
        << "above the greatest corner";
  }
  if (want.has("high_within")) {
    const double high = shown.range("wald").high;
    EXPECT_GE(high, number(want.at("high_within").items[0]) * (1 - 1e-6));
    EXPECT_LE(high, number(want.at("high_within").items[1]) * (1 + 1e-2));
  }
  if (want.has("share_rejecting"))
    for (std::size_t i = 0; i < 2; ++i)
      EXPECT_TRUE(near(i == 0 ? shown.range("share_rejecting").low : shown.range("share_rejecting").high,
                       number(want.at("share_rejecting")), 1e-9, 1e-3));
  if (want.has("does_not_reject")) expect_intervals(shown.json().at("correlation").at("does_not_reject"), want.at("does_not_reject"));
  if (want.at("no_f").kind == Json::Kind::True) {
    EXPECT_EQ(shown.json().at("f").kind, Json::Kind::Null);
  }
  if (want.at("audit_conflicts").kind == Json::Kind::True) {
    bool any = false;
    for (const Json& line : report.at("audit").items) any = any || line.at("match").text == "conflicts";
    EXPECT_TRUE(any) << "no audit line conflicts";
  }
}

void run_set(const std::string& set) {
  const Json file = read_json(text_file(std::string(REJOINDER_TEST_DATA) + "/review_cases.json"));
  ASSERT_GT(file.at("cases").items.size(), 0u);
  std::map<std::string, int> later;
  int run = 0;
  for (const Json& one : file.at("cases").items) {
    if (one.at("set").text != set) continue;
    if (one.has("later")) {
      ++later[one.at("later").text];
      continue;
    }
    SCOPED_TRACE(set + " " + one.at("id").text + " (" + one.at("source").text + ")");
    const Result<Node> document = read_document(one.at("review").text);
    ASSERT_TRUE(document.ok()) << document.error().text();
    const Review review = read_review(document.value());
    EXPECT_TRUE(review.problems.empty()) << review.problems.front().text();
    compare(one.at("expect"), read_json(findings_json(check_review(review))));
    ++run;
  }
  EXPECT_GT(run, 0);
  for (const auto& [route, count] : later)
    std::printf("not yet covered: %d cases of %s by the route \"%s\"\n", count, set.c_str(), route.c_str());
}

TEST(ReferenceCases, ScenariosGetTheirStateAndLimits) { run_set("scenarios"); }
TEST(ReferenceCases, BoundsAreSharpWhereTheyMustBe) { run_set("bounds"); }
TEST(ReferenceCases, OpenDataAreReproduced) { run_set("open"); }

}  // namespace
}  // namespace rejoinder::testing
