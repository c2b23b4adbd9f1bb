#include "fifty_digits.hpp"

#include <boost/multiprecision/cpp_complex.hpp>
#include <utility>

namespace oracle {

namespace {

using Digits = boost::multiprecision::cpp_bin_float_50;
using WideComplex = boost::multiprecision::cpp_complex_50;
using Rows = std::vector<std::vector<WideComplex>>;

/// Admittances, last column: the driven wire's.
Rows admittances(const Network& net, Real frequency) {
  const auto n = static_cast<std::size_t>(net.unknowns());
  const Digits omega = 2 * boost::math::constants::pi<Digits>() * Digits(frequency);
  Rows rows(n, std::vector<WideComplex>(n + 1));
  net.visit([&](int row, int column, Real g, Real c) {
    rows[static_cast<std::size_t>(row)][static_cast<std::size_t>(column)] +=
        WideComplex(Digits(g), Digits(omega * Digits(c)));
  });
  return rows;
}

std::size_t largest_below(const Rows& rows, std::size_t p) {
  std::size_t best = p;
  for (std::size_t r = p + 1; r < rows.size(); ++r)
    if (abs(rows[r][p]) > abs(rows[best][p])) best = r;
  return best;
}

void eliminate(Rows& rows) {
  const std::size_t n = rows.size();
  for (std::size_t p = 0; p < n; ++p) {
    std::swap(rows[p], rows[largest_below(rows, p)]);
    for (std::size_t r = 0; r < n; ++r) {
      if (r == p) continue;
      const WideComplex factor = rows[r][p] / rows[p][p];
      for (std::size_t k = p; k <= n; ++k) rows[r][k] -= factor * rows[p][k];
    }
  }
}

}  // namespace

Real magnitude_in_fifty_digits(const Network& net, int output, Real frequency) {
  Rows rows = admittances(net, frequency);
  eliminate(rows);
  const std::vector<WideComplex>& row = rows[static_cast<std::size_t>(net.unknown(output))];
  return static_cast<Real>(abs(WideComplex(row.back() / row[static_cast<std::size_t>(net.unknown(output))])));
}

}  // namespace oracle
