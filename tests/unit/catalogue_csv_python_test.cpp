// Comma-separated values against an independent implementation of RFC 4180: the csv module of Python, which writes what
// this project reads and reads what this project writes.
#include <nlohmann/json.hpp>
#include <random>

#include "catalogue/csv_reader.hpp"
#include "catch.hpp"
#include "report/csv_record.hpp"
#include "run_program.hpp"

using namespace bandwright;
using nlohmann::json;

namespace {

using Record = std::vector<std::string>;

std::string python(const char* script, const std::string& input = {}) {
  test::Circumstances circumstances;
  circumstances.input = input;
  const test::Outcome outcome = test::run_command({"python3", "-c", script}, circumstances);
  INFO(outcome.err);
  REQUIRE(outcome.status == 0);
  return outcome.out;
}

// Rows of nasty fields, and their text in three forms: quotes where needed, quotes everywhere, and LF at the line ends.
// A bare first field never begins with #, which is a comment here; nor is a lone CR left bare by LF at the line ends.
constexpr const char* kWriter = R"(
import csv, io, json, random, sys
random.seed(4180)
pieces = ['a', '4K7', ' ', '"', '""', ',', ';', '\n', '\r\n', '\r', '#', "'", '=1+1', '0', '\t', 'µ', 'Ω', '日本', '\\', '-20/+50 %']
def field(first):
    text = ''.join(random.choice(pieces) for _ in range(random.randrange(6)))
    return 'x' + text if first and text.startswith('#') else text
rows = [[field(i == 0) for i in range(random.randrange(1, 8))] for _ in range(2000)]
def text(**dialect):
    out = io.StringIO(newline='')
    csv.writer(out, **dialect).writerows(rows)
    return out.getvalue()
json.dump({'rows': rows, 'texts': [text(), text(quoting=csv.QUOTE_ALL), text(quoting=csv.QUOTE_ALL, lineterminator='\n')]}, sys.stdout)
)";

constexpr const char* kReader = R"(
import csv, io, json, sys
text = io.TextIOWrapper(sys.stdin.buffer, encoding='utf-8', newline='')
json.dump(list(csv.reader(text, strict=True)), sys.stdout)
)";

std::vector<Record> read_all(const std::string& text) {
  CsvReader reader(text);
  std::vector<Record> all;
  for (std::vector<CsvField> record; reader.next(record);) {
    all.emplace_back();
    for (const CsvField& field : record) {
      if (field.fault != nullptr) FAIL(field.text << ": " << field.fault);
      all.back().push_back(field.text);
    }
  }
  return all;
}

std::vector<Record> nasty_records() {
  const std::vector<std::string> pieces = {"a", "4K7", " ",  "\"", "\"\"", ",", ";", "\n", "\r",       "\r\n",
                                           "#", "'",   "=1", "0",  "\t",   "µ", "Ω", "\\", "-20/+50 %"};
  std::mt19937 random(60062);
  std::vector<Record> records(2000);
  for (Record& record : records) {
    record.resize(2 + random() % 6);  // one empty field alone would be an empty line
    for (std::string& field : record)
      for (auto n = random() % 6; n > 0; --n) field += pieces[random() % pieces.size()];
  }
  return records;
}

}  // namespace

TEST_CASE("what Python's csv module writes is read as it was") {
  const json written = json::parse(python(kWriter));
  const auto rows = written.at("rows").get<std::vector<Record>>();
  REQUIRE(rows.size() == 2000);
  REQUIRE(written.at("texts").size() == 3);
  for (const json& text : written.at("texts")) {
    const auto read = read_all(text.get<std::string>());
    CHECK((read == rows));
  }
}

TEST_CASE("what is written here Python's csv module reads as it was") {
  const auto records = nasty_records();
  std::string text;
  for (const Record& record : records) text += csv_record(record);
  const auto read = json::parse(python(kReader, text)).get<std::vector<Record>>();
  CHECK((read == records));
}
