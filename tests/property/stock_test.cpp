// What a design from a stock must be, and pairs where single values miss.
#include <algorithm>
#include <bandwright/design.hpp>
#include <bandwright/report.hpp>
#include <bandwright/stock.hpp>
#include <fstream>
#include <iterator>
#include <map>

#include "catch.hpp"
#include "places.hpp"

using namespace bandwright;

namespace {

std::string text_of(const std::string& name) {
  std::ifstream file(test::examples_folder() / name, std::ios::binary);
  return {std::istreambuf_iterator<char>(file), {}};
}

Catalogue with_drawer() {
  Catalogue catalogue = built_in_catalogue();
  catalogue.stock = read_stock(text_of("drawer.csv"), "drawer.csv", catalogue);
  return catalogue;
}

Spec line_stage(const std::string& stock_rules) {
  return read_spec(R"({"supply": {"nominal": "12 V", "tolerance": "5 %"}, "source": {"resistance": "600"},
    "load": {"resistance": "10k"}, "requirements": {"gain": {"target": "30 dB", "tolerance": "1 dB"},
    "lower_cutoff": {"max": "60 Hz"}, "upper_cutoff": {"min": "15 kHz"}},
    "search": {"candidates": 4}, "parts": {"stock": "drawer.csv")" +
                       stock_rules + "}}",
                   "test.json");
}

std::size_t bought(const Candidate& c) {
  std::size_t count = c.transistor.from_stock ? 0 : 1;
  for (const Part& p : c.parts) count += !p.from_stock;
  return count;
}

}  // namespace

TEST_CASE("with stock_only every part and the transistor come from the drawer, as tight as its row says", "[stock]") {
  const Catalogue catalogue = with_drawer();
  const DesignResult result = design(line_stage(R"(, "stock_only": true)"), catalogue);
  REQUIRE_FALSE(result.candidates.empty());
  for (const Candidate& c : result.candidates) {
    CHECK(bought(c) == 0);
    for (const Part& p : c.parts) {
      const bool known =
          std::any_of(catalogue.stock.parts.begin(), catalogue.stock.parts.end(), [&](const StockPart& s) {
            return s.kind == p.kind && s.value == p.value && s.tolerance == p.tolerance &&
                   s.part_number == p.part_number;
          });
      CHECK(known);
    }
  }
}

TEST_CASE("where the drawer has all that a good stage needs, nothing is bought", "[stock]") {
  const DesignResult result = design(line_stage(""), with_drawer());
  REQUIRE_FALSE(result.candidates.empty());
  const Candidate& first = result.candidates.front();
  CHECK(bought(first) == 0);
  CHECK(first.shortfalls.empty());
  CHECK(first.standing.key.capability >= 1);
}

TEST_CASE("pieces last for all boards", "[stock]") {
  const Catalogue catalogue = with_drawer();
  for (const long boards : {3L, 12L, 25L}) {
    const Spec spec = line_stage(R"(, "stock_only": true, "boards": )" + std::to_string(boards));
    const DesignResult result = design(spec, catalogue);
    for (const Candidate& c : result.candidates) {
      std::map<const StockPart*, long> used;
      for (const OfferedValue& o : c.offered)
        if (o.stock != nullptr) used[o.stock] += boards;
      for (const auto& [part, pieces] : used) {
        INFO(boards << " boards, " << part->where);
        CHECK((!part->quantity || *part->quantity >= pieces));
      }
    }
  }
}

namespace {

Spec tight(const std::string& pairs, const char* gain_tolerance) {
  return read_spec(std::string(R"({"supply": "12 V", "source": {"resistance": "600"}, "load": {"resistance": "10k"},
    "requirements": {"gain": {"target": 20, "tolerance": ")") +
                       gain_tolerance + R"("},
    "lower_cutoff": {"target": "40 Hz", "tolerance": "1 %"}, "upper_cutoff": {"target": "20 kHz", "tolerance": "1 %"}},
    "parts": {"resistors": {"series": "E6"}, "pairs": )" +
                       pairs + R"(}, "devices": ["BC547B"],
    "search": {"candidates": 3}})",
                   "test.json");
}

bool has_pair(const Candidate& c) {
  return std::any_of(c.parts.begin(), c.parts.end(), [](const Part& p) { return p.connection != Connection::single; });
}

}  // namespace

TEST_CASE("pairs meet a spec that single values of a coarse series miss", "[pairs]") {
  const DesignResult single = design(tight("false", "0.3 %"), built_in_catalogue());
  REQUIRE_FALSE(single.met);  // else this spec shows nothing
  const DesignResult paired = design(tight("true", "0.3 %"), built_in_catalogue());
  REQUIRE(paired.met);
  const Candidate& c = paired.candidates.front();
  REQUIRE(has_pair(c));
  CHECK(c.parts.size() > 9);
  // what the document states is what is recomputed
  const StoredCandidate stored = read_candidate(write_json(paired), "paired.json", 1);
  const DesignResult again = check(paired.spec, built_in_catalogue(), stored.device, stored.parts);
  CHECK(compare(stored, again.candidates.front()).differing.empty());
  CHECK(again.candidates.front().parts.size() == c.parts.size());
}

TEST_CASE("where single values meet the spec there are no pairs, and the answer is the same", "[pairs]") {
  const DesignResult without = design(tight("false", "10 %"), built_in_catalogue());
  DesignResult with = design(tight("true", "10 %"), built_in_catalogue());
  if (!without.met) return;  // nothing to compare: the case above covers it
  for (const Candidate& c : with.candidates) CHECK_FALSE(has_pair(c));
  with.spec.parts.pairs = false;
  CHECK(write_json(with) == write_json(without));
}
