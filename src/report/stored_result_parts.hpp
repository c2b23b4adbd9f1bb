// The parts of a stored candidate: one entry for each role, two where a pair stands in it.
#pragma once

#include <array>
#include <bandwright/catalogue.hpp>
#include <bandwright/fault.hpp>
#include <cstddef>
#include <nlohmann/json.hpp>
#include <string>
#include <vector>

namespace bandwright {

class PartReader {
public:
  using Json = nlohmann::json;

  /// `path` stands before the position in faults: "result.json: candidates[rank 1].parts".
  explicit PartReader(std::string path) : path_(std::move(path)) {}

  void read(const Json& part, std::size_t position);

  /// All that was read. Ask before faults(): what is missing shows at the end only.
  PartChoices finish();
  const std::vector<Fault>& faults() const { return faults_; }

private:
  struct Entry {
    Json part;
    std::string where;  ///< "parts[3]"
    PartChoice choice;  ///< of this part alone
  };
  Connection connection_of(const Json& part, const std::string& where);
  PartChoice role_of(Role role, const std::vector<Entry>& entries);
  void add(const std::string& where, const Json& part, const char* key, const std::string& expected);

  std::string path_;
  std::array<std::vector<Entry>, kRoleCount> entries_;
  std::vector<Fault> faults_;
};

}  // namespace bandwright
