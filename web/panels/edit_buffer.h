// The text of the field being typed in, with caret and selection. Knows nothing of drawing or keys.
//
// This is the only state outside AppState: every change is handed on at once as an intent, so what the reader
// types is in the review with the same keystroke.
#pragma once

#include <string>
#include <string_view>

namespace rejoinder {

class EditBuffer {
 public:
  EditBuffer() = default;
  // The caret stands at the end, or everything is selected.
  explicit EditBuffer(std::string text, bool all_selected = false);

  const std::string& text() const { return text_; }
  // Both in bytes, always between characters. Equal where nothing is selected.
  size_t caret() const { return caret_; }
  size_t anchor() const { return anchor_; }
  size_t selection_begin() const { return caret_ < anchor_ ? caret_ : anchor_; }
  size_t selection_end() const { return caret_ < anchor_ ? anchor_ : caret_; }
  std::string selected() const {
    return text_.substr(selection_begin(), selection_end() - selection_begin());
  }

  // Replaces what is selected. Bytes of the text are taken as they are: UTF-8.
  void insert(std::string_view text);
  // Takes the selection away, or one character (or word) beside the caret. Returns whether anything changed.
  bool erase_backward(bool word);
  bool erase_forward(bool word);

  // Caret to byte `at`; `extend` keeps the anchor where it is.
  void move_to(size_t at, bool extend);
  void move_left(bool word, bool extend);
  void move_right(bool word, bool extend);
  void select_all();
  void select_word(size_t at);

 private:
  size_t before(size_t at, bool word) const;
  size_t after(size_t at, bool word) const;

  std::string text_;
  size_t caret_ = 0, anchor_ = 0;
};

}  // namespace rejoinder
