// Other values in the same roles: the next one up and down, and one value for two roles.
#include <tbb/parallel_for.h>

#include <algorithm>
#include <optional>

#include "alternates_trial.hpp"

namespace bandwright {

namespace {

/// A place in a design for which a value is looked for.
struct Place {
  const Spec& spec;
  const OfferedParts& parts;
  Role role;
  std::vector<OfferedValue> offered;
};

Place place_of(const Spec& spec, const Catalogue& catalogue, const Candidate& candidate, Role role) {
  return {spec, candidate.offered, role, offered_values(catalogue, spec, role)};
}

/// The preferred one of values that are printed alike: of a family, else the first offered; what the stock lacks last.
std::optional<OfferedValue> offered_as(const Place& place, double printed, const Family* family) {
  const OfferedValue* best = nullptr;
  int best_rank = -1;
  for (const OfferedValue& o : place.offered) {
    if (o.connection != Connection::single || !same_print(o.value, printed)) continue;
    const bool enough = shortage(place.spec, with_part(place.parts, place.role, o)).empty();
    const int rank = 2 * int(enough) + int(o.family == family);
    if (rank > best_rank) best = &o, best_rank = rank;
  }
  return best != nullptr ? std::optional(*best) : std::nullopt;
}

/// The nearest printed value on a side of the one in place.
std::optional<OfferedValue> next_value(const Place& place, bool up) {
  const OfferedValue& in_place = place.parts[index(place.role)];
  const OfferedValue* nearest = nullptr;
  for (const OfferedValue& o : place.offered) {
    const bool on_side = up ? o.value > in_place.value : o.value < in_place.value;
    if (o.connection != Connection::single || !on_side || same_print(o.value, in_place.value)) continue;
    if (nearest == nullptr || (up ? o.value < nearest->value : o.value > nearest->value)) nearest = &o;
  }
  if (nearest == nullptr) return std::nullopt;
  return offered_as(place, nearest->value, in_place.family);
}

std::vector<IfUnavailable> next_values(const Spec& spec, const Catalogue& catalogue, const Candidate& candidate) {
  std::vector<IfUnavailable> list;
  for (const RoleInfo& r : roles()) {
    if (!is_open(spec, candidate, r.role)) continue;
    const Place place = place_of(spec, catalogue, candidate, r.role);
    for (const bool up : {false, true}) {
      const auto value = next_value(place, up);
      if (value) list.push_back({r.role, up, *value, {}});
    }
  }
  return list;
}

bool may_share(const Spec& spec, const Candidate& c, Role a, Role b) {
  const OfferedValue& x = c.offered[index(a)];
  return a != b && info(a).kind == info(b).kind && is_open(spec, c, a) && is_open(spec, c, b) &&
         x.connection == Connection::single && !same_print(x.value, c.offered[index(b)].value);
}

std::vector<Consolidation> shared_values(const Spec& spec, const Catalogue& catalogue, const Candidate& c) {
  std::vector<Consolidation> list;
  const double before = c.assessment ? c.assessment->capability : kNotComputed;
  for (const RoleInfo& changed : roles()) {
    if (!is_open(spec, c, changed.role)) continue;
    const Place place = place_of(spec, catalogue, c, changed.role);
    for (const RoleInfo& kept : roles()) {
      if (!may_share(spec, c, kept.role, changed.role)) continue;
      const OfferedValue& in_place = c.offered[index(kept.role)];
      const auto value = offered_as(place, in_place.value, in_place.family);
      if (value) list.push_back({kept.role, changed.role, *value, before, {}});
    }
  }
  return list;
}

}  // namespace

std::vector<IfUnavailable> if_unavailable(const Spec& spec, const Catalogue& catalogue, const Candidate& candidate) {
  std::vector<IfUnavailable> list = next_values(spec, catalogue, candidate);
  tbb::parallel_for(std::size_t(0), list.size(), [&](std::size_t i) {
    IfUnavailable& one = list[i];
    const Trial t = tried(spec, catalogue, candidate, candidate.parameters,
                          with_part(candidate.offered, one.role, one.value), TrialDepth::full);
    one.value = t.parts[index(one.role)];
    one.outcome = t.outcome;
  });
  return list;
}

std::vector<Consolidation> consolidations(const Spec& spec, const Catalogue& catalogue, const Candidate& candidate) {
  std::vector<Consolidation> list = shared_values(spec, catalogue, candidate);
  tbb::parallel_for(std::size_t(0), list.size(), [&](std::size_t i) {
    Consolidation& one = list[i];
    const Trial t = tried(spec, catalogue, candidate, candidate.parameters,
                          with_part(candidate.offered, one.changed, one.value), TrialDepth::where_it_may_hold);
    one.value = t.parts[index(one.changed)];
    one.outcome = t.outcome;
  });
  std::erase_if(list, [](const Consolidation& one) { return !one.outcome.holds; });
  std::stable_sort(list.begin(), list.end(),
                   [](const Consolidation& a, const Consolidation& b) { return more_capable(a.outcome, b.outcome); });
  return list;
}

}  // namespace bandwright
