// Lower corners, exact lower cutoff, and capacitors chosen for one, against worked examples of textbooks.
#include "book_stage.hpp"

using namespace reference;

namespace {

enum Low { kInput, kOutput, kBypass };  // order of low_side()

double magnitude_at(const BookStage& b, const HybridPi<double>& h, double frequency) {
  return std::abs(response(b, h).at(frequency));
}

/// Poles by rising frequency, without those of the capacitors that stand for shorts.
std::vector<double> poles_above(const BookStage& b, const HybridPi<double>& h, double least) {
  std::vector<double> list;
  for (const std::complex<double>& p : poles_and_zeros(response(b, h)).poles) {
    if (std::abs(p) > least) list.push_back(std::abs(p));
  }
  return list;
}

BookStage with_capacitors(BookStage b, const std::array<double, 3>& c) {
  b.input_coupling = c[kInput];
  b.output_coupling = c[kOutput];
  b.bypass = c[kBypass];
  return b;
}

std::array<double, 3> capacitors(const BookStage& b, const HybridPi<double>& h, double cutoff,
                                 const std::array<double, 3>& shares) {
  const Circuit<double> c = circuit_of_book(b);
  return low_side_capacitors(low_side(c, midband(c, h)), cutoff, shares);
}

/// Kumar & Jain's and Nagrath's stage.
const BookStage kPlainStage{.collector = 1.5e3, .emitter_bypassed = 1.5e3, .source = 600, .load = 2e3};

}  // namespace

TEST_CASE("three corners of a classic stage") {
  // Boylestad & Nashelsky, Electronic Devices and Circuit Theory, 10th ed., example 9.11; read through a transcription,
  // book not opened. Base current neglected, 26 mV.
  constexpr double kRounding = 0.002;          // three and four figures, pi as 3.14
  constexpr double kReDigits = 0.0003;         // 15.76
  constexpr double kResistanceDigits = 0.004;  // 1.32k
  const BookStage book{.supply = 20,
                       .upper_divider = 40e3,
                       .lower_divider = 10e3,
                       .collector = 4e3,
                       .emitter_bypassed = 2e3,
                       .input_coupling = 10e-6,
                       .output_coupling = 1e-6,
                       .bypass = 20e-6,
                       .source = 1e3,
                       .load = 2.2e3};
  const double r_e = 26e-3 / emitter_current(bias_at_constant_vbe(book, kNoBaseCurrent, 0.7));
  CHECK(r_e == Approx(15.76).epsilon(kReDigits));
  const HybridPi<double> h = from_re(r_e, 100);
  BookStage at_base = book;
  at_base.source = 0;
  CHECK(midband_gain_of(at_base, h) == Approx(90).epsilon(kRounding));
  CHECK(midband(circuit_of_book(book), h).r_in == Approx(1.32e3).epsilon(kResistanceDigits));
  CHECK(midband(circuit_of_book(book), h).r_in == Approx(1316.5).epsilon(kFull));
  CHECK(midband_gain_of(book, h) == Approx(51.19).epsilon(kFull));
  // the book's own print of it, 51.2: from memory, extra
  CHECK(midband_gain_of(book, h) == Approx(51.2).epsilon(kRounding));

  const PoleEstimate<double> printed = estimate(book, with_beta_for_beta_plus_one(h));
  CHECK(corner(printed.low[kInput]) == Approx(6.87).epsilon(kRounding));
  CHECK(corner(printed.low[kOutput]) == Approx(25.68).epsilon(kRounding));
  CHECK(corner(printed.low[kBypass]) == Approx(327.0).epsilon(kRounding));
  CHECK(printed.lower == Approx(359.4).epsilon(kFull));
  CHECK(corner(estimate(book, h).low[kBypass]) == Approx(330.0).epsilon(kFull));

  CHECK(band_without_top(book, h).gain == Approx(51.19).epsilon(kFull));
  CHECK(band_without_top(book, h).lower == Approx(337.1).epsilon(kFull));
  const std::vector<double> poles = poles_above(book, h, 0.1);
  REQUIRE(poles.size() == 3);
  CHECK(poles[0] == Approx(1.802).epsilon(kFull));
  CHECK(poles[1] == Approx(25.67).epsilon(kFull));
  CHECK(poles[2] == Approx(335.15).epsilon(kFull));
  // with the base current: gm = IC/VT, VT 26 mV
  const BiasTrial<double> exact = bias_at_constant_vbe(book, 100, 0.7);
  CHECK(emitter_current(exact) == Approx(1.5871e-3).epsilon(kFull));
  const HybridPi<double> h_exact = transistor(exact.i_c / 26e-3, 100 * 26e-3 / exact.i_c);
  CHECK(band_without_top(book, h_exact).gain == Approx(49.6).epsilon(kFull));
  CHECK(band_without_top(book, h_exact).lower == Approx(326.9).epsilon(kFull));
}

TEST_CASE("pole and zero of a bypass capacitor") {
  // Neamen, Electronic Circuit Analysis and Design, 2nd ed., example 7.8; read through a transcription, book not
  // opened. VT 26 mV, IC 1.06 mA, no divider.
  constexpr double kRounding = 0.003;  // three figures; 0.49 has two
  const BookStage book{.collector = 2e3, .emitter_bypassed = 4e3, .bypass = 1e-6, .source = 500};
  const HybridPi<double> h = transistor(1.06e-3 / 26e-3, 100 * 26e-3 / 1.06e-3);
  BookStage unbypassed = book;
  unbypassed.bypass = 0;
  CHECK(midband_gain_of(unbypassed, h) == Approx(0.49).epsilon(kRounding));
  CHECK(midband_gain_of(unbypassed, h) == Approx(0.49146).epsilon(kFull));
  CHECK(midband_gain_of(book, h) == Approx(67.7).epsilon(kRounding));
  CHECK(corner(estimate(book, h).low[kBypass]) == Approx(5.49e3).epsilon(kRounding));
  CHECK(corner(estimate(book, h).low[kBypass]) == Approx(5483.6).epsilon(kFull));
  CHECK(std::abs(poles_and_zeros(response(book, h)).zeros.back()) == Approx(39.8).epsilon(kRounding));
  CHECK(poles_above(book, h, 1).back() == Approx(5483.6).epsilon(kFull));
  CHECK(band_without_top(book, h).lower == Approx(5483.3).epsilon(kFull));
}

TEST_CASE("input coupling capacitor of a degenerated stage") {
  // Neamen, Electronic Circuit Analysis and Design, 2nd ed., example 7.3; read through a transcription, book not
  // opened. VT 26 mV.
  constexpr double kRounding = 0.005;  // three figures
  const BookStage book{.supply = 10,
                       .upper_divider = 51.2e3,
                       .lower_divider = 9.6e3,
                       .collector = 2e3,
                       .emitter = 400,
                       .input_coupling = 1e-6,
                       .bypass = 0,
                       .source = 100};
  const BiasTrial<double> t = bias_at_constant_vbe(book, 100, 0.7);
  CHECK(t.i_c == Approx(1.81e-3).epsilon(kRounding));
  CHECK(t.i_c == Approx(1.8129e-3).epsilon(kFull));
  const HybridPi<double> h = transistor(1.81e-3 / 26e-3, 100 * 26e-3 / 1.81e-3);
  CHECK(1 / h.input_conductance == Approx(1.44e3).epsilon(kRounding));
  CHECK(midband(circuit_of_book(book), h).r_in == Approx(6.78e3).epsilon(kRounding));
  CHECK(midband_gain_of(book, h) == Approx(4.71).epsilon(kRounding));
  CHECK(estimate(book, h).lower == Approx(23.2).epsilon(kRounding));
  CHECK(band_without_top(book, h).gain == Approx(4.711).epsilon(kFull));
  CHECK(band_without_top(book, h).lower == Approx(23.15).epsilon(kFull));
}

TEST_CASE("capacitors by shares of the cutoff, emitter on a current source") {
  // Sedra & Smith, Microelectronic Circuits, 5th ed., example 5.19; read through a transcription, book not opened. The
  // current source is a very large emitter resistor, bypassed; the base resistor of 100k is the lower divider.
  constexpr double kRounding = 0.005;    // three figures
  constexpr double kTwoFigures = 0.025;  // 2.1 and 1.2 uF
  const BookStage book{.lower_divider = 100e3, .collector = 8e3, .emitter_bypassed = kOpen, .source = 5e3, .load = 5e3};
  const HybridPi<double> h = transistor(40e-3, 2.5e3);
  const std::array<double, 3> c = capacitors(book, h, 100, {0.1, 0.1, 0.8});
  CHECK(c[kBypass] == Approx(27.6e-6).epsilon(kRounding));
  CHECK(c[kInput] == Approx(2.1e-6).epsilon(kTwoFigures));
  CHECK(c[kOutput] == Approx(1.2e-6).epsilon(kTwoFigures));
  // as recomputed, unrounded
  CHECK(c[kBypass] == Approx(27.575e-6).epsilon(kRounding));
  CHECK(c[kInput] == Approx(2.1395e-6).epsilon(kRounding));
  CHECK(c[kOutput] == Approx(1.2243e-6).epsilon(kRounding));
  const BookStage full = with_capacitors(book, {2.1395e-6, 1.2243e-6, 27.575e-6});
  CHECK(estimate(full, h).lower == Approx(100).epsilon(kRounding));
  CHECK(band_without_top(full, h).lower == Approx(90.74).epsilon(kFull));
  const std::vector<double> poles = poles_above(full, h, 0.1);
  REQUIRE(poles.size() == 3);
  CHECK(poles[0] == Approx(0.634).epsilon(kFull));
  CHECK(poles[1] == Approx(10.0).epsilon(kFull));
  CHECK(poles[2] == Approx(89.64).epsilon(kFull));
}

TEST_CASE("capacitors by halves of the cutoff") {
  // Kumar & Jain, Electronic Devices and Circuits, edition not stated, example 10.15; read through a transcription,
  // book not opened. No divider and no output capacitor.
  constexpr double kRounding = 0.003;  // three and four figures
  const HybridPi<double> h = from_h(1e3, 100);
  constexpr double kTwoFigures = 0.02;  // 0.26 Hz
  std::array<double, 3> c = capacitors(kPlainStage, h, 50, {0.5, 1, 0.5});
  CHECK(c[kInput] == Approx(3.98e-6).epsilon(kRounding));
  CHECK(c[kBypass] == Approx(406.1e-6).epsilon(kRounding));
  c[kOutput] = kShort;
  const BookStage full = with_capacitors(kPlainStage, c);
  CHECK(std::abs(poles_and_zeros(response(full, h)).zeros.back()) == Approx(0.26).epsilon(kTwoFigures));
  CHECK(std::abs(poles_and_zeros(response(full, h)).zeros.back()) == Approx(0.2613).epsilon(kRounding));
  CHECK(band_without_top(full, h).lower == Approx(49.87).epsilon(kFull));
}

TEST_CASE("cutoff by the bypass capacitor alone, coupling far below") {
  // Nagrath, Electronic Devices and Circuits, edition not stated, example 4.7; read through a transcription, book not
  // opened. The emitter resistor is left out of what the bypass capacitor sees; "18.19" of the transcription is 181.9
  // uF.
  constexpr double kRounding = 0.005;  // three figures
  const HybridPi<double> h = from_h(1e3, 100);
  BookStage without_emitter_resistor = kPlainStage;
  without_emitter_resistor.emitter_bypassed = kOpen;
  const std::array<double, 3> c = capacitors(without_emitter_resistor, h, 50, {0.1, 0.1 / 20, 1});
  CHECK(c[kBypass] == Approx(201e-6).epsilon(kRounding));
  CHECK(c[kInput] == Approx(19.9e-6).epsilon(kRounding));
  CHECK(c[kOutput] == Approx(181.9e-6).epsilon(kRounding));
  const BookStage full = with_capacitors(kPlainStage, {19.89e-6, 181.9e-6, 200.9e-6});
  CHECK(band_without_top(full, h).lower == Approx(55.46).epsilon(kFull));
}

TEST_CASE("bypass reactance equal to hib, and a tenth of RE") {
  // Bell, Electronic Devices and Circuits, 5th ed., example 12.1; read through a transcription, book not opened. The
  // book leaves RE out of the capacitor's choice and of the gain with it.
  constexpr double kRounding = 0.005;  // three and four figures
  const HybridPi<double> h = from_h(1e3, 50);
  BookStage book{.collector = 3.3e3, .emitter_bypassed = kOpen};
  const double c_2 = capacitors(book, with_beta_for_beta_plus_one(h), 100, {1, 1, 1})[kBypass];
  CHECK(c_2 == Approx(79.6e-6).epsilon(kRounding));
  CHECK(midband_gain_of(book, h) == Approx(165).epsilon(kRounding));
  book.bypass = c_2;
  CHECK(magnitude_at(book, h, 100) == Approx(115.5).epsilon(kRounding));
  book.bypass = 1 / (2 * kPi * 100 * 330);  // farad: the reactance is a tenth of RE
  CHECK(magnitude_at(book, h, 100) == Approx(9.79).epsilon(kRounding));
  book.bypass = c_2;
  book.emitter_bypassed = 3.3e3;
  CHECK(magnitude_at(book, h, 100) == Approx(115.2).epsilon(kFull));
  CHECK(band_without_top(book, h).lower == Approx(102.6).epsilon(kFull));
}
