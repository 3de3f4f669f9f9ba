#include "tests/support/json.h"

#include <cstddef>
#include <cstdlib>

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

  // One character after a backslash. Escapes by number are read below U+0080 only: the files hold UTF-8 as it is.
  bool read_escape(std::string& result) {
    if (at_ >= text_.size()) return false;
    const char c = text_[at_++];
    switch (c) {
      case '"':
      case '\\':
      case '/':
        result.push_back(c);
        return true;
      case 'n':
        result.push_back('\n');
        return true;
      case 't':
        result.push_back('\t');
        return true;
      case 'u': {
        if (at_ + 4 > text_.size()) return false;
        const long code = std::strtol(std::string(text_.substr(at_, 4)).c_str(), nullptr, 16);
        at_ += 4;
        if (code <= 0 || code >= 0x80) return false;
        result.push_back(static_cast<char>(code));
        return true;
      }
      default:
        return false;
    }
  }

  std::string read_text() {
    std::string result;
    fine_ = fine_ && take('"');
    while (fine_ && at_ < text_.size() && !next_is('"')) {
      const char c = text_[at_++];
      if (c == '\\')
        fine_ = read_escape(result);
      else
        result.push_back(c);
    }
    // Not take(): a blank before the closing quote belongs to the text.
    fine_ = fine_ && next_is('"');
    if (fine_) ++at_;
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
