#include "core/algebra/parse.h"

#include <map>

#include "core/algebra/tokens.h"

namespace rejoinder {
namespace {

using Kind = Token::Kind;
using Op = Expression::Op;

constexpr int kDeepestBrackets = 64;

class Parser {
 public:
  Parser(std::string_view text, std::vector<Token> tokens) : text_(text), tokens_(std::move(tokens)) {}

  Result<ParsedRestrictions> parse() {
    while (true) {
      while (here().kind == Kind::Separator) ++at_;
      if (here().kind == Kind::End) return std::move(parsed_);
      if (!read_part()) return error_;
    }
  }

  Result<ParsedRestrictions> parse_combination() {
    Side side;
    side.character = here().character;
    expression_ = &side.expression;
    if (read_sum() < 0) return error_;
    if (here().kind == Kind::Equals) {
      refuse(here(), "a combination of terms has no sign of equality", "write the terms alone: fare - fuel");
      return error_;
    }
    if (here().kind != Kind::End) {
      refuse_extra();
      return error_;
    }
    side.written = std::string(text_);
    Part part;
    part.character = side.character;
    part.sides.push_back(std::move(side));
    parsed_.parts.push_back(std::move(part));
    return std::move(parsed_);
  }

 private:
  const Token& here() const { return tokens_[at_]; }
  const Token& ahead(std::size_t by) const { return tokens_[std::min(at_ + by, tokens_.size() - 1)]; }

  bool refuse(const Token& token, std::string what, std::string mend) {
    error_ = {at_character(token.character), std::move(what), std::move(mend)};
    return false;
  }

  bool read_part() {
    Part part;
    part.character = here().character;
    for (;;) {
      Side side;
      if (!read_side(side)) return false;
      part.sides.push_back(std::move(side));
      if (here().kind != Kind::Equals) break;
      ++at_;
    }
    if (here().kind != Kind::Separator && here().kind != Kind::End) return refuse_extra();
    if (part.sides.size() == 1 && !part.sides[0].all) {
      // "0,5 a = b": the comma was meant as a decimal mark.
      const Token& last = tokens_[at_ - 1];
      const bool comma = here().kind == Kind::Separator && here().text == "," &&
                         ahead(1).kind == Kind::Number && !ahead(1).after_blank && last.kind == Kind::Number;
      return refuse(here(), "there is no sign of equality in " + part.sides[0].written,
                    comma ? "numbers take a point: " + last.text + "." + ahead(1).text
                          : "say what it equals: " + part.sides[0].written + " = 0");
    }
    parsed_.parts.push_back(std::move(part));
    return true;
  }

  bool read_side(Side& side) {
    const std::size_t begin = at_;
    side.character = here().character;
    if (is_all(here()) &&
        (ahead(1).kind == Kind::Equals || ahead(1).kind == Kind::Separator || ahead(1).kind == Kind::End)) {
      side.all = true;
      ++at_;
    } else {
      expression_ = &side.expression;
      if (read_sum() < 0) return false;
    }
    side.written =
        std::string(text_.substr(tokens_[begin].begin, tokens_[at_ - 1].end - tokens_[begin].begin));
    return true;
  }

  static bool is_all(const Token& token) {
    return token.kind == Kind::Name && !token.quoted && token.text == "all";
  }

  // Each reader of a piece answers the index of its step, or -1 with error_ set.
  int add(Op op, int left, int right, const Token& token, double number = 0, int term = 0) {
    expression_->steps.push_back({op, number, term, left, right, token.character});
    return static_cast<int>(expression_->steps.size()) - 1;
  }

  int read_sum() {
    int left = read_product();
    while (left >= 0 && (here().kind == Kind::Plus || here().kind == Kind::Minus)) {
      const Token& sign = tokens_[at_++];
      const int right = read_product();
      left = right < 0 ? -1 : add(sign.kind == Kind::Plus ? Op::Add : Op::Subtract, left, right, sign);
    }
    return left;
  }

  int read_product() {
    int left = read_signed();
    while (left >= 0) {
      const Token& sign = here();
      Op op = Op::Multiply;
      if (sign.kind == Kind::Times || sign.kind == Kind::Divide) {
        op = sign.kind == Kind::Times ? Op::Multiply : Op::Divide;
        ++at_;
      } else if (tokens_[at_ - 1].kind == Kind::Number &&
                 (sign.kind == Kind::Name || sign.kind == Kind::Open)) {
        // "a = 0 b = 0" must not be read as a = 0*b.
        if (tokens_[at_ - 1].number == 0 || sign.after_break) {
          refuse(sign, "two restrictions follow each other without a sign between them",
                 "write a comma between restrictions: a = 0, b = 0");
          return -1;
        }
      } else {
        return left;
      }
      const int right = read_signed();
      left = right < 0 ? -1 : add(op, left, right, sign);
    }
    return left;
  }

  int read_signed() {
    const Token& first = here();
    bool negative = false;
    while (here().kind == Kind::Plus || here().kind == Kind::Minus)
      negative ^= tokens_[at_++].kind == Kind::Minus;
    int inner = read_power();
    if (inner >= 0 && negative) inner = add(Op::Negate, inner, -1, first);
    return inner;
  }

  int read_power() {
    const int base = read_atom();
    if (base < 0 || here().kind != Kind::Power) return base;
    const Token& sign = tokens_[at_++];
    const bool negative = here().kind == Kind::Minus;
    if (negative) ++at_;
    if (here().kind != Kind::Number) {
      refuse(here(), "a power that is no plain number", "write the exponent as a number: a^2");
      return -1;
    }
    const double exponent = tokens_[at_++].number;
    return add(Op::Power, base, -1, sign, negative ? -exponent : exponent);
  }

  int read_atom() {
    const Token& token = here();
    switch (token.kind) {
      case Kind::Number:
        ++at_;
        return add(Op::Number, -1, -1, token, token.number);
      case Kind::Name:
        return read_name();
      case Kind::Open: {
        if (++depth_ > kDeepestBrackets) {
          refuse(token, "brackets stand more than 64 deep", "write the restriction without some of them");
          return -1;
        }
        ++at_;
        const int inner = read_sum();
        if (inner < 0) return -1;
        if (here().kind != Kind::Close) {
          refuse_unclosed(token);
          return -1;
        }
        ++at_;
        --depth_;
        return inner;
      }
      case Kind::End:
        refuse(token, "the restriction ends where a name or a number should follow", "complete it: fare = 0");
        break;
      case Kind::Close:
        refuse(token, "a closing bracket without an opening one before it", "take it away");
        break;
      case Kind::Dot:
        refuse(token, "a point without a column before it", "write column.term, or 0.5 for a half");
        break;
      default:
        refuse(token, "a name or a number is missing before " + token.text,
               "complete the restriction: fare = 0");
    }
    return -1;
  }

  int read_name() {
    const Token& first = tokens_[at_++];
    TermName name{"", first.text};
    if (here().kind == Kind::Dot) {
      ++at_;
      if (here().kind != Kind::Name) {
        refuse(here(), "no term follows the point",
               "write column.term, each in double quotes where it is not one word");
        return -1;
      }
      name = {first.text, tokens_[at_++].text};
      if (here().kind == Kind::Dot) {
        refuse(here(), "a name takes one point, between column and term",
               "put a name that holds a point in double quotes");
        return -1;
      }
    } else if (is_all(first)) {
      refuse(first, "\"all\" stands for every slope being zero and takes part in no arithmetic",
             "write all alone; a term of that name stands in double quotes: \"all\"");
      return -1;
    }
    const auto [known, added] = index_.emplace(name, static_cast<int>(parsed_.terms.size()));
    if (added) {
      if (static_cast<int>(parsed_.terms.size()) == kMostTerms) {
        refuse(first, "more than 200 different terms", "write the restrictions of one test only");
        return -1;
      }
      parsed_.terms.push_back(std::move(name));
    }
    return add(Op::Term, -1, -1, first, 0, known->second);
  }

  // A complete side is followed by something that continues nothing.
  bool refuse_extra() {
    const Token& extra = here();
    const Token& before = tokens_[at_ - 1];
    if (extra.kind == Kind::Name && !extra.quoted &&
        (extra.text == "and" || extra.text == "or" || extra.text == "und"))
      return refuse(extra, "the word " + extra.text + " is read as a name",
                    "write a comma between restrictions: a = 0, b = 0");
    if (before.kind == Kind::Name && (extra.kind == Kind::Name || extra.kind == Kind::Number)) {
      if (extra.after_break)
        return refuse(extra, "two restrictions follow each other without a sign between them",
                      "write a comma between restrictions: a = 0, b = 0");
      if (!before.quoted && !extra.quoted) return refuse_blank_name();
    }
    if (extra.kind == Kind::Close)
      return refuse(extra, "a closing bracket without an opening one before it", "take it away");
    if (extra.kind == Kind::Dot)
      return refuse(extra, "a point stands between a column and a term only", "write column.term");
    return refuse(extra, "no sign stands between " + before.text + " and " + extra.text,
                  "write + - * / or = between them, or a comma between restrictions");
  }

  // fuel price = 0
  bool refuse_blank_name() {
    std::size_t first = at_ - 1, last = at_;
    const auto part_of_name = [&](const Token& t) {
      return (t.kind == Kind::Name && !t.quoted) || t.kind == Kind::Number;
    };
    while (part_of_name(tokens_[last + 1])) ++last;
    const std::string words(text_.substr(tokens_[first].begin, tokens_[last].end - tokens_[first].begin));
    return refuse(tokens_[first], "several words stand side by side: " + words,
                  "names with blanks stand in double quotes: \"" + words + "\"");
  }

  void refuse_unclosed(const Token& open) {
    if (here().kind == Kind::End || here().kind == Kind::Equals || here().kind == Kind::Separator)
      refuse(open, "the bracket that opens here is not closed", "add ) where it ends");
    else
      refuse_extra();
  }

  std::string_view text_;
  std::vector<Token> tokens_;
  std::size_t at_ = 0;
  int depth_ = 0;
  Expression* expression_ = nullptr;
  std::map<TermName, int> index_;
  ParsedRestrictions parsed_;
  Error error_;
};

}  // namespace

Result<ParsedRestrictions> parse_restrictions(std::string_view text) {
  Result<std::vector<Token>> tokens = read_tokens(text);
  if (!tokens.ok()) return tokens.error();
  return Parser(text, std::move(tokens).value()).parse();
}

Result<ParsedRestrictions> parse_combination(std::string_view text) {
  Result<std::vector<Token>> tokens = read_tokens(text);
  if (!tokens.ok()) return tokens.error();
  return Parser(text, std::move(tokens).value()).parse_combination();
}

Expression difference(const Expression& left, const Expression& right, int character) {
  Expression result = left;
  const int shift = static_cast<int>(left.steps.size());
  for (Expression::Step step : right.steps) {
    if (step.left >= 0) step.left += shift;
    if (step.right >= 0) step.right += shift;
    result.steps.push_back(step);
  }
  Expression::Step last;
  last.op = Op::Subtract;
  last.left = shift - 1;
  last.right = static_cast<int>(result.steps.size()) - 1;
  last.character = character;
  result.steps.push_back(last);
  return result;
}

}  // namespace rejoinder
