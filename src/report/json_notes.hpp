// Nulls of the result document and their reasons.
#pragma once

#include <cmath>
#include <map>
#include <nlohmann/json.hpp>
#include <string>

namespace bandwright {

using Json = nlohmann::ordered_json;

/// The notes of one candidate: those that came with it, and one for each null that is written.
class Notes {
public:
  explicit Notes(const std::map<std::string, std::string>& given) : notes_(given) {}

  Json number(double value, const std::string& field, const std::string& reason) {
    if (std::isfinite(value)) return value;
    return nothing(field, reason);
  }
  Json text(const std::string& value, const std::string& field, const std::string& reason) {
    if (!value.empty()) return value;
    return nothing(field, reason);
  }
  Json nothing(const std::string& field, const std::string& reason) {
    notes_.try_emplace(field, reason);
    return nullptr;
  }
  Json to_json() const { return notes_; }

private:
  std::map<std::string, std::string> notes_;
};

}  // namespace bandwright
