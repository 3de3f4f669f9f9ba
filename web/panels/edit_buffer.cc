#include "web/panels/edit_buffer.h"

#include <algorithm>
#include <utility>

namespace rejoinder {
namespace {

bool continues_a_character(char c) { return (static_cast<unsigned char>(c) & 0xC0) == 0x80; }

// Letters, digits and everything outside ASCII belong to words.
bool of_a_word(char c) {
  const auto u = static_cast<unsigned char>(c);
  return u >= 0x80 || c == '_' || (u >= '0' && u <= '9') || ((u | 0x20) >= 'a' && (u | 0x20) <= 'z');
}

}  // namespace

EditBuffer::EditBuffer(std::string text, bool all_selected) : text_(std::move(text)) {
  caret_ = text_.size();
  anchor_ = all_selected ? 0 : caret_;
}

void EditBuffer::insert(std::string_view text) {
  const size_t begin = selection_begin();
  text_.replace(begin, selection_end() - begin, text);
  caret_ = anchor_ = begin + text.size();
}

bool EditBuffer::erase_backward(bool word) {
  if (caret_ == anchor_) anchor_ = before(caret_, word);
  if (caret_ == anchor_) return false;
  insert("");
  return true;
}

bool EditBuffer::erase_forward(bool word) {
  if (caret_ == anchor_) anchor_ = after(caret_, word);
  if (caret_ == anchor_) return false;
  insert("");
  return true;
}

void EditBuffer::move_to(size_t at, bool extend) {
  caret_ = std::min(at, text_.size());
  while (caret_ > 0 && caret_ < text_.size() && continues_a_character(text_[caret_])) --caret_;
  if (!extend) anchor_ = caret_;
}

void EditBuffer::move_left(bool word, bool extend) {
  move_to(!extend && caret_ != anchor_ && !word ? selection_begin() : before(caret_, word), extend);
}

void EditBuffer::move_right(bool word, bool extend) {
  move_to(!extend && caret_ != anchor_ && !word ? selection_end() : after(caret_, word), extend);
}

void EditBuffer::select_all() {
  anchor_ = 0;
  caret_ = text_.size();
}

void EditBuffer::select_word(size_t at) {
  size_t begin = std::min(at, text_.size()), end = begin;
  while (begin > 0 && of_a_word(text_[begin - 1])) --begin;
  while (end < text_.size() && of_a_word(text_[end])) ++end;
  anchor_ = begin;
  caret_ = end;
}

size_t EditBuffer::before(size_t at, bool word) const {
  if (word) {
    while (at > 0 && !of_a_word(text_[at - 1])) --at;
    while (at > 0 && of_a_word(text_[at - 1])) --at;
    return at;
  }
  if (at > 0) --at;
  while (at > 0 && continues_a_character(text_[at])) --at;
  return at;
}

size_t EditBuffer::after(size_t at, bool word) const {
  if (word) {
    while (at < text_.size() && !of_a_word(text_[at])) ++at;
    while (at < text_.size() && of_a_word(text_[at])) ++at;
    return at;
  }
  if (at < text_.size()) ++at;
  while (at < text_.size() && continues_a_character(text_[at])) ++at;
  return at;
}

}  // namespace rejoinder
