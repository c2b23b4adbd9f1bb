// beta0 over collector current: the monotone cubic and the points it must go through.
// clang-format off: the interpolator of Boost 1.74 calls isnan and leaves its declaration to whoever includes it
#include <math.h>

#include <boost/math/interpolators/pchip.hpp>
// clang-format on
#include <algorithm>
#include <bandwright/device.hpp>
#include <cmath>

#include "catch.hpp"
#include "device/gain_curve.hpp"
#include "device/gain_lists.hpp"

using namespace bandwright;

namespace {

// Both methods evaluate the same cubic; what is left is the rounding of about ten operations on numbers near 5.
constexpr double kSameCubic = 1e-13;
// A central difference over h in ln IC: truncation h^2 f'''/6 and rounding 1e-16/h, balanced near h = 1e-5.
constexpr double kStep = 1e-5;
constexpr double kDifference = 1e-8;
// exp and log of the test against those of the library, and back.
constexpr double kPrintedGain = 1e-12;

double value(const GainCurve& curve, double x) { return gain_point<double>(curve, x).log_gain; }
double slope(const GainCurve& curve, double x) { return gain_point<double>(curve, x).slope; }

// beta = beta0 (1 + VCE/VA) of a curve at a published point.
double printed(const GainCurve& curve, const BipolarParameters& p, double current, double volts) {
  return std::exp(value(curve, std::log(current))) * (1 + volts * p.inverse_early_voltage);
}

const Transistor& type(const char* name) { return *built_in_catalogue().find_transistor(name); }

bool warm(const SheetFigure& f) { return std::isnan(f.temperature); }

}  // namespace

TEST_CASE("the curve is the monotone cubic of an independent library") {
  for (const Transistor& t : built_in_catalogue().transistors) {
    const GainCurve curve = derive_parameters(t).parameters.gain_min;
    if (curve.points < 4) continue;  // fewer than the other library takes
    std::vector<double> x(curve.log_current.begin(), curve.log_current.begin() + curve.points);
    std::vector<double> y(curve.log_gain.begin(), curve.log_gain.begin() + curve.points);
    const double low = x.front(), high = x.back();
    const boost::math::interpolators::pchip<std::vector<double>> other(std::move(x), std::move(y), 0.0, 0.0);
    for (int i = 0; i <= 1000; ++i) {
      const double at = std::min(low + (high - low) * i / 1000, high);
      INFO(t.type << " at ln IC = " << at);
      CHECK(std::fabs(value(curve, at) - other(at)) < kSameCubic);
      CHECK(std::fabs(slope(curve, at) - other.prime(at)) < 10 * kSameCubic);
    }
  }
}

TEST_CASE("the curve goes through its points, never beyond them, and is flat outside") {
  const GainCurve curve = monotone_cubic({{-9, 3.5}, {-7, 4.2}, {-5, 4.2}, {-3, 4.6}, {-2, 3.4}});
  const double points[][2] = {{-9, 3.5}, {-7, 4.2}, {-5, 4.2}, {-3, 4.6}, {-2, 3.4}};
  for (const auto& p : points) CHECK(value(curve, p[0]) == Approx(p[1]).epsilon(kSameCubic));
  for (int i = 0; i + 1 < 5; ++i) {
    const double low = std::min(points[i][1], points[i + 1][1]), high = std::max(points[i][1], points[i + 1][1]);
    for (int k = 0; k <= 100; ++k) {
      const double y = value(curve, points[i][0] + (points[i + 1][0] - points[i][0]) * k / 100.0);
      CHECK(y >= low - kSameCubic);
      CHECK(y <= high + kSameCubic);
    }
  }
  for (const double outside : {-40.0, -9.5, -1.5, 3.0}) {
    CHECK(value(curve, outside) == Approx(outside < -5 ? 3.5 : 3.4).epsilon(kSameCubic));
    CHECK(slope(curve, outside) == 0.0);
  }
}

TEST_CASE("the slope is the derivative, also at the ends") {
  const GainCurve curve = derive_parameters(type("2N3904")).parameters.gain;
  for (double x = -12; x < -1; x += 0.01) {
    const double difference = (value(curve, x + kStep) - value(curve, x - kStep)) / (2 * kStep);
    INFO(x);
    // Where the second derivative jumps the difference is off by h times half the jump.
    CHECK(std::fabs(slope(curve, x) - difference) < kDifference + 2 * kStep);
  }
}

TEST_CASE("a type whose shape comes from its min points returns every one of them") {
  // 2N3904 (onsemi, MCC), 2N4401 (Central, Fairchild), 2N3906 (Multicomp, NXP), 2N5088 (onsemi, Motorola), 2N5551
  // (Fairchild, Motorola): hFE as printed, read through text copies.
  for (const char* name : {"2N3904", "2N4401", "2N3906", "2N5088", "2N5089", "2N5551", "BC337-25", "BC337-40"}) {
    const BipolarParameters p = derive_parameters(type(name)).parameters;
    for (const SheetFigure& f : type(name).current_gain) {
      INFO(name << " at " << f.collector_current);
      if (!std::isnan(f.min)) {
        CHECK(printed(p.gain_min, p, f.collector_current, f.collector_emitter_voltage) ==
              Approx(f.min).epsilon(kPrintedGain));
      }
      if (!std::isnan(f.max)) {
        CHECK(printed(p.gain_max, p, f.collector_current, f.collector_emitter_voltage) ==
              Approx(f.max).epsilon(kPrintedGain));
      }
      if (!std::isnan(f.typ)) {
        CHECK(printed(p.gain, p, f.collector_current, f.collector_emitter_voltage) ==
              Approx(f.typ).epsilon(kPrintedGain));
      }
    }
  }
}

TEST_CASE("a type whose shape comes from its typical points returns them, and min and max at their anchor") {
  // BC547 (Diotec, NXP, onsemi), BC550C (Motorola), BC557B (Rectron, NXP), BFR92A (Infineon BFR92P): read through text
  // copies. Besides the anchor BC550C prints a min of 100 at 10 uA, where the shape of the typical points gives more.
  for (const char* name : {"BC547A", "BC547B", "BC547C", "BC550C", "BC557B", "BFR92A"}) {
    const BipolarParameters p = derive_parameters(type(name)).parameters;
    for (const SheetFigure& f : type(name).current_gain) {
      INFO(name << " at " << f.collector_current);
      if (!std::isnan(f.typ)) {
        CHECK(printed(p.gain, p, f.collector_current, f.collector_emitter_voltage) ==
              Approx(f.typ).epsilon(kPrintedGain));
      }
      if (!std::isnan(f.max)) {
        CHECK(printed(p.gain_min, p, f.collector_current, f.collector_emitter_voltage) ==
              Approx(f.min).epsilon(kPrintedGain));
        CHECK(printed(p.gain_max, p, f.collector_current, f.collector_emitter_voltage) ==
              Approx(f.max).epsilon(kPrintedGain));
      }
    }
  }
}

TEST_CASE("2N2222A: cold points stay out, and of two at one current the one with VCE nearest 5 V stays") {
  // Semelab (3/96), NXP PMBT2222A Rev 6, onsemi MBT2222ADW1: hFE min 35, 50, 75 at 0.1, 1, 10 mA and 10 V, 100 at
  // 150 mA and 10 V but 50 at 1 V, 40 at 500 mA and 10 V; 35 at 10 mA and -55 °C. Read through text copies.
  const BipolarParameters p = derive_parameters(type("2N2222A")).parameters;
  CHECK(p.gain_min.points == 5);
  CHECK(printed(p.gain_min, p, 0.1e-3, 10) == Approx(35).epsilon(kPrintedGain));
  CHECK(printed(p.gain_min, p, 10e-3, 10) == Approx(75).epsilon(kPrintedGain));
  CHECK(printed(p.gain_min, p, 150e-3, 1) == Approx(50).epsilon(kPrintedGain));
  CHECK(printed(p.gain_min, p, 500e-3, 10) == Approx(40).epsilon(kPrintedGain));
  CHECK(printed(p.gain_max, p, 150e-3, 10) == Approx(300).epsilon(kPrintedGain));
  CHECK(printed(p.gain, p, 1e-3, 10) == Approx(150).epsilon(kPrintedGain));
}

TEST_CASE("between the extremes: nominal hFE lies between min and max at the usual currents") {
  for (const Transistor& t : built_in_catalogue().transistors) {
    const BipolarParameters p = derive_parameters(t).parameters;
    for (const double current : {0.1e-3, 0.3e-3, 1e-3, 3e-3, 10e-3}) {
      INFO(t.type << " at " << current);
      const double x = std::log(current);
      CHECK(value(p.gain_min, x) < value(p.gain, x));
      CHECK(value(p.gain, x) < value(p.gain_max, x));
    }
  }
}

TEST_CASE("hFE without a max: three times the min; without a typ: the geometric mean") {
  SheetFigure low;
  low.min = 50;
  low.collector_current = 0.1e-3;
  low.collector_emitter_voltage = 5;
  SheetFigure high = low;
  high.min = 80;
  high.collector_current = 10e-3;
  GainCurves curves = gain_curves(gain_lists({low, high}), 0);
  for (const double x : {-9.5, -7.0, -5.0}) {
    CHECK(value(curves.max, x) - value(curves.min, x) == Approx(std::log(3.0)).epsilon(kSameCubic));
    CHECK(value(curves.nominal, x) - value(curves.min, x) == Approx(std::log(3.0) / 2).epsilon(kSameCubic));
  }
  high.max = 320;
  curves = gain_curves(gain_lists({low, high}), 0);
  CHECK(std::exp(value(curves.max, -9.0)) == Approx(320).epsilon(kPrintedGain));
  CHECK(std::exp(value(curves.nominal, std::log(10e-3))) == Approx(160).epsilon(kPrintedGain));  // sqrt(80 320)
  CHECK(std::exp(value(curves.nominal, std::log(0.1e-3))) == Approx(std::sqrt(50.0 * 320)).epsilon(kPrintedGain));
}

TEST_CASE("all points of the fifteen types are at room temperature but one") {
  int cold = 0;
  for (const Transistor& t : built_in_catalogue().transistors) {
    for (const SheetFigure& f : t.current_gain) cold += !warm(f);
  }
  CHECK(cold == 1);
}
