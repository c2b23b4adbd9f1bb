// Polarity: a polarised capacitor has its + at the node of the higher potential; where a corner changes the sign it
// gives way to a part without polarity; a PNP stage is the mirror of an NPN one.
#include <cmath>

#include "bought_stage.hpp"
#include "catch.hpp"

using namespace bandwright;
using namespace bandwright::test;
using Catch::Matchers::ContainsSubstring;

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
  Spec spec = exact(12);
  spec.source.dc = 5;
  spec.load.dc = 11;
  const Bought b = buy(spec, kSplit);
  CHECK(b[Role::input_coupling].polarity == "+ to source");
  CHECK(b[Role::output_coupling].polarity == "+ to output");
  const Bought plain = buy(exact(12), kSplit);
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

TEST_CASE("without an operating point a DC voltage outside may turn a capacitor round") {
  Spec spec = exact(12);
  spec.source.dc = 3;
  const Bought b = buy(spec, {10e3, 47e3, 47e3, 0, 1000, 10e-6, 10e-6, 100e-6, 0});
  CHECK(b.stress.volts[index(Role::input_coupling)].min == Approx(-9));
  CHECK(b.stress.volts[index(Role::input_coupling)].max == Approx(3));
  CHECK(b[Role::input_coupling].polarity.empty());
  CHECK_THAT(b[Role::input_coupling].note, ContainsSubstring("bipolar"));
}

TEST_CASE("where the sign changes between corners a bipolar part stands, with its reason") {
  Spec spec = supplied(12);
  const double base = buy(exact(12), kSplit)[Role::lower_divider].volts;
  spec.source.dc = base;  // C1 has 0 V nominally
  const Bought b = buy(spec, kSplit);
  REQUIRE(b.stress.volts[index(Role::input_coupling)].changes_sign());
  CHECK(b[Role::input_coupling].polarity.empty());
  CHECK(b[Role::input_coupling].family == "bipolar aluminium electrolytic capacitor");
  CHECK_THAT(b[Role::input_coupling].note, Catch::Matchers::StartsWith("bipolar: its voltage lies between -"));
  CHECK(b[Role::output_coupling].polarity == "+ to collector");
  CHECK(b[Role::output_coupling].note.empty());
  CHECK(b.reason.empty());
}

TEST_CASE("where no bipolar part is made a film one stands, which keeps its capacitance in the cold") {
  Spec spec = supplied(12);
  Spec nominal = exact(12);
  spec.ambient = nominal.ambient = {263.15, 263.15, 263.15};
  spec.parts.capacitors.families = {"electrolytic"};
  spec.source.dc = buy(nominal, kSplit)[Role::lower_divider].volts;
  PartValues small = kSplit;
  small[index(Role::input_coupling)] = 0.22e-6;  // bipolar ones begin at 0.47 uF
  OfferedParts parts = offered(spec, small);
  REQUIRE(parts[index(Role::input_coupling)].family->key == "electrolytic");
  const WorstStress stress = buy(spec, parts).stress;
  const OfferedParts settled = with_settled_polarity(spec, parts, stress);
  const OfferedValue& input = settled[index(Role::input_coupling)];
  CHECK(input.family->key == "film");
  CHECK(input.working_value == input.value);
  CHECK(input.tolerance == Tolerance{0.1, 0.1});
  CHECK(settled[index(Role::bypass)].family->key == "electrolytic");
  CHECK(settled[index(Role::bypass)].working_value == Approx(85e-6));  // 0.5 % for each of 30 K
  CHECK_THAT(buy(spec, parts)[Role::input_coupling].note, Catch::Matchers::StartsWith("without polarity: its voltage"));
}

TEST_CASE("a polarised part of the stock stays, and is said to be wrong") {
  Spec spec = supplied(12);
  spec.source.dc = buy(exact(12), kSplit)[Role::lower_divider].volts;
  StockPart own;
  own.kind = PartKind::capacitor;
  own.value = 10e-6;
  own.voltage_rating = 25;
  OfferedParts parts = offered(spec, kSplit);
  parts[index(Role::input_coupling)].stock = &own;
  const Bought b = buy(spec, parts);
  CHECK(b[Role::input_coupling].family == "aluminium electrolytic capacitor");
  CHECK(b[Role::input_coupling].polarity == "none is right");
  CHECK_THAT(b.reason, ContainsSubstring("C1 input coupling: polarised, and its voltage lies between"));
}

TEST_CASE("a PNP stage is the NPN one mirrored") {
  Spec npn = supplied(12);
  npn.supply = {12, 11, 13};
  npn.source.dc = 1.2;
  npn.load.dc = -0.8;
  Spec pnp = npn;
  pnp.supply = {-12, -13, -11};
  pnp.source.dc = -1.2;
  pnp.load.dc = 0.8;
  for (const PartValues& values : {kSplit, kBypassed, kUnbypassed}) {
    const Bought a = buy(npn, values), b = buy(pnp, values);
    REQUIRE(a.parts.size() == b.parts.size());
    for (std::size_t i = 0; i < a.parts.size(); ++i) {
      const Part &one = a.parts[i], &other = b.parts[i];
      INFO(one.designator);
      CHECK(one.volts == -other.volts);
      CHECK(one.watts == other.watts);
      CHECK(one.voltage_rating == other.voltage_rating);
      CHECK(one.power_rating == other.power_rating);
      if (one.polarity.empty()) continue;
      const bool first = one.polarity == "+ to " + one.nodes[0];
      CHECK(other.polarity == "+ to " + other.nodes[first ? 1 : 0]);
    }
  }
}

TEST_CASE("capacitors in series each stand the whole voltage; a pair without polarity is two of the other family") {
  Spec spec = supplied(12);
  spec.source.dc = buy(exact(12), kSplit)[Role::lower_divider].volts;
  OfferedParts parts = offered(spec, kSplit);
  OfferedValue& c1 = parts[index(Role::input_coupling)];
  c1 = paired(c1, 10e-6, 4.7e-6, Connection::parallel, 14.7e-6);
  const OfferedParts settled = with_settled_polarity(spec, parts, buy(spec, parts).stress);
  const OfferedValue& pair = settled[index(Role::input_coupling)];
  CHECK(pair.family->key == "bipolar-electrolytic");
  CHECK(pair.value == Approx(14.7e-6));
  CHECK(pair.pair[1].value == 4.7e-6);
  CHECK(pair.pair[0].unit_cost != 0.02);
  StockPart own;
  c1.pair[1].stock = &own;
  CHECK(with_settled_polarity(spec, parts, buy(spec, parts).stress)[index(Role::input_coupling)].family->polarised);
  OfferedValue& c2 = parts[index(Role::output_coupling)];
  c2 = paired(c2, 22e-6, 22e-6, Connection::series, 11e-6);
  const Bought b = buy(spec, parts);
  for (const Part& p : b.parts)
    if (p.role == Role::output_coupling) CHECK(p.volts == b.stress.volts[index(Role::output_coupling)].max);
}
