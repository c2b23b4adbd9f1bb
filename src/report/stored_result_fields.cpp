#include "report/stored_result_fields.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <bandwright/figure.hpp>

#include "units/printable.hpp"

namespace bandwright {

namespace {

constexpr std::size_t kLongestText = 400;  // bytes

std::string shown(const Json& text) { return printable(text.get_ref<const std::string&>(), kLongestText); }

}  // namespace

StoredFields::StoredFields(const Json& value, std::string path, std::vector<Fault>& faults)
    : value_(&value), path_(std::move(path)), faults_(&faults) {}

const Json* StoredFields::find(const std::string& key) const {
  const auto found = value_->find(key);
  return found == value_->end() || found->is_null() ? nullptr : &*found;
}

const Json* StoredFields::find(const std::string& key, bool (Json::*is_kind)() const noexcept, const char* kind) const {
  const Json* found = find(key);
  if (found == nullptr || (found->*is_kind)()) return found;
  object_to(key, kind);
  return nullptr;
}

const Json* StoredFields::find_array(const std::string& key, bool (Json::*is_kind)() const noexcept,
                                     const char* kind) const {
  const Json* found = find(key, &Json::is_array, kind);
  if (found == nullptr) return nullptr;
  if (std::all_of(found->begin(), found->end(), [&](const Json& one) { return (one.*is_kind)(); })) return found;
  object_to(key, kind);
  return nullptr;
}

bool StoredFields::states(const std::string& key) const { return find(key) != nullptr; }

double StoredFields::number(const std::string& key) const {
  const Json* found = find(key, &Json::is_number, "a number or null");
  return found != nullptr ? found->get<double>() : kNotComputed;
}

std::optional<std::size_t> StoredFields::count(const std::string& key) const {
  const Json* found = find(key, &Json::is_number_unsigned, "a whole number");
  return found != nullptr ? std::optional(found->get<std::size_t>()) : std::nullopt;
}

std::optional<bool> StoredFields::flag(const std::string& key) const {
  const Json* found = find(key, &Json::is_boolean, "true or false");
  return found != nullptr ? std::optional(found->get<bool>()) : std::nullopt;
}

std::string StoredFields::text(const std::string& key) const {
  const Json* found = find(key, &Json::is_string, "a text");
  return found != nullptr ? shown(*found) : "";
}

std::vector<double> StoredFields::numbers(const std::string& key) const {
  const Json* found = find_array(key, &Json::is_number, "an array of numbers");
  return found != nullptr ? found->get<std::vector<double>>() : std::vector<double>();
}

std::vector<std::string> StoredFields::texts(const std::string& key) const {
  std::vector<std::string> list;
  if (const Json* found = find_array(key, &Json::is_string, "an array of texts"))
    for (const Json& one : *found) list.push_back(shown(one));
  return list;
}

std::optional<StoredFields> StoredFields::object(const std::string& key) const {
  const Json* found = find(key, &Json::is_object, "an object { ... } or null");
  if (found == nullptr) return std::nullopt;
  return StoredFields(*found, fmt::format("{}{}.", path_, key), *faults_);
}

std::vector<StoredFields> StoredFields::objects(const std::string& key) const {
  std::vector<StoredFields> list;
  if (const Json* found = find_array(key, &Json::is_object, "an array of objects"))
    for (const Json& one : *found) list.emplace_back(one, fmt::format("{}{}[{}].", path_, key, list.size()), *faults_);
  return list;
}

std::map<std::string, std::string> StoredFields::texts_by_key() const {
  std::map<std::string, std::string> all;
  for (const auto& [key, value] : value_->items()) all[printable(key)] = text(key);
  return all;
}

void StoredFields::demand(const std::string& key, const std::string& expected) const {
  if (!states(key)) faults_->push_back({path_ + key, "", expected, ""});
}

void StoredFields::object_to(const std::string& key, const std::string& expected) const {
  const Json* found = find(key);
  faults_->push_back({path_ + key, found != nullptr ? found_text(*found) : "", expected, ""});
}

}  // namespace bandwright
