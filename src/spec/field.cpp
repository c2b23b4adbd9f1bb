#include "spec/field.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <iterator>
#include <map>

#include "spec/field_groups.hpp"

namespace bandwright {

namespace {

std::vector<Field> all_fields() {
  std::vector<Field> rows;
  for (auto group : {circuit_fields, requirement_fields, part_fields, stock_fields, search_fields, assess_fields}) {
    std::vector<Field> more = group();
    std::move(more.begin(), more.end(), std::back_inserter(rows));
  }
  return rows;
}

std::string_view parent_of(std::string_view path) {
  const std::size_t dot = path.rfind('.');
  return dot == std::string_view::npos ? std::string_view() : path.substr(0, dot);
}

void drop(std::string_view& text, std::string_view start, std::string_view end) {
  if (text.starts_with(start)) text.remove_prefix(start.size());
  if (text.ends_with(end)) text.remove_suffix(end.size());
}

using Members = std::map<std::string, std::vector<std::string>, std::less<>>;

Members all_members() {
  Members out;
  for (const Field& field : fields())
    for (std::string_view path = field.path; !path.empty(); path = parent_of(path)) {
      const std::string_view parent = parent_of(path);
      const std::string key(path.substr(parent.empty() ? 0 : parent.size() + 1));
      std::vector<std::string>& keys = out[std::string(parent)];
      if (std::find(keys.begin(), keys.end(), key) == keys.end()) keys.push_back(key);
    }
  return out;
}

template <class Condition>
const Field* first_where(const Condition& condition) {
  const auto found = std::find_if(fields().begin(), fields().end(), condition);
  return found == fields().end() ? nullptr : &*found;
}

std::string percent(double share) { return fmt::format("{:.6g} %", 100 * share); }

}  // namespace

const std::vector<Field>& fields() {
  static const std::vector<Field> kFields = all_fields();
  return kFields;
}

const Field* find_field(std::string_view path) {
  return first_where([&](const Field& field) { return field.path == path; });
}

const Field* find_option(std::string_view option) {
  return first_where([&](const Field& field) { return !option.empty() && field.option == option; });
}

const Field* bare_field(std::string_view path) {
  return first_where([&](const Field& field) { return field.bare && parent_of(field.path) == path; });
}

const std::vector<std::string>& members(const std::string& path) {
  static const Members kMembers = all_members();
  static const std::vector<std::string> kNone;
  const auto found = kMembers.find(path);
  return found == kMembers.end() ? kNone : found->second;
}

std::string option_of(std::string_view path) {
  drop(path, "requirements.", ".target");
  drop(path, "parts.", ".nominal");
  std::string out(path);
  for (char& c : out)
    if (c == '.' || c == '_') c = '-';
  return out;
}

std::string describe_range(const Field& field) {
  const auto [low, high] = field.allowed;
  if (field.shape == Shape::count) return fmt::format("from {:.0f} to {:.0f}", low, high);
  const bool is_share = field.shape == Shape::quantity && field.dimension == Dimension::fraction;
  if (is_share || field.shape == Shape::tolerance) return fmt::format("from {} to {}", percent(low), percent(high));
  if (field.shape == Shape::difference) return fmt::format("from {:.6g} K to {:.6g} K", low, high);
  if (field.shape == Shape::per_kelvin) return fmt::format("from {:.6g} to {:.6g} ppm/K", 1e6 * low, 1e6 * high);
  return fmt::format("from {} to {}", format_quantity(low, field.dimension), format_quantity(high, field.dimension));
}

}  // namespace bandwright
