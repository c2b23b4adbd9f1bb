// One value of the spec, from its JSON form to a reading, by the shape of its field.
#pragma once

#include <optional>
#include <string>

#include "spec/field.hpp"

namespace bandwright {

/// Why a value is no good.
struct Objection {
  std::string expected;
  std::string suggestion;
};

std::optional<Reading> read_value(const Field& field, const Json& value, Objection& objection);

/// The JSON form of a value given on the command line; a null where the text cannot be cut into one.
Json command_line_value(const Field& field, const std::string& text);

/// The pieces of a text between commas.
std::vector<std::string> comma_separated(const std::string& text);

}  // namespace bandwright
