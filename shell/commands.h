// What each verb of the program does. Exit status: 0 no finding conflicts; 1 one does, or an audit line does; 2 something
// could not be read (the rest is done all the same).
#pragma once

#include <string>
#include <vector>

#include "shell/quick_review.h"

namespace rejoinder {

struct Output {
  bool json = false;
  bool working = false;
};

// Checks every file, in order, and prints the findings. A file that cannot be read is told on standard error.
int check_files(const std::vector<std::string>& files, const Output& output);

// Checks a review made from flags.
int check_quick(const Node& document, const Output& output);
int check_quick(const Result<Node>& document, const Output& output);

// The whole text of a file, or the reason why it cannot be read. "-" is standard input.
Result<std::string> read_file(const std::string& name);

}  // namespace rejoinder
