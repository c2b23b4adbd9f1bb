// Times of one evaluation and its parts, and of a whole design. Figures belong to the machine they were taken on.
#include <benchmark/benchmark.h>

#include <bandwright/design.hpp>
#include <fstream>
#include <sstream>

#include "analysis/operating_point.hpp"
#include "analysis/response.hpp"
#include "stage/pole_estimate.hpp"

using namespace bandwright;

namespace {

const BipolarParameters& device() {
  static const DerivedDevice kDevice = derive_parameters(*built_in_catalogue().find_transistor("BC547B"));
  return kDevice.parameters;
}

/// Every role filled, source, load and strays present: the largest stage there is.
Stage full_stage() {
  Stage s;
  s.parts = {100e3, 22e3, 4.7e3, 150, 1e3, 1e-6, 1e-6, 47e-6, 470e-12};
  s.device = &device();
  s.around.supply = 12;
  s.around.source_resistance = 600;
  s.around.source_capacitance = 100e-12;
  s.around.load_conductance = 1e-4;
  s.around.load_capacitance = 220e-12;
  s.around.stray = {3e-12, 3e-12, 0.3e-12};
  return s;
}

/// Each run takes another value, so that nothing is known from the run before.
Stage varied(const Stage& s, std::size_t i) {
  Stage v = s;
  v.parts[i % kRoleCount] *= 1 + 1e-3 * static_cast<double>(i % 97);
  return v;
}

void complete_evaluation(benchmark::State& state) {
  const Stage s = full_stage();
  std::size_t i = 0;
  for (auto _ : state) benchmark::DoNotOptimize(analyse(varied(s, i++), {}).band.upper);
}
BENCHMARK(complete_evaluation);

void both_operating_points(benchmark::State& state) {
  const Stage s = full_stage();
  std::size_t i = 0;
  for (auto _ : state) {
    const Stage v = varied(s, i++);
    benchmark::DoNotOptimize(nominal_bias(v, circuit_of<double>(v)).point.collector_current);
  }
}
BENCHMARK(both_operating_points);

void scan_gain_and_cutoffs(benchmark::State& state) {
  const Stage s = full_stage();
  const Circuit<double> c = circuit_of<double>(s);
  const NominalBias b = nominal_bias(s, c);
  const BiasTrial<double>& t = b.solution.trial;
  const HybridPi<double> h = hybrid_pi(b.device, t.i_c, t.v_be, t.v_ce, t.gain);
  std::size_t i = 0;
  for (auto _ : state)
    benchmark::DoNotOptimize(find_crossings(transfer(circuit_of<double>(varied(s, i++)), h), 0).upper);
}
BENCHMARK(scan_gain_and_cutoffs);

void sensitivities(benchmark::State& state) {
  const Stage s = full_stage();
  const Analysis a = analyse(s, {});
  for (auto _ : state) benchmark::DoNotOptimize(sensitivity(s, a, {})[0][0]);
}
BENCHMARK(sensitivities);

void whole_design(benchmark::State& state) {
  std::ifstream file(BANDWRIGHT_PROJECT_FOLDER "/examples/hydrophone-line.json");
  std::stringstream text;
  text << file.rdbuf();
  const Spec spec = read_spec(text.str(), "hydrophone-line.json");
  for (auto _ : state) benchmark::DoNotOptimize(design(spec, built_in_catalogue()).candidates.size());
}
BENCHMARK(whole_design)->Unit(benchmark::kMillisecond)->UseRealTime()->Iterations(5);

}  // namespace
