// Numbers of an assessment in words.
#include "catch.hpp"
#include "report/shown_assessment.hpp"
#include "report/shown_causes.hpp"
#include "sample_result.hpp"

using namespace bandwright;

TEST_CASE("limits are worded by the scale on which they act") {
  const CauseInfo& part = info(Cause::collector);
  CHECK(limits_text(part, {0, 0.01, 0.01, ""}) == "±1 %");
  CHECK(limits_text(part, {0, 0.2, 0.5, ""}) == "-20/+50 %");
  CHECK(limits_text(part, {0, 0, 0.5, ""}) == "-0/+50 %");
  // e^0.742 = 2.10, e^-0.916 = 0.400
  CHECK(limits_text(info(Cause::current_gain), {-0.087, 0.829, 0.829, ""}) == "x0.4 to x2.1");
  CHECK(limits_text(info(Cause::base_emitter_voltage), {0, 0.04, 0.04, ""}) == "±40 mV");
  CHECK(limits_text(info(Cause::base_emitter_voltage), {0, 0.03, 0.05, ""}) == "-30 mV to +50 mV");
}

TEST_CASE("a share is never rounded up to all") {
  CHECK(share_text(0.992) == "99.2 %");
  CHECK(share_text(1) == "100 %");
  CHECK(share_text(0.91) == "91 %");
  CHECK(share_text(19999.0 / 20000) == "99.995 %");
  CHECK(share_text(0) == "0 %");
  CHECK(share_text(kNotComputed) == "-");
}

TEST_CASE("units are counted in thousands") {
  CHECK(counted(0) == "0");
  CHECK(counted(999) == "999");
  CHECK(counted(20000) == "20,000");
  CHECK(counted(1234567) == "1,234,567");
}

TEST_CASE("a capability from mean and sigma is marked") {
  Assessment assessment = *test::sample_candidate().assessment;
  CHECK(capability_text(1.414, assessment) == "1.41");
  assessment.from_moments = true;
  CHECK(capability_text(1.414, assessment) == "~1.41");
  CHECK(capability_text(kNotComputed, assessment) == "-");
}

TEST_CASE("what fails most, what is nearest to its limit, and who makes it spread") {
  const DesignResult result = test::sample_result();
  Assessment assessment = *result.candidates[0].assessment;
  CHECK(most_failed(assessment, result.spec) == Figure::lower_cutoff);
  CHECK(least_capable(assessment, result.spec) == Figure::lower_cutoff);
  CHECK(largest_cause(assessment, Figure::lower_cutoff) == Cause::bypass);
  CHECK(largest_cause(assessment, Figure::output_swing) == std::nullopt);
  CHECK(most_failed(assessment, Spec{}) == std::nullopt);
  for (FigureSpread& spread : assessment.spread) spread.failed = 0;
  CHECK(most_failed(assessment, result.spec) == std::nullopt);
}
