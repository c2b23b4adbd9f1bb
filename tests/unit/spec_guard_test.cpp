// Input that is too large, too deep, cut short or garbled: a fault, never a crash.
#include <bandwright/fault.hpp>
#include <bandwright/spec.hpp>

#include "catch.hpp"
#include "spec_texts.hpp"

using namespace bandwright;

namespace {

std::string complaint(const std::string& text) {
  try {
    read_spec(text, "big.json");
  } catch (const InputError& error) {
    return error.what();
  }
  return "";
}

bool says(const std::string& text, const std::string& piece) {
  const std::string said = complaint(text);
  INFO(said.substr(0, 500));
  CHECK(said.find(piece) != std::string::npos);
  return said.find(piece) != std::string::npos;
}

std::string repeated(const std::string& piece, int times) {
  std::string out;
  for (int i = 0; i < times; ++i) out += piece;
  return out;
}

}  // namespace

TEST_CASE("too much text, too deep, too many members") {
  says(std::string(17u << 20u, ' '), "big.json: found \"17825792 bytes\"; expected at most 16 MB of text");
  says(repeated("[", 1000000), "at most 64 deep");
  says(repeated(R"({"a":)", 1000000), "at most 64 deep");
  says("{\"source\": " + repeated("[", 60) + repeated("]", 60) + "}", "source");
  std::string wide = "{";
  for (int i = 0; i < 20000; ++i) wide += "\"k" + std::to_string(i) + "\": 0, ";
  says(wide + "\"z\": 0}", "at most 10000 members");
}

TEST_CASE("the number of faults that are listed is limited") {
  std::string wide = "{";
  for (int i = 0; i < 9000; ++i) wide += "\"k" + std::to_string(i) + "\": 0, ";
  const std::string said = complaint(wide + "\"z\": 0}");
  CHECK(said.find("the rest is not listed") != std::string::npos);
  CHECK(said.size() < 100000);
}

TEST_CASE("a long value is shown cut") {
  const std::string said = complaint("{\"supply\": \"" + std::string(1000000, 'x') + "\"}");
  CHECK(said.size() < 2000);
}

TEST_CASE("a long key is no more trouble than a short one") {
  const std::string key = repeated("a.", 1000000);
  CHECK(complaint("{\"" + key + "\": 1}").size() < 2000);
  CHECK(complaint("{\"" + key + "\": 1, \"" + key + "\": 2}").size() < 4000);
  CHECK(complaint("{\"requirements\": {\"" + key + "\": 1}}").size() < 2000);
}

TEST_CASE("a file cut short anywhere is a fault") {
  for (std::size_t length = 1; length + 1 < kFullSpec.size(); ++length) {
    INFO(length);
    CHECK(complaint(kFullSpec.substr(0, length)).find("big.json, line ") == 0);
  }
}

TEST_CASE("a file with any byte garbled is read or refused") {
  int refused = 0;
  for (std::size_t at = 0; at < kFullSpec.size(); ++at)
    for (const char byte : {'\0', '"', '{', '-', '9', '\xFF'}) {
      std::string text = kFullSpec;
      text[at] = byte;
      refused += complaint(text).empty() ? 0 : 1;
    }
  CHECK(refused > 0);
}
