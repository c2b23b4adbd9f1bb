// The project's own data: complete, marked, and what is embedded is what lies in data/.
#include <bandwright/catalogue.hpp>
#include <fstream>
#include <iterator>
#include <nlohmann/json.hpp>
#include <set>

#include "catalogue/embedded_files.hpp"
#include "catch.hpp"
#include "places.hpp"

using namespace bandwright;
using nlohmann::json;

namespace {

const std::set<std::string> kTypes = {"2N3904", "2N2222A",  "2N4401",   "2N5088", "2N5089",
                                      "2N5551", "BC337-25", "BC337-40", "BC547A", "BC547B",
                                      "BC547C", "BC550C",   "BFR92A",   "2N3906", "BC557B"};
const std::set<std::string> kMarks = {"two or more sheets", "one sheet", "derived here", "from memory", "assumed"};

std::string contents(const std::filesystem::path& file) {
  std::ifstream stream(file, std::ios::binary);
  return {std::istreambuf_iterator<char>(stream), {}};
}

json parsed(std::string_view name) {
  for (const EmbeddedFile& file : embedded_files()) {
    if (file.name == name) return json::parse(file.text);
  }
  return {};
}

const json& sources() {
  static const json all = parsed("sources.json").at("sources");
  return all;
}

void check_marks(const json& entry) {
  INFO(entry.dump());
  REQUIRE(entry.contains("provenance"));
  REQUIRE(entry.contains("sources"));
  const std::string mark = entry["provenance"];
  CHECK(kMarks.count(mark) == 1);
  CHECK(entry["sources"].size() >= (mark == "two or more sheets" ? 2U : 1U));
  for (const std::string key : entry["sources"]) CHECK(sources().contains(key));
  // A figure from memory or derived here says so in its sources, and a derived one says how.
  if (mark == "from memory") CHECK(entry["sources"][0] == "memory");
  if (mark == "derived here") CHECK(entry["sources"][0] == "derived");
  if (mark == "derived here") CHECK_FALSE(entry.value("note", "").empty());
  if (mark == "two or more sheets" || mark == "one sheet") {
    for (const std::string key : entry["sources"]) CHECK((key != "memory" && key != "derived" && key != "default"));
  }
}

// A number with its unit: digits, a space, and a unit.
void check_unit(const std::string& key, const json& value) {
  INFO(key << ": " << value.dump());
  if (key == "current_gain") {
    CHECK(value.is_number());  // hFE has no unit
    return;
  }
  REQUIRE(value.is_string());
  const std::string text = value;
  const std::size_t space = text.find(' ');
  REQUIRE(space != std::string::npos);
  CHECK(text.find_first_not_of("0123456789.-") == space);
  CHECK(text.size() > space + 1);
}

void check_figure(const std::string& key, const json& figure) {
  check_marks(figure);
  int kinds = 0;
  for (const char* kind : {"min", "typ", "max"}) {
    if (!figure.contains(kind)) continue;
    ++kinds;
    check_unit(key, figure[kind]);
  }
  CHECK(kinds > 0);
  for (const auto& [name, value] : figure.items()) {
    if (name.ends_with("_voltage") || name.ends_with("_current") || name == "temperature") check_unit(name, value);
  }
}

}  // namespace

TEST_CASE("the built-in catalogue holds the fifteen types and the seven families") {
  const Catalogue& catalogue = built_in_catalogue();
  std::set<std::string> types;
  for (const Transistor& t : catalogue.transistors) types.insert(t.type);
  CHECK(types == kTypes);
  for (const char* key : {"metal-film", "thick-film", "c0g", "film", "electrolytic", "bipolar-electrolytic", "x7r"}) {
    INFO(key);
    CHECK(catalogue.find_family(key) != nullptr);
  }
  CHECK(catalogue.families.size() == 7);
  CHECK(catalogue.find_transistor("2N3906")->pnp);
  CHECK_FALSE(catalogue.find_transistor("BC547B")->pnp);
  CHECK(catalogue.find_transistor("bc547b") == catalogue.find_transistor("BC547B"));
  CHECK(catalogue.find_family("C0G") == catalogue.find_family("c0g"));
  CHECK(catalogue.find_transistor("BC547") == nullptr);
}

TEST_CASE("what is embedded is what lies in data/") {
  std::size_t on_disk = 0;
  for (const auto& entry : std::filesystem::recursive_directory_iterator(test::data_folder())) {
    on_disk += entry.path().extension() == ".json";
  }
  CHECK(embedded_files().size() == on_disk);
  for (const EmbeddedFile& file : embedded_files()) {
    INFO(file.name);
    CHECK(contents(test::data_folder() / file.name) == file.text);
  }
}

TEST_CASE("every figure of a transistor has unit, kind, provenance and sources that exist") {
  for (const EmbeddedFile& file : embedded_files()) {
    if (!file.name.starts_with("transistors/")) continue;
    INFO(file.name);
    const json transistor = json::parse(file.text);
    for (const auto& [key, value] : transistor.items()) {
      if (value.is_string()) continue;
      const json entries = value.is_array() ? value : json::array({value});
      for (const json& entry : entries) {
        if (key == "packages") {
          check_marks(entry);
        } else {
          check_figure(key, entry);
        }
      }
    }
  }
}

TEST_CASE("every number of a family has unit, provenance and sources that exist") {
  const json document = parsed("families.json");
  for (const json& family : document.at("families")) {
    INFO(family.at("key"));
    for (const auto& [key, value] : family.items()) {
      if (!value.is_object()) continue;
      check_marks(value);
      for (const char* kind : {"min", "typ", "max"}) {
        if (value.contains(kind)) check_unit(key, value[kind]);
      }
      const json rows = value.value("rows", json::array());
      const json offered = value.value("offered", json::array());
      for (const json& row : rows) {
        for (const auto& [name, rating] : row.items()) check_unit(name, rating);
      }
      for (const json& tolerance : offered) check_unit(key, tolerance);
    }
  }
}

TEST_CASE("sources cite documents, not addresses, and each is used") {
  std::string everything;
  for (const EmbeddedFile& file : embedded_files()) {
    if (file.name != "sources.json") everything += file.text;
  }
  for (const auto& [key, source] : sources().items()) {
    INFO(key);
    CHECK(source.at("title").get<std::string>().size() > 2);
    CHECK(source.at("read").get<std::string>().size() > 2);
    CHECK(everything.find('"' + key + '"') != std::string::npos);
    for (const char* address : {"http", "www.", ".com", ".org", "://"}) {
      CHECK(source.dump().find(address) == std::string::npos);
    }
  }
}

TEST_CASE("figures read as the sheets print them") {
  // onsemi/Motorola 2N3903/D Rev 8, MCC 2N3904: hFE 100 to 300 at 10 mA, 1 V; fT 300 MHz min at 10 mA, 20 V; Cob 4 pF
  // max at 5 V. Read through text copies.
  const Transistor& t = *built_in_catalogue().find_transistor("2N3904");
  CHECK(t.collector_emitter_breakdown.max == 40.0);
  CHECK(t.power_limit.max == Approx(0.625).epsilon(1e-12));
  CHECK(t.junction_limit.max == Approx(423.15).epsilon(1e-12));
  CHECK(t.current_gain[2].min == 100.0);
  CHECK(t.current_gain[2].max == 300.0);
  CHECK(t.current_gain[2].collector_current == Approx(10e-3).epsilon(1e-12));
  CHECK(t.current_gain[2].collector_emitter_voltage == 1.0);
  CHECK(t.transition_frequency[0].min == Approx(300e6).epsilon(1e-12));
  CHECK(t.output_capacitance[0].max == Approx(4e-12).epsilon(1e-12));
  CHECK(t.output_capacitance[0].reverse_voltage == 5.0);
  CHECK(t.packages[0].lead_order == "E-B-C (1-2-3)");
  // Semelab 2N2222A (3/96), NXP PMBT2222A Rev 6: hFE 35 min at 10 mA, 10 V, -55 °C. Read through text copies.
  const Transistor& cold = *built_in_catalogue().find_transistor("2N2222A");
  CHECK(cold.current_gain[3].min == 35.0);
  CHECK(cold.current_gain[3].temperature == Approx(218.15).epsilon(1e-12));
  CHECK(cold.collector_current_limit.max == Approx(0.6).epsilon(1e-12));
}
