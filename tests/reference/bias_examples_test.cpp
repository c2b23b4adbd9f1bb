// Operating point, stability and bias design against worked examples of textbooks.
//
// VBE is constant in all of them (book_stage.hpp says how the model is brought to it), VA infinite.
#include "analysis/figure_equations.hpp"
#include "book_stage.hpp"

using namespace reference;

namespace {

/// Rth and Vth as a divider from the supply.
BookStage with_divider(BookStage b, double r_th, double v_th) {
  b.upper_divider = r_th * b.supply / v_th;
  b.lower_divider = r_th * b.supply / (b.supply - v_th);
  return b;
}

double stability_of(const BookStage& book, double beta, double v_be) {
  const BiasTrial<double> t = bias_at_constant_vbe(book, beta, v_be);
  const BipolarParameters sheet = ideal_transistor(beta);
  const Circuit<double> c = circuit_of_book(book);
  const HybridPi<double> h = hybrid_pi(at_temperature(sheet, kReferenceTemperature), t.i_c, t.v_be, t.v_ce, t.gain);
  return stage_figures<double>(c, t, h, {}, {}, sheet, kReferenceTemperature)[index(Figure::stability_factor)];
}

}  // namespace

TEST_CASE("divider bias, exact") {
  // Sedra & Smith, Microelectronic Circuits, 5th ed., example 5.10; read through a transcription, book not opened
  constexpr double kCurrents = 0.005;    // printed to three figures, 1.29 and 12.8
  constexpr double kVoltages = 0.003;    // 4.57 V and 8.6 V; the book rounds on the way
  constexpr double kResistance = 0.002;  // 33.3k
  const BookStage book{.supply = 15, .upper_divider = 100e3, .lower_divider = 50e3, .collector = 5e3, .emitter = 3e3};
  const BiasTrial<double> t = bias_at_constant_vbe(book, 100, 0.7);
  CHECK(midband(circuit_of_book(book), from_re(20, 100)).r_divider == Approx(33.3e3).epsilon(kResistance));
  CHECK(emitter_current(t) == Approx(1.29e-3).epsilon(kCurrents));
  CHECK(t.i_b == Approx(12.8e-6).epsilon(kCurrents));
  CHECK(t.i_c == Approx(1.28e-3).epsilon(kCurrents));
  CHECK(t.v_e + t.v_be == Approx(4.57).epsilon(kVoltages));
  CHECK(t.v_e + t.v_ce == Approx(8.6).epsilon(kVoltages));
  CHECK(emitter_current(t) == Approx(1.2913e-3).epsilon(kFull));
  CHECK(t.i_b == Approx(12.785e-6).epsilon(kFull));
  CHECK(t.i_c == Approx(1.2785e-3).epsilon(kFull));
  CHECK(t.v_ce == Approx(4.734).epsilon(kFull));
}

TEST_CASE("divider bias at two current gains") {
  // Hambley, Electrical Engineering: Principles and Applications, edition not stated, example 13.7; read through a
  // transcription, book not opened
  constexpr double kRounding = 0.003;  // printed to three figures
  const BookStage book{.supply = 15, .upper_divider = 10e3, .lower_divider = 5e3, .collector = 1e3, .emitter = 1e3};
  const BiasTrial<double> low = bias_at_constant_vbe(book, 100, 0.7);
  CHECK(low.i_c == Approx(4.12e-3).epsilon(kRounding));
  CHECK(low.v_ce == Approx(6.72).epsilon(kRounding));
  CHECK(low.i_c == Approx(4.1214e-3).epsilon(kFull));
  CHECK(low.v_ce == Approx(6.716).epsilon(kFull));
  const BiasTrial<double> high = bias_at_constant_vbe(book, 300, 0.7);
  CHECK(high.i_c == Approx(4.24e-3).epsilon(kRounding));
  CHECK(high.v_ce == Approx(6.51).epsilon(kRounding));
  CHECK(high.i_c == Approx(4.2388e-3).epsilon(kFull));
  CHECK(high.v_ce == Approx(6.508).epsilon(kFull));
}

TEST_CASE("self-bias and its stability factor") {
  // Millman & Halkias, Integrated Electronics, edition not stated, example 9.1; read through a transcription, book not
  // opened
  constexpr double kRounding = 0.01;          // the current is printed as 1.35 and as 1.36 mA
  constexpr double kStabilityDigits = 0.002;  // four figures
  const BookStage book{
      .supply = 22.5, .upper_divider = 90e3, .lower_divider = 10e3, .collector = 5.6e3, .emitter = 1e3};
  const BiasTrial<double> t = bias_at_constant_vbe(book, 55, 0.65);
  CHECK(midband(circuit_of_book(book), from_re(20, 55)).r_divider == Approx(9.0e3).epsilon(kRounding));
  CHECK(t.i_c == Approx(1.35e-3).epsilon(kRounding));
  CHECK(t.i_c == Approx(1.36e-3).epsilon(kRounding));
  CHECK(t.v_ce == Approx(13.5).epsilon(kRounding));
  CHECK(t.i_c == Approx(1.3538e-3).epsilon(kFull));
  CHECK(t.i_b == Approx(24.6e-6).epsilon(kFull));
  CHECK(t.v_ce == Approx(13.540).epsilon(kFull));
  CHECK(stability_of(book, 55, 0.65) == Approx(8.615).epsilon(kStabilityDigits));
  // the book's own print of it, 8.61: from memory, extra
  CHECK(stability_of(book, 55, 0.65) == Approx(8.61).epsilon(kStabilityDigits));
}

TEST_CASE("bias designed by stability factor, and solved back") {
  // Millman & Halkias, Integrated Electronics, edition not stated, example 9.2; read through a transcription, book not
  // opened
  constexpr double kRounding = 0.002;  // four figures, V three
  const WantedBias wanted{.supply = 20, .collector_current = 2e-3, .collector_drop = 8, .emitter_voltage = 2};
  const BiasResistors start = bias_by_divider_current(wanted, 1, 0);
  CHECK(start.collector == Approx(4e3).epsilon(kRounding));
  CHECK(start.emitter == Approx(1e3).epsilon(kRounding));
  const double s = stability_factor(1.75e-3, 2.25e-3, 36, 90);
  CHECK(s == Approx(17.33).epsilon(kRounding));
  const BiasResistors r = divider_by_stability(start, 20, 0.65, s, 90, 1.75e-3, 36);
  CHECK(r.upper_divider == Approx(117.67e3).epsilon(kRounding));
  CHECK(r.lower_divider == Approx(24.35e3).epsilon(kRounding));
  CHECK(parallel(r.upper_divider, r.lower_divider) == Approx(20.18e3).epsilon(kRounding));
  CHECK(20 * r.lower_divider / (r.upper_divider + r.lower_divider) == Approx(3.43).epsilon(kRounding));
  CHECK(r.collector == start.collector);
  CHECK(r.emitter == start.emitter);

  // the printed resistors hold the current within 1.75 to 2.25 mA
  const BookStage printed{
      .supply = 20, .upper_divider = 117.67e3, .lower_divider = 24.35e3, .collector = 4e3, .emitter = 1e3};
  CHECK(bias_at_constant_vbe(printed, 36, 0.65).i_c == Approx(1.7498e-3).epsilon(kFull));
  CHECK(bias_at_constant_vbe(printed, 90, 0.65).i_c == Approx(2.2498e-3).epsilon(kFull));
}

TEST_CASE("drift of a germanium stage from 25 to 75 °C") {
  // Millman & Halkias, Integrated Electronics, edition not stated, example 9.3; read through a transcription, book not
  // opened. The book adds three first-order terms; the difference of two operating points is 2 % less.
  constexpr double kFirstOrder = 0.02;
  const BookStage plain{.supply = 20, .collector = 1e3, .emitter = 4.7e3};
  const double v_th = 0.2 + 4.7e3 * 1.5e-3 + (7.75e3 + 4.7e3) * (1.5e-3 - 56 * 1e-6) / 55;  // 1.5 mA when cold
  const BookStage book = with_divider(plain, 7.75e3, v_th);
  const BiasTrial<double> cold = bias_at_constant_vbe(book, 55, 0.2, 1e-6);
  const BiasTrial<double> hot = bias_at_constant_vbe(book, 90, 0.1, 32e-6);
  CHECK(cold.i_c == Approx(1.5e-3).epsilon(kFull));
  CHECK(hot.i_c - cold.i_c == Approx(0.131e-3).epsilon(kFirstOrder));
  CHECK(hot.i_c - cold.i_c == Approx(0.1286e-3).epsilon(kFull));
}

TEST_CASE("four-resistor bias, analysed") {
  // Kumar & Jain, Electronic Devices and Circuits, edition not stated, example 5.2; read through a transcription, book
  // not opened
  constexpr double kRounding = 0.003;  // three figures
  const BookStage book{
      .supply = 18, .upper_divider = 82e3, .lower_divider = 22e3, .collector = 5.6e3, .emitter = 1.2e3};
  const BiasTrial<double> t = bias_at_constant_vbe(book, 50, 0.7);
  CHECK(t.i_c == Approx(1.98e-3).epsilon(kRounding));
  CHECK(t.v_ce == Approx(4.50).epsilon(kRounding));
  CHECK(t.i_c == Approx(1.9783e-3).epsilon(kFull));
}

TEST_CASE("four-resistor bias, designed by thirds of the supply") {
  // Kumar & Jain, Electronic Devices and Circuits, edition not stated, example 5.3; read through a transcription, book
  // not opened
  constexpr double kRounding = 0.003;  // printed exactly; what is left is arithmetic
  const WantedBias wanted{.supply = 12,
                          .collector_current = 1e-3,
                          .collector_drop = 4,
                          .emitter_voltage = 3.3,
                          .base_emitter_voltage = 0.7};
  const BiasResistors r = bias_by_divider_current(wanted, 0.1e-3, 0);
  CHECK(r.upper_divider == Approx(80e3).epsilon(kRounding));
  CHECK(r.lower_divider == Approx(40e3).epsilon(kRounding));
  CHECK(r.collector == Approx(4e3).epsilon(kRounding));
  CHECK(r.emitter == Approx(3.3e3).epsilon(kRounding));

  BookStage book{.supply = 12, .upper_divider = 80e3, .lower_divider = 40e3, .collector = 4e3, .emitter = 3.3e3};
  const BiasTrial<double> t = bias_at_constant_vbe(book, 100, 0.7);
  CHECK(t.i_c == Approx(0.9168e-3).epsilon(kFull));
  CHECK(t.v_ce == Approx(5.278).epsilon(kFull));
  struct Row {
    double beta, loose, stiff;  // emitter currents with 80k/40k and with 8k/4k
  };
  BookStage stiff = book;
  stiff.upper_divider = 8e3, stiff.lower_divider = 4e3;
  for (const Row& row :
       {Row{50, 0.8632e-3, 0.9844e-3}, Row{100, 0.9259e-3, 0.9921e-3}, Row{150, 0.9492e-3, 0.9947e-3}}) {
    INFO("beta " << row.beta);
    CHECK(emitter_current(bias_at_constant_vbe(book, row.beta, 0.7)) == Approx(row.loose).epsilon(kFull));
    CHECK(emitter_current(bias_at_constant_vbe(stiff, row.beta, 0.7)) == Approx(row.stiff).epsilon(kFull));
  }
  // Sedra & Smith, Microelectronic Circuits, 5th ed., example 5.13, the same circuit: 0.93 and 0.99 mA, from memory,
  // extra
  constexpr double kTwoFigures = 0.0055;
  CHECK(emitter_current(bias_at_constant_vbe(book, 100, 0.7)) == Approx(0.93e-3).epsilon(kTwoFigures));
  CHECK(emitter_current(bias_at_constant_vbe(stiff, 100, 0.7)) == Approx(0.99e-3).epsilon(kTwoFigures));
}

TEST_CASE("stability factors against leakage and VBE") {
  // Kumar & Jain, Electronic Devices and Circuits, edition not stated, example 5.10; read through a transcription, book
  // not opened. The supply is not printed; neither factor depends on it.
  constexpr double kRounding = 0.003;  // three figures
  const BookStage book = with_divider({.supply = 20, .collector = 1e3, .emitter = 1e3}, 10e3, 3);
  CHECK(stability_of(book, 100, 0.7) == Approx(10.0).epsilon(kRounding));
  CHECK(stability_of(book, 100, 0.7) == Approx(10.009).epsilon(kFull));
  const double leaking = bias_at_constant_vbe(book, 100, 0.7, 19.9e-9).i_c - bias_at_constant_vbe(book, 100, 0.7).i_c;
  CHECK(leaking == Approx(0.199e-6).epsilon(kRounding));

  // one base resistor of 240k: the lower one is left out
  const BookStage one_resistor{.supply = 20, .upper_divider = 240e3, .collector = 1e3, .emitter = 1e3};
  const double moved =
      bias_at_constant_vbe(one_resistor, 100, 0.53).i_c - bias_at_constant_vbe(one_resistor, 100, 0.7).i_c;
  CHECK(moved / -0.17 == Approx(-2.933e-4).epsilon(kRounding));
  CHECK(moved == Approx(50e-6).epsilon(kRounding));
  CHECK(moved == Approx(49.85e-6).epsilon(kFull));
}
