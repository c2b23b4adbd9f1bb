// Malformed assess groups: each with the path that is named and a piece of the message.
#include <string>
#include <vector>

#include "catch.hpp"
#include "spec_faults.hpp"

using namespace bandwright;

namespace {

// The least spec with one cause.
std::string cause(const std::string& member) { return with(R"("assess": {"causes": {)" + member + "}}"); }

std::vector<Malformed> assess() {
  return {
      {with(R"("assess": 5)"), "assess", "an object with units, yield, interval, distribution, causes"},
      {with(R"("assess": {"unit": 500})"), "assess.unit", "did you mean \"units\"?"},
      {with(R"("assess": {"units": 99})"), "assess.units", "found \"99\"; expected a whole number from 100 to 1000000"},
      {with(R"("assess": {"units": 1000001})"), "assess.units", "a whole number from 100 to 1000000"},
      {with(R"("assess": {"units": 1000.5})"), "assess.units", "a whole number from 100"},
      {with(R"("assess": {"units": "1k"})"), "assess.units", "found \"1k\"; expected a whole number"},
      {with(R"("assess": {"yield": 0})"), "assess.yield", "found \"0\"; expected a value from 0.0001 % to 100 %"},
      {with(R"("assess": {"yield": "101 %"})"), "assess.yield", "a value from 0.0001 % to 100 %"},
      {with(R"("assess": {"yield": 99})"), "assess.yield", "a value from 0.0001 % to 100 %"},
      {with(R"("assess": {"yield": "99 Hz"})"), "assess.yield", "Hz is a unit of frequency, not of ratio"},
      {with(R"("assess": {"interval": "-1 %"})"), "assess.interval", "a value from 0 % to 100 %"},
      {with(R"("assess": {"interval": 1.5})"), "assess.interval", "a value from 0 % to 100 %"},
      {with(R"("assess": {"distribution": "unifrom"})"), "assess.distribution",
       "expected normal or uniform; did you mean \"uniform\"?"},
      {with(R"("assess": {"distribution": true})"), "assess.distribution", "normal or uniform"},
  };
}

std::vector<Malformed> causes_of_variation() {
  return {
      {with(R"("assess": {"causes": "off"})"), "assess.causes", "found \"off\"; expected an object with upper_divider"},
      {cause(R"("curent_gain": "off")"), "assess.causes.curent_gain", "did you mean \"current_gain\"?"},
      {cause(R"("temperature_coefficient": "off")"), "assess.causes.temperature_coefficient",
       "did you mean \"temperature_coefficients\"?"},
      {cause(R"("R3": "off")"), "assess.causes.R3", "did you mean \"collector\"?"},
      {cause(R"("hFE": "off")"), "assess.causes.hFE", "did you mean \"current_gain\"?"},
      {cause(R"("colour": "off")"), "assess.causes.colour", "one of the keys upper_divider, lower_divider"},
      {cause(R"("collector": "of")"), "assess.causes.collector",
       "a tolerance such as 5 % or -20/+50 % (a number and % are wanted), or off"},
      {cause(R"("collector": false)"), "assess.causes.collector", "a tolerance such as 5 % or -20/+50 %, or off"},
      {cause(R"("collector": 5)"), "assess.causes.collector", "a tolerance such as 5 % or -20/+50 %, or off"},
      {cause(R"("collector": 0)"), "assess.causes.collector", "a tolerance from 0.0001 % to 1000 %, or off"},
      {cause(R"("collector": "-20/+1001 %")"), "assess.causes.collector",
       "a tolerance from 0.0001 % to 1000 %, or off"},
      {cause(R"("load_resistance": "-100/+5 %")"), "assess.causes.load_resistance", "must stay under 100 %"},
      {cause(R"("current_gain": "150 %")"), "assess.causes.current_gain",
       "found \"150 %\"; expected a low side under 100 %, such as -50/+200 %"},
      {cause(R"("cutoff_current": "100 %")"), "assess.causes.cutoff_current", "a low side under 100 %"},
      {cause(R"("cutoff_current": "-50/+200000 %")"), "assess.causes.cutoff_current", "from 0.0001 % to 100000 %"},
      {cause(R"("current_gain": "1 dB")"), "assess.causes.current_gain", "dB is for a gain only"},
      {cause(R"("base_emitter_voltage": "5 %")"), "assess.causes.base_emitter_voltage",
       "expected a voltage such as 1.5 V (% is a unit of ratio, not of voltage), or off"},
      {cause(R"("base_emitter_voltage": 0)"), "assess.causes.base_emitter_voltage",
       "a value from 1 µV to 200 mV, or off"},
      {cause(R"("base_emitter_voltage": "-30 mV")"), "assess.causes.base_emitter_voltage",
       "a value from 1 µV to 200 mV"},
      {cause(R"("base_emitter_voltage": "201 mV")"), "assess.causes.base_emitter_voltage",
       "a value from 1 µV to 200 mV"},
      {cause(R"("base_emitter_voltage": "60 mVpp")"), "assess.causes.base_emitter_voltage", "a DC voltage"},
      {cause(R"("temperature_coefficients": "100")"), "assess.causes.temperature_coefficients",
       "a share for each kelvin such as 50 ppm/K or 0.5 %/K, or off"},
      {cause(R"("temperature_coefficients": "-100 ppm/K")"), "assess.causes.temperature_coefficients",
       "a share for each kelvin"},
      {cause(R"("temperature_coefficients": -1e-4)"), "assess.causes.temperature_coefficients",
       "a value from 0 to 10000 ppm/K, or off"},
      {cause(R"("temperature_coefficients": "10001 ppm/K")"), "assess.causes.temperature_coefficients",
       "a value from 0 to 10000 ppm/K, or off"},
      {cause(R"("temperature_coefficients": [1])"), "assess.causes.temperature_coefficients",
       "a share for each kelvin"},
  };
}

}  // namespace

TEST_CASE("malformed specs: assess") { check_each(assess()); }
TEST_CASE("malformed specs: causes of variation") { check_each(causes_of_variation()); }
