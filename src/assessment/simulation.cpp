#include "assessment/simulation.hpp"

#include <algorithm>
#include <bandwright/margins.hpp>
#include <cmath>

#include "kernel/run_units.hpp"
#include "numeric/elementary.hpp"

namespace bandwright {

namespace {

constexpr std::size_t kQuantileUnits = 20000;  // from here on quantiles, below mean and 3 sigma
constexpr std::size_t kMiddle = 50000;         // quantiles in 100,000ths
constexpr std::size_t kLowTail = 135, kHighTail = 99865;
constexpr double kNoSpread = 1e-12;  // a spread that is only rounding
constexpr std::size_t kHistogramBins = 40;

/// The figures that are watched: required ones and the band.
std::vector<Figure> watched(const Spec& spec) {
  std::vector<Figure> list;
  for (const FigureInfo& f : figures()) {
    const bool band = f.figure == Figure::gain || f.figure == Figure::lower_cutoff || f.figure == Figure::upper_cutoff;
    if (band || (spec.requirement(f.figure) && varies(f.figure))) list.push_back(f.figure);
  }
  return list;
}

/// What is kept of one figure of all active units.
struct Record {
  std::vector<double> at_nominal, nearest_upper, nearest_lower;
  std::size_t failed = 0;
  std::vector<std::size_t> failed_at;
};

/// Counts unit by unit.
class Tally {
public:
  Tally(const Spec& spec, std::vector<Figure> figures, std::size_t conditions)
      : spec_(spec), figures_(std::move(figures)), inactive_at_(conditions), records_(figures_.size()) {
    for (Record& r : records_) r.failed_at.resize(conditions);
  }

  void add(const UnitBlock& block) {
    for (std::size_t unit = 0; unit < block.units; ++unit) passed_ += passes(block, unit);
    units_ += block.units;
  }

  std::size_t units() const { return units_; }
  std::size_t passed() const { return passed_; }
  std::size_t not_active() const { return not_active_; }
  const std::vector<std::size_t>& inactive_at() const { return inactive_at_; }
  std::vector<Record>& records() { return records_; }

private:
  bool passes(const UnitBlock& block, std::size_t unit) {
    bool active = true;
    for (std::size_t c = 0; c < inactive_at_.size(); ++c) {
      if (block.outcome(c, unit) == UnitOutcome::active) continue;
      active = false;
      ++inactive_at_[c];
    }
    not_active_ += !active;
    if (!active) return false;
    bool all = true;
    for (std::size_t k = 0; k < figures_.size(); ++k) all = add_figure(block, unit, k) && all;
    return all;
  }

  bool add_figure(const UnitBlock& block, std::size_t unit, std::size_t k) {
    const auto& requirement = spec_.requirement(figures_[k]);
    Record& r = records_[k];
    double high = block.value(0, k, unit), low = high;
    r.at_nominal.push_back(high);
    bool all = true;
    for (std::size_t c = 0; c < inactive_at_.size(); ++c) {
      const double x = block.value(c, k, unit);
      high = std::isnan(x) || x > high ? x : high;  // a figure that is missing somewhere stays missing
      low = std::isnan(x) || x < low ? x : low;
      if (!requirement || meets(*requirement, x)) continue;
      all = false;
      ++r.failed_at[c];
    }
    r.failed += !all;
    r.nearest_upper.push_back(high);
    r.nearest_lower.push_back(low);
    return all;
  }

  const Spec& spec_;
  std::vector<Figure> figures_;
  std::size_t units_ = 0, passed_ = 0, not_active_ = 0;
  std::vector<std::size_t> inactive_at_;
  std::vector<Record> records_;
};

/// Blocks of units until there are enough of them, or the interval is narrow enough.
Yield run(const Spec& spec, const Population& population, const std::vector<Figure>& figures, Tally& tally) {
  UnitRunner runner(population, figures);
  UnitBlock block;
  Yield y;
  while (!is_enough(spec, y)) {
    runner.run(spec.seed, y.units, next_block(spec, y), block);
    tally.add(block);
    y = yield_of(spec, tally.units(), tally.passed());
  }
  y.not_active = tally.not_active();
  const auto& at = tally.inactive_at();
  y.least_active_at = static_cast<std::size_t>(std::max_element(at.begin(), at.end()) - at.begin());
  return y;
}

struct Moments {
  double mean = kNotComputed, sigma = kNotComputed;
};

Moments moments(const std::vector<double>& values) {
  if (values.empty()) return {};
  double sum = 0, squares = 0;
  const double n = static_cast<double>(values.size());
  for (double x : values) sum += x;
  const double mean = sum / n;
  for (double x : values) squares += (x - mean) * (x - mean);
  const double sigma = values.size() > 1 ? square_root(squares / (n - 1)) : 0;
  return {mean, sigma > kNoSpread * std::fabs(mean) ? sigma : 0};
}

void drop_missing(std::vector<double>& values) {
  std::erase_if(values, [](double x) { return std::isnan(x); });
}

/// One side, `toward` +1 for the upper limit: distance of the limit from the middle over that of the tail.
double one_sided(double limit, std::vector<double>& values, double toward) {
  double middle = 0, tail = 0;
  if (values.size() >= kQuantileUnits) {
    middle = quantile(values, kMiddle);
    tail = quantile(values, toward > 0 ? kHighTail : kLowTail);
  } else {
    const Moments m = moments(values);
    middle = m.mean;
    tail = m.mean + toward * 3 * m.sigma;
  }
  const double distance = toward * (limit - middle), reach = toward * (tail - middle);
  if (reach > kNoSpread * std::max(1.0, std::fabs(middle))) return std::min(distance / reach, kHighestCapability);
  return distance >= 0 ? kHighestCapability : -kHighestCapability;
}

void add_histogram(FigureSpread& s, std::vector<double> values) {
  drop_missing(values);
  if (values.empty()) return;
  const auto [low, high] = std::minmax_element(values.begin(), values.end());
  const double first = *low, last = *high > *low ? *high : *low + 1e-9 * std::fabs(*low);
  s.edges.resize(kHistogramBins + 1);
  s.counts.assign(kHistogramBins, 0);
  const double width = (last - first) / kHistogramBins;
  for (std::size_t i = 0; i <= kHistogramBins; ++i) s.edges[i] = first + width * static_cast<double>(i);
  for (double x : values) {
    const auto bin = static_cast<std::size_t>((x - first) / width);
    ++s.counts[std::min(bin, kHistogramBins - 1)];
  }
}

bool too_few(std::size_t without, std::size_t units) { return without * 100000 > kLowTail * units; }

}  // namespace

double quantile(std::vector<double>& values, std::size_t hundred_thousandths) {
  if (values.empty()) return kNotComputed;
  const std::size_t k = (values.size() * hundred_thousandths + 99999) / 100000;
  const auto place = values.begin() + static_cast<std::ptrdiff_t>(std::max<std::size_t>(k, 1) - 1);
  std::nth_element(values.begin(), place, values.end());
  return *place;
}

double capability(const Requirement& r, const FigureInfo& f, std::vector<double>& nearest_upper,
                  std::vector<double>& nearest_lower) {
  const auto scale = [&f](double x) { return f.dimension == Dimension::voltage ? x : ln(x); };
  double c = kHighestCapability;
  for (double toward : {1.0, -1.0}) {
    const double limit = toward > 0 ? r.upper : r.lower;
    if (std::isnan(limit)) continue;
    std::vector<double>& values = toward > 0 ? nearest_upper : nearest_lower;
    for (double& x : values) x = scale(x);
    c = std::min(c, one_sided(scale(limit), values, toward));
  }
  return c;
}

void simulate(const Spec& spec, Assessment& a, bool with_histograms) {
  const std::vector<Figure> figures = watched(spec);
  Tally tally(spec, figures, a.population.conditions.size());
  a.yield = run(spec, a.population, figures, tally);
  a.from_moments = a.yield.units < kQuantileUnits;
  a.capability = kHighestCapability;
  for (std::size_t k = 0; k < figures.size(); ++k) {
    Record& r = tally.records()[k];
    FigureSpread& s = a.spread[index(figures[k])];
    const FigureInfo& f = info(figures[k]);
    const std::size_t active = r.at_nominal.size();
    if (with_histograms) add_histogram(s, r.at_nominal);
    for (auto* values : {&r.at_nominal, &r.nearest_upper, &r.nearest_lower}) drop_missing(*values);
    const Moments m = moments(r.at_nominal);
    s.mean = m.mean;
    s.sigma = m.sigma;
    s.failed = r.failed;
    s.most_failed_at =
        static_cast<std::size_t>(std::max_element(r.failed_at.begin(), r.failed_at.end()) - r.failed_at.begin());
    const auto& requirement = spec.requirement(figures[k]);
    if (!requirement) continue;
    const std::size_t without = a.yield.not_active + (active - r.nearest_upper.size());
    const bool none = r.nearest_upper.empty() || too_few(without, a.yield.units);
    s.capability = none ? 0 : capability(*requirement, f, r.nearest_upper, r.nearest_lower);
    a.capability = std::min(a.capability, s.capability);
  }
}

}  // namespace bandwright
