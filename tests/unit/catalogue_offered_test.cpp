// What is offered for a role under a spec's rules.
#include <algorithm>
#include <bandwright/catalogue.hpp>
#include <cmath>

#include "catch.hpp"

using namespace bandwright;

namespace {

// The rules that a spec has where it states none: resistors E24 1 % 10 ohm to 1 Mohm.
Spec plain_spec() {
  Spec spec;
  spec.supply = {12, 12, 12};
  spec.ambient = {298.15, 298.15, 298.15};
  spec.parts.resistors.series = "E24";
  spec.parts.resistors.tolerance = Tolerance{0.01, 0.01};
  spec.parts.resistors.min = 10;
  spec.parts.resistors.max = 1e6;
  return spec;
}

std::vector<OfferedValue> offered(const Spec& spec, Role role) {
  return offered_values(built_in_catalogue(), spec, role);
}

const OfferedValue* at(const std::vector<OfferedValue>& list, double value) {
  const auto found = std::find_if(list.begin(), list.end(),
                                  [&](const OfferedValue& o) { return std::fabs(o.value / value - 1) < 1e-9; });
  return found == list.end() ? nullptr : &*found;
}

bool rises(const std::vector<OfferedValue>& list) {
  return std::is_sorted(list.begin(), list.end(),
                        [](const OfferedValue& a, const OfferedValue& b) { return a.value <= b.value; });
}

}  // namespace

TEST_CASE("resistors by default: five decades of E24 in metal film at 1 %") {
  const auto list = offered(plain_spec(), Role::collector);
  CHECK(list.size() == 5 * 24 + 1);  // 10 ohm to 1 Mohm, both ends in
  CHECK(rises(list));
  CHECK(list.front().value == 10.0);
  CHECK(list.back().value == 1e6);
  for (const OfferedValue& o : list) {
    CHECK(o.family->key == "metal-film");
    CHECK(o.tolerance == Tolerance{0.01, 0.01});
    CHECK(o.working_value == o.value);
  }
  CHECK(at(list, 4700)->series->name == "E3");
  CHECK(at(list, 5100)->series->name == "E24");
}

TEST_CASE("offered values equal their printed decimals to the last bit") {
  const auto capacitors = offered(plain_spec(), Role::bypass);
  CHECK(at(capacitors, 4.7e-6)->value == 4.7e-6);
  CHECK(at(capacitors, 1.5e-8)->value == 1.5e-8);
  CHECK(at(capacitors, 6.8e-11)->value == 6.8e-11);
  Spec fine = plain_spec();
  fine.parts.resistors.series = "E96";
  CHECK(at(offered(fine, Role::emitter), 4.99e3)->value == 4990.0);
  CHECK(at(offered(fine, Role::emitter), 10.2)->value == 10.2);
}

TEST_CASE("capacitors by default: C0G to 10 nF, film to 1 uF, electrolytic to 1000 uF") {
  const auto list = offered(plain_spec(), Role::input_coupling);
  CHECK(rises(list));
  // 10 pF to 10 nF: three decades of E12 and the end; film and electrolytic: two and three decades of E6.
  CHECK(list.size() == 3 * 12 + 1 + 2 * 6 + 3 * 6);
  CHECK(list.front().value == 1e-11);
  CHECK(list.back().value == 1e-3);
  CHECK(at(list, 10e-9)->family->key == "c0g");
  CHECK(at(list, 15e-9)->family->key == "film");
  CHECK(at(list, 12e-9) == nullptr);
  CHECK(at(list, 1e-6)->family->key == "film");
  CHECK(at(list, 1.5e-6)->family->key == "electrolytic");
  CHECK(at(list, 100e-12)->tolerance == Tolerance{0.05, 0.05});
  CHECK(at(list, 100e-9)->tolerance == Tolerance{0.1, 0.1});
  CHECK(at(list, 100e-6)->tolerance == Tolerance{0.2, 0.2});
  for (const OfferedValue& o : list) CHECK((o.family->key != "x7r" && o.family->key != "bipolar-electrolytic"));
}

TEST_CASE("a series in the spec limits every family") {
  Spec spec = plain_spec();
  spec.parts.capacitors.series = "E3";
  const auto list = offered(spec, Role::bypass);
  CHECK(list.size() == 3 * 3 + 1 + 2 * 3 + 3 * 3);
  spec.parts.capacitors.series = "E24";  // wider than any family's own: changes nothing
  CHECK(offered(spec, Role::bypass).size() == offered(plain_spec(), Role::bypass).size());
  // E96 and E12 share 100 and 150 (two numbers of E24's six shared ones), E6 likewise.
  spec.parts.capacitors.series = "E96";
  for (const OfferedValue& o : offered(spec, Role::bypass)) {
    CHECK((in_series(*find_series("E3"), o.value) || in_series(*find_series("E6"), o.value)));
    CHECK(in_series(*find_series("E96"), o.value));
  }
  spec.parts.resistors.series = "E192";  // metal film is made in E24 and E96: what stands in E192 too
  for (const OfferedValue& o : offered(spec, Role::collector)) CHECK(in_series(*find_series("E192"), o.value));
  CHECK(at(offered(spec, Role::collector), 101) == nullptr);
  CHECK(at(offered(spec, Role::collector), 102) != nullptr);
}

TEST_CASE("without a series resistors come in all that their family is made in") {
  Spec spec = plain_spec();
  spec.parts.resistors.series.clear();
  // Each full decade of E24 and E96 together has 114 numbers (IEC 60063, see catalogue_series_test.cpp).
  CHECK(offered(spec, Role::collector).size() == 5 * 114 + 1);
}

TEST_CASE("a tolerance only tightens, and drops families that offer none so tight") {
  Spec spec = plain_spec();
  spec.parts.resistors.tolerance = Tolerance{0.05, 0.05};
  CHECK(offered(spec, Role::collector).front().tolerance == Tolerance{0.01, 0.01});
  spec.parts.resistors.tolerance = Tolerance{0.005, 0.005};
  CHECK(offered(spec, Role::collector).front().tolerance == Tolerance{0.005, 0.005});
  spec.parts.resistors.tolerance = Tolerance{0.001, 0.001};
  CHECK(offered(spec, Role::collector).empty());
  spec.parts.capacitors.tolerance = Tolerance{0.05, 0.05};
  const auto five = offered(spec, Role::input_coupling);
  CHECK(five.back().value == Approx(1e-6).epsilon(1e-12));
  CHECK(five.back().tolerance == Tolerance{0.05, 0.05});
  spec.parts.capacitors.tolerance = Tolerance{0.03, 0.03};
  CHECK(offered(spec, Role::input_coupling).back().tolerance == Tolerance{0.02, 0.02});
}

TEST_CASE("an asymmetric tolerance is held on both sides") {
  Spec spec = plain_spec();
  spec.parts.capacitors.tolerance = Tolerance{0.2, 0.5};
  CHECK(offered(spec, Role::bypass).back().family->key == "electrolytic");
  spec.parts.capacitors.tolerance = Tolerance{0.1, 0.5};
  CHECK(offered(spec, Role::bypass).back().family->key == "film");
  spec.parts.capacitors.tolerance = Tolerance{0.5, 0.1};
  CHECK(offered(spec, Role::bypass).back().family->key == "film");
}

TEST_CASE("a range of a role overrides min and max, out to what the outermost family is made in") {
  Spec spec = plain_spec();
  spec.parts.ranges[index(Role::emitter)] = ValueRange{1, 1000};
  const auto emitter = offered(spec, Role::emitter);
  CHECK(emitter.front().value == 1.0);
  CHECK(emitter.back().value == 1000.0);
  CHECK(offered(spec, Role::collector).front().value == 10.0);
  spec.parts.ranges[index(Role::shunt)] = ValueRange{1e-13, 10e-9};
  const auto shunt = offered(spec, Role::shunt);
  CHECK(shunt.front().value == Approx(0.22e-12).epsilon(1e-12));  // C0G is made down to 0.22 pF
  CHECK(shunt.back().value == Approx(10e-9).epsilon(1e-12));
  spec.parts.ranges[index(Role::bypass)] = ValueRange{100e-6, 1};
  CHECK(offered(spec, Role::bypass).back().value == Approx(10e-3).epsilon(1e-12));  // electrolytic up to 10,000 uF
  spec.parts.ranges[index(Role::collector)] = ValueRange{1, 100e6};
  CHECK(offered(spec, Role::collector).back().value == Approx(4.7e6).epsilon(1e-12));
}

TEST_CASE("named families serve in the order they are named, as far as they are made") {
  Spec spec = plain_spec();
  spec.parts.capacitors.families = {"film"};
  const auto film = offered(spec, Role::input_coupling);
  CHECK(film.front().value == Approx(1e-9).epsilon(1e-12));
  CHECK(film.back().value == Approx(10e-6).epsilon(1e-12));
  spec.parts.capacitors.families = {"electrolytic", "film"};
  const auto both = offered(spec, Role::input_coupling);
  CHECK(at(both, 0.1e-6)->family->key == "electrolytic");
  CHECK(at(both, 0.068e-6)->family->key == "film");
  spec.parts.resistors.families = {"thick-film"};
  CHECK(offered(spec, Role::collector).front().family->key == "thick-film");
  spec.parts.capacitors.families = {"bipolar-electrolytic"};
  const auto bipolar = offered(spec, Role::input_coupling);
  CHECK(bipolar.front().value == Approx(0.47e-6).epsilon(1e-12));
  CHECK(bipolar.back().value == Approx(2.2e-3).epsilon(1e-12));
}

TEST_CASE("a class 2 ceramic serves where it is named, unless the cutoff it sets must be better than 40 %") {
  Spec spec = plain_spec();
  spec.parts.capacitors.families = {"x7r"};
  const auto all = offered(spec, Role::input_coupling);
  CHECK(all.size() == 5 * 6 + 5);  // E6 from 100 pF to 47 uF
  CHECK(all.back().tolerance == Tolerance{0.1, 0.1});
  const auto lower = [&](double low, double high) {
    spec.requirements[index(Figure::lower_cutoff)] = Requirement{40, low, high};
  };
  lower(40 / 1.2, 40 * 1.2);  // the usual 20 %
  for (const Role role : {Role::input_coupling, Role::output_coupling, Role::bypass})
    CHECK(offered(spec, role).empty());
  CHECK(offered(spec, Role::shunt).size() == all.size());
  lower(40 / 1.399, 40 * 1.399);
  CHECK(offered(spec, Role::bypass).empty());
  lower(40 / 1.401, 40 * 1.401);
  CHECK(offered(spec, Role::bypass).size() == all.size());
  lower(kNotComputed, 50);  // met with capacitance to spare
  CHECK(offered(spec, Role::bypass).size() == all.size());
  spec.requirements[index(Figure::upper_cutoff)] = Requirement{20e3, 18e3, 22e3};
  CHECK(offered(spec, Role::shunt).empty());
  spec.parts.capacitors.families = {"x7r", "c0g"};
  for (const OfferedValue& o : offered(spec, Role::shunt)) CHECK(o.family->key == "c0g");
}

TEST_CASE("a class 2 ceramic at work: what temperature, ageing and DC voltage take of it") {
  Spec spec = plain_spec();
  spec.parts.capacitors.families = {"x7r"};
  const OfferedValue o = resolve_value(built_in_catalogue(), spec, Role::bypass, {1e-6});
  REQUIRE(o.family->key == "x7r");
  // 10 % printed, 15 % over temperature, 10 % of ageing: 1 - 0.9 x 0.85 x 0.9 = 0.3115; 1.1 x 1.15 - 1 = 0.265
  CHECK(tolerance_at_work(o).below == Approx(0.3115).epsilon(1e-12));
  CHECK(tolerance_at_work(o).above == Approx(0.265).epsilon(1e-12));
  // 9 V at worst needs 15 V, so 16 V: 1 - 0.5 x 8/16
  CHECK(bias_factor(o, {}, 8, 9) == Approx(0.75).epsilon(1e-12));
  CHECK(bias_factor(o, {}, -8, -9) == Approx(0.75).epsilon(1e-12));
  CHECK(bias_factor(o, {}, 8, 10) == Approx(0.84).epsilon(1e-12));  // 16.7 V, so 25 V
  CHECK(bias_factor(o, {}, 0, 10) == 1);
  CHECK(bias_factor(o, {}, 300, 300) == 0.5);  // no rating holds: all of the loss
  const OfferedValue film = resolve_value(built_in_catalogue(), plain_spec(), Role::bypass, {1e-6});
  CHECK(bias_factor(film, {}, 8, 9) == 1);
  CHECK(tolerance_at_work(film) == film.tolerance);
}

TEST_CASE("a pinned value is the only one, in a series or not") {
  Spec spec = plain_spec();
  spec.parts.pinned[index(Role::collector)] = 4700;
  auto list = offered(spec, Role::collector);
  REQUIRE(list.size() == 1);
  CHECK(list[0].value == 4700.0);
  CHECK(list[0].series->name == "E3");
  CHECK(list[0].family->key == "metal-film");
  spec.parts.pinned[index(Role::collector)] = 4321.5;
  list = offered(spec, Role::collector);
  REQUIRE(list.size() == 1);
  CHECK(list[0].value == 4321.5);
  CHECK(list[0].series == nullptr);
  spec.parts.pinned[index(Role::shunt)] = 0;
  list = offered(spec, Role::shunt);
  REQUIRE(list.size() == 1);
  CHECK(list[0].value == 0.0);
  CHECK(list[0].family == nullptr);
}

TEST_CASE("a value is resolved with the family that is first choice there, or the nearest") {
  const Spec spec = plain_spec();
  const auto resolve = [&](Role role, double value) {
    return resolve_value(built_in_catalogue(), spec, role, {value});
  };
  CHECK(resolve(Role::bypass, 82e-6).family->key == "electrolytic");
  CHECK(resolve(Role::bypass, 0.12e-6).family->key == "film");
  CHECK(resolve(Role::bypass, 0.12e-6).series->name == "E12");
  CHECK(resolve(Role::shunt, 5e-12).family->key == "c0g");
  CHECK(resolve(Role::shunt, 1e-14).family->key == "c0g");
  CHECK(resolve(Role::bypass, 0.5).family->key == "electrolytic");
  CHECK(resolve(Role::emitter, 0.1).family->key == "metal-film");
}

TEST_CASE("a part whose family is not sold so tight is taken at its tightest") {
  Spec spec = plain_spec();
  spec.parts.capacitors.tolerance = Tolerance{0.001, 0.001};
  const OfferedValue o = resolve_value(built_in_catalogue(), spec, Role::bypass, {100e-6});
  CHECK(o.family->key == "electrolytic");
  CHECK(o.tolerance == Tolerance{0.2, 0.2});
}

TEST_CASE("an electrolytic loses 0.5 % for each kelvin below 20 °C, from memory") {
  Spec spec = plain_spec();
  spec.ambient = {263.15, 263.15, 263.15};  // -10 °C
  const OfferedValue cold = resolve_value(built_in_catalogue(), spec, Role::bypass, {100e-6});
  CHECK(cold.value == 100e-6);
  CHECK(cold.working_value == Approx(85e-6).epsilon(1e-12));
  CHECK(resolve_value(built_in_catalogue(), spec, Role::bypass, {100e-9}).working_value == 100e-9);
  spec.ambient.nominal = 293.15;
  CHECK(resolve_value(built_in_catalogue(), spec, Role::bypass, {100e-6}).working_value == 100e-6);
  spec.ambient.nominal = 333.15;
  CHECK(resolve_value(built_in_catalogue(), spec, Role::bypass, {100e-6}).working_value == 100e-6);
  spec.ambient.nominal = 218.15;  // -55 °C: 1.5 uF works as 0.94 uF, below the 1 uF film capacitor
  const auto list = offered(spec, Role::bypass);
  CHECK(std::is_sorted(list.begin(), list.end(),
                       [](const OfferedValue& a, const OfferedValue& b) { return a.working_value < b.working_value; }));
  CHECK(at(list, 1.5e-6)->working_value == Approx(0.9375e-6).epsilon(1e-12));
}
