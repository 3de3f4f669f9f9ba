#include "shell/commands.h"

#include <cerrno>
#include <cstdio>
#include <cstring>

#include "core/judge/finding.h"
#include "core/report/findings_json.h"
#include "core/report/findings_text.h"
#include "core/review/review.h"

namespace rejoinder {
namespace {

int status_of(const CheckedReview& checked) { return checked.any_conflict() ? 1 : 0; }

void print(const std::vector<CheckedReview>& all, const Output& output) {
  if (output.json) {
    std::fputs(findings_json(all).c_str(), stdout);
    return;
  }
  TextChoices choices;
  choices.working = output.working;
  for (std::size_t i = 0; i < all.size(); ++i) {
    if (i > 0) std::fputs("\n", stdout);
    std::fputs(findings_text(all[i], choices).c_str(), stdout);
  }
}

}  // namespace

Result<std::string> read_file(const std::string& name) {
  std::FILE* file = name == "-" ? stdin : std::fopen(name.c_str(), "rb");
  if (!file) return Error{name, std::string("the file cannot be opened (") + std::strerror(errno) + ")", "check its name and place"};
  std::string text;
  char buffer[65536];
  std::size_t got = 0;
  while ((got = std::fread(buffer, 1, sizeof buffer, file)) > 0) text.append(buffer, got);
  const bool broken = std::ferror(file) != 0;
  if (file != stdin) std::fclose(file);
  if (broken) return Error{name, "the file cannot be read", "check that it is a file and not a folder"};
  return text;
}

int check_files(const std::vector<std::string>& files, const Output& output) {
  std::vector<CheckedReview> all;
  int status = 0;
  bool unread = false;
  for (const std::string& name : files) {
    Result<std::string> text = read_file(name);
    if (!text.ok()) {
      std::fprintf(stderr, "%s\n", text.error().text().c_str());
      unread = true;
      continue;
    }
    Result<Node> document = read_document(text.value());
    if (!document.ok()) {
      Error error = document.error();
      error.where = name + (error.where.empty() ? "" : ", " + error.where);
      std::fprintf(stderr, "%s\n", error.text().c_str());
      unread = true;
      continue;
    }
    const Review review = read_review(document.value());
    for (const Problem& problem : review.problems) std::fprintf(stderr, "%s, %s\n", name.c_str(), problem.text().c_str());
    all.push_back(check_review(review));
    if (all.back().title.empty()) all.back().title = name;
    status = std::max(status, status_of(all.back()));
  }
  if (!all.empty()) print(all, output);
  return unread ? 2 : status;
}

int check_quick(const Node& document, const Output& output) {
  const Review review = read_review(document);
  if (!review.problems.empty()) {
    for (const Problem& problem : review.problems)
      std::fprintf(stderr, "%s\n", Error{problem.key, problem.what, problem.mend}.text().c_str());
    return 2;
  }
  CheckedReview checked = check_review(review);
  checked.title = "Quick calculation";
  print({checked}, output);
  return status_of(checked);
}

int check_quick(const Result<Node>& document, const Output& output) {
  if (document.ok()) return check_quick(document.value(), output);
  std::fprintf(stderr, "%s\n", document.error().text().c_str());
  return 2;
}

}  // namespace rejoinder
