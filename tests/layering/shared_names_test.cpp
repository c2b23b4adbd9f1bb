// Code that is built for a special instruction set shares no name with other code: the linker would be free to keep its
// copy, and the program would stop on machines without these instructions.
#include <sstream>

#include "catch.hpp"
#include "run_program.hpp"

using namespace bandwright::test;

namespace {

struct Symbols {
  int own = 0;         ///< defined in the object alone
  std::string shared;  ///< names that another object may define too, one a line
};

/// What `nm` says of one object of the library's archive.
Symbols symbols_of(const std::string& object) {
  const Outcome outcome = run_command({"nm", "--demangle", BANDWRIGHT_LIBRARY_FILE});
  REQUIRE(outcome.status == 0);
  Symbols found;
  std::istringstream lines(outcome.out);
  bool inside = false;
  for (std::string line; std::getline(lines, line);) {
    if (line.ends_with(".o:")) inside = line == object + ":";
    if (!inside || line.size() < 19) continue;
    const char kind = line[17];
    if (std::string("WVuw").find(kind) != std::string::npos) found.shared += line.substr(19) + "\n";
    if (std::string("TtRr").find(kind) != std::string::npos) ++found.own;
  }
  return found;
}

bool is_archive() { return std::string(BANDWRIGHT_LIBRARY_FILE).ends_with(".a"); }

}  // namespace

TEST_CASE("the solver for AVX2 shares no name with code for every machine", "[layering]") {
  if (!is_archive()) return;  // of a shared library only the linked whole is left
  const Symbols solver = symbols_of("avx2.cpp.o");
  CHECK(solver.own > 0);
  CHECK(solver.shared.empty());
  INFO("other objects do share names, so that an empty list says something");
  CHECK_FALSE(symbols_of("run_units.cpp.o").shared.empty());
}
