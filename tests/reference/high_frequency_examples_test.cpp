// Upper corners, exact upper cutoff, and device capacitances against worked examples of textbooks.
//
// Coupling and bypass capacitors are shorts, as in the examples.
#include <bandwright/device.hpp>
#include <utility>

#include "book_stage.hpp"

using namespace reference;

namespace {

const SeenBy<double>& seen(const PoleEstimate<double>& e, HighCapacitor c) {
  return e.high[static_cast<std::size_t>(c)];
}

/// The two highest poles, Hz.
std::pair<double, double> highest_poles(const BookStage& b, const HybridPi<double>& h) {
  const auto poles = poles_and_zeros(response(b, h)).poles;
  REQUIRE(poles.size() >= 2);
  return {std::abs(poles[poles.size() - 2]), std::abs(poles.back())};
}

double miller_cutoff(const BookStage& b, const HybridPi<double>& h) { return textbook(b, h).miller_upper_cutoff; }

SheetFigure stated(double typ) {
  SheetFigure f;
  f.typ = typ;
  return f;
}

/// A transistor as an example gives it: fT at a current, Cmu at that point, no depletion capacitance of the emitter.
BipolarParameters device_of(double transition, double current, double feedback, double beta) {
  constexpr double kForward = 5, kJunction = 0.65;  // V: any will do, Cmu is stated where fT is
  Transistor t;
  t.type = "example";
  t.collector_emitter_breakdown = stated(40);
  t.collector_current_limit = stated(0.1);
  t.power_limit = stated(0.5);
  t.early_voltage = stated(INFINITY);
  t.current_gain = {stated(beta)};
  t.current_gain[0].min = beta;
  t.base_emitter_voltage = {stated(kJunction)};
  t.transition_frequency = {stated(transition)};
  t.output_capacitance = {stated(feedback)};
  t.input_capacitance = {stated(0)};
  t.output_capacitance[0].reverse_voltage = kForward - kJunction;
  t.input_capacitance[0].reverse_voltage = 0;
  for (SheetFigure* f : {&t.current_gain[0], &t.base_emitter_voltage[0], &t.transition_frequency[0]}) {
    f->collector_current = current;
    f->collector_emitter_voltage = kForward;
  }
  return derive_parameters(t).parameters;
}

/// Hybrid-pi elements where kT/q is the book's.
HybridPi<double> elements(const BipolarParameters& p, double current, double thermal_voltage, double beta) {
  return hybrid_pi(at_temperature(p, junction_for(thermal_voltage)), current, 0.65, 5.0, beta);
}

}  // namespace

TEST_CASE("load capacitance sets the upper cutoff, input coupling the lower") {
  // Neamen, Electronic Circuit Analysis and Design, 2nd ed., example 7.7; read through a transcription, book not
  // opened. IC 0.99 mA, VT 26 mV.
  constexpr double kRounding = 0.005;  // three figures; 3.4 Hz has two
  const BookStage book{.upper_divider = 40e3,
                       .lower_divider = 5.7e3,
                       .collector = 5e3,
                       .emitter = 500,
                       .input_coupling = 10e-6,
                       .bypass = 0,
                       .source = 100,
                       .load = 10e3,
                       .load_capacitance = 15e-12};
  const HybridPi<double> h = transistor(0.99e-3 / 26e-3, 100 * 26e-3 / 0.99e-3);
  const PoleEstimate<double> e = estimate(book, h);
  CHECK(e.gain == Approx(6.14).epsilon(kRounding));
  CHECK(e.lower == Approx(3.4).epsilon(kRounding));
  CHECK(e.upper == Approx(3.18e6).epsilon(kRounding));
  const Band full = band_of(book, h);
  CHECK(full.gain == Approx(6.1397).epsilon(kFull));
  CHECK(full.lower == Approx(3.4147).epsilon(kFull));
  CHECK(full.upper == Approx(3.1831e6).epsilon(kFull));
}

TEST_CASE("input and output corner of a classic stage") {
  // Boylestad & Nashelsky, Electronic Devices and Circuit Theory, 10th ed., example 9.13; read through a transcription,
  // book not opened. The printed input corner, 738.4 kHz, counts R1||R2 twice; mended it is 689.8 kHz.
  constexpr double kRounding = 0.003;  // two to four figures
  const double r_e = 15.758, beta = 100, gain = 90;
  BookStage book{.upper_divider = 40e3,
                 .lower_divider = 10e3,
                 .collector = 4e3,
                 .emitter_bypassed = 2e3,
                 .source = 1e3,
                 .load = 2.2e3};
  // wiring at the input stands beside Cbe where rbb' is 0
  const HybridPi<double> wired = from_re(r_e, beta, 36e-12 + 6e-12, 4e-12);
  CHECK(miller_cutoff(book, wired) == Approx(689.8e3).epsilon(kRounding));
  book.stray_output = 8e-12 + 1e-12 + 4e-12 * (1 + 1 / gain);
  CHECK(corner(seen(estimate(book, wired), HighCapacitor::stray_output)) == Approx(8.6e6).epsilon(kRounding));

  book.stray_input = 6e-12;
  book.stray_output = 9e-12;
  const HybridPi<double> h = from_re(r_e, beta, 36e-12, 4e-12);
  CHECK(band_of(book, h).upper == Approx(643.1e3).epsilon(kFull));
  CHECK(estimate(book, h).upper == Approx(638.3e3).epsilon(kFull));
  CHECK(highest_poles(book, h).first == Approx(643.2e3).epsilon(kFull));
  CHECK(highest_poles(book, h).second == Approx(83.9e6).epsilon(kFull));

  // fT and fbeta of the same example, as a device with that fT
  const HybridPi<double> device = elements(device_of(252.6e6, 1.65e-3, 4e-12, beta), 1.65e-3, 26e-3, beta);
  CHECK(device.input_capacitance == Approx(36e-12).epsilon(kRounding));
  const double total = device.input_capacitance + device.feedback_capacitance;
  CHECK(device.input_conductance / (2 * kPi * total) == Approx(2.53e6).epsilon(kRounding));
}

TEST_CASE("input and output corner, 25 mV") {
  // Floyd, Electronic Devices, 7th ed., example 10.10 and 10.11; read through a transcription, book not opened. Base
  // current neglected. The output corner is printed with Cbc alone.
  constexpr double kRounding = 0.005;  // three figures
  BookStage book{.supply = 10,
                 .upper_divider = 22e3,
                 .lower_divider = 4.7e3,
                 .collector = 2.2e3,
                 .emitter_bypassed = 470,
                 .source = 600,
                 .load = 2.2e3};
  const double r_e = 25e-3 / emitter_current(bias_at_constant_vbe(book, kNoBaseCurrent, 0.7));
  CHECK(r_e == Approx(11.08).epsilon(kRounding));
  const HybridPi<double> h = from_re(r_e, 125, 20e-12, 2.4e-12);
  CHECK(miller_cutoff(book, h) == Approx(1.62e6).epsilon(kRounding));
  CHECK(seen(estimate(book, h), HighCapacitor::base_emitter).resistance == Approx(377.8).epsilon(kRounding));
  CHECK(band_of(book, h).upper == Approx(1.577e6).epsilon(kFull));
  CHECK(estimate(book, h).upper == Approx(1.574e6).epsilon(kFull));
  CHECK(highest_poles(book, h).second == Approx(805e6).epsilon(kFull));
  book.stray_output = 2.4e-12;
  CHECK(corner(seen(estimate(book, h), HighCapacitor::stray_output)) == Approx(60.3e6).epsilon(kRounding));
}

TEST_CASE("Miller effect with base resistance and output resistance") {
  // Sedra & Smith, Microelectronic Circuits, 5th ed., example 5.18; read through a transcription, book not opened. RB
  // of 100k is the lower divider; the emitter stands on a current source, bypassed.
  constexpr double kRounding = 0.01;  // two and three figures, rounded on the way
  const BookStage book{.lower_divider = 100e3, .collector = 8e3, .emitter_bypassed = kOpen, .source = 5e3, .load = 5e3};
  const HybridPi<double> h{40e-3, 1 / 2.5e3, 1 / 100e3, 7e-12, 1e-12, 50};
  CHECK(midband_gain_of(book, h) == Approx(39).epsilon(kRounding));
  CHECK(miller_cutoff(book, h) == Approx(759e3).epsilon(kRounding));
  // the book's own print of it, 754 kHz: from memory, extra
  CHECK(miller_cutoff(book, h) == Approx(754e3).epsilon(kRounding));
  CHECK(band_of(book, h).gain == Approx(38.88).epsilon(kFull));
  CHECK(band_of(book, h).upper == Approx(749.2e3).epsilon(kFull));
  CHECK(estimate(book, h).upper == Approx(748.6e3).epsilon(kFull));
}

TEST_CASE("dominant pole by time constants, from fT") {
  // Kumar & Jain, Electronic Devices and Circuits, edition not stated, example 10.7; read through a transcription, book
  // not opened. VT 25 mV, no divider.
  constexpr double kRounding = 0.001;  // three and four figures
  const BookStage book{.collector = 1.2e3, .source = 300};
  HybridPi<double> h = transistor(40e-3, 125 / 40e-3);
  CHECK(midband_gain_of(book, h) == Approx(43.80).epsilon(kRounding));
  h.feedback_capacitance = 0.5e-12;
  h.input_capacitance = 40e-3 / (2 * kPi * 300e6) - 0.5e-12;
  CHECK(2 * kPi * estimate(book, h).upper == Approx(77.05e6).epsilon(kRounding));
  // the book's poles are 1/b1 and b1/b2 of 1 + b1 s + b2 s^2
  const auto [p_1, p_2] = highest_poles(book, h);
  CHECK((p_1 + p_2) * (p_1 + p_2) / (p_1 * p_2) == Approx(49.5).epsilon(kRounding));
  CHECK(band_of(book, h).upper == Approx(12.516e6).epsilon(kFull));
}

TEST_CASE("dominant pole by time constants, capacitances given") {
  // Kumar & Jain, Electronic Devices and Circuits, edition not stated, example 10.16; read through a transcription,
  // book not opened. No divider.
  constexpr double kRounding = 0.002;  // three and four figures
  const BookStage book{.collector = 1.5e3, .source = 600};
  const HybridPi<double> h = transistor(0.1, 1e3, 19.5e-12, 0.5e-12);
  CHECK(midband_gain_of(book, h) == Approx(93.75).epsilon(kRounding));
  CHECK(estimate(book, h).upper == Approx(4.38e6).epsilon(kRounding));
  CHECK(estimate(book, h).upper == Approx(4.3754e6).epsilon(kFull));
  CHECK(band_of(book, h).upper == Approx(4.3936e6).epsilon(kFull));
}

TEST_CASE("common-emitter half of a comparison") {
  // Kumar & Jain, Electronic Devices and Circuits, edition not stated, example 10.13; read through a transcription,
  // book not opened. No divider.
  constexpr double kRounding = 0.001;  // four figures
  const BookStage book{.collector = 1.5e3, .source = 300};
  const HybridPi<double> h = transistor(0.05, 2e3, 19.5e-12, 0.5e-12);
  CHECK(estimate(book, h).upper == Approx(10.11e6).epsilon(kRounding));
  CHECK(band_of(book, h).gain == Approx(65.22).epsilon(kFull));
  CHECK(band_of(book, h).upper == Approx(10.263e6).epsilon(kFull));
}

TEST_CASE("input capacitance sets the upper cutoff") {
  // Bell, Electronic Devices and Circuits, 5th ed., example 8.4 and 8.5; read through a transcription, book not opened.
  // Cbe = 6.1 IE/fT is the book's own.
  constexpr double kRounding = 0.006;  // three figures, with Cin rounded to 1.48 nF
  const BookStage book{.upper_divider = 100e3, .lower_divider = 47e3, .collector = 8.2e3, .source = 600, .load = 100e3};
  const HybridPi<double> h = from_h(1.3e3, 50, 6.1 * 1e-3 / 250e6, 5e-12);
  CHECK(miller_cutoff(book, h) == Approx(265e3).epsilon(kRounding));
  const double r_pi_seen = seen(estimate(book, h), HighCapacitor::base_emitter).resistance;
  const double c_in = 1 / (2 * kPi * r_pi_seen * miller_cutoff(book, h));
  CHECK(c_in == Approx(1.48e-9).epsilon(kRounding));
  CHECK(c_in == Approx(1.49e-9).epsilon(kRounding));
  CHECK(band_of(book, h).upper == Approx(248.7e3).epsilon(kFull));
}

TEST_CASE("shunt capacitor chosen for an upper cutoff") {
  // Bell, Electronic Devices and Circuits, 5th ed., example 8.6; read through a transcription, book not opened. The
  // example counts no other capacitance.
  constexpr double kRounding = 0.001;  // three figures: 265.26 pF
  const BookStage book{.collector = 10e3};
  const double c_4 = shunt_capacitor(estimate(book, from_h(1.3e3, 50)), 60e3);
  CHECK(c_4 == Approx(265e-12).epsilon(kRounding));
  CHECK(c_4 == Approx(265.26e-12).epsilon(kRounding));
}

TEST_CASE("Cpi from fT") {
  // Neamen, Electronic Circuit Analysis and Design, 2nd ed., example 7.10; read through a transcription, book not
  // opened. VT 26 mV; the model carries Cmu's share from 25.7 to 26 mV, 0.004 pF.
  constexpr double kRounding = 0.006;  // 12.0 pF is 11.95 unrounded
  const HybridPi<double> neamen = elements(device_of(500e6, 1e-3, 0.3e-12, 100), 1e-3, 26e-3, 100);
  CHECK(neamen.input_capacitance == Approx(12.0e-12).epsilon(kRounding));
  const double total = neamen.input_capacitance + neamen.feedback_capacitance;
  CHECK(neamen.input_conductance / (2 * kPi * total) == Approx(5e6).epsilon(kRounding));
}

TEST_CASE("Cpi from beta at a high frequency") {
  // Kumar & Jain, Electronic Devices and Circuits, edition not stated, example 10.5; read through a transcription, book
  // not opened. |beta| 10 at 25 MHz with beta0 120 gives fT = 120 x 25 MHz/sqrt(12^2 - 1); VT 25 mV, for which Cmu's
  // share is carried from 25.7 mV, 0.03 pF.
  constexpr double kRounding = 0.002;  // four figures, and that share
  const double transition = 120 * 25e6 / std::sqrt(143.0);
  const HybridPi<double> kumar = elements(device_of(transition, 1e-3, 1e-12, 120), 1e-3, 25e-3, 120);
  CHECK(kumar.input_capacitance == Approx(24.38e-12).epsilon(kRounding));
}

TEST_CASE("field-effect stages through the same small-signal circuit") {
  // Without rpi the circuit is that of a common-source stage: a check of the solver beyond its trade.
  constexpr double kRounding = 0.005;  // three and four figures
  // Sedra & Smith, Microelectronic Circuits, 5th ed., example 6.9; read through a transcription, book not opened: exact
  // poles 145.4 MHz and 2.4 GHz, zero 40 GHz; 2.444 GHz and 39.8 GHz recomputed
  constexpr double kTwoFigures = 0.02;
  const BookStage sedra{.collector = 9.82e3, .emitter_bypassed = kOpen, .source = 10e3, .stray_output = 25e-15};
  const HybridPi<double> mos = transistor(1.25e-3, INFINITY, 20e-15, 5e-15);
  CHECK(highest_poles(sedra, mos).first == Approx(145.4e6).epsilon(kRounding));
  CHECK(highest_poles(sedra, mos).second == Approx(2.4e9).epsilon(kTwoFigures));
  CHECK(highest_poles(sedra, mos).second == Approx(2.444e9).epsilon(kFull));
  CHECK(std::abs(poles_and_zeros(response(sedra, mos)).zeros.back()) == Approx(40e9).epsilon(kTwoFigures));
  CHECK(std::abs(poles_and_zeros(response(sedra, mos)).zeros.back()) == Approx(39.8e9).epsilon(kFull));
  CHECK(band_of(sedra, mos).upper == Approx(145.1e6).epsilon(kFull));

  // Sedra & Smith, Microelectronic Circuits, 5th ed., example 4.12; read through a transcription, book not opened
  const BookStage source_grounded{
      .lower_divider = 4.7e6, .collector = 15e3, .emitter_bypassed = kOpen, .source = 100e3, .load = 15e3};
  HybridPi<double> mos_2 = transistor(1e-3, INFINITY, 1e-12, 0.4e-12);
  mos_2.output_conductance = 1 / 150e3;
  CHECK(band_of(source_grounded, mos_2).gain == Approx(7).epsilon(kRounding));
  CHECK(band_of(source_grounded, mos_2).upper == Approx(379.8e3).epsilon(kFull));

  // Boylestad & Nashelsky, Electronic Devices and Circuit Theory, 10th ed., example 9.12; read through a transcription,
  // book not opened: the poles are printed, and the half-power frequency lies under the largest of them
  const BookStage boylestad{.lower_divider = 1e6,
                            .collector = 4.7e3,
                            .emitter_bypassed = 1e3,
                            .input_coupling = 0.01e-6,
                            .output_coupling = 0.5e-6,
                            .bypass = 2e-6,
                            .source = 10e3,
                            .load = 2.2e3};
  const auto poles = poles_and_zeros(response(boylestad, transistor(2e-3, INFINITY))).poles;
  REQUIRE(poles.size() == 3);
  CHECK(std::abs(poles[0]) == Approx(15.77).epsilon(kRounding));
  CHECK(std::abs(poles[1]) == Approx(46.16).epsilon(kRounding));
  CHECK(std::abs(poles[2]) == Approx(238.9).epsilon(kRounding));
  CHECK(band_without_top(boylestad, transistor(2e-3, INFINITY)).lower == Approx(222.4).epsilon(kFull));
}
