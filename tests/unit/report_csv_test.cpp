// Comma-separated values, read back by a small reader that follows RFC 4180 to the letter.
#include <bandwright/report.hpp>
#include <cmath>

#include "catch.hpp"
#include "csv_records.hpp"
#include "sample_result.hpp"

using namespace bandwright;
using test::column;
using test::read_records;
using test::Record;

TEST_CASE("columns stand in the order of the format") {
  const Record headings = read_records(write_csv(test::sample_result())).front();
  const Record first = {"rank", "device",       "variant",     "error", "tolerance_sensitivity",
                        "gain", "lower_cutoff", "upper_cutoff"};
  const Record last = {"R1",           "R2", "R3",         "R4",    "R5",        "C1",         "C2",
                       "C3",           "C4", "capability", "yield", "yield_low", "yield_high", "worst_case_margin",
                       "non_dominated"};
  REQUIRE(headings.size() > first.size() + last.size());
  CHECK(std::equal(first.begin(), first.end(), headings.begin()));
  CHECK(std::equal(last.rbegin(), last.rend(), headings.rbegin()));
  CHECK(headings[column(headings, "junction_temperature_degc")] == "junction_temperature_degc");
  for (const char* later : {"settling_time", "noise_figure"})
    CHECK(std::find(headings.begin(), headings.end(), later) == headings.end());
}

TEST_CASE("each candidate is one record with as many fields as headings") {
  const auto records = read_records(write_csv(test::sample_result()));
  REQUIRE(records.size() == 3);
  for (const Record& record : records) CHECK(record.size() == records[0].size());
  CHECK(records[2][0] == "2");
}

TEST_CASE("numbers read back as the same doubles; what is absent is empty") {
  const DesignResult result = test::sample_result();
  const auto records = read_records(write_csv(result));
  const auto cell = [&](const std::string& name) { return records[1][column(records[0], name)]; };
  CHECK(std::stod(cell("error")) == 0.1 + 0.2);
  CHECK(std::stod(cell("gain")) == result.candidates[0].analysis.figures[index(Figure::gain)]);
  CHECK(std::stod(cell("R1")) == 47e3);
  CHECK(std::stod(cell("C2")) == 4.7e-6);
  CHECK(cell("C4").empty());
}

TEST_CASE("a figure without a value is an empty field") {
  DesignResult result = test::sample_result();
  result.candidates[0].analysis.figures[index(Figure::upper_cutoff)] = kNotComputed;
  result.candidates[0].tolerance_sensitivity = std::numeric_limits<double>::infinity();
  const auto records = read_records(write_csv(result));
  CHECK(records[1][column(records[0], "upper_cutoff")].empty());
  CHECK(records[1][column(records[0], "tolerance_sensitivity")].empty());
}

TEST_CASE("the assessment stands behind the parts, empty where there is none") {
  DesignResult result = test::sample_result();
  result.candidates[1].assessment.reset();
  const auto records = read_records(write_csv(result));
  const auto cell = [&](std::size_t row, const char* name) { return records[row][column(records[0], name)]; };
  const Assessment& assessment = *result.candidates[0].assessment;
  CHECK(std::stod(cell(1, "capability")) == assessment.capability);
  CHECK(std::stod(cell(1, "yield")) == 19840.0 / 20000);
  CHECK(std::stod(cell(1, "yield_low")) == assessment.yield.low);
  CHECK(std::stod(cell(1, "yield_high")) == assessment.yield.high);
  CHECK(std::stod(cell(1, "worst_case_margin")) == assessment.worst_case_margin);
  CHECK(cell(1, "non_dominated") == "true");
  for (const char* name : {"capability", "yield", "yield_low", "yield_high", "worst_case_margin"})
    CHECK(cell(2, name).empty());
  CHECK(cell(2, "non_dominated") == "false");
}

TEST_CASE("commas, quotes and line ends inside a field survive") {
  DesignResult result = test::sample_result();
  const std::string odd = "type \"X\", second\r\nline";
  result.candidates[0].device = odd;
  CHECK(read_records(write_csv(result))[1][1] == odd);
}

TEST_CASE("an empty list is a heading alone") {
  DesignResult result = test::sample_result();
  result.candidates.clear();
  CHECK(read_records(write_csv(result)).size() == 1);
}
