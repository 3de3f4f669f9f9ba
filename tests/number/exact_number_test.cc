// Numbers without rounding, and counts.
#include <gtest/gtest.h>

#include <cmath>
#include <string>

#include "core/number/printed_number.h"

namespace rejoinder {
namespace {

NumberReading comma() { return {',', Rounding::Nearest, Interval::everything()}; }

TEST(ReadExactNumber, TakesSpellingsOfUnquotedNumbers) {
  const struct {
    const char* text;
    double value;
    int places;
  } rows[] = {{"0.05", 0.05, 2}, {"1_000", 1000, 0}, {"1_000.25", 1000.25, 2},
              {"+1", 1, 0},      {"-0.5", -0.5, 1},  {"1e-3", 0.001, 3},
              {"5E+2", 500, -2}, {"6.5e1", 65, 0},   {"1e0_3", 1000, -3},
              {"0", 0, 0},       {"-0.0", 0, 1}};
  for (const auto& row : rows) {
    SCOPED_TRACE(row.text);
    const auto read = read_exact_number(row.text);
    ASSERT_TRUE(read.ok()) << read.error().text();
    EXPECT_TRUE(read.value().exact);
    EXPECT_EQ(read.value().value, row.value);
    EXPECT_EQ(read.value().decimal_places, row.places);
    EXPECT_EQ(read.value().text, row.text);
    EXPECT_TRUE(read.value().possible.contains(row.value));
    EXPECT_LE(read.value().possible.high, std::nextafter(read.value().possible.low, kInfinity));
  }
  EXPECT_TRUE(read_exact_number("0.5").value().possible.is_point());
  EXPECT_FALSE(read_exact_number("0.05").value().possible.is_point());  // no double is 0.05
}

// An unquoted number has a point whatever the review's decimal mark; a quoted one may follow the review.
TEST(ReadExactNumber, TakesPointsAndTheReviewsDecimalMark) {
  EXPECT_EQ(read_exact_number("0.05", comma()).value().value, 0.05);
  EXPECT_EQ(read_exact_number("0,05", comma()).value().value, 0.05);
  EXPECT_EQ(read_exact_number(".05").value().value, 0.05);
  EXPECT_EQ(read_exact_number("\u22120.9").value().value, -0.9);
  EXPECT_FALSE(read_exact_number("0,05").ok());
}

TEST(ReadExactNumber, TakesInfinityButNoNaN) {
  EXPECT_EQ(read_exact_number("inf").value().possible, Interval::point(kInfinity));
  EXPECT_EQ(read_exact_number("+inf").value().value, kInfinity);
  EXPECT_EQ(read_exact_number("-inf").value().value, -kInfinity);
  for (const char* text : {"nan", "-nan", "+nan"}) EXPECT_FALSE(read_exact_number(text).ok()) << text;
}

TEST(ReadExactNumber, RefusesWhatIsNotOneNumber) {
  for (const char* text : {"<0.05", ">.1", "0.05*", "n.s.", "", "1__000", "_1", "1_", "0x1F", "1.5.2"}) {
    SCOPED_TRACE(text);
    const auto read = read_exact_number(text);
    ASSERT_FALSE(read.ok());
    EXPECT_NE(read.error().what.find('"' + std::string(text) + '"'), std::string::npos);
  }
  NumberReading level;
  level.natural = {0, 1};
  EXPECT_FALSE(read_exact_number("1.5", level).ok());
  EXPECT_FALSE(read_exact_number("inf", level).ok());
}

TEST(ReadCount, TakesWholeNumbers) {
  EXPECT_EQ(read_count("418").value(), 418);
  EXPECT_EQ(read_count("1,284").value(), 1284);
  EXPECT_EQ(read_count("1 284 000").value(), 1284000);
  EXPECT_EQ(read_count("1_284").value(), 1284);
  EXPECT_EQ(read_count("418.0").value(), 418);
  EXPECT_EQ(read_count("1.5e3").value(), 1500);
  EXPECT_EQ(read_count("0").value(), 0);
  EXPECT_EQ(read_count("1.284", comma()).value(), 1284);
  EXPECT_EQ(read_count("2147483647").value(), 2147483647);
}

TEST(ReadCount, SaysWhatIsNoCount) {
  const struct {
    const char* text;
    const char* part;
  } rows[] = {{"41.5", "whole"},       {"1.284", "whole"},        {"-3", "below zero"},
              {"<30", "single exact"}, {"41*", "single exact"},   {"2147483648", "larger"},
              {"1e400", "whole"},      {"many", "cannot be read"}};
  for (const auto& row : rows) {
    SCOPED_TRACE(row.text);
    const auto read = read_count(row.text);
    ASSERT_FALSE(read.ok());
    EXPECT_NE(read.error().text().find(row.part), std::string::npos) << read.error().text();
  }
}

}  // namespace
}  // namespace rejoinder
