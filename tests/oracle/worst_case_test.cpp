// The corner worst case against units: simulated ones by the million, and corners of the box that are sought out one
// cause at a time, without any slope.
#include "assessment/worst_case.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <iostream>
#include <map>

#include "agreement.hpp"
#include "assessment/unit_box.hpp"
#include "catch.hpp"
#include "kernel/run_units.hpp"
#include "random_populations.hpp"

using namespace oracle;
using bandwright::Analysis;
using bandwright::BoxPoint;
using bandwright::Figure;
using bandwright::FigureValues;
using bandwright::index;
using bandwright::Population;
using bandwright::UnitBlock;
using bandwright::UnitBox;
using bandwright::UnitOutcome;
using bandwright::UnitRunner;
using bandwright::WorstCase;

namespace {

constexpr double kOutside = 1e-6;  // of ln y: what a unit may lie outside
constexpr int kStages = 1000;
constexpr std::size_t kUnits = 10000;

// Random stages are not designs: some corners saturate, some responses have no upper cutoff.
constexpr double kMostInactive = 0.06;  // share of the stages without a worst case of the gain
constexpr double kMostWithout = 0.12;   // of a cutoff
// Gain at a stated frequency: some units stand 3 dB under their own peak and have no cutoffs, where no corner does so.
constexpr int kMostLosing = 3;  // stages

const std::vector<Figure> kBand = {Figure::gain, Figure::lower_cutoff, Figure::upper_cutoff};

using Worst = std::array<WorstCase, bandwright::kFigureCount>;

/// ln of how far a value lies outside; negative inside.
double excess(const WorstCase& w, double y) { return std::max(std::log(y / w.max), std::log(w.min / y)); }

/// What the units of all stages did.
struct Findings {
  Agreement polished{"units beyond the worst case"}, corners{"units beyond the corners alone"};
  std::array<int, 3> null{};
  std::map<std::string, int> reasons;
  std::size_t active = 0;
  int losing = 0;
  double nearest = -1e300;  ///< largest excess beyond the worst case, negative inside
};

/// The largest excess of a figure over the active units of a block; NaN where one of them has no value.
double largest_excess(const UnitBlock& block, std::size_t conditions, std::size_t figure, const WorstCase& w) {
  double low = w.max, high = w.min;
  for (std::size_t c = 0; c < conditions; ++c) {
    for (std::size_t unit = 0; unit < block.units; ++unit) {
      if (block.outcome(c, unit) != UnitOutcome::active) continue;
      const double y = block.value(c, figure, unit);
      if (std::isnan(y)) return y;
      low = std::min(low, y), high = std::max(high, y);
    }
  }
  return std::max(excess(w, low), excess(w, high));
}

void count_active(const UnitBlock& block, std::size_t conditions, Findings& f) {
  for (std::size_t c = 0; c < conditions; ++c)
    for (std::size_t unit = 0; unit < block.units; ++unit) f.active += block.outcome(c, unit) == UnitOutcome::active;
}

/// A reason without its numbers.
std::string kind_of(const std::string& reason) {
  for (const char* kind : {"the nominal unit", "VCE would be", "IC would be", "outside the pass band", "does not fall"})
    if (reason.find(kind) != std::string::npos) return kind;
  return reason.empty() ? "no reason" : reason;
}

void compare_stage(int stage, const Population& p, Findings& f) {
  const Worst worst = worst_cases(p, kBand), corners = worst_cases(p, kBand, {false});
  UnitRunner runner(p, kBand);
  UnitBlock block;
  runner.run(static_cast<std::uint64_t>(stage) + 1, 0, kUnits, block);
  count_active(block, p.conditions.size(), f);
  for (std::size_t k = 0; k < kBand.size(); ++k) {
    const WorstCase& w = worst[index(kBand[k])];
    if (std::isnan(w.min)) {
      ++f.null[k];
      ++f.reasons[kind_of(w.reason)];
      continue;
    }
    const std::string where = fmt::format("stage {} {}", stage, info(kBand[k]).key);
    const double found = largest_excess(block, p.conditions.size(), k, w);
    if (std::isnan(found)) {
      ++f.losing;
      CHECK(p.definition.frequency > 0);
      continue;
    }
    f.nearest = std::max(f.nearest, found);
    f.polished.add(std::max(found, 0.0), where);
    f.corners.add(std::max(largest_excess(block, p.conditions.size(), k, corners[index(kBand[k])]), 0.0), where);
  }
}

void report(const Findings& f) {
  std::cout << fmt::format("worst case: {} stages, {} units each, {} active at a condition\n", kStages, kUnits,
                           f.active);
  for (const auto& [reason, count] : f.reasons) std::cout << fmt::format("  without one, {}: {}\n", reason, count);
  std::cout << fmt::format("  stages in which a unit lacks a cutoff that all corners have: {}\n", f.losing);
  std::cout << fmt::format("  the outermost unit, in ln y: {:.1e}\n", f.nearest);
  for (const Agreement* a : {&f.polished, &f.corners})
    std::cout << "  " << a->summary() << " in " << a->worst_where() << "\n";
}

}  // namespace

TEST_CASE("no simulated unit lies outside the corner worst case", "[oracle][worst]") {
  Findings f;
  PopulationSource source(7001);
  for (int stage = 0; stage < kStages; ++stage) compare_stage(stage, source.next(), f);
  report(f);
  INFO(f.polished.summary() << " in " << f.polished.worst_where());
  CHECK(f.polished.worst() <= kOutside);
  CHECK(f.corners.worst() > kOutside);  // polishing is needed
  CHECK(f.null[0] <= kMostInactive * kStages);
  CHECK(f.null[1] <= kMostWithout * kStages);
  CHECK(f.null[2] <= kMostWithout * kStages);
  CHECK(f.reasons["no reason"] == 0);
  CHECK(f.losing <= kMostLosing);
}

namespace {

const std::vector<Figure> kSought = {Figure::gain,         Figure::lower_cutoff,      Figure::upper_cutoff,
                                     Figure::output_swing, Figure::collector_current, Figure::dissipation};
constexpr int kSoughtStages = 200;
constexpr int kStarts = 4;

// The search is local: of several humps it may take a lower one, above all where a second peak of the response
// overtakes the first.
constexpr double kMostBeaten = 0.005;     // share of the extremes that are beaten at all
constexpr double kFar = 1e-3;             // of ln y
constexpr double kMostFarBeaten = 0.002;  // share that is beaten by more

/// A corner of the box with supply and ambient as two more coordinates.
class CornerGame {
public:
  CornerGame(const UnitBox& box, Figure figure, double sign, Dice& dice)
      : box_(box), figure_(figure), sign_(sign), dice_(dice) {
    const auto& list = box.population().conditions;
    for (std::size_t i = 0; i < 2; ++i) {
      const auto less = [i](const auto& a, const auto& b) { return a.*kSides[i] < b.*kSides[i]; };
      const auto [low, high] = std::minmax_element(list.begin(), list.end(), less);
      ends_[i] = {(*low).*kSides[i], (*high).*kSides[i]};
    }
  }

  /// The best sign ln y from a random corner by turning one coordinate at a time.
  double play() {
    std::vector<bool> up(box_.varying().size() + 2);
    for (std::size_t k = 0; k < up.size(); ++k) up[k] = dice_.chance(0.5);
    double best = value(up);
    for (bool better = true; better;) {
      better = false;
      for (std::size_t k = 0; k < up.size(); ++k) {
        up[k] = !up[k];
        const double turned = value(up);
        if (turned > best)
          best = turned, better = true;
        else
          up[k] = !up[k];
      }
    }
    return best;
  }

private:
  static constexpr double bandwright::OperatingCondition::*kSides[2] = {&bandwright::OperatingCondition::supply,
                                                                        &bandwright::OperatingCondition::ambient};

  double value(const std::vector<bool>& up) const {
    BoxPoint p;
    const std::size_t n = box_.varying().size();
    for (std::size_t k = 0; k < n; ++k) p.z[box_.varying()[k]] = up[k] ? 1 : 0;
    for (std::size_t i = 0; i < 2; ++i) p.at.*kSides[i] = ends_[i][up[n + i] ? 1 : 0];
    const double y = box_.analyse(p).figures[index(figure_)];
    return std::isnan(y) ? -1e300 : sign_ * std::log(y);
  }

  const UnitBox& box_;
  Figure figure_;
  double sign_;
  Dice& dice_;
  std::array<std::array<double, 2>, 2> ends_{};
};

}  // namespace

TEST_CASE("corners sought out one cause at a time seldom lie outside the worst case", "[oracle][worst]") {
  Agreement beaten("corners beyond the worst case");
  PopulationSource source(7002);
  Dice dice(7003);
  int count = 0, times = 0, far = 0;
  for (int stage = 0; stage < kSoughtStages; ++stage) {
    const Population p = source.next();
    const Worst worst = worst_cases(p, kSought);
    const UnitBox box(p);
    for (const Figure figure : kSought) {
      for (const double sign : {-1.0, 1.0}) {
        const WorstCase& w = worst[index(figure)];
        if (std::isnan(w.min)) continue;
        CornerGame game(box, figure, sign, dice);
        double best = -1e300;
        for (int i = 0; i < kStarts; ++i) best = std::max(best, game.play());
        const double over = std::max(best - sign * std::log(sign > 0 ? w.max : w.min), 0.0);
        beaten.add(over, fmt::format("stage {} {} {}", stage, info(figure).key, sign > 0 ? "max" : "min"));
        ++count, times += over > kOutside, far += over > kFar;
      }
    }
  }
  std::cout << fmt::format("corners sought out: {} extremes, {} beaten, {} of them by 0.001\n  {} in {}\n", count,
                           times, far, beaten.summary(), beaten.worst_where());
  CHECK(times <= kMostBeaten * count);
  CHECK(far <= kMostFarBeaten * count);
}
