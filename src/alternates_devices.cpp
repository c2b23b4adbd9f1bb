// Another transistor in the same parts.
#include <tbb/parallel_for.h>

#include <algorithm>

#include "alternates_trial.hpp"

namespace bandwright {

namespace {

bool is_named(const Spec& spec, const Catalogue& catalogue, const Transistor& t) {
  return spec.devices.empty() || std::any_of(spec.devices.begin(), spec.devices.end(), [&](const std::string& type) {
           return catalogue.find_transistor(type) == &t;
         });
}

/// Outcomes with another transistor; one whose figures are incomplete does not hold.
Outcome with_transistor(const Spec& spec, const Catalogue& catalogue, const Candidate& candidate, const Transistor& t) {
  try {
    const BipolarParameters device = derive_parameters(t).parameters;
    return tried(spec, catalogue, candidate, device, candidate.offered, TrialDepth::where_it_may_hold).outcome;
  } catch (const InputError&) {
    return {};
  }
}

}  // namespace

std::vector<Substitute> substitutes(const Spec& spec, const Catalogue& catalogue, const Candidate& candidate) {
  const Transistor* chosen = catalogue.find_transistor(candidate.device);
  std::vector<const Transistor*> others;
  for (const Transistor& t : catalogue.transistors)
    if (t.pnp == candidate.parameters.pnp && &t != chosen) others.push_back(&t);
  std::vector<Substitute> list(others.size());
  tbb::parallel_for(std::size_t(0), others.size(), [&](std::size_t i) {
    const Transistor& t = *others[i];
    list[i] = {t.type, is_named(spec, catalogue, t), with_transistor(spec, catalogue, candidate, t), t.packages,
               chosen != nullptr ? lead_warning(*chosen, t) : ""};
  });
  std::erase_if(list, [](const Substitute& one) { return !one.outcome.holds; });
  std::sort(list.begin(), list.end(), [](const Substitute& a, const Substitute& b) {
    if (more_capable(a.outcome, b.outcome) || more_capable(b.outcome, a.outcome))
      return more_capable(a.outcome, b.outcome);
    return a.device < b.device;
  });
  return list;
}

}  // namespace bandwright
