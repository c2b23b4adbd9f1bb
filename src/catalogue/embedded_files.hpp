// The files of data/ as they were when the program was built.
#pragma once

#include <cstddef>
#include <string_view>
#include <vector>

namespace bandwright {

struct EmbeddedFile {
  std::string_view name;  ///< "transistors/bc547b.json"
  std::string_view text;
};

/// All files of data/, by name.
const std::vector<EmbeddedFile>& embedded_files();

}  // namespace bandwright
