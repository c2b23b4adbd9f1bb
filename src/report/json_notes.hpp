// What the JSON documents share: nulls with their reasons, and the cautions.
#pragma once

#include <bandwright/purchase.hpp>
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

/// The usual cautions, as every document carries them.
inline Json caution_list() {
  Json out = Json::array();
  for (const Caution& one : cautions()) out.push_back({{"code", one.code}, {"text", one.text}});
  return out;
}

}  // namespace bandwright
