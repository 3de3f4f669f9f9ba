#include "tests/support/bounds_cases.h"

#include <cmath>
#include <cstdlib>

#include "tests/support/json.h"
#include "tests/support/text_file.h"

namespace rejoinder::test {
namespace {

using testing::Json;

const std::vector<Json>& cases() {
  static const Json all =
      testing::read_json(testing::text_file(std::string(REJOINDER_TEST_DATA) + "/bounds_visible.json"));
  return all.at("cases").items;
}

double number(const Json& value) {
  return value.text == "inf" ? kInfinity : std::strtod(value.text.c_str(), nullptr);
}

int whole(const Json& value) { return std::atoi(value.text.c_str()); }

std::optional<double> output(const Json& entry, const char* key) {
  const Json& value = entry.at("out").at(key);
  if (value.text.empty()) return std::nullopt;
  return number(value);
}

Interval square_of(const Interval& se) {
  const double low = std::max(0.0, se.low);
  return {low * low, se.high * se.high};
}

}  // namespace

Interval printed(const std::string& text) {
  const std::size_t point = text.find('.');
  const int places = point == std::string::npos ? 0 : static_cast<int>(text.size() - point - 1);
  const double value = std::stod(text), half = 0.5 * std::pow(10.0, -places);
  return {step_down(value - half), step_up(value + half)};
}

std::vector<LimitCase> limit_cases() {
  std::vector<LimitCase> made;
  for (const Json& entry : cases()) {
    const int item = whole(entry.at("item"));
    const Json& in = entry.at("inputs");
    if ((item != 1 && item != 2) || !in.has("R")) continue;
    LimitCase c;
    c.id = entry.at("id").text;
    c.title = entry.at("title").text;
    const int p = static_cast<int>(in.at("b").items.size()), q = static_cast<int>(in.at("R").items.size());
    c.set = AdmissibleSet(p);
    c.R.resize(q, p);
    c.r.resize(q);
    for (int i = 0; i < q; ++i) {
      c.r(i) = number(in.at("r").items[i]);
      for (int j = 0; j < p; ++j) c.R(i, j) = number(in.at("R").items[i].items[j]);
    }
    for (int j = 0; j < p; ++j) {
      c.set.set_coefficient(j, printed(in.at("b").items[j].text));
      if (in.has("se")) c.set.set_se(j, printed(in.at("se").items[j].text));
    }
    if (in.has("V_lower_triangle"))
      for (int i = 0; i < p; ++i)
        for (int j = 0; j <= i; ++j) {
          const Interval value = printed(in.at("V_lower_triangle").items[i].items[j].text);
          if (i == j)
            c.set.set_variance(i, value);
          else
            c.set.covariances.push_back({i, j, value});
        }
    const Json& known = in.at("known");
    if (known.has("corr_cap")) {
      const double cap = number(known.at("corr_cap"));
      c.set.every_correlation = {-cap, cap};
    }
    if (known.has("cov"))
      for (const auto& [pair, value] : known.at("cov").members) {
        const std::size_t comma = pair.find(',');
        c.set.covariances.push_back(
            {std::stoi(pair.substr(0, comma)), std::stoi(pair.substr(comma + 1)), printed(value.text)});
      }
    if (known.has("corr_lower_triangle"))
      for (int i = 1; i < p; ++i)
        for (int j = 0; j < i; ++j)
          c.set.correlations.push_back(
              {i, j, printed(known.at("corr_lower_triangle").items[i - 1].items[j].text)});
    if (known.has("se_of_combination"))
      for (const Json& fact : known.at("se_of_combination").items) {
        Eigen::VectorXd a(p);
        for (int j = 0; j < p; ++j) a(j) = number(fact.at("a").items[j]);
        c.set.combination_variances.push_back({a, square_of(printed(fact.at("se").text))});
      }
    c.min_wald = output(entry, "minW");
    c.max_wald = output(entry, "maxW");
    c.max_attained = output(entry, "maxW_attained");
    c.max_upper = output(entry, "maxW_upper");
    c.cheap_upper = output(entry, "maxW_cheap_upper");
    made.push_back(c);
  }
  return made;
}

std::vector<CorrelationCase> correlation_cases() {
  std::vector<CorrelationCase> made;
  for (const Json& entry : cases()) {
    if (whole(entry.at("item")) != 3) continue;
    const Json &in = entry.at("inputs"), &out = entry.at("out");
    CorrelationCase c;
    c.id = entry.at("id").text;
    for (int i = 0; i < 2; ++i) {
      c.t[i] = number(in.at("t").items[i]);
      c.t_box[i] = printed(in.at("t").items[i].text);
    }
    c.f = number(in.at("F"));
    c.f_box = printed(in.at("F").text);
    for (const Json& root : out.at("rho").items) c.roots.push_back(number(root));
    for (const Json& piece : out.at("rho_set").items)
      c.set.push_back({number(piece.items[0]), number(piece.items[1])});
    c.least_f = number(out.at("F_min"));
    c.at_least = number(out.at("rho_at_min"));
    c.critical = number(out.at("F_crit"));
    for (const Json& end : out.at("rho_not_rejecting").items) c.not_rejecting.push_back(number(end));
    made.push_back(c);
  }
  return made;
}

std::vector<ShareCase> share_cases() {
  std::vector<ShareCase> made;
  for (const Json& entry : cases()) {
    if (whole(entry.at("item")) != 4) continue;
    const Json& in = entry.at("inputs");
    ShareCase c;
    c.id = entry.at("id").text;
    c.t.resize(in.at("t").items.size());
    for (int i = 0; i < c.t.size(); ++i) c.t(i) = number(in.at("t").items[i]);
    if (!in.at("known_block").items.empty()) {
      for (const Json& index : in.at("known_block").items) c.block.push_back(whole(index));
      const int k = static_cast<int>(c.block.size());
      c.block_correlation.resize(k, k);
      for (int i = 0; i < k; ++i)
        for (int j = 0; j < k; ++j) c.block_correlation(i, j) = number(in.at("known_corr").items[i].items[j]);
    }
    c.df = number(in.at("df"));
    c.alpha = number(in.at("alpha"));
    c.rejecting = number(entry.at("out").at("share_rejecting"));
    made.push_back(c);
  }
  return made;
}

}  // namespace rejoinder::test
