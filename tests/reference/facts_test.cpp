// Facts of physics and of the trade that hold whatever the parts are.
//
// Constants of the SI and the preferred-number tables stand beside what they test, in the unit tests.
#include "book_stage.hpp"

using namespace reference;

namespace {

double thermal_voltage_at(double kelvin) { return at_temperature(ideal_transistor(100), kelvin).thermal_voltage; }

/// VBE at a constant collector current, for a device that shows `v_be` at 25 °C.
double base_emitter_at(double kelvin, double i_c, double v_be) {
  BipolarParameters p = ideal_transistor(100);
  p.log_saturation_current = std::log(i_c) - v_be / thermal_voltage_at(kReferenceTemperature);
  const Bipolar<double> device = at_temperature(p, kelvin);
  const BookStage any{.supply = 12, .upper_divider = 10e3, .lower_divider = 1e3, .collector = 1e3, .emitter = 1e3};
  return bias_trial(circuit_of_book(any), device, std::log(i_c)).v_be;
}

}  // namespace

TEST_CASE("thermal voltage at 25 °C") {
  // k T/q = 25.69 mV from the SI's exact k and q and 298.15 K: BIPM, The International System of Units (SI), 9th ed.,
  // 2019
  constexpr double kHalfDigit = 0.005e-3;
  CHECK(thermal_voltage_at(298.15) == Approx(25.69e-3).margin(kHalfDigit));
  // 25.85 mV at 300 K: from memory
  CHECK(thermal_voltage_at(300) == Approx(25.85e-3).margin(kHalfDigit));
}

TEST_CASE("VBE falls by about 2 mV a kelvin") {
  // Common practice, no source: about -2 mV/K at 0.6 to 0.7 V and constant current; 2.1 mV/K at 0.65 V.
  constexpr double kHalfDigit = 0.05e-3;  // V/K
  for (const double celsius : {0.0, 25.0, 50.0}) {
    const double kelvin = 273.15 + celsius;
    const double slope = (base_emitter_at(kelvin + 1, 1e-3, 0.65) - base_emitter_at(kelvin - 1, 1e-3, 0.65)) / 2;
    INFO(celsius << " degrees Celsius");
    CHECK(slope == Approx(-2.1e-3).margin(celsius == 25.0 ? kHalfDigit : 2 * kHalfDigit));
  }
}

TEST_CASE("gain of a bypassed stage is about 40 for each volt across RC") {
  // Common practice, no source: 40 times the voltage across the collector resistor, whatever the current and beta.
  constexpr double kRuleOfThumb = 0.05;  // 40 stands for 38.9
  for (const double i_c : {0.1e-3, 1e-3, 5e-3}) {
    for (const double beta : {50.0, 500.0}) {
      const BookStage stage{
          .supply = 12, .upper_divider = 100e3, .lower_divider = 20e3, .collector = 5 / i_c, .emitter_bypassed = 1e3};
      const HybridPi<double> h = hybrid_pi(at_temperature(ideal_transistor(beta), 298.15), i_c, 0.65, 5.0, beta);
      INFO(i_c << " A, beta " << beta);
      CHECK(midband_gain_of(stage, h) == Approx(40 * 5.0).epsilon(kRuleOfThumb));
    }
  }
}

TEST_CASE("4k7 over 150 ohm is not a gain of 31") {
  // Worked out with a small model, not measured: a published microphone stage with 4.7 kilohm and 150 ohm, said to have
  // RC/RE = 31, has 22 to 25 unloaded at 0.4 to 0.7 mA, and 15 to 17 into 10 kilohm.
  constexpr double kHalfDigit = 0.5;
  const auto gain = [](double i_c, double load) {
    const BookStage stage{
        .upper_divider = 100e3, .lower_divider = 20e3, .collector = 4.7e3, .emitter = 150, .load = load};
    return midband_gain_of(stage, hybrid_pi(at_temperature(ideal_transistor(300), 298.15), i_c, 0.65, 2.0, 300.0));
  };
  CHECK(gain(0.4e-3, INFINITY) == Approx(22).margin(kHalfDigit));
  CHECK(gain(0.7e-3, INFINITY) == Approx(25).margin(kHalfDigit));
  CHECK(gain(0.4e-3, 10e3) == Approx(15).margin(kHalfDigit));
  CHECK(gain(0.7e-3, 10e3) == Approx(17).margin(kHalfDigit));
}

TEST_CASE("a source as large as the input resistance halves the gain, a load as large as the output resistance too") {
  // Matched source and load halve a voltage each: common practice, no source.
  constexpr double kArithmetic = 1e-12;
  BookStage stage{
      .upper_divider = 47e3, .lower_divider = 10e3, .collector = 4.7e3, .emitter = 100, .emitter_bypassed = 900};
  const HybridPi<double> h = transistor(38e-3, 5e3);
  const double alone = midband_gain_of(stage, h);
  const double r_in = midband(circuit_of_book(stage), h).r_in;
  stage.source = r_in;
  CHECK(midband_gain_of(stage, h) == Approx(alone / 2).epsilon(kArithmetic));
  stage.source = 0;
  stage.load = output_resistance(circuit_of_book(stage), midband(circuit_of_book(stage), h));
  CHECK(midband_gain_of(stage, h) == Approx(alone / 2).epsilon(kArithmetic));
}

TEST_CASE("with one pole a side the cutoffs cannot lie closer than 3 + 2 sqrt 2") {
  // Algebra: |H| of s/(s + w)^2 falls by sqrt 2 at w (sqrt 2 - 1) and w (sqrt 2 + 1).
  constexpr double kArithmetic = 1e-9;
  // the input capacitor alone makes the low pole, the load capacitance alone the high one; one frequency for both
  BookStage stage{.upper_divider = 40e3, .lower_divider = 10e3, .collector = 5e3, .emitter = 500, .source = 100};
  const HybridPi<double> h = transistor(38e-3, 2.6e3);
  const double frequency = 1e3;
  stage.input_coupling = 1 / (2 * kPi * frequency * (stage.source + midband(circuit_of_book(stage), h).r_in));
  stage.load_capacitance = 1 / (2 * kPi * frequency * stage.collector);
  stage.output_coupling = 1e9;  // F: no part in it
  const Band band = band_of(stage, h);
  CHECK(band.upper / band.lower == Approx(3 + 2 * std::sqrt(2.0)).epsilon(kArithmetic));
  CHECK(band.reference == Approx(frequency).epsilon(kArithmetic));
}
