// A place in a JSON document: reads values there and keeps every fault it meets, so that all are told at once.
#pragma once

#include <bandwright/fault.hpp>
#include <bandwright/quantity.hpp>
#include <initializer_list>
#include <nlohmann/json.hpp>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace bandwright {

/// What reading a document leaves behind besides the values.
struct ReadingLog {
  std::string file;
  std::vector<Fault> faults;
  bool is_a_source = false;  ///< a figure states no source: the file itself is the source

  /// A source key that a figure names: checked when all sources are known.
  struct Reference {
    std::string where;
    std::string key;
  };
  std::vector<Reference> references;
};

class JsonPlace {
public:
  JsonPlace(const nlohmann::json& value, std::string path, ReadingLog& log)
      : value_(&value), path_(std::move(path)), log_(&log) {}

  const nlohmann::json& value() const { return *value_; }
  ReadingLog& log() const { return *log_; }
  std::string where() const;  ///< "mine/xy.json: current_gain[0].min"

  /// Notes a fault here; what was found is the value itself, shortened.
  void fault(const std::string& expected, const std::string& suggestion = {}) const;
  /// Notes that a member is missing.
  void missing(std::string_view key, const std::string& expected) const;

  /// False, with a fault, where this is not an object, or not a list.
  bool is_object(const std::string& expected) const;
  bool is_list(const std::string& expected) const;
  /// Notes every key that is not among the known ones, with the nearest.
  void only_keys(const std::vector<std::string>& known) const;

  bool has(std::string_view key) const;
  JsonPlace member(std::string_view key) const;
  std::vector<JsonPlace> elements() const;  ///< of a list; any other value is a list of itself

  /// Each returns nothing, with a fault, where the value is of another kind.
  std::optional<std::string> text(const std::string& expected) const;
  std::optional<bool> truth() const;
  /// A JSON number is SI (never a temperature); a string is read as a quantity.
  std::optional<double> quantity(Dimension dimension) const;

private:
  const nlohmann::json* value_;
  std::string path_;
  ReadingLog* log_;
};

/// The named member as text or a default, with a fault where it is not text.
std::string text_or(const JsonPlace& place, std::string_view key, const std::string& expected,
                    const std::string& otherwise = {});

}  // namespace bandwright
