#include "core/number/number_text.h"

#include <cstdio>
#include <cstdlib>

namespace rejoinder {
namespace {

constexpr const char* kMinus = "−";

// `x` >= 0 with a fixed number of decimals, the last one moved as asked.
std::string fixed(double x, int decimals, ShowRounding way) {
  char buffer[64];
  std::snprintf(buffer, sizeof buffer, "%.*f", decimals, x);
  const double shown = std::strtod(buffer, nullptr);
  // A limit that is the decimal itself up to floating point noise is not pushed to the next one.
  const double noise = 1e-11 * std::fabs(x);
  const double unit = std::pow(10.0, -decimals);
  if (way == ShowRounding::Down && shown > x + noise) std::snprintf(buffer, sizeof buffer, "%.*f", decimals, shown - unit);
  if (way == ShowRounding::Up && shown < x - noise) std::snprintf(buffer, sizeof buffer, "%.*f", decimals, shown + unit);
  return buffer;
}

std::string with_thousands(const std::string& digits) {
  const std::size_t point = std::min(digits.find('.'), digits.size());
  std::string out;
  for (std::size_t i = 0; i < digits.size(); ++i) {
    if (i > 0 && i < point && (point - i) % 3 == 0) out += ',';
    out += digits[i];
  }
  return out;
}

int decimals_for(double x) {
  if (x >= 1000) return 0;
  if (x >= 100) return 1;
  if (x >= 1) return 2;
  if (x == 0) return 0;
  return std::min(14, 2 - static_cast<int>(std::floor(std::log10(x))));
}

std::string superscript(int n) {
  static const char* const digits[] = {"⁰", "¹", "²", "³", "⁴", "⁵", "⁶", "⁷", "⁸", "⁹"};
  std::string out = n < 0 ? "⁻" : "";
  const std::string plain = std::to_string(std::abs(n));
  for (const char c : plain) out += digits[c - '0'];
  return out;
}

std::string scientific(double x, ShowRounding way) {
  const int exponent = static_cast<int>(std::floor(std::log10(x)));
  const double mantissa = x / std::pow(10.0, exponent);
  return fixed(mantissa, 1, way) + " × 10" + superscript(exponent);
}

ShowRounding opposite(ShowRounding way) {
  if (way == ShowRounding::Down) return ShowRounding::Up;
  if (way == ShowRounding::Up) return ShowRounding::Down;
  return way;
}

}  // namespace

std::string number_text(double x, ShowRounding way) {
  if (std::isnan(x)) return "not a number";
  if (x < 0) return kMinus + number_text(-x, opposite(way));
  if (std::isinf(x)) return "∞";
  if (x >= 1e9 || (x > 0 && x < 1e-4)) return scientific(x, way);
  return with_thousands(fixed(x, decimals_for(x), way));
}

std::string p_text(double p, ShowRounding way, bool full) {
  if (p <= 0) return "0";
  if (p < 0.001) {
    if (!full) return "< .001";
    return p < 1e-300 ? "< 10⁻³⁰⁰" : scientific(p, way);
  }
  std::string text = fixed(p, p < 0.01 ? 4 : 3, way);
  if (text.rfind("0.", 0) == 0) text.erase(0, 1);
  return text;
}

std::string range_text(const Interval& range) {
  if (std::isinf(range.high) && range.low <= 0) return "not limited";
  if (std::isinf(range.high)) return "at least " + number_text(range.low, ShowRounding::Down);
  const std::string low = number_text(range.low, ShowRounding::Down), high = number_text(range.high, ShowRounding::Up);
  return low == high ? low : low + " to " + high;
}

std::string p_range_text(const Interval& range) {
  if (range.low <= 0 && range.high >= 1) return "not limited";
  if (range.high < 0.001) return "below .001";
  if (range.low <= 0 || range.low < 0.001) return "at most " + p_text(range.high, ShowRounding::Up);
  const std::string low = p_text(range.low, ShowRounding::Down), high = p_text(range.high, ShowRounding::Up);
  return low == high ? low : low + " to " + high;
}

std::string df_text(double df) {
  if (std::isinf(df)) return "∞";
  char buffer[40];
  std::snprintf(buffer, sizeof buffer, "%.10g", df);
  return with_thousands(buffer);
}

std::string level_text(double level) {
  char buffer[40];
  std::snprintf(buffer, sizeof buffer, "%.6g %%", level * 100);
  return buffer;
}

std::string exact_text(double x) {
  if (std::isinf(x)) return x > 0 ? "inf" : "-inf";
  char buffer[40];
  for (int digits = 15; digits <= 17; ++digits) {
    std::snprintf(buffer, sizeof buffer, "%.*g", digits, x);
    if (std::strtod(buffer, nullptr) == x) break;
  }
  return buffer;
}

}  // namespace rejoinder
