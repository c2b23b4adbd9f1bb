// The parts list of a stage against the laws of the circuit: where nothing varies, voltages add up round each loop and
// powers to what the supply gives; each part stands its worst corner.
#include <cmath>

#include "bought_stage.hpp"
#include "catch.hpp"

using namespace bandwright;
using namespace bandwright::test;
using Catch::Matchers::ContainsSubstring;

TEST_CASE("nodes follow the parts that are present") {
  using Nodes = std::array<std::string, 2>;
  CHECK(nodes(Role::emitter, kSplit) == Nodes{"emitter", "junction"});
  CHECK(nodes(Role::emitter_bypassed, kSplit) == Nodes{"junction", "ground"});
  CHECK(nodes(Role::bypass, kSplit) == Nodes{"junction", "ground"});
  CHECK(nodes(Role::emitter_bypassed, kBypassed) == Nodes{"emitter", "ground"});
  CHECK(nodes(Role::bypass, kBypassed) == Nodes{"emitter", "ground"});
  CHECK(nodes(Role::emitter, kUnbypassed) == Nodes{"emitter", "ground"});
  CHECK(nodes(Role::shunt, kBypassed) == Nodes{"collector", "ground"});
  CHECK(nodes(Role::input_coupling, kBypassed) == Nodes{"source", "base"});
}

TEST_CASE("absent parts are not bought, and the rest keep their order") {
  const Bought b = buy(supplied(12), kUnbypassed);
  REQUIRE(b.parts.size() == 6);
  CHECK(b.parts[3].role == Role::emitter);
  CHECK(b.parts[5].role == Role::output_coupling);
}

TEST_CASE("voltages add up from the supply to ground") {
  for (const double volts : {12.0, -12.0}) {
    const Bought b = buy(exact(volts), kSplit);
    CHECK(b[Role::upper_divider].volts + b[Role::lower_divider].volts == Approx(volts).epsilon(kSolved));
    CHECK(b[Role::collector].volts + b[Role::output_coupling].volts == Approx(volts).epsilon(kSolved));
    CHECK(b[Role::input_coupling].volts == Approx(-b[Role::lower_divider].volts).epsilon(kSolved));
    CHECK(b[Role::bypass].volts == Approx(b[Role::emitter_bypassed].volts).epsilon(kSolved));
  }
}

TEST_CASE("resistors and transistor dissipate what the supply gives") {
  const Bought b = buy(exact(12), kSplit);
  double total = b.analysis.figures[index(Figure::dissipation)];
  for (const Part& part : b.parts) total += part.watts;
  CHECK(total == Approx(12 * b.analysis.figures[index(Figure::supply_current)]).epsilon(kSolved));
}

TEST_CASE("ratings hold at the highest supply, not only at the nominal one") {
  Spec wide = exact(12);
  wide.supply.max = 24;
  const Bought narrow = buy(exact(12), kSplit);
  const Bought b = buy(wide, kSplit);
  CHECK(b.stress.volts[index(Role::upper_divider)].max + b.stress.volts[index(Role::lower_divider)].max ==
        Approx(24).epsilon(kSolved));
  const Part& output = b[Role::output_coupling];
  CHECK(0.8 * output.voltage_rating >= std::fabs(output.volts));
  CHECK(output.voltage_rating > narrow[Role::output_coupling].voltage_rating);
  CHECK(b[Role::lower_divider].volts == b.stress.volts[index(Role::lower_divider)].max);
  Spec negative = exact(-12);
  negative.supply.min = -24;
  CHECK(buy(negative, kSplit)[Role::upper_divider].volts + buy(negative, kSplit)[Role::lower_divider].volts ==
        Approx(-24).epsilon(kSolved));
}

TEST_CASE("a nominal condition that is a corner itself is not passed over") {
  Spec spec = exact(12);
  spec.supply.min = 9;  // 12 V is the highest supply
  CHECK(buy(spec, kSplit)[Role::collector].volts == Approx(buy(exact(12), kSplit)[Role::collector].volts));
  CHECK(buy(spec, kSplit).stress.volts[index(Role::upper_divider)].at_max == "25 °C, 12 V");
}

TEST_CASE("tolerances of the parts count") {
  // R2 at its ends moves the base by about R1/(R1 + R2) of 1 %, hFE and VBE by more; every voltage spreads.
  const Bought exactly = buy(exact(12), kSplit), b = buy(supplied(12), kSplit);
  for (const RoleInfo& role : roles()) {
    if (kSplit[index(role.role)] == 0) continue;
    const StressRange& one = exactly.stress.volts[index(role.role)];
    const StressRange& all = b.stress.volts[index(role.role)];
    INFO(role.key);
    CHECK(one.min == Approx(one.max).epsilon(kSolved));
    CHECK(all.min < one.min);
    CHECK(all.max > one.max);
    CHECK_FALSE(all.at_min.empty());
    CHECK(std::fabs(b[role.role].volts) == all.largest());
  }
}

TEST_CASE("a voltage that no rating of the family reaches is said, and left without a number") {
  Spec spec = exact(120);
  // the collector at about 85 V: 85/0.8 = 106 V, and electrolytics are made to 100 V
  const Bought b = buy(spec, {470e3, 12e3, 15e3, 0, 1000, 10e-6, 10e-6, 100e-6, 0});
  REQUIRE(b[Role::output_coupling].volts > 80);
  CHECK(std::isnan(b[Role::output_coupling].voltage_rating));
  CHECK_THAT(b.reason, ContainsSubstring("C2") && ContainsSubstring("80 %"));
  CHECK(buy(supplied(12), kSplit).reason.empty());
}

TEST_CASE("without an operating point every part is rated for what the rails can put across it") {
  const Bought b = buy(exact(12), {10e3, 47e3, 47e3, 0, 1000, 10e-6, 10e-6, 100e-6, 0});
  REQUIRE(b.analysis.point.state != BiasState::active);
  // the emitter is fed through 47 kohm and 10 kohm at most, side by side 8246 ohm: 12 V x 1000/9246 = 1.298 V
  for (const Role role : {Role::upper_divider, Role::lower_divider, Role::collector, Role::output_coupling}) {
    CHECK(b[role].volts == Approx(12));
    CHECK(b[role].voltage_rating >= 15);
  }
  CHECK(b[Role::input_coupling].volts == Approx(-12));
  CHECK(b[Role::output_coupling].voltage_rating == 16);  // 12/0.8 = 15
  CHECK(b[Role::emitter_bypassed].volts == Approx(1.298).epsilon(1e-3));
  CHECK(b[Role::emitter_bypassed].watts == Approx(1.685e-3).epsilon(1e-3));
  CHECK(b[Role::bypass].volts == b[Role::emitter_bypassed].volts);
  CHECK(b[Role::output_coupling].polarity == "+ to collector");
  CHECK(b.stress.dissipation.max == Approx(144 / 4.0 / 48e3));  // matched to RC and RE
}

TEST_CASE("a part carries what its family and value say") {
  const Bought b = buy(supplied(12), kSplit);
  CHECK(b[Role::collector].code == "4K7");  // IEC 60062: the letter stands for the decimal point
  CHECK(b[Role::collector].series == "E3");
  CHECK(b[Role::collector].power_rating >= 2 * b[Role::collector].watts);
  CHECK_THAT(b[Role::collector].family, ContainsSubstring("resistor"));
  CHECK_THAT(b[Role::bypass].family, ContainsSubstring("electrolytic"));
  CHECK(b[Role::bypass].part_number.empty());
}

TEST_CASE("a pair is two parts that share the load, each at the end of its tolerance that makes its share largest") {
  OfferedParts parts = offered(exact(12), kSplit);
  OfferedValue& r3 = parts[index(Role::collector)];
  r3 = paired(r3, 3900, 820, Connection::series, 4720);
  OfferedValue& r2 = parts[index(Role::lower_divider)];
  r2 = paired(r2, 15e3, 30e3, Connection::parallel, 10e3);
  const Bought b = buy(exact(12), parts);
  const auto part = [&](const std::string& name) -> const Part& {
    for (const Part& p : b.parts)
      if (p.designator == name) return p;
    throw std::logic_error("no " + name);
  };
  const double v3 = b.stress.volts[index(Role::collector)].max, p3 = b.stress.watts[index(Role::collector)].max;
  // 3900 x 1.01/(3900 x 1.01 + 820 x 0.99) = 0.82914; 820 x 1.01/(820 x 1.01 + 3900 x 0.99) = 0.17662
  CHECK(part("R3A").volts == Approx(0.82914 * v3).epsilon(1e-4));
  CHECK(part("R3B").watts == Approx(0.17662 * p3).epsilon(1e-4));
  CHECK(part("R3A").nodes == std::array<std::string, 2>{"supply", "between R3A and R3B"});
  CHECK(part("R3B").nodes == std::array<std::string, 2>{"between R3A and R3B", "collector"});
  CHECK(part("R3A").note == "in series with R3B");
  // the smaller one of two in parallel takes more: 30 x 1.01/(30 x 1.01 + 15 x 0.99) = 0.67110
  CHECK(part("R2A").volts == b.stress.volts[index(Role::lower_divider)].max);
  CHECK(part("R2A").watts == Approx(0.67110 * b.stress.watts[index(Role::lower_divider)].max).epsilon(1e-4));
  CHECK(part("R2B").unit_cost == 0.03);
}
