// Tolerance allocation. The truth is the meaning of "the loosest that still gives the yield": simulated again here.
#include <algorithm>
#include <cmath>

#include "assessment/simulation.hpp"
#include "catch.hpp"
#include "sample_population.hpp"

using namespace bandwright;
using namespace bandwright::test;

namespace {

// 1 % resistors suffice for some of the parts, 5 % for others.
SampleDesign tight_design(const char* yield) {
  return sample_design(R"({"gain": {"target": 32.1, "tolerance": "5 %"}, "lower_cutoff": {"max": "35 Hz"},
                           "upper_cutoff": {"target": "19.4 kHz", "tolerance": "12 %"}})",
                       std::string(R"(, "assess": {"units": 4000, "interval": 0, "yield": ")") + yield + "\"}");
}

Allocation allocation_of(const SampleDesign& s) {
  return allocate_tolerances(s.spec, built_in_catalogue(), s.device, s.parts, s.nominal);
}

/// The yield with every part at its needed class.
double yield_with(const SampleDesign& s, const Allocation& a) {
  OfferedParts parts = s.parts;
  for (const AllocatedPart& p : a.parts) parts[index(p.role)].tolerance = p.needed.tolerance;
  return simulated_yield(s.spec, population_of(s.spec, s.device, parts, s.nominal)).share();
}

}  // namespace

TEST_CASE("the allocated classes give the yield, and none of them may be looser", "[assessment][allocation]") {
  const SampleDesign s = tight_design("99 %");
  const Allocation a = allocation_of(s);
  REQUIRE(a.reached);
  REQUIRE(a.parts.size() == 9);
  CHECK(a.yield.share() >= 0.99);
  CHECK(yield_with(s, a) == Approx(a.yield.share()).margin(0.01));  // drift with temperature may differ by family
  int tight = 0, loose = 0;
  for (const AllocatedPart& p : a.parts) {
    INFO(info(p.role).designator);
    const bool tightened = !(p.needed.tolerance == p.loosest.tolerance);
    (tightened ? tight : loose) += 1;
    CHECK(half_width(p.needed.tolerance) <= half_width(p.loosest.tolerance));
    CHECK(std::isnan(p.yield_if_looser) == !tightened);
    if (tightened) CHECK(p.yield_if_looser < 0.99);
  }
  CHECK(tight > 0);
  CHECK(loose > 0);
}

TEST_CASE("every tightening says what it bought, one after the other", "[assessment][allocation]") {
  const Allocation a = allocation_of(tight_design("99 %"));
  REQUIRE_FALSE(a.steps.empty());
  for (std::size_t i = 0; i < a.steps.size(); ++i) {
    CHECK(half_width(a.steps[i].to.tolerance) < half_width(a.steps[i].from.tolerance));
    if (i > 0) CHECK(a.steps[i].yield_before == a.steps[i - 1].yield_after);
  }
  CHECK(a.steps.front().yield_before < 0.99);
  CHECK(a.steps.back().yield_after >= 0.99);
}

TEST_CASE("an easy yield needs no tight part, an impossible one says so", "[assessment][allocation]") {
  const Allocation easy = allocation_of(tight_design("10 %"));
  CHECK(easy.reached);
  CHECK(easy.steps.empty());
  SampleDesign s = tight_design("99 %");
  s.spec.requirements[index(Figure::gain)] = Requirement{32.1, 32.0, 32.2};
  const Allocation none = allocation_of(s);
  CHECK_FALSE(none.reached);
  CHECK(none.yield.share() < 0.99);
  CHECK_FALSE(none.steps.empty());
}
