#include "kernel/run_units.hpp"

#include <algorithm>
#include <cmath>

#include "analysis/response.hpp"
#include "kernel/solve_units.hpp"
#include "kernel/solvers.hpp"
#include "numeric/elementary.hpp"
#include "units/constants.hpp"

namespace bandwright {

namespace {

constexpr std::size_t kWidest = 8;   // rows are padded to whole packs of any width
constexpr double kPeakProbe = 1e-4;  // relative, of u: for the slope at the peak

struct LaneRow {
  LaneKind kind;
  Solver solve;
};
constexpr LaneRow kLaneRows[] = {
    {LaneKind::one, solve_one_by_one}, {LaneKind::any_machine, solve_on_any_machine}, {LaneKind::avx2, solve_by_avx2}};

bool has_avx2() {
#if defined(__x86_64__)
  return kBuiltForAvx2 && __builtin_cpu_supports("avx2");
#else
  return false;
#endif
}

Solver solver_of(LaneKind kind) {
  for (const LaneRow& row : kLaneRows) {
    if (row.kind == kind) return row.solve;
  }
  return solve_one_by_one;
}

const std::array<CauseScale, kCauseCount>& scales() {
  static const auto list = [] {
    std::array<CauseScale, kCauseCount> s{};
    for (const CauseInfo& row : causes()) s[index(row.cause)] = row.scale;
    return s;
  }();
  return list;
}

WarmStart warm_start(const Population& p, const OperatingCondition& condition) {
  WarmStart w;
  w.stage = nominal_stage(p, condition);
  w.warmth = condition.ambient - kReferenceTemperature;
  w.junction = condition.ambient + p.junction_rise;
  const Analysis a = analyse_unit({w.stage, {}, w.junction}, p.definition);
  w.log_current = ln(a.point.collector_current);
  if (a.point.state != BiasState::active || std::isnan(a.band.lower) || std::isnan(a.band.upper)) return w;
  const Transfer<double> h{{a.transfer.numerator}, {a.transfer.denominator}};
  w.peak = find_crossings(h, 0).reference;
  const double above = w.peak * (1 + kPeakProbe), below = w.peak * (1 - kPeakProbe);
  w.peak_slope = (peak_residual(h, above) - peak_residual(h, below)) / (above * above - below * below);
  w.lower = omega_squared(a.band.lower);
  w.upper = omega_squared(a.band.upper);
  w.regular = has_single_peak(h) && w.peak_slope < 0;
  return w;
}

bool is_band_only(const std::vector<Figure>& figures) {
  return std::all_of(figures.begin(), figures.end(), [](Figure f) {
    return f == Figure::gain || f == Figure::lower_cutoff || f == Figure::upper_cutoff;
  });
}

bool needs_crossings(const std::vector<Figure>& figures) {
  return std::any_of(figures.begin(), figures.end(), [](Figure f) {
    return f == Figure::lower_cutoff || f == Figure::upper_cutoff || f == Figure::bandwidth;
  });
}

double ratio_at(const Analysis& a, const Probe& probe, const Crossings& peak) {
  const Transfer<double> h{{a.transfer.numerator}, {a.transfer.denominator}};
  return probed(h, probe, peak.reference, a.band.gain * a.band.gain / 2);
}

}  // namespace

const std::vector<LaneKind>& usable_lanes() {
  static const std::vector<LaneKind> list = [] {
    std::vector<LaneKind> usable = {LaneKind::one, LaneKind::any_machine};
    if (has_avx2()) usable.push_back(LaneKind::avx2);
    return usable;
  }();
  return list;
}

UnitRunner::UnitRunner(const Population& population, std::vector<Figure> figures, std::vector<Probe> probes,
                       LaneKind lanes)
    : population_(population), figures_(std::move(figures)), probes_(std::move(probes)), lanes_(lanes) {
  for (const OperatingCondition& c : population.conditions) conditions_.push_back(warm_start(population, c));
}

namespace {

bool is_drawn(const Population& p, std::size_t draw) {
  if (draw < kCauseCount) return p.spread[draw].varies();
  const std::size_t part = (draw - kCauseCount) % kRoleCount;
  return draw < kCauseCount + kRoleCount ? p.temperature_coefficient[part] > 0 : p.pairs[part].is_pair;
}

}  // namespace

void UnitRunner::draw(std::uint64_t seed, std::uint64_t first, std::size_t count, std::size_t stride) {
  draws_.assign(kDrawCount * stride, 0.5);
  for (std::size_t d = 0; d < kDrawCount; ++d) {
    if (!is_drawn(population_, d)) continue;
    for (std::size_t i = 0; i < count; ++i) draws_[d * stride + i] = unit_uniform(seed, first + i, d);
  }
}

Analysis UnitRunner::alone(std::size_t unit, std::size_t condition, std::size_t stride) const {
  const WarmStart& w = conditions_[condition];
  const UnitDraw<double> draw = draw_unit<double>(population_, scales().data(), draws_.data() + unit, stride);
  return analyse_unit({w.stage, factors_at(draw, w.warmth), w.junction}, population_.definition, w.log_current);
}

void UnitRunner::solve_left_over(UnitBlock& block) const {
  for (std::size_t c = 0; c < conditions_.size(); ++c) {
    for (std::size_t i = 0; i < block.units; ++i) {
      UnitOutcome& outcome = block.outcomes[c * block.stride + i];
      if (outcome != UnitOutcome::unsolved) continue;
      ++block.solved_alone;
      const Analysis a = alone(i, c, block.stride);
      outcome = a.point.state == BiasState::active ? UnitOutcome::active : UnitOutcome::not_active;
      if (outcome == UnitOutcome::active && !probes_.empty()) {
        const Crossings peak = find_crossings({{a.transfer.numerator}, {a.transfer.denominator}}, 0);
        for (std::size_t k = 0; k < probes_.size(); ++k)
          block.ratios[(c * block.probes + k) * block.stride + i] = ratio_at(a, probes_[k], peak);
      }
      for (std::size_t k = 0; k < figures_.size(); ++k) {
        block.values[(c * block.figures + k) * block.stride + i] = a.figures[index(figures_[k])];
      }
    }
  }
}

void UnitRunner::run(std::uint64_t seed, std::uint64_t first, std::size_t count, UnitBlock& block) {
  block.units = count;
  block.stride = (count + kWidest - 1) / kWidest * kWidest;
  block.figures = figures_.size();
  block.solved_alone = 0;
  block.values.assign(conditions_.size() * block.figures * block.stride, kNotComputed);
  block.probes = probes_.size();
  block.ratios.assign(conditions_.size() * block.probes * block.stride, kNotComputed);
  block.outcomes.assign(conditions_.size() * block.stride, UnitOutcome::unsolved);
  draw(seed, first, count, block.stride);
  UnitTask task;
  task.population = &population_;
  task.conditions = conditions_.data();
  task.condition_count = conditions_.size();
  task.draws = draws_.data();
  task.stride = block.stride;
  task.units = count;
  task.figures = figures_.data();
  task.figure_count = figures_.size();
  task.band_only = is_band_only(figures_);
  task.crossings = needs_crossings(figures_);
  task.probes = probes_.data();
  task.probe_count = probes_.size();
  task.ratios = block.ratios.data();
  task.values = block.values.data();
  task.outcomes = block.outcomes.data();
  solver_of(lanes_)(task, scales().data());
  solve_left_over(block);
}

Analysis UnitRunner::analyse(std::uint64_t seed, std::uint64_t unit, std::size_t condition) {
  draw(seed, unit, 1, kWidest);
  return alone(0, condition, kWidest);
}

}  // namespace bandwright
