// Design: from a spec to ranked candidates; and the same for given parts.
//
//   Spec spec = read_spec(text, "stage.json");
//   DesignResult result = design(spec, built_in_catalogue(), {});
//   for (const Candidate& c : result.candidates) ...
#pragma once

#include <array>
#include <bandwright/analysis.hpp>
#include <bandwright/assessment.hpp>
#include <bandwright/catalogue.hpp>
#include <bandwright/device.hpp>
#include <bandwright/margins.hpp>
#include <bandwright/purchase.hpp>
#include <bandwright/ranking.hpp>
#include <bandwright/spec.hpp>
#include <bandwright/stage.hpp>
#include <functional>
#include <map>
#include <string>
#include <vector>

namespace bandwright {

/// One stage with everything that is reported of it.
struct Candidate {
  int rank = 1;
  std::vector<std::string> best_at;
  std::string topology = "common-emitter";
  std::string variant;
  std::string device;
  BipolarParameters parameters;
  std::array<double, 2> gain_limits{};  ///< beta0 min and max at the operating current, 25 °C
  std::vector<Part> parts;
  PartValues working_values{};  ///< values at work, ohm and farad
  Analysis analysis;            ///< analysis.figures are the figures
  PoleModel poles_estimate;
  PolesAndZeros poles;
  Sensitivity sensitivity{};
  double error = 0;
  double tolerance_sensitivity = kNotComputed;
  FigureValues margins{};  ///< NaN where not required or not active
  std::vector<Shortfall> shortfalls;
  std::map<std::string, std::string> notes;  ///< field to the reason why it is null, and hints
  std::vector<Package> packages;             ///< lead orders
};

struct DesignResult {
  Spec spec;
  RankBy ranked_by = RankBy::error;
  bool met = false;  ///< at least one candidate meets every requirement nominally
  bool interrupted = false;
  bool searched = true;  ///< false: given parts were recomputed
  std::vector<std::string> definitions;
  std::vector<std::string> assumptions;
  std::vector<std::string> from_memory;
  std::vector<std::string> dropped;       ///< devices left out, each with the ceiling that rules it out
  std::vector<std::string> explanations;  ///< why a requirement cannot be met, with numbers
  std::vector<Candidate> candidates;
};

/// How the search is run. None of these changes the answer, but for `keep_going`.
struct DesignOptions {
  RankBy rank_by = RankBy::error;
  int threads = 0;                               ///< 0: as many as there are
  std::function<bool(double share)> keep_going;  ///< called now and then with the share done; false stops early
};

/// Searches. Throws InputError where the spec names a device that the catalogue does not hold.
DesignResult design(const Spec& spec, const Catalogue& catalogue, const DesignOptions& options = {});

/// Recomputes given parts (0: absent) with one device. Requirements, where the spec has any, are compared.
DesignResult check(const Spec& spec, const Catalogue& catalogue, const std::string& device, const PartValues& values);

}  // namespace bandwright
