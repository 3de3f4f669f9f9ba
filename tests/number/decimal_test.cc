// Reading of random printed decimals against whole-number arithmetic that knows nothing of the reader.
#include "core/number/decimal.h"

#include <gtest/gtest.h>

#include <cmath>
#include <cstdint>
#include <random>
#include <string>

#include "core/number/printed_number.h"

namespace rejoinder {
namespace {

using boost::multiprecision::cpp_int;

cpp_int power(int base, int exponent) {
  cpp_int result = 1;
  for (int i = 0; i < exponent; ++i) result *= base;
  return result;
}

// The sign of (x - units / 10^places), by bringing both to whole numbers. Infinity is above every decimal.
int compare(double x, const cpp_int& units, int places) {
  if (std::isinf(x)) return x > 0 ? 1 : -1;
  int exponent = 0;
  const double fraction = std::frexp(x, &exponent);
  cpp_int left(static_cast<std::int64_t>(std::ldexp(fraction, 53)));
  cpp_int right = units;
  exponent -= 53;
  (exponent >= 0 ? left : right) *= power(2, std::abs(exponent));
  (places >= 0 ? left : right) *= power(10, std::abs(places));
  return left.compare(right);
}

// The doubles of `interval` are the ones next to the two decimals on the outside.
void expect_ends(const Interval& interval, const cpp_int& low, const cpp_int& high, int places) {
  EXPECT_LE(compare(interval.low, low, places), 0);
  EXPECT_GT(compare(std::nextafter(interval.low, kInfinity), low, places), 0);
  EXPECT_GE(compare(interval.high, high, places), 0);
  EXPECT_LT(compare(std::nextafter(interval.high, -kInfinity), high, places), 0);
}

struct Sample {
  std::string text;
  cpp_int units;
  int places = 0;
};

// 1 to 40 digits, a point anywhere, an exponent on some.
Sample random_sample(std::mt19937_64& random) {
  Sample sample;
  const int length = 1 + static_cast<int>(random() % (random() % 3 == 0 ? 40 : 9));
  const int point = static_cast<int>(random() % static_cast<unsigned>(length + 1));
  if (random() % 2) sample.text = "-";
  for (int i = 0; i < length; ++i) {
    if (i == point) sample.text += '.';
    const int digit = static_cast<int>(i == 0 ? 1 + random() % 9 : random() % 10);
    sample.text += static_cast<char>('0' + digit);
    sample.units = sample.units * 10 + digit;
  }
  sample.places = length - point;
  if (random() % 3 == 0) {
    const int exponent = static_cast<int>(random() % 520) - 260;
    sample.text += "e" + std::to_string(exponent);
    sample.places -= exponent;
  }
  if (sample.text[0] == '-') sample.units = -sample.units;
  return sample;
}

TEST(ReadPrintedNumber, TakesTheDoublesNextToTheExactEnds) {
  std::mt19937_64 random(7);
  for (int i = 0; i < 2000; ++i) {
    const Sample sample = random_sample(random);
    SCOPED_TRACE(sample.text);
    const int away = sample.units < 0 ? -1 : 1;
    NumberReading how;
    const Result<PrintedNumber> nearest = read_printed_number(sample.text, how);
    ASSERT_TRUE(nearest.ok()) << nearest.error().text();
    EXPECT_EQ(nearest.value().decimal_places, sample.places);
    expect_ends(nearest.value().possible, sample.units * 10 - 5, sample.units * 10 + 5, sample.places + 1);

    how.rounding = Rounding::Truncated;
    const Interval truncated = read_printed_number(sample.text, how).value().possible;
    how.rounding = Rounding::Unknown;
    const Interval unknown = read_printed_number(sample.text, how).value().possible;
    const cpp_int value = sample.units * 10, further = value + 10 * away, back = value - 5 * away;
    if (away > 0) {
      expect_ends(truncated, value, further, sample.places + 1);
      expect_ends(unknown, back, further, sample.places + 1);
    } else {
      expect_ends(truncated, further, value, sample.places + 1);
      expect_ends(unknown, further, back, sample.places + 1);
    }
  }
}

TEST(ReadPrintedNumber, TakesTheNearestDoubleAsItsValue) {
  std::mt19937_64 random(11);
  for (int i = 0; i < 1500; ++i) {
    const Sample sample = random_sample(random);
    SCOPED_TRACE(sample.text);
    const Result<PrintedNumber> exact = read_exact_number(sample.text);
    ASSERT_TRUE(exact.ok());
    expect_ends(exact.value().possible, sample.units, sample.units, sample.places);
    const double value = exact.value().value;
    EXPECT_EQ(value, std::strtod(sample.text.c_str(), nullptr));  // the library rounds to nearest as well
    EXPECT_TRUE(exact.value().possible.contains(value));
  }
}

// Checked: the largest and smallest doubles, and decimals halfway between neighbours, which go to the even
// one.
TEST(Neighbours, HoldAtTheEdgesOfTheDoubles) {
  EXPECT_EQ(neighbours(decimal_of("0", 5, false)).nearest, 0);
  EXPECT_EQ(neighbours(decimal_of("9007199254740993", 0, false)).nearest, 9007199254740992.0);
  EXPECT_EQ(neighbours(decimal_of("9007199254740995", 0, false)).nearest, 9007199254740996.0);
  EXPECT_EQ(neighbours(decimal_of("9007199254740995", 0, true)).below, -9007199254740996.0);
  const Neighbours huge = neighbours(decimal_of("2", -308, false));
  EXPECT_EQ(huge.below, std::numeric_limits<double>::max());
  EXPECT_EQ(huge.nearest, kInfinity);
  const Neighbours tiny = neighbours(decimal_of("1", 330, false));
  EXPECT_EQ(tiny.below, 0);
  EXPECT_EQ(tiny.nearest, 0);
  EXPECT_EQ(tiny.above, std::numeric_limits<double>::denorm_min());
  EXPECT_EQ(neighbours(decimal_of("5", 324, false)).nearest, std::numeric_limits<double>::denorm_min());
}

}  // namespace
}  // namespace rejoinder
