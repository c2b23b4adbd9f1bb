// Where the project's own files lie while its tests run.
#pragma once

#include <filesystem>

namespace bandwright::test {

inline std::filesystem::path project_folder() { return BANDWRIGHT_PROJECT_FOLDER; }
inline std::filesystem::path examples_folder() { return project_folder() / "examples"; }
inline std::filesystem::path data_folder() { return project_folder() / "data"; }
inline std::filesystem::path program_file() { return BANDWRIGHT_PROGRAM_FILE; }

}  // namespace bandwright::test
