// Command-line forms of the spec, alone and on top of a file.
#include <bandwright/fault.hpp>
#include <bandwright/spec.hpp>
#include <cmath>

#include "catch.hpp"
#include "spec_texts.hpp"

using namespace bandwright;

namespace {

Spec read(const std::string& text, const std::vector<Override>& overrides) {
  return read_spec(text, "test.json", overrides);
}

std::string complaint(const std::vector<Override>& overrides) {
  try {
    read(kFullSpec, overrides);
  } catch (const InputError& error) {
    return error.what();
  }
  return "";
}

const std::vector<Override> kAlone = {
    {"gain", "34dB"}, {"lower-cutoff", "40"}, {"upper-cutoff", "20k"}, {"supply", "-12"}};

}  // namespace

TEST_CASE("the command line alone is a spec") {
  const Spec spec = read("", kAlone);
  CHECK(spec.pnp());
  CHECK(spec.requirement(Figure::gain)->target == Approx(50.1187).epsilon(1e-6));
}

TEST_CASE("an override takes the place of one member and leaves the others") {
  const Spec spec = read(kFullSpec, {{"gain", "33"}, {"supply", "10 V"}, {"lower-cutoff-max", "60 Hz"}});
  CHECK(spec.requirement(Figure::gain)->target == 33);
  CHECK(spec.requirement(Figure::gain)->upper == Approx(33 * std::pow(10, 0.05)).epsilon(1e-15));  // the file's 1 dB
  CHECK(*spec.gain_at == 1000);
  CHECK(spec.supply.max == 10.5);  // the file's 5 %
  CHECK(spec.requirement(Figure::lower_cutoff)->target == 40);
  CHECK(spec.requirement(Figure::lower_cutoff)->upper == 60);
}

TEST_CASE("a bare value in the file gives way to the same option") {
  CHECK(read(kLeastSpec, {{"supply", "9 V"}}).supply.nominal == 9);
  const Spec spec = read(kLeastSpec, {{"gain-min", "40"}});
  CHECK(spec.requirement(Figure::gain)->lower == 40);
  CHECK(std::isnan(spec.requirement(Figure::gain)->upper));
}

TEST_CASE("lists, ranges and pinned values on the command line") {
  const Spec spec = read(kFullSpec, {{"devices", "2N5088, BC550C"},
                                     {"capacitors-families", "film"},
                                     {"pinned", "collector=3k9,bypass=100u"},
                                     {"ranges", "emitter=2.2:470,input_coupling=1n:1u"},
                                     {"candidates", "5"},
                                     {"load-resistance", "open"},
                                     {"gain-from", "source"},
                                     {"title", "another"}});
  CHECK(spec.devices == std::vector<std::string>{"2N5088", "BC550C"});
  CHECK(spec.parts.capacitors.families == std::vector<std::string>{"film"});
  CHECK(*spec.parts.pinned[index(Role::collector)] == 3900);
  CHECK(*spec.parts.pinned[index(Role::bypass)] == 100e-6);
  CHECK(*spec.parts.pinned[index(Role::shunt)] == 0);  // the file's
  CHECK(spec.parts.ranges[index(Role::emitter)]->min == 2.2);
  CHECK(spec.parts.ranges[index(Role::input_coupling)]->max == 1e-6);
  CHECK(spec.parts.ranges[index(Role::shunt)]->max == 1e-8);  // the file's
  CHECK(spec.candidates == 5);
  CHECK(spec.load.conductance == 0);
  CHECK_FALSE(spec.gain_from_input);
  CHECK(spec.title == "another");
}

TEST_CASE("faults of the command line name the option") {
  struct Bad {
    Override given;
    const char* says;
  };
  for (const Bad& row : std::vector<Bad>{
           {{"gain", "34 x"}, "--gain: found \"34 x\"; expected a gain such as 50 or 34 dB"},
           {{"gain-mim", "30"},
            "--gain-mim: found \"--gain-mim\"; expected an option of the spec; did you mean \"--gain-min\"?"},
           {{"noise-figure-max", "3 dB"},
            "--noise-figure-max: found \"3 dB\"; expected noise_figure left out: it is not computed"},
           {{"base-voltage", "3 V"}, "base_voltage left out: it is reported, never required"},
           {{"lower-cutoff-min", "60 Hz"}, "--lower-cutoff-min: found \"60 Hz\"; expected less than max, 50 Hz"},
           {{"pinned", "colector=4k7"}, "--pinned: found \"colector\"; expected one of the roles upper_divider"},
           {{"pinned", "colector=4k7"}, "did you mean \"collector\"?"},
           {{"pinned", "collector"}, "--pinned: found \"collector\"; expected role=value"},
           {{"pinned", "collector=absent"},
            "--pinned collector: found \"absent\"; expected a value: collector is never absent"},
           {{"pinned", "collector=4k7x"}, "--pinned collector: found \"4k7x\""},
           {{"ranges", "emitter=1k"}, "--ranges emitter: found \"1k\"; expected two values"},
           {{"ranges", "emitter=1k:1"}, "the smaller value first"},
           {{"devices", "BC547B,,2N3904"}, "a list of names"},
           {{"devices", ""}, "a list of names"},
           {{"seed", "-1"}, "a whole number from 0 to 9007199254740992"},
           {{"supply", ""}, "--supply: nothing found; expected a voltage"},
           {{"title", "\xFF"}, "text in UTF-8"},
           {{"topologies", "cascode"}, "no other topology is available in this version"},
       }) {
    const std::string said = complaint({row.given});
    INFO(said);
    CHECK(said.find(row.says) != std::string::npos);
  }
  CHECK(complaint({{"gain", "34"}, {"gain", "35"}}).find("--gain: found \"35\"; expected this option once") !=
        std::string::npos);
}
