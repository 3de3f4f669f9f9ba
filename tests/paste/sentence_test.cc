#include "core/paste/sentence.h"

#include <gtest/gtest.h>

namespace rejoinder {
namespace {

TEST(ClaimSentence, ReadsTheFormsInWhichTestsArePrinted) {
  const struct {
    const char *text, *f, *chi2, *df1, *df2, *p;
  } rows[] = {
      {"Prices matter jointly (F(2, 410) = 4.21, p = .015).", "4.21", "", "2", "410", ".015"},
      {"F (2,410)=4.21", "4.21", "", "2", "410", ""},
      {"F[3, 1,276] = 4.98, p<0.001", "4.98", "", "3", "1276", "<0.001"},
      {"F2,410 = 4.21, P = 0.015", "4.21", "", "2", "410", "0.015"},
      {"no improvement, F change (3, 160) = 2.35, p = 0.074.", "2.35", "", "3", "160", "0.074"},
      {"the F statistic is 21.7", "21.7", "", "", "", ""},
      {"(LR test, chi-square(4) = 6.5, p = 0.165)", "", "6.5", "4", "", "0.165"},
      {"\xCF\x87\xC2\xB2(3) = 8.1, p < .05", "", "8.1", "3", "", "<.05"},
      {"chi2(3, N = 64) = 8.1", "", "8.1", "3", "", ""},
      {"A joint test gives p > 0.10", "", "", "", "", ">0.10"},
      {"F(3, inf) = 2.9", "2.9", "", "3", "inf", ""},
  };
  for (const auto& row : rows) {
    SCOPED_TRACE(row.text);
    const auto claim = read_claim_sentence(row.text);
    ASSERT_TRUE(claim.has_value());
    EXPECT_EQ(claim->says, row.text);
    EXPECT_EQ(claim->f, row.f);
    EXPECT_EQ(claim->chi2, row.chi2);
    EXPECT_EQ(claim->df1, row.df1);
    EXPECT_EQ(claim->df2, row.df2);
    EXPECT_EQ(claim->p, row.p);
  }
}

TEST(ClaimSentence, ReadsThePageAndTheDecision) {
  const auto claim = read_claim_sentence(
      "The three variables are jointly insignificant (F(3, 144) = 0.78, p = 0.506; p. 14).");
  ASSERT_TRUE(claim.has_value());
  EXPECT_EQ(claim->page, "p. 14");
  EXPECT_EQ(claim->p, "0.506");
  EXPECT_EQ(claim->rejects, std::optional<bool>(false));
}

TEST(ClaimSentence, TakesTheDecisionFromTheWordsOnlyWhereTheyTell) {
  const struct {
    const char* text;
    std::optional<bool> rejects;
  } rows[] = {
      {"jointly significant (F(4, 1,276) = 4.98)", true},
      {"do not significantly improve the model, F(3, 160) = 2.35", false},
      {"Constant returns are not rejected (F(1, 61) = 1.01)", false},
      {"Equality is rejected, F(1, 61) = 8.0", true},
      {"All coefficients differ (F(3, 114) = 2.83)", std::nullopt},
  };
  for (const auto& row : rows) {
    SCOPED_TRACE(row.text);
    const auto claim = read_claim_sentence(row.text);
    ASSERT_TRUE(claim.has_value());
    EXPECT_EQ(claim->rejects, row.rejects);
  }
}

TEST(ClaimSentence, IsNotSeenWhereNoTestIsStated) {
  for (const char* text :
       {"", "   \n", "Fares rose by 4 per cent.", "Table 3, F and t values", "0.131 (0.052)", "If F = then"})
    EXPECT_FALSE(read_claim_sentence(text).has_value()) << text;
}

TEST(ClaimSentence, BecomesAClaimOfTheReview) {
  const auto sentence = read_claim_sentence("Prices matter\njointly (F(2, 410) = 4.21, p = .015).");
  ASSERT_TRUE(sentence.has_value());
  const Node claim = claim_from_sentence(*sentence);
  EXPECT_EQ(claim.find("says")->text, "Prices matter jointly (F(2, 410) = 4.21, p = .015).");
  EXPECT_EQ(claim.find("f")->text, "4.21");
  EXPECT_EQ(claim.find("f")->kind, Node::Kind::Text);
  ASSERT_EQ(claim.find("df")->items.size(), 2u);
  EXPECT_EQ(claim.find("df")->items[1].text, "410");
  EXPECT_EQ(claim.find("p")->text, ".015");
  EXPECT_EQ(claim.find("restrictions"), nullptr);
}

TEST(ClaimSentence, HoldsOutAgainstAnyBytes) {
  std::string text = "F(";
  for (int i = 0; i < 256; ++i) text += static_cast<char>(i);
  text += " F(2, 10) = 3.1";
  const auto claim = read_claim_sentence(text);
  ASSERT_TRUE(claim.has_value());
  EXPECT_EQ(claim->f, "3.1");
}

}  // namespace
}  // namespace rejoinder
