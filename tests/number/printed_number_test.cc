// The forms of the review format's page on printed numbers, one row each.
#include "core/number/printed_number.h"

#include <gtest/gtest.h>

#include <cmath>
#include <string>

namespace rejoinder {
namespace {

const Interval kProbability{0, 1};
const Interval kNotNegative{0, kInfinity};

NumberReading reading(char decimal, Rounding rounding = Rounding::Nearest,
                      Interval natural = Interval::everything()) {
  return {decimal, rounding, natural};
}

// The reader's ends lie within one double outside of the decimal ones written in the rows here.
void expect_range(const Interval& range, double low, double high) {
  EXPECT_LE(range.low, low);
  EXPECT_GE(range.low, std::nextafter(low, -kInfinity));
  EXPECT_GE(range.high, high);
  EXPECT_LE(range.high, std::nextafter(high, kInfinity));
}

struct Row {
  const char* text;
  double low, high;
  int places = 0;
  int stars = 0;
};

void expect_rows(std::initializer_list<Row> rows, const NumberReading& how) {
  for (const Row& row : rows) {
    SCOPED_TRACE(row.text);
    const Result<PrintedNumber> read = read_printed_number(row.text, how);
    ASSERT_TRUE(read.ok()) << read.error().text();
    expect_range(read.value().possible, row.low, row.high);
    EXPECT_EQ(read.value().text, row.text);
    EXPECT_EQ(read.value().decimal_places, row.places);
    EXPECT_EQ(read.value().stars, row.stars);
    EXPECT_EQ(read.value().relation, Relation::Equal);
    EXPECT_FALSE(read.value().exact);
  }
}

TEST(ReadPrintedNumber, KeepsTheLastPlacePrinted) {
  expect_rows({{"0.131", 0.1305, 0.1315, 3},
               {"0.50", 0.495, 0.505, 2},
               {"0.5", 0.45, 0.55, 1},
               {"12", 11.5, 12.5, 0},
               {"12.", 11.5, 12.5, 0},
               {".31", 0.305, 0.315, 2},
               {"+.31", 0.305, 0.315, 2},
               {"  0.31 ", 0.305, 0.315, 2}},
              {});
}

TEST(ReadPrintedNumber, TakesMinusSignsOfEveryKind) {
  for (const char* sign : {"-", "\u2212", "\u2013", "\u2010", "\u2011", "\u2014", "\uFF0D"})
    for (const char* gap : {"", " ", "\u00A0", "\u2009"}) {
      const std::string text = std::string(sign) + gap + ".040";
      expect_rows({{text.c_str(), -0.0405, -0.0395, 3}}, {});
    }
  expect_rows({{"\u2212 219.0", -219.05, -218.95, 1}}, {});
}

TEST(ReadPrintedNumber, DropsPairedBrackets) {
  expect_rows({{"(0.052)", 0.0515, 0.0525, 3},
               {"[0.052]", 0.0515, 0.0525, 3},
               {"{0.052}", 0.0515, 0.0525, 3},
               {"( \u22120.052 )", -0.0525, -0.0515, 3},
               {"[(0.052)]", 0.0515, 0.0525, 3}},
              {});
}

TEST(ReadPrintedNumber, CountsStarsAndDaggers) {
  expect_rows({{"0.052**", 0.0515, 0.0525, 3, 2},
               {"0.052 ***", 0.0515, 0.0525, 3, 3},
               {"0.052* *", 0.0515, 0.0525, 3, 2},
               {"(0.052)**", 0.0515, 0.0525, 3, 2},
               {"(0.052**)", 0.0515, 0.0525, 3, 2},
               {"0.052\u2217\u2217", 0.0515, 0.0525, 3, 2},
               {"0.052\u2020", 0.0515, 0.0525, 3, 1},
               {"0.052\u2021", 0.0515, 0.0525, 3, 2},
               {"\u22120.052\uFF0A", -0.0525, -0.0515, 3, 1}},
              {});
}

TEST(ReadPrintedNumber, TakesThousandsMarksInGroupsOfThree) {
  expect_rows({{"1,204.5", 1204.45, 1204.55, 1},
               {"1 204.5", 1204.45, 1204.55, 1},
               {"1\u00A0204.5", 1204.45, 1204.55, 1},
               {"1\u2009204.5", 1204.45, 1204.55, 1},
               {"1\u202F204.5", 1204.45, 1204.55, 1},
               {"1'204.5", 1204.45, 1204.55, 1},
               {"1\u2019204.5", 1204.45, 1204.55, 1},
               {"-12,345,678", -12345678.5, -12345677.5, 0},
               {"1,284", 1283.5, 1284.5, 0}},
              {});
}

TEST(ReadPrintedNumber, TakesDecimalCommasWhereTheReviewSaysSo) {
  expect_rows({{"1.204,5", 1204.45, 1204.55, 1},
               {"1 204,5", 1204.45, 1204.55, 1},
               {"0,131", 0.1305, 0.1315, 3},
               {",31*", 0.305, 0.315, 2, 1},
               {"1,2e-3", 0.00115, 0.00125, 4},
               {"1.284", 1283.5, 1284.5, 0}},
              reading(','));
}

TEST(ReadPrintedNumber, TakesRaisedDecimalPoints) {
  expect_rows({{"0\u00B7052", 0.0515, 0.0525, 3}, {"1\u00B7105", 1.1045, 1.1055, 3}}, {});
}

TEST(ReadPrintedNumber, TakesExponentsOfEverySpelling) {
  for (const char* text : {"1.2e-3", "1.2E-03", "1.2e\u22123", "1.2\u00D710^-3", "1.2x10^-3", "1.2 x 10-3",
                           "1.2\u00B710\u22123", "1.2 \u00D7 10^\u22123", "1.2\u00D710\u207B\u00B3",
                           "1.2*10^-3", "1.2\u00D710^{-3}", "[1.2\u00D710^{-3}]"})
    expect_rows({{text, 0.00115, 0.00125, 4}}, {});
  expect_rows({{"1.2e3", 1150, 1250, -2},
               {"1.2\u00D710\u00B3", 1150, 1250, -2},
               {"-4e+2", -450, -350, -2},
               {"10\u207B\u2075", 0.5e-5, 1.5e-5, 5},
               {"1.2\u00D710^-3**", 0.00115, 0.00125, 4, 2}},
              {});
}

TEST(ReadPrintedNumber, KnowsTheSidesOfZero) {
  expect_rows({{"0.000", -0.0005, 0.0005, 3}, {"-0.000", -0.0005, 0, 3}, {"\u2212.00", -0.005, 0, 2}}, {});
  expect_rows({{"0.000", 0, 0.0005, 3}}, reading('.', Rounding::Nearest, kNotNegative));
  expect_rows({{"0.00", -0.01, 0.01, 2}, {"-0.00", -0.01, 0, 2}}, reading('.', Rounding::Truncated));
  expect_rows({{"0.00", -0.01, 0.01, 2}, {"-0.00", -0.01, 0, 2}}, reading('.', Rounding::Unknown));
  expect_rows({{"0.00", 0, 0.01, 2}}, reading('.', Rounding::Truncated, kNotNegative));
}

TEST(ReadPrintedNumber, FollowsTheTablesRounding) {
  expect_rows({{"1.25", 1.25, 1.26, 2}, {"-1.25", -1.26, -1.25, 2}}, reading('.', Rounding::Truncated));
  expect_rows({{"1.25", 1.245, 1.26, 2}, {"-1.25", -1.26, -1.245, 2}}, reading('.', Rounding::Unknown));
}

TEST(ReadPrintedNumber, StaysWithinTheNaturalRange) {
  const NumberReading how = reading('.', Rounding::Nearest, kProbability);
  expect_rows({{"1.00", 0.995, 1, 2}, {"0.00", 0, 0.005, 2}, {"0.4", 0.35, 0.45, 1}}, how);
}

TEST(ReadPrintedNumber, TakesOneSidedFigures) {
  const struct {
    const char* text;
    Relation relation;
    double low, high, value;
  } rows[] = {{"<0.001", Relation::Below, 0, 0.001, 0.001},
              {"< .001", Relation::Below, 0, 0.001, 0.001},
              {"\u2264 .001", Relation::Below, 0, 0.001, 0.001},
              {"<= .001", Relation::Below, 0, 0.001, 0.001},
              {"p < .05", Relation::Below, 0, 0.05, 0.05},
              {"P<.05", Relation::Below, 0, 0.05, 0.05},
              {"p-value < .05", Relation::Below, 0, 0.05, 0.05},
              {"(p < .05)", Relation::Below, 0, 0.05, 0.05},
              {"<.001***", Relation::Below, 0, 0.001, 0.001},
              {"p < 10\u207B\u2075", Relation::Below, 0, 1e-5, 1e-5},
              {">0.10", Relation::Above, 0.1, 1, 0.1},
              {"\u2265 .1", Relation::Above, 0.1, 1, 0.1},
              {">= .1", Relation::Above, 0.1, 1, 0.1},
              {"n.s.", Relation::Above, 0, 1, 0},
              {"n.s", Relation::Above, 0, 1, 0},
              {"ns", Relation::Above, 0, 1, 0},
              {"NS", Relation::Above, 0, 1, 0},
              {"p = n.s.", Relation::Above, 0, 1, 0},
              {"p = .03", Relation::Equal, 0.025, 0.035, 0.03}};
  for (const auto& row : rows) {
    SCOPED_TRACE(row.text);
    const auto read = read_printed_number(row.text, reading('.', Rounding::Nearest, kProbability));
    ASSERT_TRUE(read.ok()) << read.error().text();
    EXPECT_EQ(read.value().relation, row.relation);
    expect_range(read.value().possible, row.low, row.high);
    EXPECT_EQ(read.value().value, row.value);
  }
  EXPECT_EQ(read_printed_number("<-0.5").value().possible.low, -kInfinity);
  EXPECT_EQ(read_printed_number(">2").value().possible, (Interval{2, kInfinity}));
}

// Where nothing can be read, the text is quoted and something helpful is said.
TEST(ReadPrintedNumber, SaysWhatItCannotRead) {
  const struct {
    const char* text;
    char decimal;
    const char* part;
  } rows[] = {{"", '.', "no number"},
              {"**", '.', "no number"},
              {"\u2013", '.', "dash"},
              {"(0.052", '.', "brackets"},
              {"0.052)", '.', "brackets"},
              {"(0.052]", '.', "brackets"},
              {"0.5O", '.', "write 0 for O"},
              {"12 %", '.', "\"0.12\""},
              {"2.5%", '.', "\"0.025\""},
              {"-7,5 %", ',', "\"-0,075\""},
              {"1,28", '.', "decimal = \",\""},
              {"0,123", '.', "decimal = \",\""},
              {"1.28", ',', "decimal = \".\""},
              {"1,2,3", '.', "decimal = \",\""},
              {"1.204,5", '.', "decimal = \",\""},
              {"1 28", '.', "gaps"},
              {"1,284 000", '.', "thousands mark"},
              {"1.2.3", '.', "cannot be read"},
              {"1.2x", '.', "cannot be read"},
              {"1.2e", '.', "cannot be read"},
              {"1.2\u00D710", '.', "cannot be read"},
              {"<n.s.", '.', "cannot be read"},
              {"p", '.', "cannot be read"},
              {".", '.', "cannot be read"},
              {"nan", '.', "cannot be read"},
              {"0.5\xC3", '.', "cannot be read"},
              {"1e400", '.', "larger"},
              {"1e99999", '.', "cannot be read"},
              {"1e-400", '.', "closer to zero"},
              {"12345678901234567890123456789012345678901", '.', "40 digits"}};
  for (const auto& row : rows) {
    SCOPED_TRACE(row.text);
    const auto read = read_printed_number(row.text, reading(row.decimal));
    ASSERT_FALSE(read.ok());
    const std::string said = read.error().text();
    EXPECT_TRUE(read.error().where.empty());
    EXPECT_FALSE(read.error().mend.empty());
    EXPECT_NE(said.find(row.part), std::string::npos) << said;
    EXPECT_NE(said.find('"' + std::string(row.text) + '"'), std::string::npos) << said;
    for (const char* unsaid : {"error", "wrong", "failed", "invalid", "correct", "mistake", "illegal"})
      EXPECT_EQ(said.find(unsaid), std::string::npos) << said;
  }
}

TEST(ReadPrintedNumber, RefusesValuesOutsideTheNaturalRange) {
  const NumberReading how = reading('.', Rounding::Nearest, kProbability);
  for (const char* text : {"1.31", "-0.2", ">1.2", "<-0.1"}) {
    SCOPED_TRACE(text);
    const auto read = read_printed_number(text, how);
    ASSERT_FALSE(read.ok());
    EXPECT_NE(read.error().what.find("0 to 1"), std::string::npos);
  }
  EXPECT_FALSE(read_printed_number("-0.2", reading('.', Rounding::Nearest, kNotNegative)).ok());
  EXPECT_TRUE(read_printed_number("-0.0", reading('.', Rounding::Nearest, kNotNegative)).ok());
}

}  // namespace
}  // namespace rejoinder
