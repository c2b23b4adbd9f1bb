// The slopes over the box of all units, by which the worst case climbs, against differences of units anywhere in it:
// far from the nominal unit, and by supply and ambient temperature too.
#include "assessment/unit_box.hpp"

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
using bandwright::BoxPoint;
using bandwright::Figure;
using bandwright::FigureValues;
using bandwright::index;
using bandwright::Population;
using bandwright::UnitBox;

namespace {

// Differences of a hundred-thousandth of a range, an error of their square taken out: figures good to 1e-14 leave 1e-8.
constexpr double kStep = 1e-5;
constexpr double kSlope = 1e-6;  // of ln y over a whole range
constexpr int kStages = 100;

/// A coordinate of the box: a cause's share, supply or ambient as a share of 1 V and 1 K.
struct Coordinate {
  std::size_t cause = bandwright::kCauseCount;
  double bandwright::OperatingCondition::*side = nullptr;

  BoxPoint moved(BoxPoint p, double by) const {
    (side != nullptr ? p.at.*side : p.z[cause]) += by;
    return p;
  }
};

std::vector<Coordinate> coordinates(const UnitBox& box) {
  std::vector<Coordinate> list;
  for (std::size_t i : box.varying()) list.push_back({i, nullptr});
  list.push_back({bandwright::kCauseCount, &bandwright::OperatingCondition::supply});
  list.push_back({bandwright::kCauseCount, &bandwright::OperatingCondition::ambient});
  return list;
}

/// Anywhere in the box; not where parts turn from cold to warm.
BoxPoint random_point(const UnitBox& box, Dice& dice) {
  BoxPoint p;
  for (std::size_t i : box.varying()) p.z[i] = dice.uniform();
  p.at.supply = box.population().around.supply * dice.between(0.9, 1.1);
  p.at.ambient = dice.chance(0.5) ? dice.between(263, 293) : dice.between(299, 333);
  return p;
}

double difference(const UnitBox& box, const BoxPoint& p, const Coordinate& by, Figure figure) {
  const auto over = [&](double h) {
    const double up = box.analyse(by.moved(p, h)).figures[index(figure)];
    const double down = box.analyse(by.moved(p, -h)).figures[index(figure)];
    return std::log(up / down) / (2 * h);
  };
  return (4 * over(kStep) - over(2 * kStep)) / 3;
}

}  // namespace

TEST_CASE("slopes over the box of all units against differences", "[oracle][sensitivity]") {
  const std::vector<Figure> figures = {Figure::gain,         Figure::lower_cutoff,      Figure::upper_cutoff,
                                       Figure::output_swing, Figure::collector_current, Figure::input_resistance};
  Agreement slopes("slopes over the box");
  PopulationSource source(9001);
  Dice dice(9002);
  for (int stage = 0; stage < kStages; ++stage) {
    const Population p = source.next();
    const UnitBox box(p);
    const BoxPoint at = random_point(box, dice);
    const Analysis a = box.analyse(at);
    if (a.point.state != BiasState::active) continue;
    const std::vector<FigureValues> found = box.slopes(at, a, true);
    const std::vector<Coordinate> list = coordinates(box);
    REQUIRE(found.size() == list.size());
    for (std::size_t k = 0; k < list.size(); ++k) {
      for (const Figure figure : figures) {
        if (std::isnan(a.figures[index(figure)])) continue;
        const double expected = difference(box, at, list[k], figure);
        slopes.add(std::fabs(found[k][index(figure)] - expected),
                   fmt::format("stage {} coordinate {} {}", stage, k, info(figure).key));
      }
    }
  }
  std::cout << "  " << slopes.summary() << " in " << slopes.worst_where() << "\n";
  INFO(slopes.summary() << " in " << slopes.worst_where());
  CHECK(slopes.worst() <= kSlope);
}
