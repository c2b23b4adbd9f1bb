// The bill of materials against counts made by hand. Rows, singly named designators and their number equal to the
// quantity: general trade practice of assembly houses' guides (three of them, read as excerpts).
#include <bandwright/purchase.hpp>
#include <cmath>
#include <map>
#include <set>

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

std::string all(const Names& notes) {
  std::string text;
  for (const std::string& note : notes) text += note + "\n";
  return text;
}

}  // namespace

TEST_CASE("alike parts share a row, each designator once") {
  const Bill bill = bill_of({test::sample_board("A"), test::sample_board("B")}, {250, 0.05, false});
  REQUIRE(bill.rows.size() == 3);
  const BillRow& resistors = bill.rows[0];
  CHECK(resistors.designators == Names{"A.R1", "A.R3", "B.R1", "B.R3"});
  CHECK(resistors.quantity_per_board == 4);
  CHECK(resistors.quantity_total == 1050);  // hand-worked: 4 x 250 x 1.05
  CHECK(bill.rows[1].quantity_total == 525);
  CHECK(bill.rows[2].designators == Names{"A.Q1", "B.Q1"});
  CHECK(bill.rows[2].item == 3);
  CHECK(bill.boards.size() == 2);
}

TEST_CASE("attrition is rounded up, row by row") {
  const std::vector<BoardParts> boards = {board("", {test::bought_resistor("R1", 1e3, "1K0")})};
  struct Count {
    long quantity;
    double attrition;
    long total;
  };
  // hand-worked; 100 x 1.07 is 107.00000000000001 in binary fractions
  for (const Count& one : {Count{1, 0, 1}, Count{1, 0.05, 2}, Count{20, 0.05, 21}, Count{21, 0.05, 23},
                           Count{100, 0.07, 107}, Count{1000, 0.001, 1001}, Count{1000000, 1, 2000000}}) {
    INFO(one.quantity << " with " << one.attrition);
    CHECK(bill_of(boards, {one.quantity, one.attrition, false}).rows[0].quantity_total == one.total);
  }
}

TEST_CASE("no product of a count and whole per cent is rounded past itself") {
  const std::vector<BoardParts> boards = {board("", {test::bought_resistor("R1", 1e3, "1K0")})};
  for (long quantity = 1; quantity <= 1000; ++quantity)
    for (long percent = 0; percent <= 100; ++percent) {
      const long exact = quantity + (quantity * percent + 99) / 100;  // in whole numbers
      const Bill bill = bill_of(boards, {quantity, static_cast<double>(percent) / 100, false});
      if (bill.rows[0].quantity_total != exact) FAIL(quantity << " with " << percent << " %");
    }
}

TEST_CASE("rows stand by kind, then by value; designators by their number") {
  const Bill bill =
      bill_of({board("A", {test::bought_transistor("BC547B"), test::bought_resistor("R10", 1e3, "1K0"),
                           test::bought_electrolytic("C1", 100e-6, "100u", 16, "+ to base"),
                           test::bought_resistor("R2", 1e3, "1K0"),
                           test::bought_electrolytic("C2", 1e-6, "1u0", 16, "+ to base")}),
               board("B", {test::bought_resistor("R1", 1e3, "1K0"), test::bought_resistor("R3A", 470, "470R"),
                           test::bought_resistor("R3B", 470, "470R")})});
  Names seen;
  for (const BillRow& row : bill.rows)
    for (const std::string& name : row.designators) seen.push_back(name);
  CHECK(seen == Names{"B.R3A", "B.R3B", "A.R2", "A.R10", "B.R1", "A.C2", "A.C1", "A.Q1"});
}

TEST_CASE("what differs in anything that is bought has a row of its own") {
  const Part usual = test::bought_resistor("R1", 10e3, "10K");
  const std::map<std::string, void (*)(Part&)> changes = {
      {"value", [](Part& p) { p.value = 11e3; }},
      {"tolerance above", [](Part& p) { p.tolerance.above = 0.05; }},
      {"tolerance below", [](Part& p) { p.tolerance.below = 0.05; }},
      {"power", [](Part& p) { p.power_rating = 0.5; }},
      {"voltage", [](Part& p) { p.voltage_rating = 350; }},
      {"no rating", [](Part& p) { p.voltage_rating = kNotComputed; }},
      {"family", [](Part& p) { p.family = "thick film chip resistor"; }},
      {"part number", [](Part& p) { p.part_number = "RX-10"; }},
      {"stock", [](Part& p) { p.from_stock = true; }},
      {"cost", [](Part& p) { p.unit_cost = 0.03; }},
      {"kind", [](Part& p) { p.kind = PartKind::capacitor; }},
  };
  for (const auto& [name, change] : changes) {
    INFO(name);
    Part other = usual;
    other.designator = "R2";
    CHECK(bill_of({board("", {usual, other})}).rows.size() == 1);
    change(other);
    CHECK(bill_of({board("", {usual, other})}).rows.size() == 2);
  }
}

TEST_CASE("one result has no prefix") {
  CHECK(bill_of({test::sample_board("")}).rows[0].designators == Names{"R1", "R3"});
}

TEST_CASE("polarity is that of each designator") {
  const auto polarity = [](const std::string& first, const std::string& second) {
    return bill_of({board("", {test::bought_electrolytic("C1", 10e-6, "10u", 16, first),
                               test::bought_electrolytic("C2", 10e-6, "10u", 16, second)})})
        .rows[0]
        .part.polarity;
  };
  CHECK(polarity("+ to base", "+ to collector") == "C1 + to base; C2 + to collector");
  CHECK(polarity("+ to base", "+ to base") == "+ to base");
  CHECK(polarity("", "") == "");
  const Bill both = bill_of({test::sample_board("A"), test::sample_board("B"),
                             board("C", {test::bought_electrolytic("C1", 10e-6, "10u", 16, "+ to source")})});
  CHECK(both.rows[1].part.polarity == "A.C1, B.C1 + to base; C.C1 + to source");
}

TEST_CASE("notes that differ name their designators") {
  Part first = test::bought_resistor("R3A", 1e3, "1K0"), second = test::bought_resistor("R3B", 1e3, "1K0");
  first.note = "in series with R3B";
  second.note = "in series with R3A";
  CHECK(bill_of({board("", {first, second})}).rows[0].note == "R3A: in series with R3B; R3B: in series with R3A");
}

TEST_CASE("an alternate stands alone only where it may take every place") {
  const auto with = [](const std::string& designator, const Names& alternates) {
    Part part = test::bought_resistor(designator, 10e3, "10K");
    part.alternates = alternates;
    return part;
  };
  const auto alternates = [](const std::vector<BoardParts>& boards) { return bill_of(boards).rows[0].part.alternates; };
  CHECK(alternates({board("", {with("R1", {"9K1", "11K"})})}) == Names{"9K1", "11K"});
  CHECK(alternates({board("A", {with("R1", {"9K1", "11K"})}), board("B", {with("R1", {"11K"})})}) ==
        Names{"9K1 for A.R1", "11K"});
  // two on one board were never changed together
  CHECK(alternates({board("", {with("R1", {"11K"}), with("R3", {"11K"})})}) == Names{"11K for R1, R3"});
  CHECK(alternates({board("", {with("R1", {}), with("R3", {"9K1"})})}) == Names{"9K1 for R3"});
}

TEST_CASE("costs add up, and what is not known is said") {
  const Bill bill = bill_of({test::sample_board("A"), test::sample_board("B")}, {250, 0.05, false});
  CHECK(bill.rows[0].total_cost == 21);    // hand-worked: 1050 x 0.02
  CHECK(bill.rows[1].total_cost == 31.5);  // 525 x 0.06
  CHECK(bill.rows[2].total_cost == 42);    // 525 x 0.08
  CHECK(bill.total_cost == 94.5);
  CHECK_FALSE(bill.has_invented_costs);
  BoardParts uncosted = test::sample_board("");
  uncosted.parts[3].unit_cost = kNotComputed;
  const Bill partly = bill_of({uncosted});
  CHECK(std::isnan(partly.total_cost));
  CHECK(std::isnan(partly.rows[2].total_cost));
  CHECK_THAT(all(partly.notes), ContainsSubstring("no unit cost is known of item 3; the other rows cost 0.1"));
}

TEST_CASE("invented costs are said to be invented") {
  BoardParts one = test::sample_board("");
  one.parts[0].invented_cost = one.parts[1].invented_cost = true;
  const Bill bill = bill_of({one});
  CHECK(bill.has_invented_costs);
  CHECK_THAT(all(bill.notes), ContainsSubstring("invented for demonstration"));
  CHECK(bill_of({test::sample_board("")}).notes.empty());
}

TEST_CASE("every part given is in one row, whatever the mixture") {
  std::vector<BoardParts> boards;
  std::size_t given = 0;
  unsigned state = 7;  // a small generator of its own: mixtures need no quality
  const auto next = [&state](unsigned below) {
    state = state * 1103515245u + 12345u;
    return (state >> 16u) % below;
  };
  for (const char* prefix : {"A", "B", "C", "D", "E"}) {
    BoardParts one = test::sample_board(prefix);
    one.parts.clear();
    for (int i = 1; i <= 40; ++i)
      one.parts.push_back(test::bought_resistor("R" + std::to_string(i), 100.0 * (1 + next(9)), "code"));
    given += one.parts.size();
    boards.push_back(one);
  }
  const Bill bill = bill_of(boards, {3, 0, false});
  std::set<std::string> names;
  std::size_t listed = 0, bought = 0;
  for (const BillRow& row : bill.rows) {
    CHECK(row.designators.size() == static_cast<std::size_t>(row.quantity_per_board));
    names.insert(row.designators.begin(), row.designators.end());
    listed += row.designators.size();
    bought += static_cast<std::size_t>(row.quantity_total);
  }
  CHECK(bill.rows.size() == 9);
  CHECK(names.size() == given);
  CHECK(listed == given);
  CHECK(bought == 3 * given);
}
