// Ratings: the smallest that is loaded to no more than its derated share. Shares worked by hand; what is published:
// - rated working voltage E = sqrt(P R), never above the limit of the style: MIL-PRF-39005G, 3.5.8, and Yageo RC_L,
// V.12,
//   p. 4 to 9, both read as text copies.
// - "a 10 V capacitor used at 8 V" for 20 % of derating: T. Zednicek, Derating and Category Concepts for Capacitors,
//   14 January 2020 (read as an excerpt).
#include <bandwright/purchase.hpp>
#include <cmath>
#include <set>

#include "catch.hpp"

using namespace bandwright;

namespace {

constexpr double kJustUnder = 1 - 1e-6, kJustOver = 1 + 1e-6;  // rounding is forgiven up to 1e-9

const Family& family(const char* key) { return *built_in_catalogue().find_family(key); }

std::optional<Rating> held_by(const Family& f, double volts, double watts = 0, const Derating& derating = {}) {
  OfferedValue part;
  part.family = &f;
  return rating_that_holds(part, derating, volts, watts);
}

double volts_held_by(const char* key, double volts) {
  const auto rating = held_by(family(key), volts);
  return rating ? rating->voltage : 0;
}

double watts_held_by(double watts) {
  const auto rating = held_by(family("metal-film"), 1, watts);
  return rating ? rating->power : 0;
}

}  // namespace

TEST_CASE("an electrolytic is loaded to 80 % of its rated voltage") {
  CHECK(volts_held_by("electrolytic", 8) == 10);  // published: 20 % of derating
  CHECK(volts_held_by("electrolytic", 8 * kJustOver) == 16);
  CHECK(volts_held_by("electrolytic", 12.6) == 16);  // 12.6/0.8 = 15.75
  CHECK(volts_held_by("electrolytic", 12.8) == 16);  // 12.8/0.8 = 16 exactly
  CHECK(volts_held_by("electrolytic", 12.8 * kJustOver) == 25);
  CHECK(volts_held_by("electrolytic", 5.04) == 6.3);
  CHECK(volts_held_by("electrolytic", 0) == 6.3);
  CHECK(volts_held_by("electrolytic", 80) == 100);
  CHECK_FALSE(held_by(family("electrolytic"), 80 * kJustOver));
  CHECK(volts_held_by("bipolar-electrolytic", 12.6) == 16);
}

TEST_CASE("ceramic and film are loaded to 60 % of their rated voltage") {
  CHECK(volts_held_by("c0g", 9.6) == 50);  // rows 50 V and 100 V; 9.6/0.6 = 16
  CHECK(volts_held_by("c0g", 30) == 50);
  CHECK(volts_held_by("c0g", 30 * kJustOver) == 100);
  CHECK(volts_held_by("c0g", 60) == 100);
  CHECK_FALSE(held_by(family("c0g"), 60 * kJustOver));
  CHECK(volts_held_by("x7r", 9.6) == 16);  // 16 V to the last bit: 0.6 x 16 is 9.6 but for rounding
  CHECK(volts_held_by("x7r", 9.6 * kJustOver) == 25);
  CHECK(volts_held_by("film", 37.8) == 63);
  CHECK(volts_held_by("film", 37.8 * kJustOver) == 100);
}

TEST_CASE("the sign of a voltage plays no part in its rating") {
  CHECK(volts_held_by("electrolytic", -12.6) == 16);
  CHECK(volts_held_by("electrolytic", -8 * kJustOver) == 16);
}

TEST_CASE("a resistor is loaded to half of its power") {
  CHECK(watts_held_by(0.100) == 0.25);  // 470 ohm at 6.856 V
  CHECK(watts_held_by(0.125) == 0.25);
  CHECK(watts_held_by(0.130) == 0.5);  // 470 ohm at 7.817 V
  CHECK(watts_held_by(0.25) == 0.5);
  CHECK(watts_held_by(0.25 * kJustOver) == 1);
  CHECK(watts_held_by(0.5) == 1);
  CHECK_FALSE(held_by(family("metal-film"), 1, 0.5 * kJustOver));
}

TEST_CASE("a resistor is loaded to 80 % of its highest working voltage") {
  CHECK(held_by(family("metal-film"), 200)->power == 0.25);  // rows 250, 350 and 500 V
  CHECK(held_by(family("metal-film"), 200 * kJustOver)->power == 0.5);
  CHECK(held_by(family("metal-film"), -280)->power == 0.5);
  CHECK(held_by(family("metal-film"), 400)->power == 1);
  CHECK_FALSE(held_by(family("metal-film"), 400 * kJustOver));
}

TEST_CASE("without derating a chip resistor stands sqrt(P R) or its limit, as its sheet has it") {
  Derating none;
  none.resistor_power = none.resistor_voltage = 1;
  struct Size {
    double watts, limit;
  };
  for (const Size size : {Size{0.1, 75}, Size{0.125, 150}, Size{0.25, 200}}) {  // 0603, 0805, 1206
    Family one = family("thick-film");
    one.power_ratings = {size.watts};
    one.voltage_ratings = {size.limit};
    for (double ohms = 10; ohms <= 10e6; ohms *= 10) {
      const double volts = std::min(std::sqrt(size.watts * ohms), size.limit);
      INFO(size.watts << " W, " << ohms << " ohm");
      CHECK(held_by(one, volts * kJustUnder, volts * volts * kJustUnder * kJustUnder / ohms, none));
      CHECK_FALSE(held_by(one, volts * kJustOver, volts * volts * kJustOver * kJustOver / ohms, none));
    }
  }
}

TEST_CASE("the user's shares take the place of the usual ones") {
  Derating own;
  own.electrolytic_voltage = 0.5;
  own.capacitor_voltage = 1;
  own.resistor_power = 0.4;
  own.resistor_voltage = 0.25;
  CHECK(held_by(family("electrolytic"), 8.1, 0, own)->voltage == 25);
  CHECK(held_by(family("c0g"), 50, 0, own)->voltage == 50);
  CHECK(held_by(family("metal-film"), 1, 0.1, own)->power == 0.25);
  CHECK(held_by(family("metal-film"), 1, 0.1 * kJustOver, own)->power == 0.5);
  CHECK(held_by(family("metal-film"), 63, 0, own)->power == 0.5);  // 63/0.25 = 252
}

TEST_CASE("what is not known, or not made, has no rating") {
  CHECK_FALSE(held_by(family("electrolytic"), NAN));
  CHECK_FALSE(held_by(family("metal-film"), 1, NAN));
  CHECK_FALSE(held_by(Family{}, 1));
  CHECK_FALSE(rating_that_holds({}, {}, 1, 0));
}

TEST_CASE("a part of the stock has the one rating that it states") {
  StockPart own;
  own.voltage_rating = 16;
  OfferedValue part;
  part.family = &family("electrolytic");
  part.stock = &own;
  CHECK(rating_that_holds(part, {}, 12.8, 0)->voltage == 16);
  CHECK(rating_that_holds(part, {}, 1, 0)->voltage == 16);
  CHECK_FALSE(rating_that_holds(part, {}, 12.8 * kJustOver, 0));
  own.voltage_rating = NAN;  // not stated: the smallest of its family, 6.3 V
  CHECK(rating_that_holds(part, {}, 5.04, 0)->voltage == 6.3);
  CHECK_FALSE(rating_that_holds(part, {}, 5.04 * kJustOver, 0));
  StockPart resistor;
  resistor.power_rating = 0.6;
  part.family = &family("metal-film");
  part.stock = &resistor;
  CHECK(rating_that_holds(part, {}, 200, 0.3)->power == 0.6);
  CHECK_FALSE(rating_that_holds(part, {}, 200 * kJustOver, 0.3));  // 250 V, the smallest of the family
  CHECK_FALSE(rating_that_holds(part, {}, 200, 0.3 * kJustOver));
}

TEST_CASE("a row of the stress table holds where its rating was chosen to hold") {
  StressRow row;
  row.rating = 16;
  row.allowed = 0.6 * 16;
  row.worst = 9.6;
  CHECK(row.holds());
  CHECK(row.share() == Approx(0.6));
  row.worst = 9.6 * kJustOver;
  CHECK_FALSE(row.holds());
  row.worst = NAN;
  CHECK_FALSE(row.holds());
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
