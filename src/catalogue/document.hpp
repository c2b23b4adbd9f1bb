// Catalogue documents: JSON texts that hold a transistor, or lists of transistors, families and sources.
//
//   {"type": "BC547B", ...}                                          one transistor
//   {"transistors": [...], "families": [...], "sources": {...}}      any of the three
#pragma once

#include <bandwright/catalogue.hpp>
#include <string>
#include <string_view>
#include <vector>

namespace bandwright {

struct CatalogueDocument {
  std::string name;  ///< shown in faults, and names the source of figures that state none
  std::string text;
};

/// `base` with the documents added: an entry of the same type or key replaces. Throws InputError with every fault.
Catalogue with_documents(Catalogue base, const std::vector<CatalogueDocument>& documents);

}  // namespace bandwright
