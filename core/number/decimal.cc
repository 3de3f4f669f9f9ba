#include "core/number/decimal.h"

#include <cassert>
#include <cstdint>

namespace rejoinder {
namespace {

using boost::multiprecision::cpp_int;

constexpr int kExactPowers = 22;  // 10^22 is the last power of ten that is a double
constexpr int kDigits = 53;       // binary digits of a double
constexpr int kFinest = 1074;     // the smallest double is 2^-1074

double power_of_ten(int power) {
  double result = 1;
  for (int i = 0; i < power; ++i) result *= 10;  // exact at every step up to 10^22
  return result;
}

cpp_int big_power_of_ten(int power) {
  return boost::multiprecision::pow(cpp_int(10), static_cast<unsigned>(power));
}

// WebAssembly cannot change the rounding mode, so divide to nearest and let the exact remainder, one fma, say
// which side the quotient fell. Needs |units| < 2^53 and 0 <= places <= 22, so that both operands are exact.
Neighbours divide_short(std::int64_t units, int places) {
  const double n = static_cast<double>(units), scale = power_of_ten(places);
  const double q = n / scale;
  const double excess = std::fma(q, scale, -n);
  return {excess > 0 ? step_down(q) : q, q, excess < 0 ? step_up(q) : q};
}

// Contract: numerator >= 0, denominator > 0. The quotient's first 53 binary digits as a whole number, the
// remainder says the rest. Fewer digits where the quotient is so small that doubles have no more.
Neighbours divide_long(const cpp_int& numerator, const cpp_int& denominator) {
  if (numerator == 0) return {};
  const int magnitude =
      static_cast<int>(msb(numerator)) - static_cast<int>(msb(denominator));  // quotient < 2^(magnitude + 1)
  int shift = std::min(kDigits - magnitude, kFinest);
  cpp_int quotient, remainder, divisor;
  // The first try may hold one digit too many; the second is then exact.
  for (;; --shift) {
    cpp_int dividend = numerator;
    divisor = denominator;
    if (shift >= 0)
      dividend <<= shift;
    else
      divisor <<= -shift;
    divide_qr(dividend, divisor, quotient, remainder);
    if (quotient < (cpp_int(1) << kDigits)) break;
  }
  const std::int64_t whole = static_cast<std::int64_t>(quotient);
  Neighbours result;
  result.below = std::ldexp(static_cast<double>(whole), -shift);
  result.above = remainder == 0 ? result.below : std::ldexp(static_cast<double>(whole + 1), -shift);
  const cpp_int twice = remainder * 2;
  const bool up = twice > divisor || (twice == divisor && whole % 2 != 0);
  result.nearest = up ? result.above : result.below;
  if (std::isinf(result.below)) result.below = std::numeric_limits<double>::max();
  return result;
}

}  // namespace

Decimal decimal_of(std::string_view digits, int places, bool negative) {
  Decimal result;
  result.places = places;
  for (const char digit : digits) {
    assert(digit >= '0' && digit <= '9');
    result.units *= 10;
    result.units += digit - '0';
  }
  if (negative) result.units = -result.units;
  return result;
}

Decimal moved_by_halves(const Decimal& value, int halves) {
  return {value.units * 10 + 5 * halves, value.places + 1};
}

Neighbours neighbours(const Decimal& value) {
  const bool short_enough = abs(value.units) < (cpp_int(1) << kDigits);
  if (short_enough && value.places >= 0 && value.places <= kExactPowers)
    return divide_short(static_cast<std::int64_t>(value.units), value.places);

  const cpp_int size = abs(value.units);
  Neighbours result = value.places >= 0 ? divide_long(size, big_power_of_ten(value.places))
                                        : divide_long(size * big_power_of_ten(-value.places), 1);
  if (value.units < 0) result = {-result.above, -result.nearest, -result.below};
  return result;
}

}  // namespace rejoinder
