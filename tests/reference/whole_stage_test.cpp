// A complete design from a textbook: its method through the first estimates, its parts recomputed, and the same task
// given to the search.
//
// Bell, Electronic Devices and Circuits, 5th ed., example 12.2 and 12.3; read through a transcription, book not opened.
#include <bandwright/design.hpp>
#include <filesystem>
#include <fstream>
#include <iostream>
#include <random>

#include "book_stage.hpp"

using namespace reference;
namespace fs = std::filesystem;

namespace {

constexpr const char* kDevice = "TEXTBOOK-1";

// The example's transistor: hFE 100, VBE 0.7 V at the current its parts settle at, VA infinite, rbb' 0; capacitances
// small enough to play no part under 20 kHz.
constexpr const char* kTransistor = R"({
  "type": "TEXTBOOK-1",
  "polarity": "NPN",
  "collector_emitter_breakdown": {"max": "60 V"},
  "collector_current_limit": {"max": "100 mA"},
  "power_limit": {"max": "500 mW"},
  "thermal_resistance": {"typ": 0},
  "early_voltage": {"typ": "infinite"},
  "base_resistance": {"typ": 0},
  "current_gain": {"min": 100, "typ": 100, "max": 100, "collector_current": "1.2252 mA"},
  "base_emitter_voltage": {"typ": "0.7 V", "collector_current": "1.2252 mA"},
  "transition_frequency": {"typ": "1 GHz", "collector_current": "1.2252 mA", "collector_emitter_voltage": "4.5 V"},
  "output_capacitance": {"typ": "0.1 pF", "collector_base_voltage": "3.8 V"},
  "input_capacitance": {"typ": "0.1 pF", "emitter_base_voltage": "0.5 V"}
})";

// 410 is the full analysis of the published parts; 1 dB and 20 % are the defaults.
constexpr const char* kSpec = R"({
  "title": "textbook stage, 120 kilohm load",
  "supply": "24 V",
  "source": {"resistance": "600"},
  "load": {"resistance": "120k"},
  "requirements": {
    "gain": {"target": 410},
    "lower_cutoff": {"target": "100 Hz"},
    "upper_cutoff": {"min": "20 kHz"}
  },
  "devices": ["TEXTBOOK-1"]
})";

constexpr PartValues kPublishedParts = {120e3, 39e3, 12e3, 0, 3.9e3, 6.8e-6, 0.12e-6, 82e-6, 0};

Catalogue catalogue_with_the_transistor() {
  const fs::path folder =
      fs::temp_directory_path() / ("bandwright-reference-" + std::to_string(std::random_device{}()));
  fs::create_directories(folder);
  std::ofstream(folder / "textbook-1.json") << kTransistor;
  const Catalogue catalogue = read_catalogue(folder);
  fs::remove_all(folder);
  return catalogue;
}

std::string shown(const Part& part) { return std::string(info(part.role).designator) + " " + part.code; }

void print_line(const char* title, const Candidate& c) {
  std::cout << title << ": error " << c.error << ", gain " << c.analysis.band.gain << ", fL " << c.analysis.band.lower
            << " Hz, fH " << c.analysis.band.upper << " Hz;";
  for (const Part& part : c.parts) std::cout << " " << shown(part);
  std::cout << "\n";
}

PartValues printed_values(const Candidate& c) {
  PartValues values{};
  for (const Part& part : c.parts) values[index(part.role)] = part.value;
  return values;
}

BookStage published_stage() {
  return {.supply = 24,
          .upper_divider = 120e3,
          .lower_divider = 39e3,
          .collector = 12e3,
          .emitter_bypassed = 3.9e3,
          .source = 600,
          .load = 120e3};
}

/// The book keeps re = 20 ohm, hie = 2.02k.
HybridPi<double> book_transistor() { return from_h(2.02e3, 100); }

}  // namespace

TEST_CASE("complete design: the book's method by the first estimates") {
  constexpr double kRounding = 0.003;    // three to five figures, rounded on the way
  constexpr double kTwoFigures = 0.006;  // 0.12 uF, short for 0.1206
  const WantedBias wanted{.supply = 24,
                          .collector_current = 16.0 / 12e3,
                          .collector_drop = 16,
                          .emitter_voltage = 5,
                          .base_emitter_voltage = 0.7};
  CHECK(wanted.collector_current == Approx(1.333e-3).epsilon(kRounding));
  const BiasResistors r = bias_by_divider_current(wanted, 5.7 / 39e3, 0);  // R2 = 10 RE with 3.9k
  CHECK(r.collector == Approx(12e3).epsilon(kRounding));
  CHECK(r.emitter == Approx(3.75e3).epsilon(kRounding));
  CHECK(r.lower_divider == Approx(39e3).epsilon(kRounding));
  CHECK(r.upper_divider == Approx(125.21e3).epsilon(kRounding));

  // coupling reactances are a tenth of the resistance in series with them
  const BookStage book = published_stage();
  const Circuit<double> c = circuit_of_book(book);
  CHECK(midband(c, book_transistor()).r_in == Approx(1.890e3).epsilon(kRounding));
  const auto coupling = low_side_capacitors(low_side(c, midband(c, book_transistor())), 100, {0.1, 0.1, 1});
  CHECK(coupling[0] == Approx(6.39e-6).epsilon(kRounding));
  CHECK(coupling[1] == Approx(0.12e-6).epsilon(kTwoFigures));
  CHECK(coupling[1] == Approx(0.1206e-6).epsilon(kRounding));
  // the bypass reactance is re: neither the source nor RE is counted
  BookStage bare = book;
  bare.source = 0;
  bare.emitter_bypassed = kOpen;
  const Circuit<double> alone = circuit_of_book(bare);
  const auto bypass = low_side_capacitors(low_side(alone, midband(alone, book_transistor())), 100, {1, 1, 1});
  CHECK(bypass[2] == Approx(79.6e-6).epsilon(kRounding));
}

TEST_CASE("complete design: the published parts recomputed") {
  BookStage book = published_stage();
  const BiasTrial<double> t = bias_at_constant_vbe(book, 100, 0.7);
  CHECK(t.i_c == Approx(1.2252e-3).epsilon(kFull));
  CHECK(t.v_e == Approx(4.826).epsilon(kFull));
  CHECK(t.v_e + t.v_be == Approx(5.526).epsilon(kFull));
  CHECK(t.v_e + t.v_ce == Approx(9.297).epsilon(kFull));
  CHECK(t.v_ce == Approx(4.471).epsilon(kFull));

  CHECK(midband_gain_of(book, book_transistor()) == Approx(409.9).epsilon(kFull));
  struct Row {
    double c_in, c_out, c_e, lower;
  };
  // as computed; nearest standard values; a step larger
  for (const Row& row : {Row{6.39e-6, 0.1206e-6, 79.6e-6, 88.3}, Row{6.8e-6, 0.12e-6, 82e-6, 85.5},
                         Row{6.8e-6, 0.15e-6, 100e-6, 71.6}}) {
    book.input_coupling = row.c_in;
    book.output_coupling = row.c_out;
    book.bypass = row.c_e;
    CHECK(band_without_top(book, book_transistor()).gain == Approx(409.9).epsilon(kFull));
    CHECK(band_without_top(book, book_transistor()).lower == Approx(row.lower).epsilon(kFull));
  }
}

TEST_CASE("complete design: the search does no worse than the print under the same model") {
  const Catalogue catalogue = catalogue_with_the_transistor();
  const Spec spec = read_spec(kSpec, "textbook stage");
  const DesignResult published = check(spec, catalogue, kDevice, choices_of(kPublishedParts));
  REQUIRE(published.candidates.size() == 1);
  const Candidate& theirs = published.candidates.front();
  REQUIRE(theirs.analysis.point.state == BiasState::active);
  // the parts are the book's and the transistor is the example's
  REQUIRE(theirs.parts.size() == 7);
  CHECK(printed_values(theirs) == kPublishedParts);
  CHECK(theirs.working_values == kPublishedParts);
  CHECK(theirs.analysis.point.base_emitter_voltage == Approx(0.7).epsilon(kFull));
  CHECK(theirs.analysis.point.collector_current == Approx(1.2252e-3).epsilon(kFull));
  CHECK(theirs.analysis.point.collector_emitter_voltage == Approx(4.471).epsilon(kFull));

  const DesignResult found = design(spec, catalogue);
  REQUIRE_FALSE(found.candidates.empty());
  const Candidate& ours = found.candidates.front();
  print_line("published parts", theirs);
  print_line("found parts    ", ours);
  CHECK(ours.device == kDevice);
  CHECK(ours.error <= theirs.error);
  CHECK(found.met);
  // what is claimed of the found parts is what a recomputation of them says
  const DesignResult again = check(spec, catalogue, kDevice, choices_of(printed_values(ours)));
  CHECK(again.candidates.front().error == ours.error);
}
