// Comma-separated values: the rules of RFC 4180, what is read beyond them, places, and what is wrong.
#include <random>

#include "catalogue/csv_reader.hpp"
#include "catch.hpp"

using namespace bandwright;

namespace {

using Record = std::vector<std::string>;

std::vector<std::vector<CsvField>> fields_of(std::string_view text) {
  CsvReader reader(text);
  std::vector<std::vector<CsvField>> all;
  for (std::vector<CsvField> record; reader.next(record);) all.push_back(record);
  return all;
}

std::vector<Record> records_of(std::string_view text) {
  std::vector<Record> all;
  for (const auto& fields : fields_of(text)) {
    all.emplace_back();
    for (const CsvField& field : fields) {
      CHECK(field.fault == nullptr);
      all.back().push_back(field.text);
    }
  }
  return all;
}

}  // namespace

TEST_CASE("the rules of RFC 4180, on its own examples") {
  // Source: RFC 4180, section 2: the examples of rules 1, 2, 4, 5, 6 and 7.
  const std::vector<Record> two = {{"aaa", "bbb", "ccc"}, {"zzz", "yyy", "xxx"}};
  CHECK(records_of("aaa,bbb,ccc\r\nzzz,yyy,xxx\r\n") == two);
  CHECK(records_of("aaa,bbb,ccc\r\nzzz,yyy,xxx") == two);
  CHECK(records_of("aaa,bbb,ccc") == std::vector<Record>{two[0]});
  CHECK(records_of("\"aaa\",\"bbb\",\"ccc\"\r\nzzz,yyy,xxx") == two);
  CHECK(records_of("\"aaa\",\"b\r\nbb\",\"ccc\"\r\nzzz,yyy,xxx") ==
        std::vector<Record>{{"aaa", "b\r\nbb", "ccc"}, two[1]});
  CHECK(records_of("\"aaa\",\"b\"\"bb\",\"ccc\"") == std::vector<Record>{{"aaa", "b\"bb", "ccc"}});
  // Rule 4: spaces are part of a field.
  CHECK(records_of(" a , b\r\n") == std::vector<Record>{{" a ", " b"}});
}

TEST_CASE("empty fields and quotes alone") {
  CHECK(records_of(",") == std::vector<Record>{{"", ""}});
  CHECK(records_of("a,\n,b\n") == std::vector<Record>{{"a", ""}, {"", "b"}});
  CHECK(records_of("\"\"") == std::vector<Record>{{""}});
  CHECK(records_of("\"\"\"\"") == std::vector<Record>{{"\""}});
  CHECK(records_of("\"\"\"\"\"\",\"\"\n") == std::vector<Record>{{"\"\"", ""}});
  CHECK(records_of("\",\"\n") == std::vector<Record>{{","}});
}

TEST_CASE("LF ends a line too; byte order mark, empty lines and comments are passed over") {
  const std::vector<Record> expected = {{"a", "b"}, {"c", "d"}};
  CHECK(records_of("\xEF\xBB\xBF"
                   "a,b\nc,d") == expected);
  CHECK(records_of("\n\r\n# one, \"two\n#\r\na,b\r\n\n\n# three\nc,d\n#four") == expected);
  CHECK(records_of("").empty());
  CHECK(records_of("\n\r\n\n").empty());
  CHECK(records_of("# nothing but this").empty());
  // A # elsewhere, or in quotes, is text.
  CHECK(records_of("a#,#b\n\"#c\",d\n #,e") == std::vector<Record>{{"a#", "#b"}, {"#c", "d"}, {" #", "e"}});
  CHECK(records_of("\"a\n# not a comment\n\",b") == std::vector<Record>{{"a\n# not a comment\n", "b"}});
}

TEST_CASE("every field knows its line and column") {
  const auto all = fields_of("# comment\r\n\r\na,\"b\r\nc\nd\",e\n\"f\",g\n");
  REQUIRE(all.size() == 2);
  const auto at = [](const CsvField& field) { return std::pair(field.line, field.column); };
  CHECK(at(all[0][0]) == std::pair<std::size_t, std::size_t>(3, 1));
  CHECK(at(all[0][1]) == std::pair<std::size_t, std::size_t>(3, 2));
  CHECK(at(all[0][2]) == std::pair<std::size_t, std::size_t>(5, 3));
  CHECK(at(all[1][0]) == std::pair<std::size_t, std::size_t>(6, 1));
  CHECK(at(all[1][1]) == std::pair<std::size_t, std::size_t>(6, 2));
}

TEST_CASE("a field at fault says what would be right, and reading goes on behind it") {
  struct Bad {
    const char* text;
    const char* read;
    const char* says;
  };
  for (const Bad& bad :
       {Bad{"a,\"b\"c,d\nx,y,z\n", "bc", "behind the closing quote"}, Bad{"a,\"b\" ,d\nx,y,z\n", "b ", "closing quote"},
        Bad{"a,b\"c\",d\nx,y,z\n", "b\"c\"", "each quote inside doubled"},
        Bad{"a, \"b\",d\nx,y,z\n", " \"b\"", "quotes around the whole field"},
        Bad{"a,b\rc,d\nx,y,z\n", "b\rc", "LF or CRLF"}}) {
    INFO(bad.text);
    const auto all = fields_of(bad.text);
    REQUIRE(all.size() == 2);
    REQUIRE(all[0].size() == 3);
    CHECK(all[0][0].fault == nullptr);
    REQUIRE(all[0][1].fault != nullptr);
    CHECK(std::string(all[0][1].fault).find(bad.says) != std::string::npos);
    CHECK(all[0][1].text == bad.read);
    CHECK(all[0][2].fault == nullptr);
    CHECK(all[1][2].text == "z");
    CHECK(all[1][0].line == 2);
  }
}

TEST_CASE("a quote that is never closed takes the rest, and is told at its opening") {
  const auto all = fields_of("a,b\nc,\"d\ne,f\n");
  REQUIRE(all.size() == 2);
  REQUIRE(all[1].size() == 2);
  CHECK(all[1][1].text == "d\ne,f\n");
  CHECK(all[1][1].line == 2);
  REQUIRE(all[1][1].fault != nullptr);
  CHECK(std::string(all[1][1].fault).find("closes the field") != std::string::npos);
  CHECK(fields_of("\"")[0][0].fault != nullptr);
  CHECK(fields_of("\"a\"\"")[0][0].fault != nullptr);
}

TEST_CASE("any bytes come to an end, line by line") {
  std::mt19937 random(4180);
  const std::string letters = "a,,\"\"\r\n\n#\xEF ";
  for (int run = 0; run < 5000; ++run) {
    std::string text(random() % 40, ' ');
    for (char& c : text) c = letters[random() % letters.size()];
    std::size_t line = 1;
    std::size_t bytes = 0;
    for (const auto& record : fields_of(text)) {
      REQUIRE_FALSE(record.empty());
      for (const CsvField& field : record) {
        CHECK(field.line >= line);
        line = field.line;
        bytes += field.text.size();
      }
    }
    CHECK(bytes <= text.size());
    CHECK(line <= 1 + static_cast<std::size_t>(std::count(text.begin(), text.end(), '\n')));
  }
}
