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

TEST_CASE("assess on the command line, on top of the file's") {
  const Spec spec = read(kFullSpec, {{"assess-units", "1000"},
                                     {"assess-yield", "90%"},
                                     {"assess-interval", "0.2%"},
                                     {"assess-distribution", "normal"},
                                     {"assess-causes",
                                      "current_gain=off, source_resistance=10%,bypass=-20/+80%,"
                                      "base_emitter_voltage=25mV,temperature_coefficients=50ppm/K"}});
  CHECK(spec.assess.units == 1000);
  CHECK(spec.assess.yield == 0.9);
  CHECK(spec.assess.interval == 0.002);
  CHECK_FALSE(spec.assess.uniform);
  CHECK(*spec.assess.causes[index(Cause::current_gain)] == Tolerance{0, 0});
  CHECK(*spec.assess.causes[index(Cause::source_resistance)] == Tolerance{0.1, 0.1});
  CHECK(*spec.assess.causes[index(Cause::bypass)] == Tolerance{0.2, 0.8});
  CHECK(*spec.assess.causes[index(Cause::base_emitter_voltage)] == Tolerance{0.025, 0.025});
  CHECK(*spec.assess.causes[index(Cause::load_resistance)] == Tolerance{0.1, 0.1});  // the file's
  CHECK(*spec.assess.temperature_coefficient == 50e-6);
}

TEST_CASE("a temperature coefficient on the command line may be a number alone, 1/K") {
  for (const char* number : {"0.0001", "1e-4", " 0.0001"})
    CHECK(*read(kLeastSpec, {{"assess-causes", std::string("temperature_coefficients=") + number}})
               .assess.temperature_coefficient == 1e-4);
  CHECK(*read(kLeastSpec, {{"assess-causes", "temperature_coefficients=off"}}).assess.temperature_coefficient == 0);
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
           {{"pinned", "R3=4k7"}, "did you mean \"collector\"?"},
           {{"pinned", "hFE=4k7"}, "--pinned: found \"hFE\"; expected one of the roles upper_divider"},
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
           {{"assess-units", "10"}, "--assess-units: found \"10\"; expected a whole number from 100 to 1000000"},
           {{"assess-yield", "99"}, "--assess-yield: found \"99\"; expected a value from 0.0001 % to 100 %"},
           {{"assess-interval", "2"}, "--assess-interval: found \"2\"; expected a value from 0 % to 100 %"},
           {{"assess-distribution", "norml"}, "expected normal or uniform; did you mean \"normal\"?"},
           {{"assess-yeild", "99%"}, "did you mean \"--assess-yield\"?"},
           {{"assess-causes", "off"}, "--assess-causes: found \"off\"; expected cause=value, several between commas"},
           {{"assess-causes", "curent_gain=off"},
            "--assess-causes: found \"curent_gain\"; expected one of the causes upper_divider"},
           {{"assess-causes", "curent_gain=off"}, "did you mean \"current_gain\"?"},
           {{"assess-causes", "VBE=30mV"}, "did you mean \"base_emitter_voltage\"?"},
           {{"assess-causes", "current_gain=10"},
            "--assess-causes current_gain: found \"10\"; expected a tolerance such as 5 % or -20/+50 % (write 10 %), "
            "or off"},
           {{"assess-causes", "temperature_coefficients=100"},
            "--assess-causes temperature_coefficients: found \"100\"; expected a value from 0 to 10000 ppm/K, or off"},
           {{"topologies", "cascode"}, "no other topology is available in this version"},
       }) {
    const std::string said = complaint({row.given});
    INFO(said);
    CHECK(said.find(row.says) != std::string::npos);
  }
  CHECK(complaint({{"gain", "34"}, {"gain", "35"}}).find("--gain: found \"35\"; expected this option once") !=
        std::string::npos);
}
