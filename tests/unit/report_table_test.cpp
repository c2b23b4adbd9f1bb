// The sheet for people: what must stand on it, and where.
#include <bandwright/report.hpp>

#include "catch.hpp"
#include "report/text_sheet.hpp"
#include "sample_assessment.hpp"
#include "sample_result.hpp"

using namespace bandwright;
using Catch::Matchers::ContainsSubstring;
using Catch::Matchers::StartsWith;

namespace {

std::vector<std::string> lines_of(const std::string& text) {
  std::vector<std::string> lines(1);
  for (const char c : text) {
    if (c == '\n')
      lines.emplace_back();
    else
      lines.back() += c;
  }
  return lines;
}

std::size_t widest(const std::string& text) {
  std::size_t width = 0;
  for (const auto& line : lines_of(text)) width = std::max(width, text_width(line));
  return width;
}

}  // namespace

TEST_CASE("the verdict stands first") {
  DesignResult result = test::sample_result();
  CHECK_THAT(write_table(result), StartsWith("1 of 2 candidates meets every requirement nominally.\n"));
  result.candidates[0].shortfalls = result.candidates[1].shortfalls;
  result.met = false;
  CHECK_THAT(write_table(result), StartsWith("None of 2 candidates meets every requirement"));
}

TEST_CASE("an interrupted search says so before all else") {
  DesignResult result = test::sample_result();
  result.interrupted = true;
  CHECK_THAT(write_table(result), StartsWith("INTERRUPTED"));
  result.candidates.clear();
  CHECK_THAT(write_table(result), ContainsSubstring("No candidate had been found yet."));
}

TEST_CASE("an empty list gives its reason and still the cautions") {
  DesignResult result = test::sample_result();
  result.candidates.clear();
  result.met = false;
  result.explanations = {"IC RC would be 0.2 V, needs 0.5 V"};
  const std::string text = write_table(result);
  CHECK_THAT(text, StartsWith("No candidate"));
  CHECK_THAT(text, ContainsSubstring("IC RC would be 0.2 V, needs 0.5 V"));
  CHECK_THAT(text, ContainsSubstring("60 V DC"));
}

TEST_CASE("one candidate and no requirement is a recomputation") {
  DesignResult result = test::sample_result();
  result.candidates.pop_back();
  CHECK_THAT(write_table(result), StartsWith("The candidate meets every requirement nominally."));
  result.spec.requirements = {};
  CHECK_THAT(write_table(result), StartsWith("Recomputed; no requirement was stated."));
}

TEST_CASE("requirements are shown as they were understood") {
  const std::string text = write_table(test::sample_result());
  CHECK_THAT(text, ContainsSubstring("44.6 to 56.1"));
  CHECK_THAT(text, ContainsSubstring("at most 50 Hz"));
  CHECK_THAT(text, ContainsSubstring("at least 20 kHz"));
  CHECK_THAT(text, ContainsSubstring("11.4 V to 12.6 V"));
  CHECK_THAT(text, ContainsSubstring("Tide gauge preamplifier"));
  CHECK_THAT(text,
             ContainsSubstring("99 % must pass; 20,000 simulated, fewer once the 95 % interval is narrower than"));
}

TEST_CASE("each shortfall is named with its rank") {
  CHECK_THAT(write_table(test::sample_result()), ContainsSubstring("2: upper cutoff: 18 kHz, needs at least 20 kHz"));
}

TEST_CASE("the parts list shows what is needed to buy and fit each part") {
  const std::string text = write_table(test::sample_result(), {false, 200});
  for (const char* piece : {"R1", "upper divider", "47 kΩ", "47K", "E6", "±10 %", "-20/+50 %", "metal film", "250 mW",
                            "63 V", "+ to collector", "TO-92", "C-B-E (1-2-3)"})
    CHECK_THAT(text, ContainsSubstring(piece));
}

TEST_CASE("the pole model names who sets each cutoff, largest share first") {
  CHECK_THAT(write_table(test::sample_result(), {false, 200}),
             ContainsSubstring("Who sets fL: C3 bypass 75 % (17.68 Hz), C1 input coupling 25 % (28.42 Hz)"));
}

TEST_CASE("hints say that they are common practice") {
  CHECK_THAT(write_table(test::sample_result()), ContainsSubstring("common practice, no source"));
}

TEST_CASE("what the result rests on is listed") {
  const std::string text = write_table(test::sample_result());
  for (const char* piece : {"gain: source EMF to load", "the junction is as warm", "from memory", "BFR92A"})
    CHECK_THAT(text, ContainsSubstring(piece));
}

TEST_CASE("the sheet ends with cautions in a few lines and where the rest stands") {
  const auto lines = lines_of(write_table(test::sample_result(), {false, 100}));
  const auto heading = std::find(lines.begin(), lines.end(), "Before building");
  REQUIRE(heading != lines.end());
  const auto end = std::find(heading, lines.end(), "");
  CHECK(end - heading <= 4);
  std::string text;
  for (auto line = heading + 1; line != end; ++line) text += *line + " ";
  for (const char* piece : {"60 V DC", "battery", "isolated", "polarity", "rating", "eye protection", "discharge",
                            "hot", "measure", "medical", "local codes", "README.md"})
    CHECK_THAT(text, ContainsSubstring(piece));
}

TEST_CASE("a narrow band shows the idealised midband gain and the definition") {
  DesignResult result = test::sample_result();
  CHECK_THAT(write_table(result), !ContainsSubstring("Narrow band"));
  result.candidates[0].analysis.figures[index(Figure::upper_cutoff)] = 8 * 41.7;
  const std::string text = write_table(result, {false, 400});
  CHECK_THAT(text, ContainsSubstring("Narrow band, fH/fL = 8") && ContainsSubstring("49.9"));
  CHECK_THAT(text, ContainsSubstring(info(Figure::gain).definition));
}

TEST_CASE("colour appears only where it is asked for, and is never the only signal") {
  const DesignResult result = test::sample_result();
  const std::string plain = write_table(result, {false, 100});
  std::string coloured = write_table(result, {true, 100});
  CHECK(plain.find('\x1b') == std::string::npos);
  REQUIRE(coloured.find('\x1b') != std::string::npos);
  for (std::size_t at = 0; (at = coloured.find('\x1b')) != std::string::npos;)
    coloured.erase(at, coloured.find('m', at) - at + 1);
  CHECK(coloured == plain);
}

TEST_CASE("a page is as wide as it is told, as far as its words allow") {
  DesignResult result = test::sample_result();
  result.candidates[0].allocation = test::sample_allocation();
  for (const int width : {80, 100, 120})
    for (const RankOrder& order : rank_orders()) {
      result.ranked_by = order.by;
      INFO(order.word << " at " << width);
      CHECK(widest(write_table(result, {false, width})) <= std::size_t(width));
    }
  CHECK(widest(write_table(result, {false, 400})) > 120);
}

TEST_CASE("a candidate without a value shows none, and its reason") {
  DesignResult result = test::sample_result();
  Candidate& c = result.candidates[0];
  c.analysis.figures[index(Figure::lower_cutoff)] = kNotComputed;
  c.error = kWorstError;
  c.notes["lower_cutoff"] = "no crossing on this side";
  const std::string text = write_table(result, {false, 200});
  CHECK_THAT(text, ContainsSubstring("no value") && ContainsSubstring("lower_cutoff: no crossing on this side"));
  CHECK_THAT(text, !ContainsSubstring(" nan"));
}

TEST_CASE("a stage that is not active shows its parts and the reason, once") {
  DesignResult result = test::sample_result();
  result.candidates.pop_back();
  result.searched = false;
  Candidate& c = result.candidates[0];
  c.analysis.point.state = BiasState::saturated;
  c.analysis.figures.fill(kNotComputed);
  c.assessment.reset();
  const std::string reason = "not active: VCE would be 0.1 V, needs 0.5 V";
  for (const FigureInfo& figure : figures())
    if (figure.use != FigureUse::reserved) c.notes[figure.key] = reason;
  const std::string text = write_table(result, {false, 200});
  CHECK_THAT(text, StartsWith("The stage does not work as an amplifier"));
  CHECK_THAT(text, ContainsSubstring("figures: " + reason) && ContainsSubstring("+ to collector"));
  CHECK(text.find(reason) == text.rfind(reason));
  CHECK_THAT(text, !ContainsSubstring("Pole model") && !ContainsSubstring("seed"));
}
