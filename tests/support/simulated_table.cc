#include "tests/support/simulated_table.h"

#include <cmath>
#include <cstdio>
#include <random>

namespace rejoinder::testing {
namespace {

// Normal draws that are the same with every standard library.
class Draws {
 public:
  explicit Draws(std::uint64_t seed) : engine_(seed) {}
  double normal() {
    const double u = (static_cast<double>(engine_() >> 11) + 0.5) / 9007199254740992.0;
    const double v = (static_cast<double>(engine_() >> 11) + 0.5) / 9007199254740992.0;
    return std::sqrt(-2 * std::log(u)) * std::cos(6.283185307179586 * v);
  }

 private:
  std::mt19937_64 engine_;
};

double residual_sum(const Eigen::MatrixXd& X, const Eigen::VectorXd& y) {
  return (y - X * X.colPivHouseholderQr().solve(y)).squaredNorm();
}

}  // namespace

double SimulatedRegression::wald_of_tail(int keep) const {
  const int q = k - keep;
  const Eigen::VectorXd d = coefficients.tail(q);
  return d.dot(covariance.bottomRightCorner(q, q).ldlt().solve(d));
}

SimulatedRegression fit_regression(const Eigen::MatrixXd& regressors, const Eigen::VectorXd& y) {
  const int n = static_cast<int>(regressors.rows()), k = static_cast<int>(regressors.cols());
  Eigen::MatrixXd X(n, k + 1);
  X.col(0).setOnes();
  X.rightCols(k) = regressors;
  SimulatedRegression out;
  out.n = n;
  out.k = k;
  out.coefficients = X.colPivHouseholderQr().solve(y);
  out.tss = (y.array() - y.mean()).matrix().squaredNorm();
  out.ssr = residual_sum(X, y);
  out.r2 = 1 - out.ssr / out.tss;
  out.covariance = out.ssr / (n - k - 1) * (X.transpose() * X).inverse();
  for (int keep = 0; keep <= k; ++keep) out.short_r2_.push_back(1 - residual_sum(X.leftCols(keep + 1), y) / out.tss);
  out.means = regressors.colwise().mean().transpose();
  out.mean_of_outcome = y.mean();
  return out;
}

SimulatedRegression simulate_regression(std::uint64_t seed, int n, int k, double correlation) {
  Draws draws(seed);
  Eigen::MatrixXd X(n, k + 1);
  Eigen::VectorXd y(n), effects(k);
  for (int j = 0; j < k; ++j) effects(j) = draws.normal() * 2 / std::sqrt(n);
  for (int i = 0; i < n; ++i) {
    const double common = draws.normal();
    X(i, 0) = 1;
    y(i) = 1 + draws.normal();
    for (int j = 0; j < k; ++j) {
      X(i, j + 1) = std::sqrt(correlation) * common + std::sqrt(1 - correlation) * draws.normal();
      y(i) += effects(j) * X(i, j + 1);
    }
  }
  return fit_regression(X.rightCols(k), y);
}

std::string printed(double x, int decimals) {
  char buffer[64];
  std::snprintf(buffer, sizeof buffer, "%.*f", decimals, x);
  return buffer;
}

std::string printed_review(const SimulatedRegression& regression, const PrintChoices& choices) {
  const int d = choices.decimals;
  const auto quoted = [](const std::string& text) { return "\"" + text + "\""; };
  const auto name = [](int j) { return "x" + std::to_string(j); };
  std::string text = "rejoinder = 1\n[[column]]\nid = \"full\"\nerrors = \"classical\"\nn = " + std::to_string(regression.n) +
                     "\nk = " + std::to_string(regression.k) + "\n";
  if (choices.r2) text += "r2 = " + quoted(printed(regression.r2, d)) + "\n";
  for (int j = 1; j <= regression.k; ++j) {
    text += "[[column.term]]\nname = " + quoted(name(j)) + "\ncoef = " + quoted(printed(regression.coefficients(j), d)) + "\n";
    if (choices.standard_errors) text += "se = " + quoted(printed(std::sqrt(regression.covariance(j, j)), d)) + "\n";
  }
  if (choices.covariance) {
    text += "[column.covariance]\nterms = [";
    for (int j = 1; j <= regression.k; ++j) text += (j > 1 ? ", " : "") + quoted(name(j));
    text += "]\nlower = [";
    for (int i = 1; i <= regression.k; ++i) {
      text += i > 1 ? ", [" : "[";
      for (int j = 1; j <= i; ++j) text += (j > 1 ? ", " : "") + quoted(printed(regression.covariance(i, j), d + 2));
      text += "]";
    }
    text += "]\n";
  }
  text += "[[column]]\nid = \"short\"\nerrors = \"classical\"\nn = " + std::to_string(regression.n) + "\nk = " + std::to_string(choices.keep) + "\n";
  if (choices.r2) text += "r2 = " + quoted(printed(regression.short_r2(choices.keep), d)) + "\n";
  text += "[[claim]]\nid = \"tail\"\ncolumn = \"full\"\n";
  if (choices.r2 && choices.restrictions.empty()) text += "restricted = \"short\"\n";
  std::string restrictions = choices.restrictions;
  if (restrictions.empty())
    for (int j = choices.keep + 1; j <= regression.k; ++j) restrictions += (restrictions.empty() ? "" : ", ") + name(j) + " = 0";
  return text + "restrictions = " + quoted(restrictions) + "\n";
}

}  // namespace rejoinder::testing
