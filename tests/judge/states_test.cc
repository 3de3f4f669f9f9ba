// One small review for each rule of states and parts.
#include <gtest/gtest.h>

#include <string>

#include "core/judge/finding.h"

namespace rejoinder::testing {
namespace {

CheckedReview check(const std::string& text) {
  const Result<Node> document = read_document("rejoinder = 1\n" + text);
  EXPECT_TRUE(document.ok()) << document.error().text();
  return check_review(read_review(document.value()));
}

Finding only(const std::string& text) {
  const CheckedReview checked = check(text);
  EXPECT_EQ(checked.findings.size(), 1u);
  return checked.findings.front();
}

// F(3, 205) between 2.91 and 3.11; the 5 % point is 2.65.
const std::string kTwoFits =
    "[[column]]\nid = \"s\"\nerrors = \"classical\"\nn = 212\nk = 3\nr2 = \"0.312\"\n"
    "[[column]]\nid = \"l\"\nerrors = \"classical\"\nn = 212\nk = 6\nr2 = \"0.341\"\n"
    "[[claim]]\nid = \"c\"\ncolumn = \"l\"\nrestricted = \"s\"\n";

TEST(States, AgreeWhereNothingSpeaksAgainst) {
  const Finding finding = only(kTwoFits + "f = \"3.00\"\np = \".03\"\ndf = [3, 205]\nrejects = true\n");
  EXPECT_EQ(finding.state, State::Agrees);
  EXPECT_EQ(finding.figure, FigurePart::WithinLimits);
  EXPECT_EQ(finding.df_claimed, DfPart::AsClaimed);
  EXPECT_EQ(finding.decision, DecisionPart::Rejects);
}

TEST(States, EachPartCanFailAlone) {
  const Finding figure = only(kTwoFits + "f = \"4.00\"\ndf = [3, 205]\nrejects = true\n");
  EXPECT_EQ(figure.state, State::Conflicts);
  EXPECT_EQ(figure.figure, FigurePart::OutsideLimits);
  EXPECT_EQ(figure.df_claimed, DfPart::AsClaimed);
  const Finding df = only(kTwoFits + "f = \"3.00\"\ndf = [3, 208]\nrejects = true\n");
  EXPECT_EQ(df.state, State::Conflicts);
  EXPECT_EQ(df.figure, FigurePart::WithinLimits);
  EXPECT_EQ(df.df_claimed, DfPart::Differs);
  const Finding decision = only(kTwoFits + "rejects = false\n");
  EXPECT_EQ(decision.state, State::Conflicts);
  EXPECT_EQ(decision.figure, FigurePart::NotClaimed);
  EXPECT_EQ(decision.decision, DecisionPart::Rejects);
  const Finding p = only(kTwoFits + "f = \"3.00\"\np = \".30\"\n");
  EXPECT_EQ(p.figure, FigurePart::OutsideLimits) << "F and p are judged together";
}

TEST(States, AreUndecidedWhereTheLimitsStraddleTheCriticalValue) {
  const Finding finding = only("[[column]]\nid = \"s\"\nerrors = \"classical\"\nn = 400\nk = 3\nr2 = \"0.30\"\n"
                               "[[column]]\nid = \"l\"\nerrors = \"classical\"\nn = 400\nk = 6\nr2 = \"0.31\"\n"
                               "[[claim]]\nid = \"c\"\ncolumn = \"l\"\nrestricted = \"s\"\nrejects = true\n");
  EXPECT_EQ(finding.state, State::Undecided);
  EXPECT_EQ(finding.decision, DecisionPart::Open);
  ASSERT_FALSE(finding.ask.empty());
  EXPECT_NE(finding.ask.front().figure.find("R²"), std::string::npos);
}

TEST(States, HaveNoTestAcrossSamplesOutcomesOrColumnsThatAreNotNested) {
  const std::string head = "[[column]]\nid = \"s\"\nerrors = \"classical\"\nk = 1\nr2 = \"0.30\"\n";
  const std::string tail = "[[claim]]\nid = \"c\"\ncolumn = \"l\"\nrestricted = \"s\"\n";
  const char* pairs[][2] = {
      {"n = 400\n", "[[column]]\nid = \"l\"\nerrors = \"classical\"\nn = 380\nk = 3\nr2 = \"0.40\"\n"},
      {"n = 400\noutcome = \"log y\"\n", "[[column]]\nid = \"l\"\nerrors = \"classical\"\nn = 400\nk = 3\nr2 = \"0.40\"\noutcome = \"y\"\n"},
      {"n = 400\n[[column.term]]\nname = \"x\"\n",
       "[[column]]\nid = \"l\"\nerrors = \"classical\"\nn = 400\nk = 2\nr2 = \"0.40\"\n[[column.term]]\nname = \"u\"\n[[column.term]]\nname = \"v\"\n"},
  };
  for (const auto& [first, second] : pairs) {
    const Finding finding = only(head + first + second + tail);
    EXPECT_EQ(finding.state, State::NotComputable) << second;
    EXPECT_EQ(finding.figure, FigurePart::NotComputable);
    EXPECT_FALSE(finding.ask.empty());
    EXPECT_FALSE(finding.f.has_value());
  }
}

TEST(States, HaveNoTestWithMoreRestrictionsThanClustersAllow) {
  const Finding finding = only("[[column]]\nid = \"a\"\nerrors = \"clustered\"\nclusters = 3\nn = 90\nk = 4\n"
                               "[[column.term]]\nname = \"u\"\ncoef = \"1.0\"\nse = \"0.2\"\n[[column.term]]\nname = \"v\"\ncoef = \"1.0\"\nse = \"0.2\"\n"
                               "[[column.term]]\nname = \"w\"\ncoef = \"1.0\"\nse = \"0.2\"\n"
                               "[[claim]]\nid = \"c\"\ncolumn = \"a\"\nrestrictions = \"u = v = w = 0\"\n");
  EXPECT_EQ(finding.state, State::NotComputable);
  EXPECT_FALSE(finding.ask.empty());
}

TEST(States, NeverUseTheFormulaOfRSquaredForRobustOrClusteredErrors) {
  for (const char* errors : {"robust", "clustered"}) {
    std::string text = kTwoFits + "f = \"9.99\"\n";
    for (std::size_t at; (at = text.find("classical")) != std::string::npos;) text.replace(at, 9, errors);
    const Finding finding = only(text);
    EXPECT_NE(finding.state, State::Conflicts) << errors;
    bool told = false;
    for (const std::string& caution : finding.cautions) told = told || caution.find("R²") != std::string::npos;
    EXPECT_TRUE(told) << errors;
  }
}

TEST(States, TakeAnotherConventionOfClusteredDfAsNoMismatch) {
  const Finding finding = only("[[column]]\nid = \"a\"\nerrors = \"clustered\"\nclusters = 14\nn = 476\nk = 4\n"
                               "[[column.term]]\nname = \"u\"\ncoef = \"0.059\"\nse = \"0.084\"\n[[column.term]]\nname = \"v\"\ncoef = \"0.173\"\nse = \"0.071\"\n"
                               "[[claim]]\nid = \"c\"\ncolumn = \"a\"\nrestrictions = \"u = 0, v = 0\"\nf = \"11.31\"\ndf = [2, 471]\np = \"<0.001\"\n");
  EXPECT_EQ(finding.df_claimed, DfPart::Differs);
  EXPECT_EQ(finding.state, State::Undecided);
}

TEST(States, TellContradictingFiguresAndNameThem) {
  const CheckedReview checked = check(
      "[[column]]\nid = \"s\"\nerrors = \"classical\"\nn = 100\nk = 3\nr2 = \"0.45\"\n"
      "[[column]]\nid = \"l\"\nerrors = \"classical\"\nn = 100\nk = 5\nr2 = \"0.41\"\n"
      "[[claim]]\nid = \"c\"\ncolumn = \"l\"\nrestricted = \"s\"\n");
  EXPECT_EQ(checked.findings[0].state, State::NotComputable);
  EXPECT_FALSE(checked.findings[0].f.has_value());
  ASSERT_FALSE(checked.audit.empty());
  EXPECT_EQ(checked.audit[0].match, Match::Conflicts);
  EXPECT_NE(checked.audit[0].says.find("0.45"), std::string::npos);
  EXPECT_NE(checked.audit[0].says.find("0.41"), std::string::npos);
}

TEST(States, CheckASentenceAgainstItself) {
  EXPECT_EQ(only("[[claim]]\nid = \"c\"\nf = \"4.21\"\ndf = [2, 410]\np = \".015\"\n").state, State::Agrees);
  EXPECT_EQ(only("[[claim]]\nid = \"c\"\nf = \"4.21\"\ndf = [2, 410]\np = \".15\"\n").state, State::Conflicts);
  const Finding chi = only("[[claim]]\nid = \"c\"\nchi2 = \"8.1\"\ndf = [3, \"inf\"]\np = \".044\"\n");
  EXPECT_EQ(chi.state, State::Agrees);
  EXPECT_EQ(chi.statistic, Statistic::ChiSquare);
  // With a statistic and df alone the finding gives the p that belongs to them.
  const Finding p = only("[[claim]]\nid = \"c\"\nf = 4.21\ndf = [2, 410]\n");
  ASSERT_TRUE(p.p);
  EXPECT_NEAR(p.p->low, p.p->high, 1e-12);
}

TEST(States, JudgeAChiSquareOnTheScaleOfW) {
  // W = 3 F lies between 8.7 and 9.4.
  EXPECT_EQ(only(kTwoFits + "chi2 = \"9.0\"\ndf = [3]\n").figure, FigurePart::WithinLimits);
  EXPECT_EQ(only(kTwoFits + "chi2 = \"3.0\"\ndf = [3]\n").figure, FigurePart::OutsideLimits);
}

TEST(States, LetNoClaimHideAnother) {
  const CheckedReview checked = check(kTwoFits + "[[claim]]\nid = \"bad\"\ncolumn = \"l\"\nrestrictions = \"a = = b\"\n[[claim]]\nid = \"none\"\ncolumn = \"zz\"\n");
  ASSERT_EQ(checked.findings.size(), 3u);
  EXPECT_EQ(checked.findings[0].state, State::Agrees);
  for (int i : {1, 2}) {
    EXPECT_EQ(checked.findings[static_cast<std::size_t>(i)].state, State::NotComputable);
    EXPECT_FALSE(checked.findings[static_cast<std::size_t>(i)].sentence.empty());
    EXPECT_FALSE(checked.findings[static_cast<std::size_t>(i)].ask.empty());
  }
}

TEST(States, CountRedundantRestrictionsOnce) {
  const Finding finding = only("[[column]]\nid = \"a\"\nerrors = \"classical\"\nn = 110\nk = 5\n"
                               "[[column.term]]\nname = \"u\"\ncoef = \"0.7\"\nse = \"0.1\"\n[[column.term]]\nname = \"v\"\ncoef = \"0.8\"\nse = \"0.1\"\n"
                               "[[column.term]]\nname = \"w\"\ncoef = \"1.5\"\nse = \"0.1\"\n"
                               "[[claim]]\nid = \"c\"\ncolumn = \"a\"\nrestrictions = \"u = v, v = w, u = w\"\ndf = [3, 104]\n");
  EXPECT_EQ(finding.q, 2);
  EXPECT_EQ(finding.df_claimed, DfPart::Differs);
}

}  // namespace
}  // namespace rejoinder::testing
