// Alternates: what a design becomes when one of its parts is another one.
//
// If a value is unavailable: the next value up and down in each role. Substitutes: another transistor in the same
// parts. Consolidation: one value for two roles. Each is assessed as the design itself is (same seed, same conditions);
// nothing is ever applied unasked. The answers do not depend on the number of threads.
#pragma once

#include <bandwright/catalogue.hpp>
#include <bandwright/margins.hpp>
#include <bandwright/spec.hpp>
#include <string>
#include <vector>

namespace bandwright {

struct Candidate;  // design.hpp

/// What becomes of a design with a change.
struct Outcome {
  FigureValues figures{};  ///< nominal; NaN where not active
  double error = kNotComputed;
  double capability = kNotComputed;
  bool from_moments = false;  ///< of the capability
  double yield = kNotComputed;
  std::string verdict;  ///< as of a candidate; empty where nothing is required
  bool active = false;
  bool rated = false;     ///< a rating for every part, the transistor within its derated limits
  bool available = true;  ///< the stock has enough of its parts for all boards
  /// Active, rated, available, every requirement nominally met, verdict not "not met".
  bool holds = false;
  std::vector<Shortfall> shortfalls;
  std::string reason;       ///< why it does not hold, in words
  std::string other_parts;  ///< what else must change: "C1: 25 V in place of 16 V"; empty: nothing
};

/// The next value in a role.
struct IfUnavailable {
  Role role = Role::collector;
  bool up = true;
  OfferedValue value;
  Outcome outcome;
};

/// Another transistor in the same parts.
struct Substitute {
  std::string device;
  bool named = true;  ///< the spec names it, or names none at all
  Outcome outcome;
  std::vector<Package> packages;
  std::string lead_warning;  ///< empty: leads as of the chosen one, and no source differs
};

/// The range of hFE in which every requirement holds: the nominal unit at the nominal condition and at every corner of
/// supply and ambient, all parts nominal. hFE as data sheets print it, at the design's IC and VCE; the whole curve of
/// the type moves with it.
struct GainNeeded {
  double min = kNotComputed;                ///< NaN: the nominal unit itself misses; 0: no lower bound
  double max = kNotComputed;                ///< infinite: no upper bound
  double collector_current = kNotComputed;  ///< A, where hFE is meant
  double collector_emitter_voltage = kNotComputed;
  std::vector<std::string> groups;  ///< types of the catalogue whose published range lies inside
};

/// Everything that may stand in for a part of a candidate.
struct Alternates {
  std::vector<IfUnavailable> if_unavailable;
  std::vector<Substitute> substitutes;
  GainNeeded gain_needed;
};

/// One value for two roles.
struct Consolidation {
  Role kept = Role::collector;  ///< whose value both take
  Role changed = Role::collector;
  OfferedValue value;  ///< of the changed role
  double capability_before = kNotComputed;
  Outcome outcome;
};

/// Next values down and up of every role that is not pinned, from what the spec and the stock offer as one part; a side
/// on which nothing is offered is left out.
std::vector<IfUnavailable> if_unavailable(const Spec& spec, const Catalogue& catalogue, const Candidate& candidate);

/// Transistors of the whole catalogue of the same polarity with which the spec still holds, highest capability first,
/// then by type; those that fail are left out.
std::vector<Substitute> substitutes(const Spec& spec, const Catalogue& catalogue, const Candidate& candidate);

GainNeeded gain_needed(const Spec& spec, const Catalogue& catalogue, const Candidate& candidate);

Alternates alternates_of(const Spec& spec, const Catalogue& catalogue, const Candidate& candidate);

/// Pairs of roles that may share a value while the spec still holds, highest capability first.
std::vector<Consolidation> consolidations(const Spec& spec, const Catalogue& catalogue, const Candidate& candidate);

/// "E-B-C", lead 1 first; empty where the lead order names no three leads.
std::string lead_letters(const Package& package);

/// Where the leads of `other` differ from those of `chosen` in the same package, where the two share no package, and
/// where sources of `other` differ; empty where none of it is so.
std::string lead_warning(const Transistor& chosen, const Transistor& other);

}  // namespace bandwright
