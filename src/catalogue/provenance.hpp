// Marks and sources of a figure, as they stand in the data files.
#pragma once

#include <bandwright/catalogue.hpp>
#include <optional>
#include <string>
#include <vector>

#include "catalogue/json_place.hpp"

namespace bandwright {

/// The three things that travel with every figure.
struct Marks {
  Provenance provenance = Provenance::one_sheet;
  std::vector<std::string> sources;
  std::string note;
};

/// Keys that read_marks reads.
const std::vector<std::string>& marks_keys();

/// Reads "provenance", "sources" and "note". A figure that names no source has its file as source.
Marks read_marks(const JsonPlace& place);

/// The source key that stands for a file itself: "figures given in mine/xy.json".
std::string own_source_key(const std::string& file);

}  // namespace bandwright
