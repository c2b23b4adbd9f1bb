// The bill of materials: supply decoupling, and what the user's stock holds.
#include <bandwright/purchase.hpp>
#include <cmath>

#include "catch.hpp"
#include "sample_bill.hpp"

using namespace bandwright;
using Catch::Matchers::ContainsSubstring;
using Names = std::vector<std::string>;

namespace {

Bill bill_of(const std::vector<BoardParts>& boards, const BillOptions& options = {1, 0, false}) {
  return bill_of_materials(boards, built_in_catalogue(), options);
}

BoardParts board(const std::string& prefix, const std::vector<Part>& parts) {
  BoardParts made;
  made.prefix = prefix;
  made.parts = parts;
  made.supply = 12;
  return made;
}

BoardParts decoupled(double supply, bool pnp = false) {
  BoardParts made = board("", {});
  made.supply = supply;
  made.pnp = pnp;
  return made;
}

std::vector<BillRow> decoupling_of(const BoardParts& one, const Catalogue& catalogue = built_in_catalogue()) {
  return bill_of_materials({one}, catalogue, {1, 0, true}).rows;
}

std::string all(const Names& notes) {
  std::string text;
  for (const std::string& note : notes) text += note + "\n";
  return text;
}

Part from_stock(Part part, long held) {
  part.from_stock = true;
  part.in_stock = held;
  part.part_number = "RX-10";
  return part;
}

}  // namespace

// Values: common practice, no source. Ratings hand-worked: 12.6 V / 0.6 = 21 V and 12.6 V / 0.8 = 15.75 V, next step
// up.
TEST_CASE("the supply of each stage is decoupled outside the model") {
  const auto rows = decoupling_of(decoupled(12.6));
  REQUIRE(rows.size() == 2);
  CHECK(rows[0].designators == Names{"C901"});
  CHECK(rows[0].part.code == "100n");
  CHECK(rows[0].part.family == "X7R ceramic capacitor");
  CHECK(rows[0].part.voltage_rating == 25);
  CHECK(rows[0].part.polarity.empty());
  CHECK(rows[1].designators == Names{"C902"});
  CHECK(rows[1].part.code == "10u");
  CHECK(rows[1].part.family == "aluminium electrolytic capacitor");
  CHECK(rows[1].part.voltage_rating == 16);
  CHECK(rows[1].part.polarity == "+ to supply");
  for (const BillRow& row : rows) {
    CHECK(row.outside_model);
    CHECK(row.note == "supply decoupling, outside the model");
  }
  CHECK(decoupling_of(decoupled(12.6, true))[1].part.polarity == "+ to ground");
}

TEST_CASE("decoupling follows the supply and the derating") {
  BoardParts one = decoupled(12.9);  // 12.9 V / 0.8 = 16.1 V
  CHECK(decoupling_of(one)[1].part.voltage_rating == 25);
  one.derating.electrolytic_voltage = 1;
  CHECK(decoupling_of(one)[1].part.voltage_rating == 16);
  const auto high = decoupling_of(decoupled(85));  // above 80 % of the highest electrolytic, 100 V; 85 V / 0.6 = 142 V
  CHECK(high[0].part.voltage_rating == 250);
  CHECK(high[1].part.family == "polyester film capacitor");
  CHECK(high[1].part.voltage_rating == 250);
  CHECK(high[1].part.polarity.empty());
  const auto beyond = decoupling_of(decoupled(1000));
  REQUIRE(beyond.size() == 2);
  for (const BillRow& row : beyond) {
    CHECK(std::isnan(row.part.voltage_rating));
    CHECK_THAT(row.note, ContainsSubstring("no rating holds 1 kV after derating"));
  }
}

TEST_CASE("decoupling never joins a part of the model, and boards share it where it is the same") {
  const Bill bill = bill_of_materials({test::sample_board("A"), test::sample_board("B")}, built_in_catalogue(), {});
  REQUIRE(bill.rows.size() == 5);
  CHECK(bill.rows[1].designators == Names{"A.C901", "B.C901"});
  CHECK(bill.rows[2].designators == Names{"A.C1", "B.C1"});
  CHECK(bill.rows[3].designators == Names{"A.C902", "B.C902"});
  CHECK_THAT(all(bill.notes), ContainsSubstring("common practice, no source"));
}

TEST_CASE("decoupling comes from the stock where the stock has what holds") {
  Catalogue catalogue = built_in_catalogue();
  const auto put = [&](double value, const char* family, double volts, const char* number, std::optional<long> held) {
    StockPart part;
    part.kind = PartKind::capacitor;
    part.value = value;
    part.family = family;
    part.voltage_rating = volts;
    part.part_number = number;
    part.quantity = held;
    catalogue.stock.parts.push_back(part);
  };
  put(100e-9, "electrolytic", 50, "slow", 9);
  put(100e-9, "x7r", 16, "low", 9);
  put(100e-9, "x7r", 50, "none left", 0);
  put(100e-9, "film", 63, "right", 9);
  put(10e-6, "electrolytic", 16, "right too", std::nullopt);
  const auto rows = decoupling_of(decoupled(12.6), catalogue);
  CHECK(rows[0].part.part_number == "right");
  CHECK(rows[0].part.voltage_rating == 63);
  CHECK(rows[0].note == "supply decoupling, outside the model; from the stock");
  CHECK(rows[1].part.part_number == "right too");
  CHECK(rows[1].part.polarity == "+ to supply");
  CHECK(bill_of_materials({decoupled(12.6)}, catalogue, {10, 0, true}).rows[0].missing == 1);
}

TEST_CASE("what the stock does not hold is counted") {
  const Part held = from_stock(test::bought_resistor("R1", 10e3, "10K"), 20);
  CHECK(bill_of({board("", {held})}, {20, 0, false}).rows[0].missing == 0);
  CHECK(bill_of({board("", {held})}, {20, 0, false}).rows[0].note == "from the stock");
  const Bill short_of = bill_of({board("", {held})}, {25, 0.04, false});
  CHECK(short_of.rows[0].missing == 6);  // hand-worked: 25 x 1.04 - 20
  CHECK(short_of.rows[0].note == "6 of 26 missing in the stock");
  CHECK_THAT(all(short_of.notes), ContainsSubstring("item 1 (R1): 6 of 26 missing in the stock"));
}

TEST_CASE("a part of the stock that is not counted never runs short") {
  Part held = from_stock(test::bought_resistor("R1", 10e3, "10K"), 1);
  held.in_stock.reset();
  CHECK(bill_of({board("", {held})}, {1000, 0, false}).rows[0].missing == 0);
}

TEST_CASE("two rows of one stock part take from the same drawer") {
  Catalogue catalogue = built_in_catalogue();
  StockPart part;
  part.kind = PartKind::capacitor;
  part.value = 10e-6;
  part.family = "electrolytic";
  part.voltage_rating = 16;
  part.part_number = "EL-10";
  part.quantity = 3;
  part.unit_cost = 0.06;
  catalogue.stock.parts = {part};
  Part modelled = test::bought_electrolytic("C1", 10e-6, "10u", 16, "+ to base");
  modelled.from_stock = true;
  modelled.in_stock = 3;
  modelled.part_number = "EL-10";
  BoardParts one = board("", {modelled});
  const Bill bill = bill_of_materials({one}, catalogue, {2, 0, true});
  REQUIRE(bill.rows.size() == 3);
  CHECK(bill.rows[1].designators == Names{"C1"});
  CHECK(bill.rows[1].missing == 0);
  CHECK(bill.rows[2].designators == Names{"C902"});
  CHECK(bill.rows[2].missing == 1);  // two and two of three
}
