#include "core/algebra/tokens.h"

#include <cmath>
#include <cstdint>
#include <cstdlib>

namespace rejoinder {
namespace {

constexpr std::size_t kMostBytes = 200000;

struct Character {
  std::uint32_t code = 0;  // 0xFFFD for bytes that are no UTF-8
  std::size_t bytes = 1;
};

// The character that begins at byte `at`. A byte that is no UTF-8 counts as one character, so that positions
// stay sensible in damaged text.
Character character_at(std::string_view text, std::size_t at) {
  const auto byte = [&](std::size_t i) { return static_cast<unsigned char>(text[i]); };
  const std::uint32_t first = byte(at);
  if (first < 0x80) return {first, 1};
  const std::size_t length = first >= 0xF0 && first < 0xF8 ? 4 : first >= 0xE0 ? 3 : first >= 0xC2 ? 2 : 0;
  if (first >= 0xF8 || length == 0 || at + length > text.size()) return {0xFFFD, 1};
  std::uint32_t code = first & (0xFFu >> (length + 1));
  for (std::size_t i = 1; i < length; ++i) {
    if ((byte(at + i) & 0xC0) != 0x80) return {0xFFFD, 1};
    code = code << 6 | (byte(at + i) & 0x3F);
  }
  return {code, length};
}

bool is_digit(std::uint32_t c) { return c >= '0' && c <= '9'; }

bool is_blank(std::uint32_t c) {
  return c == ' ' || c == '\t' || c == '\n' || c == '\r' || c == 0xA0 || c == 0x1680 ||
         (c >= 0x2000 && c <= 0x200B) || c == 0x202F || c == 0x205F || c == 0x2060 || c == 0x3000 ||
         c == 0xFEFF;
}

// Letters of every script, without a table of Unicode: beyond ASCII, all but the blocks of signs.
bool is_letter(std::uint32_t c) {
  if (c < 0x80) return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z') || c == '_';
  if (c < 0xC0) return c == 0xAA || c == 0xB5 || c == 0xBA;
  if (c == 0xD7 || c == 0xF7 || c == 0xFFFD) return false;
  if (c >= 0x2080 && c <= 0x209C) return true;  // subscripts, as in β₁
  if (c >= 0x2000 && c <= 0x2BFF) return c >= 0x2100 && c <= 0x218F;
  if (c >= 0x2E00 && c <= 0x2E7F) return false;
  if (c >= 0x3000 && c <= 0x3004) return false;
  if (c >= 0x3008 && c <= 0x3020) return false;
  if (c >= 0xD800 && c <= 0xF8FF) return false;
  if (c >= 0xFE00 && c <= 0xFE6F) return false;
  if (c >= 0xFF00 && c <= 0xFF20) return false;
  if (c >= 0xFFF0 && c <= 0xFFFF) return false;
  return c < 0x1F000 || c > 0x1FAFF;
}

bool opens_quote(std::uint32_t c) { return c == '"' || c == 0x201C || c == 0x201D || c == 0x201E; }

class Reader {
 public:
  explicit Reader(std::string_view text) : text_(text) {}

  Result<std::vector<Token>> read() {
    if (text_.size() > kMostBytes)
      return Error{"", "this text is longer than 200,000 bytes", "write the restrictions of one claim alone"};
    std::vector<Token> tokens;
    for (;;) {
      bool blank = false, line_break = false;
      while (at_ < text_.size() && is_blank(here().code)) {
        blank = true;
        line_break = line_break || here().code == '\n';
        advance();
      }
      Token token;
      token.character = character_;
      token.begin = at_;
      token.after_blank = blank;
      token.after_break = line_break;
      if (at_ == text_.size()) {
        token.end = at_;
        tokens.push_back(token);
        return tokens;
      }
      if (Error error; !read_one(token, error)) return error;
      token.end = at_;
      if (token.kind != Token::Kind::Name)
        token.text = std::string(text_.substr(token.begin, token.end - token.begin));
      tokens.push_back(std::move(token));
    }
  }

 private:
  Character here() const { return character_at(text_, at_); }
  std::uint32_t code_at(std::size_t byte) const {
    return byte < text_.size() ? character_at(text_, byte).code : 0;
  }
  void advance() {
    at_ += here().bytes;
    ++character_;
  }

  bool read_one(Token& token, Error& error) {
    const std::uint32_t c = here().code;
    if (opens_quote(c)) return read_quoted(token, error);
    if (is_letter(c)) {
      const std::size_t begin = at_;
      while (at_ < text_.size() && (is_letter(here().code) || is_digit(here().code))) advance();
      token.kind = Token::Kind::Name;
      token.text = std::string(text_.substr(begin, at_ - begin));
      return true;
    }
    if (is_digit(c) || (c == '.' && is_digit(code_at(at_ + 1)) && !follows_name()))
      return read_number(token, error);
    switch (c) {
      case '+':
        token.kind = Token::Kind::Plus;
        break;
      case '-':
      case 0x2010:
      case 0x2011:
      case 0x2012:
      case 0x2013:
      case 0x2014:
      case 0x2212:
      case 0xFE63:
      case 0xFF0D:
        token.kind = Token::Kind::Minus;
        break;
      case '*':
      case 0xB7:
      case 0xD7:
      case 0x22C5:
      case 0x2217:
      case 0x2219:
        token.kind = Token::Kind::Times;
        break;
      case '/':
      case 0xF7:
      case 0x2044:
      case 0x2215:
        token.kind = Token::Kind::Divide;
        break;
      case '^':
        token.kind = Token::Kind::Power;
        break;
      case '=':
      case 0xFF1D:
        token.kind = Token::Kind::Equals;
        break;
      case ',':
      case ';':
        token.kind = Token::Kind::Separator;
        break;
      case '(':
        token.kind = Token::Kind::Open;
        break;
      case ')':
        token.kind = Token::Kind::Close;
        break;
      case '.':
        token.kind = Token::Kind::Dot;
        break;
      default:
        return refuse(c, error);
    }
    advance();
    if (token.kind == Token::Kind::Equals && code_at(at_) == '=') {
      error = {at_character(character_), "two signs of equality stand side by side", "write one: a = b"};
      return false;
    }
    return true;
  }

  // After a name a point belongs to column.term, even before a digit.
  bool follows_name() const {
    return at_ > 0 && (is_letter(previous()) || is_digit(previous()) || previous() == '"');
  }
  std::uint32_t previous() const {
    std::size_t back = at_ - 1;
    while (back > 0 && (static_cast<unsigned char>(text_[back]) & 0xC0) == 0x80) --back;
    return character_at(text_, back).code;
  }

  bool read_quoted(Token& token, Error& error) {
    const int begin = character_;
    const bool straight = here().code == '"';
    advance();
    token.kind = Token::Kind::Name;
    token.quoted = true;
    for (;;) {
      if (at_ == text_.size()) {
        error = {at_character(begin), "the name that begins here has no closing quote",
                 "add \" where the name ends"};
        return false;
      }
      const Character c = here();
      if (straight ? c.code == '"' : c.code == 0x201C || c.code == 0x201D) break;
      if (c.code < 0x20 && c.code != '\t' && c.code != '\n' && c.code != '\r') return refuse(c.code, error);
      if (c.code == '\\' && (code_at(at_ + 1) == '"' || code_at(at_ + 1) == '\\')) advance();
      token.text += text_.substr(at_, here().bytes);
      advance();
    }
    advance();
    if (token.text.find_first_not_of(" \t\n\r") == std::string::npos) {
      error = {at_character(begin), "a name with nothing in it", "put the term's name between the quotes"};
      return false;
    }
    return true;
  }

  bool read_number(Token& token, Error& error) {
    const int begin = character_;
    std::string digits;
    const auto take_digits = [&] {
      while (at_ < text_.size() && is_digit(here().code)) {
        digits += text_[at_];
        advance();
      }
    };
    take_digits();
    if (at_ < text_.size() && text_[at_] == '.') {
      const std::uint32_t next = code_at(at_ + 1);
      if (is_letter(next) || opens_quote(next)) {
        error = {at_character(begin), "a name that is a number stands before a point",
                 "put the column's name in double quotes: \"" + digits + "\".fare"};
        return false;
      }
      digits += '.';
      advance();
      take_digits();
    }
    // An exponent only where digits follow: "2e" is twice the term e.
    if (at_ < text_.size() && (text_[at_] == 'e' || text_[at_] == 'E')) {
      std::size_t look = at_ + 1;
      std::size_t sign_bytes = 0;
      bool negative = false;
      if (look < text_.size()) {
        const Character sign = character_at(text_, look);
        if (sign.code == '+' || sign.code == '-' || sign.code == 0x2212 || sign.code == 0x2013) {
          negative = sign.code != '+';
          sign_bytes = sign.bytes;
        }
      }
      if (is_digit(code_at(look + sign_bytes))) {
        advance();
        if (sign_bytes > 0) advance();
        digits += negative ? "e-" : "e";
        take_digits();
      }
    }
    token.kind = Token::Kind::Number;
    token.number = std::strtod(digits.c_str(), nullptr);
    if (!std::isfinite(token.number)) {
      error = {at_character(begin), "a number too large to compute with", "numbers reach to about 1.8e308"};
      return false;
    }
    return true;
  }

  bool refuse(std::uint32_t c, Error& error) const {
    error.where = at_character(character_);
    const std::string sign(text_.substr(at_, here().bytes));
    if (c < 0x20 || (c >= 0x7F && c < 0xA0)) {
      error.what = "a control character, which cannot be seen";
      error.mend = "take it away, or type the restriction anew";
    } else if (c == '<' || c == '>' || c == 0x2264 || c == 0x2265 || c == 0x2260 || c == '!') {
      error.what = sign + " states no equality";
      error.mend = "write the values at which the claim holds as an equality: fare = 0";
    } else if (c == '[' || c == ']' || c == '{' || c == '}') {
      error.what = sign + " is no sign of this language";
      error.mend = "use round brackets, or put a name that holds it in double quotes";
    } else if (c == '\'' || c == 0x2018 || c == 0x2019) {
      error.what = "single quotes enclose no name";
      error.mend = "use double quotes: \"fuel price\"";
    } else if (c == 0xFFFD) {
      error.what = "a byte that is no character";
      error.mend = "save the file as UTF-8";
    } else {
      error.what = sign + " has no meaning here";
      error.mend = "names with signs stand in double quotes: \"fuel price (log)\"";
    }
    return false;
  }

  std::string_view text_;
  std::size_t at_ = 0;
  int character_ = 1;
};

}  // namespace

Result<std::vector<Token>> read_tokens(std::string_view text) { return Reader(text).read(); }

bool is_plain_name(std::string_view name) {
  if (name.empty() || name == "all") return false;
  for (std::size_t at = 0; at < name.size();) {
    const Character c = character_at(name, at);
    if (!is_letter(c.code) && (at == 0 || !is_digit(c.code))) return false;
    at += c.bytes;
  }
  return true;
}

std::string written_name(std::string_view name) {
  if (is_plain_name(name)) return std::string(name);
  std::string text = "\"";
  for (const char c : name) {
    if (c == '"' || c == '\\') text += '\\';
    text += c;
  }
  return text + '"';
}

std::string at_character(int character) { return "character " + std::to_string(character); }

}  // namespace rejoinder
