// The command line program: arguments in, one call into the core, exit status out.
#include <CLI/CLI.hpp>

#include "shell/commands.h"

#ifndef REJOINDER_VERSION
#error "the build gives REJOINDER_VERSION"
#endif

namespace rejoinder {
namespace {

constexpr const char* kAbout =
    "Rejoinder checks joint claims of a paper from what it prints: coefficients, standard errors, R², n.\n"
    "It reconstructs the F or Wald test, gives the limits that the print allows, and says whether a claim agrees,\n"
    "does not match, or cannot be decided. Nothing leaves this machine.";

constexpr const char* kExamples =
    "Examples\n"
    "  rejoinder check paper.toml                 every claim of a review, one finding each\n"
    "  rejoinder check *.toml --json              the same for other programs\n"
    "  rejoinder fit --r2 0.341 --r2-short 0.312 -n 212 -k 6 -q 3 --f 1.00\n"
    "  rejoinder limits --term fare -0.131 0.052 --term fuel -0.040 0.071 -n 418 -k 7\n"
    "  rejoinder limits --term a 0.52 0.21 --term b 0.31 0.17 --restrictions \"a = b\" -n 90 -k 4\n"
    "  rejoinder wald --coefficients b.csv --covariance v.csv --restrictions \"a = b = c\" --df 104\n"
    "\n"
    "Give figures as printed: 0.50 and 0.5 are different evidence.\n"
    "Exit status: 0 no finding conflicts, 1 one does, 2 something could not be read.";

void add_output(CLI::App& verb, Output& output) {
  verb.add_flag("--json", output.json, "print the findings as JSON");
  verb.add_flag("--working", output.working, "show the arithmetic line by line");
}

void add_claim(CLI::App& verb, QuickClaim& claim) {
  verb.add_option("--f", claim.f, "the F that is reported, as printed");
  verb.add_option("--chi2", claim.chi2, "the chi-square that is reported");
  verb.add_option("--p", claim.p, "the p that is reported, for example .015 or \"<0.001\"");
  verb.add_option("--claimed-df", claim.df, "the degrees of freedom that are reported, for example 3,205");
  verb.add_option("--level", claim.level, "the level at which the decision is read (0.05)");
}

int run(int count, char** words) {
  CLI::App program{kAbout, "rejoinder"};
  program.footer(kExamples);
  program.set_version_flag("--version", std::string("rejoinder ") + REJOINDER_VERSION);
  program.require_subcommand(1);
  Output output;

  std::vector<std::string> files;
  CLI::App* check = program.add_subcommand("check", "check every claim of one or more review files");
  check->add_option("FILE", files, "review files (TOML); - reads standard input")->required();
  add_output(*check, output);

  QuickFit fit;
  CLI::App* two_fits = program.add_subcommand("fit", "F from two fits: R² (or adjusted R², or sums of squares) with n, k, q");
  two_fits->add_option("--r2", fit.r2, "R² of the longer regression, as printed");
  two_fits->add_option("--r2-short", fit.r2_short, "R² of the shorter one");
  two_fits->add_option("--adj-r2", fit.adj_r2, "adjusted R² of the longer one");
  two_fits->add_option("--adj-r2-short", fit.adj_r2_short, "adjusted R² of the shorter one");
  two_fits->add_option("--ssr", fit.ssr, "residual sum of squares of the longer one");
  two_fits->add_option("--ssr-short", fit.ssr_short, "residual sum of squares of the shorter one");
  two_fits->add_option("-n", fit.n, "observations")->required();
  two_fits->add_option("-k", fit.k, "regressors of the longer one, the intercept not counted")->required();
  two_fits->add_option("-q", fit.q, "restrictions: how many regressors fewer the shorter one has")->required();
  add_claim(*two_fits, fit.claim);
  add_output(*two_fits, output);

  QuickLimits limits;
  std::vector<std::vector<std::string>> terms;
  CLI::App* only_errors = program.add_subcommand("limits", "limits of a joint test from coefficients and standard errors alone");
  only_errors->add_option("--term", terms, "a term: name, coefficient, standard error; once for each term")->required()->type_size(3);
  only_errors->add_flag("--t", limits.second_is_t, "the third figure of each term is its t ratio, not its standard error");
  only_errors->add_option("--restrictions", limits.claim.restrictions, "what is claimed, like \"a = b\"; all zero when left out");
  only_errors->add_option("-n", limits.n, "observations");
  only_errors->add_option("-k", limits.k, "regressors, the intercept not counted");
  std::vector<std::string> within;
  only_errors->add_option("--correlation-within", within, "your assumption on the correlation of the estimates: low high")->expected(2);
  add_claim(*only_errors, limits.claim);
  add_output(*only_errors, output);

  QuickWald wald;
  std::string coefficient_file, covariance_file;
  CLI::App* full = program.add_subcommand("wald", "Wald test from coefficients and their covariance matrix");
  full->add_option("--coefficients", coefficient_file, "CSV file: name, coefficient")->required();
  full->add_option("--covariance", covariance_file, "CSV file: the covariance matrix, whole or its lower triangle")->required();
  full->add_option("--restrictions", wald.claim.restrictions, "what is claimed, like \"a = b\"; all zero when left out");
  full->add_option("--df", wald.df, "denominator degrees of freedom");
  full->add_option("-n", wald.n, "observations");
  full->add_option("-k", wald.k, "regressors, the intercept not counted");
  add_claim(*full, wald.claim);
  add_output(*full, output);

  try {
    program.parse(count, words);
  } catch (const CLI::ParseError& stop) {
    const int status = program.exit(stop);
    return status == 0 ? 0 : 2;
  }

  if (*check) return check_files(files, output);
  if (*two_fits) return check_quick(quick_fit(fit), output);
  if (*only_errors) {
    for (const auto& term : terms) limits.terms.push_back({term[0], term[1], term[2]});
    if (within.size() == 2) {
      limits.correlation_low = within[0];
      limits.correlation_high = within[1];
    }
    return check_quick(quick_limits(limits), output);
  }
  const Result<std::string> coefficients = read_file(coefficient_file), covariance = read_file(covariance_file);
  for (const auto* text : {&coefficients, &covariance})
    if (!text->ok()) {
      std::fprintf(stderr, "%s\n", text->error().text().c_str());
      return 2;
    }
  wald.coefficients = coefficients.value();
  wald.covariance = covariance.value();
  return check_quick(quick_wald(wald), output);
}

}  // namespace
}  // namespace rejoinder

int main(int count, char** words) { return rejoinder::run(count, words); }
