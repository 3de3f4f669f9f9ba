#include "tests/support/json.h"

#include <cstddef>

namespace rejoinder::testing {
namespace {

class Reader {
 public:
  explicit Reader(std::string_view text) : text_(text) {}

  Json read_all() {
    Json value = read();
    skip_blanks();
    return fine_ && at_ == text_.size() ? value : Json{};
  }

 private:
  bool next_is(char c) const { return at_ < text_.size() && text_[at_] == c; }
  bool take(char c) {
    skip_blanks();
    if (!next_is(c)) return false;
    ++at_;
    return true;
  }
  bool take_word(std::string_view word) {
    if (text_.substr(at_, word.size()) != word) return false;
    at_ += word.size();
    return true;
  }
  void skip_blanks() {
    while (at_ < text_.size() && std::string_view(" \t\r\n").find(text_[at_]) != std::string_view::npos)
      ++at_;
  }

  Json read() {
    skip_blanks();
    Json value;
    if (take('{')) {
      value.kind = Json::Kind::Object;
      if (take('}')) return value;
      do {
        skip_blanks();
        std::string name = read_text();
        fine_ = fine_ && take(':');
        value.members.emplace_back(std::move(name), fine_ ? read() : Json{});
      } while (fine_ && take(','));
      fine_ = fine_ && take('}');
    } else if (take('[')) {
      value.kind = Json::Kind::List;
      if (take(']')) return value;
      do value.items.push_back(read());
      while (fine_ && take(','));
      fine_ = fine_ && take(']');
    } else if (next_is('"')) {
      value.kind = Json::Kind::Text;
      value.text = read_text();
    } else if (take_word("true")) {
      value.kind = Json::Kind::True;
    } else if (take_word("false")) {
      value.kind = Json::Kind::False;
    } else if (!take_word("null")) {
      value.kind = Json::Kind::Number;
      while (at_ < text_.size() &&
             std::string_view("+-.eE0123456789").find(text_[at_]) != std::string_view::npos)
        value.text.push_back(text_[at_++]);
      fine_ = fine_ && !value.text.empty();
    }
    return value;
  }

  // The reference files hold plain characters, escaped quotes and escaped backslashes; any other escape
  // stops.
  std::string read_text() {
    std::string result;
    fine_ = fine_ && take('"');
    while (fine_ && !next_is('"')) {
      const bool escaped = next_is('\\');
      if (escaped) ++at_;
      fine_ = at_ < text_.size() && (!escaped || next_is('"') || next_is('\\') || next_is('/'));
      if (fine_) result.push_back(text_[at_++]);
    }
    fine_ = fine_ && take('"');
    return result;
  }

  std::string_view text_;
  std::size_t at_ = 0;
  bool fine_ = true;
};

}  // namespace

bool Json::has(std::string_view name) const {
  for (const auto& member : members)
    if (member.first == name) return true;
  return false;
}

const Json& Json::at(std::string_view name) const {
  static const Json none;
  for (const auto& member : members)
    if (member.first == name) return member.second;
  return none;
}

Json read_json(std::string_view text) { return Reader(text).read_all(); }

}  // namespace rejoinder::testing
