// Cases of the reference files by kind, and the account of which kinds the tests use.
//
//   const CoversKinds covered("published_visible.json", {"F_critical"});   // once, in the test file
//   for (const ReferenceCase& c : reference_cases("published_visible.json", "F_critical")) {
//     SCOPED_TRACE(c.trace());
//     ...c.inputs.at("df1").text...
//   }
//
// tests/reference/README.md says where the files come from. The fields of each kind are those of the file.
#pragma once

#include <initializer_list>
#include <string>
#include <vector>

#include "tests/support/json.h"

namespace rejoinder::testing {

struct ReferenceCase {
  std::string id;
  std::string kind;
  std::string source;  // publication and table; the method of computation for dist_visible.json
  std::string note;
  Json inputs;      // Texts mostly; some are lists of Texts
  Json expected;    // the printed values by name; for dist_visible.json one member "value"
  Json recomputed;  // 17 digits from the same inputs; empty for dist_visible.json
  double condition =
      1;  // dist_visible.json: relative change of the value per relative change of the argument
  bool disagrees = false;  // the printed value does not follow from the inputs: compare with `recomputed`

  // An input, expected or recomputed member as a double; "inf" is infinity.
  double input(const char* name) const;
  double expected_value(const char* name = "value") const;
  double recomputed_value(const char* name) const;
  // For SCOPED_TRACE: number, kind, source and note.
  std::string trace() const;
};

// Every case of one kind, in the order of the file. None is itself a failure of the test that asks.
std::vector<ReferenceCase> reference_cases(const std::string& file, const std::string& kind);

// The kinds that occur in a file, each once.
std::vector<std::string> reference_kinds(const std::string& file);

// Declares that a test file uses kinds of a reference file. One per test file, at namespace level.
class CoversKinds {
 public:
  CoversKinds(const char* file, std::initializer_list<const char*> kinds);
};
bool is_covered(const std::string& file, const std::string& kind);

}  // namespace rejoinder::testing
