// Reads every #include of src/ and include/ and names those that the house forbids: an include of a later room, a
// third-party header outside its home, a path that leaves its folder.
#pragma once

#include <cstddef>
#include <filesystem>
#include <string>
#include <vector>

namespace bandwright::test {

/// One forbidden include.
struct Violation {
  std::string file;     ///< relative to the project's folder
  std::size_t line;     ///< from 1; 0: the file itself
  std::string include;  ///< as written, with quotes or brackets
  std::string reason;
};

struct IncludeCheck {
  std::size_t files = 0;
  std::size_t includes = 0;
  std::vector<Violation> violations;
};

IncludeCheck check_includes(const std::filesystem::path& project);

std::string describe(const Violation& violation);

}  // namespace bandwright::test
