// Ratings against their rule: strictly above the highest voltage; at most half of the power.
#include <bandwright/purchase.hpp>
#include <cmath>
#include <set>

#include "catch.hpp"

using namespace bandwright;

namespace {

Family electrolytic() {
  Family family;
  family.name = "electrolytic of this test";
  family.kind = PartKind::capacitor;
  family.voltage_ratings = {6.3, 10, 16, 25, 35, 50, 63};  // trade row; Lelon and Nichicon sheets, text copies
  return family;
}

Family resistor() {
  Family family;
  family.name = "resistor of this test";
  family.power_ratings = {0.25, 0.5, 1};
  family.voltage_ratings = {250, 350, 500};
  return family;
}

}  // namespace

TEST_CASE("a capacitor's rating stands above the highest voltage, never on it") {
  CHECK(rated_voltage(electrolytic(), 0).value() == 6.3);
  CHECK(rated_voltage(electrolytic(), 15.999).value() == 16);
  CHECK(rated_voltage(electrolytic(), 16).value() == 25);
  CHECK(rated_voltage(electrolytic(), 25.001).value() == 35);
}

TEST_CASE("the sign of a voltage plays no part in its rating") {
  CHECK(rated_voltage(electrolytic(), -16).value() == 25);
}

TEST_CASE("a voltage beyond the family, or unknown, has no rating") {
  CHECK_FALSE(rated_voltage(electrolytic(), 63).has_value());
  CHECK_FALSE(rated_voltage(electrolytic(), NAN).has_value());
  CHECK_FALSE(rated_voltage(Family{}, 1).has_value());
}

TEST_CASE("a resistor is loaded to half its power at most (common practice, no source)") {
  CHECK(rating_row(resistor(), 10, 0.125).value() == 0);
  CHECK(rating_row(resistor(), 10, 0.126).value() == 1);
  CHECK(rating_row(resistor(), 10, 0.5).value() == 2);
  CHECK_FALSE(rating_row(resistor(), 10, 0.51).has_value());
}

TEST_CASE("power and voltage ratings of a resistor come in pairs") {
  CHECK(rating_row(resistor(), 250, 0.01).value() == 1);
  CHECK(rating_row(resistor(), -400, 0.01).value() == 2);
  CHECK_FALSE(rating_row(resistor(), 500, 0.01).has_value());
  CHECK_FALSE(rating_row(resistor(), NAN, 0.01).has_value());
}

TEST_CASE("the cautions name each danger once") {
  std::set<std::string> codes;
  for (const Caution& one : cautions()) {
    CHECK_FALSE(one.text.empty());
    codes.insert(one.code);
  }
  CHECK(codes.size() == cautions().size());
  // 60 V DC: the widest agreed figure for parts that may be touched, IEC 60335-1 3.4.2 (read as an excerpt).
  bool limit_named = false;
  for (const Caution& one : cautions()) limit_named = limit_named || one.text.find("60 V DC") != std::string::npos;
  CHECK(limit_named);
}
