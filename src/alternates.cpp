// Alternates of a candidate, and of all that are listed.
#include <tbb/info.h>
#include <tbb/task_arena.h>

#include <algorithm>

#include "alternates_trial.hpp"

namespace bandwright {

Alternates alternates_of(const Spec& spec, const Catalogue& catalogue, const Candidate& candidate) {
  return {if_unavailable(spec, catalogue, candidate), substitutes(spec, catalogue, candidate),
          gain_needed(spec, catalogue, candidate)};
}

void add_alternates(const Spec& spec, const Catalogue& catalogue, const DesignOptions& options, DesignResult& result) {
  const int most = tbb::info::default_concurrency();
  tbb::task_arena arena(options.threads > 0 ? std::min(options.threads, most) : most);
  arena.execute([&] {
    for (Candidate& c : result.candidates) c.alternates = alternates_of(spec, catalogue, c);
  });
}

}  // namespace bandwright
