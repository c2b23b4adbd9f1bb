#include "sample_assessment.hpp"

namespace bandwright::test {

namespace {

constexpr double kThird = 1.0 / 3;  // needs all its digits

void set_spread(Population& p, Cause cause, CauseSpread spread) { p.spread[index(cause)] = std::move(spread); }

Population population(const Candidate& c) {
  Population p;
  p.device = c.parameters;
  p.conditions = {{12, 298.15}, {11.4, 273.15}, {12.6, 273.15}, {11.4, 333.15}, {12.6, 333.15}};
  for (CauseSpread& one : p.spread) one.basis = "taken as exact";
  for (const Part& one : c.parts) {
    p.printed[index(one.role)] = one.value;
    p.temperature_coefficient[index(one.role)] = info(one.role).kind == PartKind::resistor ? 50e-6 : 200e-6;
    set_spread(p, cause_of(one.role), {0, one.tolerance.below, one.tolerance.above, "tolerance of the part"});
  }
  p.cold_loss[index(Role::output_coupling)] = 0.005;
  p.cold_loss[index(Role::bypass)] = 0.005;
  set_spread(p, Cause::current_gain, {0.05, 0.45, 0.45, "published"});
  set_spread(p, Cause::early_voltage, {0, 0.405, 0.405, "assumed"});
  set_spread(p, Cause::base_emitter_voltage, {0, 0.04, 0.04, "assumed"});
  set_spread(p, Cause::stray_output, {0, 0.5, 0.5, "spec"});
  set_spread(p, Cause::cutoff_current, {0, 0, 0, "switched off"});
  return p;
}

void fill_worst_cases(Assessment& a) {
  const auto set = [&a](Figure f, WorstCase worst) { a.worst_case[index(f)] = std::move(worst); };
  set(Figure::gain, {46.1, 52.7, "R3 min, hFE min, 60 °C, 11.4 V", "R3 max, hFE max, 0 °C, 12.6 V", 47.5, 51.2, ""});
  set(Figure::lower_cutoff, {33.2, 51.9, "C3 max, 60 °C, 11.4 V", "C3 min, C1 min, 0 °C, 12.6 V", 35.1, 48.8, ""});
  set(Figure::upper_cutoff, {18.9e3, 21.2e3, "Cwo max, 60 °C, 12 V", "Cwo min, 0 °C, 12 V", 19.4e3, 20.8e3, ""});
  set(Figure::collector_current,
      {0.93e-3, 1.14e-3, "R4 max, 0 °C, 11.4 V", "R4 min, 60 °C, 12.6 V", 0.97e-3, 1.09e-3, ""});
}

void fill_spreads(Assessment& a) {
  const auto set = [&a](Figure f, double mean, double sigma, double capability, std::size_t failed) {
    FigureSpread& one = a.spread[index(f)];
    one.mean = mean;
    one.sigma = sigma;
    one.capability = capability;
    one.failed = failed;
  };
  set(Figure::gain, 49.0 + kThird, 0.5, 2, 0);
  set(Figure::lower_cutoff, 41.5, 1.66, 0.81, 150);
  set(Figure::upper_cutoff, 20.1e3, 300, 1.25, 12);
  a.spread[index(Figure::lower_cutoff)].most_failed_at = 2;
  a.spread[index(Figure::upper_cutoff)].most_failed_at = 4;
}

void fill_shares(Assessment& a) {
  const auto set = [&a](Figure f, Cause cause, double share) { a.share[index(f)][index(cause)] = share; };
  set(Figure::gain, Cause::collector, 0.7);
  set(Figure::gain, Cause::current_gain, 0.3);
  set(Figure::lower_cutoff, Cause::bypass, 0.61);
  set(Figure::lower_cutoff, Cause::input_coupling, 0.385);
  set(Figure::lower_cutoff, Cause::early_voltage, 0.005);
  set(Figure::upper_cutoff, Cause::stray_output, 2 * kThird);
  set(Figure::upper_cutoff, Cause::collector, kThird);
}

}  // namespace

Assessment sample_assessment(const Candidate& candidate) {
  Assessment a;
  a.population = population(candidate);
  a.at_condition.assign(a.population.conditions.size(), candidate.analysis.figures);
  a.at_condition[2][index(Figure::lower_cutoff)] = 47 + kThird;
  fill_worst_cases(a);
  fill_spreads(a);
  fill_shares(a);
  a.yield = {20000, 19840, 0.99067, 0.99319, 7, 0, 0};
  a.capability = 0.81;
  a.worst_case_margin = -0.19;
  a.nominal_met = true;
  a.verdict = "pass with notes";
  return a;
}

Assessment sample_assessment_with_pictures(const Candidate& candidate) {
  Assessment a = sample_assessment(candidate);
  a.response = {{10, 100, 1e3},        {12 + kThird, 45, 49}, {-100, -150, -180}, {10, 40, 45},
                {11, 42, 46 + kThird}, {14, 47, 52 - kThird}, {15, 48, 53}};
  a.spread[index(Figure::gain)].edges = {48, 49 + kThird, 51};
  a.spread[index(Figure::gain)].counts = {9000, 11000};
  a.node_voltages = {{"base", 1.75, 1.6 + kThird, 1.95}, {"collector", 7, 6.1, 7.9}};
  return a;
}

Allocation sample_allocation() {
  const ToleranceClass loose{"metal film resistor", {0.05, 0.05}}, tight{"metal film resistor", {0.01, 0.01}};
  const ToleranceClass electrolytic{"aluminium electrolytic capacitor", {0.2, 0.5}};
  const ToleranceClass film{"polyester film capacitor", {0.1, 0.1}};
  Allocation a;
  a.reached = true;
  a.yield = {20000, 19900, 0.9939, 0.9959, 7, 0, 0};
  a.parts = {{Role::upper_divider, loose, loose, kNotComputed},
             {Role::collector, loose, tight, 0.95},
             {Role::emitter, loose, tight, 0.9 + kThird / 10},
             {Role::output_coupling, electrolytic, film, 0.98},
             {Role::bypass, electrolytic, electrolytic, kNotComputed}};
  a.steps = {{Role::emitter, loose, tight, 0.7, 0.8 + kThird / 10},
             {Role::collector, loose, tight, 0.8 + kThird / 10, 0.98},
             {Role::output_coupling, electrolytic, film, 0.98, 0.995}};
  return a;
}

}  // namespace bandwright::test
