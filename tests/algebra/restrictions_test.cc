#include "core/algebra/restrictions.h"

#include <gtest/gtest.h>

#include <random>

#include "core/algebra/elimination.h"

namespace rejoinder {
namespace {

Restrictions read(const char* text, const std::vector<std::string>& slopes = {}) {
  Result<Restrictions> result = read_restrictions(text, slopes);
  EXPECT_TRUE(result.ok()) << text << "\n" << (result.ok() ? "" : result.error().text());
  return result.ok() ? std::move(result).value() : Restrictions{};
}

std::string joined(const std::vector<std::string>& parts) {
  std::string all;
  for (const std::string& part : parts) all += (all.empty() ? "" : "; ") + part;
  return all;
}

// Derived: each row worked by hand from the arithmetic written.
TEST(Restrictions, ReadsPlainArithmetic) {
  const struct {
    const char* text;
    const char* wording;
  } rows[] = {
      {"fare = 0", "fare = 0"},
      {"fare = 0, \"fuel price\" = 0", "fare = 0; \"fuel price\" = 0"},
      {"fare = 0; fuel = 0;", "fare = 0; fuel = 0"},
      {"a = b", "a - b = 0"},
      {"a = b = c", "a - b = 0; b - c = 0"},
      {"a = b = 0", "a = 0; b = 0"},
      {"0 = a", "a = 0"},
      {"a + 2*b - c = 1", "a + 2*b - c = 1"},
      {"0.5 a = b", "0.5*a - b = 0"},
      {"a - 1/2 b = 0.25", "a - 0.5*b = 0.25"},
      {"2(a - b) = 1", "2*a - 2*b = 1"},
      {"2*(a - (b - c)) = 1", "2*a - 2*b + 2*c = 1"},
      {"(a + b)/4 = c", "0.25*a + 0.25*b - c = 0"},
      {"a + 1 = b - 2", "a - b = -3"},
      {"-a = --b", "-a - b = 0"},
      {"a = -1.5e-3", "a = -0.0015"},
      {"1e2 a = 1E+1", "100*a = 10"},
      {"2e = 1", "2*e = 1"},
      {".5a=b", "0.5*a - b = 0"},
      {"5. = a", "a = 5"},
      {"2^3 a = 1", "8*a = 1"},
      {"a^1 = 2^-1", "a = 0.5"},
      {"a \xE2\x88\x92 b = 0", "a - b = 0"},                              // U+2212
      {"2 \xC3\x97 a \xE2\x80\x93 b \xC3\xB7 2 = 0", "2*a - 0.5*b = 0"},  // times, en dash, division sign
      {"a\xC2\xA0=\xC2\xA0"
       "0",
       "a = 0"},  // no-break spaces
      {"\xE2\x80\x9C"
       "fuel price\xE2\x80\x9D = 0",
       "\"fuel price\" = 0"},  // curly quotes
      {"r\xC3\xA9"
       "coupe = 0, \xCE\xB2\xE2\x82\x81 = 0",
       "r\xC3\xA9"
       "coupe = 0; \xCE\xB2\xE2\x82\x81 = 0"},
      {"men.fare = women.fare", "men.fare - women.fare = 0"},
      {"\"rural men\".\"fare price\" = urban.fare", "\"rural men\".\"fare price\" - urban.fare = 0"},
      {"\"(1)\".x = \"(2)\".x", "\"(1)\".x - \"(2)\".x = 0"},
      {"\"a \\\"b\\\" \\\\ c\" = 0", "\"a \\\"b\\\" \\\\ c\" = 0"},
      {"\"all\" = 1", "\"all\" = 1"},
      {"\"fare\" = fare2", "fare - fare2 = 0"},
      {"a - a + b = 0", "b = 0"},
      {"0.1 a + 0.2 a - 0.3 a + b = 0", "b = 0"},
      {"a =\n0,\n b = 0", "a = 0; b = 0"},
  };
  for (const auto& row : rows) {
    SCOPED_TRACE(row.text);
    EXPECT_EQ(joined(read(row.text).wording), row.wording);
  }
}

TEST(Restrictions, GivesRowsOverTheTermsNamed) {
  const Restrictions r = read("a + 2*b - c = 1, c = b");
  ASSERT_EQ(r.p(), 3);
  ASSERT_EQ(r.q(), 2);
  EXPECT_EQ(r.terms[1], (TermName{"", "b"}));
  EXPECT_EQ(r.rows, (Eigen::MatrixXd(2, 3) << 1, 2, -1, 0, -1, 1).finished());
  EXPECT_EQ(r.values, Eigen::Vector2d(1, 0));
  EXPECT_EQ(r.listed, 2);
  EXPECT_FALSE(r.exclusion());
  EXPECT_TRUE(read("a = 0, 2*b = 1").exclusion());
  EXPECT_FALSE(read("a = b").exclusion());
}

TEST(Restrictions, AllStandsForEverySlope) {
  for (const char* text : {"all", "all = 0", "0 = all", " all ;"}) {
    SCOPED_TRACE(text);
    EXPECT_EQ(joined(read(text, {"fare", "fuel price"}).wording), "fare = 0; \"fuel price\" = 0");
  }
  EXPECT_EQ(read_restrictions("all").error().text(),
            "character 1: \"all\" stands for every slope, and this column lists none; list the column's "
            "terms, or name "
            "those that are tested");
  EXPECT_EQ(read_restrictions("all = 1", {"a"}).error().text(),
            "character 7: \"all\" stands for every slope being zero; name the terms to put them equal to "
            "anything else; a "
            "term named all stands in double quotes");
  EXPECT_EQ(read_restrictions("a = 0, 2 all = 1", {"a"}).error().where, "character 10");
}

TEST(Restrictions, DropsWhatTheOthersImply) {
  const struct {
    const char* text;
    int q, listed;
    const char* dropped;
  } rows[] = {
      {"a = b, b = c, a = c", 2, 3, "a - c = 0"},
      {"a = 0, b = 0, a + b = 0", 2, 3, "a + b = 0"},
      {"a = b, 2*b = 2*a", 1, 2, "-2*a + 2*b = 0"},
      {"a + b = 1, 0.1*a + 0.1*b = 0.1", 1, 2, "0.1*a + 0.1*b = 0.1"},
      {"0 = 0, a = 1", 1, 2, "0 = 0"},
      {"a = 0, a = 0", 1, 2, "a = 0"},
      {"1e9*a = b, a = 1e-9*b", 1, 2, "a - 1e-09*b = 0"},
      {"1/3 a + 1/7 b = c, 7 a + 3 b = 21 c", 1, 2, "7*a + 3*b - 21*c = 0"},
  };
  for (const auto& row : rows) {
    SCOPED_TRACE(row.text);
    const Restrictions r = read(row.text);
    EXPECT_EQ(r.q(), row.q);
    EXPECT_EQ(r.listed, row.listed);
    EXPECT_EQ(joined(r.dropped), row.dropped);
  }
}

TEST(Restrictions, NamesThoseThatClash) {
  const struct {
    const char* text;
    const char* message;
  } rows[] = {
      {"a = 0, b = 2, a = 1",
       "character 15: no values satisfy both a = 0 and a = 1; take one of them away or change it"},
      {"a = b, c = 0, b = d, a = d + 1",
       "character 22: no values satisfy all of a - b = 0, b - d = 0 and a - d = 1; take one of them away or "
       "change it"},
      {"a = 0, 1 = 2", "character 12: no values satisfy 1 = 2; take this restriction away or change it"},
      {"a = 0 = 1", "character 9: no values satisfy 0 = 1; take this restriction away or change it"},
  };
  for (const auto& row : rows) {
    SCOPED_TRACE(row.text);
    const Result<Restrictions> r = read_restrictions(row.text);
    ASSERT_FALSE(r.ok());
    EXPECT_EQ(r.error().text(), row.message);
  }
}

TEST(Restrictions, SaysWhatCannotBeReadAndHowToMendIt) {
  const struct {
    const char* text;
    const char* message;
  } rows[] = {
      {"", "character 1: no restriction is stated; write one: fare = 0"},
      {" ,; ", "character 1: no restriction is stated; write one: fare = 0"},
      {"fuel price = 0",
       "character 1: several words stand side by side: fuel price; names with blanks stand in double quotes: "
       "\"fuel price\""},
      {"a = 0, log fuel price 2 = 0",
       "character 8: several words stand side by side: log fuel price 2; names with blanks stand in double "
       "quotes: "
       "\"log fuel price 2\""},
      {"fare", "character 5: there is no sign of equality in fare; say what it equals: fare = 0"},
      {"0,5 a = b", "character 2: there is no sign of equality in 0; numbers take a point: 0.5"},
      {"a = ",
       "character 5: the restriction ends where a name or a number should follow; complete it: fare = 0"},
      {"a = 0, = b",
       "character 8: a name or a number is missing before =; complete the restriction: fare = 0"},
      {"a == b", "character 4: two signs of equality stand side by side; write one: a = b"},
      {"a < b",
       "character 3: < states no equality; write the values at which the claim holds as an equality: fare = "
       "0"},
      {"\xC3\xA9\xC3\xA9 \xE2\x89\xA0 0",
       "character 4: \xE2\x89\xA0 states no equality; write the values at which the claim holds as an "
       "equality: fare = 0"},
      {"(a + b = 0", "character 1: the bracket that opens here is not closed; add ) where it ends"},
      {"a + b) = 0", "character 6: a closing bracket without an opening one before it; take it away"},
      {"\"fuel = 0",
       "character 1: the name that begins here has no closing quote; add \" where the name ends"},
      {"\"\" = 0", "character 1: a name with nothing in it; put the term's name between the quotes"},
      {"\"  \" = 0", "character 1: a name with nothing in it; put the term's name between the quotes"},
      {"a\x01 = 0",
       "character 2: a control character, which cannot be seen; take it away, or type the restriction anew"},
      {"a = 0 b = 0",
       "character 7: two restrictions follow each other without a sign between them; write a comma between "
       "restrictions: "
       "a = 0, b = 0"},
      {"a = 1\nb = 1",
       "character 7: two restrictions follow each other without a sign between them; write a comma between "
       "restrictions: "
       "a = 0, b = 0"},
      {"a = b and c = 0",
       "character 7: the word and is read as a name; write a comma between restrictions: a = 0, b = 0"},
      {"a * b = 0",
       "character 3: terms are multiplied or divided by terms here, so the restriction is not linear; a "
       "ratio a / b = 2 can "
       "often be written a = 2*b"},
      {"a / b = 2",
       "character 3: terms are multiplied or divided by terms here, so the restriction is not linear; a "
       "ratio a / b = 2 can "
       "often be written a = 2*b"},
      {"a^2 = 1",
       "character 2: terms are multiplied or divided by terms here, so the restriction is not linear; a "
       "ratio a / b = 2 can "
       "often be written a = 2*b"},
      {"a / (1 - 1) = 2", "character 3: a division by zero; divide by another number"},
      {"1e999 a = 0", "character 1: a number too large to compute with; numbers reach to about 1.8e308"},
      {"1e308*10 a = 0",
       "character 6: the numbers here grow too large to compute with; write the restriction with smaller "
       "ones"},
      {"1.fare = 2.fare",
       "character 1: a name that is a number stands before a point; put the column's name in double quotes: "
       "\"1\".fare"},
      {"a.b.c = 0",
       "character 4: a name takes one point, between column and term; put a name that holds a point in "
       "double quotes"},
      {"a.5 = 0",
       "character 3: no term follows the point; write column.term, each in double quotes where it is not one "
       "word"},
      {"f(a) = 0",
       "character 2: no sign stands between f and (; write + - * / or = between them, or a comma between "
       "restrictions"},
      {"a & b = 0",
       "character 3: & has no meaning here; names with signs stand in double quotes: \"fuel price (log)\""},
      {"'a' = 0", "character 1: single quotes enclose no name; use double quotes: \"fuel price\""},
      {"a - a = 0",
       "character 1: the restriction says nothing about any term: a - a = 0; name the terms that are tested: "
       "fare = 0"},
      {"a^b = 0", "character 3: a power that is no plain number; write the exponent as a number: a^2"},
  };
  for (const auto& row : rows) {
    SCOPED_TRACE(row.text);
    const Result<Restrictions> r = read_restrictions(row.text);
    ASSERT_FALSE(r.ok());
    EXPECT_EQ(r.error().text(), row.message);
  }
}

TEST(Restrictions, RefusesWhatIsTooDeepOrTooMuch) {
  const std::string fits = std::string(64, '(') + "a" + std::string(64, ')') + " = 0";
  EXPECT_TRUE(read_restrictions(fits).ok());
  EXPECT_FALSE(read_restrictions(std::string(65, '(') + "a" + std::string(65, ')') + " = 0").ok());
  EXPECT_FALSE(read_restrictions(std::string(100000, '(')).ok());
  EXPECT_TRUE(read_restrictions(std::string(99999, '-') + "a = 0").ok());
  EXPECT_FALSE(read_restrictions(std::string(300000, '-') + "a = 0").ok());
  std::string many;
  for (int i = 0; i < 200; ++i) many += (i > 0 ? ", x" : "x") + std::to_string(i) + " = 0";
  EXPECT_EQ(read(many.c_str()).q(), 200);
  EXPECT_FALSE(read_restrictions(many + ", x0 = x1").ok());
  EXPECT_FALSE(read_restrictions(many + ", x200 = 0").ok());
}

// Checked: whatever bytes come, the answer is restrictions of full row rank or a message with a place.
TEST(Restrictions, SurviveAnyText) {
  std::mt19937 random(20240611);
  const std::string pieces[] = {"a",    "b",    "\"c d\"", "all", "=",
                                "=",    ",",    ";",       "+",   "-",
                                "*",    "/",    "(",       ")",   ".",
                                "0.5",  "1e5",  "^",       "2",   " ",
                                "\xFF", "\xC3", "\"",      "\\",  "\xE2\x88\x92",
                                "\n"};
  int accepted = 0;
  for (int round = 0; round < 20000; ++round) {
    std::string text;
    const int length = 1 + static_cast<int>(random() % 14);
    for (int i = 0; i < length; ++i) text += pieces[random() % std::size(pieces)];
    const Result<Restrictions> r = read_restrictions(text, {"a", "b"});
    if (r.ok()) {
      ++accepted;
      ASSERT_GE(r.value().q(), 1) << text;
      ASSERT_LE(r.value().q(), r.value().p()) << text;
      // Written out, the restrictions read back as themselves.
      const Result<Restrictions> again = read_restrictions(joined(r.value().wording));
      ASSERT_TRUE(again.ok()) << text;
      ASSERT_EQ(again.value().q(), r.value().q()) << text;
    } else {
      ASSERT_EQ(r.error().where.substr(0, 10), "character ") << text;
      ASSERT_FALSE(r.error().what.empty()) << text;
    }
  }
  EXPECT_GT(accepted, 50);
}

// Second route: the singular values of the same matrix give the same rank.
TEST(Elimination, KeepsAsManyRowsAsTheRank) {
  std::mt19937 random(7);
  for (int round = 0; round < 200; ++round) {
    const int p = 1 + random() % 8, rank = 1 + random() % p, m = rank + random() % 6;
    Eigen::MatrixXd left(m, rank), right(rank, p);
    for (auto* matrix : {&left, &right})
      for (Eigen::Index i = 0; i < matrix->size(); ++i)
        matrix->data()[i] = static_cast<double>(random() % 7) - 3;
    const Eigen::MatrixXd rows = left * right;
    const Eigen::VectorXd b = Eigen::VectorXd::LinSpaced(p, -1, 2);
    const Elimination e = eliminate(rows, rows * b);
    Eigen::JacobiSVD<Eigen::MatrixXd> svd(rows);
    svd.setThreshold(1e-9);
    EXPECT_FALSE(e.clash);
    EXPECT_EQ(static_cast<int>(e.kept.size()), svd.rank());
    EXPECT_EQ(static_cast<int>(e.kept.size() + e.implied.size()), m);
  }
}

TEST(Combination, ReadsWeightsAndConstant) {
  const Result<Combination> c = read_combination("fare - 2 \"fuel price\" + 1 + 0*wind");
  ASSERT_TRUE(c.ok());
  ASSERT_EQ(c.value().terms.size(), 2u);
  EXPECT_EQ(c.value().terms[1].text(), "\"fuel price\"");
  EXPECT_EQ(c.value().weights, Eigen::Vector2d(1, -2));
  EXPECT_EQ(c.value().constant, 1);
  EXPECT_EQ(
      read_combination("a - b = 0").error().text(),
      "character 7: a combination of terms has no sign of equality; write the terms alone: fare - fuel");
  for (const char* text : {"", "1", "all", "a, b", "a b", "a*b", "a - a"})
    EXPECT_FALSE(read_combination(text).ok()) << text;
}

TEST(TermName, IsQuotedOnlyWhereItMustBe) {
  EXPECT_EQ((TermName{"", "fare_2"}).text(), "fare_2");
  EXPECT_EQ((TermName{"", "all"}).text(), "\"all\"");
  EXPECT_EQ((TermName{"", "2fare"}).text(), "\"2fare\"");
  EXPECT_EQ((TermName{"rural men", "fare"}).text(), "\"rural men\".fare");
  EXPECT_LT((TermName{"a", "z"}), (TermName{"b", "a"}));
}

}  // namespace
}  // namespace rejoinder
