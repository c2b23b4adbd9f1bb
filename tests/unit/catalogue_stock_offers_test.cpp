// What a stock offers for a role, pairs of values, and class 2 ceramics.
#include <algorithm>
#include <bandwright/catalogue.hpp>

#include "catalogue/pairs.hpp"
#include "catch.hpp"

using namespace bandwright;
using Catch::Matchers::WithinRel;

namespace {

Spec plain_spec() {
  Spec s;
  s.supply = {12, 12, 12};
  s.ambient = {298.15, 298.15, 298.15};
  s.parts.resistors.series = "E24";
  s.parts.resistors.tolerance = Tolerance{0.01, 0.01};
  s.parts.resistors.min = 10;
  s.parts.resistors.max = 1e6;
  return s;
}

StockPart row(PartKind kind, double value, std::optional<long> quantity = {}) {
  StockPart part;
  part.kind = kind;
  part.value = value;
  part.quantity = quantity;
  return part;
}

Catalogue with(std::vector<StockPart> parts) {
  Catalogue catalogue = built_in_catalogue();
  catalogue.stock = {"drawer.csv", std::move(parts)};
  return catalogue;
}

std::vector<double> values_of(const std::vector<OfferedValue>& list) {
  std::vector<double> values;
  for (const OfferedValue& o : list) values.push_back(o.value);
  return values;
}

}  // namespace

TEST_CASE("with stock_only nothing but the stock is offered, whatever its tolerance", "[stock]") {
  Spec spec = plain_spec();
  spec.parts.stock = "drawer.csv";
  spec.parts.stock_only = true;
  StockPart loose = row(PartKind::resistor, 4300);
  loose.tolerance = Tolerance{0.05, 0.05};
  const Catalogue catalogue =
      with({row(PartKind::resistor, 47e3), loose, row(PartKind::capacitor, 1e-6), row(PartKind::resistor, 2.2e6)});
  const auto offered = offered_values(catalogue, spec, Role::collector);
  CHECK(values_of(offered) == std::vector<double>{4300, 47e3});  // 2.2 Mohm lies beyond the spec's range
  CHECK(offered[0].tolerance == Tolerance{0.05, 0.05});
  CHECK(offered[1].tolerance == Tolerance{0.01, 0.01});
  CHECK(offered[0].stock != nullptr);
}

TEST_CASE("parts at hand are offered beside those to be bought, and in their place where there is enough", "[stock]") {
  Spec spec = plain_spec();
  spec.parts.stock = "drawer.csv";
  spec.parts.ranges[index(Role::collector)] = ValueRange{4.0e3, 5.0e3};
  const auto count = [&](const Catalogue& catalogue, double value) {
    const auto offered = values_of(offered_values(catalogue, spec, Role::collector));
    return std::count(offered.begin(), offered.end(), value);
  };
  CHECK(count(with({row(PartKind::resistor, 4700)}), 4700) == 1);     // not counted: never runs short
  CHECK(count(with({row(PartKind::resistor, 4700, 2)}), 4700) == 2);  // the third has to be bought
  CHECK(count(with({row(PartKind::resistor, 4700, 0)}), 4700) == 1);  // the tin is empty
  CHECK(count(with({row(PartKind::resistor, 4999)}), 4999) == 1);     // of no series
  spec.parts.boards = 3;
  CHECK(count(with({row(PartKind::resistor, 4999, 2)}), 4999) == 0);  // not enough for three boards
}

TEST_CASE("a stock part keeps its cost, a part to be bought takes the invented one of its family", "[stock]") {
  Spec spec = plain_spec();
  StockPart own = row(PartKind::resistor, 4999);
  own.unit_cost = 0.5;
  const Catalogue catalogue = with({own});
  const OfferedValue mine = resolve_value(catalogue, spec, Role::collector, {4999});
  CHECK(mine.unit_cost == 0.5);
  CHECK_FALSE(mine.invented_cost);
  const OfferedValue bought = resolve_value(catalogue, spec, Role::collector, {4700});
  CHECK(bought.stock == nullptr);
  CHECK(bought.invented_cost);
}

TEST_CASE("the pinned value comes from the stock where the stock holds it", "[stock]") {
  Spec spec = plain_spec();
  spec.parts.pinned[index(Role::collector)] = 4999;
  const auto offered = offered_values(with({row(PartKind::resistor, 4999, 1)}), spec, Role::collector);
  REQUIRE_FALSE(offered.empty());
  CHECK(offered[0].stock != nullptr);
}

TEST_CASE("a spec that wants more than the stock holds is told where", "[stock]") {
  Spec spec = plain_spec();
  spec.parts.stock = "drawer.csv";
  spec.parts.stock_only = true;
  spec.parts.pinned[index(Role::emitter)] = 150;
  const auto faults = check_against_catalogue(spec, with({row(PartKind::resistor, 47e3)}));
  const auto told = [&](const std::string& where, const std::string& found) {
    return std::any_of(faults.begin(), faults.end(),
                       [&](const Fault& f) { return f.where == where && f.found.find(found) != std::string::npos; });
  };
  CHECK(told("parts.pinned.emitter", "150"));
  CHECK(told("parts.stock", "input_coupling"));
  CHECK(told("parts.stock", "output_coupling"));
  const auto unread = check_against_catalogue(spec, built_in_catalogue());
  CHECK(std::any_of(unread.begin(), unread.end(), [](const Fault& f) { return f.where == "parts.stock"; }));
}

TEST_CASE("pairs: series and parallel by the laws of Ohm and Kirchhoff", "[pairs]") {
  const Spec spec = plain_spec();
  const Catalogue& catalogue = built_in_catalogue();
  const auto resistor = [&](double v) { return resolve_value(catalogue, spec, Role::collector, {v}); };
  const auto capacitor = [&](double v) { return resolve_value(catalogue, spec, Role::input_coupling, {v}); };
  const OfferedValue sum = joined(resistor(4700), resistor(300), Connection::series);
  CHECK_THAT(sum.value, WithinRel(5000.0, 1e-15));
  CHECK_THAT(sum.tolerance.above, WithinRel(0.01, 1e-9));  // both at their ends: 1 % of the sum
  const OfferedValue beside = joined(resistor(10e3), resistor(10e3), Connection::parallel);
  CHECK_THAT(beside.value, WithinRel(5000.0, 1e-15));
  CHECK_THAT(joined(capacitor(1e-7), capacitor(2.2e-7), Connection::parallel).value, WithinRel(3.2e-7, 1e-12));
  CHECK_THAT(joined(capacitor(1e-7), capacitor(1e-7), Connection::series).value, WithinRel(0.5e-7, 1e-12));
  CHECK_THAT(sum.unit_cost, WithinRel(0.04, 1e-12));
}

TEST_CASE("pairs of different tolerances: the ends by hand", "[pairs]") {
  OfferedValue a = resolve_value(built_in_catalogue(), plain_spec(), Role::collector, {1000}), b = a;
  b.value = b.working_value = 3000;
  b.tolerance = {0.05, 0.05};
  // 1010 + 3150 = 4160 of 4000: 4 %; 990 + 2850 = 3840: 4 %
  CHECK_THAT(joined(a, b, Connection::series).tolerance.above, WithinRel(0.04, 1e-9));
  // 1010 x 3150/4160 = 764.78 of 750: 1.9712 %
  CHECK_THAT(joined(a, b, Connection::parallel).tolerance.above, WithinRel(0.019712, 1e-4));
}

TEST_CASE("pairs between two values: none of polarised parts in series, none of a part that is there once", "[pairs]") {
  Spec spec = plain_spec();
  spec.parts.capacitors.families = {"electrolytic"};
  spec.parts.ranges[index(Role::bypass)] = ValueRange{10e-6, 100e-6};
  const auto singles = offered_values(built_in_catalogue(), spec, Role::bypass);
  const auto list = pairs_between(singles, 1, 30e-6, 60e-6);
  REQUIRE_FALSE(list.empty());
  for (const OfferedValue& o : list) CHECK(o.connection == Connection::parallel);
  CHECK(std::is_sorted(list.begin(), list.end(),
                       [](const auto& x, const auto& y) { return x.working_value < y.working_value; }));
  spec.parts.stock_only = true;
  const auto one = offered_values(with({row(PartKind::resistor, 1000, 1)}), spec, Role::collector);
  CHECK(pairs_between(one, 1, 100, 1e4).empty());
  const auto two = offered_values(with({row(PartKind::resistor, 1000, 2)}), spec, Role::collector);
  CHECK(pairs_between(two, 1, 100, 1e4).size() == 2);  // 500 and 2000 ohm
}

TEST_CASE("class 2 ceramics: what bias, temperature and ageing leave", "[class 2]") {
  Spec spec = plain_spec();
  spec.parts.capacitors.families = {"x7r"};
  const OfferedValue x7r = resolve_value(built_in_catalogue(), spec, Role::input_coupling, {1e-6});
  REQUIRE(x7r.family->key == "x7r");
  // hand-worked: 3 V on 6.3 V (60 % of it holds 3.78 V) leaves 1 - 0.5 x 3/6.3
  CHECK_THAT(bias_factor(x7r, Derating{}, 3, 3.2), WithinRel(1 - 0.5 * 3 / 6.3, 1e-12));
  // 4 V at the worst corner asks for 10 V
  CHECK_THAT(bias_factor(x7r, Derating{}, -3, 4), WithinRel(1 - 0.5 * 3 / 10, 1e-12));
  // 10 % and 15 % and 10 % of ageing: 0.9 x 0.85 x 0.9 = 0.6885; 1.1 x 1.15 = 1.265
  CHECK_THAT(tolerance_at_work(x7r).below, WithinRel(0.3115, 1e-9));
  CHECK_THAT(tolerance_at_work(x7r).above, WithinRel(0.265, 1e-9));
  const OfferedValue film = resolve_value(built_in_catalogue(), plain_spec(), Role::input_coupling, {1e-7});
  CHECK(bias_factor(film, Derating{}, 30, 30) == 1);
  CHECK(tolerance_at_work(film) == film.tolerance);
}

TEST_CASE("class 2 ceramics are refused where the cutoff they set must be better than 40 %", "[class 2]") {
  Spec spec = plain_spec();
  spec.parts.capacitors.families = {"x7r"};
  const auto offered = [&] { return !offered_values(built_in_catalogue(), spec, Role::input_coupling).empty(); };
  spec.requirements[index(Figure::lower_cutoff)] = Requirement{50, 50 / 1.39, 50 * 1.39};
  CHECK_FALSE(offered());
  spec.requirements[index(Figure::lower_cutoff)] = Requirement{50, 50 / 1.41, 50 * 1.41};
  CHECK(offered());
  spec.requirements[index(Figure::lower_cutoff)] =
      Requirement{50, kNotComputed, 55};  // one side is met with capacitance to spare
  CHECK(offered());
  spec.requirements[index(Figure::upper_cutoff)] = Requirement{2e4, 1.8e4, 2.2e4};
  CHECK(offered_values(built_in_catalogue(), spec, Role::shunt).empty());
  spec.requirements[index(Figure::lower_cutoff)] = Requirement{50, 40, 60};
  const auto faults = check_against_catalogue(spec, built_in_catalogue());
  REQUIRE_FALSE(faults.empty());
  CHECK(faults.front().expected.find("class 2") != std::string::npos);
}
