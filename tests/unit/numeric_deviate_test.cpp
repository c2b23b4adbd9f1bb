// Random deviates: the quantile against Boost.Math, lanes against double, moments against closed forms, and the stream
// against what a uniform stream must show. Statistical bounds are 4 standard errors: right code passes for nearly
// every seed, and the seeds here are fixed.
#pragma GCC diagnostic ignored "-Wpsabi"  // four lanes without AVX: nothing of this file is called from another

#include <algorithm>
#include <bit>
#include <boost/math/distributions/chi_squared.hpp>
#include <boost/math/distributions/normal.hpp>
#include <cmath>
#include <random>
#include <set>
#include <vector>

#include "catch.hpp"
#include "numeric/deviate.hpp"
#include "numeric/dual.hpp"

using namespace bandwright;

namespace {

constexpr double kQuantileError = 1e-15;     // relative: what deviate.hpp promises
constexpr double kProbabilityError = 1e-15;  // a few roundings of a probability
constexpr double kErrors = 4.0;              // standard errors a statistic may be off
constexpr int kDraws = 1000000;

const boost::math::normal_distribution<long double> kNormal;

/// Probabilities of the range that the quantile is made for: even steps, both tails by decades, the branch's edges.
std::vector<double> probabilities() {
  std::vector<double> all{0.075, 0.925, std::nextafter(0.075, 0), std::nextafter(0.925, 1), 0.5 - 1e-12, 1.01e-10};
  for (int i = 1; i < 20000; ++i)
    if (i != 10000) all.push_back(i / 20000.0);
  for (double decade = -9.99; decade < -0.5; decade += 1e-3) {
    all.push_back(std::pow(10.0, decade));
    all.push_back(1.0 - std::pow(10.0, decade));
  }
  return all;
}

double quantile_error(double p) {
  const long double truth = boost::math::quantile(kNormal, static_cast<long double>(p));
  return static_cast<double>(std::fabs((normal_quantile(p) - truth) / truth));
}

template <std::size_t N>
void check_lanes(std::mt19937_64& random) {
  std::uniform_real_distribution<double> tail(-22.9, -0.7);
  Pack<N> p;
  for (std::size_t k = 0; k < N; ++k) p.set(k, k % 2 == 0 ? e_to(tail(random)) : 1.0 - e_to(tail(random)));
  const Pack<N> z = normal_quantile(p), t = truncated_normal(p), s = symmetric_uniform(p);
  const auto bytes = [](double x) { return std::bit_cast<std::uint64_t>(x); };
  for (std::size_t k = 0; k < N; ++k) {
    REQUIRE(bytes(z[k]) == bytes(normal_quantile(p[k])));
    REQUIRE(bytes(t[k]) == bytes(truncated_normal(p[k])));
    REQUIRE(bytes(s[k]) == bytes(symmetric_uniform(p[k])));
  }
}

struct Moments {
  double mean = 0, variance = 0, fourth = 0;
};

template <class Draw>
Moments moments_of(Draw draw) {
  double sum = 0, squares = 0, fourths = 0;
  for (int i = 0; i < kDraws; ++i) {
    const double x = draw(i), x2 = x * x;
    sum += x, squares += x2, fourths += x2 * x2;
  }
  return {sum / kDraws, squares / kDraws, fourths / kDraws};  // about 0, where the true mean lies
}

/// The mean is 0 and the variance that of `deviation`, as far as so many draws can tell.
void check_moments(const Moments& m, double deviation) {
  CHECK(std::fabs(m.mean) < kErrors * deviation / std::sqrt(kDraws));
  const double variance = deviation * deviation;
  CHECK(std::fabs(m.variance - variance) < kErrors * std::sqrt((m.fourth - variance * variance) / kDraws));
}

/// Correlation of uniform numbers x(i) and y(i) about their true mean, in its standard errors.
template <class X, class Y>
double correlation(X x, Y y) {
  double sum = 0;
  constexpr int kPairs = 200000;
  for (int i = 0; i < kPairs; ++i) sum += (x(i) - 0.5) * (y(i) - 0.5);
  return sum / kPairs * 12.0 * std::sqrt(kPairs);
}

}  // namespace

TEST_CASE("the normal quantile agrees with Boost.Math in the centre and both tails", "[numeric]") {
  double worst = 0;
  for (double p : probabilities()) worst = std::max(worst, quantile_error(p));
  CHECK(worst < kQuantileError);
  CHECK(normal_quantile(0.5) == 0.0);
}

TEST_CASE("the normal quantile agrees with printed percentage points", "[numeric]") {
  // Abramowitz & Stegun, Handbook of Mathematical Functions, table 26.6 (from memory)
  CHECK(normal_quantile(0.975) == Approx(1.959963985).margin(5e-10));
  CHECK(normal_quantile(0.995) == Approx(2.575829304).margin(5e-10));
  CHECK(normal_quantile(0.001) == Approx(-3.090232306).margin(5e-10));
}

TEST_CASE("deviates in lanes hold the same bytes as double, whichever range each lane needs", "[numeric]") {
  std::mt19937_64 random(21);
  for (int i = 0; i < 5000; ++i) {
    check_lanes<2>(random);
    check_lanes<4>(random);
  }
}

TEST_CASE("the quantile's derivative is one over the density", "[numeric]") {
  for (double p : {1e-9, 1e-3, 0.07, 0.08, 0.3, 0.6, 0.92, 0.93, 0.9999}) {
    const Dual<double> z = normal_quantile(Dual<double>(p, 1.0));
    const auto density = static_cast<double>(boost::math::pdf(kNormal, static_cast<long double>(z.value)));
    CHECK(z.slope * density == Approx(1.0).epsilon(1e-12));  // differentiating the fraction loses some digits
  }
}

TEST_CASE("the truncated normal has the distribution of a normal cut at 3 sigma", "[numeric]") {
  const long double beyond = boost::math::cdf(kNormal, -3.0L);
  CHECK(static_cast<double>(2 * beyond) == Approx(0.0027).margin(5e-5));  // 0.27 % removed
  for (double u : {1e-9, 1e-4, 0.01, 0.2, 0.5, 0.7, 0.99, 1 - 1e-6}) {
    const long double below = boost::math::cdf(kNormal, 3.0L * truncated_normal(u));
    CHECK(static_cast<double>((below - beyond) / (1 - 2 * beyond)) == Approx(u).epsilon(0).margin(kProbabilityError));
  }
  for (double u : {0x1p-53, 1 - 0x1p-53}) CHECK(std::fabs(truncated_normal(u)) <= 1.0);
  for (double u : {0x1p-53, 1 - 0x1p-53}) CHECK(std::fabs(truncated_normal(u)) > 1.0 - 1e-13);
}

TEST_CASE("moments of a part's deviation: truncated normal and uniform", "[numeric]") {
  // truncated at 3 sigma: variance of a doubly truncated normal (Johnson, Kotz & Balakrishnan, Continuous Univariate
  // Distributions 1, section 13.10.1, from memory), in units of the tolerance
  const auto density = static_cast<double>(boost::math::pdf(kNormal, 3.0L));
  const auto inside = static_cast<double>(1 - 2 * boost::math::cdf(kNormal, -3.0L));
  const double truncated = std::sqrt(1 - 2 * 3 * density / inside) / 3;
  CHECK(truncated == Approx(0.3289).margin(5e-5));
  check_moments(moments_of([](int i) { return truncated_normal(unit_uniform(1, i, 0)); }), truncated);

  // uniform of half width a: a / sqrt(3) (JCGM 100:2008, 4.3.7; NIST TN 1297, 4.6)
  const Moments uniform = moments_of([](int i) { return symmetric_uniform(unit_uniform(2, i, 0)); });
  check_moments(uniform, 1 / std::sqrt(3.0));
}

TEST_CASE("as many normal draws lie beyond 3 sigma as should", "[numeric]") {
  const auto share = static_cast<double>(2 * boost::math::cdf(kNormal, -3.0L));
  int beyond = 0;
  for (int i = 0; i < kDraws; ++i) beyond += std::fabs(normal_quantile(unit_uniform(3, i, 0))) > 3.0 ? 1 : 0;
  CHECK(std::fabs(beyond - share * kDraws) < kErrors * std::sqrt(share * (1 - share) * kDraws));
}

TEST_CASE("the random stream gives the published numbers of SplitMix64", "[numeric]") {
  // first five of seed 1234567: Rosetta Code, Pseudo-random numbers/Splitmix64
  RandomStream random(1234567);
  for (std::uint64_t truth : {6457827717110365317ull, 3203168211198807973ull, 9817491932198370423ull,
                              4593380528125082431ull, 16408922859458223821ull})
    CHECK(random.next() == truth);
}

TEST_CASE("a unit's numbers depend on seed, unit and draw alone", "[numeric]") {
  std::vector<double> forward;
  for (int draw = 0; draw < 100; ++draw) forward.push_back(unit_uniform(7, 42, draw));
  for (int draw = 99; draw >= 0; --draw) {
    unit_uniform(7, 41, draw), unit_uniform(8, 42, draw);
    REQUIRE(unit_uniform(7, 42, draw) == forward[draw]);
  }
}

TEST_CASE("the least and the largest uniform number lie as far inside as each other", "[numeric]") {
  CHECK(detail::uniform_of(0) == 0x1p-53);
  CHECK(detail::uniform_of(~0ull) == 1 - 0x1p-53);
}

TEST_CASE("uniform numbers lie inside the open interval, and neighbouring streams share none", "[numeric]") {
  std::set<double> seen;
  std::size_t drawn = 0;
  const std::uint64_t seeds[] = {0, 1, 2, kRandomStep, 0 - kRandomStep, ~0ull};
  for (std::uint64_t seed : seeds)
    for (int unit = 0; unit < 500; ++unit)
      for (int draw = 0; draw < 40; ++draw, ++drawn) seen.insert(unit_uniform(seed, unit, draw));
  for (std::uint64_t unit = 1; unit < 500; ++unit, ++drawn) seen.insert(unit_uniform(0, unit * kRandomStep, 0));
  CHECK(seen.size() == drawn);  // two equal by chance of 2^52: 2 in a million
  CHECK(*seen.begin() > 0.0);
  CHECK(*seen.rbegin() < 1.0);
}

TEST_CASE("uniform numbers have the mean, variance and evenness of uniform ones", "[numeric]") {
  // along the draws of a unit, the units of a seed, and the seeds
  const auto draws = [](int i) { return unit_uniform(11, 5, i); };
  const auto units = [](int i) { return unit_uniform(11, i, 5); };
  const auto seeds = [](int i) { return unit_uniform(i, 11, 5); };
  const auto check = [](auto number) {
    check_moments(moments_of([&](int i) { return number(i) - 0.5; }), 1 / std::sqrt(12.0));
    std::vector<int> bins(64);
    for (int i = 0; i < kDraws; ++i) ++bins[static_cast<std::size_t>(number(i) * 64)];
    double chi_squared = 0;
    for (int count : bins) chi_squared += (count - kDraws / 64.0) * (count - kDraws / 64.0) / (kDraws / 64.0);
    const boost::math::chi_squared_distribution<double> law(63);
    const auto four_sigma = static_cast<double>(boost::math::cdf(kNormal, -4.0L));
    CHECK(chi_squared < quantile(complement(law, four_sigma)));
    CHECK(chi_squared > quantile(law, four_sigma));
  };
  check(draws);
  check(units);
  check(seeds);
}

TEST_CASE("neighbouring draws, units and seeds are not correlated", "[numeric]") {
  const auto at = [](int seed, int unit, int draw) { return unit_uniform(seed, unit, draw); };
  for (int step : {1, 2, 3, 8}) {
    CAPTURE(step);
    CHECK(std::fabs(correlation([&](int i) { return at(1, 9, i); }, [&](int i) { return at(1, 9, i + step); })) <
          kErrors);
    CHECK(std::fabs(correlation([&](int i) { return at(1, i, 9); }, [&](int i) { return at(1, i + step, 9); })) <
          kErrors);
    CHECK(std::fabs(correlation([&](int i) { return at(i, 1, 9); }, [&](int i) { return at(i + step, 1, 9); })) <
          kErrors);
    CHECK(std::fabs(correlation([&](int i) { return at(1, i, 9); }, [&](int i) { return at(1, i, 9 + step); })) <
          kErrors);
    CHECK(std::fabs(correlation([&](int i) { return at(1, i, 9); }, [&](int i) { return at(1 + step, i, 9); })) <
          kErrors);
    CHECK(std::fabs(correlation([&](int i) { return at(1, 9, i); }, [&](int i) { return at(1, 9 + step, i); })) <
          kErrors);
  }
}
