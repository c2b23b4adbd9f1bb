// IEC 60062 codes of every value that is sold, coded and decoded, against a second method: the letter is moved through
// the decimal digits of the value.
#include <bandwright/catalogue.hpp>
#include <charconv>
#include <cmath>
#include <set>
#include <string>
#include <string_view>

#include "catch.hpp"

using namespace bandwright;

namespace {

// A value as the series has it: digits without zeros behind them, times a power of ten.
struct Decimal {
  std::string digits;
  int power = 0;
};

Decimal decimal_of(int significant, int power) {
  Decimal d{std::to_string(significant), power};
  for (; d.digits.back() == '0'; ++d.power) d.digits.pop_back();
  return d;
}

double value_of(const Decimal& d) {
  const std::string text = d.digits + "e" + std::to_string(d.power);
  double value = 0;
  std::from_chars(text.data(), text.data() + text.size(), value);
  return value;
}

// Digits in front of the decimal point; 0 and less: zeros behind it.
int digits_before_point(const Decimal& d) { return static_cast<int>(d.digits.size()) + d.power; }

// Letters of IEC 60062 with their powers of ten, falling.
struct Multiplier {
  char letter;
  int power;
};

// The letter in place of the decimal point, at the largest multiplier that leaves a digit before it. Source: IEC
// 60062:2016, through text copies: 4R7, 47K3, 1K0, 4n7, 10p, and R47 where a resistance is 0.1 ohm to 1 ohm.
std::string coded(const Decimal& d, const std::vector<Multiplier>& multipliers) {
  for (const Multiplier& m : multipliers) {
    const int before = digits_before_point(d) - m.power;
    const auto length = static_cast<int>(d.digits.size());
    if (before == 0 && m.letter == 'R') return "R" + d.digits + (length == 1 ? "0" : "");
    if (before < 1) continue;
    if (before < length)
      return d.digits.substr(0, static_cast<std::size_t>(before)) + m.letter +
             d.digits.substr(static_cast<std::size_t>(before));
    const std::string whole = d.digits + std::string(static_cast<std::size_t>(before - length), '0');
    return whole + m.letter + (whole.size() == 1 ? "0" : "");
  }
  return "none";
}

const std::vector<Multiplier> kOhm = {{'G', 9}, {'M', 6}, {'K', 3}, {'R', 0}, {'L', -3}};
const std::vector<Multiplier> kFarad = {{'m', -3}, {'u', -6}, {'n', -9}, {'p', -12}};

// Codes of all values of a series from 10^lowest to 10^highest, both with it.
std::set<std::string> check_decades(const Series& series, Dimension dimension, int lowest, int highest,
                                    const std::vector<Multiplier>& multipliers) {
  std::set<std::string> codes;
  const auto check_one = [&](const Decimal& d) {
    const double value = value_of(d);
    const std::string code = value_code(value, dimension);
    INFO(series.name << " " << d.digits << "e" << d.power << " -> " << code);
    CHECK(code == coded(d, multipliers));
    // Exact: a decimal text has one nearest double.
    CHECK(parse_quantity(code, dimension).value == value);
    codes.insert(code);
  };
  const int scale = series.digits - 1;
  for (int decade = lowest; decade < highest; ++decade)
    for (const double x : decade_values(series))
      check_one(decimal_of(static_cast<int>(std::lround(x * std::pow(10, scale))), decade - scale));
  check_one(decimal_of(1, highest));
  return codes;
}

}  // namespace

TEST_CASE("every resistance of every series from 1 mohm to 1 Gohm codes and decodes") {
  for (const Series& s : series()) {
    const auto codes = check_decades(s, Dimension::resistance, -3, 9, kOhm);
    CHECK(codes.size() == static_cast<std::size_t>(12 * s.number + 1));  // no two values share a code
  }
}

TEST_CASE("every capacitance of every series from 1 pF to 10 mF codes and decodes") {
  for (const Series& s : series()) {
    const auto codes = check_decades(s, Dimension::capacitance, -12, -2, kFarad);
    CHECK(codes.size() == static_cast<std::size_t>(10 * s.number + 1));
  }
}
