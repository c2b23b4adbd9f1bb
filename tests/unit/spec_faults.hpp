// Malformed specs: what the tests of their faults share.
#pragma once

#include <bandwright/fault.hpp>
#include <bandwright/spec.hpp>
#include <string>
#include <vector>

#include "catch.hpp"
#include "spec_texts.hpp"

namespace bandwright {

/// A spec, the path that is named, and a piece of the message.
struct Malformed {
  std::string text;
  const char* where;
  const char* says;
};

// The least spec with members added.
inline std::string with(const std::string& members) {
  std::string text = kLeastSpec;
  return text.insert(text.find('{') + 1, members + ", ");
}

inline std::vector<Fault> faults_of(const std::string& text) {
  try {
    read_spec(text, "test.json");
  } catch (const InputError& error) {
    return error.faults();
  }
  return {};
}

inline void check_each(const std::vector<Malformed>& rows) {
  for (const Malformed& row : rows) {
    const std::vector<Fault> faults = faults_of(row.text);
    INFO(row.text);
    REQUIRE(!faults.empty());
    INFO(describe(faults.front()));
    // One mistake is one fault, and not a trail of others.
    CHECK((faults.size() == 1 || row.text.find("\"format\"") != std::string::npos));
    CHECK(faults.front().where == row.where);
    CHECK(describe(faults.front()).find(row.says) != std::string::npos);
  }
}

}  // namespace bandwright
