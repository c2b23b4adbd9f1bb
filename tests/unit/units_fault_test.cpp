// Faults, suggestions, printable text, constants.
#include <bandwright/fault.hpp>

#include "catch.hpp"
#include "units/constants.hpp"
#include "units/printable.hpp"
#include "units/suggest.hpp"

using namespace bandwright;

TEST_CASE("a fault says where, what was found, what would be right, and what was meant") {
  CHECK(describe({"requirements.gain.target", "34 x", "a gain such as 50 or 34 dB", ""}) ==
        "requirements.gain.target: found \"34 x\"; expected a gain such as 50 or 34 dB");
  CHECK(describe({"requirements.gian", "gian", "a known key", "gain"}) ==
        "requirements.gian: found \"gian\"; expected a known key; did you mean \"gain\"?");
  CHECK(describe({"supply", "", "a supply voltage", ""}) == "supply: nothing found; expected a supply voltage");
}

TEST_CASE("an input error holds every fault, one line each") {
  const InputError error({{"a", "1", "x", ""}, {"b", "2", "y", ""}});
  CHECK(error.faults().size() == 2);
  CHECK(std::string(error.what()) == "a: found \"1\"; expected x\nb: found \"2\"; expected y");
}

TEST_CASE("text from outside is made fit to print") {
  CHECK(printable("4.7 kΩ") == "4.7 kΩ");
  CHECK(printable("a\nb\x1B[31m") == "a\\x0Ab\\x1B[31m");
  CHECK(printable("\xC3") == "\\xC3");                    // cut in the middle of a character
  CHECK(printable("\xED\xA0\x80") == "\\xED\\xA0\\x80");  // a surrogate half is no character (RFC 3629)
  CHECK(printable(std::string(100, 'a'), 10) == "aaaaaaaaaa...");
  CHECK(is_utf8("µΩ√"));
  CHECK_FALSE(is_utf8("\xC0\x80"));          // overlong
  CHECK_FALSE(is_utf8("\xF4\x90\x80\x80"));  // beyond U+10FFFF
}

TEST_CASE("distance of names") {
  // Published example of the distance by insertions, deletions and substitutions: Wagner, Fischer, The string-to-string
  // correction problem, J. ACM 21(1), 1974, as commonly retold ("kitten", "sitting"): from memory.
  CHECK(name_distance("kitten", "sitting") == 3);
  CHECK(name_distance("gain", "gian") == 1);  // a swap of neighbours counts once: Damerau, 1964, from memory
  CHECK(name_distance("gain-min", "Gain_Min") == 0);
  CHECK(name_distance("", "abc") == 3);
  CHECK(name_distance("abc", "") == 3);
}

TEST_CASE("the nearest known name is suggested, a distant one is not") {
  const std::vector<std::string> known = {"gain", "lower_cutoff", "upper_cutoff", "bandwidth"};
  CHECK(nearest_name("gian", known) == "gain");
  CHECK(nearest_name("lower_cut_off", known) == "lower_cutoff");
  CHECK(nearest_name("upper-cutof", known) == "upper_cutoff");
  CHECK(nearest_name("colour", known).empty());
  CHECK(nearest_name("", known).empty());
  CHECK(nearest_name("x", {"a"}).empty());  // one letter is no evidence
  CHECK(nearest_name(std::string(100000, 'g'), known).empty());
}

TEST_CASE("constants of the SI") {
  // Defining values: BIPM, The International System of Units (SI), 9th ed., 2019.
  CHECK(kBoltzmann == 1.380649e-23);
  CHECK(kElementaryCharge == 1.602176634e-19);
  CHECK(kZeroCelsius == 273.15);
  // Published on their own: CODATA 2018, Boltzmann constant in eV/K, 8.617 333 262e-5, and the Faraday constant,
  // 96 485.332 12 C/mol with the exact 6.022 140 76e23/mol; from memory.
  constexpr double kPrintedDigits = 5e-10;
  CHECK(kBoltzmann / kElementaryCharge == Approx(8.617333262e-5).epsilon(kPrintedDigits));
  CHECK(kElementaryCharge * 6.02214076e23 == Approx(96485.33212).epsilon(kPrintedDigits));
  // kT/q at room temperature is a little under 26 mV: common practice, no source.
  CHECK(kBoltzmann * kReferenceTemperature / kElementaryCharge == Approx(0.0257).margin(5e-5));
}
