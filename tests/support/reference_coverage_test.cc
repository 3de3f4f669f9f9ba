// The account of the reference files: every kind is used by a test or stands here with the reason why not
// yet.
#include <gtest/gtest.h>

#include <cstdio>
#include <map>
#include <string>

#include "tests/support/reference.h"

namespace rejoinder::testing {
namespace {

constexpr const char* kFiles[] = {"published_visible.json", "dist_visible.json"};

struct NotYet {
  const char* file;
  const char* kind;
  const char* reason;
};

// Whoever writes a test for one of these declares it with CoversKinds and takes the row away.
constexpr NotYet kNotYet[] = {
    {"published_visible.json", "LM_n_r2", "awaits a test of the fit route"},
    {"published_visible.json", "chow_F", "awaits a test of the samples route"},
    {"published_visible.json", "regression_table", "awaits a test of the audit of one column"},
    {"published_visible.json", "joint_size_independent", "awaits a test of separate tests"},
    {"published_visible.json", "sidak_level", "awaits a test of separate tests"},
    {"published_visible.json", "bonferroni_level", "awaits a test of separate tests"},
    {"published_visible.json", "scheffe_critical", "awaits a test of separate tests"},
    {"published_visible.json", "dunnett_one_sided", "awaits the multivariate t"},
    {"published_visible.json", "dunnett_two_sided", "awaits the multivariate t"},
    {"published_visible.json", "studentized_maximum_modulus", "awaits the multivariate t"},
    {"published_visible.json", "bivariate_normal_quadrant", "awaits the multivariate normal"},
    {"published_visible.json", "noncentral_lambda", "awaits the noncentral F"},
    {"published_visible.json", "sample_size_multiple_r", "awaits the noncentral F"},
    {"published_visible.json", "sample_size_anova", "awaits the noncentral F"},
    {"dist_visible.json", "noncentral_F_cdf", "awaits the noncentral F"},
    {"dist_visible.json", "noncentral_F_sf", "awaits the noncentral F"},
    {"dist_visible.json", "bivariate_normal_rectangle", "awaits the multivariate normal"},
    {"dist_visible.json", "bivariate_t_rectangle", "awaits the multivariate t"},
    {"dist_visible.json", "multivariate_t_equicorrelated_two_sided_inside", "awaits the multivariate t"},
    {"dist_visible.json", "multivariate_t_equicorrelated_two_sided_exceed", "awaits the multivariate t"},
    {"dist_visible.json", "multivariate_t_equicorrelated_two_sided_critical", "awaits the multivariate t"},
    {"dist_visible.json", "multivariate_t_equicorrelated_one_sided_inside", "awaits the multivariate t"},
    {"dist_visible.json", "multivariate_t_equicorrelated_one_sided_exceed", "awaits the multivariate t"},
    {"dist_visible.json", "multivariate_t_equicorrelated_one_sided_critical", "awaits the multivariate t"},
};

std::string reason_not_yet(const std::string& file, const std::string& kind) {
  for (const NotYet& row : kNotYet)
    if (row.file == file && row.kind == kind) return row.reason;
  return "";
}

TEST(ReferenceCoverage, EveryKindIsUsedOrListedWithAReason) {
  for (const char* file : kFiles)
    for (const std::string& kind : reference_kinds(file)) {
      SCOPED_TRACE(std::string(file) + ": " + kind);
      const bool listed = !reason_not_yet(file, kind).empty();
      if (is_covered(file, kind)) {
        EXPECT_FALSE(listed) << "a test uses this kind now: take its row out of kNotYet";
      }
      else
        EXPECT_TRUE(listed) << "no test uses this kind: add one with CoversKinds, or a row with the reason";
    }
}

// Printed last, where it is read.
class Account : public ::testing::Environment {
 public:
  void TearDown() override {
    std::map<std::string, std::string> kinds_by_reason;
    for (const char* file : kFiles)
      for (const std::string& kind : reference_kinds(file))
        if (!is_covered(file, kind)) {
          std::string& kinds = kinds_by_reason[reason_not_yet(file, kind)];
          kinds += (kinds.empty() ? "" : ", ") + kind;
        }
    if (kinds_by_reason.empty()) return;
    std::printf("Kinds of reference case that no test uses yet:\n");
    for (const auto& [reason, kinds] : kinds_by_reason)
      std::printf("  %s: %s\n", reason.c_str(), kinds.c_str());
  }
};
const auto* const account = ::testing::AddGlobalTestEnvironment(new Account);

}  // namespace
}  // namespace rejoinder::testing
