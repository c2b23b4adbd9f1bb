// What every parts list must be, on all examples and on their mirror images: no part beyond its derated rating at any
// corner, each in the smallest rating that allows it, every polarised capacitor the right way round. Shares and rows
// are compared here, from the stress ranges and the catalogue alone.
#include <algorithm>
#include <bandwright/design.hpp>
#include <cmath>
#include <filesystem>
#include <fstream>
#include <iostream>
#include <iterator>

#include "catch.hpp"
#include "places.hpp"

using namespace bandwright;

namespace {

constexpr std::size_t kExamples = 8;
constexpr double kRounding = 1 + 1e-9;

// The usual shares: from memory of ECSS-Q-ST-30-11C, which was not read.
constexpr double kCapacitor = 0.6, kElectrolytic = 0.8, kPower = 0.5, kResistorVoltage = 0.8;
constexpr double kTransistorVoltage = 0.75, kTransistorCurrent = 0.75, kTransistorPower = 0.65, kJunctionMargin = 40;

std::vector<std::filesystem::path> example_files() {
  std::vector<std::filesystem::path> list;
  for (const auto& entry : std::filesystem::directory_iterator(test::examples_folder()))
    if (entry.path().extension() == ".json") list.push_back(entry.path());
  std::sort(list.begin(), list.end());
  return list;
}

Spec read_example(const std::filesystem::path& file) {
  std::ifstream in(file);
  return read_spec(std::string(std::istreambuf_iterator<char>(in), {}), file.filename().string());
}

/// Every voltage with the other sign, and every transistor of the catalogue that takes it.
Spec mirrored(Spec spec) {
  spec.supply = {-spec.supply.nominal, -spec.supply.max, -spec.supply.min};
  spec.source.dc = -spec.source.dc;
  spec.load.dc = -spec.load.dc;
  spec.devices.clear();
  return spec;
}

const Family& family_of(const Part& part) {
  const auto& all = built_in_catalogue().families;
  const auto found = std::find_if(all.begin(), all.end(), [&](const Family& f) { return f.name == part.family; });
  REQUIRE(found != all.end());
  return *found;
}

double share_of(const Family& f) {
  if (f.kind == PartKind::resistor) return kResistorVoltage;
  return f.key.find("electrolytic") != std::string::npos ? kElectrolytic : kCapacitor;
}

bool holds(const Family& f, std::size_t row, double volts, double watts) {
  const bool power = f.power_ratings.empty() || watts <= kPower * f.power_ratings[row] * kRounding;
  return power && volts <= share_of(f) * f.voltage_ratings[row] * kRounding;
}

void check_rating(const Part& part, const WorstStress& stress) {
  const Family& f = family_of(part);
  const StressRange& range = stress.volts[index(part.role)];
  const double volts = std::max(std::fabs(range.min), std::fabs(range.max));
  const double watts = part.kind == PartKind::resistor ? stress.watts[index(part.role)].max : 0;
  INFO(part.designator << " " << f.key << ": " << volts << " V, " << watts << " W; rated " << part.voltage_rating
                       << " V, " << part.power_rating << " W");
  const auto row = std::find(f.voltage_ratings.begin(), f.voltage_ratings.end(), part.voltage_rating);
  REQUIRE(row != f.voltage_ratings.end());
  auto at = static_cast<std::size_t>(row - f.voltage_ratings.begin());
  // several sizes of a chip resistor share a voltage
  while (!f.power_ratings.empty() && at + 1 < f.power_ratings.size() && f.power_ratings[at] != part.power_rating) ++at;
  if (!f.power_ratings.empty()) REQUIRE(f.power_ratings[at] == part.power_rating);
  CHECK(holds(f, at, volts, watts));
  if (at > 0) CHECK_FALSE(holds(f, at - 1, volts, watts));
}

int check_polarity(const Part& part, const WorstStress& stress) {
  const StressRange& range = stress.volts[index(part.role)];
  INFO(part.designator << " " << part.family << " " << part.polarity << ": " << range.min << " to " << range.max);
  if (!family_of(part).polarised) {
    CHECK(part.polarity.empty());
    return 0;
  }
  CHECK((range.min >= 0 || range.max <= 0));
  CHECK((range.min < 0 || range.max > 0));
  CHECK(part.polarity == "+ to " + part.nodes[range.max > 0 ? 0 : 1]);
  return 1;
}

void check_transistor(const Candidate& c) {
  const Transistor& t = *built_in_catalogue().find_transistor(c.device);
  const WorstStress& s = c.stress;
  INFO(c.device << ": " << s.collector_emitter_voltage.max << " V, " << s.collector_current.max << " A, "
                << s.dissipation.max << " W, " << s.junction_temperature.max << " K at "
                << s.junction_temperature.at_max);
  CHECK(s.collector_emitter_voltage.max <= kTransistorVoltage * t.collector_emitter_breakdown.max);
  CHECK(s.collector_current.max <= kTransistorCurrent * t.collector_current_limit.max);
  CHECK(s.dissipation.max <= kTransistorPower * t.power_limit.max);
  CHECK(s.junction_temperature.max <= c.parameters.junction_limit - kJunctionMargin);
}

struct Counts {
  int candidates = 0, parts = 0, polarised = 0;
};

void check_design(const Spec& spec, Counts& counts) {
  const DesignResult result = design(spec, built_in_catalogue());
  REQUIRE_FALSE(result.candidates.empty());
  for (const Candidate& c : result.candidates) {
    INFO("candidate " << c.rank << ", " << c.device << ", " << c.variant);
    CHECK(c.notes.count("parts") == 0);
    for (const Part& part : c.parts) {
      check_rating(part, c.stress);
      if (part.kind == PartKind::capacitor) counts.polarised += check_polarity(part, c.stress);
      ++counts.parts;
    }
    check_transistor(c);
    for (const StressRow& row : c.stress_table) {
      INFO(row.designator << " " << row.quantity << " " << row.worst << " of " << row.rating);
      CHECK(row.holds());
    }
    ++counts.candidates;
  }
}

}  // namespace

TEST_CASE("no part of any example, or of its mirror image, is overloaded or the wrong way round",
          "[property][stress]") {
  const auto files = example_files();
  REQUIRE(files.size() >= kExamples);
  Counts counts;
  for (const auto& file : files) {
    INFO(file.filename());
    const Spec spec = read_example(file);
    check_design(spec, counts);
    const Spec mirror = mirrored(spec);
    INFO("mirrored");
    check_design(mirror, counts);
  }
  std::cout << "ratings: " << counts.candidates << " candidates, " << counts.parts << " parts, " << counts.polarised
            << " polarised\n";
  CHECK(counts.polarised > counts.candidates);
}
