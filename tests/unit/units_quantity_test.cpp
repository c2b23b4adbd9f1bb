// Quantities as people write them, against IEC 60062 and the SI.
#include <bandwright/quantity.hpp>
#include <cmath>
#include <string>
#include <vector>

#include "catch.hpp"

using namespace bandwright;

namespace {

constexpr auto kOhm = Dimension::resistance;
constexpr auto kFarad = Dimension::capacitance;
constexpr auto kVolt = Dimension::voltage;

struct Written {
  const char* text;
  Dimension dimension;
  double value;
};

// The complaint of a text that is no such quantity; empty where it is one.
std::string complaint(const std::string& text, Dimension dimension) {
  try {
    parse_quantity(text, dimension);
  } catch (const QuantityError& error) {
    return error.what();
  }
  return "";
}

void check_all(const std::vector<Written>& rows) {
  for (const Written& row : rows) {
    INFO(row.text);
    // Exact: a decimal text has one nearest double, whatever prefix it is written with.
    CHECK(parse_quantity(row.text, row.dimension).value == row.value);
  }
}

}  // namespace

TEST_CASE("codes of IEC 60062 are read as the standard prints them") {
  // Source: IEC 60062:2016, read through its text copies on RKM codes (encyclopaedia, trade pages), standard not
  // opened.
  check_all({{"R47", kOhm, 0.47},
             {"4R7", kOhm, 4.7},
             {"470R", kOhm, 470},
             {"4K7", kOhm, 4700},
             {"47K", kOhm, 47000},
             {"47K3", kOhm, 47300},
             {"470K", kOhm, 470000},
             {"4M7", kOhm, 4.7e6},
             {"2M2", kOhm, 2.2e6},
             {"1K0", kOhm, 1000},
             {"4n7", kFarad, 4.7e-9},
             {"10p", kFarad, 10e-12},
             {"1u0", kFarad, 1e-6}});
  // Source: a maker's part coding for chip resistors (RC_L sheet), text copy.
  check_all({{"97R6", kOhm, 97.6}, {"9K76", kOhm, 9760}, {"1M", kOhm, 1e6}});
  // From memory.
  check_all({{"p68", kFarad, 0.68e-12},
             {"n47", kFarad, 470e-12},
             {"33u", kFarad, 33e-6},
             {"2m2", kFarad, 2200e-6},
             {"100R", kOhm, 100},
             {"4u7", kFarad, 4.7e-6},
             {"1G0", kOhm, 1e9},
             {"10L", kOhm, 0.01},
             {"1F0", kFarad, 1}});
}

TEST_CASE("SI prefixes and units") {
  // Source: BIPM, The International System of Units (SI), 9th ed., 2019, table of prefixes.
  check_all({{"4.7k", kOhm, 4700},
             {"4.7 kΩ", kOhm, 4700},
             {"4.7 k\xE2\x84\xA6", kOhm, 4700},  // U+2126
             {"4.7 kohm", kOhm, 4700},
             {"4.7 Kohms", kOhm, 4700},
             {"4k7 ohm", kOhm, 4700},
             {"0.22 ohm", kOhm, 0.22},
             {"5 mΩ", kOhm, 0.005},
             {"5 MΩ", kOhm, 5e6},
             {"1e3", kOhm, 1000},
             {"1.5E+2 Ω", kOhm, 150},
             {".5k", kOhm, 500},
             {"10 uF", kFarad, 10e-6},
             {"10 \xC2\xB5"
              "F",
              kFarad, 10e-6},  // U+00B5
             {"10 \xCE\xBC"
              "F",
              kFarad, 10e-6},                  // U+03BC
             {"10\xC2\xA0uF", kFarad, 10e-6},  // no-break space
             {"2.2 mF", kFarad, 2.2e-3},
             {"1e-7 F", kFarad, 1e-7},
             {"2.2 MHz", Dimension::frequency, 2.2e6},
             {"2.2 mHz", Dimension::frequency, 2.2e-3},
             {"20k", Dimension::frequency, 20000},
             {"40", Dimension::frequency, 40},
             {"5 mA", Dimension::current, 0.005},
             {"250 mW", Dimension::power, 0.25},
             {"10 ms", Dimension::time, 0.01},
             {"5 nV/√Hz", Dimension::noise_density, 5e-9},
             {"200 K/W", Dimension::thermal_resistance, 200},
             {"5 %", Dimension::fraction, 0.05},
             {"0.12", Dimension::money, 0.12},
             {"3 dB", Dimension::decibel, 3},
             {"  12 V  ", kVolt, 12},
             {"-12V", kVolt, -12},
             {"\xE2\x88\x92"
              "12 V",
              kVolt, -12},  // U+2212 minus sign
             {"+1.5", kVolt, 1.5}});
}

TEST_CASE("m is milli and M is mega, k and K are kilo") {
  CHECK(parse_quantity("1M", kOhm).value / parse_quantity("1m", kOhm).value == Approx(1e9));
  CHECK(parse_quantity("1k", kOhm).value == parse_quantity("1K", kOhm).value);
  CHECK_FALSE(complaint("4m7", kOhm).empty());  // no letter of the code for resistances
  CHECK_FALSE(complaint("4N7", kFarad).empty());
}

TEST_CASE("zero needs no unit, but for temperatures") {
  for (const Dimension d : {kOhm, kFarad, kVolt, Dimension::frequency}) CHECK(parse_quantity("0", d).value == 0);
  CHECK(parse_quantity("0.0", kFarad).value == 0);
  CHECK_FALSE(std::signbit(parse_quantity("-0", kVolt).value));
  CHECK_FALSE(complaint("0", Dimension::temperature).empty());
}

TEST_CASE("levels are peak") {
  CHECK(parse_quantity("2 Vpp", kVolt).value == 1);
  CHECK(parse_quantity("2 Vpp", kVolt).note == "read as 1 V peak");
  // A sine's peak is sqrt(2) of its rms value.
  CHECK(parse_quantity("1 Vrms", kVolt).value == Approx(1.41421356237).epsilon(1e-11));
  CHECK(parse_quantity("1 Vrms", kVolt).note == "read as 1.414 V peak");
  CHECK(parse_quantity("100 mVpp", kVolt).value == Approx(0.05).epsilon(1e-15));
  CHECK(parse_quantity("1.5 V", kVolt).note.empty());
}

TEST_CASE("gains as ratio, in decibels, and with a minus sign") {
  const auto gain = [](const char* text) { return parse_quantity(text, Dimension::gain); };
  CHECK(gain("50").value == 50);
  CHECK(gain("50 V/V").value == 50);
  CHECK(gain("40 dB").value == 100);
  CHECK(gain("0 dB").value == 1);
  CHECK(gain("-20 dB").value == 0.1);
  CHECK(gain("-20 dB").note.empty());
  // 6.0206 dB is a factor of two: 20 lg 2 = 6.0205999...
  CHECK(gain("6.0205999132796239dB").value == Approx(2).epsilon(1e-15));
  CHECK(gain("-50").value == 50);
  CHECK(gain("-50").note == "a minus sign: inverting");
}

TEST_CASE("temperatures in kelvin and degrees Celsius") {
  // The zero of the Celsius scale is 273.15 K: BIPM, SI brochure, 9th ed., 2.3.1.
  check_all({{"0 °C", Dimension::temperature, 273.15},
             {"25 °C", Dimension::temperature, 298.15},
             {"25 degC", Dimension::temperature, 298.15},
             {"25C", Dimension::temperature, 298.15},
             {"25 \xE2\x84\x83", Dimension::temperature, 298.15},  // U+2103
             {"-10 °C", Dimension::temperature, 263.15},
             {"263 K", Dimension::temperature, 263}});
  CHECK(complaint("-300 °C", Dimension::temperature).find("absolute zero") != std::string::npos);
  CHECK_FALSE(complaint("25", Dimension::temperature).empty());
  CHECK_FALSE(complaint("10 C", kOhm).empty());  // degrees only where a temperature is asked
}

TEST_CASE("what is no quantity is refused with what was found and what would be right") {
  struct Bad {
    const char* text;
    Dimension dimension;
    const char* says;
  };
  const std::vector<Bad> rows = {
      {"", kOhm, "nothing found; expected a resistance such as 4.7k"},
      {"   ", kOhm, "nothing found"},
      {"4,7k", kOhm, "found \"4,7k\"; expected a resistance such as 4.7k, 4K7 or 4700 (write a decimal point"},
      {",5", kVolt, "write a decimal point, not a comma"},
      {"10", kFarad, "the unit is missing"},
      {"1e-7", kFarad, "the unit is missing"},
      {"104", kFarad, "such as 10 uF, 2u2 or 100 pF"},
      {"10 Hz", kOhm, "Hz is a unit of frequency, not of resistance"},
      {"5 mA", kVolt, "mA is a unit of current, not of voltage"},
      {"12 V", Dimension::gain, "V is a unit of voltage, not of gain"},
      {"40 dB", kVolt, "dB is a unit of gain, not of voltage"},
      {"20 khz", Dimension::frequency, "the unit is written Hz"},
      {"10UF", kFarad, "\"UF\" after the number is no unit of capacitance"},
      {"nan", kOhm, "the number must be finite"},
      {"NaN V", kVolt, "the number must be finite"},
      {"-inf", kVolt, "the number must be finite"},
      {"infinity", kOhm, "the number must be finite"},
      {"1e999", kOhm, "too large or too small"},
      {"1e-999", kOhm, "too large or too small"},
      {"99999 dB", Dimension::gain, "too large"},
      {"k", kOhm, "a number is missing"},
      {"dB", Dimension::gain, "a number is missing"},
      {".", kOhm, "a number is missing"},
      {"+-5", kVolt, "a number is missing"},
      {"34 x", Dimension::gain, "\"x\" after the number is no unit of gain"},
      {"10 20", kOhm, "\"20\" after the number"},
      {"1 000", kOhm, "\"000\" after the number"},
      {"0x10", kOhm, "\"x10\" after the number"},
      {"4K7J", kOhm, "after the number"},
      {"4.7K2", kOhm, "after the number"},
      {"4K7k", kOhm, "after the number"},
      {"4.7kkΩ", kOhm, "after the number"},
      {"\xFF\xFE", kOhm, "found \"\\xFF\\xFE\""},
  };
  for (const Bad& row : rows) {
    const std::string said = complaint(row.text, row.dimension);
    INFO("\"" << row.text << "\": " << said);
    CHECK(said.find(row.says) != std::string::npos);
  }
}

TEST_CASE("every dimension names an example that it reads itself") {
  for (int i = 0; i <= static_cast<int>(Dimension::money); ++i) {
    const auto dimension = static_cast<Dimension>(i);
    const std::string text = describe_dimension(dimension);
    const std::size_t start = text.find("such as ") + 8;
    const std::string example = text.substr(start, text.find_first_of(",", start) - start);
    INFO(text);
    REQUIRE(start > 8);
    CHECK(complaint(example.substr(0, example.find(" or ")), dimension).empty());
  }
}

TEST_CASE("a very long text is shown cut") {
  const std::string said = complaint(std::string(100000, 'x'), kOhm);
  CHECK(said.size() < 300);
  CHECK(said.find("...") != std::string::npos);
  CHECK(parse_quantity(std::string(100000, '0') + "5k", kOhm).value == 5000);
}
