// Numbers: ln and exp against the library's long double, lanes against double byte for byte, duals against closed
// forms.
#include <bit>
#include <cmath>
#include <random>

#include "catch.hpp"
#include "numeric/dual.hpp"
#include "numeric/polynomial.hpp"

using namespace bandwright;

namespace {

constexpr double kTwoUnits = 4.5e-16;  // two units in the last place, relative: what elementary.hpp promises

double relative(double got, long double truth) { return static_cast<double>(std::fabs((got - truth) / truth)); }

}  // namespace

TEST_CASE("exp and ln agree with long double to two units in the last place", "[numeric]") {
  std::mt19937_64 random(11);
  std::uniform_real_distribution<double> exponent(-700, 700), near_one(-0.4, 0.4);
  double worst_exp = 0, worst_ln = 0;
  for (int i = 0; i < 200000; ++i) {
    const double x = exponent(random), y = 1 + near_one(random);
    worst_exp = std::max(worst_exp, relative(e_to(x), std::exp(static_cast<long double>(x))));
    worst_ln = std::max(worst_ln, relative(ln(e_to(x)), std::log(static_cast<long double>(e_to(x)))));
    worst_ln = std::max(worst_ln, relative(ln(y), std::log(static_cast<long double>(y))));
  }
  CHECK(worst_exp < kTwoUnits);
  CHECK(worst_ln < kTwoUnits);
  CHECK(e_to(0.0) == 1.0);
  CHECK(ln(1.0) == 0.0);
}

TEST_CASE("lanes hold the same bytes as double", "[numeric]") {
  constexpr std::size_t N = 2;
  std::mt19937_64 random(12);
  std::uniform_real_distribution<double> any(-300, 300);
  for (int i = 0; i < 2000; ++i) {
    Pack<N> x, y;
    for (std::size_t k = 0; k < N; ++k) x.set(k, any(random)), y.set(k, any(random));
    const Pack<N> e = e_to(x), l = ln(e), r = square_root(e), m = larger(x, y), q = (x * y - x) / (y + Pack<N>(400.0));
    for (std::size_t k = 0; k < N; ++k) {
      const auto same = [](double a, double b) {
        return std::bit_cast<std::uint64_t>(a) == std::bit_cast<std::uint64_t>(b);
      };
      REQUIRE(same(e[k], e_to(x[k])));
      REQUIRE(same(l[k], ln(e_to(x[k]))));
      REQUIRE(same(r[k], std::sqrt(e_to(x[k]))));
      REQUIRE(same(m[k], std::max(x[k], y[k])));
      REQUIRE(same(q[k], (x[k] * y[k] - x[k]) / (y[k] + 400.0)));
    }
  }
}

TEST_CASE("dual numbers carry the derivatives of closed forms", "[numeric]") {
  using D = Dual<double>;
  for (double x : {0.3, 1.7, 42.0}) {
    const D v(x, 1.0);
    const D f = v * v * v / (D(1.0) + v) - square_root(v) * ln(v) + e_to(-v);
    const double truth =
        (3 * x * x * (1 + x) - x * x * x) / ((1 + x) * (1 + x)) - (std::log(x) / 2 + 1) / std::sqrt(x) - std::exp(-x);
    CHECK(f.slope == Approx(truth).epsilon(1e-13));
    CHECK(larger(v, D(1.0)).slope == (x > 1 ? 1.0 : 0.0));
  }
}

TEST_CASE("polynomials multiply and add as on paper", "[numeric]") {
  const Polynomial<double, 1> a{{2, 3}};     // 2 + 3 s
  const Polynomial<double, 2> b{{1, 0, 4}};  // 1 + 4 s^2
  const Polynomial<double, 3> p = a * b;     // 2 + 3 s + 8 s^2 + 12 s^3
  CHECK(p.c == std::array<double, 4>{2, 3, 8, 12});
  CHECK((a + b).c == std::array<double, 3>{3, 3, 4});
  CHECK(times_s(5.0, a).c == std::array<double, 3>{0, 10, 15});
}
