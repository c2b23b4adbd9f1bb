// JSON text to a document, for every reader of JSON: syntax errors with line and column, duplicate keys refused,
// size, depth and members guarded.
#pragma once

#include <bandwright/fault.hpp>
#include <cstddef>
#include <nlohmann/json.hpp>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace bandwright {

using Json = nlohmann::ordered_json;

inline constexpr std::size_t kLargestDocument = 16u << 20u;  ///< bytes
inline constexpr int kDeepestDocument = 64;                  ///< objects and arrays within each other
inline constexpr std::size_t kMostMembers = 10000;           ///< of one object

/// The document, or none where the text is no JSON; faults are added either way. `name` is the file's.
std::optional<Json> read_document(std::string_view text, std::string_view name, std::vector<Fault>& faults);

/// A value as it is quoted in a fault: a string as it stands, anything else as JSON, at most some hundred bytes.
std::string found_text(const Json& value);

}  // namespace bandwright
