// Fields: the one table of what a spec may say. Reading, command-line options, help and writing come from it.
#pragma once

#include <bandwright/quantity.hpp>
#include <bandwright/spec.hpp>
#include <functional>
#include <limits>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "spec/json_document.hpp"
#include "units/quantity_text.hpp"

namespace bandwright {

/// How a value is written.
enum class Shape {
  text,
  word,        ///< one of Field::words
  names,       ///< a list of text; comma separated on the command line
  quantity,    ///< a number or text, of Field::dimension
  tolerance,   ///< relative, of a quantity of Field::dimension
  difference,  ///< of temperatures
  per_kelvin,  ///< a share for each kelvin
  count,       ///< a whole number
  flag,
  range,  ///< [min, max]; "min:max" on the command line
  keyed,  ///< an object with one field a role or cause; "role=value,..." on the command line
};

/// A value as read, before it is stored.
struct Reading {
  double number = 0;
  double second = 0;  ///< max of a range
  WrittenTolerance tolerance;
  std::string text;
  std::vector<std::string> names;
  std::string note;
};

/// A condition before its ends are resolved.
struct ConditionDraft {
  std::optional<double> nominal, min, max;
  std::optional<Tolerance> tolerance;
  std::optional<double> difference;  ///< two-sided, of temperatures
};

/// A requirement before its limits are resolved.
struct RequirementDraft {
  std::optional<double> target, min, max;
  std::optional<WrittenTolerance> tolerance;
  bool empty() const { return !target && !min && !max && !tolerance; }
};

/// What is stored while reading.
struct Draft {
  Spec spec;
  ConditionDraft supply, ambient;
  std::array<RequirementDraft, kFigureCount> requirements;
};

inline constexpr double kUnlimited = std::numeric_limits<double>::infinity();

/// One row of the table.
struct Field {
  std::string path{};    ///< in the file: "requirements.gain.min"
  std::string option{};  ///< "gain-min"; empty: files only
  Shape shape = Shape::text;
  Dimension dimension = Dimension::fraction;
  ValueRange allowed{-kUnlimited, kUnlimited};  ///< SI; for tolerances the larger side
  std::string help{};                           ///< what it is
  std::string usual{};                          ///< the default in words; empty: none
  std::vector<std::string> words{};
  std::string key_noun{};        ///< what the keys of a keyed object are: "role"
  std::string word_for_limit{};  ///< "open", "absent", "off": a word in place of the number `limit`, of any shape
  double limit = 0;
  bool bare = false;    ///< the value that stands for the whole object: "supply": "12 V"
  bool direct = false;  ///< a DC voltage: no peak-to-peak, no rms
  std::function<std::string(const Reading&)> refuse{};  ///< what would be right, or empty
  std::function<void(Draft&, const Reading&)> store{};
  std::function<Json(const Spec&)> show{};  ///< null: left out
};

/// All fields, in the order of a written spec.
const std::vector<Field>& fields();

const Field* find_field(std::string_view path);
const Field* find_option(std::string_view option);
const Field* bare_field(std::string_view path);  ///< the field for which a bare value at `path` stands
const std::vector<std::string>& members(const std::string& path);  ///< known keys of the object at `path`

/// "requirements.gain.min" gives "gain-min".
std::string option_of(std::string_view path);

/// "from 0 Ω to 1 GΩ"
std::string describe_range(const Field& field);

}  // namespace bandwright
