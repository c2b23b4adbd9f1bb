// The search's quick bounds on loads against the exact corners: never under them, and not far above.
#include "assessment/load_bounds.hpp"

#include <bandwright/stress.hpp>
#include <cmath>
#include <iostream>

#include "assessment/unit_box.hpp"
#include "catch.hpp"
#include "random_populations.hpp"

using namespace bandwright;

namespace {

constexpr int kDesigns = 1000;
constexpr double kRounding = 1e-9;  // of the bound: sums in another order

/// The ends of the resistors over all conditions, by the box of units.
ResistorEnds ends_of(const Population& p) {
  const UnitBox box(p);
  ResistorEnds ends;
  for (const OperatingCondition& at : p.conditions) {
    for (std::size_t i = 0; i < kResistorRoles; ++i) {
      if (!(p.printed[i] > 0)) continue;
      BoxPoint low = box.nominal(at), high = low;
      low.z[i] = 0;
      high.z[i] = 1;
      const UnitPoint a = box.unit(low), b = box.unit(high);
      const double least = a.stage.parts[i] * a.factors.of[i], most = b.stage.parts[i] * b.factors.of[i];
      ends.low[i] = ends.low[i] > 0 ? std::min(ends.low[i], least) : least;
      ends.high[i] = std::max(ends.high[i], most);
    }
  }
  return ends;
}

}  // namespace

TEST_CASE("quick bounds on loads enclose the exact worst corners, 1,000 random designs", "[stress]") {
  oracle::PopulationSource source(77);
  int outside = 0, solved = 0;
  double widest = 1;
  for (int n = 0; n < kDesigns; ++n) {
    const oracle::RandomDesign d = n % 2 == 0 ? source.next_design() : source.next_with_dc();
    const Stage stage = nominal_stage(d.population, d.population.conditions.front());
    const Analysis nominal = analyse(stage, d.population.definition);
    if (nominal.point.state != BiasState::active) continue;
    const WorstStress exact = worst_stress(d.spec, d.population);
    const LoadBounds b = load_bounds(d.spec, d.population, ends_of(d.population), nominal.point);
    ++solved;
    const auto within = [&](double value, double bound, const std::string& what) {
      const bool holds = value <= bound + kRounding * std::fabs(bound);
      outside += !holds;
      INFO("design " << n << ", " << what << ": " << value << " over " << bound);
      CHECK(holds);
    };
    for (const RoleInfo& r : roles()) {
      const std::size_t i = index(r.role);
      if (!(d.population.printed[i] > 0)) continue;
      within(exact.volts[i].max, b.high[i], std::string(r.key) + " volts");
      within(-exact.volts[i].min, -b.low[i], std::string(r.key) + " volts, low");
      if (i < kResistorRoles) within(exact.watts[i].max, b.watts[i], std::string(r.key) + " watts");
    }
    within(exact.collector_emitter_voltage.max, b.collector_emitter_voltage, "VCE");
    within(exact.collector_current.max, b.collector_current, "IC");
    within(exact.dissipation.max, b.dissipation, "dissipation");
    within(exact.junction_temperature.max, b.junction_temperature, "junction");
    widest = std::max(widest, b.collector_current / exact.collector_current.max);
  }
  CHECK(solved > kDesigns / 2);
  std::cout << "bounds on loads: " << solved << " designs, " << outside
            << " stresses outside; the current is bounded at most " << widest << " times over its worst corner\n";
}
