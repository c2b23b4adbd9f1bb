// Units side by side against the same units solved one by one with scan and bracket.
#include "kernel/run_units.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <iostream>

#include "agreement.hpp"
#include "catch.hpp"
#include "random_populations.hpp"

using namespace oracle;
using bandwright::Analysis;
using bandwright::BiasState;
using bandwright::Figure;
using bandwright::index;
using bandwright::LaneKind;
using bandwright::Population;
using bandwright::UnitBlock;
using bandwright::UnitOutcome;
using bandwright::UnitRunner;

namespace {

constexpr double kAgree = 1e-10;  // Newton's last step leaves its square, 1e-14; the scan's cutoffs too
constexpr int kStages = 200;
constexpr std::size_t kUnits = 200;
constexpr double kMostAlone = 0.10;  // share of the units that the lanes leave over: two peaks, no cutoff on a side

const std::vector<Figure> kBand = {Figure::gain, Figure::lower_cutoff, Figure::upper_cutoff};

/// Every figure that is computed, which takes another way through the lanes than the band alone.
std::vector<Figure> all_figures() {
  std::vector<Figure> list;
  for (const bandwright::FigureInfo& f : bandwright::figures())
    if (f.use != bandwright::FigureUse::reserved) list.push_back(f.figure);
  return list;
}

struct Findings {
  Agreement band{"gain and cutoffs"}, rest{"all other figures"};
  std::size_t solved = 0, alone = 0, active = 0;
};

bool is_band(Figure f) { return std::find(kBand.begin(), kBand.end(), f) != kBand.end(); }

/// A block of units as the lanes give it.
struct Run {
  UnitRunner runner;
  std::vector<Figure> figures;
  UnitBlock block;

  Run(const Population& p, const std::vector<Figure>& wanted, LaneKind lanes, std::uint64_t seed)
      : runner(p, wanted, {}, lanes), figures(wanted) {
    runner.run(seed, 0, kUnits, block);
  }
};

void compare_unit(const Run& run, const Analysis& a, std::size_t condition, std::size_t unit, const std::string& where,
                  Findings& f) {
  const bool active = run.block.outcome(condition, unit) == UnitOutcome::active;
  INFO(where);
  REQUIRE(active == (a.point.state == BiasState::active));
  f.active += active;
  if (!active) return;
  for (std::size_t k = 0; k < run.figures.size(); ++k) {
    const double apart = relative_difference(run.block.value(condition, k, unit), a.figures[index(run.figures[k])]);
    (is_band(run.figures[k]) ? f.band : f.rest).add(apart, where + " " + info(run.figures[k]).key);
  }
}

void compare_stage(int stage, const Population& p, Findings& f) {
  const auto seed = static_cast<std::uint64_t>(stage) + 1;
  std::vector<Run> runs;
  for (const LaneKind lanes : bandwright::usable_lanes()) runs.emplace_back(p, kBand, lanes, seed);
  runs.emplace_back(p, all_figures(), bandwright::usable_lanes().back(), seed);
  for (const Run& run : runs) f.solved += p.conditions.size() * kUnits, f.alone += run.block.solved_alone;
  for (std::size_t c = 0; c < p.conditions.size(); ++c) {
    for (std::size_t unit = 0; unit < kUnits; ++unit) {
      const Analysis a = runs.front().runner.analyse(seed, unit, c);
      const std::string where = fmt::format("stage {} condition {} unit {}", stage, c, unit);
      for (const Run& run : runs) compare_unit(run, a, c, unit, where, f);
    }
  }
}

}  // namespace

TEST_CASE("units side by side are what they are one by one", "[oracle][units]") {
  Findings f;
  PopulationSource source(8001);
  for (int stage = 0; stage < kStages; ++stage) compare_stage(stage, source.next(), f);
  const double share = static_cast<double>(f.alone) / static_cast<double>(f.solved);
  std::cout << fmt::format(
      "units side by side: {} stages x {} units, {} lane kinds and all figures; {:.1f} % active, "
      "{:.2f} % left over\n",
      kStages, kUnits, bandwright::usable_lanes().size(),
      100.0 * static_cast<double>(f.active) / static_cast<double>(f.solved), 100 * share);
  for (const Agreement* a : {&f.band, &f.rest}) {
    std::cout << "  " << a->summary() << " in " << a->worst_where() << "\n";
    INFO(a->summary() << " in " << a->worst_where());
    CHECK(a->worst() <= kAgree);
  }
  CHECK(share <= kMostAlone);
  CHECK(f.alone > 0);
}
