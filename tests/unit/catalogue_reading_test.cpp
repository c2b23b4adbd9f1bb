// A folder of one's own: adding, replacing, and every fault of a malformed file.
#include <bandwright/catalogue.hpp>
#include <bandwright/device.hpp>
#include <cmath>
#include <fstream>
#include <random>

#include "catalogue/document.hpp"
#include "catch.hpp"

using namespace bandwright;
using Catch::Matchers::ContainsSubstring;
namespace fs = std::filesystem;

namespace {

// A folder that goes when the test ends.
class Folder {
public:
  Folder() : path_(fs::temp_directory_path() / ("bandwright-catalogue-" + std::to_string(std::random_device{}()))) {
    fs::create_directories(path_);
  }
  ~Folder() { fs::remove_all(path_); }
  Folder(const Folder&) = delete;
  Folder& operator=(const Folder&) = delete;
  const fs::path& path() const { return path_; }
  void write(const std::string& name, const std::string& text) const {
    fs::create_directories((path_ / name).parent_path());
    std::ofstream(path_ / name, std::ios::binary) << text;
  }

private:
  fs::path path_;
};

// The least that a data sheet must give.
const char* const kSmallest = R"({
  "type": "QX100",
  "polarity": "NPN",
  "collector_emitter_breakdown": {"max": "45 V"},
  "collector_current_limit": {"max": "100 mA"},
  "power_limit": {"max": "500 mW"},
  "current_gain": {"min": 110, "max": 450, "collector_current": "2 mA", "collector_emitter_voltage": "5 V"},
  "transition_frequency": {"typ": "300 MHz", "collector_current": "10 mA", "collector_emitter_voltage": "5 V"},
  "output_capacitance": {"typ": "3.5 pF", "collector_base_voltage": "10 V"}
})";

std::string smallest_with(const std::string& from, const std::string& to) {
  std::string text = kSmallest;
  const std::size_t at = text.find(from);
  REQUIRE(at != std::string::npos);
  return text.replace(at, from.size(), to);
}

std::vector<Fault> faults_of(const std::string& text) {
  try {
    with_documents(built_in_catalogue(), {{"mine.json", text}});
  } catch (const InputError& error) {
    return error.faults();
  }
  return {};
}

}  // namespace

TEST_CASE("the least set of figures makes a transistor") {
  const Folder folder;
  folder.write("qx100.json", kSmallest);
  const Catalogue catalogue = read_catalogue(folder.path());
  CHECK(catalogue.transistors.size() == built_in_catalogue().transistors.size() + 1);
  const Transistor* t = catalogue.find_transistor("QX100");
  REQUIRE(t != nullptr);
  CHECK(t->current_gain[0].provenance == Provenance::one_sheet);
  REQUIRE(t->current_gain[0].sources.size() == 1);
  CHECK_THAT(catalogue.sources.at(t->current_gain[0].sources[0]).title, ContainsSubstring("qx100.json"));
  const DerivedDevice device = derive_parameters(*t);
  CHECK(device.parameters.breakdown_voltage == 45.0);
  CHECK(1 / device.parameters.inverse_early_voltage == Approx(100).epsilon(1e-12));
}

TEST_CASE("entries of the same name replace, sources join") {
  const Folder folder;
  folder.write("transistors/a.json", smallest_with("QX100", "bc547b"));
  folder.write("b.json", R"({"sources": {"own": {"title": "My sheet, rev 1, 2020", "read": "on paper"}},
    "families": [{"key": "film", "name": "my film capacitor", "kind": "capacitor",
      "series": {"names": ["E12"], "sources": ["own"]}, "made": {"min": "1 nF", "max": "2.2 uF"},
      "first_choice": {"min": "10 nF", "max": "1 uF"}, "tolerances": {"offered": ["5 %", "-5/+10 %"]},
      "temperature_coefficient": {"max": "300 ppm/K"}, "ratings": {"rows": [{"voltage": "100 V"}]}}]})");
  const Catalogue catalogue = read_catalogue(folder.path());
  CHECK(catalogue.transistors.size() == built_in_catalogue().transistors.size());
  CHECK(catalogue.find_transistor("BC547B")->current_gain.size() == 1);
  CHECK(catalogue.families.size() == built_in_catalogue().families.size());
  const Family& film = *catalogue.find_family("film");
  CHECK(film.name == "my film capacitor");
  CHECK(film.series == std::vector<std::string>{"E12"});
  CHECK(film.temperature_coefficient == Approx(300e-6).epsilon(1e-12));
  CHECK(film.tolerances[1].below == Approx(0.05).epsilon(1e-12));
  CHECK(film.tolerances[1].above == Approx(0.10).epsilon(1e-12));
  CHECK_THAT(film.provenance.at("series"), ContainsSubstring("own"));
  CHECK(catalogue.sources.at("own").title == "My sheet, rev 1, 2020");
}

TEST_CASE("several transistors in one file, PNP, infinite and zero figures") {
  std::string ideal = smallest_with("\"typ\": \"3.5 pF\", \"collector_base_voltage\": \"10 V\"", "\"typ\": 0");
  ideal.replace(ideal.find("\"300 MHz\""), 9, "\"infinite\"");
  ideal.insert(ideal.rfind('}'), R"(, "early_voltage": {"typ": "infinite"}, "base_resistance": {"typ": 0},
    "input_capacitance": {"typ": "0"}, "cutoff_current": [{"typ": 0}])");
  std::string pnp = smallest_with("\"NPN\"", "\"PNP\"");
  pnp.replace(pnp.find("QX100"), 5, "QX101");
  const Catalogue catalogue =
      with_documents(built_in_catalogue(), {{"mine.json", "{\"transistors\": [" + ideal + "," + pnp + "]}"}});
  CHECK(catalogue.find_transistor("QX101")->pnp);
  const BipolarParameters p = derive_parameters(*catalogue.find_transistor("QX100")).parameters;
  CHECK(p.inverse_early_voltage == 0.0);
  CHECK(p.base_resistance == 0.0);
  CHECK(p.emitter_capacitance == 0.0);
  CHECK(p.feedback_capacitance == 0.0);
  CHECK(p.transit_time == 0.0);
  CHECK(p.cutoff_current == 0.0);
}

TEST_CASE("folders that cannot be read") {
  const Folder folder;
  CHECK_THROWS_AS(read_catalogue(folder.path()), FileError);  // no .json in it
  CHECK_THROWS_AS(read_catalogue(folder.path() / "nowhere"), FileError);
}

namespace {

struct Malformed {
  const char* from;  // of the smallest transistor
  const char* to;
  const char* where;
  const char* expected;
  const char* suggestion;
};

// What stands in the file in place of what is right, and what is then said.
const std::vector<Malformed> kMalformed = {
    {"\"45 V\"", "\"45 volts\"", "collector_emitter_breakdown.max", "a voltage", ""},
    {"\"45 V\"", "\"45 A\"", "collector_emitter_breakdown.max", "a voltage", ""},
    {"\"45 V\"", "\"-45 V\"", "collector_emitter_breakdown.max", "above 0", ""},
    {"\"45 V\"", "true", "collector_emitter_breakdown.max", "a voltage", ""},
    {"{\"max\": \"45 V\"}", "\"45 V\"", "collector_emitter_breakdown", "a figure such as", ""},
    {"{\"max\": \"45 V\"}", "{}", "collector_emitter_breakdown", "at least one of min, typ and max", ""},
    {"{\"max\": \"45 V\"}", "{\"maximum\": \"45 V\", \"typ\": \"50 V\"}", "collector_emitter_breakdown", "known", ""},
    {"\"polarity\": \"NPN\"", "\"polarity\": \"npn type\"", "polarity", "NPN or PNP", ""},
    {"\"polarity\": \"NPN\",", "", "polarity", "NPN or PNP", ""},
    {"\"type\": \"QX100\",", "", "type", "BC547B", ""},
    {"\"type\": \"QX100\"", "\"type\": 100", "type", "BC547B", ""},
    {"\"power_limit\"", "\"power_limits\"", "", "known", "power_limit"},
    {"\"power_limit\": {\"max\": \"500 mW\"},", "", "power_limit", "needs it", ""},
    {"\"min\": 110, \"max\": 450", "\"min\": 450, \"max\": 110", "current_gain", "min not above", ""},
    {"\"min\": 110, \"max\": 450", "\"typ\": 200", "current_gain", "a min at one point", ""},
    {"\"collector_current\": \"2 mA\", ", "", "current_gain.collector_current", "a current", ""},
    {"\"collector_current\": \"2 mA\"", "\"collector_current\": \"2 MV\"", "current_gain.collector_current",
     "a current", ""},
    {"\"collector_current\": \"2 mA\"", "\"colector_current\": \"2 mA\"", "current_gain", "known", "collector_current"},
    {"\"collector_base_voltage\": \"10 V\"", "\"emitter_base_voltage\": \"10 V\"", "output_capacitance", "known", ""},
    {", \"collector_base_voltage\": \"10 V\"", "", "output_capacitance.collector_base_voltage", "a voltage", ""},
    {"\"3.5 pF\"", "3,5", "", "JSON", ""},
    {"\"3.5 pF\"", "\"3,5 pF\"", "output_capacitance.typ", "point", ""},
    {"\"300 MHz\"", "\"300 mHz of it\"", "transition_frequency.typ", "a frequency", ""},
    {"\"300 MHz\"", "0", "transition_frequency.typ", "above 0", ""},
    {"\"500 mW\"}", "\"500 mW\", \"provenance\": \"one sheets\"}", "power_limit.provenance", "one of", "one sheet"},
    {"\"500 mW\"}", "\"500 mW\", \"sources\": [\"memry\"]}", "power_limit.sources[0]", "sources", "memory"},
    {"\"500 mW\"}", "\"500 mW\", \"sources\": \"memory\"}", "power_limit.sources", "a list", ""},
    {"\"500 mW\"}", "\"500 mW\", \"note\": 5}", "power_limit.note", "a note", ""},
};

}  // namespace

TEST_CASE("a malformed transistor is told with place, what was found, what is right and the nearest key") {
  for (const Malformed& row : kMalformed) {
    INFO(row.from << " -> " << row.to);
    const std::vector<Fault> faults = faults_of(smallest_with(row.from, row.to));
    REQUIRE_FALSE(faults.empty());
    bool found = false;
    for (const Fault& f : faults) {
      CHECK_THAT(f.where, ContainsSubstring("mine.json"));
      const std::string where = std::string("mine.json") + (*row.where == 0 ? "" : ": ") + row.where;
      found = found || (f.where == where && f.expected.find(row.expected) != std::string::npos &&
                        (*row.suggestion == 0 || f.suggestion == row.suggestion));
    }
    if (!found) {
      for (const Fault& f : faults) UNSCOPED_INFO(describe(f));
    }
    CHECK(found);
  }
}

TEST_CASE("malformed families and documents") {
  const auto first = [](const std::string& text) {
    const std::vector<Fault> faults = faults_of(text);
    return faults.empty() ? std::string("no fault") : describe(faults.front());
  };
  CHECK_THAT(first(""), ContainsSubstring("JSON"));
  CHECK_THAT(first("[1, 2"), ContainsSubstring("JSON"));
  CHECK_THAT(first("[]"), ContainsSubstring("a transistor, or an object"));
  CHECK_THAT(first("{\"transistor\": []}"), ContainsSubstring("did you mean \"transistors\""));
  CHECK_THAT(first("{\"families\": [7]}"), ContainsSubstring("families[0]"));
  CHECK_THAT(first("{\"sources\": {\"a\": {}}}"), ContainsSubstring("sources.a.title"));
  CHECK_THAT(first("{\"sources\": 3}"), ContainsSubstring("an object of source keys"));
  CHECK_THAT(first("{\"type\": 1e999}"), ContainsSubstring("JSON"));
  CHECK_THAT(first("{\"transistors\": [" + std::string(kSmallest) + "," + kSmallest + "]}"),
             ContainsSubstring("each type once"));

  const std::string family = R"({"families": [{"key": "k", "kind": "capacitor", "series": {"names": ["E12"]},
    "made": {"min": "1 nF", "max": "1 uF"}, "tolerances": {"offered": ["5 %"]}, "first_choice": {"min": "1 nF",
    "max": "1 uF"}, "cold_loss": {"typ": "0.5 %/K"}, "ratings": {"rows": [{"voltage": "50 V"}]}}]})";
  CHECK(faults_of(family).empty());
  const auto with = [&](const std::string& from, const std::string& to) {
    std::string text = family;
    return first(text.replace(text.find(from), from.size(), to));
  };
  CHECK_THAT(with("\"E12\"", "\"E13\""), ContainsSubstring("series.names[0]"));
  CHECK_THAT(with("\"capacitor\"", "\"coil\""), ContainsSubstring("resistor or capacitor"));
  CHECK_THAT(with("\"1 nF\"", "\"1 nΩ\""), ContainsSubstring("made.min"));
  CHECK_THAT(with("\"1 uF\"", "\"1 pF\""), ContainsSubstring("min not above max"));
  CHECK_THAT(with("\"max\": \"1 uF\"}, \"tol", "\"max\": \"0.1 uF\"}, \"tol"), ContainsSubstring("inside \"made\""));
  CHECK_THAT(with("\"5 %\"", "\"five\""), ContainsSubstring("tolerances.offered[0]"));
  CHECK_THAT(with("\"0.5 %/K\"", "\"0.5 %\""), ContainsSubstring("for each kelvin"));
  CHECK_THAT(with("[{\"voltage\": \"50 V\"}]", "[{\"voltage\": \"50 V\"}, {\"voltage\": \"25 V\"}]"),
             ContainsSubstring("ratings that rise"));
  CHECK_THAT(with("{\"voltage\": \"50 V\"}", "{\"power\": \"1 W\"}"), ContainsSubstring("power"));
  CHECK_THAT(with("\"series\": {\"names\": [\"E12\"]},", ""), ContainsSubstring("nothing can be offered"));
  CHECK_THAT(with("\"kind\"", "\"polarized\": true, \"kind\""), ContainsSubstring("did you mean \"polarised\""));
  CHECK_THAT(with("\"kind\"", "\"polarised\": \"yes\", \"kind\""), ContainsSubstring("true or false"));
}

TEST_CASE("every fault of every file is told at once") {
  const Folder folder;
  folder.write("a.json", smallest_with("\"45 V\"", "\"45 A\""));
  folder.write("b.json", "{\"familys\": []}");
  folder.write("c.json", "{");
  try {
    read_catalogue(folder.path());
    FAIL("no fault was found");
  } catch (const InputError& error) {
    CHECK(error.faults().size() == 3);
    CHECK_THAT(error.what(), ContainsSubstring("a.json") && ContainsSubstring("b.json") && ContainsSubstring("c.json"));
  }
}
