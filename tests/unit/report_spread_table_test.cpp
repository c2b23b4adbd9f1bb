// The sheet's sections on built units: yield, worst case, spread, causes and tolerance allocation.
#include <bandwright/report.hpp>

#include "catch.hpp"
#include "sample_assessment.hpp"
#include "sample_result.hpp"

using namespace bandwright;
using Catch::Matchers::ContainsSubstring;

namespace {

constexpr TableStyle kWide{false, 200};  // nothing is wrapped

Assessment& first_assessment(DesignResult& result) { return *result.candidates[0].assessment; }

// The line that begins with a text, without its indent; empty where there is none.
std::string line_of(const std::string& text, const std::string& beginning) {
  const std::size_t at = text.find("\n  " + beginning);
  return at == std::string::npos ? "" : text.substr(at + 3, text.find('\n', at + 1) - at - 3);
}

// From a heading to the next empty line.
std::string section(const std::string& text, const std::string& heading) {
  const std::size_t at = text.find("\n" + heading);
  return at == std::string::npos ? "" : text.substr(at, text.find("\n\n", at) - at + 1);
}

}  // namespace

TEST_CASE("the second line says what limits the first candidate") {
  DesignResult result = test::sample_result();
  CHECK_THAT(
      write_table(result, kWide),
      ContainsSubstring("\nCandidate 1 as built: pass with notes; yield 99.2 %; lower cutoff fails most, at 0 °C, "
                        "12.6 V; C3 makes 61 % of its spread.\n"));
  for (FigureSpread& spread : first_assessment(result).spread) spread.failed = 0;
  CHECK_THAT(write_table(result, kWide), ContainsSubstring("lower cutoff comes nearest to its limit, capability 0.81; "
                                                           "C3 makes 61 % of its spread.\n"));
  for (FigureSpread& spread : first_assessment(result).spread) spread.capability = 2;
  CHECK_THAT(write_table(result, kWide),
             ContainsSubstring("yield 99.2 %; every requirement is far from its limits.\n"));
  first_assessment(result).yield.not_active = 160;
  first_assessment(result).yield.least_active_at = 1;
  CHECK_THAT(write_table(result, kWide), ContainsSubstring("most units that fail are not active at 0 °C, 11.4 V.\n"));
  result.candidates.pop_back();
  CHECK_THAT(write_table(result, kWide), ContainsSubstring("\nAs built: pass with notes"));
}

TEST_CASE("the heading of the ranking is the order's reason") {
  DesignResult result = test::sample_result();
  for (const RankOrder& order : rank_orders()) {
    result.ranked_by = order.by;
    CHECK_THAT(write_table(result, kWide), ContainsSubstring(std::string("\nCandidates: ") + order.reason + "\n"));
  }
}

TEST_CASE("each order shows what it looks at, on a narrow page too") {
  DesignResult result = test::sample_result();
  const std::pair<RankBy, const char*> headings[] = {{RankBy::capability, "capability"},
                                                     {RankBy::error, "error"},
                                                     {RankBy::sensitivity, "sensitivity"},
                                                     {RankBy::yield, "yield"},
                                                     {RankBy::worst_case, "margin"},
                                                     {RankBy::current, "ICC"},
                                                     {RankBy::parts, "parts"}};
  for (const auto& [by, heading] : headings) {
    result.ranked_by = by;
    const std::string ranking = section(write_table(result, {false, 80}), "Candidates: ");
    const std::size_t columns = ranking.find("rank  device");
    INFO(ranking);
    REQUIRE(columns != std::string::npos);
    CHECK_THAT(ranking.substr(columns, ranking.find("*1") - columns), ContainsSubstring(heading));
  }
}

TEST_CASE("capability and yield stand in the ranking, and the candidate that nothing beats is marked") {
  const std::string text = write_table(test::sample_result(), kWide);
  CHECK_THAT(line_of(text, "  *1  BC547B"), ContainsSubstring("0.300        0.81  99.2 %  1.25 mA"));
  CHECK_THAT(line_of(text, "   2  BC547B"), ContainsSubstring("-0.20    91 %"));
  CHECK_THAT(text, ContainsSubstring("*: none of the others is at least as good"));
}

TEST_CASE("candidates that were not assessed keep the first-order measure") {
  DesignResult result = test::sample_result();
  for (Candidate& one : result.candidates) one.assessment.reset();
  const std::string text = write_table(result, kWide);
  CHECK_THAT(text, ContainsSubstring("tolerance sensitivity: 1 where"));
  CHECK_THAT(text, !ContainsSubstring("yield ") && !ContainsSubstring("Spread of built units"));
}

TEST_CASE("the first candidate is compared with the most exact one") {
  DesignResult result = test::sample_result();
  CHECK_THAT(write_table(result, kWide), !ContainsSubstring("against the most exact"));
  result.candidates[0].best_at = {};
  result.candidates[1].best_at = {"lowest current", "most exact"};
  CHECK_THAT(
      write_table(result, kWide),
      ContainsSubstring("Candidate 1 against the most exact (rank 2): capability 0.81 against -0.20, yield 99.2 % "
                        "against 91 %."));
}

TEST_CASE("the yield is told with its units, its conditions and its interval") {
  DesignResult result = test::sample_result();
  CHECK_THAT(
      write_table(result, kWide),
      ContainsSubstring("19,840 of 20,000 units pass at nominal and at four corners: 99.2 % (95 % interval 99.07 "
                        "to 99.32 %), seed 7."));
  CHECK_THAT(write_table(result, kWide), !ContainsSubstring("not active at some condition"));
  first_assessment(result).yield.not_active = 1200;
  first_assessment(result).yield.least_active_at = 3;
  first_assessment(result).population.conditions.resize(1);
  first_assessment(result).population.conditions.resize(4, {11.4, 333.15});
  const std::string text = write_table(result, kWide);
  CHECK_THAT(text, ContainsSubstring("at nominal and at three corners"));
  CHECK_THAT(text, ContainsSubstring("1,200 units are not active at some condition, most often at 60 °C, 11.4 V."));
}

TEST_CASE("each figure stands with its worst case, its spread and its failures") {
  const std::string text = section(write_table(test::sample_result(), kWide), "Spread of built units");
  for (const char* row : {"gain 49.33 46.1 to 52.7 47.5 to 51.2 1 % 2.00 0",
                          "lower cutoff 41.7 Hz 33.2 to 51.9 Hz 35.1 to 48.8 Hz 4 % 0.81 150",
                          "upper cutoff 20.12 kHz 18.9 to 21.2 kHz 19.4 to 20.8 kHz 1.5 % 1.25 12",
                          "collector current 1.03 mA 930 µA to 1.14 mA 970 µA to 1.09 mA"}) {
    std::string squeezed;  // runs of spaces as one
    for (const char c : text)
      if (c != ' ' || !squeezed.ends_with(' ')) squeezed += c;
    CHECK_THAT(squeezed, ContainsSubstring(std::string("\n ") + row));
  }
  CHECK_THAT(text, ContainsSubstring("- lower cutoff: least at C3 max, 60 °C, 11.4 V; largest at C3 min, C1 min, 0 °C, "
                                     "12.6 V"));
  CHECK_THAT(text, ContainsSubstring("Nominally met; in the worst case not met; yield 99.2 % where 99 % is asked."));
}

TEST_CASE("a worst case that does not exist gives its reason, once") {
  DesignResult result = test::sample_result();
  const std::string reason = "the nominal unit at 60 °C, 11.4 V: not active: VCE would be 0.1 V";
  for (const Figure figure : {Figure::gain, Figure::lower_cutoff}) {
    first_assessment(result).worst_case[index(figure)] = {};
    first_assessment(result).worst_case[index(figure)].reason = reason;
  }
  const std::string text = write_table(result, kWide);
  CHECK_THAT(text, ContainsSubstring("- no worst case of gain, lower cutoff: " + reason));
  CHECK(text.find(reason) == text.rfind(reason));
  CHECK_THAT(text, !ContainsSubstring(" nan"));
}

TEST_CASE("causes stand by their largest share, small ones are left out") {
  DesignResult result = test::sample_result();
  const std::string text = section(write_table(result, kWide), "Who makes the spread");
  const auto place = [&](const char* cause) { return text.find(std::string("\n  ") + cause); };
  REQUIRE(place("hFE current gain") != std::string::npos);
  CHECK(place("R3 collector") < place("Cwo wiring"));
  CHECK(place("Cwo wiring") < place("C3 bypass"));
  CHECK(place("C3 bypass") < place("C1 input coupling"));
  CHECK(place("C1 input coupling") < place("hFE current gain"));
  CHECK(place("VA Early voltage") == std::string::npos);  // 0.5 %
  CHECK_THAT(line_of(text, "C3 bypass"), ContainsSubstring("-0.33   61 %"));
}

TEST_CASE("what varies is told with limits, distribution and grounds") {
  DesignResult result = test::sample_result();
  const std::string text = section(write_table(result, kWide), "What varies");
  CHECK_THAT(line_of(text, "R1 R2 R3 R4 R5 C1 C3"), ContainsSubstring("±10 %") && ContainsSubstring("tolerance"));
  CHECK_THAT(line_of(text, "C2 "), ContainsSubstring("-20/+50 %"));
  CHECK_THAT(line_of(text, "VBE"), ContainsSubstring("±40 mV") && ContainsSubstring("assumed"));
  CHECK_THAT(text, ContainsSubstring("Distribution: normal, 3 sigma at the limits, truncated there."));
  CHECK_THAT(text, ContainsSubstring("±50 ppm/K of R1 R2 R3 R4 R5, ±200 ppm/K of C1 C2 C3."));
  CHECK_THAT(text, ContainsSubstring("Capacitance lost below 20 °C: 0.5 %/K of C2 C3."));
  CHECK_THAT(text, ContainsSubstring("- switched off: ICBO collector cutoff current"));
  CHECK_THAT(text, ContainsSubstring("- taken as exact: ") && ContainsSubstring("RL load resistance"));
}

TEST_CASE("the allocation answers in one sentence first") {
  DesignResult result = test::sample_result();
  CHECK_THAT(write_table(result, kWide), !ContainsSubstring("Tolerance allocation"));
  Allocation& allocation = result.candidates[0].allocation.emplace(test::sample_allocation());
  std::string text = write_table(result, kWide);
  CHECK_THAT(text, ContainsSubstring("Tolerance allocation\n  R3 and R4 need 1 %, C2 needs 10 % polyester film; all "
                                     "others may be at their loosest: 5 %, -20/+50 %.\n"));
  CHECK_THAT(text, ContainsSubstring("19,900 of 20,000 units pass: 99.5 %; 99 % is asked."));
  CHECK_THAT(section(text, "Tolerance allocation"), ContainsSubstring("the loosest"));
  CHECK_THAT(line_of(text, "C2         -20/+50 %"),
             ContainsSubstring("±10 % polyester film          98 %       99.5 %"));
  for (AllocatedPart& part : allocation.parts) part.needed = part.loosest;
  allocation.steps.clear();
  text = write_table(result, kWide);
  CHECK_THAT(text, ContainsSubstring("Every part may be at its loosest: 5 %, -20/+50 %."));
  CHECK_THAT(text, !ContainsSubstring("tightened"));
  allocation.reached = false;
  CHECK_THAT(write_table(result, kWide), ContainsSubstring("Tighter tolerances alone do not give the yield"));
}

TEST_CASE("without a requirement units are only active or not") {
  DesignResult result = test::sample_result();
  result.candidates.pop_back();
  result.searched = false;
  result.spec.requirements = {};
  const std::string text = write_table(result, kWide);
  CHECK_THAT(text, ContainsSubstring("19,840 of 20,000 units are active at nominal and at four corners"));
  CHECK_THAT(text, !ContainsSubstring("Verdict") && !ContainsSubstring("As built") && !ContainsSubstring("failed:"));
}
