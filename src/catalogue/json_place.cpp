#include "catalogue/json_place.hpp"

#include <algorithm>
#include <cmath>

#include "units/printable.hpp"
#include "units/quantity_text.hpp"
#include "units/suggest.hpp"

namespace bandwright {

namespace {

std::string as_found(const nlohmann::json& value) {
  if (value.is_string()) return printable(value.get<std::string>());
  return printable(value.dump(-1, ' ', false, nlohmann::json::error_handler_t::replace));
}

}  // namespace

std::string JsonPlace::where() const { return path_.empty() ? log_->file : log_->file + ": " + path_; }

void JsonPlace::fault(const std::string& expected, const std::string& suggestion) const {
  log_->faults.push_back({where(), as_found(*value_), expected, suggestion});
}

void JsonPlace::missing(std::string_view key, const std::string& expected) const {
  const std::string path = path_.empty() ? std::string(key) : path_ + "." + std::string(key);
  log_->faults.push_back({log_->file + ": " + path, "", expected, ""});
}

bool JsonPlace::is_object(const std::string& expected) const {
  if (!value_->is_object()) fault(expected);
  return value_->is_object();
}

bool JsonPlace::is_list(const std::string& expected) const {
  if (!value_->is_array()) fault(expected);
  return value_->is_array();
}

void JsonPlace::only_keys(const std::vector<std::string>& known) const {
  for (const auto& [key, value] : value_->items()) {
    if (std::find(known.begin(), known.end(), key) != known.end()) continue;
    log_->faults.push_back({where(), key, "a key that is known here", nearest_name(key, known)});
  }
}

bool JsonPlace::has(std::string_view key) const { return value_->is_object() && value_->contains(std::string(key)); }

JsonPlace JsonPlace::member(std::string_view key) const {
  const std::string name(key);
  return {value_->at(name), path_.empty() ? name : path_ + "." + name, *log_};
}

std::vector<JsonPlace> JsonPlace::elements() const {
  if (!value_->is_array()) return {*this};
  std::vector<JsonPlace> all;
  for (std::size_t i = 0; i < value_->size(); ++i) {
    all.emplace_back((*value_)[i], path_ + "[" + std::to_string(i) + "]", *log_);
  }
  return all;
}

std::optional<std::string> JsonPlace::text(const std::string& expected) const {
  if (value_->is_string() && !value_->get_ref<const std::string&>().empty()) return value_->get<std::string>();
  fault(expected);
  return std::nullopt;
}

std::optional<bool> JsonPlace::truth() const {
  if (value_->is_boolean()) return value_->get<bool>();
  fault("true or false");
  return std::nullopt;
}

std::optional<double> JsonPlace::quantity(Dimension dimension) const {
  if (value_->is_number() && dimension != Dimension::temperature) return value_->get<double>();
  if (!value_->is_string()) {
    fault(describe_dimension(dimension));
    return std::nullopt;
  }
  std::string expected;
  const std::optional<Quantity> read = read_quantity(value_->get_ref<const std::string&>(), dimension, expected);
  if (!read) {
    fault(expected);
    return std::nullopt;
  }
  return read->value;
}

std::string text_or(const JsonPlace& place, std::string_view key, const std::string& expected,
                    const std::string& otherwise) {
  if (!place.has(key)) return otherwise;
  return place.member(key).text(expected).value_or(otherwise);
}

}  // namespace bandwright
