// Times of one evaluation and its parts, and of a whole design. Figures belong to the machine they were taken on.
#include <benchmark/benchmark.h>

#include <bandwright/design.hpp>
#include <fstream>
#include <sstream>

#include "analysis/operating_point.hpp"
#include "analysis/response.hpp"
#include "assessment/worst_case.hpp"
#include "kernel/run_units.hpp"
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

/// 14 causes: nine parts, hFE, VA, Cmu0, Cje, VBE; every figure.
void sensitivities_to_14_causes(benchmark::State& state) {
  const Stage s = full_stage();
  const Analysis a = analyse(s, {});
  CauseSet wanted = parts_and_gain();
  for (Cause c :
       {Cause::early_voltage, Cause::feedback_capacitance, Cause::emitter_capacitance, Cause::base_emitter_voltage})
    wanted[index(c)] = true;
  for (auto _ : state) benchmark::DoNotOptimize(sensitivity(s, a, {}, ResponseModel::exact, wanted)[0][0]);
}
BENCHMARK(sensitivities_to_14_causes);

/// The example's first candidate with all its units.
struct Design {
  Spec spec;
  DesignResult result;
  const Candidate& first() const { return result.candidates.front(); }
};

const Design& example() {
  static const Design kDesign = [] {
    std::ifstream file(BANDWRIGHT_PROJECT_FOLDER "/examples/hydrophone-line.json");
    std::stringstream text;
    text << file.rdbuf();
    Design d;
    d.spec = read_spec(text.str(), "hydrophone-line.json");
    d.result = design(d.spec, built_in_catalogue());
    return d;
  }();
  return kDesign;
}

/// Blocks of 1,000 units at five conditions; the rate counts complete evaluations: operating point, exact gain,
/// cutoffs.
void run_units(benchmark::State& state, LaneKind kind, bool pass_or_fail) {
  const Population& p = example().first().assessment->population;
  const std::vector<Figure> figures =
      pass_or_fail ? std::vector{Figure::gain} : std::vector{Figure::gain, Figure::lower_cutoff, Figure::upper_cutoff};
  const std::vector<Probe> probes =
      pass_or_fail
          ? std::vector<Probe>{{Figure::lower_cutoff, 50}, {Figure::upper_cutoff, 18.2e3}, {Figure::upper_cutoff, 22e3}}
          : std::vector<Probe>{};
  UnitRunner runner(p, figures, probes, kind);
  UnitBlock block;
  std::uint64_t first = 0;
  for (auto _ : state) {
    runner.run(1, first, 1000, block);
    first += 1000;
    benchmark::DoNotOptimize(block.values.data());
  }
  state.SetItemsProcessed(static_cast<std::int64_t>(state.iterations() * 1000 * p.conditions.size()));
}
BENCHMARK_CAPTURE(run_units, one_by_one, LaneKind::one, false);
BENCHMARK_CAPTURE(run_units, on_any_machine, LaneKind::any_machine, false);
BENCHMARK_CAPTURE(run_units, best_lanes, usable_lanes().back(), false);
BENCHMARK_CAPTURE(run_units, pass_or_fail, usable_lanes().back(), true);

/// Worst case, 20,000 units at five conditions and all else that is said of one candidate.
void assess_candidate(benchmark::State& state) {
  const Design& d = example();
  Spec spec = d.spec;
  spec.assess.interval = 0;
  const Candidate& c = d.first();
  for (auto _ : state) {
    const Population p = population_of(spec, c.parameters, c.offered, c.analysis);
    benchmark::DoNotOptimize(assess(spec, p, c.analysis).capability);
  }
}
BENCHMARK(assess_candidate)->Unit(benchmark::kMillisecond);

void worst_case(benchmark::State& state) {
  const Population& p = example().first().assessment->population;
  const std::vector<Figure> figures = {
      Figure::gain,           Figure::lower_cutoff,      Figure::upper_cutoff,
      Figure::output_swing,   Figure::collector_current, Figure::collector_emitter_voltage,
      Figure::supply_current, Figure::input_resistance};
  for (auto _ : state) benchmark::DoNotOptimize(worst_cases(p, figures)[0].min);
}
BENCHMARK(worst_case)->Unit(benchmark::kMillisecond);

/// All candidates with 20,000 units each.
void whole_design_all_units(benchmark::State& state) {
  Spec spec = example().spec;
  spec.assess.interval = 0;
  for (auto _ : state) benchmark::DoNotOptimize(design(spec, built_in_catalogue()).candidates.size());
}
BENCHMARK(whole_design_all_units)->Unit(benchmark::kMillisecond)->UseRealTime()->Iterations(5);

void whole_design(benchmark::State& state) {
  std::ifstream file(BANDWRIGHT_PROJECT_FOLDER "/examples/hydrophone-line.json");
  std::stringstream text;
  text << file.rdbuf();
  const Spec spec = read_spec(text.str(), "hydrophone-line.json");
  for (auto _ : state) benchmark::DoNotOptimize(design(spec, built_in_catalogue()).candidates.size());
}
BENCHMARK(whole_design)->Unit(benchmark::kMillisecond)->UseRealTime()->Iterations(5);

}  // namespace
