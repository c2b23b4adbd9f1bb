// The rooms include only rooms before them; and the check that says so catches every kind of breach.
#include "include_order.hpp"

#include <algorithm>
#include <fstream>

#include "catch.hpp"
#include "places.hpp"
#include "run_program.hpp"

namespace bandwright::test {
namespace {

namespace fs = std::filesystem;

/// A breach as somebody might write it.
struct Planted {
  const char* file;
  const char* text;
  const char* reason;  ///< a piece of what the check must say
};

const Planted kPlanted[] = {
    {"src/units/planted.cpp", "#include <bandwright/spec.hpp>\n", "units comes before spec"},
    {"src/units/planted.cpp", "#include \"numeric/dual.hpp\"\n", "units comes before numeric"},
    {"src/numeric/planted.hpp", "  #  include \"catalogue/reader.hpp\"\n", "numeric comes before catalogue"},
    {"src/spec/planted.cpp", "#include <bandwright/catalogue.hpp>\n", "spec comes before catalogue"},
    {"src/analysis/planted.cpp", "#include <bandwright/margins.hpp>\n", "analysis comes before margins"},
    {"src/ranking/planted.cpp", "#include \"search/relaxation.hpp\"\n", "ranking comes before search"},
    {"src/search/planted.cpp", "#include <bandwright/purchase.hpp>\n", "search comes before purchase"},
    {"src/search/planted.cpp", "#include \"pipeline_planted.hpp\"\n", "search comes before design"},
    {"src/search/deep/planted.cpp", "#include \"cli/command.hpp\"\n", "search comes before cli"},
    {"src/design.hpp", "#include <bandwright/report.hpp>\n", "design comes before report"},
    {"src/report/planted.cpp", "#include \"cli/command.hpp\"\n", "report comes before cli"},
    {"src/planted/planted.cpp", "int planted;\n", "no known room"},
    {"src/report/planted.cpp", "#include \"planted/planted.hpp\"\n", "no such room"},
    {"src/report/planted.cpp", "#include <bandwright/planted.hpp>\n", "no such room"},
    {"src/report/planted.cpp", "#include \"planted.hpp\"\n", "room/file.hpp"},
    {"src/report/planted.cpp", "#include \"../units/planted.hpp\"\n", "leaves its folder"},
    {"src/report/planted.cpp", "#include PLANTED\n", "computed include"},
    {"src/analysis/planted.cpp", "#include <nlopt.hpp>\n", "its home is src/assessment/"},
    {"src/analysis/planted.cpp", "#include <nlohmann/json.hpp>\n", "its home is src/spec/"},
    {"src/report/table.cpp", "#include <nlohmann/json.hpp>\n", "its home is src/spec/"},
    {"src/report/planted.cpp", "#include <boost/program_options.hpp>\n", "its home is src/cli/"},
    {"src/search/planted.cpp", "#include <Eigen/Dense>\n", "its home is src/analysis/"},
    {"src/analysis/planted.cpp", "#include <tbb/parallel_for.h>\n", "its home is src/search/"},
    {"src/stage/planted.cpp", "#include <execution>\n", "its home is src/search/"},
    {"src/report/planted.cpp", "#include <unistd.h>\n", "its home is src/cli/"},
    {"src/report/planted.cpp", "#include <planted/planted.h>\n", "no known library"},
    {"include/bandwright/spec.hpp", "#include <bandwright/design.hpp>\n", "spec comes before design"},
    {"include/bandwright/figure.hpp", "#include <fmt/format.h>\n", "its home is src/"},
    {"include/bandwright/report.hpp", "#include <nlohmann/json.hpp>\n", "its home is src/spec/"},
    {"include/bandwright/report.hpp", "#include \"report/table.hpp\"\n", "public headers only"},
    {"include/bandwright/planted.hpp", "int planted;\n", "no known room"},
};

/// What the house allows: none of these may be refused.
const Planted kAllowed[] = {
    {"src/numeric/planted.hpp", "#include <cmath>\n#include \"units/constants.hpp\"\n", ""},
    {"src/catalogue/planted.cpp", "#include <bandwright/spec.hpp>\n#include <nlohmann/json.hpp>\n", ""},
    {"src/analysis/planted.cpp", "#include <Eigen/Dense>\n#include \"analysis/response.hpp\"\n", ""},
    {"src/search/planted.cpp", "#include <nlopt.hpp>\n#include <tbb/parallel_for.h>\n", ""},
    {"src/cli/planted.cpp", "#include \"pipeline_planted.hpp\"\n", ""},
    {"src/design.hpp", "#include <bandwright/purchase.hpp>\n#include <oneapi/tbb/parallel_for.h>\n", ""},
    {"src/report/json_planted.cpp", "#include <nlohmann/json.hpp>\n#include <bandwright/design.hpp>\n", ""},
    {"src/cli/planted.cpp", "#include <unistd.h>\n#include <boost/program_options.hpp>\n#include <fmt/format.h>\n", ""},
    {"src/report/planted.cpp", "// #include <unistd.h>\n", ""},
};

void copy_sources(const fs::path& to) {
  for (const char* top : {"src", "include"}) fs::copy(project_folder() / top, to / top, fs::copy_options::recursive);
}

std::vector<std::string> described(const IncludeCheck& check) {
  std::vector<std::string> lines;
  for (const Violation& violation : check.violations) lines.push_back(describe(violation));
  return lines;
}

/// What the check says of the planted lines: they are added at the end of a file, so nothing else moves.
std::vector<std::string> said_of(const Planted& planted) {
  const TemporaryFolder copy;
  copy_sources(copy.path());
  copy.write("src/pipeline_planted.hpp", "");
  const std::vector<std::string> before = described(check_includes(copy.path()));
  fs::create_directories((copy.path() / planted.file).parent_path());
  std::ofstream(copy.path() / planted.file, std::ios::app) << "\n" << planted.text;
  std::vector<std::string> fresh;
  for (const std::string& line : described(check_includes(copy.path())))
    if (std::find(before.begin(), before.end(), line) == before.end()) fresh.push_back(line);
  return fresh;
}

TEST_CASE("no include runs backwards along the rooms, and third-party headers stay at home") {
  const IncludeCheck check = check_includes(project_folder());
  CHECK(check.files > 15);  // the public headers alone are more
  CHECK(check.includes > check.files);
  for (const std::string& line : described(check)) FAIL_CHECK(line);
}

TEST_CASE("a planted breach of the include order is caught") {
  for (const Planted& planted : kPlanted) {
    const std::vector<std::string> said = said_of(planted);
    CAPTURE(planted.file, planted.text, planted.reason, said);
    REQUIRE(!said.empty());
    CHECK(said.front().starts_with(planted.file));
    CHECK(said.front().find(planted.reason) != std::string::npos);
  }
}

TEST_CASE("an include that the house allows is not refused") {
  for (const Planted& planted : kAllowed) {
    const std::vector<std::string> said = said_of(planted);
    CAPTURE(planted.file, planted.text, said);
    CHECK(said.empty());
  }
}

}  // namespace
}  // namespace bandwright::test
