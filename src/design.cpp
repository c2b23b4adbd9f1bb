// The whole pipeline: the file to read first.
//
//   spec -> catalogue -> device -> stage -> analysis -> margins -> assessment -> ranking -> search -> purchase ->
//   report
#include <algorithm>
#include <bandwright/design.hpp>
#include <bandwright/search.hpp>
#include <cmath>

#include "alternates_trial.hpp"
#include "assemble.hpp"
#include "finalists.hpp"

namespace bandwright {

DesignResult design(const Spec& spec, const Catalogue& catalogue, const DesignOptions& options) {
  if (auto faults = check_against_catalogue(spec, catalogue); !faults.empty()) throw InputError(std::move(faults));
  DesignResult result = empty_result(spec, catalogue, options.rank_by);

  std::vector<DerivedDevice> devices;
  for (const Transistor* t : fitting_transistors(spec, catalogue)) devices.push_back(derive_parameters(*t));
  const std::vector<Dropped> dropped = screen_devices(spec, devices);
  for (const Dropped& d : dropped) result.dropped.push_back(d.reason);
  std::vector<DerivedDevice> left;
  for (std::size_t i = 0; i < devices.size(); ++i) {
    const bool is_out = std::any_of(dropped.begin(), dropped.end(), [i](const Dropped& d) { return d.device == i; });
    if (!is_out) left.push_back(devices[i]);
  }
  // where a ceiling rules out every device the nearest candidates are still shown
  const std::vector<DerivedDevice>& tried = left.empty() ? devices : left;

  const SearchOutcome outcome = search(spec, catalogue, tried, {options.rank_by, options.threads, options.keep_going});
  result.interrupted = outcome.interrupted;

  std::vector<Standing> standings;
  for (const Found& f : outcome.found) standings.push_back(f.standing);
  std::vector<Found> chosen;
  for (std::size_t i : finalists_of(standings, options.rank_by, static_cast<std::size_t>(spec.candidates)))
    chosen.push_back(outcome.found[i]);
  std::vector<Candidate> finalists = assemble_all(spec, catalogue, tried, chosen, options.threads);
  assess_all(spec, options, finalists);
  rank(result, std::move(finalists));
  if (options.allocate) allocate(spec, catalogue, result);
  if (options.alternates) add_alternates(spec, catalogue, options, result);
  finish(result, tried, outcome.nearest_miss);
  return result;
}

DesignResult check(const Spec& spec, const Catalogue& catalogue, const std::string& device, const PartChoices& choices,
                   const DesignOptions& options) {
  if (auto faults = check_against_catalogue(of_given_parts(spec, device), catalogue); !faults.empty()) {
    for (Fault& f : faults) {
      if (f.where == "devices[0]") f.where = "device";
    }
    throw InputError(std::move(faults));
  }
  const std::vector<DerivedDevice> devices = {derive_parameters(*catalogue.find_transistor(device))};
  OfferedParts parts;
  for (const RoleInfo& r : roles())
    parts[index(r.role)] = resolve_value(catalogue, spec, r.role, choices[index(r.role)]);
  DesignResult result = empty_result(spec, catalogue, options.rank_by);
  result.searched = false;
  std::vector<Candidate> one = {assemble(spec, devices.front(), catalogue, parts)};
  assess_all(spec, options, one);
  rank(result, std::move(one));
  if (options.allocate) allocate(spec, catalogue, result);
  if (options.alternates) add_alternates(spec, catalogue, options, result);
  finish(result, devices, "");
  return result;
}

}  // namespace bandwright
