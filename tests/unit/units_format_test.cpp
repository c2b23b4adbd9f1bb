// Numbers back to text.
#include <bandwright/quantity.hpp>
#include <cmath>
#include <limits>
#include <locale>
#include <string>
#include <vector>

#include "catch.hpp"

using namespace bandwright;

namespace {

constexpr auto kOhm = Dimension::resistance;
constexpr auto kFarad = Dimension::capacitance;

// A decade of E24. Source: IEC 60063:2015, as printed in makers' tables, read through text copies.
const std::vector<double> kE24 = {1.0, 1.1, 1.2, 1.3, 1.5, 1.6, 1.8, 2.0, 2.2, 2.4, 2.7, 3.0,
                                  3.3, 3.6, 3.9, 4.3, 4.7, 5.1, 5.6, 6.2, 6.8, 7.5, 8.2, 9.1};

// The nearest double of mantissa and power of ten, as strtod gives it: the second method beside our own reader.
double decade(double mantissa, int power) { return std::stod(std::to_string(mantissa) + "e" + std::to_string(power)); }

struct CommaLocale : std::numpunct<char> {
  char do_decimal_point() const override { return ','; }
  char do_thousands_sep() const override { return '.'; }
  std::string do_grouping() const override { return "\3"; }
};

}  // namespace

TEST_CASE("numbers are shown with the prefix that fits") {
  CHECK(format_quantity(4700, kOhm) == "4.7 kΩ");
  CHECK(format_quantity(0.47, kOhm) == "470 mΩ");
  CHECK(format_quantity(0, kOhm) == "0 Ω");
  CHECK(format_quantity(1e-7, kFarad) == "100 nF");
  CHECK(format_quantity(2.2e-3, kFarad) == "2200 µF");
  CHECK(format_quantity(3e-13, kFarad) == "0.3 pF");
  CHECK(format_quantity(-12, Dimension::voltage) == "-12 V");
  CHECK(format_quantity(0.0051234, Dimension::current) == "5.123 mA");
  CHECK(format_quantity(0.5, Dimension::frequency) == "0.5 Hz");
  CHECK(format_quantity(20000, Dimension::frequency) == "20 kHz");
  CHECK(format_quantity(50.1187, Dimension::gain) == "50.12");
  CHECK(format_quantity(1234567, Dimension::gain) == "1235000");
  CHECK(format_quantity(298.15, Dimension::temperature) == "25 °C");
  CHECK(format_quantity(263.15, Dimension::temperature) == "-10 °C");
  CHECK(format_quantity(5e-9, Dimension::noise_density) == "5 nV/√Hz");
  CHECK(format_quantity(0.05, Dimension::fraction) == "0.05");
  CHECK(format_quantity(std::numeric_limits<double>::quiet_NaN(), kOhm) == "-");
  CHECK(format_quantity(std::numeric_limits<double>::infinity(), Dimension::voltage) == "infinite");
}

TEST_CASE("rounding carries into the next prefix") {
  CHECK(format_quantity(999.96, kOhm) == "1 kΩ");
  CHECK(format_quantity(999.94, kOhm) == "999.9 Ω");
  CHECK(format_quantity(999999, kOhm) == "1 MΩ");
  CHECK(format_quantity(9.9996e-10, kFarad) == "1 nF");
  CHECK(format_quantity(1234, kOhm, 2) == "1.2 kΩ");
  CHECK(format_quantity(999.96, kOhm, 5) == "999.96 Ω");
}

TEST_CASE("what is shown with seventeen digits reads back as the same number") {
  constexpr int kAllDigits = 17;  // digits that tell any two doubles apart
  for (const Dimension dimension : {kOhm, kFarad, Dimension::voltage, Dimension::current, Dimension::frequency,
                                    Dimension::power, Dimension::time, Dimension::gain, Dimension::noise_density})
    for (double x = 1e-13; x < 1e11; x *= 1.37) {
      const std::string text = format_quantity(x, dimension, kAllDigits);
      INFO(text);
      CHECK(parse_quantity(text, dimension).value == x);
    }
}

TEST_CASE("value codes of IEC 60062") {
  // Source: IEC 60062:2016, read through its text copies, standard not opened; see units_quantity_test.cpp.
  CHECK(value_code(0.47, kOhm) == "R47");
  CHECK(value_code(4.7, kOhm) == "4R7");
  CHECK(value_code(470, kOhm) == "470R");
  CHECK(value_code(4700, kOhm) == "4K7");
  CHECK(value_code(47000, kOhm) == "47K");
  CHECK(value_code(47300, kOhm) == "47K3");
  CHECK(value_code(470000, kOhm) == "470K");
  CHECK(value_code(4.7e6, kOhm) == "4M7");
  CHECK(value_code(1000, kOhm) == "1K0");
  CHECK(value_code(97.6, kOhm) == "97R6");
  CHECK(value_code(9760, kOhm) == "9K76");
  CHECK(value_code(4.7e-9, kFarad) == "4n7");
  CHECK(value_code(1e-11, kFarad) == "10p");
  CHECK(value_code(1e-6, kFarad) == "1u0");
  CHECK(value_code(1e-7, kFarad) == "100n");
  // From memory.
  CHECK(value_code(0.68e-12, kFarad) == "p68");
  CHECK(value_code(2.2e-3, kFarad) == "2m2");
  CHECK(value_code(0.1, kOhm) == "R10");
  // Ours: the code has no word for it.
  CHECK(value_code(0, kOhm) == "0R");
  CHECK(value_code(std::nan(""), kOhm) == "-");
}

TEST_CASE("a value code reads back as the value, over all decades of E24") {
  for (const double mantissa : kE24) {
    for (int power = -2; power <= 9; ++power) {
      const double ohm = decade(mantissa, power);
      INFO(value_code(ohm, kOhm));
      CHECK(parse_quantity(value_code(ohm, kOhm), kOhm).value == ohm);
    }
    for (int power = -13; power <= -2; ++power) {
      const double farad = decade(mantissa, power);
      INFO(value_code(farad, kFarad));
      CHECK(parse_quantity(value_code(farad, kFarad), kFarad).value == farad);
    }
  }
}

TEST_CASE("a locale with a decimal comma changes nothing") {
  const std::locale before = std::locale::global(std::locale(std::locale::classic(), new CommaLocale));
  CHECK(format_quantity(1234.5, Dimension::gain) == "1234");
  CHECK(format_quantity(4.75e6, kOhm) == "4.75 MΩ");
  CHECK(value_code(4750, kOhm) == "4K75");
  CHECK(parse_quantity("4.7k", kOhm).value == 4700);
  CHECK(parse_tolerance("0.5 %", kOhm).above == 0.005);
  CHECK_THROWS_AS(parse_quantity("4,7k", kOhm), QuantityError);
  std::locale::global(before);
}
