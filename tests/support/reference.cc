#include "tests/support/reference.h"

#include <gtest/gtest.h>

#include <cstdlib>
#include <fstream>
#include <limits>
#include <map>
#include <set>
#include <sstream>
#include <utility>

namespace rejoinder::testing {
namespace {

double as_double(const Json& value) {
  if (value.text == "inf") return std::numeric_limits<double>::infinity();
  if (value.text == "-inf") return -std::numeric_limits<double>::infinity();
  if (value.text.empty()) return std::numeric_limits<double>::quiet_NaN();  // no comparison holds for it
  return std::strtod(value.text.c_str(), nullptr);
}

ReferenceCase case_of(const Json& entry) {
  ReferenceCase result;
  result.id = entry.at("id").text;
  result.kind = entry.at("kind").text + entry.at("fn").text;  // the two files name it differently
  result.source = entry.at("source").text + entry.at("method").text;
  result.note = entry.at("note").text;
  result.inputs = entry.has("inputs") ? entry.at("inputs") : entry.at("input");
  result.expected = entry.at("expected");
  if (entry.has("value")) result.expected.members.emplace_back("value", entry.at("value"));
  result.recomputed = entry.at("recomputed");
  if (entry.has("cond")) result.condition = as_double(entry.at("cond"));
  result.disagrees = entry.at("recomputed_agrees").text == "disagrees";
  return result;
}

const std::vector<ReferenceCase>& all_cases(const std::string& file) {
  static std::map<std::string, std::vector<ReferenceCase>> read;
  const auto found = read.find(file);
  if (found != read.end()) return found->second;
  std::ifstream stream(std::string(REJOINDER_TEST_DATA) + "/" + file, std::ios::binary);
  std::ostringstream contents;
  contents << stream.rdbuf();
  const std::string text = contents.str();
  const Json whole = read_json(text);
  std::vector<ReferenceCase>& cases = read[file];
  for (const Json& entry : whole.at("cases").items) cases.push_back(case_of(entry));
  EXPECT_FALSE(cases.empty()) << "no cases in " << file;
  return cases;
}

std::set<std::pair<std::string, std::string>>& covered_kinds() {
  static std::set<std::pair<std::string, std::string>> kinds;
  return kinds;
}

}  // namespace

double ReferenceCase::input(const char* name) const { return as_double(inputs.at(name)); }
double ReferenceCase::expected_value(const char* name) const { return as_double(expected.at(name)); }
double ReferenceCase::recomputed_value(const char* name) const { return as_double(recomputed.at(name)); }

std::string ReferenceCase::trace() const {
  std::string result = id + " " + kind + ", source: " + source;
  for (const auto& input : inputs.members) result += ", " + input.first + " = " + input.second.text;
  return note.empty() ? result : result + " (" + note + ")";
}

std::vector<ReferenceCase> reference_cases(const std::string& file, const std::string& kind) {
  std::vector<ReferenceCase> result;
  for (const ReferenceCase& candidate : all_cases(file))
    if (candidate.kind == kind) result.push_back(candidate);
  EXPECT_FALSE(result.empty()) << "no case of kind " << kind << " in " << file;
  return result;
}

std::vector<std::string> reference_kinds(const std::string& file) {
  std::set<std::string> kinds;
  for (const ReferenceCase& candidate : all_cases(file)) kinds.insert(candidate.kind);
  return {kinds.begin(), kinds.end()};
}

CoversKinds::CoversKinds(const char* file, std::initializer_list<const char*> kinds) {
  for (const char* kind : kinds) covered_kinds().emplace(file, kind);
}

bool is_covered(const std::string& file, const std::string& kind) {
  return covered_kinds().count({file, kind}) > 0;
}

}  // namespace rejoinder::testing
