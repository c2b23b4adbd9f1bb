// Four requirements, each made so that one move of the trade is the best one: the design makes that move. The moves are
// common practice, no source; the specs are our own.
#include <algorithm>
#include <bandwright/design.hpp>
#include <cmath>

#include "catch.hpp"

using namespace bandwright;

namespace {

Candidate best_of(const std::string& text) {
  const DesignResult r = design(read_spec(text, "spec"), built_in_catalogue());
  REQUIRE_FALSE(r.candidates.empty());
  return r.candidates.front();
}

double share(const Candidate& c, Figure figure, Cause cause) {
  return c.assessment->share[index(figure)][index(cause)];
}

double slope(const Candidate& c, Figure figure, Role role) { return c.sensitivity[index(figure)][index(role)]; }

const Part& part(const Candidate& c, Role role) {
  return *std::find_if(c.parts.begin(), c.parts.end(), [role](const Part& p) { return p.role == role; });
}

}  // namespace

TEST_CASE("a tight lower cutoff: one tight capacitor sets it, the others are made uncritical", "[property][practice]") {
  const std::string text = R"({"supply": 12, "source": {"resistance": 600}, "load": {"resistance": "22k"},
    "requirements": {"gain": {"target": 20, "tolerance": "1 dB"}, "lower_cutoff": {"target": "100 Hz", "tolerance": "12 %"},
                     "upper_cutoff": {"min": "200 kHz"}}, "devices": ["BC547B"]})";
  const DesignResult r = design(read_spec(text, "spec"), built_in_catalogue());
  const Candidate& c = r.candidates.front();
  double tight = 0, loose = 0;
  for (Role role : {Role::input_coupling, Role::output_coupling, Role::bypass}) {
    if (c.offered[index(role)].value == 0) continue;
    const double s = std::fabs(slope(c, Figure::lower_cutoff, role));
    (part(c, role).tolerance.above <= 0.1 ? tight : loose) += s;
  }
  INFO("tight " << tight << ", loose " << loose);
  CHECK(tight > 4 * loose);
  // the same capacitors made equally critical: the loose ones let the yield go
  const Candidate& exact = *std::find_if(r.candidates.begin(), r.candidates.end(), [](const Candidate& one) {
    return std::find(one.best_at.begin(), one.best_at.end(), "most exact") != one.best_at.end();
  });
  CHECK(c.standing.key.capability >= exact.standing.key.capability);
}

TEST_CASE("where hFE decides on the gain, the stage is degenerated more", "[property][practice]") {
  const auto text = [](const std::string& parts) {
    return R"({"supply": 12, "source": {"resistance": "10k"}, "load": {"resistance": "47k"},
      "requirements": {"gain": {"target": 6, "tolerance": "8 %"}, "lower_cutoff": {"max": "50 Hz"},
                       "upper_cutoff": {"min": "50 kHz"}, "collector_current": {"target": "1 mA", "tolerance": "20 %"}},
      "parts": {)" +
           parts + R"("resistors": {"series": "E24"}}, "devices": ["2N3904"], "search": {"candidates": 3}})";
  };
  const Candidate c = best_of(text(""));
  const Candidate plain = best_of(text(R"("pinned": {"emitter": "absent"}, )"));
  const double f = 1 + c.analysis.small.transconductance * c.working_values[index(Role::emitter)];
  INFO("F " << f << ", share of hFE " << share(plain, Figure::gain, Cause::current_gain) << " without");
  CHECK(share(plain, Figure::gain, Cause::current_gain) > 0.5);  // hFE decides without degeneration
  CHECK(f > 4);
  CHECK(c.standing.key.capability > plain.standing.key.capability);
}

TEST_CASE("where the bias decides, the divider is stiff", "[property][practice]") {
  const std::string text = R"({"supply": 12, "source": {"resistance": 600}, "load": {"resistance": "22k"},
    "requirements": {"gain": {"target": 12, "tolerance": "2 dB"}, "lower_cutoff": {"max": "50 Hz"},
                     "upper_cutoff": {"min": "50 kHz"}, "collector_current": {"target": "1 mA", "tolerance": "6 %"}},
    "devices": ["2N3904"], "search": {"candidates": 3}})";
  const Candidate c = best_of(text);
  CHECK(c.analysis.figures[index(Figure::divider_current_ratio)] > 20);
  CHECK(share(c, Figure::collector_current, Cause::current_gain) < 0.3);
  // the same stage with a divider ten times as weak
  PartValues weak{};
  for (const Part& p : c.parts) weak[index(p.role)] = p.value;
  weak[index(Role::upper_divider)] *= 10;
  weak[index(Role::lower_divider)] *= 10;
  const DesignResult other = check(read_spec(text, "spec"), built_in_catalogue(), c.device, choices_of(weak));
  CHECK(share(other.candidates.front(), Figure::collector_current, Cause::current_gain) > 0.5);
  CHECK(other.candidates.front().standing.key.capability < c.standing.key.capability);
}

TEST_CASE("where no change of value helps, a tighter family is taken", "[property][practice]") {
  const auto text = [](const std::string& families) {
    return R"({"supply": 12, "source": {"resistance": 600}, "load": {"resistance": "2.2k"},
      "requirements": {"gain": {"target": 5, "tolerance": "2 dB"}, "lower_cutoff": {"target": "45 Hz", "tolerance": "15 %"},
                       "upper_cutoff": {"min": "50 kHz"}},
      "parts": {"capacitors": {"families": )" +
           families + R"(},
                "pinned": {"input_coupling": "470u", "output_coupling": "1u", "bypass": "absent", "shunt": "absent"}},
      "devices": ["2N3904"], "search": {"candidates": 3}})";
  };
  const Candidate loose = best_of(text(R"(["electrolytic"])"));
  const Candidate c = best_of(text(R"(["electrolytic", "film"])"));
  CHECK(share(loose, Figure::lower_cutoff, Cause::output_coupling) > 0.9);  // no resistor can make up for it
  CHECK(part(c, Role::output_coupling).family == "polyester film capacitor");
  CHECK(c.standing.key.capability > 1.5 * loose.standing.key.capability);
}
