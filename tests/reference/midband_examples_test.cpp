// Midband gain and resistances against worked examples of textbooks.
//
// gm and rpi are set as the example has them: re = 26 or 25 mV/IE with gm = 1/re and rpi = beta re, or h-parameters.
#include "book_stage.hpp"

using namespace reference;

namespace {

/// IE of a divider that neglects the base current, VBE 0.7 V.
double unloaded_emitter_current(const BookStage& book) {
  return emitter_current(bias_at_constant_vbe(book, kNoBaseCurrent, 0.7));
}

/// Books that leave re out of a degenerated gain: a transistor whose re is next to nothing.
HybridPi<double> without_re(double beta) { return from_re(1e-6, beta); }

double input_resistance(const BookStage& b, const HybridPi<double>& h) { return midband(circuit_of_book(b), h).r_in; }

double output_resistance_of(const BookStage& b, const HybridPi<double>& h) {
  const Circuit<double> c = circuit_of_book(b);
  return output_resistance(c, midband(c, h));
}

/// Malvino's stage of example 10-7 and 10-8.
BookStage swamped_stage(double load) {
  return {.upper_divider = 10e3,
          .lower_divider = 2.2e3,
          .collector = 3.6e3,
          .emitter = 180,
          .emitter_bypassed = 820,
          .source = 600,
          .load = load};
}

}  // namespace

TEST_CASE("bypassed common-emitter stage with load") {
  // Hambley, Electrical Engineering: Principles and Applications, edition not stated, example 13.8; read through a
  // transcription, book not opened. VT 26 mV, IC 4.12 mA.
  constexpr double kRounding = 0.002;  // printed to three and four figures
  const HybridPi<double> h = transistor(4.12e-3 / 26e-3, 100 * 26e-3 / 4.12e-3);
  BookStage book{.upper_divider = 10e3, .lower_divider = 5e3, .collector = 1e3, .emitter_bypassed = 1e3, .load = 2e3};
  const double gain = midband_gain_of(book, h), r_in = input_resistance(book, h);
  const double current_gain = gain * r_in / book.load;
  CHECK(gain == Approx(105.6).epsilon(kRounding));
  CHECK(r_in == Approx(530.6).epsilon(kRounding));
  CHECK(current_gain == Approx(28.0).epsilon(kRounding));
  CHECK(gain * current_gain == Approx(2961).epsilon(kRounding));
  CHECK(output_resistance_of(book, h) == Approx(1e3).epsilon(kRounding));
  CHECK(band_without_top(book, h).gain == Approx(105.64).epsilon(kFull));
  book.load = INFINITY;
  CHECK(midband_gain_of(book, h) == Approx(158.5).epsilon(kRounding));
}

TEST_CASE("bypassed stage with output resistance of the transistor") {
  // Boylestad & Nashelsky, Electronic Devices and Circuit Theory, 10th ed., example 5.2; read through a transcription,
  // book not opened. Base current neglected, 26 mV.
  constexpr double kRounding = 0.003;  // three figures
  const BookStage book{
      .supply = 22, .upper_divider = 56e3, .lower_divider = 8.2e3, .collector = 6.8e3, .emitter_bypassed = 1.5e3};
  const double r_e = 26e-3 / unloaded_emitter_current(book);
  CHECK(r_e == Approx(18.48).epsilon(kRounding));
  // the book's own print of it, 18.44: from memory, extra
  CHECK(r_e == Approx(18.44).epsilon(kRounding));
  HybridPi<double> h = from_re(r_e, 90);
  CHECK(input_resistance(book, h) == Approx(1.35e3).epsilon(kRounding));
  CHECK(output_resistance_of(book, h) == Approx(6.8e3).epsilon(kRounding));
  CHECK(midband_gain_of(book, h) == Approx(367.9).epsilon(kRounding));
  h.output_conductance = 1 / 50e3;
  CHECK(output_resistance_of(book, h) == Approx(5.99e3).epsilon(kRounding));
  CHECK(midband_gain_of(book, h) == Approx(323.9).epsilon(kRounding));
  CHECK(band_without_top(book, h).gain == Approx(323.85).epsilon(kFull));
  CHECK(emitter_current(bias_at_constant_vbe(book, 90, 0.7)) == Approx(1.3366e-3).epsilon(kFull));
}

TEST_CASE("unbypassed emitter resistor") {
  // Boylestad & Nashelsky, Electronic Devices and Circuit Theory, 10th ed., example 5.3; read through a transcription,
  // book not opened. One base resistor; the lower one is left out.
  constexpr double kRounding = 0.002;       // three and four figures
  constexpr double kBetaForOneMore = 0.01;  // the book has beta (re + RE) where the model has rpi + (beta + 1) RE
  const BookStage book{.supply = 20, .upper_divider = 470e3, .collector = 2.2e3, .emitter = 560};
  const BiasTrial<double> t = bias_at_constant_vbe(book, 120, 0.7);
  const double r_e = 26e-3 / emitter_current(t);
  CHECK(r_e == Approx(5.99).epsilon(kRounding));
  HybridPi<double> h = from_re(r_e, 120);
  CHECK(textbook(book, h).textbook_gain == Approx(3.89).epsilon(kRounding));
  CHECK(midband_gain_of(book, h) == Approx(3.89).epsilon(kBetaForOneMore));
  CHECK(input_resistance(book, h) == Approx(59.34e3).epsilon(kBetaForOneMore));
  CHECK(midband_gain_of(book, h) == Approx(3.855).epsilon(kFull));
  CHECK(input_resistance(book, h) == Approx(59.77e3).epsilon(kFull));
  h.output_conductance = 1 / 40e3;
  CHECK(midband_gain_of(book, h) == Approx(3.850).epsilon(kFull));
  CHECK(input_resistance(book, h) == Approx(56.43e3).epsilon(kFull));
}

TEST_CASE("partly bypassed emitter resistor, re left out of the gain") {
  // Floyd, Electronic Devices, 7th ed., example 6.8; read through a transcription, book not opened. Base current
  // neglected, 25 mV, source 10 mV rms.
  constexpr double kRounding = 0.003;      // three figures
  constexpr double kReLeftOut = 0.06;      // the book's gain is 5 to 6 % high
  constexpr double kPeak = 14.1421356e-3;  // V: 10 mV rms
  const BookStage book{.supply = 10,
                       .upper_divider = 47e3,
                       .lower_divider = 10e3,
                       .collector = 4.7e3,
                       .emitter = 470,
                       .emitter_bypassed = 470,
                       .source = 600,
                       .load = 47e3};
  const BiasTrial<double> dc = bias_at_constant_vbe(book, kNoBaseCurrent, 0.7);
  CHECK(dc.v_e + dc.v_ce == Approx(4.728).epsilon(kRounding));
  const HybridPi<double> h = from_re(25e-3 / emitter_current(dc), 175);
  BookStage at_base = book;
  at_base.source = 0;
  const double r_in = input_resistance(book, h);
  const double divided = r_in / (r_in + book.source);
  const double gain = textbook(at_base, without_re(175)).textbook_gain;
  CHECK(kPeak * divided * gain == Approx(119e-3).epsilon(kRounding));
  CHECK(kPeak * midband_gain_of(book, h) == Approx(119e-3).epsilon(kReLeftOut));

  CHECK(r_in == Approx(7529).epsilon(kFull));
  CHECK(midband_gain_of(at_base, h) == Approx(8.630).epsilon(kFull));
  CHECK(midband_gain_of(book, h) == Approx(7.993).epsilon(kFull));
  CHECK(band_without_top(book, h).gain == Approx(7.993).epsilon(kFull));
  const BiasTrial<double> exact = bias_at_constant_vbe(book, 150, 0.7);
  CHECK(emitter_current(exact) == Approx(1.0601e-3).epsilon(kFull));
  CHECK(exact.v_e + exact.v_ce == Approx(5.051).epsilon(kFull));
  CHECK(exact.v_ce == Approx(4.054).epsilon(kFull));
  CHECK(midband_gain_of(book, from_re(25e-3 / emitter_current(exact), 175)) == Approx(7.972).epsilon(kFull));
}

TEST_CASE("partly bypassed emitter resistor, from the source") {
  // Malvino & Bates, Electronic Principles, 7th ed., example 10-7; read through a transcription, book not opened
  constexpr double kRounding = 0.003;  // three figures
  const BookStage book = swamped_stage(10e3);
  const HybridPi<double> h = from_re(22.7, 200);
  CHECK(input_resistance(book, h) == Approx(1.73e3).epsilon(kRounding));
  CHECK(50e-3 * textbook(book, h).textbook_gain == Approx(484.6e-3).epsilon(kRounding));
  CHECK(50e-3 * midband_gain_of(book, h) == Approx(482.2e-3).epsilon(kFull));
  CHECK(50e-3 * band_without_top(book, h).gain == Approx(482.2e-3).epsilon(kFull));
  CHECK(input_resistance(book, h) == Approx(1726.8).epsilon(kFull));
}

TEST_CASE("two stages coupled by a capacitor") {
  // Bell, Electronic Devices and Circuits, 5th ed., example 12.7; read through a transcription, book not opened. The
  // second stage is the load of the first.
  constexpr double kRounding = 0.001;  // four figures
  const HybridPi<double> h = from_h(2e3, 100);
  BookStage stage{.upper_divider = 120e3, .lower_divider = 39e3, .collector = 12e3, .load = 120e3};
  const double second = midband_gain_of(stage, h);
  stage.load = input_resistance(stage, h);
  const double first = midband_gain_of(stage, h);
  CHECK(first == Approx(80.997).epsilon(kRounding));
  CHECK(second == Approx(545.45).epsilon(kRounding));
  CHECK(first * second == Approx(44180).epsilon(kRounding));
}

TEST_CASE("two stages in decibels") {
  // Kulshreshtha, Electronic Devices and Circuits, edition not stated, example 8.7; read through a transcription, book
  // not opened. Every collector sees what the example puts in parallel.
  constexpr double kRounding = 0.001;       // four figures
  constexpr double kThreeFigures = 0.0006;  // 0.905k
  const HybridPi<double> h = from_h(1.1e3, 120);
  BookStage stage{.upper_divider = 56e3, .lower_divider = 5.6e3, .collector = 3.3e3, .load = 2.2e3};
  const double second = midband_gain_of(stage, h), r_in = input_resistance(stage, h);
  CHECK(r_in == Approx(0.905e3).epsilon(kThreeFigures));
  CHECK(1 / midband(circuit_of_book(stage), h).g_c == Approx(1.32e3).epsilon(kRounding));
  stage.collector = 6.8e3;
  stage.load = r_in;
  CHECK(20 * std::log10(midband_gain_of(stage, h) * second) == Approx(81.97).epsilon(kRounding));
}

TEST_CASE("two partly bypassed stages, re left out") {
  // Malvino & Bates, Electronic Principles, 7th ed., example 10-8; read through a transcription, book not opened.
  // Source 1 mV.
  constexpr double kRounding = 0.002;  // three and four figures
  BookStage second = swamped_stage(10e3);
  second.source = 0;  // the first stage's load already holds the second
  const BookStage first = swamped_stage(input_resistance(second, without_re(200)));
  const double v_c1 = 1e-3 * textbook(first, without_re(200)).textbook_gain;
  CHECK(v_c1 == Approx(4.79e-3).epsilon(kRounding));
  CHECK(v_c1 * textbook(second, without_re(200)).textbook_gain == Approx(70.39e-3).epsilon(kRounding));

  const HybridPi<double> h = from_re(22.7, 200);
  const double full = 1e-3 * midband_gain_of(swamped_stage(input_resistance(second, h)), h);
  CHECK(full == Approx(4.252e-3).epsilon(kFull));
  CHECK(full * midband_gain_of(second, h) == Approx(55.25e-3).epsilon(kFull));
}

TEST_CASE("gain and VBE of a stage without emitter resistor") {
  // Sedra & Smith, Microelectronic Circuits, 5th ed., example 5.2; read through a transcription, book not opened. IS
  // 1e-15 A, VT 25 mV: the junction stands where kT/q is that, and IS is held over temperature.
  constexpr double kRounding = 0.001;  // 690.8 mV, 272
  BipolarParameters sheet = ideal_transistor(100);
  sheet.log_saturation_current = std::log(1e-15);
  sheet.saturation_current_exponent = sheet.bandgap = sheet.gain_exponent = 0;
  const BookStage book{.supply = 10, .upper_divider = 100e3, .lower_divider = 100e3, .collector = 6.8e3};
  const Circuit<double> circuit = circuit_of_book(book);
  const Bipolar<double> device = at_temperature(sheet, junction_for(25e-3));
  const BiasTrial<double> t = bias_trial(circuit, device, std::log((10 - 3.2) / 6.8e3));
  CHECK(t.v_ce == Approx(3.2).epsilon(kRounding));
  CHECK(t.v_be == Approx(690.8e-3).epsilon(kRounding));
  const HybridPi<double> h = hybrid_pi(device, t.i_c, t.v_be, t.v_ce, t.gain);
  CHECK(midband_gain_of(book, h) == Approx(272).epsilon(kRounding));

  // Horowitz & Hill, The Art of Electronics, 2nd ed., section 2.12: 10k, 20 V, gain 100, 400 and 700 with the output at
  // 17.5, 10 and 2.5 V; from memory, extra
  const BookStage grounded{.supply = 20, .upper_divider = 100e3, .lower_divider = 100e3, .collector = 10e3};
  for (const auto& [output, gain] : {std::pair{17.5, 100.0}, std::pair{10.0, 400.0}, std::pair{2.5, 700.0}}) {
    const BiasTrial<double> at = bias_trial(circuit_of_book(grounded), device, std::log((20 - output) / 10e3));
    CHECK(midband_gain_of(grounded, hybrid_pi(device, at.i_c, at.v_be, at.v_ce, at.gain)) ==
          Approx(gain).epsilon(kRounding));
  }
}
