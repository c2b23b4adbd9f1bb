// The parts list of a stage against the laws of the circuit: voltages add up round each loop, powers to what the supply
// gives, and a polarised capacitor has its + at the node of the higher potential.
#include <bandwright/purchase.hpp>
#include <cmath>

#include "catch.hpp"

using namespace bandwright;

namespace {

// Voltages and powers come from one solution that stops at 1e-12 of the Thevenin voltage.
constexpr double kSolved = 1e-9;

// An invented transistor of beta 200, VBE about 0.65 V at 1 mA.
BipolarParameters transistor(bool pnp) {
  BipolarParameters device;
  device.type = "invented";
  device.pnp = pnp;
  for (GainCurve* curve : {&device.gain, &device.gain_min, &device.gain_max}) {
    curve->points = 1;
    curve->log_current[0] = std::log(1e-3);
    curve->log_gain[0] = std::log(200.0);
  }
  device.log_saturation_current = std::log(1e-14);
  device.inverse_early_voltage = 1.0 / 80;
  device.transit_time = 5e-10;
  device.emitter_capacitance = 15e-12;
  device.feedback_capacitance = 5e-12;
  return device;
}

constexpr PartValues kSplit = {47e3, 10e3, 4700, 68, 1000, 10e-6, 10e-6, 100e-6, 0};
constexpr PartValues kBypassed = {47e3, 10e3, 4700, 0, 1000, 10e-6, 10e-6, 100e-6, 220e-12};
constexpr PartValues kUnbypassed = {47e3, 10e3, 4700, 1000, 0, 10e-6, 10e-6, 0, 0};

struct Bought {
  Spec spec;
  BipolarParameters device;
  Stage stage;
  Analysis analysis;
  std::vector<Part> parts;
  std::string reason;

  const Part& operator[](Role role) const {
    for (const Part& part : parts)
      if (part.role == role) return part;
    throw std::logic_error("no such part");
  }
};

Spec supplied(double volts) {
  Spec spec;
  spec.supply = {volts, volts, volts};
  spec.ambient = {298.15, 298.15, 298.15};
  spec.load.conductance = 1e-4;
  return spec;
}

Bought buy(const Spec& spec, const PartValues& values) {
  Bought bought;
  bought.spec = spec;
  bought.device = transistor(spec.pnp());
  bought.stage = {values, &bought.device, surroundings(spec)};
  bought.analysis = analyse(bought.stage, {});
  OfferedParts offered;
  for (const RoleInfo& role : roles()) {
    const std::size_t i = index(role.role);
    if (values[i] > 0) offered[i] = resolve_value(built_in_catalogue(), spec, role.role, values[i]);
  }
  bought.parts = parts_list(spec, offered, bought.stage, bought.analysis, &bought.reason);
  return bought;
}

}  // namespace

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
    const Bought b = buy(supplied(volts), kSplit);
    CHECK(b[Role::upper_divider].volts + b[Role::lower_divider].volts == Approx(volts).epsilon(kSolved));
    CHECK(b[Role::collector].volts + b[Role::output_coupling].volts == Approx(volts).epsilon(kSolved));
    CHECK(b[Role::input_coupling].volts == Approx(-b[Role::lower_divider].volts).epsilon(kSolved));
    CHECK(b[Role::bypass].volts == Approx(b[Role::emitter_bypassed].volts).epsilon(kSolved));
  }
}

TEST_CASE("resistors and transistor dissipate what the supply gives") {
  const Bought b = buy(supplied(12), kSplit);
  double total = b.analysis.figures[index(Figure::dissipation)];
  for (const Part& part : b.parts) total += part.watts;
  CHECK(total == Approx(12 * b.analysis.figures[index(Figure::supply_current)]).epsilon(kSolved));
}

TEST_CASE("the + of a polarised capacitor lies at the higher potential") {
  const Bought npn = buy(supplied(12), kSplit);
  CHECK(npn[Role::input_coupling].polarity == "+ to base");
  CHECK(npn[Role::output_coupling].polarity == "+ to collector");
  CHECK(npn[Role::bypass].polarity == "+ to junction");
  const Bought pnp = buy(supplied(-12), kSplit);
  CHECK(pnp[Role::input_coupling].polarity == "+ to source");
  CHECK(pnp[Role::output_coupling].polarity == "+ to output");
  CHECK(pnp[Role::bypass].polarity == "+ to ground");
  CHECK(buy(supplied(12), kBypassed)[Role::bypass].polarity == "+ to emitter");
}

TEST_CASE("a DC voltage outside turns a coupling capacitor round") {
  Spec spec = supplied(12);
  spec.source.dc = 5;
  spec.load.dc = 11;
  const Bought b = buy(spec, kSplit);
  CHECK(b[Role::input_coupling].polarity == "+ to source");
  CHECK(b[Role::output_coupling].polarity == "+ to output");
  const Bought plain = buy(supplied(12), kSplit);
  CHECK(b[Role::input_coupling].volts == Approx(plain[Role::input_coupling].volts + 5).epsilon(kSolved));
  CHECK(b[Role::output_coupling].volts == Approx(plain[Role::output_coupling].volts - 11).epsilon(kSolved));
  spec = supplied(-12);
  spec.source.dc = -5;
  CHECK(buy(spec, kSplit)[Role::input_coupling].polarity == "+ to base");
}

TEST_CASE("parts that have no polarity state none") {
  const Bought b = buy(supplied(12), kBypassed);
  CHECK(b[Role::shunt].polarity.empty());
  CHECK(b[Role::collector].polarity.empty());
}

TEST_CASE("ratings hold at the highest supply, not only at the nominal one") {
  Spec wide = supplied(12);
  wide.supply.max = 24;
  const Bought narrow = buy(supplied(12), kSplit);
  const Bought b = buy(wide, kSplit);
  CHECK(b[Role::upper_divider].volts + b[Role::lower_divider].volts == Approx(24).epsilon(kSolved));
  CHECK(b[Role::output_coupling].voltage_rating > std::fabs(b[Role::output_coupling].volts));
  CHECK(b[Role::output_coupling].voltage_rating > narrow[Role::output_coupling].voltage_rating);
  Spec negative = supplied(-12);
  negative.supply.min = -24;
  CHECK(buy(negative, kSplit)[Role::upper_divider].volts + buy(negative, kSplit)[Role::lower_divider].volts ==
        Approx(-24).epsilon(kSolved));
}

TEST_CASE("a voltage that no rating of the family reaches is said, and left without a number") {
  Spec spec = supplied(250);
  const Bought b = buy(spec, {470e3, 5600, 47e3, 0, 1000, 10e-6, 10e-6, 100e-6, 0});
  CHECK(std::isnan(b[Role::output_coupling].voltage_rating));
  CHECK_THAT(b.reason, Catch::Matchers::ContainsSubstring("C2"));
  CHECK(buy(supplied(12), kSplit).reason.empty());
}

TEST_CASE("without an operating point every part is rated for the whole supply") {
  const Bought b = buy(supplied(12), {10e3, 47e3, 47e3, 0, 1000, 10e-6, 10e-6, 100e-6, 0});
  REQUIRE(b.analysis.point.state != BiasState::active);
  for (const Part& part : b.parts) {
    CHECK(std::fabs(part.volts) == Approx(12));
    CHECK(part.voltage_rating > 12);
  }
  CHECK(b[Role::output_coupling].polarity == "+ to collector");
}

TEST_CASE("a part carries what its family and value say") {
  const Bought b = buy(supplied(12), kSplit);
  CHECK(b[Role::collector].code == "4K7");  // IEC 60062: the letter stands for the decimal point
  CHECK(b[Role::collector].series == "E3");
  CHECK(b[Role::collector].power_rating >= 2 * b[Role::collector].watts);
  CHECK_THAT(b[Role::collector].family, Catch::Matchers::ContainsSubstring("resistor"));
  CHECK_THAT(b[Role::bypass].family, Catch::Matchers::ContainsSubstring("electrolytic"));
  CHECK(b[Role::bypass].part_number.empty());
}
