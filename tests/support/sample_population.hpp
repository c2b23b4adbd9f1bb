// A design and all its units, for tests: a split-emitter stage of our own on 12 V.
#pragma once

#include <bandwright/assessment.hpp>
#include <bandwright/design.hpp>

namespace bandwright::test {

/// A spec with requirements, its parts as bought, and the nominal analysis.
struct SampleDesign {
  Spec spec;
  BipolarParameters device;
  OfferedParts parts;
  Analysis nominal;

  Population population() const { return population_of(spec, device, parts, nominal); }
};

/// `requirements`: JSON of the spec's requirements; `more`: further members, each with a comma in front.
SampleDesign sample_design(const std::string& requirements, const std::string& more = "");

inline const char* const kBandRequirements =
    R"({"gain": {"target": 32, "tolerance": "4 %"}, "lower_cutoff": {"target": "27 Hz", "tolerance": "20 %"},
        "upper_cutoff": {"target": "19.5 kHz", "tolerance": "6 %"}})";

/// Supply 12 V 5 %, 0 to 45 °C.
inline const char* const kFourCorners = R"(, "ambient": {"min": "0 °C", "max": "45 °C"})";

}  // namespace bandwright::test
