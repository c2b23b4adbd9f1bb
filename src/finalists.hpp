// From what the search found to the list: finalists are assessed, then ranked by what the assessment says.
#pragma once

#include <bandwright/design.hpp>
#include <bandwright/search.hpp>

namespace bandwright {

/// Indices of the alternatives worth assessing, some more than are listed, and of the most exact one.
std::vector<std::size_t> finalists_of(const std::vector<Standing>& found, RankBy by, std::size_t listed);

/// Candidates in full, side by side.
std::vector<Candidate> assemble_all(const Spec& spec, const Catalogue& catalogue,
                                    const std::vector<DerivedDevice>& devices, const std::vector<Found>& found,
                                    int threads);

/// Assesses every active candidate, side by side; the answer does not depend on the number of threads.
void assess_all(const Spec& spec, const DesignOptions& options, std::vector<Candidate>& candidates);

/// The list: in order, at most as many as the spec asks for, the most exact among them; ranks, titles, marks.
void rank(DesignResult& result, std::vector<Candidate> finalists);

/// Tolerance allocation of the first candidate.
void allocate(const Spec& spec, const Catalogue& catalogue, DesignResult& result);

}  // namespace bandwright
