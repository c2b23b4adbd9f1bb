// Design: from a spec to ranked candidates; and the same for given parts.
//
//   Spec spec = read_spec(text, "stage.json");
//   DesignResult result = design(spec, built_in_catalogue(), {});
//   for (const Candidate& c : result.candidates) ...
#pragma once

#include <array>
#include <bandwright/alternates.hpp>
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
#include <optional>
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
  Part transistor;
  WorstStress stress;
  std::vector<StressRow> stress_table;
  PartValues working_values{};  ///< values at work, ohm and farad
  OfferedParts offered;         ///< as bought: value, family, tolerance; points into the catalogue
  Standing standing;            ///< what the order looks at
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
  std::optional<Assessment> assessment;      ///< what becomes of many units; only where the stage is active
  std::optional<Allocation> allocation;      ///< on request, of the first candidate
  std::optional<Alternates> alternates;      ///< on request
  bool non_dominated =
      false;  ///< no other is as good in error, capability, current and number of parts, and better in one
};

struct DesignResult {
  Spec spec;
  RankBy ranked_by = RankBy::capability;
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

/// How the search is run and what is computed beside it. Threads never change the answer.
struct DesignOptions {
  RankBy rank_by = RankBy::capability;
  int threads = 0;                               ///< 0: as many as there are
  bool with_response = false;                    ///< response, envelope, histograms, node voltages of each candidate
  bool allocate = false;                         ///< tolerance allocation of the first candidate
  bool alternates = false;                       ///< what may stand in for each part of each candidate
  std::function<bool(double share)> keep_going;  ///< called now and then with the share done; false stops early
};

/// Searches. Throws InputError where the spec names a device that the catalogue does not hold.
DesignResult design(const Spec& spec, const Catalogue& catalogue, const DesignOptions& options = {});

/// Recomputes given parts with one device. Requirements, where the spec has any, are compared.
DesignResult check(const Spec& spec, const Catalogue& catalogue, const std::string& device, const PartChoices& parts,
                   const DesignOptions& options = {});

}  // namespace bandwright
