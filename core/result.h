// A value, or the reason why there is none.
//
// The core throws nothing: whatever the user typed, a function answers with a value or with an Error that says
// where, what, and how to mend it. Example:
//
//   Result<PrintedNumber> number = read_printed_number("0.5O");
//   if (!number.ok()) show(number.error().text());
#pragma once

#include <cassert>
#include <string>
#include <utility>
#include <variant>

namespace rejoinder {

// Text for a person about their own input. `where` may be empty while the place is still unknown; whoever knows
// more of the place adds it on the way up.
struct Error {
  std::string where;  // "fares.toml, line 12, se of \"fare\""
  std::string what;   // what cannot be read, in plain words
  std::string mend;   // what would help

  // "where: what; mend", leaving out what is empty.
  std::string text() const {
    std::string all = where.empty() ? what : where + ": " + what;
    return mend.empty() ? all : all + "; " + mend;
  }
};

template <class T>
class Result {
 public:
  Result(T value) : held_(std::move(value)) {}
  Result(Error error) : held_(std::move(error)) {}

  bool ok() const { return held_.index() == 0; }
  // Contract: ok().
  const T& value() const& {
    assert(ok());
    return std::get<0>(held_);
  }
  T&& value() && {
    assert(ok());
    return std::get<0>(std::move(held_));
  }
  // Contract: !ok().
  const Error& error() const {
    assert(!ok());
    return std::get<1>(held_);
  }

 private:
  std::variant<T, Error> held_;
};

}  // namespace rejoinder
