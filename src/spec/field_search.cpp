// Devices, topologies and the search.
#include <fmt/format.h>

#include "spec/field_groups.hpp"

namespace bandwright {

namespace {

constexpr const char* kTopology = "common-emitter";
constexpr double kMostCandidates = 1000;
constexpr double kMostSeed = 9007199254740992;  // 2^53: every whole number up to it is a double

std::string other_topology(const Reading& reading) {
  if (reading.names.empty()) return fmt::format("{}, the only topology of this version", kTopology);
  for (const std::string& name : reading.names)
    if (name != kTopology) return fmt::format("{}: no other topology is available in this version", kTopology);
  return "";
}

Field devices() {
  return {.path = "devices",
          .option = "devices",
          .shape = Shape::names,
          .help = "transistor types to choose from",
          .usual = "every fitting one",
          .store = [](Draft& draft, const Reading& reading) { draft.spec.devices = reading.names; },
          .show = [](const Spec& spec) { return spec.devices.empty() ? Json(nullptr) : Json(spec.devices); }};
}

Field topologies() {
  return {.path = "topologies",
          .option = "topologies",
          .shape = Shape::names,
          .help = "topologies to choose from",
          .usual = kTopology,
          .refuse = other_topology,
          .store = [](Draft& draft, const Reading& reading) { draft.spec.topologies = reading.names; },
          .show = [](const Spec& spec) { return Json(spec.topologies); }};
}

Field candidates() {
  return {.path = "search.candidates",
          .option = "candidates",
          .shape = Shape::count,
          .allowed = {1, kMostCandidates},
          .help = "how many candidates are listed at most",
          .usual = "10",
          .store = [](Draft& draft, const Reading& r) { draft.spec.candidates = static_cast<int>(r.number); },
          .show = [](const Spec& spec) { return Json(spec.candidates); }};
}

Field seed() {
  return {.path = "search.seed",
          .option = "seed",
          .shape = Shape::count,
          .allowed = {0, kMostSeed},
          .help = "seed of the search; the same seed gives the same answer",
          .usual = "1",
          .store = [](Draft& draft, const Reading& r) { draft.spec.seed = static_cast<std::uint64_t>(r.number); },
          .show = [](const Spec& spec) { return Json(spec.seed); }};
}

}  // namespace

std::vector<Field> search_fields() { return {devices(), topologies(), candidates(), seed()}; }

}  // namespace bandwright
