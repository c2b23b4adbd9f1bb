// What the writers of a comparison share: names, measures, the first line, what differs.
#pragma once

#include <array>
#include <bandwright/report.hpp>
#include <string>
#include <vector>

namespace bandwright {

using Compared = std::vector<ComparedCandidate>;

/// Positions of candidates in a comparison, rising.
using Positions = std::vector<std::size_t>;

std::string compared_name(std::size_t position);  ///< "A"

/// "result.json, rank 2"; the file is left out where all are of one.
std::string origin_text(const Compared& list, std::size_t position);

/// "A, B and C" with `last` "and".
std::string enumerated(const std::vector<std::string>& items, const char* last);
std::string names_of(const Positions& positions, const char* last);

/// A number by which candidates are told apart.
struct ComparedMeasure {
  const char* key;     ///< in JSON and CSV: "supply_current"
  const char* label;   ///< "number of parts"
  const char* noun;    ///< behind `better` or `best`: "parts"
  const char* better;  ///< "the lower", of two
  const char* best;    ///< "the lowest", of more
  bool higher_is_better;
  bool is_count;                      ///< a whole number
  double (*value)(const Candidate&);  ///< NaN: not stated
  std::string (*text)(const Candidate&);
};
const std::vector<ComparedMeasure>& compared_measures();

/// The required figures whose capability is the candidate's.
std::vector<Figure> least_capable_figures(const ComparedCandidate& one);

/// "A or B: A has the higher capability (2.00 against 1.49); B the smaller error (0.023 against 0.062)."
std::string choice_text(const Compared& list);

/// How the specs of the documents differ: "gain: 28.2 to 35.5 (A), 44.7 to 56.2 (B)".
std::vector<std::string> differing_requirements(const Compared& list);
std::vector<std::string> differing_conditions(const Compared& list);

/// "The requirements differ: ...; margins are then not comparable.", and the same of conditions; nothing where all are
/// alike.
std::vector<std::string> difference_texts(const Compared& list);

/// Figures that any of the specs requires.
std::vector<Figure> required_by_any(const Compared& list);

/// The part in a role; nullptr: absent.
const Part* part_of(const Candidate& candidate, Role role);

/// In what the parts of one role differ.
struct PartDifference {
  bool presence = false, value = false, tolerance = false, family = false, rating = false;
  bool any() const { return presence || value || tolerance || family || rating; }
};
PartDifference part_difference(const Compared& list, Role role);
bool devices_differ(const Compared& list);

/// The rating that matters: a resistor's power, a capacitor's voltage; NaN: not stated.
double rating_of(const Part& part);

}  // namespace bandwright
