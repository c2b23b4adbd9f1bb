#include <algorithm>
#include <bandwright/stress.hpp>
#include <cmath>
#include <nlopt.hpp>

#include "assessment/stress_corners.hpp"

namespace bandwright {

namespace {

constexpr double kProbe = 1e-3;   // of a range: how far inside it is looked whether a corner is the extreme
constexpr double kInward = 1e-8;  // of a stress: what can be won inside is rounding
constexpr double kStep = 1e-4;    // of a range: differences for slopes
constexpr int kPolishSteps = 40;  // slopes at most
constexpr int kMostRounds = 6;    // of turning along ridges
constexpr int kLineSteps = 12;    // of a golden section
constexpr double kGolden = 0.6180339887498949;
constexpr double kNearEnd = 1e-3;  // of a range: what ends so near an end is tried at the end
constexpr const char* kNoPoint = "no operating point: from rail to rail";

using Coordinates = StressBox::Coordinates;

/// One stress, its largest value (sign +1) or its smallest (-1).
class Extreme {
public:
  Extreme(StressBox& box, std::size_t slot, int sign) : box_(box), slot_(slot), sign_(sign) {}

  void look_at(const Coordinates& x, const StressEnds& solved) {
    const double height = sign_ * stress_at(solved, slot_, sign_);
    if (!(height > height_)) return;
    height_ = height;
    x_ = x;
  }

  /// Bounded local search where the best corner is not yet the extreme: the transistor dissipates most at half of the
  /// supply, a resistor beside its like. Other humps stand near the corners beside the best one.
  void polish() {
    const double least = kInward * std::fabs(height_);
    if (!(won_inside() > least)) return;
    scale_ = std::fabs(height_);
    const Coordinates corner = x_;
    search_from(corner);
    for (std::size_t k = 0; k < corner.size(); ++k) {
      Coordinates beside = corner;
      beside[k] = 1 - beside[k];
      search_from(beside);
    }
    for (int round = 0; round < kMostRounds && turn_along_ridges(least); ++round) search_from(x_);
    Coordinates ends = x_;
    for (double& share : ends) share = share < kNearEnd ? 0 : share > 1 - kNearEnd ? 1 : share;
    const double there = height(ends);
    if (there > height_ - least) {
      height_ = there;
      x_ = ends;
    }
  }

  double value() const { return sign_ * height_; }
  std::string name() const { return box_.name(x_, slot_, sign_); }

private:
  /// Units of one dissipation differ in what makes it: each coordinate turned to an end, and any other moved to make up
  /// for it. True where that wins more than rounding.
  bool turn_along_ridges(double least) {
    const double before = height_;
    const Coordinates start = x_;
    for (std::size_t k = 0; k < start.size(); ++k) {
      for (const double end : {0.0, 1.0}) {
        Coordinates turned = start;
        turned[k] = end;
        for (std::size_t j = 0; j < start.size() && start[k] != end; ++j)
          if (j != k) look_along(turned, j);
      }
    }
    return height_ > before + least;
  }

  /// The highest point of a line through the box along one coordinate: golden section.
  void look_along(Coordinates x, std::size_t j) {
    const auto at = [&](double share) {
      x[j] = share;
      const StressEnds solved = box_.solve(x);
      look_at(x, solved);
      return sign_ * stress_at(solved, slot_, sign_);
    };
    double low = 0, high = 1, a = 1 - kGolden, b = kGolden, at_a = at(a), at_b = at(b);
    for (int i = 0; i < kLineSteps; ++i) {
      if (at_a > at_b) {
        high = b, b = a, at_b = at_a;
        at_a = at(a = high - kGolden * (high - low));
      } else {
        low = a, a = b, at_a = at_b;
        at_b = at(b = low + kGolden * (high - low));
      }
    }
  }

  double height(const Coordinates& x) { return sign_ * stress_at(box_.solve(x), slot_, sign_); }

  /// By a step into the box.
  double slope(Coordinates x, std::size_t k, double here, double step) {
    const double inward = x[k] > 0.5 ? -step : step;
    x[k] += inward;
    return (height(x) - here) / inward;
  }

  /// To first order, over the whole range of each coordinate.
  double won_inside() {
    double sum = 0;
    for (std::size_t k = 0; k < x_.size(); ++k) {
      const double s = slope(x_, k, height_, kProbe);
      sum += std::max(x_[k] > 0.5 ? -s : s, 0.0);
    }
    return sum;
  }

  void search_from(Coordinates x) {
    nlopt::opt optimiser(nlopt::LD_SLSQP, static_cast<unsigned>(x.size()));
    optimiser.set_lower_bounds(0.0);
    optimiser.set_upper_bounds(1.0);
    optimiser.set_maxeval(kPolishSteps);
    optimiser.set_xtol_rel(1e-6);
    optimiser.set_max_objective(objective, this);
    double value = 0;
    try {
      optimiser.optimize(x, value);
    } catch (const std::exception&) {
      // NLopt reports a halt on rounding as an exception; the best point is kept here
    }
  }

  static double objective(const Coordinates& tried, Coordinates& gradient, void* self) {
    Extreme& e = *static_cast<Extreme*>(self);
    Coordinates x = tried;
    for (double& share : x) share = std::clamp(share, 0.0, 1.0);  // rounding may lie outside
    const StressEnds solved = e.box_.solve(x);
    const double here = e.sign_ * stress_at(solved, e.slot_, e.sign_);
    e.look_at(x, solved);
    for (std::size_t k = 0; k < gradient.size(); ++k) gradient[k] = e.slope(x, k, here, kStep) / e.scale_;
    return here / e.scale_;
  }

  StressBox& box_;
  std::size_t slot_;
  int sign_;
  Coordinates x_;
  double height_ = -HUGE_VAL;
  double scale_ = 1;
};

/// Both ends of every stress that a design has.
class Extremes {
public:
  Extremes(const Spec& spec, const Population& population) : box_(spec, population) {
    for (std::size_t slot = 0; slot < kStressSlots; ++slot) {
      smallest_.emplace_back(box_, slot, -1);
      largest_.emplace_back(box_, slot, 1);
    }
    look_at_corners();
  }

  /// What is not negative has its corner for a smallest value: nobody asks for it.
  StressRange range(std::size_t slot) {
    if (slot < kWattsSlot) smallest_[slot].polish();
    largest_[slot].polish();
    return {smallest_[slot].value(), largest_[slot].value(), smallest_[slot].name(), largest_[slot].name()};
  }

private:
  void look_at_corners() {
    Coordinates x(box_.size());
    for (std::size_t bits = 0; bits < std::size_t{1} << x.size(); ++bits) {
      for (std::size_t k = 0; k < x.size(); ++k) x[k] = bits >> k & 1 ? 1 : 0;
      const StressEnds solved = box_.solve(x);
      for (Extreme& e : smallest_) e.look_at(x, solved);
      for (Extreme& e : largest_) e.look_at(x, solved);
    }
  }

  StressBox box_;
  std::vector<Extreme> smallest_, largest_;
};

}  // namespace

WorstStress rail_to_rail(const Spec& spec, const PartValues& values) {
  const StressEnds ends = between_rails(spec, values, spec.highest_supply());
  const auto range = [&](std::size_t slot) { return StressRange{ends.low[slot], ends.high[slot], kNoPoint, kNoPoint}; };
  WorstStress w;
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    if (!(values[i] > 0)) continue;
    w.volts[i] = range(kVoltsSlot + i);
    if (i < kResistorRoles) w.watts[i] = range(kWattsSlot + i);
  }
  w.collector_emitter_voltage = range(kCollectorEmitterSlot);
  w.collector_current = range(kCurrentSlot);
  w.dissipation = range(kDissipationSlot);
  return w;
}

WorstStress worst_stress(const Spec& spec, const Population& population) {
  Extremes extremes(spec, population);
  WorstStress w;
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    if (!(population.printed[i] > 0)) continue;
    w.volts[i] = extremes.range(kVoltsSlot + i);
    if (i < kResistorRoles) w.watts[i] = extremes.range(kWattsSlot + i);
  }
  w.collector_emitter_voltage = extremes.range(kCollectorEmitterSlot);
  w.collector_current = extremes.range(kCurrentSlot);
  w.dissipation = extremes.range(kDissipationSlot);
  w.junction_temperature = extremes.range(kJunctionSlot);
  return w;
}

}  // namespace bandwright
