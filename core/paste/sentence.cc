#include "core/paste/sentence.h"

#include <cctype>

#include "core/paste/plain_text.h"

namespace rejoinder {
namespace {

bool is_digit(char c) { return c >= '0' && c <= '9'; }
bool is_letter(char c) { return std::isalpha(static_cast<unsigned char>(c)) || (c & 0x80); }

// A place in the plain text of the sentence.
class Reader {
 public:
  Reader(const PlainLine& line, int at) : held_(&line), at_(at) {}

  int at() const { return at_; }
  void skip_blanks() {
    while (at_ < held_->size() && held_->plain[at_] == ' ') ++at_;
  }
  bool take(std::string_view text) {
    skip_blanks();
    if (lower_case(std::string_view(held_->plain).substr(at_, text.size())) != text) return false;
    at_ += static_cast<int>(text.size());
    return true;
  }
  bool take_any(std::initializer_list<std::string_view> texts) {
    for (const std::string_view text : texts)
      if (take(text)) return true;
    return false;
  }
  // Digits alone.
  std::string whole() {
    skip_blanks();
    const int from = at_;
    while (at_ < held_->size() && is_digit(held_->plain[at_])) ++at_;
    return held_->plain.substr(from, at_ - from);
  }
  // A figure as printed. A comma inside counts where digits in threes follow it, so that "2, 410" stays two.
  std::string figure() {
    skip_blanks();
    int end = at_;
    const std::string& s = held_->plain;
    const auto digit = [&](int i) { return i < held_->size() && is_digit(s[i]); };
    if (end < held_->size() && s[end] == '-') ++end;
    const int digits_from = end;
    while (digit(end)) ++end;
    while (end > digits_from && end < held_->size() && s[end] == ',' && digit(end + 1) && digit(end + 2) &&
           digit(end + 3) && !digit(end + 4))
      end += 4;
    if (end < held_->size() && s[end] == '.' && digit(end + 1)) {
      ++end;
      while (digit(end)) ++end;
    }
    if (end == digits_from) return {};
    if (end < held_->size() && (s[end] == 'e' || s[end] == 'E')) {
      int exponent = end + 1;
      if (exponent < held_->size() && (s[exponent] == '-' || s[exponent] == '+')) ++exponent;
      if (digit(exponent)) {
        end = exponent;
        while (digit(end)) ++end;
      }
    }
    std::string found = held_->original(at_, end);
    at_ = end;
    return found;
  }

 private:
  const PlainLine* held_;
  int at_;
};

std::string without_commas(std::string text) {
  std::erase(text, ',');
  return text;
}

struct Degrees {
  std::string df1, df2;
  bool read = false;
};

// "(2, 410)", "[3]", "(3, N = 64)", "2,410": after the name of a statistic.
Degrees degrees_in_brackets(Reader& reader) {
  Reader ahead = reader;
  Degrees df;
  if (!ahead.take_any({"(", "["})) return df;
  ahead.take_any({"df =", "df="});
  df.df1 = ahead.whole();  // a comma after it parts the two, as in (2,410)
  if (df.df1.empty()) return {};
  if (ahead.take_any({",", ";"})) {
    if (ahead.take("n")) {  // the number of observations beside a chi-square's df
      ahead.take("=");
      ahead.figure();
    } else if (ahead.take_any({"inf", "\xE2\x88\x9E"})) {
      df.df2 = "inf";
    } else {
      df.df2 = without_commas(ahead.figure());
    }
  }
  if (!ahead.take_any({")", "]"})) return {};
  df.read = true;
  reader = ahead;
  return df;
}

// "F2,410 = 4.21": raised or lowered degrees of freedom that became plain digits.
Degrees degrees_without_brackets(Reader& reader, const std::string& plain) {
  Reader ahead = reader;
  Degrees df;
  int at = ahead.at();
  const auto whole = [&] {
    std::string digits;
    while (at < static_cast<int>(plain.size()) && is_digit(plain[at])) digits += plain[at++];
    return digits;
  };
  const auto blanks = [&] {
    while (at < static_cast<int>(plain.size()) && plain[at] == ' ') ++at;
  };
  df.df1 = whole();
  if (df.df1.empty() || at >= static_cast<int>(plain.size()) || plain[at] != ',') return {};
  ++at;
  blanks();
  df.df2 = whole();
  if (df.df2.empty()) return {};
  while (ahead.at() < at) {
    if (ahead.figure().empty() && !ahead.take(",")) return {};
  }
  df.read = true;
  reader = ahead;
  return df;
}

bool stands_alone(const std::string& plain, int at) {
  return at == 0 || !(is_letter(plain[at - 1]) || is_digit(plain[at - 1]));
}

bool read_f(const PlainLine& line, int at, ClaimSentence& claim) {
  if (line.plain[at] != 'F' || !stands_alone(line.plain, at)) return false;
  Reader reader(line, at + 1);
  reader.take_any({"-statistic", "-test", "-value", "statistic", "test", "change", "ratio", "-ratio"});
  Degrees df = degrees_in_brackets(reader);
  if (!df.read) df = degrees_without_brackets(reader, line.plain);
  reader.take_any({"statistic", "change", "of"});
  if (!reader.take_any({"=", ":", "is "})) {
    if (!df.read) return false;
  }
  const std::string value = reader.figure();
  if (value.empty()) return false;
  claim.f = value;
  claim.df1 = df.df1;
  claim.df2 = df.df2;
  return true;
}

bool read_chi_square(const PlainLine& line, int at, ClaimSentence& claim) {
  if (!stands_alone(line.plain, at)) return false;
  Reader reader(line, at);
  if (line.plain[at] == ' ') return false;
  if (!reader.take_any({"chi-squared", "chi-square", "chi squared", "chi square", "chisquare", "chi2",
                        "chi^2",
                        "\xCF\x87"
                        "2",
                        "\xCF\x87^2",
                        "\xCE\xA7"
                        "2",
                        "lr"}))
    return false;
  const Degrees df = degrees_in_brackets(reader);
  reader.take("statistic");
  if (!reader.take_any({"=", ":", "is ", "of "}) && !df.read) return false;
  const std::string value = reader.figure();
  if (value.empty()) return false;
  claim.chi2 = value;
  claim.df1 = df.df1;
  return true;
}

bool read_p(const PlainLine& line, int at, ClaimSentence& claim) {
  const char first = line.plain[at];
  if ((first != 'p' && first != 'P') || !stands_alone(line.plain, at)) return false;
  Reader reader(line, at + 1);
  reader.take_any({"-value", "value", "r > f", "rob > f", "> f", "rob > chi2", "> chi2"});
  Reader bracket = reader;  // "p(equal) = .03"
  if (bracket.take("(")) {
    int depth = bracket.at();
    while (depth < line.size() && line.plain[depth] != ')') ++depth;
    if (depth < line.size()) reader = Reader(line, depth + 1);
  }
  std::string sign;
  if (reader.take("<"))
    sign = "<";
  else if (reader.take(">"))
    sign = ">";
  else if (!reader.take_any({"=", "of ", "is "}))
    return false;
  const std::string value = reader.figure();
  if (value.empty()) return false;
  claim.p = sign + value;
  return true;
}

bool read_page(const PlainLine& line, int at, ClaimSentence& claim) {
  if (!stands_alone(line.plain, at)) return false;
  Reader reader(line, at);
  if (line.plain[at] == ' ' || !reader.take_any({"pp.", "p.", "page "})) return false;
  const int from = at;
  const std::string number = reader.figure();
  if (number.empty() || contains(number, ".")) return false;
  claim.page = line.original(from, reader.at());
  return true;
}

// What the words say of the decision, the clearest phrases only. "Not" within the clause before "significant"
// turns it.
std::optional<bool> decision_in_words(const std::string& plain) {
  const std::string words = lower_case(plain);
  for (const char* phrase : {"insignificant", "not reject", "not jointly signif", "not signif",
                             "no joint effect", "cannot be reject", "add nothing", "adds nothing",
                             "not be rejected", "non-significant", "nonsignificant"})
    if (contains(words, phrase)) return false;
  const std::size_t at = words.find("significan");
  if (at != std::string::npos) {
    const std::size_t clause = words.find_last_of(",;:.(", at);
    const std::string before = words.substr(clause == std::string::npos ? 0 : clause + 1,
                                            at - (clause == std::string::npos ? 0 : clause + 1));
    if (contains(" " + before, " not ") || contains(" " + before, " no ") || contains(before, "n't ") ||
        contains(" " + before, " neither "))
      return false;
    return true;
  }
  if (contains(words, "reject") || contains(words, "jointly improve") || contains(words, "matter jointly") ||
      contains(words, "jointly matter"))
    return true;
  return std::nullopt;
}

// Whole numbers without quotes, as people write them; anything else as printed.
Node count(const std::string& text) {
  const bool whole =
      text.find_first_not_of("0123456789") == std::string::npos && (text.size() == 1 || text[0] != '0');
  return whole ? Node::literal(text) : Node::quoted(text);
}

}  // namespace

std::optional<ClaimSentence> read_claim_sentence(std::string_view text) {
  std::string one_line(text.substr(0, 4000));
  for (char& c : one_line)
    if (c == '\n' || c == '\r' || c == '\t') c = ' ';
  one_line = trimmed(one_line);
  if (one_line.empty()) return std::nullopt;
  const std::vector<PlainLine> lines = plain_lines(one_line);
  const PlainLine& line = lines.front();

  ClaimSentence claim;
  claim.says = one_line;
  for (int at = 0; at < line.size(); ++at) {
    if (claim.f.empty() && claim.chi2.empty() &&
        (read_f(line, at, claim) || read_chi_square(line, at, claim)))
      continue;
    if (claim.p.empty() && read_p(line, at, claim)) continue;
    if (claim.page.empty()) read_page(line, at, claim);
  }
  claim.rejects = decision_in_words(line.plain);
  const bool statistic = !claim.f.empty() || !claim.chi2.empty();
  const bool joint = contains(lower_case(line.plain), "joint");
  if (!statistic && !(joint && (!claim.p.empty() || claim.rejects))) return std::nullopt;
  return claim;
}

Node claim_from_sentence(const ClaimSentence& sentence) {
  Node claim = Node::table(false);
  claim.set("says", Node::quoted(sentence.says));
  if (!sentence.f.empty()) claim.set("f", Node::quoted(sentence.f));
  if (!sentence.chi2.empty()) claim.set("chi2", Node::quoted(sentence.chi2));
  if (!sentence.df1.empty()) {
    std::vector<Node> df = {count(sentence.df1)};
    if (!sentence.df2.empty()) df.push_back(count(sentence.df2));
    claim.set("df", Node::list(std::move(df)));
  }
  if (!sentence.p.empty()) claim.set("p", Node::quoted(sentence.p));
  if (sentence.rejects) claim.set("rejects", Node::literal(*sentence.rejects ? "true" : "false"));
  if (!sentence.page.empty()) claim.set("page", Node::quoted(sentence.page));
  return claim;
}

}  // namespace rejoinder
