// Units in lanes. The truth is the law that the bytes are the same on every kind of lanes, and the analysis of each
// unit alone, which scans and brackets.
#include <cmath>
#include <cstring>

#include "catch.hpp"
#include "kernel/run_units.hpp"
#include "sample_population.hpp"

using namespace bandwright;
using namespace bandwright::test;

namespace {

const std::vector<Figure> kBand = {Figure::gain, Figure::lower_cutoff, Figure::upper_cutoff};
const std::vector<Figure> kMore = {
    Figure::gain,         Figure::lower_cutoff,   Figure::upper_cutoff,    Figure::bandwidth,
    Figure::output_swing, Figure::supply_current, Figure::input_resistance};

template <class T>
bool same_bytes(const std::vector<T>& a, const std::vector<T>& b) {
  return a.size() == b.size() && std::memcmp(a.data(), b.data(), a.size() * sizeof(T)) == 0;
}

UnitBlock block_of(const Population& p, const std::vector<Figure>& figures, LaneKind kind, std::uint64_t first,
                   std::size_t count) {
  UnitRunner runner(p, figures, {{Figure::lower_cutoff, 27}, {Figure::upper_cutoff, 19.5e3}}, kind);
  UnitBlock block;
  runner.run(1, first, count, block);
  return block;
}

/// FNV-1a over the bytes of all values: one number for a block.
std::uint64_t digest(const UnitBlock& block) {
  std::uint64_t h = 0xcbf29ce484222325ull;
  for (double x : block.values) {
    std::uint64_t bits = 0;
    std::memcpy(&bits, &x, sizeof bits);
    for (int i = 0; i < 8; ++i) h = (h ^ (bits >> (8 * i) & 0xff)) * 0x100000001b3ull;
  }
  return h;
}

}  // namespace

TEST_CASE("the bytes are the same on every kind of lanes", "[kernel]") {
  const SampleDesign s = sample_design(kBandRequirements, kFourCorners);
  const Population p = s.population();
  REQUIRE(p.conditions.size() == 5);
  for (const auto& figures : {kBand, kMore}) {
    const UnitBlock alone = block_of(p, figures, LaneKind::one, 0, 1003);
    CHECK(alone.units == 1003);
    for (LaneKind kind : usable_lanes()) {
      const UnitBlock block = block_of(p, figures, kind, 0, 1003);
      CHECK(same_bytes(block.values, alone.values));
      CHECK(same_bytes(block.ratios, alone.ratios));
      CHECK(same_bytes(block.outcomes, alone.outcomes));
      CHECK(block.solved_alone == alone.solved_alone);
    }
  }
}

TEST_CASE("the bytes are the same on every machine and with every compiler", "[kernel]") {
  // The digest of 64 units at five conditions, as g++ 12 and clang 14 give it on x86-64.
  const SampleDesign s = sample_design(kBandRequirements, kFourCorners);
  const Population p = s.population();
  CHECK(digest(block_of(p, kMore, usable_lanes().back(), 0, 64)) == 0x288afe3dff19defbull);
}

TEST_CASE("a unit is the same in whatever block it stands", "[kernel]") {
  const SampleDesign s = sample_design(kBandRequirements, kFourCorners);
  const Population p = s.population();
  const UnitBlock whole = block_of(p, kBand, usable_lanes().back(), 0, 100);
  const UnitBlock part = block_of(p, kBand, usable_lanes().back(), 37, 5);
  for (std::size_t unit = 0; unit < 5; ++unit) {
    for (std::size_t c = 0; c < 5; ++c) {
      for (std::size_t f = 0; f < 3; ++f) CHECK(part.value(c, f, unit) == whole.value(c, f, 37 + unit));
    }
  }
}

TEST_CASE("units in lanes agree with units one by one", "[kernel]") {
  const SampleDesign s = sample_design(kBandRequirements, kFourCorners);
  const Population p = s.population();
  const UnitBlock block = block_of(p, kMore, usable_lanes().back(), 0, 200);
  UnitRunner runner(p, kMore);
  CHECK(block.solved_alone == 0);
  for (std::size_t unit = 0; unit < 200; ++unit) {
    for (std::size_t c = 0; c < p.conditions.size(); ++c) {
      const Analysis a = runner.analyse(1, unit, c);
      REQUIRE((a.point.state == BiasState::active) == (block.outcome(c, unit) == UnitOutcome::active));
      for (std::size_t f = 0; f < kMore.size(); ++f) {
        CHECK(block.value(c, f, unit) == Approx(a.figures[index(kMore[f])]).epsilon(1e-11));
      }
      // a cutoff lies at or under a frequency where |H| there is at least A over the square root of 2
      CHECK((block.ratio(c, 0, unit) >= 1) == (a.band.lower <= 27));
      CHECK((block.ratio(c, 1, unit) >= 1) == (a.band.upper >= 19.5e3));
    }
  }
}

TEST_CASE("what the nominal unit cannot start is solved one by one", "[kernel]") {
  // R2 so high that the nominal unit saturates at the highest supply and warmest ambient
  SampleDesign s = sample_design(kBandRequirements, kFourCorners);
  s.parts[index(Role::lower_divider)].value = s.parts[index(Role::lower_divider)].working_value = 43e3;
  s.nominal =
      analyse({{82e3, 43e3, 3.9e3, 62, 1.2e3, 4.7e-6, 1e-6, 100e-6, 2.7e-9}, &s.device, surroundings(s.spec)}, {});
  const Population p = s.population();
  std::size_t alone = 0, inactive = 0;
  for (LaneKind kind : usable_lanes()) {
    const UnitBlock block = block_of(p, kBand, kind, 0, 64);
    alone = block.solved_alone;
    inactive = 0;
    for (UnitOutcome o : block.outcomes) inactive += o == UnitOutcome::not_active;
  }
  CHECK(alone > 0);
  CHECK(inactive > 0);
}
