#include "core/number/printed_number.h"

#include <cassert>
#include <cstdio>

#include "core/number/decimal.h"
#include "core/number/printed_form.h"

namespace rejoinder {
namespace {

constexpr long kMostCounted = 2147483647;  // the same on machines whose long has 32 bits

std::string quoted(std::string_view text) { return '"' + std::string(text) + '"'; }

std::string spelled(double x) {
  char buffer[32];
  std::snprintf(buffer, sizeof buffer, "%g", x);
  return buffer;
}

std::string described(const Interval& natural) {
  if (std::isinf(natural.high)) return spelled(natural.low) + " or more";
  if (std::isinf(natural.low)) return spelled(natural.high) + " or less";
  return spelled(natural.low) + " to " + spelled(natural.high);
}

// How far print may stand from the value, in half units of the last place, towards zero and away from it.
struct Slack {
  int towards_zero = 0;
  int away = 0;
};
Slack slack_of(Rounding rounding) {
  switch (rounding) {
    case Rounding::Nearest:
      return {1, 1};
    case Rounding::Truncated:
      return {0, 2};
    case Rounding::Unknown:
      return {1, 2};
  }
  return {1, 2};
}

// Every value that prints as these digits. A zero without a sign may come from either side of zero, one with
// a minus from below only.
Interval values_printed(const Decimal& printed, bool negative, Rounding rounding) {
  const Slack slack = slack_of(rounding);
  const bool zero = printed.units == 0;
  const int down = negative || zero ? slack.away : slack.towards_zero;
  const int up = zero ? (negative ? 0 : slack.away) : negative ? slack.towards_zero : slack.away;
  return {neighbours(moved_by_halves(printed, -down)).below, neighbours(moved_by_halves(printed, up)).above};
}

// A number needs a double of its own size: neither beyond the largest nor lost under the smallest.
Result<Decimal> decimal_within_doubles(const PrintedForm& form, std::string_view text) {
  const int length = static_cast<int>(form.digits.size());
  const Error too_large{"", quoted(text) + " is larger than any number kept here", "check its exponent"};
  const Error too_small{"", quoted(text) + " is closer to zero than any number kept here",
                        "write it as a limit, such as \"<1e-300\""};
  const bool zero = form.digits.find_first_not_of('0') == std::string::npos;
  if (!zero && length - form.places > 400) return too_large;
  if (!zero && form.places > 400) return too_small;
  // The place of a zero says how it was rounded, and has to be a double as well.
  if (zero && form.places > 320) return too_small;
  if (zero && form.places < -300) return too_large;
  const Decimal value = decimal_of(form.digits, form.places, form.negative);
  const double nearest = neighbours(value).nearest;
  if (std::isinf(nearest)) return too_large;
  if (!zero && nearest == 0) return too_small;
  return value;
}

Error outside_natural(std::string_view text, const Interval& natural) {
  return {"", quoted(text) + " lies outside the range of this figure, " + described(natural),
          "check the sign, the digits and the decimal mark"};
}

Result<PrintedNumber> within_natural(PrintedNumber number, const Interval& natural) {
  const std::optional<Interval> kept = meet(number.possible, natural);
  if (!kept) return outside_natural(number.text, natural);
  number.possible = *kept;
  return number;
}

Result<PrintedNumber> exact_number(const PrintedForm& form, std::string_view text, const Interval& natural) {
  const Result<Decimal> decimal = decimal_within_doubles(form, text);
  if (!decimal.ok()) return decimal.error();
  const Neighbours around = neighbours(decimal.value());
  PrintedNumber number;
  number.text = text;
  number.exact = true;
  number.value = around.nearest;
  number.decimal_places = form.places;
  number.possible = {around.below, around.above};
  return within_natural(number, natural);
}

Error not_exact(std::string_view text) {
  return {"", quoted(text) + " is not a single exact number",
          "write one number without <, > or stars, such as 0.05"};
}

// The plain spelling first, as an unquoted number has a point whatever the review's decimal mark is.
Result<PrintedForm> read_exact_form(std::string_view text, char decimal) {
  PrintedForm form;
  if (read_plain_form(text, form)) return form;
  Result<PrintedForm> printed = read_printed_form(text, decimal);
  if (printed.ok() && (printed.value().relation != Relation::Equal || printed.value().stars > 0))
    return not_exact(text);
  return printed;
}

}  // namespace

Result<PrintedNumber> read_printed_number(std::string_view text, const NumberReading& how) {
  const Result<PrintedForm> read = read_printed_form(text, how.decimal);
  if (!read.ok()) return read.error();
  const PrintedForm& form = read.value();

  PrintedNumber number;
  number.text = text;
  number.stars = form.stars;
  number.relation = form.relation;
  if (form.not_significant) {
    number.possible = how.natural;
    number.value = std::isinf(how.natural.low) ? 0 : how.natural.low;
    return number;
  }
  const Result<Decimal> decimal = decimal_within_doubles(form, text);
  if (!decimal.ok()) return decimal.error();
  const Neighbours around = neighbours(decimal.value());
  number.value = around.nearest;
  number.decimal_places = form.places;
  switch (form.relation) {
    case Relation::Equal:
      number.possible = values_printed(decimal.value(), form.negative, how.rounding);
      break;
    case Relation::Below:
      number.possible = {-kInfinity, around.above};
      break;
    case Relation::Above:
      number.possible = {around.below, kInfinity};
      break;
  }
  return within_natural(number, how.natural);
}

Result<PrintedNumber> read_exact_number(std::string_view literal, const NumberReading& how) {
  const bool negative = literal.starts_with('-');
  const std::string_view unsigned_literal = literal.substr(negative || literal.starts_with('+') ? 1 : 0);
  if (unsigned_literal == "nan")
    return Error{"", quoted(literal) + " is not a number", "leave the figure out where nothing is printed"};
  if (unsigned_literal == "inf") {
    PrintedNumber number;
    number.text = literal;
    number.exact = true;
    number.value = negative ? -kInfinity : kInfinity;
    number.possible = Interval::point(number.value);
    return within_natural(number, how.natural);
  }
  const Result<PrintedForm> form = read_exact_form(literal, how.decimal);
  if (!form.ok()) return form.error();
  return exact_number(form.value(), literal, how.natural);
}

Result<long> read_count(std::string_view text, const NumberReading& how) {
  Result<PrintedForm> read = read_printed_form(text, how.decimal);
  PrintedForm plain;
  if (!read.ok() && read_plain_form(text, plain)) read = plain;  // underscores part digits here only
  if (!read.ok()) return read.error();
  const PrintedForm& form = read.value();
  if (form.relation != Relation::Equal || form.stars > 0) return not_exact(text);

  const Error not_whole{"", quoted(text) + " is not a whole number",
                        "write the count in digits, such as 418"};
  const Result<Decimal> decimal = decimal_within_doubles(form, text);
  if (!decimal.ok()) return not_whole;
  const Neighbours around = neighbours(decimal.value());
  if (around.below != around.above || around.nearest != std::floor(around.nearest)) return not_whole;
  if (around.nearest < 0)
    return Error{"", quoted(text) + " is a count below zero", "write the count without a sign"};
  if (around.nearest > static_cast<double>(kMostCounted))
    return Error{"", quoted(text) + " is larger than any count kept here", "check its digits"};
  return static_cast<long>(around.nearest);
}

}  // namespace rejoinder
