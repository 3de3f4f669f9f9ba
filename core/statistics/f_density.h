// The density of F on the logarithmic scale, accurate to a few units in the last place at any degrees of
// freedom.
//
// Every tail probability here is this density times a continued fraction, so this is where digits are won or
// lost. The usual way through log-gamma functions subtracts numbers of the size of the degrees of freedom: at
// a million of them it keeps ten digits, at 1e12 four. Here the parts that cancel are taken out on paper
// beforehand, and the chi-square is simply the case of infinite denominator degrees of freedom.
#pragma once

namespace rejoinder {

// x - log(1 + x), without the cancellation at small x. x > -1.
double log1p_shortfall(double x);

// log Gamma(z) less Stirling's formula (z - 1/2) log z - z + log(2 pi) / 2, for z > 0; 0 for infinite z.
double stirling_remainder(double z);

// f times the density of F at f: the fall of the upper tail per unit of log f. 0 < f < infinity, numerator df
// > 0, denominator df > 0 or infinity.
double f_log_density(double f, double numerator_df, double denominator_df);

}  // namespace rejoinder
