#include "core/paste/labels.h"

#include <algorithm>
#include <cctype>

#include "core/paste/plain_text.h"

namespace rejoinder {
namespace {

struct Named {
  const char* label;
  const char* key;
};

// Labels in plain_label form.
constexpr Named kFoot[] = {
    {"n", "n"},
    {"obs", "n"},
    {"observations", "n"},
    {"no of observations", "n"},
    {"number of observations", "n"},
    {"number of obs", "n"},
    {"no of obs", "n"},
    {"num obs", "n"},
    {"sample size", "n"},
    {"n obs", "n"},
    {"r2", "r2"},
    {"r 2", "r2"},
    {"r squared", "r2"},
    {"rsquared", "r2"},
    {"r sq", "r2"},
    {"rsq", "r2"},
    {"r square", "r2"},
    {"multiple r2", "r2"},
    {"multiple r squared", "r2"},
    {"adj r2", "adj_r2"},
    {"adjusted r2", "adj_r2"},
    {"adj r 2", "adj_r2"},
    {"adjusted r 2", "adj_r2"},
    {"adj r squared", "adj_r2"},
    {"adjusted r squared", "adj_r2"},
    {"adj r sq", "adj_r2"},
    {"adj rsq", "adj_r2"},
    {"r2 adj", "adj_r2"},
    {"r2 adjusted", "adj_r2"},
    {"r squared adj", "adj_r2"},
    {"adjusted r square", "adj_r2"},
    {"k", "k"},
    {"regressors", "k"},
    {"predictors", "k"},
    {"no of regressors", "k"},
    {"no of predictors", "k"},
    {"number of regressors", "k"},
    {"number of predictors", "k"},
    {"slopes", "k"},
    {"f", "overall_f"},
    {"f statistic", "overall_f"},
    {"f stat", "overall_f"},
    {"f test", "overall_f"},
    {"f value", "overall_f"},
    {"overall f", "overall_f"},
    {"prob f", "overall_p"},
    {"p of f", "overall_p"},
    {"log likelihood", "loglik"},
    {"loglikelihood", "loglik"},
    {"loglik", "loglik"},
    {"log l", "loglik"},
    {"ll", "loglik"},
    {"final log likelihood", "loglik"},
    {"ll final", "loglik"},
    {"log lik", "loglik"},
    {"null log likelihood", "null_loglik"},
    {"ll 0", "null_loglik"},
    {"ll null", "null_loglik"},
    {"clusters", "clusters"},
    {"number of clusters", "clusters"},
    {"no of clusters", "clusters"},
    {"n clusters", "clusters"},
    {"residual ss", "ssr"},
    {"rss", "ssr"},
    {"ssr", "ssr"},
    {"residual sum of squares", "ssr"},
    {"total ss", "tss"},
    {"tss", "tss"},
    {"total sum of squares", "tss"},
    {"residual sd", "residual_sd"},
    {"rmse", "residual_sd"},
    {"root mse", "residual_sd"},
    {"residual standard error", "residual_sd"},
    {"standard error of regression", "residual_sd"},
    {"s e of regression", "residual_sd"},
    {"se of regression", "residual_sd"},
    {"ser", "residual_sd"},
    {"sd of outcome", "outcome_sd"},
    {"s d of outcome", "outcome_sd"},
    {"outcome sd", "outcome_sd"},
    {"residual df", "df"},
    {"df", "df"},
    {"degrees of freedom", "df"},
    {"aic", "aic"},
    {"bic", "bic"},
    {"pseudo r2", "pseudo_r2"},
    {"pseudo r squared", "pseudo_r2"},
    {"pseudo rsq", "pseudo_r2"},
};

constexpr Named kHeadings[] = {
    {"coefficient", "coef"},
    {"coef", "coef"},
    {"coeff", "coef"},
    {"estimate", "coef"},
    {"b", "coef"},
    {"est", "coef"},
    {"std err", "se"},
    {"se", "se"},
    {"s e", "se"},
    {"standard error", "se"},
    {"se b", "se"},
    {"std error", "se"},
    {"t", "t"},
    {"t value", "t"},
    {"t stat", "t"},
    {"t statistic", "t"},
    {"t ratio", "t"},
    {"z", "t"},
    {"z value", "t"},
    {"p", "p"},
    {"p value", "p"},
    {"p t", "p"},
    {"p z", "p"},
    {"sig", "p"},
    {"95 ci", "ci"},
    {"ci", "ci"},
    {"95 conf interval", "ci"},
    {"95 confidence interval", "ci"},
};

constexpr Named kSources[] = {
    {"ss", "ss"}, {"sum of squares", "ss"}, {"sums of squares", "ss"}, {"df", "df"},  {"d f", "df"},
    {"ms", "ms"}, {"mean square", "ms"},    {"mean squares", "ms"},    {"f", "f"},    {"f value", "f"},
    {"p", "p"},   {"p value", "p"},         {"prob f", "p"},           {"pr f", "p"},
};

bool is_digit(char c) { return c >= '0' && c <= '9'; }

}  // namespace

std::string plain_label(std::string_view label) {
  std::string plain;
  for (const char c : lower_case(label)) {
    if ((c >= 'a' && c <= 'z') || is_digit(c))
      plain += c;
    else if (!plain.empty() && plain.back() != ' ')
      plain += ' ';
  }
  return trimmed(plain);
}

std::string foot_key(std::string_view label) {
  const std::string plain = plain_label(label);
  for (const Named& row : kFoot)
    if (plain == row.label) return row.key;
  return {};
}

bool is_intercept_label(std::string_view label) {
  const std::string plain = plain_label(label);
  return plain == "constant" || plain == "intercept" || plain == "cons" || plain == "const";
}

std::string heading_key(std::string_view heading) {
  const std::string plain = plain_label(heading);
  for (const Named& row : kHeadings)
    if (plain == row.label) return row.key;
  return {};
}

std::string source_key(std::string_view heading) {
  const std::string plain = plain_label(heading);
  for (const Named& row : kSources)
    if (plain == row.label) return row.key;
  return {};
}

bool is_ratio_heading(std::string_view heading) {
  const std::string plain = plain_label(heading);
  for (const char* word : {"or", "rr", "hr", "irr"})
    if (starts_with_word(plain, word)) return true;
  return contains(plain, "odds ratio") || contains(plain, "hazard ratio") || contains(plain, "rate ratio") ||
         contains(plain, "risk ratio");
}

std::string second_figure_in(std::string_view note) {
  const std::string words = lower_case(note);
  const bool brackets = contains(words, "parenthes") || contains(words, "bracket") ||
                        contains(words, "beneath") || contains(words, "below");
  if (!brackets) return {};
  for (const char* phrase :
       {"t-stat", "t stat", "t-value", "t value", "t-ratio", "t ratio", "z-stat", "z stat", "t in "})
    if (contains(words, phrase)) return "t";
  for (const char* phrase : {"p-value", "p value", "p in "})
    if (contains(words, phrase)) return "p";
  if (contains(words, "confidence interval") || contains(words, "95% ci")) return "ci";
  for (const char* phrase : {"standard error", "s.e.", "std. err", "std err", "ses in", "se in", "errors"})
    if (contains(words, phrase)) return "se";
  return {};
}

std::vector<double> star_levels_in(std::string_view note) {
  std::vector<double> levels(3, 0.0);
  int known = 0;
  for (std::size_t at = 0; at < note.size();) {
    if (note[at] != '*') {
      ++at;
      continue;
    }
    std::size_t stars = 0;
    while (at + stars < note.size() && note[at + stars] == '*') ++stars;
    at += stars;
    std::size_t next = at;
    // Only signs, blanks and the p may stand between the stars and their level.
    while (next < note.size() && std::string_view(" p<=:").find(
                                     static_cast<char>(std::tolower(note[next]))) != std::string_view::npos)
      ++next;
    std::size_t end = next;
    double value = 0, unit = 1;
    bool point = false;
    while (end < note.size() && (is_digit(note[end]) || (note[end] == '.' && !point &&
                                                         end + 1 < note.size() && is_digit(note[end + 1])))) {
      if (note[end] == '.') {
        point = true;
      } else {
        value = value * 10 + (note[end] - '0');
        if (point) unit *= 10;
      }
      ++end;
    }
    if (end == next || stars > 3) continue;
    value /= unit;
    if (end < note.size() && (note[end] == '%' || note.substr(end, 2) == " %")) value /= 100;
    at = end;
    if (value <= 0 || value >= 1 || levels[stars - 1] != 0) continue;
    levels[stars - 1] = value;
    ++known;
  }
  // Fewer stars stand for larger levels; a gap in the list means that it was not understood.
  int count = 0;
  while (count < 3 && levels[count] != 0) ++count;
  if (known == 0) return {};
  if (count != known) {
    if (known == 2 && levels[0] == 0) return {std::max(0.10, levels[1]), levels[1], levels[2]};
    return {};
  }
  levels.resize(count);
  return std::is_sorted(levels.rbegin(), levels.rend()) ? levels : std::vector<double>{};
}

std::string errors_in(std::string_view note) {
  const std::string words = lower_case(note);
  if (contains(words, "cluster")) return "clustered";
  if (contains(words, "robust") && !contains(words, "robust? no") && !contains(words, "not robust"))
    return "robust";
  return {};
}

std::string figure_in(std::string_view note, std::string_view name) {
  for (std::size_t at = note.find(name); at != std::string_view::npos; at = note.find(name, at + 1)) {
    if (at > 0 && std::isalnum(static_cast<unsigned char>(note[at - 1]))) continue;
    std::size_t next = at + name.size();
    while (next < note.size() && note[next] == ' ') ++next;
    if (next >= note.size() || note[next] != '=') continue;
    ++next;
    while (next < note.size() && note[next] == ' ') ++next;
    std::size_t end = next;
    while (end < note.size() && (is_digit(note[end]) || ((note[end] == '.' || note[end] == ',') &&
                                                         end + 1 < note.size() && is_digit(note[end + 1]))))
      ++end;
    if (end > next) return std::string(note.substr(next, end - next));
  }
  return {};
}

}  // namespace rejoinder
