// Specs that the tests of the reader share. All invented here.
#pragma once

#include <string>

namespace bandwright {

/// The least that `design` needs.
inline const std::string kLeastSpec = R"({
  "supply": "12 V",
  "requirements": {"gain": "34 dB", "lower_cutoff": "40 Hz", "upper_cutoff": "20 kHz"}
})";

/// Every field said.
inline const std::string kFullSpec = R"({
  "title": "Hydrophone line amplifier, µ",
  "supply":  {"nominal": "12 V", "tolerance": "5 %"},
  "source":  {"resistance": "600", "capacitance": "10 pF", "dc": "-0.1"},
  "load":    {"resistance": "9.7k", "capacitance": "220 pF", "dc": "1.65 V"},
  "stray":   {"input": "3 pF", "output": "3 pF", "feedback": "0.3 pF"},
  "ambient": {"min": "-10 °C", "nominal": "20.3 °C", "max": "60 °C"},
  "requirements": {
    "gain":         {"target": "-34", "tolerance": "1 dB", "from": "input", "at": "1 kHz"},
    "lower_cutoff": {"target": "40 Hz", "max": "50 Hz"},
    "upper_cutoff": {"target": "20 kHz", "tolerance": "-5/+10 %"},
    "bandwidth":    {"min": "10 kHz", "max": 40000},
    "output_swing": {"min": "3 Vpp"},
    "input_resistance": {"min": "4.7k"},
    "output_resistance": "4.7k",
    "input_overload": {"min": "10 mVrms"},
    "supply_current": {"max": "5 mA"},
    "collector_current": {"target": 0.001, "tolerance": 0.5},
    "collector_emitter_voltage": {"min": "3 V"},
    "dissipation":  {"max": "250 mW"}
  },
  "parts": {"resistors": {"series": "E96", "tolerance": "0.5 %", "min": "22", "max": "470k", "family": "metal-film"},
            "capacitors": {"series": "E6", "tolerance": "-20/+30 %", "min": "10 pF", "max": "470 uF",
                           "families": ["ceramic", "film"]},
            "ranges": {"emitter": ["1", "1k"], "shunt": ["1 pF", "10 nF"]},
            "pinned": {"collector": "4k7", "shunt": "absent", "emitter": 0}},
  "devices": ["2N3904", "BC547B"],
  "topologies": ["common-emitter"],
  "search": {"candidates": 7, "seed": 9007199254740992},
  "assess": {"units": 5000, "yield": "95 %", "interval": 0, "distribution": "uniform",
             "causes": {"upper_divider": 0.02, "bypass": "-20/+150 %", "shunt": "off", "current_gain": "-50/+120 %",
                        "base_emitter_voltage": "30 mV", "load_resistance": "10 %",
                        "temperature_coefficients": "100 ppm/K"}}
})";

}  // namespace bandwright
