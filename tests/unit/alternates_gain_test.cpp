// The hFE that a design needs. The truth: at the ends a requirement is just met, with the curve itself moved; and,
// where the operating point alone is asked for, Kirchhoff's voltage law by hand.
#include <algorithm>
#include <cmath>

#include "analysis/unit.hpp"
#include "assemble.hpp"
#include "catch.hpp"
#include "sample_changes.hpp"
#include "units/constants.hpp"

using namespace bandwright;
using namespace bandwright::test;

namespace {

/// hFE of the nominal unit as data sheets print it.
double nominal_gain(const Candidate& c) {
  const OperatingPoint& p = c.analysis.point;
  return p.gain_at_zero_vce * (1 + p.collector_emitter_voltage * c.parameters.inverse_early_voltage);
}

/// Whether the nominal unit of a type with another hFE meets the spec at every supply and ambient.
bool meets_with(const Spec& spec, const Candidate& c, double gain) {
  Population p = population_of(spec, c.parameters, c.offered, c.analysis);
  for (double& y : p.device.gain.log_gain) y += std::log(gain / nominal_gain(c));
  for (const OperatingCondition& at : p.conditions) {
    const Analysis a = analyse_unit({nominal_stage(p, at), {}, at.ambient + p.junction_rise}, p.definition);
    if (a.point.state != BiasState::active || !meets_all(spec, a.figures)) return false;
  }
  return true;
}

/// BC547B with a constant hFE, no Early effect, no leakage and no self-heating.
BipolarParameters plain_device() {
  BipolarParameters p = derive_parameters(*built_in_catalogue().find_transistor("BC547B")).parameters;
  p.gain.points = 1;
  p.gain.log_gain[0] = std::log(300);
  p.inverse_early_voltage = 0;
  p.cutoff_current = 0;
  p.thermal_resistance = 0;
  return p;
}

Spec plain_spec(const std::string& requirements) {
  return read_spec(R"({"supply": "12 V", "requirements": )" + requirements + "}", "plain", {}, SpecUse::check);
}

Candidate plain_candidate(const Spec& spec) {
  OfferedParts parts;
  for (const RoleInfo& r : roles())
    parts[index(r.role)] = resolve_value(built_in_catalogue(), spec, r.role, {kChangeable[index(r.role)]});
  return assemble(spec, {plain_device(), {}, {}}, built_in_catalogue(), parts);
}

/// The hFE at which the collector current is as given: IB = (Vth - VBE - IC RE)/(Rth + RE), VBE = VT ln(IC/IS).
double gain_by_hand(const BipolarParameters& p, double i_c) {
  const double r1 = kChangeable[0], r2 = kChangeable[1], r_e = kChangeable[3] + kChangeable[4];
  const double v_t = kBoltzmann * kReferenceTemperature / kElementaryCharge;
  const double v_be = v_t * (std::log(i_c) - p.log_saturation_current);
  const double i_b = (12 * r2 / (r1 + r2) - v_be - i_c * r_e) / (r1 * r2 / (r1 + r2) + r_e);
  return i_c / i_b;
}

}  // namespace

TEST_CASE("inside the hFE needed every requirement holds, a thousandth outside one misses", "[alternates][gain]") {
  const bool bounded = GENERATE(true, false);
  const Spec spec =
      changeable_spec(bounded ? R"({"gain": {"min": 31.2, "max": 33}, "supply_current": {"max": "2 mA"}})"
                              : R"({"lower_cutoff": {"max": "32 Hz"}, "input_resistance": {"min": "8k"}})");
  const Candidate c = changeable_candidate(spec);
  const GainNeeded needed = gain_needed(spec, built_in_catalogue(), c);
  INFO(needed.min << " to " << needed.max << ", nominal " << nominal_gain(c));
  REQUIRE(needed.min > 1);
  CHECK(needed.min < nominal_gain(c));
  CHECK(needed.max > nominal_gain(c));
  CHECK(meets_with(spec, c, needed.min * 1.001));
  CHECK_FALSE(meets_with(spec, c, needed.min * 0.999));
  CHECK(std::isfinite(needed.max) == bounded);
  if (bounded) {
    CHECK(meets_with(spec, c, needed.max * 0.999));
    CHECK_FALSE(meets_with(spec, c, needed.max * 1.001));
  }
  for (int i = 1; i < 40; ++i) {
    const double high = bounded ? needed.max : 100 * needed.min;
    CHECK(meets_with(spec, c, needed.min * std::pow(high / needed.min, i / 40.0)));
  }
}

TEST_CASE("where the collector current alone is asked for, the ends are those of Kirchhoff's law",
          "[alternates][gain]") {
  constexpr double kSolver = 1e-9;  // relative: what the bias solver leaves
  const BipolarParameters p = plain_device();
  const Candidate any = plain_candidate(plain_spec(R"({"gain": {"min": 0.1}})"));
  const double i_c = any.analysis.point.collector_current;
  CHECK(gain_by_hand(p, i_c) == Approx(300).epsilon(kSolver));
  Spec spec = plain_spec(R"({"gain": {"min": 0.1}})");
  spec.requirements[index(Figure::gain)].reset();
  spec.requirements[index(Figure::collector_current)] = Requirement{kNotComputed, 0.97 * i_c, 1.01 * i_c};
  const GainNeeded both = gain_needed(spec, built_in_catalogue(), plain_candidate(spec));
  CHECK(both.collector_current == Approx(i_c).epsilon(kSolver));
  CHECK(both.min == Approx(gain_by_hand(p, 0.97 * i_c)).epsilon(kSolver));
  CHECK(both.max == Approx(gain_by_hand(p, 1.01 * i_c)).epsilon(kSolver));
}

TEST_CASE("without an upper limit the hFE needed has none, and a miss has no range", "[alternates][gain]") {
  Spec spec = plain_spec(R"({"collector_current": {"min": "0.5 mA"}})");
  const GainNeeded open = gain_needed(spec, built_in_catalogue(), plain_candidate(spec));
  CHECK(open.min == Approx(gain_by_hand(plain_device(), 0.5e-3)).epsilon(1e-9));
  CHECK(std::isinf(open.max));
  CHECK(open.groups.size() > 3);
  spec.requirements[index(Figure::collector_current)] = Requirement{kNotComputed, 1, 2};
  const GainNeeded none = gain_needed(spec, built_in_catalogue(), plain_candidate(spec));
  CHECK(std::isnan(none.min));
  CHECK(std::isnan(none.max));
  CHECK(none.groups.empty());
}

TEST_CASE("a group lies inside where its published range does", "[alternates][gain]") {
  // BC547A/B/C: hFE 110 to 220, 200 to 450, 420 to 800 at 2 mA and 5 V, data sheets named in data/transistors
  struct Group {
    const char* type;
    double min, max;
  };
  constexpr std::array kGroups = {Group{"BC547A", 110, 220}, Group{"BC547B", 200, 450}, Group{"BC547C", 420, 800}};
  Spec spec = plain_spec(R"({"collector_current": {"min": "0.1 mA"}})");
  Candidate c = plain_candidate(spec);
  c.analysis.point.collector_current = 2e-3;
  c.analysis.point.collector_emitter_voltage = 5;
  const double nominal = c.analysis.figures[index(Figure::collector_current)];
  int inside = 0, outside = 0;
  for (const double least : {50.0, 105.0, 115.0, 190.0, 205.0}) {
    double low = 0.2 * nominal, high = nominal;  // of the collector current that needs this hFE
    for (int i = 0; i < 60; ++i) {
      const double middle = (low + high) / 2;
      (gain_by_hand(plain_device(), middle) < least ? low : high) = middle;
    }
    spec.requirements[index(Figure::collector_current)] = Requirement{kNotComputed, low, kNotComputed};
    const GainNeeded needed = gain_needed(spec, built_in_catalogue(), c);
    CHECK(needed.min == Approx(least).epsilon(1e-6));
    for (const Group& g : kGroups) {
      INFO(g.type << " with at least " << least);
      const bool listed = std::find(needed.groups.begin(), needed.groups.end(), g.type) != needed.groups.end();
      CHECK(listed == (g.min >= least));
      (listed ? inside : outside) += 1;
    }
  }
  CHECK(inside > 0);
  CHECK(outside > 0);
}
