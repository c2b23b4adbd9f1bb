// Specs and runs that the tests of the program share. The specs are invented and small: one transistor each, and most
// parts fixed, so that a search takes a moment only.
#pragma once

#include <string>
#include <vector>

#include "run_program.hpp"

namespace bandwright::test {

/// A spec that one transistor meets with ease.
inline const std::string kEasySpec = R"({
  "title": "Doorbell pickup",
  "supply": "12 V",
  "load": {"resistance": "10k"},
  "requirements": {
    "gain": {"target": "30 dB", "tolerance": "2 dB"},
    "lower_cutoff": {"max": "60 Hz"},
    "upper_cutoff": {"min": "20 kHz"}
  },
  "parts": {"pinned": {"upper_divider": "47k", "lower_divider": "10k", "input_coupling": "10 uF",
                       "output_coupling": "10 uF", "bypass": "100 uF", "shunt": "absent"}},
  "devices": ["BC547B"],
  "search": {"candidates": 3}
})";

/// The same from a supply that allows no such gain.
inline const std::string kImpossibleSpec = R"({
  "supply": "3 V",
  "load": {"resistance": "1k"},
  "requirements": {"gain": "60 dB", "lower_cutoff": "60 Hz", "upper_cutoff": {"min": "20 kHz"}},
  "parts": {"pinned": {"upper_divider": "47k", "input_coupling": "10 uF", "output_coupling": "10 uF",
                       "bypass": "100 uF", "shunt": "absent"}},
  "devices": ["BC547B"],
  "search": {"candidates": 2}
})";

/// Parts of a stage that works, as options of `check`.
inline const std::vector<std::string> kPartOptions = {
    "--device",         "BC547B", "--upper-divider",   "47k", "--lower-divider",    "10k",
    "--collector",      "4k7",    "--emitter",         "68",  "--emitter-bypassed", "1k",
    "--input-coupling", "1u",     "--output-coupling", "1u",  "--bypass",           "100u"};

/// The spec as options, without a file.
inline const std::vector<std::string> kSpecOptions = {
    "--gain",
    "30dB",
    "--gain-tolerance",
    "2 dB",
    "--lower-cutoff-max",
    "60Hz",
    "--upper-cutoff-min",
    "20kHz",
    "--supply",
    "12V",
    "--devices",
    "BC547B",
    "--candidates",
    "2",
    "--pinned",
    "upper_divider=47k,lower_divider=10k,input_coupling=10u,output_coupling=10u,bypass=100u,shunt=absent"};

inline std::vector<std::string> joined(std::vector<std::string> words, const std::vector<std::string>& more) {
  words.insert(words.end(), more.begin(), more.end());
  return words;
}

inline Circumstances in_folder(const std::filesystem::path& folder) {
  Circumstances circumstances;
  circumstances.folder = folder;
  return circumstances;
}

inline Circumstances with_input(const std::string& text) {
  Circumstances circumstances;
  circumstances.input = text;
  return circumstances;
}

inline Circumstances with_environment(const std::vector<std::string>& variables) {
  Circumstances circumstances;
  circumstances.environment = variables;
  return circumstances;
}

/// `design` on the easy spec as options, with more words.
inline Outcome design_easy(const std::vector<std::string>& more, const Circumstances& circumstances = {}) {
  return run_bandwright(joined(joined({"design"}, kSpecOptions), more), circumstances);
}

/// `check` on the parts, with more words.
inline Outcome check_parts(const std::vector<std::string>& more, const Circumstances& circumstances = {}) {
  return run_bandwright(joined(joined({"check"}, kPartOptions), more), circumstances);
}

}  // namespace bandwright::test
