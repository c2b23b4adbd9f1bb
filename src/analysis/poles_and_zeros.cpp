#include <algorithm>
#include <bandwright/analysis.hpp>
#include <cmath>
#include <unsupported/Eigen/Polynomials>

#include "units/constants.hpp"

namespace bandwright {

namespace {

using Complex = std::complex<long double>;
using Coefficients = Eigen::Matrix<long double, Eigen::Dynamic, 1>;

/// Newton steps on the unscaled polynomial: the companion matrix loses the small ones of widely spread roots.
Complex polish(const Coefficients& p, Complex root) {
  for (int i = 0; i < 20; ++i) {
    Complex value(0), slope(0);
    for (Eigen::Index k = p.size(); k-- > 0;) {
      slope = slope * root + value;
      value = value * root + p[k];
    }
    if (slope == Complex(0)) break;
    const Complex step = value / slope;
    root -= step;
    if (std::abs(step) <= 1e-18L * std::abs(root)) break;
  }
  return root;
}

/// Roots from the balanced companion matrix, s scaled so that the outer coefficients are equal, then polished.
std::vector<std::complex<double>> roots_in_hertz(const double* first, const double* last) {
  std::vector<std::complex<double>> found;
  while (last != first && *(last - 1) == 0) --last;
  for (; first != last && *first == 0; ++first) found.emplace_back(0.0, 0.0);
  if (last - first < 2) return found;

  Coefficients p(last - first);
  for (Eigen::Index i = 0; i < p.size(); ++i) p[i] = first[i];
  const long double scale = std::pow(std::fabs(p[0] / p[p.size() - 1]), 1.0L / (p.size() - 1));
  Coefficients scaled = p;
  long double power = 1;
  for (Eigen::Index i = 0; i < p.size(); ++i, power *= scale) scaled[i] = p[i] * power;
  scaled /= scaled[0];
  Eigen::PolynomialSolver<long double, Eigen::Dynamic> solver(scaled);
  for (const Complex& r : solver.roots()) {
    const Complex root = polish(p, r * scale) / (2 * static_cast<long double>(kPi));
    found.emplace_back(static_cast<double>(root.real()), static_cast<double>(root.imag()));
  }
  return found;
}

void sort_by_modulus(std::vector<std::complex<double>>& roots) {
  std::sort(roots.begin(), roots.end(), [](const auto& a, const auto& b) {
    const double ma = std::abs(a), mb = std::abs(b);
    return ma != mb ? ma < mb : a.imag() < b.imag();
  });
}

}  // namespace

PolesAndZeros poles_and_zeros(const TransferFunction& transfer) {
  // s^2 stands in front of the numerator; a factor s common to both sides (load open) is no pole and no zero
  std::array<double, 7> zeros{};
  std::copy(transfer.numerator.begin(), transfer.numerator.end(), zeros.begin() + 2);
  const double* numerator = zeros.data();
  const double* denominator = transfer.denominator.data();
  while (*denominator == 0 && *numerator == 0 && denominator != transfer.denominator.data() + 7) {
    ++numerator, ++denominator;
  }
  PolesAndZeros result;
  result.poles = roots_in_hertz(denominator, transfer.denominator.data() + transfer.denominator.size());
  result.zeros = roots_in_hertz(numerator, zeros.data() + zeros.size());
  sort_by_modulus(result.poles);
  sort_by_modulus(result.zeros);
  return result;
}

}  // namespace bandwright
