// Error, margin and shortfall of a figure against its requirement. Expected values are worked by hand from the
// definitions in <bandwright/margins.hpp>.
#include <bandwright/margins.hpp>
#include <cmath>

#include "catch.hpp"

using namespace bandwright;

namespace {

constexpr double kOpen = kNotComputed;
const FigureInfo& gain() { return info(Figure::gain); }
const FigureInfo& current() { return info(Figure::supply_current); }

}  // namespace

TEST_CASE("error is 0 at the target and 1 at either limit", "[margins]") {
  const Requirement r{100, 80, 120};
  CHECK(requirement_error(r, gain(), 100) == 0);
  CHECK(requirement_error(r, gain(), 120) == Approx(1));
  CHECK(requirement_error(r, gain(), 80) == Approx(1));
  CHECK(requirement_error(r, gain(), 110) == Approx(std::log(1.1) / std::log(1.2)));
  CHECK(requirement_error(r, gain(), 144) == Approx(2));
  CHECK(requirement_error(r, gain(), kOpen) == kWorstError);
}

TEST_CASE("on an open side the error grows by the default tolerance and stops at 1", "[margins]") {
  const Requirement r{40, kOpen, 50};  // lower cutoff, default tolerance 20 %
  const FigureInfo& f = info(Figure::lower_cutoff);
  CHECK(requirement_error(r, f, 40 / 1.1) == Approx(std::log(1.1) / std::log(1.2)));
  CHECK(requirement_error(r, f, 4) == 1);
  CHECK(requirement_error(r, f, 50) == Approx(1));
}

TEST_CASE("a lone limit costs nothing while it is met and at least 1 when it is not", "[margins]") {
  const Requirement r{kOpen, kOpen, 5e-3};  // default tolerance 10 %
  CHECK(requirement_error(r, current(), 4.9e-3) == 0);
  CHECK(requirement_error(r, current(), 5.5e-3) == Approx(2));
  CHECK_FALSE(meets(r, 5.01e-3));
}

TEST_CASE("a limit equal to the target counts as a thousandth away", "[margins]") {
  const Requirement r{100, 100, 120};
  CHECK(requirement_error(r, gain(), 100) == 0);
  CHECK(requirement_error(r, gain(), 100 / 1.001) == Approx(1));
  CHECK(window_width(r, gain()) == Approx(std::log(1.001)));
}

TEST_CASE("margin is 1 at the target, 0 at the limit, negative outside", "[margins]") {
  const Requirement r{100, 80, 125};
  CHECK(requirement_margin(r, gain(), 100) == Approx(1));
  CHECK(requirement_margin(r, gain(), 125) == Approx(0).margin(1e-12));
  CHECK(requirement_margin(r, gain(), 80) == Approx(0).margin(1e-12));
  CHECK(requirement_margin(r, gain(), 112) == Approx(std::log(125 / 112.0) / std::log(1.25)));
  CHECK(requirement_margin(r, gain(), 150) < 0);
  const Requirement lone{kOpen, 2.0, kOpen};
  CHECK(requirement_margin(lone, info(Figure::output_swing), 3.0) == Approx(0.5));
  const Requirement amps{4e-3, kOpen, 5e-3};  // a current is judged by difference
  CHECK(requirement_margin(amps, current(), 4.5e-3) == Approx(0.5));
}

TEST_CASE("the window's half-width is the smaller side, or half of a band without target", "[margins]") {
  CHECK(window_width({100, 80, 150}, gain()) == Approx(std::log(1.25)));
  CHECK(window_width({kOpen, 100, 400}, gain()) == Approx(std::log(4.0) / 2));
  CHECK(window_width({kOpen, 100, kOpen}, info(Figure::lower_cutoff)) == Approx(std::log(1.2)));
}

TEST_CASE("the deviation has the error's size inside its window and an exact slope", "[margins]") {
  const Requirement r{100, 80, 125};
  for (double x : {70.0, 90.0, 110.0, 180.0}) {
    const Deviation d = deviation(r, gain(), x);
    CHECK(std::fabs(d.value) == Approx(requirement_error(r, gain(), x)));
    const double h = 1e-6;
    const double numeric = (deviation(r, gain(), x * (1 + h)).value - deviation(r, gain(), x * (1 - h)).value) /
                           std::log((1 + h) / (1 - h));
    CHECK(d.slope == Approx(numeric).epsilon(1e-6));
  }
}

TEST_CASE("a shortfall names figure, value, limit and amount", "[margins]") {
  Spec spec;
  spec.requirements[index(Figure::gain)] = Requirement{kOpen, 50, kOpen};
  spec.requirements[index(Figure::lower_cutoff)] = Requirement{kOpen, kOpen, 100};
  FigureValues values;
  values.fill(kNotComputed);
  values[index(Figure::gain)] = 25;
  const auto list = shortfalls(spec, values);
  REQUIRE(list.size() == 2);
  CHECK(list[0].text == "gain: 25, needs at least 50 (6.02 dB short)");
  CHECK(list[1].text == "lower cutoff: none, needs at most 100 Hz");
  CHECK_FALSE(meets_all(spec, values));
}
