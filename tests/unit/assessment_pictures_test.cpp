// What later pictures need: response, envelope, histograms and node voltages, against the figures they must agree with.
#include <algorithm>
#include <cmath>
#include <numeric>

#include "catch.hpp"
#include "sample_population.hpp"

using namespace bandwright;
using namespace bandwright::test;

namespace {

Assessment pictured() {
  const SampleDesign s = sample_design(kBandRequirements, R"(, "ambient": {"min": "0 °C", "max": "45 °C"},
                                                              "assess": {"units": 2000, "interval": 0})");
  return assess(s.spec, s.population(), s.nominal, {true});
}

/// |H| at a frequency, by the line between its neighbours in logarithms.
double magnitude_at(const ResponseCurve& r, double frequency) {
  const auto next = std::upper_bound(r.frequency.begin(), r.frequency.end(), frequency);
  const auto i = static_cast<std::size_t>(next - r.frequency.begin());
  const double t = std::log(frequency / r.frequency[i - 1]) / std::log(r.frequency[i] / r.frequency[i - 1]);
  return r.magnitude[i - 1] * std::pow(r.magnitude[i] / r.magnitude[i - 1], t);
}

}  // namespace

TEST_CASE("the response spans a decade beyond each cutoff, twenty points a decade", "[assessment][pictures]") {
  const Assessment a = pictured();
  const SampleDesign s = sample_design(kBandRequirements);
  const ResponseCurve& r = a.response;
  const FigureValues& f = s.nominal.figures;
  CHECK(r.frequency.front() == Approx(f[index(Figure::lower_cutoff)] / 10));
  CHECK(r.frequency.back() >= 10 * f[index(Figure::upper_cutoff)] * (1 - 1e-9));
  CHECK(r.frequency[20] == Approx(10 * r.frequency[0]));
  const double half_power = f[index(Figure::gain)] / std::sqrt(2.0);
  CHECK(magnitude_at(r, f[index(Figure::lower_cutoff)]) == Approx(half_power).epsilon(5e-3));
  CHECK(magnitude_at(r, f[index(Figure::upper_cutoff)]) == Approx(half_power).epsilon(5e-3));
  for (std::size_t i = 1; i < r.phase.size(); ++i) CHECK(std::fabs(r.phase[i] - r.phase[i - 1]) < 90);
  // an inverting stage, two zeros at the origin: the phase falls from over the midband's 180 degrees to under it
  const auto middle =
      static_cast<std::size_t>(std::max_element(r.magnitude.begin(), r.magnitude.end()) - r.magnitude.begin());
  CHECK(std::fabs(std::remainder(r.phase[middle] - 180, 360)) < 10);
  CHECK(r.phase.front() > r.phase.back());
}

TEST_CASE("the envelope holds the nominal response, in order", "[assessment][pictures]") {
  const ResponseCurve r = pictured().response;
  REQUIRE(r.min.size() == r.frequency.size());
  for (std::size_t i = 0; i < r.frequency.size(); ++i) {
    CHECK(r.min[i] <= r.low[i]);
    CHECK(r.low[i] <= r.magnitude[i]);
    CHECK(r.magnitude[i] <= r.high[i]);
    CHECK(r.high[i] <= r.max[i]);
  }
}

TEST_CASE("a histogram counts every active unit once", "[assessment][pictures]") {
  const Assessment a = pictured();
  for (Figure f : {Figure::gain, Figure::lower_cutoff, Figure::upper_cutoff}) {
    const FigureSpread& s = a.spread[index(f)];
    REQUIRE(s.edges.size() == s.counts.size() + 1);
    CHECK(std::accumulate(s.counts.begin(), s.counts.end(), std::size_t{0}) == a.yield.units - a.yield.not_active);
    CHECK(s.edges.front() < s.mean);
    CHECK(s.mean < s.edges.back());
  }
}

TEST_CASE("node voltages lie about their nominal values, inside the supply", "[assessment][pictures]") {
  const Assessment a = pictured();
  REQUIRE(a.node_voltages.size() == 3);
  for (const NodeVoltage& n : a.node_voltages) {
    CHECK(0 < n.min);
    CHECK(n.min < n.nominal);
    CHECK(n.nominal < n.max);
    CHECK(n.max < 12.6);
  }
}

TEST_CASE("nothing is pictured unasked", "[assessment][pictures]") {
  const SampleDesign s = sample_design(kBandRequirements);
  const Assessment a = assess(s.spec, s.population(), s.nominal);
  CHECK(a.response.frequency.empty());
  CHECK(a.spread[0].edges.empty());
}
