// Reading candidates that are to be compared: which are taken, and every fault of a document.
#include <algorithm>
#include <bandwright/fault.hpp>
#include <bandwright/report.hpp>
#include <cmath>

#include "catch.hpp"
#include "comparison_documents.hpp"
#include "sample_result.hpp"

using namespace bandwright;
using namespace bandwright::test;
using Catch::Matchers::ContainsSubstring;
using Catch::Matchers::StartsWith;

namespace {

std::string faults_of(const Json& document, const std::vector<int>& ranks = {}) {
  try {
    read_compared(document.dump(), "file.json", ranks);
  } catch (const InputError& fault) {
    return fault.what();
  }
  return "";
}

std::vector<int> ranks_of(const Comparison& comparison) {
  std::vector<int> ranks;
  for (const ComparedCandidate& one : comparison.candidates) ranks.push_back(one.stated.rank);
  return ranks;
}

}  // namespace

TEST_CASE("without a pick the first is taken, then the non-dominated, then those with a title, five at most") {
  std::vector<Json> all;
  for (int rank = 1; rank <= 9; ++rank) all.push_back(candidate(rank));
  for (Json& one : all) one["non_dominated"] = false;
  CHECK(ranks_of(compared({document(all)})) == std::vector<int>{1, 2});
  for (const int position : {3, 7, 8}) all[position]["non_dominated"] = true;
  for (const int position : {2, 5}) all[position]["best_at"] = {"most exact"};
  CHECK(ranks_of(compared({document(all)})) == std::vector<int>{1, 3, 4, 8, 9});
  CHECK(ranks_of(compared({document(all)}, {7, 2})) == std::vector<int>{7, 2});
}

TEST_CASE("what is no result document, or of another version, is refused") {
  Json other = document({candidate(1)});
  other["format"] = "bandwright/comparison";
  CHECK_THAT(faults_of(other), StartsWith("file.json: format: found \"bandwright/comparison\""));
  other["format"] = "bandwright/result";
  other["version"] = 2;
  CHECK_THAT(faults_of(other), StartsWith("file.json: version: found \"2\""));
  for (const Json& odd : {Json::array(), Json(3), Json::object()})
    CHECK_THAT(faults_of(odd), StartsWith("file.json: "));
  CHECK_THAT(faults_of(document({})), ContainsSubstring("at least one candidate"));
}

TEST_CASE("every fault of a document is told at once, with its place") {
  Json all = document({candidate(1), candidate(2)});
  all["spec"]["supply"] = "12 Hz";
  Json& one = all["candidates"][1];
  one["error"] = "small";
  one["parts"][0]["value"] = -1;
  one["parts"][1]["role"] = "base";
  one["parts"][2]["tolerance"] = {0.1};
  one["parts"][4]["role"] = "output_coupling";
  one["yield"]["passed"] = 20001;
  one["worst_case"] = "wide";
  one.erase("device");
  const std::string text = faults_of(all, {1, 2, 7});
  for (const char* place :
       {"file.json: spec.supply", "candidates[1].error", "candidates[1].parts[0].value", "candidates[1].parts[1].role",
        "candidates[1].parts[2].tolerance", "candidates[1].parts[5].role", "candidates[1].yield.passed",
        "candidates[1].worst_case", "candidates[1].device", "no candidate of rank 7"})
    CHECK_THAT(text, ContainsSubstring(place));
  CHECK(std::count(text.begin(), text.end(), '\n') == 9);  // ten faults and no other
}

TEST_CASE("a document as the program writes it reads back as it was") {
  DesignResult result = test::sample_result();
  result.spec.topologies = {"common-emitter"};
  const Comparison comparison = compared({Json::parse(write_json(result))});
  REQUIRE(ranks_of(comparison) == std::vector<int>{1, 2});
  for (std::size_t i = 0; i < 2; ++i) {
    const Candidate& stated = comparison.candidates[i].stated;
    const Candidate& written = result.candidates[i];
    CHECK(stated.error == written.error);
    CHECK(stated.best_at == written.best_at);
    CHECK(stated.non_dominated == written.non_dominated);
    CHECK(stated.assessment->capability == written.assessment->capability);
    CHECK(stated.assessment->yield.low == written.assessment->yield.low);
    CHECK(stated.assessment->verdict == written.assessment->verdict);
    CHECK(stated.shortfalls.size() == written.shortfalls.size());
    REQUIRE(stated.parts.size() == written.parts.size());
    for (std::size_t p = 0; p < stated.parts.size(); ++p)
      CHECK(stated.parts[p].tolerance == written.parts[p].tolerance);
    for (const FigureInfo& figure : figures()) {
      INFO(figure.key);
      const double value = written.analysis.figures[index(figure.figure)];
      const double read = stated.analysis.figures[index(figure.figure)];
      CHECK((read == value || (std::isnan(read) && std::isnan(value))));
    }
  }
}
