#include "core/algebra/expression.h"

#include <cmath>
#include <map>

#include "core/algebra/tokens.h"

namespace rejoinder {
namespace {

// A weight with the sizes that went into it: what is left of a cancellation is compared with those.
struct Weight {
  double value = 0, size = 0;
};

struct Form {
  std::map<int, Weight> weights;
  Weight constant;

  bool is_constant() const {
    for (const auto& [term, weight] : weights)
      if (weight.value != 0) return false;
    return true;
  }
};

// One part in 1e12 of what was added up is rounding, far below any printed digit.
double without_rounding(const Weight& w) { return std::fabs(w.value) <= 1e-12 * w.size ? 0 : w.value; }

void add(Weight& to, const Weight& w, double scale) {
  to.value += scale * w.value;
  to.size += std::fabs(scale) * w.size;
}

void add(Form& to, const Form& form, double scale) {
  for (const auto& [term, weight] : form.weights) add(to.weights[term], weight, scale);
  add(to.constant, form.constant, scale);
}

void scale(Form& form, double by) {
  for (auto& [term, weight] : form.weights) weight = {weight.value * by, weight.size * std::fabs(by)};
  form.constant = {form.constant.value * by, form.constant.size * std::fabs(by)};
}

bool is_finite(const Form& form) {
  for (const auto& [term, weight] : form.weights)
    if (!std::isfinite(weight.size)) return false;
  return std::isfinite(form.constant.size);
}

enum class Stop { None, NotLinear, DividesByZero, TooLarge };

struct Reduction {
  Form form;
  Stop stop = Stop::None;
  int character = 1;
};

Reduction reduce(const Expression& expression) {
  using Op = Expression::Op;
  std::vector<Form> forms(expression.steps.size());
  Reduction result;
  const auto stop = [&](Stop why, int character) {
    result.stop = why;
    result.character = character;
    return result;
  };
  for (std::size_t i = 0; i < expression.steps.size(); ++i) {
    const Expression::Step& step = expression.steps[i];
    Form& form = forms[i];
    // Every step has one parent, so its children's forms may be taken over.
    if (step.left >= 0) form = std::move(forms[step.left]);
    switch (step.op) {
      case Op::Number:
        form.constant = {step.number, std::fabs(step.number)};
        break;
      case Op::Term:
        form.weights[step.term] = {1, 1};
        break;
      case Op::Negate:
        scale(form, -1);
        break;
      case Op::Add:
        add(form, forms[step.right], 1);
        break;
      case Op::Subtract:
        add(form, forms[step.right], -1);
        break;
      case Op::Multiply: {
        Form& right = forms[step.right];
        if (!form.is_constant() && !right.is_constant()) return stop(Stop::NotLinear, step.character);
        if (form.is_constant()) std::swap(form, right);
        scale(form, without_rounding(right.constant));
        break;
      }
      case Op::Divide: {
        const Form& right = forms[step.right];
        if (!right.is_constant()) return stop(Stop::NotLinear, step.character);
        const double divisor = without_rounding(right.constant);
        if (divisor == 0) return stop(Stop::DividesByZero, step.character);
        for (auto& [term, weight] : form.weights)
          weight = {weight.value / divisor, weight.size / std::fabs(divisor)};
        form.constant = {form.constant.value / divisor, form.constant.size / std::fabs(divisor)};
        break;
      }
      case Op::Power: {
        if (!form.is_constant() && step.number != 1) return stop(Stop::NotLinear, step.character);
        if (form.is_constant()) {
          const double base = without_rounding(form.constant);
          if (base == 0 && step.number < 0) return stop(Stop::DividesByZero, step.character);
          const double power = std::pow(base, step.number);
          form = Form{};
          form.constant = {power, std::fabs(power)};
        }
        break;
      }
    }
    if (!is_finite(form)) return stop(Stop::TooLarge, step.character);
  }
  if (!forms.empty()) result.form = std::move(forms.back());
  return result;
}

}  // namespace

bool has_terms(const Expression& expression) {
  for (const Expression::Step& step : expression.steps)
    if (step.op == Expression::Op::Term) return true;
  return false;
}

Evaluation evaluate(const Expression& expression, const Eigen::VectorXd& values) {
  using Op = Expression::Op;
  const std::size_t n = expression.steps.size();
  std::vector<double> value(n, 0), slope(n, 0);
  for (std::size_t i = 0; i < n; ++i) {
    const Expression::Step& step = expression.steps[i];
    const double left = step.left >= 0 ? value[step.left] : 0,
                 right = step.right >= 0 ? value[step.right] : 0;
    switch (step.op) {
      case Op::Number:
        value[i] = step.number;
        break;
      case Op::Term:
        value[i] = values[step.term];
        break;
      case Op::Negate:
        value[i] = -left;
        break;
      case Op::Add:
        value[i] = left + right;
        break;
      case Op::Subtract:
        value[i] = left - right;
        break;
      case Op::Multiply:
        value[i] = left * right;
        break;
      case Op::Divide:
        value[i] = left / right;
        break;
      case Op::Power:
        value[i] = std::pow(left, step.number);
        break;
    }
  }
  Evaluation result;
  result.gradient = Eigen::VectorXd::Zero(values.size());
  if (n == 0) return result;
  result.value = value[n - 1];
  // Backwards: slope[i] is the derivative of the whole by step i.
  slope[n - 1] = 1;
  for (std::size_t i = n; i-- > 0;) {
    const Expression::Step& step = expression.steps[i];
    const double s = slope[i];
    switch (step.op) {
      case Op::Number:
        break;
      case Op::Term:
        result.gradient[step.term] += s;
        break;
      case Op::Negate:
        slope[step.left] -= s;
        break;
      case Op::Add:
        slope[step.left] += s, slope[step.right] += s;
        break;
      case Op::Subtract:
        slope[step.left] += s, slope[step.right] -= s;
        break;
      case Op::Multiply:
        slope[step.left] += s * value[step.right];
        slope[step.right] += s * value[step.left];
        break;
      case Op::Divide:
        slope[step.left] += s / value[step.right];
        slope[step.right] -= s * value[i] / value[step.right];
        break;
      case Op::Power:
        slope[step.left] +=
            step.number == 0 ? 0 : s * step.number * std::pow(value[step.left], step.number - 1);
        break;
    }
  }
  return result;
}

Result<LinearForm> linear_form(const Expression& expression, int p) {
  const Reduction reduced = reduce(expression);
  const std::string where = at_character(reduced.character);
  switch (reduced.stop) {
    case Stop::NotLinear:
      return Error{where, "terms are multiplied or divided by terms here, so the restriction is not linear",
                   "a ratio a / b = 2 can often be written a = 2*b"};
    case Stop::DividesByZero:
      return Error{where, "a division by zero", "divide by another number"};
    case Stop::TooLarge:
      return Error{where, "the numbers here grow too large to compute with",
                   "write the restriction with smaller ones"};
    case Stop::None:
      break;
  }
  LinearForm form;
  form.weights = Eigen::VectorXd::Zero(p);
  for (const auto& [term, weight] : reduced.form.weights) form.weights[term] = without_rounding(weight);
  form.constant = without_rounding(reduced.form.constant);
  return form;
}

bool is_linear(const Expression& expression) { return reduce(expression).stop != Stop::NotLinear; }

}  // namespace rejoinder
