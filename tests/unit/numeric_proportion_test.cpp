// The interval for a proportion: printed values, closed forms, Boost.Math, and the coverage that it promises.
#include <algorithm>
#include <boost/math/distributions/binomial.hpp>
#include <boost/math/special_functions/beta.hpp>
#include <cmath>
#include <random>

#include "catch.hpp"
#include "numeric/deviate.hpp"
#include "numeric/proportion.hpp"

using namespace bandwright;

namespace {

constexpr double kPrinted = 5e-11;   // half a unit of the tenth decimal
constexpr double kEndError = 1e-14;  // relative: what proportion.hpp promises
constexpr double kInverseError =
    1e-12;  // relative: Boost's own is off by 1e-13 here and there, as the binomial sum shows

/// A count of passing units and its printed 95 % interval.
struct Printed {
  std::size_t passed, units;
  double low, high;
};

const Printed kPrintedIntervals[] = {
    {7, 50, .0581917003, .2673960025},  // SciPy's reference page of BinomTestResult.proportion_ci
    {7, 20, .1539092048, .5921885345},  // a published table, read second hand
    // derived here with another program of beta quantiles
    {0, 100, 0, .0362166926},
    {100, 100, .9637833074, 1},
    {995, 1000, .9883705294, .9983745805},
    {9900, 10000, .9878504951, .9918564034},
};

/// Boost's quantiles in long double.
Interval boost_interval(std::size_t passed, std::size_t units, double confidence) {
  const long double in = passed, out = units - passed, tail = (1 - confidence) / 2;
  return {passed == 0 ? 0.0 : static_cast<double>(boost::math::ibeta_inv(in, out + 1, tail)),
          passed == units ? 1.0 : static_cast<double>(boost::math::ibetac_inv(in + 1, out, tail))};
}

/// The probability of the count `passed` and all lower (or all higher) ones, over that of the count itself.
long double tail_over_count(long double passed, long double units, long double share, bool lower) {
  const long double odds = share / (1 - share);
  long double sum = 1, term = 1;
  for (long double k = passed; term > 1e-22L * sum; k += lower ? -1 : 1) {
    term *= lower ? k / (units - k + 1) / odds : (units - k) / (k + 1) * odds;
    sum += term;
  }
  return sum;
}

/// How far the worse end lies from where the binomial tail has its stated probability, relative, by Newton's step.
double worst_distance(std::size_t passed, std::size_t units, double confidence) {
  const long double in = passed, out = units - passed, all = units;
  const auto distance = [&](long double share, bool lower) {
    // Boost's binomial law itself would take the power of a rounded 1 - share where none passed
    const long double count = boost::math::ibeta_derivative(in + 1, out + 1, share) / (all + 1);
    const long double missing = tail_over_count(in, all, share, lower) - (1 - confidence) / 2 / count;
    const long double slope = lower ? out * share / (1 - share) : in;  // against ln(share)
    return static_cast<double>(std::fabs(missing / slope));
  };
  const Interval got = clopper_pearson(passed, units, confidence);
  return std::max(passed == 0 ? 0.0 : distance(got.low, false), passed == units ? 0.0 : distance(got.high, true));
}

/// Counts of every size up to 10 million, from few passed to all but few.
struct Counts {
  std::size_t passed, units;
};
Counts random_counts(std::mt19937_64& random) {
  std::uniform_real_distribution<double> ln_units(0, std::log(1e7)), share(0, 1);
  const auto units = static_cast<std::size_t>(std::exp(ln_units(random)));
  const auto few = static_cast<std::size_t>(std::pow(static_cast<double>(units), share(random)));
  switch (random() % 3) {
    case 0:
      return {random() % (units + 1), units};
    case 1:
      return {few - 1, units};
    default:
      return {units - few, units};
  }
}

/// How often the 95 % interval holds the true share: the sum over all counts that may come.
double exact_coverage(double share, std::size_t units) {
  const boost::math::binomial_distribution<double> law(static_cast<double>(units), share);
  double sum = 0;
  for (std::size_t passed = 0; passed <= units; ++passed) {
    const Interval interval = clopper_pearson(passed, units);
    if (interval.low <= share && share <= interval.high) sum += pdf(law, static_cast<double>(passed));
  }
  return sum;
}

bool replica_covers(double share, std::uint64_t seed, std::size_t units) {
  std::size_t passed = 0;
  for (std::size_t unit = 0; unit < units; ++unit) passed += unit_uniform(seed, unit, 0) < share ? 1 : 0;
  const Interval interval = clopper_pearson(passed, units);
  return interval.low <= share && share <= interval.high;
}

}  // namespace

TEST_CASE("Clopper-Pearson intervals as printed", "[numeric]") {
  for (const Printed& row : kPrintedIntervals) {
    CAPTURE(row.passed, row.units);
    const Interval got = clopper_pearson(row.passed, row.units);
    CHECK(std::fabs(got.low - row.low) < kPrinted);
    CHECK(std::fabs(got.high - row.high) < kPrinted);
  }
}

TEST_CASE("Clopper-Pearson without units, with none and with all passed", "[numeric]") {
  CHECK(clopper_pearson(0, 0).low == 0.0);
  CHECK(clopper_pearson(0, 0).high == 1.0);
  for (std::size_t units : {1, 2, 30, 4000, 10000000}) {
    CAPTURE(units);
    const long double exponent = std::log(0.025L) / units;  // all pass with probability p^n
    CHECK(clopper_pearson(units, units).low == Approx(static_cast<double>(std::exp(exponent))).epsilon(kEndError));
    CHECK(clopper_pearson(units, units).high == 1.0);
    CHECK(clopper_pearson(0, units).high == Approx(static_cast<double>(-std::expm1(exponent))).epsilon(kEndError));
    CHECK(clopper_pearson(0, units).low == 0.0);
  }
}

TEST_CASE("Clopper-Pearson agrees with beta quantiles and binomial sums up to 10 million units", "[numeric]") {
  std::mt19937_64 random(31);
  for (int i = 0; i < 600; ++i) {
    const Counts counts = random_counts(random);
    const double confidence = i % 2 == 0 ? 0.95 : std::uniform_real_distribution<double>(0.01, 0.999)(random);
    const Interval got = clopper_pearson(counts.passed, counts.units, confidence);
    const Interval truth = boost_interval(counts.passed, counts.units, confidence);
    CAPTURE(counts.passed, counts.units, confidence);
    CHECK(std::fabs(got.low - truth.low) <= kInverseError * truth.low);
    CHECK(std::fabs(got.high - truth.high) <= kInverseError * truth.high);
    CHECK(worst_distance(counts.passed, counts.units, confidence) < kEndError);
  }
}

TEST_CASE("Clopper-Pearson covers the true share at least as often as stated", "[numeric]") {
  for (std::size_t units : {5, 40, 300})
    for (double share : {0.001, 0.02, 0.3, 0.5, 0.77, 0.97, 0.998}) {
      CAPTURE(units, share);
      CHECK(exact_coverage(share, units) >= 0.95);
    }
}

TEST_CASE("Clopper-Pearson covers a known yield in simulated lots", "[numeric]") {
  constexpr int kReplicas = 200;
  int covering = 0;
  for (int seed = 0; seed < kReplicas; ++seed) covering += replica_covers(0.97, seed, 2000) ? 1 : 0;
  // one-sided: so few or fewer would come with 95 % coverage in less than one run of a thousand
  const boost::math::binomial_distribution<double> law(kReplicas, 0.95);
  CAPTURE(covering);
  CHECK(cdf(law, covering) > 1e-3);
}
