// The invented reviews of demo/ and the findings they must give.
//
// Derived: the expected states and limits were worked out apart from the program, from the printed figures
// alone: corners of the rounding boxes for R² (narrowed by adjusted R²), covariances and log-likelihoods; for
// coefficients without a covariance the largest t ratio and |d| / (s1 + s2), and W <= df R² / (1 - R²), since
// no part of a regression explains more than the whole. They are rounded here to about four digits, so limits
// are compared at 1e-3.
#include <gtest/gtest.h>

#include <cmath>
#include <fstream>
#include <sstream>

#include "core/judge/finding.h"
#include "tests/support/json.h"
#include "web/model/worked_case.h"

namespace rejoinder {
namespace {

std::string file_text(const std::string& name) {
  std::ifstream file(std::string(REJOINDER_DEMO_DATA) + "/" + name, std::ios::binary);
  std::stringstream text;
  text << file.rdbuf();
  return text.str();
}

double limit(const testing::Json& json) {
  return json.kind == testing::Json::Kind::Text ? kInfinity : std::strtod(json.text.c_str(), nullptr);
}

void expect_limit(double actual, double expected) {
  if (std::isinf(expected)) {
    EXPECT_TRUE(std::isinf(actual)) << actual;
  }
  else
    EXPECT_NEAR(actual, expected, 1e-3 * std::fabs(expected) + 1e-4);
}

void expect_findings(const std::string& name) {
  SCOPED_TRACE(name);
  const Result<Node> document = read_document(file_text(name + ".toml"));
  ASSERT_TRUE(document.ok()) << document.error().text();
  const CheckedReview checked = check_review(read_review(document.value()));
  for (const Problem& problem : checked.problems) ADD_FAILURE() << problem.text();
  const testing::Json expected = testing::read_json(file_text(name + ".expected.json"));
  ASSERT_EQ(expected.members.size(), checked.findings.size());
  for (const Finding& finding : checked.findings) {
    SCOPED_TRACE(finding.claim);
    const testing::Json& wanted = expected.at(finding.claim);
    EXPECT_EQ(contract_word(finding.state), wanted.at("state").text)
        << finding.headline << ' ' << finding.sentence;
    EXPECT_EQ(contract_word(finding.figure), wanted.at("figure").text);
    EXPECT_EQ(contract_word(finding.df_claimed), wanted.at("df_claimed").text);
    EXPECT_EQ(contract_word(finding.decision), wanted.at("decision").text);
    if (wanted.has("f")) {
      ASSERT_TRUE(finding.f.has_value());
      expect_limit(finding.f->low, limit(wanted.at("f").items.at(0)));
      expect_limit(finding.f->high, limit(wanted.at("f").items.at(1)));
    }
    if (wanted.has("route")) {
      bool binds = false;
      for (const Evidence& evidence : finding.evidence)
        binds = binds || (evidence.binds && contract_word(evidence.route) == wanted.at("route").text);
      EXPECT_TRUE(binds) << "no binding evidence by the route " << wanted.at("route").text;
    }
    if (finding.state == State::Undecided || finding.state == State::NotComputable) {
      EXPECT_FALSE(finding.ask.empty());
    }
  }
}

TEST(Demo, MountainHutsGiveTheExpectedFindings) { expect_findings("mountain-huts"); }

TEST(Demo, BeehivesGiveTheExpectedFindings) { expect_findings("beehives"); }

TEST(Demo, ShowsEveryState) {
  const testing::Json expected = testing::read_json(file_text("mountain-huts.expected.json"));
  for (const char* state : {"agrees", "conflicts", "undecided", "not computable"}) {
    int count = 0;
    for (const auto& [claim, finding] : expected.members) count += finding.at("state").text == state;
    EXPECT_GT(count, 0) << state;
  }
}

// No star, R² or adjusted R² of an invented paper may clash with its own figures.
TEST(Demo, PrintedFiguresFitTogether) {
  for (const char* name : {"mountain-huts.toml", "beehives.toml"}) {
    const Result<Node> document = read_document(file_text(name));
    ASSERT_TRUE(document.ok());
    for (const AuditLine& line : check_review(read_review(document.value())).audit)
      EXPECT_NE(line.match, Match::Conflicts) << name << ": " << line.where << ": " << line.says;
  }
}

TEST(Demo, AsksWhereTheFiguresConflict) {
  const Result<Node> document = read_document(file_text("mountain-huts.toml"));
  ASSERT_TRUE(document.ok());
  int conflicts = 0;
  for (const Finding& finding : check_review(read_review(document.value())).findings) {
    if (finding.state != State::Conflicts) continue;
    ++conflicts;
    ASSERT_FALSE(finding.paragraph.empty());
    EXPECT_EQ(finding.paragraph.back(), '?') << finding.paragraph;
  }
  EXPECT_EQ(conflicts, 3);
}

TEST(Demo, FilesSurviveReadingAndWriting) {
  for (const char* name : {"mountain-huts.toml", "beehives.toml"}) {
    const Result<Node> first = read_document(file_text(name));
    ASSERT_TRUE(first.ok());
    const Result<Node> again = read_document(write_document(first.value()));
    ASSERT_TRUE(again.ok());
    EXPECT_TRUE(first.value() == again.value()) << name;
  }
}

TEST(WorkedCase, IsTheDemoFile) { EXPECT_EQ(file_text("mountain-huts.toml"), worked_case()); }

}  // namespace
}  // namespace rejoinder
