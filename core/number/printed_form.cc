#include "core/number/printed_form.h"

#include <algorithm>
#include <cstddef>
#include <vector>

#include "core/number/glyphs.h"

namespace rejoinder {
namespace {

constexpr std::size_t kMostDigits = 40;
constexpr std::size_t kMostExponentDigits = 4;

std::string quoted(std::string_view text) { return '"' + std::string(text) + '"'; }

// "12.5" at one place becomes "0.125" for the advice on percent signs.
std::string as_share(const PrintedForm& form, char decimal) {
  std::string digits = form.digits;
  const int places = std::max(form.places + 2, 0);
  while (static_cast<int>(digits.size()) <= places) digits.insert(digits.begin(), '0');
  digits.insert(digits.size() - static_cast<std::size_t>(places), 1, decimal);
  const std::size_t first = std::min(digits.find_first_not_of('0'), digits.find(decimal) - 1);
  return (form.negative ? "-" : "") + digits.substr(first);
}

// Walks the characters from both ends inwards. Each step either takes a piece off or leaves things as they
// are; what no step takes is named in the Error.
class FormReader {
 public:
  FormReader(std::string_view text, char decimal)
      : text_(text), decimal_(decimal), glyphs_(read_glyphs(text)), end_(glyphs_.size()) {}

  Result<PrintedForm> read() {
    if (const auto problem = take_wrapping(); !problem.what.empty()) return problem;
    if (at_ == end_) return Error{"", "there is no number in " + quoted(text_), kHowToWrite};
    take_relation();
    if (take_not_significant()) {
      if (at_ != end_ || form_.relation != Relation::Equal) return unreadable();
      form_.relation = Relation::Above;
      form_.not_significant = true;
      return form_;
    }
    if (take(Mark::Minus))
      form_.negative = true;
    else
      take(Mark::Plus);
    skip_blanks();
    if (at_ == end_ && form_.negative)
      return Error{"", quoted(text_) + " is a dash without digits",
                   "leave the figure out where nothing is printed"};
    if (const auto problem = take_digits(); !problem.what.empty()) return problem;
    if (!take_exponent()) return unreadable();
    skip_blanks();
    if (at_ + 1 == end_ && is(Mark::Percent))
      return Error{"", quoted(text_) + " is a percentage",
                   "write it as a share, " + quoted(as_share(form_, decimal_))};
    if (at_ != end_) return unreadable();
    return form_;
  }

 private:
  static constexpr const char* kHowToWrite =
      "write the number as printed, such as \"0.050\", \"-1.2e-3\" or \"<0.001\"";

  bool is(Mark mark, std::size_t ahead = 0) const {
    return at_ + ahead < end_ && glyphs_[at_ + ahead].mark == mark;
  }
  bool is_letter(char letter, std::size_t ahead = 0) const {
    return is(Mark::Letter, ahead) && glyphs_[at_ + ahead].value == letter;
  }
  bool is_digit(char digit, std::size_t ahead) const {
    return is(Mark::Digit, ahead) && glyphs_[at_ + ahead].value == digit;
  }
  bool take(Mark mark) {
    if (!is(mark)) return false;
    ++at_;
    return true;
  }
  bool take_word(std::string_view word) {
    for (std::size_t i = 0; i < word.size(); ++i)
      if (!is_letter(word[i], i)) return false;
    at_ += word.size();
    return true;
  }
  void skip_blanks() {
    while (take(Mark::Blank)) {
    }
  }

  // Blanks, pairs of brackets and trailing stars, in any nesting. The Error is empty where all is well.
  Error take_wrapping() {
    for (;;) {
      skip_blanks();
      while (end_ > at_ && glyphs_[end_ - 1].mark == Mark::Blank) --end_;
      if (at_ == end_) return {};
      const Glyph last = glyphs_[end_ - 1];
      if (last.mark == Mark::Star) {
        form_.stars += last.value;
        --end_;
        continue;
      }
      const bool opens = is(Mark::Open), closes = last.mark == Mark::Close && !closes_exponent();
      if (!opens && !closes) return {};
      if (!opens || !closes || glyphs_[at_].value != last.value || end_ - at_ < 2)
        return {"", "the brackets of " + quoted(text_) + " do not pair",
                "write both brackets as printed, or neither"};
      ++at_;
      --end_;
    }
  }
  // Whether the last bracket ends "10^{-3}" rather than the whole.
  bool closes_exponent() const {
    for (std::size_t i = at_; i + 1 < end_; ++i)
      if (glyphs_[i].mark == Mark::Caret && glyphs_[i + 1].mark == Mark::Open)
        return std::count_if(glyphs_.begin() + static_cast<std::ptrdiff_t>(i),
                             glyphs_.begin() + static_cast<std::ptrdiff_t>(end_),
                             [](const Glyph& g) { return g.mark == Mark::Close; }) == 1;
    return false;
  }

  // "p <", "P-value =", "<", ">=" or nothing.
  void take_relation() {
    const std::size_t start = at_;
    if (take_word("p")) {
      const std::size_t after_p = at_;
      if (!take(Mark::Minus)) skip_blanks();
      if (!take_word("value")) at_ = after_p;
      skip_blanks();
    }
    if (take(Mark::Below)) {
      form_.relation = Relation::Below;
      take(Mark::Equals);
    } else if (take(Mark::Above)) {
      form_.relation = Relation::Above;
      take(Mark::Equals);
    } else if (!take(Mark::Equals) && !(is_letter('n') && at_ != start)) {
      at_ = start;  // a "p" that nothing follows is no part of a number
    }
    skip_blanks();
  }

  bool take_not_significant() {
    const std::size_t start = at_;
    if (take_word("n")) {
      take(Mark::Point);
      skip_blanks();
      if (take_word("s")) {
        take(Mark::Point);
        return true;
      }
    }
    at_ = start;
    return false;
  }

  std::size_t run_of_digits() {
    const std::size_t before = form_.digits.size();
    for (; is(Mark::Digit); ++at_) form_.digits.push_back(static_cast<char>('0' + glyphs_[at_].value));
    return form_.digits.size() - before;
  }

  Mark decimal_mark() const { return decimal_ == ',' ? Mark::Comma : Mark::Point; }
  Mark other_mark() const { return decimal_ == ',' ? Mark::Point : Mark::Comma; }
  bool is_thousands_mark() const {
    return (is(other_mark()) || is(Mark::Blank) || is(Mark::Apostrophe)) && is(Mark::Digit, 1);
  }

  // Digits before the decimal mark, in groups of three or in one run; the mark; digits after it.
  Error take_digits() {
    const std::size_t first_group = run_of_digits();
    if (first_group > 0 && is_thousands_mark()) {
      const Mark mark = glyphs_[at_].mark;
      bool groups_of_three = first_group <= 3 && form_.digits.front() != '0';
      while (is(mark) && is(Mark::Digit, 1)) {
        ++at_;
        if (run_of_digits() != 3) groups_of_three = false;
      }
      if (!groups_of_three || is_thousands_mark()) return misplaced(mark);
    }
    const bool raised_mark = is(Mark::RaisedPoint) && is(Mark::Digit, 1) && !starts_power(at_ + 1);
    if (raised_mark || is(decimal_mark())) {
      ++at_;
      form_.places = static_cast<int>(run_of_digits());
    }
    if (form_.digits.empty()) return unreadable();
    if (is(other_mark()) && is(Mark::Digit, 1)) return misplaced(other_mark());
    const std::size_t zeros = std::min(form_.digits.find_first_not_of('0'), form_.digits.size());
    if (form_.digits.size() - zeros > kMostDigits)
      return {"", quoted(text_) + " has more than 40 digits", "shorten it to the digits printed"};
    return {};
  }

  // Whether a power of ten stands at glyph `i`: "10^", "10-", "10⁻". Plain digits after the 10 do not count,
  // so that "0·105" is a decimal.
  bool starts_power(std::size_t i) const {
    const auto digit_at = [&](std::size_t k, char digit) {
      return k < end_ && glyphs_[k].mark == Mark::Digit && glyphs_[k].value == digit;
    };
    if (!digit_at(i, 1) || !digit_at(i + 1, 0) || i + 2 >= end_) return false;
    switch (glyphs_[i + 2].mark) {
      case Mark::Caret:
      case Mark::Minus:
      case Mark::Plus:
      case Mark::RaisedMinus:
      case Mark::RaisedPlus:
      case Mark::RaisedDigit:
        return true;
      default:
        return false;
    }
  }

  // "e-3", "×10^-3", "x10-3", "·10⁻³", "*10^{-3}", or "10⁻³" without a factor. False where an exponent begins
  // and does not end well; true where there is none.
  bool take_exponent() {
    if (is_letter('e')) {
      ++at_;
      return take_power();
    }
    const bool bare_ten = form_.digits == "10" && form_.places == 0 &&
                          (is(Mark::Caret) || is(Mark::RaisedDigit) || is(Mark::RaisedMinus));
    if (bare_ten) {
      form_.digits = "1";
      take(Mark::Caret);
      return take_power();
    }
    const std::size_t start = at_;
    skip_blanks();
    if (!(take(Mark::Times) || take(Mark::RaisedPoint) || take(Mark::Star) || take_word("x"))) {
      at_ = start;
      return true;
    }
    skip_blanks();
    if (!is_digit(1, 0) || !is_digit(0, 1)) return false;
    at_ += 2;
    skip_blanks();
    take(Mark::Caret);
    return take_power();
  }

  // The exponent itself: a sign of any kind and digits, plain or raised, perhaps in brackets.
  bool take_power() {
    const bool bracket = take(Mark::Open);
    bool negative = false;
    if (take(Mark::Minus) || take(Mark::RaisedMinus))
      negative = true;
    else if (!take(Mark::Plus))
      take(Mark::RaisedPlus);
    const Mark kind = is(Mark::RaisedDigit) ? Mark::RaisedDigit : Mark::Digit;
    int power = 0;
    std::size_t digits = 0;
    for (; is(kind); ++at_, ++digits) {
      if (digits == kMostExponentDigits) return false;
      power = 10 * power + glyphs_[at_].value;
    }
    if (digits == 0 || (bracket && !take(Mark::Close))) return false;
    form_.places -= negative ? -power : power;
    return true;
  }

  Error misplaced(Mark mark) const {
    if (mark == Mark::Comma)
      return {"",
              "the comma in " + quoted(text_) + " is neither a thousands mark nor the review's decimal mark",
              "write decimal = \",\" if commas part off decimals, or the number without it"};
    if (mark == Mark::Point)
      return {"",
              "the point in " + quoted(text_) + " is neither a thousands mark nor the review's decimal mark",
              "write decimal = \".\" if points part off decimals, or the number without it"};
    return {"", "the gaps in " + quoted(text_) + " do not part groups of three digits",
            "write one number without gaps"};
  }

  Error unreadable() const {
    if (is_letter('o') || is_letter('l') || is_letter('i'))
      return {"", quoted(text_) + " holds a letter where a digit belongs", "write 0 for O, and 1 for l or I"};
    return {"", quoted(text_) + " cannot be read as a number", kHowToWrite};
  }

  std::string_view text_;
  char decimal_;
  std::vector<Glyph> glyphs_;
  std::size_t at_ = 0, end_;
  PrintedForm form_;
};

}  // namespace

Result<PrintedForm> read_printed_form(std::string_view text, char decimal) {
  return FormReader(text, decimal).read();
}

bool read_plain_form(std::string_view text, PrintedForm& form) {
  PrintedForm plain;
  std::size_t at = 0;
  const auto is_digit = [&](std::size_t i) { return i < text.size() && text[i] >= '0' && text[i] <= '9'; };
  const auto take_run = [&](std::string& digits) {
    const std::size_t before = digits.size();
    while (is_digit(at) ||
           (at < text.size() && text[at] == '_' && at > 0 && is_digit(at - 1) && is_digit(at + 1)))
      if (text[at++] != '_') digits.push_back(text[at - 1]);
    return digits.size() - before;
  };
  if (at < text.size() && (text[at] == '-' || text[at] == '+')) plain.negative = text[at++] == '-';
  if (take_run(plain.digits) == 0) return false;
  if (at < text.size() && text[at] == '.') {
    ++at;
    plain.places = static_cast<int>(take_run(plain.digits));
    if (plain.places == 0) return false;
  }
  if (at < text.size() && (text[at] == 'e' || text[at] == 'E')) {
    ++at;
    bool negative = false;
    if (at < text.size() && (text[at] == '-' || text[at] == '+')) negative = text[at++] == '-';
    std::string power;
    if (take_run(power) == 0) return false;
    power.erase(0, std::min(power.find_first_not_of('0'), power.size() - 1));
    if (power.size() > kMostExponentDigits) return false;
    plain.places += negative ? std::stoi(power) : -std::stoi(power);
  }
  if (at != text.size()) return false;
  form = plain;
  return true;
}

}  // namespace rejoinder
