// Five results in one list for 250 boards, against a count of its own: a script in another language reads the result
// documents and the list with readers of that language's library, and counts in whole numbers and decimals.
#include "catch.hpp"
#include "cli_specs.hpp"

using namespace bandwright::test;

namespace {

// Arguments: the list, the quantity, the attrition in per cent, then the results in order.
constexpr const char* kCount = R"(
import csv, json, math, sys
from collections import defaultdict
from decimal import Decimal

list_file, quantity, attrition = sys.argv[1], int(sys.argv[2]), int(sys.argv[3])
wanted = defaultdict(list)  # what is bought: its designators
costs, polarity = {}, {}
for number, name in enumerate(sys.argv[4:]):
    prefix = "ABCDEFGHIJ"[number] + "."
    with open(name) as file:
        document = json.load(file)
    candidate = document["candidates"][0]
    for part in candidate["parts"] + [candidate["transistor"]]:
        code = part.get("type") or part["value_code"]
        key = (part["kind"], code, part["family"], str(part.get("tolerance")), part["voltage_rating"],
               part["power_rating"], part["part_number"], False)
        wanted[key].append(prefix + part["designator"])
        costs[prefix + part["designator"]] = part["unit_cost"]
        if part.get("polarity"):
            polarity[prefix + part["designator"]] = part["polarity"]
    # decoupling: 100 nF and 10 uF at each stage, common practice, no source
    supply = document["spec"]["supply"]
    ends = [abs(supply[key]) for key in ("nominal", "min", "max") if key in supply]
    for designator, code, share, ratings in (("C901", "100n", 0.6, (6.3, 10, 16, 25, 50, 100, 250)),
                                             ("C902", "10u", 0.8, (6.3, 10, 16, 25, 35, 50, 63, 100))):
        rating = min(r for r in ratings if max(ends) <= share * r * (1 + 1e-9))
        wanted[("capacitor", code, "decoupling", "", rating, None, "", True)].append(prefix + designator)

with open(list_file, newline="", encoding="utf-8") as file:
    text = file.read()
assert text.count("\r\n") == text.count("\n") and "\r\r" not in text, "line ends"
rows = list(csv.DictReader(text.splitlines(keepends=True), strict=True))
assert len(rows) == len(wanted), (len(rows), len(wanted))

by_designators = {tuple(sorted(names)): key for key, names in wanted.items()}
parts, total, seen = 0, Decimal(0), []
for item, row in enumerate(rows, 1):
    assert None not in row and None not in row.values(), row
    names = row["designators"].split(", ")
    key = by_designators[tuple(sorted(names))]
    assert int(row["item"]) == item
    assert row["kind"] == key[0] and row["value_code"] == key[1], row
    assert (key[2] == "decoupling") == ("outside the model" in row["note"]), row
    if key[4]:
        assert f"{key[4]:g} V" in row["rating"], row
    count = len(names)
    needed = -(-count * quantity * (100 + attrition) // 100)
    assert int(row["quantity_per_board"]) == count, row
    assert int(row["quantity_total"]) == needed, row
    for name in names:
        assert row["part_number"] == key[6]
        if name in costs:
            assert abs(Decimal(row["unit_cost"]) - Decimal(repr(costs[name]))) <= Decimal("5e-7"), row
        if name in polarity:
            assert polarity[name].lstrip("+") in row["polarity"], row
    assert Decimal(row["total_cost"]) == needed * Decimal(row["unit_cost"]), row
    parts += needed
    total += Decimal(row["total_cost"])
    seen += names
assert len(seen) == len(set(seen)) == sum(len(names) for names in wanted.values())
order = [("resistor", "capacitor", "transistor").index(row["kind"]) for row in rows]
assert order == sorted(order)
for kind in ("resistor", "capacitor"):
    values = [float(row["value"]) for row in rows if row["kind"] == kind]
    assert values == sorted(values)
print(len(rows), len(seen), parts, total)
)";

// Invented stages that differ in value, supply, polarity and variant; some share parts.
const std::vector<std::vector<std::string>> kStages = {
    {"--supply", "12V"},
    {"--supply", "12V", "--collector", "5k1", "--shunt", "220p"},
    {"--supply", "24V", "--device", "BC550C", "--upper-divider", "100k"},
    {"--supply", "-12V", "--device", "BC557B", "--bypass", "47u"},
    {"--supply", "9V", "--emitter", "1k", "--emitter-bypassed", "none", "--bypass", "none"}};

std::vector<std::string> with_stage(const std::vector<std::string>& changes) {
  std::vector<std::string> words = {"check"};
  for (std::size_t i = 0; i < kPartOptions.size(); i += 2) {
    bool changed = false;
    for (const std::string& word : changes) changed = changed || word == kPartOptions[i];
    if (!changed) words.insert(words.end(), {kPartOptions[i], kPartOptions[i + 1]});
  }
  return joined(words, changes);
}

}  // namespace

TEST_CASE("the totals of five boards in one list equal an independent count") {
  const TemporaryFolder folder;
  std::vector<std::string> results;
  for (const auto& changes : kStages) {
    results.push_back("stage" + std::to_string(results.size()) + ".json");
    const Outcome outcome =
        run_bandwright(joined(with_stage(changes), {"-q", "-o", results.back()}), in_folder(folder.path()));
    INFO(outcome.err);
    REQUIRE(outcome.status == 0);
  }
  for (const auto& [quantity, attrition] : {std::pair{"250", "0"}, std::pair{"250", "5"}, std::pair{"7", "3"}}) {
    const Outcome list = run_bandwright(
        joined(joined({"bom"}, results), {"--quantity", quantity, "--attrition", std::string(attrition) + " %",
                                          "--no-alternates", "-q", "-o", "list.csv"}),
        in_folder(folder.path()));
    INFO(list.err);
    REQUIRE(list.status == 0);
    Circumstances circumstances = in_folder(folder.path());
    circumstances.input = kCount;
    const Outcome counted =
        run_command(joined({"python3", "-I", "-", "list.csv", quantity, attrition}, results), circumstances);
    INFO(counted.err);
    CHECK(counted.status == 0);
    CHECK_FALSE(counted.out.empty());
  }
}
