#include "core/report/json_writer.h"

#include <cassert>
#include <cmath>
#include <cstdio>

#include "core/number/number_text.h"

namespace rejoinder {
namespace {

// Length of the well-formed UTF-8 sequence at `at`, or 0.
std::size_t sequence_length(std::string_view text, std::size_t at) {
  const auto byte = [&](std::size_t i) { return static_cast<unsigned char>(text[i]); };
  const unsigned char first = byte(at);
  if (first < 0x80) return 1;
  const std::size_t length = first >= 0xC2 && first <= 0xDF ? 2 : first >= 0xE0 && first <= 0xEF ? 3 : first >= 0xF0 && first <= 0xF4 ? 4 : 0;
  if (length == 0 || at + length > text.size()) return 0;
  for (std::size_t i = 1; i < length; ++i)
    if ((byte(at + i) & 0xC0) != 0x80) return 0;
  // Overlong forms, surrogates and what lies beyond U+10FFFF.
  if (first == 0xE0 && byte(at + 1) < 0xA0) return 0;
  if (first == 0xED && byte(at + 1) > 0x9F) return 0;
  if (first == 0xF0 && byte(at + 1) < 0x90) return 0;
  if (first == 0xF4 && byte(at + 1) > 0x8F) return 0;
  return length;
}

}  // namespace

void JsonWriter::line() {
  out_ += '\n';
  out_.append(2 * has_items_.size(), ' ');
}

void JsonWriter::before_value() {
  if (after_key_) {
    after_key_ = false;
    return;
  }
  if (has_items_.empty()) return;
  if (has_items_.back()) out_ += ',';
  has_items_.back() = true;
  line();
}

void JsonWriter::begin_object() {
  before_value();
  out_ += '{';
  has_items_.push_back(false);
}

void JsonWriter::end_object() {
  const bool any = has_items_.back();
  has_items_.pop_back();
  if (any) line();
  out_ += '}';
}

void JsonWriter::begin_list() {
  before_value();
  out_ += '[';
  has_items_.push_back(false);
}

void JsonWriter::end_list() {
  const bool any = has_items_.back();
  has_items_.pop_back();
  if (any) line();
  out_ += ']';
}

void JsonWriter::key(std::string_view name) {
  if (has_items_.back()) out_ += ',';
  has_items_.back() = true;
  line();
  after_key_ = true;
  std::string quoted;
  quoted += '"';
  quoted += name;
  quoted += "\": ";
  out_ += quoted;
}

void JsonWriter::text(std::string_view value) {
  before_value();
  out_ += '"';
  for (std::size_t i = 0; i < value.size();) {
    const std::size_t length = sequence_length(value, i);
    if (length == 0) {
      out_ += "\xEF\xBF\xBD";
      ++i;
      continue;
    }
    const char c = value[i];
    if (length > 1) {
      out_.append(value.substr(i, length));
    } else if (c == '"' || c == '\\') {
      out_ += '\\';
      out_ += c;
    } else if (c == '\n') {
      out_ += "\\n";
    } else if (c == '\t') {
      out_ += "\\t";
    } else if (static_cast<unsigned char>(c) < 0x20 || c == 0x7F) {
      char escaped[8];
      std::snprintf(escaped, sizeof escaped, "\\u%04x", static_cast<unsigned>(static_cast<unsigned char>(c)));
      out_ += escaped;
    } else {
      out_ += c;
    }
    i += length;
  }
  out_ += '"';
}

void JsonWriter::number(double value) {
  assert(!std::isnan(value));
  if (std::isinf(value)) {
    text(exact_text(value));
    return;
  }
  before_value();
  out_ += exact_text(value == 0 ? 0.0 : value);  // no negative zero
}

void JsonWriter::integer(long value) {
  before_value();
  out_ += std::to_string(value);
}

void JsonWriter::truth(bool value) {
  before_value();
  out_ += value ? "true" : "false";
}

void JsonWriter::null() {
  before_value();
  out_ += "null";
}

}  // namespace rejoinder
