// Second route: Boost.Math's distributions, which share no code with ours. Compared where Boost itself is accurate: denominator df
// up to a thousand and p not below 1e-10 (beyond, Boost's incomplete beta loses digits; the reference files judge there).
#include <gtest/gtest.h>

#include <boost/math/distributions/chi_squared.hpp>
#include <boost/math/distributions/fisher_f.hpp>
#include <boost/math/distributions/students_t.hpp>
#include <cmath>

#include "core/statistics/tails.h"

namespace rejoinder::testing {
namespace {

// One policy for both targets: no promotion to long double, which the browser does not have.
using Policy = boost::math::policies::policy<boost::math::policies::promote_double<false>>;

double condition(double p, double other) { return p == 0 ? 1 : std::max(1.0, std::fabs(std::log(other / p)) / 1e-6); }

TEST(SecondRoute, GivesTheSameUpperTailsOfF) {
  for (const double q : {1.0, 2.0, 3.0, 7.0, 20.0})
    for (const double df : {1.0, 3.0, 10.0, 57.0, 205.0, 1000.0}) {
      const boost::math::fisher_f_distribution<double, Policy> f(q, df);
      for (const double x : {0.01, 0.3, 1.0, 2.65, 4.0, 9.0}) {
        const double theirs = boost::math::cdf(boost::math::complement(f, x)), mine = f_upper_tail(x, q, df);
        if (theirs < 1e-10) continue;
        // What a relative step of 1e-6 in x does to ln p is the condition of the problem.
        const double moved = f_upper_tail(x * (1 + 1e-6), q, df);
        EXPECT_NEAR(mine / theirs, 1, 1e-13 * condition(mine, moved)) << "F(" << q << ", " << df << ") at " << x;
      }
      for (const double p : {0.5, 0.1, 0.05, 0.01, 0.001})
        EXPECT_NEAR(f_critical(p, q, df) / boost::math::quantile(boost::math::complement(f, p)), 1, 1e-11) << q << " " << df << " " << p;
    }
}

TEST(SecondRoute, GivesTheSameTailsOfTAndChiSquare) {
  for (const double df : {1.0, 4.0, 30.0, 410.0}) {
    const boost::math::students_t_distribution<double, Policy> t(df);
    const boost::math::chi_squared_distribution<double, Policy> chi(df);
    for (const double x : {0.1, 1.0, 1.96, 3.5}) {
      EXPECT_NEAR(t_upper_tail(x, df) / boost::math::cdf(boost::math::complement(t, x)), 1, 1e-12) << x << " at " << df;
      const double at = x * df;
      const double theirs = boost::math::cdf(boost::math::complement(chi, at));
      if (theirs > 1e-10) {
        EXPECT_NEAR(chi_square_upper_tail(at, df) / theirs, 1, 1e-11) << at << " at " << df;
      }
    }
  }
}

}  // namespace
}  // namespace rejoinder::testing
