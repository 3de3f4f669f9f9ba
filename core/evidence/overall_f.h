// The overall F of a column: a part cannot beat the whole, and with two slopes the whole fixes their correlation.
//
// For every restriction on slopes alone with right-hand side zero, W <= k F_all (the distance to a larger set is smaller), when
// both use the same covariance. F_all is printed, or follows from R²: F_all = (R² / k) / ((1 - R²) / df).
#pragma once

#include "core/evidence/joint_test.h"

namespace rejoinder {

// Route `facts`; conventional least squares only. No evidence where no overall F can be had, the intercept is tested, or the
// restriction has another right-hand side (two slopes excepted).
RouteAnswer overall_f_evidence(const JointTest& test);

}  // namespace rejoinder
