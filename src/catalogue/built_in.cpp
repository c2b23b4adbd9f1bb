// The catalogue inside the program, and looking things up in a catalogue.
#include "catalogue/document.hpp"
#include "catalogue/embedded_files.hpp"
#include "catalogue/names.hpp"

namespace bandwright {

const Catalogue& built_in_catalogue() {
  static const Catalogue catalogue = [] {
    std::vector<CatalogueDocument> documents;
    for (const EmbeddedFile& file : embedded_files())
      documents.push_back({std::string(file.name), std::string(file.text)});
    return with_documents({}, documents);
  }();
  return catalogue;
}

const Transistor* Catalogue::find_transistor(std::string_view type) const {
  for (const Transistor& t : transistors) {
    if (same_name(t.type, type)) return &t;
  }
  return nullptr;
}

const Family* Catalogue::find_family(std::string_view key) const {
  for (const Family& f : families) {
    if (same_name(f.key, key)) return &f;
  }
  return nullptr;
}

}  // namespace bandwright
