#include "spec/statements.hpp"

#include <algorithm>
#include <set>

#include "spec/reading.hpp"
#include "units/printable.hpp"
#include "units/suggest.hpp"

namespace bandwright {

namespace {

constexpr std::size_t kMostFaults = 200;
constexpr std::size_t kLongestPath = 200;  // bytes; every known one is shorter

std::string joined(const std::string& parent, const std::string& key) {
  return parent.empty() ? key : parent + "." + key;
}

// The path and all objects it stands in.
std::vector<std::string> upwards(std::string path) {
  std::vector<std::string> out;
  while (!path.empty()) {
    out.push_back(path);
    const std::size_t dot = path.rfind('.');
    path.resize(dot == std::string::npos ? 0 : dot);
  }
  return out;
}

std::string list_of(const std::vector<std::string>& names) {
  std::string out;
  for (const std::string& name : names) out += (out.empty() ? "" : ", ") + name;
  return out;
}

// What is wrong with a figure that is known and never required.
std::string why_not_required(const std::string& key) {
  const auto figure = find_figure(key);
  if (!figure || info(*figure).use == FigureUse::required) return "";
  const bool later = info(*figure).use == FigureUse::reserved;
  return key + " left out: it is " + (later ? "not computed by this version" : "reported, never required");
}

// A name that is known, and where it belongs; empty where it is not known.
std::string known_elsewhere(const std::string& parent, const std::string& key) {
  if (parent == "requirements") return why_not_required(key);
  if (!parent.empty()) return "";
  if (key == "allow_high_voltage") return "it on the command line only, as --allow-high-voltage";
  return find_figure(key) ? "it inside \"requirements\"" : "";
}

// The nearest key of the object, or the one that a designator or symbol stands for.
std::string suggested_key(const std::string& parent, const std::string& written) {
  const std::string nearest = nearest_name(written, members(parent));
  const auto cause = find_cause(written);  // roles are causes too
  if (!nearest.empty() || !cause || !find_field(joined(parent, info(*cause).key))) return nearest;
  return info(*cause).key;
}

// "noise-figure-max" gives "noise_figure".
std::string figure_key_of(std::string option) {
  for (const std::string_view end : {"-min", "-max", "-tolerance"})
    if (option.ends_with(end)) option.resize(option.size() - end.size());
  std::replace(option.begin(), option.end(), '-', '_');
  return option;
}

std::vector<std::string> option_names() {
  std::vector<std::string> out;
  for (const Field& field : fields())
    if (!field.option.empty()) out.push_back(field.option);
  return out;
}

}  // namespace

void Statements::object_at(const std::string& path, Fault fault) {
  if (path.size() <= kLongestPath)
    for (const std::string& above : upwards(path)) spoiled_.insert(above);
  if (faults_.size() < kMostFaults) faults_.push_back(std::move(fault));
  if (faults_.size() == kMostFaults) faults_.push_back({"", "", "fewer faults: the rest is not listed", ""});
}

void Statements::object(const std::string& path, const std::string& expected, const std::string& suggestion) {
  const Statement* statement = find(path);
  if (statement)
    object_at(path, {statement->where, found_text(statement->value), expected, suggestion});
  else
    object_at(path, {prefix_ + path, "", expected, suggestion});
}

const Statement* Statements::find(const std::string& path) const {
  const auto found = statements_.find(path);
  return found == statements_.end() ? nullptr : &found->second;
}

void Statements::state(const std::string& path, Statement statement) {
  for (const std::string& above : upwards(path)) touched_.insert(above);
  statements_[path] = std::move(statement);
}

void Statements::take_document(const Json& spec, const std::string& prefix) {
  prefix_ = prefix;
  walk_members(spec, "");
}

void Statements::walk(const Json& node, const std::string& path) {
  touched_.insert(path);
  const Field* field = find_field(path);
  if (field && field->shape != Shape::keyed) return state(path, {prefix_ + path, node});
  if (node.is_object()) return walk_members(node, path);
  if (const Field* bare = bare_field(path)) return state(bare->path, {prefix_ + path, node});
  object_at(path, {prefix_ + path, found_text(node), "an object with " + list_of(members(path)), ""});
  spoil_under(path);
}

// Nothing under it counts as missing: one fault says enough.
void Statements::spoil_under(const std::string& path) {
  for (const Field& field : fields())
    if (field.path == path || field.path.starts_with(path + "."))
      for (const std::string& above : upwards(field.path)) spoiled_.insert(above);
}

void Statements::walk_members(const Json& node, const std::string& path) {
  for (const auto& [key, value] : node.items()) {
    bool known = false;
    for (const std::string& member : members(path)) known = known || member == key;
    if (known)
      walk(value, joined(path, key));
    else
      unknown_key(path, key, value);
  }
}

void Statements::unknown_key(const std::string& parent, const std::string& key, const Json& value) {
  const std::string path = joined(parent, key);
  const std::string where = prefix_ + path;
  touched_.insert(path);
  const std::string elsewhere = known_elsewhere(parent, key);
  if (!elsewhere.empty()) return object_at(path, {where, found_text(value), elsewhere, ""});
  const std::string suggestion = suggested_key(parent, key);
  object_at(path, {where, key, "one of the keys " + list_of(members(parent)), suggestion});
  if (!suggestion.empty()) spoil_under(joined(parent, suggestion));
}

void Statements::take_overrides(const std::vector<Override>& overrides) {
  for (const Override& given : overrides) take_override(given);
}

void Statements::take_override(const Override& given) {
  const auto& [option, text] = given;
  const std::string where = "--" + option;
  const Field* field = find_option(option);
  if (!field) return unknown_option(option, text);
  if (!given_options_.insert(option).second) return object_at(field->path, {where, text, "this option once", ""});
  if (!is_utf8(text)) return object_at(field->path, {where, text, "text in UTF-8", ""});
  if (field->shape == Shape::keyed) return take_keyed(*field, given);
  state(field->path, {where, command_line_value(*field, text)});
}

void Statements::unknown_option(const std::string& option, const std::string& text) {
  const std::string where = "--" + option;
  const std::string known = why_not_required(figure_key_of(option));
  if (!known.empty()) return object_at("", {where, text, known, ""});
  const std::string nearest = nearest_name(option, option_names());
  object_at("", {where, where, "an option of the spec", nearest.empty() ? "" : "--" + nearest});
}

// "collector=4k7,shunt=absent"
void Statements::take_keyed(const Field& field, const Override& given) {
  const std::string where = "--" + given.first;
  std::set<std::string> seen;
  for (const std::string& item : comma_separated(given.second)) {
    const std::size_t equals = item.find('=');
    if (equals == std::string::npos) {
      object_at(field.path, {where, item, field.key_noun + "=value, several between commas", ""});
      continue;
    }
    const std::string key = item.substr(0, equals);
    if (!seen.insert(key).second) {
      object_at(field.path, {where, key + " twice", "each key once", ""});
      continue;
    }
    const Field* row = find_field(joined(field.path, key));
    if (row)
      state(row->path, {where + " " + key, command_line_value(*row, item.substr(equals + 1))});
    else
      object_at(field.path, {where, key, "one of the " + field.key_noun + "s " + list_of(members(field.path)),
                             suggested_key(field.path, key)});
  }
}

}  // namespace bandwright
