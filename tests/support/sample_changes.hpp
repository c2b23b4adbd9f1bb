// A stage with its alternates, and its verdicts drawn anew, for tests.
#pragma once

#include <bandwright/design.hpp>
#include <string>

namespace bandwright::test {

/// A split-emitter stage of our own on 12 V whose values are all open, E24 resistors and E12 capacitors. `more`:
/// further members of the spec, each with a comma in front.
Spec changeable_spec(const std::string& requirements, const std::string& more = "");

/// The stage checked with BC547B.
Candidate changeable_candidate(const Spec& spec);

/// Its parts as choices, one of them changed.
PartChoices choices_of(const Candidate& candidate);
PartChoices with_choice(PartChoices choices, Role role, const OfferedValue& value);

Candidate checked(const Spec& spec, const std::string& device, const PartChoices& parts);

/// Whether a checked stage holds its spec, drawn from limits, notes and the stress table, without the library's own
/// words for it.
bool holds_the_spec(const Spec& spec, const Candidate& candidate);

/// The same numbers, bit for bit; NaN equals NaN.
bool same_numbers(double a, double b);
bool same_figures(const FigureValues& a, const FigureValues& b);

/// R1, R2, R3 and so on to C4 of the stage.
inline constexpr PartValues kChangeable = {82e3, 22e3, 3.9e3, 62, 1.2e3, 4.7e-6, 1e-6, 100e-6, 2.7e-9};

/// Requirements that some neighbours meet and some miss.
inline const char* const kChangeableRequirements =
    R"({"gain": {"target": 32, "tolerance": "12 %"}, "lower_cutoff": {"max": "40 Hz"},
        "upper_cutoff": {"target": "19.5 kHz", "tolerance": "22 %"}})";

}  // namespace bandwright::test
