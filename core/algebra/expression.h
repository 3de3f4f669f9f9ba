// An arithmetic expression over term names, kept as a tree so that it can be evaluated with its gradient.
//
// Linear restrictions need the weights only; a ratio or a product of two estimates needs the gradient at the
// estimates (the delta method). Children stand before their parents in `steps`, so both passes are plain
// loops and no depth of nesting can exhaust the stack.
#pragma once

#include <Eigen/Dense>
#include <string>
#include <vector>

#include "core/result.h"

namespace rejoinder {

struct Expression {
  enum class Op { Number, Term, Negate, Add, Subtract, Multiply, Divide, Power };
  struct Step {
    Op op = Op::Number;
    double number = 0;          // of Number; the exponent of Power
    int term = 0;               // of Term: index into the names beside the expression
    int left = -1, right = -1;  // indices of earlier steps; Negate and Power have a left one only
    int character = 1;          // where it stands in the text
  };
  std::vector<Step> steps;  // the last one is the whole
};

// False for plain numbers: 1/2, (3 - 1).
bool has_terms(const Expression& expression);

struct Evaluation {
  double value = 0;
  Eigen::VectorXd gradient;  // p, derivative by each term
};

// `values` holds one number per term, p. The result may hold infinities or NaN (a ratio at a zero
// denominator): the caller looks.
Evaluation evaluate(const Expression& expression, const Eigen::VectorXd& values);

// weights' b + constant.
struct LinearForm {
  Eigen::VectorXd weights;  // p
  double constant = 0;
};

// The linear form that `expression` is, over p terms. Weights that cancel up to rounding are exactly zero. An
// Error, with the character, where it is a product or ratio of terms, divides by zero or leaves the range of
// doubles.
Result<LinearForm> linear_form(const Expression& expression, int p);

// Whether linear_form would answer, or refuse for another reason than that terms are multiplied or divided.
bool is_linear(const Expression& expression);

}  // namespace rejoinder
