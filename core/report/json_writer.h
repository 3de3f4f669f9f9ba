// Writes JSON text piece by piece, with two-blank indents for objects in lists and short arrays on one line.
#pragma once

#include <string>
#include <string_view>
#include <vector>

namespace rejoinder {

class JsonWriter {
 public:
  void begin_object();
  void end_object();
  void begin_list();
  void end_list();
  void key(std::string_view name);
  void text(std::string_view value);    // escaped; bytes that are no UTF-8 become U+FFFD
  void number(double value);            // "inf" and "-inf" as strings; contract: not NaN
  void integer(long value);
  void truth(bool value);
  void null();

  const std::string& str() const { return out_; }

 private:
  void before_value();
  void line();

  std::string out_;
  std::vector<bool> has_items_;
  bool after_key_ = false;
};

}  // namespace rejoinder
