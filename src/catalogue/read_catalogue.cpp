#include <algorithm>
#include <bandwright/fault.hpp>
#include <fstream>
#include <iterator>
#include <system_error>

#include "catalogue/document.hpp"

namespace bandwright {

namespace {

namespace fs = std::filesystem;

std::vector<fs::path> json_files(const fs::path& folder) {
  std::vector<fs::path> files;
  std::error_code error;
  fs::recursive_directory_iterator entry(folder, error);
  for (; !error && entry != fs::recursive_directory_iterator(); entry.increment(error)) {
    if (entry->is_regular_file(error) && entry->path().extension() == ".json") files.push_back(entry->path());
  }
  if (error) throw FileError("cannot read the folder " + folder.string() + ": " + error.message());
  if (files.empty()) throw FileError("no .json file in " + folder.string());
  std::sort(files.begin(), files.end());
  return files;
}

std::string contents(const fs::path& file) {
  std::ifstream stream(file, std::ios::binary);
  std::string text{std::istreambuf_iterator<char>(stream), {}};
  if (!stream) throw FileError("cannot read " + file.string());
  return text;
}

}  // namespace

Catalogue read_catalogue(const fs::path& folder) {
  std::vector<CatalogueDocument> documents;
  for (const fs::path& file : json_files(folder)) documents.push_back({file.string(), contents(file)});
  return with_documents(built_in_catalogue(), documents);
}

}  // namespace bandwright
