// Dual<B>: a value and its derivative in one direction; B is double or a Pack, whose lanes are then directions.
//
// Source: forward-mode differentiation as in Griewank & Walther, Evaluating Derivatives, 2nd ed., 2008 (from memory).
#pragma once

#include "numeric/elementary.hpp"

namespace bandwright {

template <class B>
struct Dual {
  B value;
  B slope;

  Dual() : value(0.0), slope(0.0) {}
  Dual(double x) : value(x), slope(0.0) {}  // NOLINT: a constant has no slope
  Dual(const B& v, const B& s) : value(v), slope(s) {}

  friend Dual operator+(const Dual& a, const Dual& b) { return {a.value + b.value, a.slope + b.slope}; }
  friend Dual operator-(const Dual& a, const Dual& b) { return {a.value - b.value, a.slope - b.slope}; }
  friend Dual operator-(const Dual& a) { return {-a.value, -a.slope}; }
  friend Dual operator*(const Dual& a, const Dual& b) {
    return {a.value * b.value, a.slope * b.value + a.value * b.slope};
  }
  friend Dual operator/(const Dual& a, const Dual& b) {
    const B q = a.value / b.value;
    return {q, (a.slope - q * b.slope) / b.value};
  }

  friend auto less(const Dual& a, const Dual& b) { return less(a.value, b.value); }
  template <class Condition>
  friend Dual select(const Condition& c, const Dual& yes, const Dual& no) {
    return {select(c, yes.value, no.value), select(c, yes.slope, no.slope)};
  }
  friend double first_value(const Dual& x) { return first_value(x.value); }

  friend Dual ln(const Dual& x) { return {ln(x.value), x.slope / x.value}; }
  friend Dual e_to(const Dual& x) {
    const B y = e_to(x.value);
    return {y, y * x.slope};
  }
  friend Dual square_root(const Dual& x) {
    const B y = square_root(x.value);
    return {y, x.slope / (y + y)};
  }
};

}  // namespace bandwright
