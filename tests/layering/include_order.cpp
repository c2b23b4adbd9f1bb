#include "include_order.hpp"

#include <algorithm>
#include <array>
#include <fstream>
#include <optional>
#include <regex>
#include <string_view>

namespace bandwright::test {
namespace {

namespace fs = std::filesystem;

/// The rooms in their order: a file includes its own room and those before it.
constexpr std::array kRooms{
    "units",   "numeric",    "spec",    "catalogue", "device",   "stage",  "analysis", "kernel",
    "margins", "assessment", "ranking", "search",    "purchase", "design", "report",   "cli",
};

/// The room that each public header speaks for; one that is named after its room needs no row.
struct HeaderRoom {
  const char* header;
  const char* room;
};
constexpr std::array kHeaderRooms{
    HeaderRoom{"fault", "units"},         HeaderRoom{"quantity", "units"},  HeaderRoom{"version", "units"},
    HeaderRoom{"role", "spec"},           HeaderRoom{"figure", "spec"},     HeaderRoom{"cause", "spec"},
    HeaderRoom{"population", "analysis"}, HeaderRoom{"stock", "catalogue"}, HeaderRoom{"stress", "assessment"},
    HeaderRoom{"alternates", "design"},   HeaderRoom{"board", "design"},
};

/// Where headers from outside the language's own library may be included: beginnings of paths, parted by spaces.
struct Home {
  const char* include;
  const char* homes;
};
constexpr std::array kHomes{
    Home{"nlopt", "src/assessment/ src/search/"},
    Home{"nlohmann/", "src/spec/ src/catalogue/ src/report/json src/report/stored_result"},
    Home{"boost/program_options", "src/cli/"},
    Home{"boost/", "src/"},
    Home{"Eigen/", "src/analysis/"},
    Home{"unsupported/Eigen/", "src/analysis/"},
    Home{"tbb/", "src/search/ src/design. src/finalists. src/alternates"},
    Home{"oneapi/tbb", "src/search/ src/design. src/finalists. src/alternates"},
    Home{"execution", "src/search/ src/design. src/finalists. src/alternates"},  // the standard library hands its
                                                                                 // parallel algorithms to oneTBB
    Home{"fmt/", "src/"},
    Home{"immintrin.h", "src/kernel/"},
    Home{"sys/", "src/cli/"},
    Home{"unistd.h", "src/cli/"},
    Home{"signal.h", "src/cli/"},
    Home{"fcntl.h", "src/cli/"},
};

std::optional<std::size_t> rank_of(std::string_view room) {
  const auto* found = std::find(kRooms.begin(), kRooms.end(), room);
  if (found == kRooms.end()) return std::nullopt;
  return static_cast<std::size_t>(found - kRooms.begin());
}

std::string room_of_header(const std::string& name) {
  for (const HeaderRoom& row : kHeaderRooms)
    if (name == row.header) return row.room;
  return name;
}

/// The room of what lies in src/ itself.
constexpr const char* kPipeline = "design";

/// The room a path speaks for: "src/units/x.cpp", "src/design.cpp", "include/bandwright/x.hpp".
std::string room_of_file(const std::string& file) {
  const fs::path path(file);
  if (file.starts_with("include/")) return room_of_header(path.stem().string());
  const fs::path inside = path.lexically_relative("src");
  return inside.has_parent_path() ? inside.begin()->string() : kPipeline;
}

bool has_home_in(const Home& home, const std::string& file) {
  std::string_view rest = home.homes;
  while (!rest.empty()) {
    const std::size_t space = std::min(rest.find(' '), rest.size());
    if (file.starts_with(rest.substr(0, space))) return true;
    rest.remove_prefix(std::min(space + 1, rest.size()));
  }
  return false;
}

/// Empty where the including file may include the room.
std::string why_not_room(const std::string& from, const std::string& to) {
  const auto from_rank = rank_of(from);
  const auto to_rank = rank_of(to);
  if (!from_rank) return "the including file is in no known room (" + from + ")";
  if (!to_rank) return "no such room: " + to;
  if (*to_rank > *from_rank) return from + " comes before " + to;
  return {};
}

std::string why_not_quoted(const fs::path& project, const std::string& file, const std::string& target) {
  if (file.starts_with("include/")) return "a public header includes public headers only, in angle brackets";
  if (target.find("..") != std::string::npos) return "a path that leaves its folder";
  if (target.find('/') != std::string::npos)
    return why_not_room(room_of_file(file), fs::path(target).begin()->string());
  if (fs::exists(project / "src" / target)) return why_not_room(room_of_file(file), kPipeline);
  return "an internal header is included as \"room/file.hpp\"";
}

/// The first row that fits decides, so the longer beginnings stand first.
std::string why_not_angled(const std::string& file, const std::string& target) {
  if (target.starts_with("bandwright/"))
    return why_not_room(room_of_file(file), room_of_header(fs::path(target).stem().string()));
  for (const Home& home : kHomes)
    if (target.starts_with(home.include))
      return has_home_in(home, file) ? std::string() : std::string("its home is ") + home.homes;
  if (target.find_first_of("/.") != std::string::npos) return "a header of no known library";
  return {};
}

void check_line(const fs::path& project, const std::string& file, std::size_t number, const std::string& line,
                IncludeCheck& check) {
  static const std::regex pattern(R"(^\s*#\s*include\s*([<"]?)([^>"]*)[>"]?.*$)");
  std::smatch match;
  if (!std::regex_match(line, match, pattern)) return;
  ++check.includes;
  const std::string mark = match[1];
  const std::string target = match[2];
  std::string reason = "a computed include cannot be checked";
  if (mark == "\"") reason = why_not_quoted(project, file, target);
  if (mark == "<") reason = why_not_angled(file, target);
  if (reason.empty()) return;
  check.violations.push_back({file, number, mark + target + (mark == "<" ? ">" : mark), reason});
}

void check_file(const fs::path& project, const std::string& file, IncludeCheck& check) {
  ++check.files;
  if (!rank_of(room_of_file(file)))
    check.violations.push_back({file, 0, "", "the file is in no known room (" + room_of_file(file) + ")"});
  std::ifstream stream(project / file);
  std::string line;
  for (std::size_t number = 1; std::getline(stream, line); ++number) check_line(project, file, number, line, check);
}

}  // namespace

IncludeCheck check_includes(const fs::path& project) {
  static constexpr std::array<std::string_view, 5> kEndings{".hpp", ".cpp", ".h", ".inl", ".ipp"};
  std::vector<std::string> files;
  for (const char* top : {"src", "include"})
    for (const fs::directory_entry& entry : fs::recursive_directory_iterator(project / top))
      if (std::find(kEndings.begin(), kEndings.end(), entry.path().extension().string()) != kEndings.end())
        files.push_back(entry.path().lexically_relative(project).generic_string());
  std::sort(files.begin(), files.end());
  IncludeCheck check;
  for (const std::string& file : files) check_file(project, file, check);
  return check;
}

std::string describe(const Violation& violation) {
  return violation.file + ":" + std::to_string(violation.line) + ": " + violation.include + ": " + violation.reason;
}

}  // namespace bandwright::test
