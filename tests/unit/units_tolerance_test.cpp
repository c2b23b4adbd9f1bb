// Tolerances, relative: below and above.
#include <bandwright/quantity.hpp>
#include <string>

#include "catch.hpp"
#include "units/quantity_text.hpp"

using namespace bandwright;

namespace {

Tolerance of_part(const char* text) { return parse_tolerance(text, Dimension::resistance); }
Tolerance of_gain(const char* text) { return parse_tolerance(text, Dimension::gain); }

std::string complaint(const char* text, Dimension of) {
  try {
    parse_tolerance(text, of);
  } catch (const QuantityError& error) {
    return error.what();
  }
  return "";
}

}  // namespace

TEST_CASE("symmetric tolerances") {
  for (const char* text : {"5 %", "5%", "0.05", "±5 %", "+/-5 %", "+-5%", "+/- 5 %"})
    CHECK(of_part(text) == Tolerance{0.05, 0.05});
  CHECK(of_part("0.1 %") == Tolerance{0.001, 0.001});
  CHECK(of_part("0") == Tolerance{0, 0});
}

TEST_CASE("asymmetric tolerances of IEC 60062") {
  // Letters S and Z of IEC 60062, -20/+50 % and -20/+80 %: read through text copies, standard not opened.
  CHECK(of_part("-20/+50 %") == Tolerance{0.2, 0.5});
  CHECK(of_part("-20/+80%") == Tolerance{0.2, 0.8});
  CHECK(of_part("+50/-20 %") == Tolerance{0.2, 0.5});
  CHECK(of_part("-20 % / +50 %") == Tolerance{0.2, 0.5});
  CHECK(of_part("-0.2/+0.5") == Tolerance{0.2, 0.5});
}

TEST_CASE("decibels belong to a gain") {
  const Tolerance one = of_gain("1 dB");
  // 1 dB is a factor of 1.1220184543 (10^0.05).
  CHECK(one.above == Approx(0.1220184543).epsilon(1e-10));
  CHECK((1 - one.below) * (1 + one.above) == Approx(1).epsilon(1e-15));
  CHECK(complaint("1 dB", Dimension::frequency).find("dB is for a gain only") != std::string::npos);
  CHECK(of_gain("5 %") == Tolerance{0.05, 0.05});
}

TEST_CASE("what is no tolerance is refused") {
  struct Bad {
    const char* text;
    const char* says;
  };
  for (const Bad& row :
       {Bad{"", "nothing found"}, Bad{"5", "write 5 %"}, Bad{"-5 %", "never negative"}, Bad{"-1 dB", "never negative"},
        Bad{"5,5 %", "decimal point"}, Bad{"x", "a number and %"}, Bad{"5 V", "a number and %"},
        Bad{"20/50 %", "the low side with -"}, Bad{"-20/50 %", "the low side with -"}, Bad{"-100/+5 %", "under 100 %"},
        Bad{"nan %", "a number and %"}, Bad{"1e999 %", "too large"}, Bad{"9999999 dB", "too large"}}) {
    const std::string said = complaint(row.text, Dimension::gain);
    INFO("\"" << row.text << "\": " << said);
    CHECK(said.find(row.says) != std::string::npos);
  }
}

TEST_CASE("shares for each kelvin") {
  // Exact: a decimal text has one nearest double, whatever unit it is written with.
  struct Written {
    const char* text;
    double value;
  };
  std::string expected;
  for (const Written& row : {Written{"50 ppm/K", 50e-6}, Written{"50ppm/K", 50e-6}, Written{"±100 ppm/K", 1e-4},
                             Written{"+/-1.5 ppm/K", 1.5e-6}, Written{"0.5 %/K", 0.005}, Written{"1e-4 1/K", 1e-4},
                             Written{"0 ppm/K", 0}, Written{"50 ppm/\xE2\x84\xAA", 50e-6}}) {
    INFO(row.text);
    const auto read = read_per_kelvin(row.text, expected);
    REQUIRE(read);
    CHECK(*read == row.value);
  }
  CHECK(expected.empty());
}

TEST_CASE("what is no share for each kelvin is refused") {
  for (const char* text : {"", "50", "ppm/K", "50 ppm", "5 %", "-50 ppm/K", "50 ppm/K each", "1,5 ppm/K", "nan ppm/K",
                           "1e999 ppm/K", "±", "-0.5 %/K"}) {
    INFO("\"" << text << "\"");
    std::string expected;
    CHECK_FALSE(read_per_kelvin(text, expected));
    CHECK(expected == "a share for each kelvin such as 50 ppm/K or 0.5 %/K");
  }
}
