// What a design must be, on every example: exact, a local optimum of its order, made of offered values, rated, the same
// on any number of threads, and recomputable from its own result document.
#include <bandwright/design.hpp>
#include <bandwright/report.hpp>
#include <bandwright/search.hpp>
#include <cmath>
#include <filesystem>
#include <fstream>
#include <iterator>

#include "catch.hpp"
#include "places.hpp"
#include "search/refinement.hpp"

using namespace bandwright;

namespace {

constexpr double kExact = 0.15;  // error at most, of the most exact candidate, on every two-sided requirement
constexpr std::size_t kExamples = 8;

std::vector<std::filesystem::path> example_files() {
  std::vector<std::filesystem::path> list;
  for (const auto& entry : std::filesystem::directory_iterator(test::examples_folder())) {
    if (entry.path().extension() == ".json") list.push_back(entry.path());
  }
  std::sort(list.begin(), list.end());
  return list;
}

Spec read_example(const std::filesystem::path& file) {
  std::ifstream in(file);
  return read_spec(std::string(std::istreambuf_iterator<char>(in), {}), file.filename().string());
}

GridPoint grid_point(const DesignSpace& space, const Candidate& c) {
  GridPoint p;
  p.fill(-1);
  for (const Part& part : c.parts) {
    const std::size_t i = index(part.role);
    for (std::size_t k = 0; k < space.offered[i]->size(); ++k) {
      if ((*space.offered[i])[k].value == part.value) p[i] = static_cast<std::int16_t>(k);
    }
    INFO(info(part.role).key << " " << part.value << " is not offered");
    REQUIRE(p[i] >= 0);
  }
  return p;
}

void check_local_optimum(const Spec& spec, const Candidate& c) {
  const std::vector<DerivedDevice> devices = {derive_parameters(*built_in_catalogue().find_transistor(c.device))};
  const DesignSpaces all = design_spaces(spec, built_in_catalogue(), devices);
  for (const DesignSpace& space : all.spaces) {
    if (c.variant != space.variant->key) continue;
    Evaluator evaluator(spec, space, RankBy::error);
    Ranked r{grid_point(space, c), {}};
    r.key = evaluator.key(r.point);
    CHECK(r.key.error == Approx(c.error).margin(1e-12));
    CHECK(r.key.tolerance_sensitivity == Approx(c.tolerance_sensitivity));
    CHECK(Neighbourhood(space).is_best(evaluator, r, RankBy::error));
  }
}

}  // namespace

TEST_CASE("every example has candidates within 0.15 of each two-sided target", "[property][examples]") {
  const auto files = example_files();
  REQUIRE(files.size() >= kExamples);
  for (const auto& file : files) {
    INFO(file.filename());
    const Spec spec = read_example(file);
    const DesignResult result = design(spec, built_in_catalogue());
    REQUIRE_FALSE(result.candidates.empty());
    CHECK(result.met);
    double best = kWorstError;
    for (const Candidate& c : result.candidates) {
      double largest = 0;
      for (const FigureInfo& f : figures()) {
        const auto& r = spec.requirement(f.figure);
        if (!r || std::isnan(r->lower) || std::isnan(r->upper)) continue;
        largest = std::max(largest, requirement_error(*r, f, c.analysis.figures[index(f.figure)]));
      }
      best = std::min(best, largest);
    }
    CHECK(best <= kExact);
  }
}

TEST_CASE("every listed candidate is better than all its neighbours", "[property][examples]") {
  DesignOptions by_error;
  by_error.rank_by = RankBy::error;
  for (const auto& file : example_files()) {
    INFO(file.filename());
    const Spec spec = read_example(file);
    for (const Candidate& c : design(spec, built_in_catalogue(), by_error).candidates) {
      INFO("candidate " << c.rank);
      check_local_optimum(spec, c);
    }
  }
}

TEST_CASE("on every example the first candidate is at least as capable as the most exact", "[property][examples]") {
  for (const auto& file : example_files()) {
    INFO(file.filename());
    const DesignResult result = design(read_example(file), built_in_catalogue());
    const auto& list = result.candidates;
    const auto exact = std::min_element(list.begin(), list.end(),
                                        [](const Candidate& a, const Candidate& b) { return a.error < b.error; });
    CHECK(list.front().standing.key.capability >= exact->standing.key.capability);
    CHECK(std::find(exact->best_at.begin(), exact->best_at.end(), "most exact") != exact->best_at.end());
    DesignOptions by_error;
    by_error.rank_by = RankBy::error;
    CHECK(error_class(exact->error) <=
          error_class(design(result.spec, built_in_catalogue(), by_error).candidates.front().error) + 1);
    for (const Candidate& c : list) {
      REQUIRE(c.assessment);
      CHECK(c.assessment->yield.units >= 1000);
    }
  }
}

TEST_CASE("listed candidates differ, are ranked, and carry ratings above their voltages", "[property][examples]") {
  for (const auto& file : example_files()) {
    INFO(file.filename());
    const DesignResult result = design(read_example(file), built_in_catalogue());
    for (std::size_t i = 0; i < result.candidates.size(); ++i) {
      const Candidate& c = result.candidates[i];
      CHECK(c.rank == static_cast<int>(i) + 1);
      if (i > 0) CHECK_FALSE(comes_before(c.standing, result.candidates[i - 1].standing, RankBy::capability));
      CHECK(c.analysis.point.collector_emitter_voltage >= kLeastCollectorEmitter);
      for (const Part& p : c.parts) {
        INFO(info(p.role).key);
        CHECK(p.voltage_rating > std::fabs(p.volts));
        CHECK((p.polarity.empty() || p.family.find("electrolytic") != std::string::npos));
      }
    }
  }
}

TEST_CASE("one thread and four give the same bytes", "[property][examples]") {
  const Spec spec = read_example(test::examples_folder() / "pnp-negative-rail.json");
  DesignOptions one, four;
  one.threads = 1;
  four.threads = 4;
  CHECK(write_json(design(spec, built_in_catalogue(), one)) == write_json(design(spec, built_in_catalogue(), four)));
}

TEST_CASE("another seed may move the list, never the definition of its best", "[property][examples]") {
  Spec spec = read_example(test::examples_folder() / "pager-tone-band.json");
  spec.seed = 99;
  const DesignResult result = design(spec, built_in_catalogue());
  REQUIRE_FALSE(result.candidates.empty());
  CHECK(result.candidates.front().standing.key.capability > 1.9);
  const auto& list = result.candidates;
  CHECK(std::any_of(list.begin(), list.end(), [](const Candidate& c) { return c.error <= kExact; }));
}

TEST_CASE("a wider series never worsens the best error class", "[property]") {
  Spec spec = read_example(test::examples_folder() / "bench-amplifier.json");
  spec.devices = {"2N3904"};
  const auto best_class = [&](const char* series) {
    spec.parts.resistors.series = series;
    DesignOptions by_error;
    by_error.rank_by = RankBy::error;
    return error_class(design(spec, built_in_catalogue(), by_error).candidates.front().error);
  };
  const int e6 = best_class("E6"), e12 = best_class("E12"), e24 = best_class("E24");
  CHECK(e12 <= e6);
  CHECK(e24 <= e12);
}
