#include "assessment/pictures.hpp"

#include <algorithm>
#include <cmath>

#include "analysis/figure_equations.hpp"
#include "analysis/response.hpp"
#include "assessment/simulation.hpp"
#include "kernel/run_units.hpp"

namespace bandwright {

namespace {

constexpr int kPointsPerDecade = 20;
constexpr double kBeyond = 10;  // one decade past each cutoff

/// From a decade under the lower cutoff to one over the upper; where there is none, about the reference.
std::vector<double> frequencies(const Band& band) {
  const double low = (std::isnan(band.lower) ? band.reference / 100 : band.lower) / kBeyond;
  const double high = (std::isnan(band.upper) ? band.reference * 100 : band.upper) * kBeyond;
  const int steps = static_cast<int>(std::ceil(std::log10(high / low) * kPointsPerDecade));
  std::vector<double> list;
  for (int i = 0; i <= steps; ++i) list.push_back(low * std::pow(10.0, double(i) / kPointsPerDecade));
  return list;
}

void add_nominal(const TransferFunction& h, ResponseCurve& curve) {
  double before = 0;
  for (double f : curve.frequency) {
    const std::complex<double> value = h.at(f);
    curve.magnitude.push_back(std::abs(value));
    double phase = std::arg(value) * 180 / kPi;
    if (curve.phase.empty()) {
      before = phase;
    } else {
      phase += 360 * std::round((before - phase) / 360);  // continuous from point to point
    }
    curve.phase.push_back(before = phase);
  }
}

constexpr std::array kNodes = {Figure::base_voltage, Figure::emitter_voltage, Figure::collector_voltage};
constexpr std::array kNodeNames = {"base", "emitter", "collector"};

void widen(NodeVoltage& node, double volts) {
  node.min = std::fmin(node.min, volts);
  node.max = std::fmax(node.max, volts);
}

}  // namespace

void add_pictures(const Spec& spec, const Analysis& nominal, Assessment& a) {
  a.response.frequency = frequencies(nominal.band);
  add_nominal(nominal.transfer, a.response);
  for (std::size_t k = 0; k < kNodes.size(); ++k) {
    const double v = nominal.figures[index(kNodes[k])];
    a.node_voltages.push_back({kNodeNames[k], v, v, v});
  }
  std::vector<Transfer<double>> units;
  UnitRunner runner(a.population, {Figure::gain});
  for (std::size_t unit = 0; unit < a.yield.units; ++unit) {
    for (std::size_t c = 0; c < a.population.conditions.size(); ++c) {
      const Analysis one = runner.analyse(spec.seed, unit, c);
      if (one.point.state != BiasState::active) continue;
      units.push_back({{one.transfer.numerator}, {one.transfer.denominator}});
      for (std::size_t k = 0; k < kNodes.size(); ++k) widen(a.node_voltages[k], one.figures[index(kNodes[k])]);
    }
  }
  std::vector<double> values(units.size());
  for (double f : a.response.frequency) {
    const double u = omega_squared(f);
    std::transform(units.begin(), units.end(), values.begin(),
                   [u](const Transfer<double>& h) { return std::sqrt(gain_squared(h, u)); });
    a.response.low.push_back(quantile(values, 2500));
    a.response.high.push_back(quantile(values, 97500));
    const auto [least, most] = std::minmax_element(values.begin(), values.end());
    a.response.min.push_back(values.empty() ? kNotComputed : *least);
    a.response.max.push_back(values.empty() ? kNotComputed : *most);
  }
}

}  // namespace bandwright
