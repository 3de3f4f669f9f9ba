#include <algorithm>
#include <utility>

#include "core/review/document.h"

namespace rejoinder {
namespace {

bool is_digit(char c) { return c >= '0' && c <= '9'; }

// Digits of `base` with single underscores between them.
bool is_digits(std::string_view text, int base = 10) {
  bool after_digit = false;
  for (const char c : text) {
    const int value = is_digit(c)            ? c - '0'
                      : c >= 'a' && c <= 'f' ? c - 'a' + 10
                      : c >= 'A' && c <= 'F' ? c - 'A' + 10
                                             : 99;
    if (c == '_' ? !after_digit : value >= base) return false;
    after_digit = c != '_';
  }
  return after_digit;
}

bool is_number(std::string_view text) {
  const bool sign = !text.empty() && (text[0] == '+' || text[0] == '-');
  const std::string_view body = text.substr(sign ? 1 : 0);
  if (body == "inf" || body == "nan") return true;
  if (body.size() > 2 && body[0] == '0' && !sign) {
    if (body[1] == 'x') return is_digits(body.substr(2), 16);
    if (body[1] == 'o') return is_digits(body.substr(2), 8);
    if (body[1] == 'b') return is_digits(body.substr(2), 2);
  }
  const std::size_t exponent = body.find_first_of("eE");
  std::string_view mantissa = body.substr(0, exponent);
  if (exponent != std::string_view::npos) {
    std::string_view power = body.substr(exponent + 1);
    if (!power.empty() && (power[0] == '+' || power[0] == '-')) power.remove_prefix(1);
    if (!is_digits(power)) return false;
  }
  const std::size_t point = mantissa.find('.');
  const std::string_view whole = mantissa.substr(0, point);
  if (point != std::string_view::npos && !is_digits(mantissa.substr(point + 1))) return false;
  return is_digits(whole) && (whole.size() == 1 || whole[0] != '0');
}

// 1979-05-27, 07:32:00 or both, with the digits in their places; the library checks the calendar.
bool is_date_or_time(std::string_view text) {
  std::string shape;
  for (const char c : text) shape += is_digit(c) ? '0' : c;
  const auto time_of_day = [](std::string_view s) {
    if (s.substr(0, 8) != "00:00:00") return false;
    s.remove_prefix(8);
    if (s.empty()) return true;
    return s[0] == '.' && s.size() > 1 && s.find_first_not_of('0', 1) == std::string_view::npos;
  };
  if (time_of_day(shape)) return true;
  if (shape.substr(0, 10) != "0000-00-00") return false;
  if (shape.size() == 10) return true;
  if (shape[10] != 'T' && shape[10] != 't' && shape[10] != ' ') return false;
  std::string_view time = std::string_view(shape).substr(11);
  if (!time.empty() && (time.back() == 'Z' || time.back() == 'z'))
    time.remove_suffix(1);
  else if (time.size() > 6 &&
           (time.substr(time.size() - 6) == "+00:00" || time.substr(time.size() - 6) == "-00:00"))
    time.remove_suffix(6);
  return time_of_day(time);
}

}  // namespace

bool takes_header(const Node& node) {
  if (node.inline_form) return false;
  if (node.kind == Node::Kind::Table) return true;
  if (node.kind != Node::Kind::List || node.items.empty()) return false;
  return std::all_of(node.items.begin(), node.items.end(),
                     [](const Node& item) { return item.kind == Node::Kind::Table; });
}

Node Node::quoted(std::string text) {
  Node node;
  node.kind = Kind::Text;
  node.text = std::move(text);
  return node;
}

Node Node::literal(std::string text) {
  Node node;
  node.kind = Kind::Literal;
  node.text = std::move(text);
  return node;
}

Node Node::list(std::vector<Node> items) {
  Node node;
  node.kind = Kind::List;
  node.items = std::move(items);
  return node;
}

Node Node::table(bool inline_form) {
  Node node;
  node.kind = Kind::Table;
  node.inline_form = inline_form;
  return node;
}

const Node* Node::find(std::string_view key) const {
  if (kind != Kind::Table) return nullptr;
  for (const Entry& entry : entries)
    if (entry.key == key) return &entry.value;
  return nullptr;
}

Node* Node::find(std::string_view key) { return const_cast<Node*>(std::as_const(*this).find(key)); }

Node& Node::set(std::string_view key, Node value) {
  if (Node* known = find(key)) {
    *known = std::move(value);
    return *known;
  }
  std::size_t at = entries.size();
  if (!takes_header(value))
    while (at > 0 && takes_header(entries[at - 1].value)) --at;
  const auto placed = entries.insert(entries.begin() + static_cast<std::ptrdiff_t>(at),
                                     Entry{std::string(key), std::move(value), {}});
  return placed->value;
}

bool Node::erase(std::string_view key) {
  const auto found =
      std::find_if(entries.begin(), entries.end(), [&](const Entry& entry) { return entry.key == key; });
  if (found == entries.end()) return false;
  entries.erase(found);
  return true;
}

bool Node::operator==(const Node& other) const {
  if (kind != other.kind || text != other.text || items.size() != other.items.size() ||
      entries.size() != other.entries.size())
    return false;
  for (std::size_t i = 0; i < items.size(); ++i)
    if (!(items[i] == other.items[i])) return false;
  for (std::size_t i = 0; i < entries.size(); ++i)
    if (entries[i].key != other.entries[i].key || !(entries[i].value == other.entries[i].value)) return false;
  return true;
}

bool is_literal(std::string_view text) {
  return text == "true" || text == "false" || is_number(text) || is_date_or_time(text);
}

}  // namespace rejoinder
