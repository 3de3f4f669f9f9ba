// Both tails of F and its density, from one evaluation. tails.h is what other folders use.
#pragma once

namespace rejoinder {

struct FTails {
  double upper = 0;    // P(F > f)
  double lower = 0;    // P(F <= f)
  double density = 0;  // f times the density at f
};

// f >= 0, infinity included; numerator df > 0, denominator df > 0 or infinity (then f times the numerator df
// is a chi-square). The smaller tail keeps its digits however small it is, down to the smallest normal
// double.
FTails f_tails(double f, double numerator_df, double denominator_df);

}  // namespace rejoinder
