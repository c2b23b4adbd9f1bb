// One object of a stored document, read field by field: what is null or absent is left out, what is of the wrong kind
// is a fault, and all faults are collected.
#pragma once

#include <bandwright/fault.hpp>
#include <cstddef>
#include <map>
#include <optional>
#include <string>
#include <vector>

#include "spec/json_document.hpp"

namespace bandwright {

class StoredFields {
public:
  /// `path` stands before the keys in faults: "result.json: candidates[0]."
  StoredFields(const Json& value, std::string path, std::vector<Fault>& faults);

  bool states(const std::string& key) const;  ///< neither null nor absent

  double number(const std::string& key) const;  ///< NaN: not stated
  std::optional<std::size_t> count(const std::string& key) const;
  std::optional<bool> flag(const std::string& key) const;
  std::string text(const std::string& key) const;  ///< fit to be printed; empty: not stated
  std::vector<double> numbers(const std::string& key) const;
  std::vector<std::string> texts(const std::string& key) const;
  std::optional<StoredFields> object(const std::string& key) const;
  std::vector<StoredFields> objects(const std::string& key) const;
  std::map<std::string, std::string> texts_by_key() const;  ///< all members

  void demand(const std::string& key, const std::string& expected) const;     ///< a fault where it is not stated
  void object_to(const std::string& key, const std::string& expected) const;  ///< a fault of what is stated

private:
  const Json* find(const std::string& key) const;
  const Json* find(const std::string& key, bool (Json::*is_kind)() const noexcept, const char* kind) const;
  const Json* find_array(const std::string& key, bool (Json::*is_kind)() const noexcept, const char* kind) const;

  const Json* value_;
  std::string path_;
  std::vector<Fault>* faults_;
};

}  // namespace bandwright
