// Candidates beside each other on the printed sheet: what the choice is between, and what differs.
#include <bandwright/report.hpp>

#include "catch.hpp"
#include "comparison_documents.hpp"
#include "report/text_sheet.hpp"

using namespace bandwright;
using namespace bandwright::test;
using Catch::Matchers::ContainsSubstring;
using Catch::Matchers::StartsWith;

namespace {

std::string table(const std::vector<Json>& candidates) {
  return write_comparison_table(compared({document(candidates)}), {false, 1000});
}

std::string choice(const std::vector<Json>& candidates) {
  const std::string text = table(candidates);
  return text.substr(0, text.find('\n'));
}

using Cells = std::vector<std::string>;

// The cells of each row that begins with a label: two spaces or more lie between cells.
std::vector<Cells> rows(const std::string& text, const std::string& label) {
  std::vector<Cells> found;
  for (std::size_t at = 0; at < text.size(); at = text.find('\n', at) + 1) {
    const std::string line = text.substr(at, text.find('\n', at) - at);
    Cells cells(1);
    for (std::size_t i = std::min(line.find_first_not_of(' '), line.size()); i < line.size(); ++i) {
      const bool is_gap = line.compare(i, 2, "  ") == 0;
      if (is_gap) cells.emplace_back();
      if (is_gap) i = line.find_first_not_of(' ', i);
      cells.back() += line[i];
    }
    if (cells.front() == label) found.push_back(cells);
  }
  return found;
}

Cells row(const std::string& text, const std::string& label) {
  const auto found = rows(text, label);
  REQUIRE_FALSE(found.empty());
  return found.front();
}

}  // namespace

TEST_CASE("the first line says what a choice between two is between") {
  Json a = candidate(1), b = second();
  a["worst_case_margin"] = 0.12, b["worst_case_margin"] = -0.33;
  a["error"] = 0.0619, b["error"] = 0.0231;
  a["figures"]["supply_current"] = 1.27e-3;
  CHECK(choice({a, b}) ==
        "A or B: A has the higher capability (2.00 against 1.49) and the larger margin at the worst corner (0.12 "
        "against -0.33); B the smaller error (0.023 against 0.062) and the lower supply current (723 µA against 1.27 "
        "mA); alike in yield, tolerance sensitivity, number of parts and number of distinct values.");
}

TEST_CASE("the other way round the same is said with other names") {
  Json first = second();
  first["rank"] = 1;
  const std::string text = choice({first, candidate(2)});
  CHECK_THAT(text, StartsWith("A or B: B has the higher capability (2.00 against 1.49) and the smaller error"));
  CHECK_THAT(text, ContainsSubstring("; A is ahead in none of these; alike in "));
}

TEST_CASE("among more than two the best is told with the range of the others") {
  Json c = candidate(3);
  c["capability"]["smallest"] = 1.2;
  c["figures"]["supply_current"] = 0.5e-3;
  CHECK_THAT(choice({candidate(1), second(), c}),
             StartsWith("A, B or C: A has the highest capability (2.00, the others 1.20 to 1.49); A and C the smallest "
                        "error (0.023, the other 0.062); C the lowest supply current (500 µA, the others 723 µA); B "
                        "is ahead in none of these; alike in "));
}

TEST_CASE("what is the same to the digits shown is no difference") {
  Json b = candidate(2);
  b["error"] = 0.0234;  // 0.023 as well
  b["figures"]["supply_current"] = 723.4e-6;
  CHECK(choice({candidate(1), b}) ==
        "A or B: alike in capability, yield, error, tolerance sensitivity, supply current, number of parts and number "
        "of distinct values.");
}

TEST_CASE("yields are told apart only where their intervals are") {
  Json a = candidate(1), b = candidate(2);
  a["yield"] = yield(19900, 0.9939, 0.9959);
  b["yield"] = yield(19880, 0.9929, 0.9949);
  CHECK_THAT(choice({a, b}), ContainsSubstring("alike in capability, yield (the 95 % intervals overlap), error"));
  b["yield"] = yield(19000, 0.9469, 0.9530);
  CHECK_THAT(choice({a, b}), StartsWith("A or B: A has the higher yield (99.5 % against 95 %);"));
}

TEST_CASE("verdicts that differ stand beside the names, and what falls short is listed") {
  Json b = second();
  b["verdict"]["overall"] = "not met";
  b["shortfalls"] = {{{"figure", "gain"}, {"value", 17}, {"limit", 18}, {"text", "gain: 17, needs at least 18"}}};
  const std::string text = table({candidate(1), b});
  CHECK_THAT(
      text, StartsWith("A (pass) or B (not met): ") && ContainsSubstring("B falls short: gain: 17, needs at least 18"));
}

TEST_CASE("parts that differ have a row, with what else differs below; the others stand in one line") {
  Json b = candidate(2);
  b["parts"][2]["value"] = 5600;
  b["parts"][4] = part("input_coupling", 1e-6, {-0.2, 0.5}, "aluminium electrolytic capacitor");
  b["parts"].erase(3);
  b["device"] = "BC550C";
  const std::string text = table({candidate(1), b});
  CHECK(row(text, "R3") == Cells{"R3", "collector", "4.7 kΩ", "5.6 kΩ"});
  CHECK(row(text, "R4") == Cells{"R4", "emitter", "220 Ω", "none"});
  CHECK(row(text, "C1") == Cells{"C1", "input coupling", "1 µF", "1 µF"});
  CHECK(row(text, "- tolerance") == Cells{"- tolerance", "±10 %", "-20/+50 %"});
  CHECK(row(text, "- family") == Cells{"- family", "polyester film", "aluminium electrolytic"});
  CHECK(row(text, "Q1") == Cells{"Q1", "transistor", "BC547B", "BC550C"});
  CHECK(rows(text, "R1").empty());
  CHECK_THAT(text, ContainsSubstring("the same in all: R1 47 kΩ, R2 10 kΩ, C2 1 µF\n"));
  CHECK_THAT(table({candidate(1), candidate(2)}),
             ContainsSubstring("No part differs") && ContainsSubstring("C2 1 µF, Q1 BC547B\n"));
}

TEST_CASE("what an older document does not state is a dash and a note, and no reason for a choice") {
  Json b = second();
  for (const char* field : {"capability", "yield", "worst_case"}) b[field] = nullptr;
  for (const char* field : {"verdict", "non_dominated"}) b.erase(field);
  b["notes"]["yield"] = "not simulated";
  const std::string text = table({candidate(1), b});
  CHECK_THAT(text, StartsWith("A (pass) or B (no verdict): A has the smaller error (0.023 against 0.062); B is"));
  CHECK(row(text, "yield") == Cells{"yield", "100 %", "-"});
  CHECK_THAT(text, ContainsSubstring("B: yield: not simulated\n"));
  CHECK_THAT(text,
             ContainsSubstring("B: verdict, non-dominated, capability, worst case: not stated by the document\n"));
  const Json one = Json::parse(write_comparison_json(compared({document({candidate(1), b})})))["candidates"][1];
  for (const char* field : {"capability", "yield", "worst_case", "verdict", "non_dominated"}) {
    CHECK(one[field].is_null());
    CHECK(one["notes"].contains(field));
  }
}

TEST_CASE("requirements and conditions that differ are told, and each candidate is held against its own") {
  Json other = document({candidate(1)});
  other["spec"]["requirements"]["gain"] = {{"min", 40}};
  other["spec"]["requirements"]["supply_current"] = {{"max", 0.002}};
  other["spec"]["supply"] = 9;
  const Comparison both = compared({document({candidate(1)}), other});
  const std::string text = write_comparison_table(both, {false, 1000});
  CHECK_THAT(text, ContainsSubstring("; each against its own requirements.\n"));
  CHECK_THAT(text, ContainsSubstring("The requirements differ: gain 20, 18 to 22 (A), at least 40 (B); supply current "
                                     "not asked for (A), at most 2 mA (B)."));
  CHECK_THAT(text, ContainsSubstring("The conditions differ: supply 12 V (A), 9 V (B); lowest supply"));
  CHECK(row(text, "gain") == Cells{"gain", "each its own", "20.5", "20.5"});
  CHECK_THAT(text, ContainsSubstring("A  file1.json, rank 1") && ContainsSubstring("B  file2.json, rank 1"));
  const Json written = Json::parse(write_comparison_json(both));
  CHECK(written["differing_requirements"].size() == 2);
  const std::string alike = table({candidate(1), candidate(2)});
  CHECK_THAT(alike,
             !ContainsSubstring("differ:") && ContainsSubstring("A  rank 1") && !ContainsSubstring("file1.json,"));
}

TEST_CASE("figures, margins and worst cases stand beside each other, required ones first") {
  const std::string text = table({candidate(1), second()});
  CHECK(row(text, "gain") == Cells{"gain", "18 to 22", "20.5", "20.5"});
  CHECK(row(text, "- margin") == Cells{"- margin", "0.75", "0.75"});
  CHECK(row(text, "lower cutoff") == Cells{"lower cutoff", "38.33 Hz", "38.33 Hz"});
  CHECK(text.find("\n  gain ") < text.find("\n  - margin"));
  CHECK(text.find("\n  - margin") < text.find("\n  lower cutoff"));
  CHECK(row(text, "gain, least") == Cells{"gain, least", "18.5", "18.5"});
  CHECK(row(text, "- largest") == Cells{"- largest", "22.5", "22.5"});
  CHECK(row(text, "capability") == Cells{"capability", "2.00", "1.49"});
  CHECK(row(text, "- set by") == Cells{"- set by", "gain", "gain"});
  CHECK_THAT(text, ContainsSubstring("At most 60 V DC between any two nodes"));
}

TEST_CASE("control characters of a document are not printed") {
  Json odd = candidate(1);
  odd["device"] = "BC\x1b[31m";
  odd["notes"]["error"] = "\x07";
  const std::string text = table({odd, candidate(2)});
  CHECK(text.find('\x1b') == std::string::npos);
  CHECK(text.find('\x07') == std::string::npos);
  CHECK_THAT(text, ContainsSubstring("BC\\x1B[31m"));
}

TEST_CASE("no line is wider than the page: candidates that find no room follow below") {
  std::vector<Json> all;
  for (int rank = 1; rank <= 9; ++rank) all.push_back(candidate(rank));
  for (const int width : {60, 100}) {
    const std::string text =
        write_comparison_table(compared({document(all)}, {1, 2, 3, 4, 5, 6, 7, 8, 9}), {false, width});
    for (std::size_t at = 0; at < text.size(); at = text.find('\n', at) + 1)
      CHECK(text_width(text.substr(at, text.find('\n', at) - at)) <= static_cast<std::size_t>(width));
  }
}
