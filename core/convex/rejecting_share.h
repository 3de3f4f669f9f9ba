// The share of correlation matrices of q tested estimates under which "all are zero" is rejected.
//
// Uniform measure on q x q correlation matrices (Lewandowski, Kurowicka & Joe 2009, Journal of Multivariate
// Analysis 100:1989-2001, eta = 1; from memory). No sampling: the matrices with W <= w are an affine image of
// all of them, so
//   share not rejecting = prod (1 - t_i² / w)^((q - 1) / 2),
// and with the correlations C of a block of k known, W_A = t_A' C^-1 t_A,
//   share not rejecting = (1 - W_A / w)^((q - k) / 2) * prod over the others (1 - t_i² / w)^((q - 1) / 2).
// A sensitivity, never a probability that anyone is right: "uniform" depends on which matrix is taken.
#pragma once

#include <optional>
#include <vector>

#include "core/convex/admissible_set.h"

namespace rejoinder {

// `t`: q finite intervals, q >= 1. `known`: correlations between them that are printed; they must be those of
// one complete block, else the closed form does not apply and nothing is returned. `critical` is the W at
// which the test rejects, > 0. The range is over the rounding of t and of the block (a block of more than
// two, or with rounding, by its least and greatest W).
std::optional<Interval> share_rejecting(const std::vector<Interval>& t,
                                        const std::vector<PairInterval>& known, double critical);

}  // namespace rejoinder
