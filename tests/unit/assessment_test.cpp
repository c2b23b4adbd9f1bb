// Tolerance sensitivity. Expected values are worked by hand from the definition in <bandwright/assessment.hpp>.
#include <bandwright/assessment.hpp>
#include <cmath>

#include "catch.hpp"

using namespace bandwright;

TEST_CASE("a symmetric tolerance counts as it is printed, an asymmetric one by its logarithms", "[assessment]") {
  CHECK(half_width({0.2, 0.2}) == 0.2);
  CHECK(half_width({0.2, 0.5}) == Approx(0.3143043));  // ln(1.5/0.8)/2
}

TEST_CASE("the root sum of squares over the window's half-width, for the worst figure", "[assessment]") {
  Spec spec;
  spec.requirements[index(Figure::gain)] = Requirement{100, 80, 125};                            // w = ln 1.25
  spec.requirements[index(Figure::lower_cutoff)] = Requirement{kNotComputed, kNotComputed, 50};  // w = ln 1.2
  Sensitivity s{};
  CauseWidths t{};
  t[0] = 0.01, t[5] = 0.10, t[9] = 0.5;
  s[index(Figure::gain)][0] = 3;           // 0.03
  s[index(Figure::gain)][9] = 0.08;        // 0.04: together 0.05
  s[index(Figure::lower_cutoff)][5] = -1;  // 0.1
  CHECK(tolerance_sensitivity(spec, s, t) == Approx(0.1 / std::log(1.2)));
  s[index(Figure::lower_cutoff)][5] = -0.1;
  CHECK(tolerance_sensitivity(spec, s, t) == Approx(0.05 / std::log(1.25)));
  s[index(Figure::gain)][1] = kNotComputed;
  CHECK(std::isnan(tolerance_sensitivity(spec, s, t)));
}
