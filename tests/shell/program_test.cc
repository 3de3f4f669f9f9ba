// The command line program as a user runs it: what it prints, where it prints it, and its exit status. Native only: there is
// no such program in the browser.
#ifndef __EMSCRIPTEN__
#include <gtest/gtest.h>

#include <sys/wait.h>

#include <cstdio>
#include <cstdlib>
#include <fstream>
#include <string>

#include "tests/support/json.h"

namespace rejoinder::testing {
namespace {

struct Outcome {
  std::string out;  // standard output and standard error together
  int status = -1;
};

Outcome run(const std::string& arguments) {
  Outcome result;
  const std::string command = std::string("\"") + REJOINDER_PROGRAM + "\" " + arguments + " 2>&1";
  std::FILE* pipe = popen(command.c_str(), "r");
  if (!pipe) return result;
  char buffer[4096];
  for (std::size_t got = 0; (got = std::fread(buffer, 1, sizeof buffer, pipe)) > 0;) result.out.append(buffer, got);
  const int raw = pclose(pipe);
  result.status = WIFEXITED(raw) ? WEXITSTATUS(raw) : -1;
  return result;
}

class File {
 public:
  File(const std::string& name, const std::string& text) : name_(::testing::TempDir() + "rejoinder_" + name) { std::ofstream(name_) << text; }
  ~File() { std::remove(name_.c_str()); }
  std::string quoted() const { return "\"" + name_ + "\""; }

 private:
  std::string name_;
};

bool has(const Outcome& run, const std::string& text) { return run.out.find(text) != std::string::npos; }

constexpr const char* kAgrees =
    "rejoinder = 1\ntitle = \"Agrees\"\n[[claim]]\nid = \"c\"\nf = \"4.21\"\ndf = [2, 410]\np = \".015\"\n";
constexpr const char* kConflicts =
    "rejoinder = 1\ntitle = \"Conflicts\"\n[[claim]]\nid = \"c\"\nf = \"4.21\"\ndf = [2, 410]\np = \".15\"\n";

TEST(Program, TellsByItsExitStatusWhetherAFindingConflicts) {
  const File agrees("agrees.toml", kAgrees), conflicts("conflicts.toml", kConflicts), broken("broken.toml", "rejoinder = \n");
  EXPECT_EQ(run("check " + agrees.quoted()).status, 0);
  EXPECT_EQ(run("check " + conflicts.quoted()).status, 1);
  EXPECT_EQ(run("check " + broken.quoted()).status, 2);
  const Outcome everything = run("check " + agrees.quoted() + " " + broken.quoted() + " " + conflicts.quoted());
  EXPECT_EQ(everything.status, 2);
  EXPECT_TRUE(has(everything, "Agrees with the print")) << "a file that cannot be read hides no other";
  EXPECT_TRUE(has(everything, "Does not match the print"));
  EXPECT_TRUE(has(everything, "line 1"));
}

TEST(Program, SaysWhichFileCannotBeOpened) {
  const Outcome missing = run("check no_such_file.toml");
  EXPECT_EQ(missing.status, 2);
  EXPECT_TRUE(has(missing, "no_such_file.toml"));
}

TEST(Program, PrintsFindingsAsJson) {
  const File agrees("agrees.toml", kAgrees), conflicts("conflicts.toml", kConflicts);
  const Json one = read_json(run("check --json " + agrees.quoted()).out);
  EXPECT_EQ(one.at("review").text, "Agrees");
  ASSERT_EQ(one.at("findings").items.size(), 1u);
  EXPECT_EQ(one.at("findings").items[0].at("state").text, "agrees");
  const Json two = read_json(run("check --json " + agrees.quoted() + " " + conflicts.quoted()).out);
  ASSERT_EQ(two.items.size(), 2u);
  EXPECT_EQ(two.items[1].at("findings").items[0].at("state").text, "conflicts");
}

// Derived: F = (0.341 - 0.312)/3 / ((1 - 0.341)/205) = 3.007; with every rounding 2.906 to 3.110.
TEST(Program, WorksOutTwoFits) {
  const Outcome fit = run("fit --r2 0.341 --r2-short 0.312 -n 212 -k 6 -q 3 --f 1.00 --json");
  EXPECT_EQ(fit.status, 1);
  const Json json = read_json(fit.out);
  const Json& finding = json.at("findings").items.at(0);
  EXPECT_EQ(finding.at("figure").text, "outside limits");
  EXPECT_NEAR(std::strtod(finding.at("f").items.at(0).text.c_str(), nullptr), (0.3405 - 0.3125) / 3 / ((1 - 0.3405) / 205), 1e-9);
  EXPECT_NEAR(std::strtod(finding.at("f").items.at(1).text.c_str(), nullptr), (0.3415 - 0.3115) / 3 / ((1 - 0.3415) / 205), 1e-9);
}

// Derived: F >= max t² / q = (0.1305 / 0.0525)² / 2.
TEST(Program, WorksOutLimitsFromStandardErrors) {
  const Outcome limits = run("limits --term fare -0.131 0.052 --term fuel -0.040 0.071 -n 418 -k 7 --json");
  EXPECT_EQ(limits.status, 0);
  const Json json = read_json(limits.out);
  const Json& f = json.at("findings").items.at(0).at("f");
  EXPECT_NEAR(std::strtod(f.items.at(0).text.c_str(), nullptr), (0.1305 / 0.0525) * (0.1305 / 0.0525) / 2, 1e-12);
  EXPECT_EQ(f.items.at(1).text, "inf");
}

TEST(Program, ReadsCoefficientsAndCovarianceFromCsv) {
  const File b("b.csv", "term,coefficient\nfare,0.52\nfuel price,0.31\n"), v("v.csv", "0.040,0.010\n0.010,0.030\n");
  const Outcome wald = run("wald --coefficients " + b.quoted() + " --covariance " + v.quoted() + " --df 100 --json");
  EXPECT_EQ(wald.status, 0) << wald.out;
  const Json json = read_json(wald.out);
  const Json& finding = json.at("findings").items.at(0);
  // Derived: d'V^-1 d at the figures as printed lies inside the limits.
  const double det = 0.04 * 0.03 - 0.01 * 0.01, at_print = (0.52 * 0.52 * 0.03 - 2 * 0.52 * 0.31 * 0.01 + 0.31 * 0.31 * 0.04) / det;
  EXPECT_LT(std::strtod(finding.at("wald").items.at(0).text.c_str(), nullptr), at_print);
  EXPECT_GT(std::strtod(finding.at("wald").items.at(1).text.c_str(), nullptr), at_print);
  const File short_v("short.csv", "0.040\n");
  const Outcome refused = run("wald --coefficients " + b.quoted() + " --covariance " + short_v.quoted() + " --df 100");
  EXPECT_EQ(refused.status, 2);
  EXPECT_TRUE(has(refused, "1 lines for 2 coefficients"));
}

TEST(Program, TeachesByExamples) {
  const Outcome help = run("--help");
  EXPECT_EQ(help.status, 0);
  EXPECT_TRUE(has(help, "rejoinder check paper.toml"));
  EXPECT_TRUE(has(help, "Exit status"));
  EXPECT_EQ(run("--version").status, 0);
  EXPECT_EQ(run("frobnicate").status, 2);
  EXPECT_EQ(run("").status, 2);
}

}  // namespace
}  // namespace rejoinder::testing
#endif
