// Tolerance letters of IEC 60062, both ways.
#include <bandwright/quantity.hpp>
#include <set>
#include <string>

#include "catch.hpp"

using namespace bandwright;

namespace {

struct Row {
  char letter;
  const char* tolerance;
};

// Each source was read as a text copy; the standard itself was not opened.
const std::vector<Row> kPublished = {
    // Source: trade list of resistor letters; makers' sheets of metal film resistors and C0G capacitors; ordering
    // codes.
    {'B', "0.1 %"},
    {'C', "0.25 %"},
    {'D', "0.5 %"},
    {'F', "1 %"},
    {'G', "2 %"},
    {'J', "5 %"},
    {'K', "10 %"},
    // Source: ordering code of a maker's chip capacitors.
    {'M', "20 %"},
    // Secondary source (a mailing list), and from memory.
    {'N', "30 %"},
    // Secondary sources: general lists of capacitor letters; ordering codes of high-K ceramics.
    {'Z', "-20/+80 %"},
    {'S', "-20/+50 %"},
    // From memory.
    {'E', "0.005 %"},
    {'L', "0.01 %"},
    {'P', "0.02 %"},
    {'W', "0.05 %"},
    {'T', "-10/+50 %"},
    {'Q', "-10/+30 %"},
};

}  // namespace

TEST_CASE("tolerance letters are read and given as IEC 60062 has them") {
  for (const Row& row : kPublished) {
    INFO(row.letter);
    const Tolerance tolerance = parse_tolerance(row.tolerance, Dimension::resistance);
    REQUIRE(tolerance_of_letter(row.letter));
    CHECK(*tolerance_of_letter(row.letter) == tolerance);
    CHECK(tolerance_letter(tolerance) == std::string(1, row.letter));
  }
}

TEST_CASE("no other letter is a tolerance") {
  std::set<char> known;
  for (const Row& row : kPublished) known.insert(row.letter);
  // Among the rest are H and A, on which lists disagree, and small letters.
  for (int c = 0; c < 128; ++c) {
    INFO(c);
    CHECK(tolerance_of_letter(static_cast<char>(c)).has_value() == (known.count(static_cast<char>(c)) > 0));
  }
}

TEST_CASE("a tolerance without a letter gives none") {
  for (const char* text : {"0", "3 %", "2.5 %", "1.01 %", "50 %", "-20/+40 %", "-50/+20 %", "-0/+50 %"}) {
    INFO(text);
    CHECK(tolerance_letter(parse_tolerance(text, Dimension::resistance)).empty());
  }
  constexpr double kTwoRoundings = 2.3e-16;
  CHECK(tolerance_letter({0.05 * (1 + kTwoRoundings), 0.05 * (1 - kTwoRoundings)}) == "J");
}

TEST_CASE("below 10 pF letters are capacitances") {
  // Source: makers' C0G sheets, text copies: B 0.1 pF, C 0.25 pF, D 0.5 pF, F 1 pF. G from memory.
  const std::vector<Row> published = {{'B', "0.1 pF"}, {'C', "0.25 pF"}, {'D', "0.5 pF"}, {'F', "1 pF"}, {'G', "2 pF"}};
  for (const Row& row : published) {
    INFO(row.letter);
    REQUIRE(small_capacitance_tolerance_of_letter(row.letter));
    CHECK(*small_capacitance_tolerance_of_letter(row.letter) ==
          parse_quantity(row.tolerance, Dimension::capacitance).value);
  }
  for (const char letter : {'A', 'E', 'H', 'J', 'K', 'M', 'Z', 'c'})
    CHECK_FALSE(small_capacitance_tolerance_of_letter(letter));
}
