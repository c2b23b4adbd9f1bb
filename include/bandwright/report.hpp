// Report: writers of a result. They format and never compute.
#pragma once

#include <bandwright/design.hpp>
#include <string>

namespace bandwright {

struct TableStyle {
  bool colour = false;
  int width = 100;  ///< columns to fill at most
};

/// For people: verdict, ranked table, the first candidate in full, definitions, cautions.
std::string write_table(const DesignResult& result, const TableStyle& style = {});

/// The result document, "bandwright/result" version 1.
std::string write_json(const DesignResult& result);

/// One row a candidate, RFC 4180.
std::string write_csv(const DesignResult& result);

/// For people: a list of all that the catalogue holds, or one entry with figures, provenance and lead order.
std::string write_catalogue(const Catalogue& catalogue);
std::string write_transistor(const Catalogue& catalogue, const Transistor& transistor);
std::string write_family(const Catalogue& catalogue, const Family& family);
std::string write_series(const Series& series);

}  // namespace bandwright
