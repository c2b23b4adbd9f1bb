// Worst-corner stress and polarity against corners enumerated and solved apart, in long double, by unit_loads; against
// units from anywhere in the box; and against a search without slopes where a stress is largest inside.
#include <fmt/format.h>

#include <algorithm>
#include <bandwright/assessment.hpp>
#include <bandwright/purchase.hpp>
#include <cmath>
#include <functional>
#include <iostream>
#include <map>
#include <set>

#include "agreement.hpp"
#include "catch.hpp"
#include "random_populations.hpp"
#include "unit_loads.hpp"

using namespace oracle;
using bandwright::Cause;
using bandwright::index;
using bandwright::kResistorRoles;
using bandwright::kRoleCount;
using bandwright::Part;
using bandwright::Role;
using bandwright::StressRange;
using bandwright::WorstStress;

namespace {

constexpr int kDesigns = 1000;
constexpr int kUnits = 2000;        // of each design
constexpr double kCorner = 1e-9;    // of the supply's scale: solvers that stop at 1e-12 of Vth
constexpr double kInside = 1e-8;    // of the scale: what worst_stress takes for rounding
constexpr double kSearched = 1e-5;  // of the scale: how far this search may go beyond a maximum inside the box
// Of the scale: how far this search, which has no slopes, may itself fall short on the flat ridges of a dissipation.
constexpr double kFallsShort = 1e-3;
constexpr double kMostSaturated = 0.1;  // share of the designs: random stages are not designs

/// One stress of the table: where it stands in the library's answer and in the oracle's.
struct Slot {
  std::string name;
  StressRange range;
  double scale;
  std::function<Real(const Loads&)> of;
};

std::vector<Slot> slots_of(const WorstStress& w, const bandwright::Population& p) {
  double supply = 0, loop = 0;
  for (const auto& c : p.conditions) supply = std::max(supply, c.supply);
  for (const Role r : {Role::collector, Role::emitter, Role::emitter_bypassed}) loop += p.printed[index(r)];
  std::vector<Slot> list;
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    if (!(p.printed[i] > 0)) continue;
    const std::string name = bandwright::roles()[i].designator;
    list.push_back({name + " volts", w.volts[i], supply, [i](const Loads& l) { return l.volts[i]; }});
    if (i < kResistorRoles)
      list.push_back(
          {name + " watts", w.watts[i], supply * supply / p.printed[i], [i](const Loads& l) { return l.watts[i]; }});
  }
  const double current = supply / loop, watts = supply * current;
  list.push_back({"VCE", w.collector_emitter_voltage, supply, [](const Loads& l) { return l.v_ce; }});
  list.push_back({"IC", w.collector_current, current, [](const Loads& l) { return l.i_c; }});
  list.push_back({"dissipation", w.dissipation, watts, [](const Loads& l) { return l.dissipation; }});
  list.push_back({"junction", w.junction_temperature, p.device.thermal_resistance * watts + 1e-3,
                  [](const Loads& l) { return l.junction; }});
  return list;
}

/// The largest or smallest value that was met, and where.
struct Found {
  Real value = 0;
  Coordinates at;
};

struct Enumerated {
  std::vector<Found> low, high;  ///< of each slot
  int saturated = 0;
};

Enumerated enumerate(UnitLoads& units, const std::vector<Slot>& slots) {
  Enumerated e;
  Coordinates x(units.size(), 0.0);
  for (unsigned corner = 0; corner < 1U << units.size(); ++corner) {
    const unsigned gray = corner ^ (corner >> 1);  // one coordinate turns at a time
    for (std::size_t k = 0; k < x.size(); ++k) x[k] = gray >> k & 1U ? 1 : 0;
    const Loads l = units.at(x);
    e.saturated += l.saturated;
    if (l.saturated) continue;
    for (std::size_t s = 0; s < slots.size(); ++s) {
      if (e.low.size() <= s) e.low.push_back({slots[s].of(l), x}), e.high.push_back(e.low.back());
      const Real value = slots[s].of(l);
      if (value < e.low[s].value) e.low[s] = {value, x};
      if (value > e.high[s].value) e.high[s] = {value, x};
    }
  }
  return e;
}

/// Uphill without slopes: one coordinate at a time, and two against each other along ridges, ever shorter.
class Climb {
public:
  Climb(UnitLoads& units, const Slot& slot, int sign, Coordinates from) : units_(units), slot_(slot), sign_(sign) {
    try_at(std::move(from));
  }
  Real height() const { return height_; }
  void jump_to(const Climb& other) { best_ = other.best_, height_ = other.height_; }

  void go(double shortest, bool ridges) {
    for (double step = 0.5; step > shortest;) {
      bool better = false;
      for (std::size_t k = 0; k < best_.size(); ++k) {
        better = moved(k, step, k, 0) || moved(k, -step, k, 0) || better;
        for (std::size_t j = 0; ridges && j < k; ++j)
          for (const double a : {-step, step}) better = moved(k, a, j, step) || moved(k, a, j, -step) || better;
      }
      if (!better) step /= 2;
    }
  }

private:
  bool moved(std::size_t k, double by, std::size_t j, double other) {
    Coordinates x = best_;
    x[k] += by;
    x[j] += other;
    return try_at(std::move(x));
  }

  bool try_at(Coordinates x) {
    for (double& share : x) share = std::clamp(share, 0.0, 1.0);
    const Loads l = units_.at(x);
    const Real here = l.saturated ? -1e30L : sign_ * slot_.of(l);
    if (!best_.empty() && !(here > height_)) return false;
    height_ = here;
    best_ = std::move(x);
    return true;
  }

  UnitLoads& units_;
  const Slot& slot_;
  int sign_;
  Coordinates best_;
  Real height_ = 0;
};

/// From the best corner, and from each of those beside it; from the best of the places so found along ridges.
Real climbed(UnitLoads& units, const Slot& slot, int sign, const Found& from) {
  Climb best(units, slot, sign, from.at);
  best.go(0.02, false);
  for (std::size_t k = 0; k < from.at.size(); ++k) {
    Coordinates beside = from.at;
    beside[k] = 1 - beside[k];
    Climb other(units, slot, sign, std::move(beside));
    other.go(0.02, false);
    if (other.height() > best.height()) best.jump_to(other);
  }
  best.go(5e-4, true);
  return sign * best.height();
}

/// Every polarised capacitor has its + where the potential is higher at every corner; one that could not has a reason.
void check_polarity(const RandomDesign& d, const WorstStress& worst, const std::vector<Slot>& slots,
                    const Enumerated& corners, std::array<int, 3>& counts) {
  const auto bought = with_settled_polarity(d.spec, d.parts, worst);
  std::string reason;
  for (const Part& part : parts_list(d.spec, bought, worst, &reason)) {
    if (part.kind != bandwright::PartKind::capacitor) continue;
    const auto slot =
        std::find_if(slots.begin(), slots.end(), [&](const Slot& s) { return s.name == part.designator + " volts"; });
    const Real low = corners.low[static_cast<std::size_t>(slot - slots.begin())].value;
    const Real high = corners.high[static_cast<std::size_t>(slot - slots.begin())].value;
    INFO(part.designator << " " << part.family << " " << part.polarity << " " << low << " to " << high);
    const bool polarised = d.parts[index(part.role)].family->polarised;
    if (low < 0 && high > 0) {
      CHECK(part.polarity.empty());
      CHECK_THAT(part.note, Catch::Matchers::ContainsSubstring("its voltage lies between"));
      counts[2] += polarised;
    } else if (polarised) {
      const std::string positive = low >= 0 ? part.nodes[0] : part.nodes[1];
      // where a corner saturates its range is wider than what was enumerated
      if (corners.saturated == 0 || !part.polarity.empty()) CHECK(part.polarity == "+ to " + positive);
      ++counts[low >= 0 ? 0 : 1];
    }
  }
}

struct Findings {
  Agreement corners{"worst stress beside the corners"}, bisected{"secant beside bisection"};
  Agreement inside{"units beyond the worst stress"}, beyond_corners{"units beyond the corners alone"};
  Agreement missed{"searched beyond polished"}, unfound{"polished beyond searched"};
  std::map<std::string, int> polished;
  std::set<std::string> variants;
  std::array<int, 3> polarities{};
  int saturated = 0, pnp = 0, with_dc = 0;
  std::size_t solved = 0;
};

void compare_end(const Slot& s, UnitLoads& units, int sign, const Found& corner, bool polishes,
                 const std::string& where, Findings& f) {
  const double given = sign > 0 ? s.range.max : s.range.min;
  const double over = sign * static_cast<double>(given - corner.value) / s.scale;
  const bool inside = (sign > 0 ? s.range.at_max : s.range.at_min).find("inside") != std::string::npos;
  if (!polishes || (!inside && over < kCorner)) {
    f.corners.add(std::fabs(over), where + " " + s.name);
    return;
  }
  ++f.polished[s.name.substr(s.name.find(' ') + 1)];
  f.corners.add(std::max(-over, 0.0), where + " " + s.name);
  const Real found = climbed(units, s, sign, corner);
  const double beyond = sign * static_cast<double>(given - found) / s.scale;
  f.unfound.add(std::max(beyond, 0.0), where + " " + s.name);
  f.missed.add(std::max(-beyond, 0.0), where + " " + s.name);
}

void compare_units(const std::vector<Slot>& slots, UnitLoads& units, const Enumerated& corners,
                   const std::string& where, Dice& dice, Findings& f) {
  std::vector<double> over(slots.size(), 0), over_corners(slots.size(), 0);
  for (int unit = 0; unit < kUnits; ++unit) {
    Coordinates x(units.size());
    for (double& share : x) share = dice.uniform();
    const Loads l = units.at(x);
    if (l.saturated) continue;
    ++f.solved;
    for (std::size_t s = 0; s < slots.size(); ++s) {
      const double value = static_cast<double>(slots[s].of(l)), scale = slots[s].scale;
      over[s] = std::max({over[s], (value - slots[s].range.max) / scale, (slots[s].range.min - value) / scale});
      if (corners.saturated > 0) continue;
      over_corners[s] = std::max({over_corners[s], (value - static_cast<double>(corners.high[s].value)) / scale,
                                  (static_cast<double>(corners.low[s].value) - value) / scale});
    }
  }
  for (std::size_t s = 0; s < slots.size(); ++s) {
    // nobody asks for the smallest power or current: those ends are the corners'
    f.inside.add(over[s], where + " " + slots[s].name);
    f.beyond_corners.add(over_corners[s], where + " " + slots[s].name);
  }
}

void compare_design(int number, const RandomDesign& d, Dice& dice, Findings& f) {
  const WorstStress worst = worst_stress(d.spec, d.population);
  const std::vector<Slot> slots = slots_of(worst, d.population);
  UnitLoads units(d.population, d.spec.source.dc, d.spec.load.dc);
  const Enumerated corners = enumerate(units, slots);
  f.solved += std::size_t{1} << units.size();
  const std::string where = fmt::format("design {}", number);
  const Coordinates anywhere(units.size(), dice.uniform());
  const Loads fast = units.at(anywhere), slow = units.at_by_bisection(anywhere);
  f.bisected.add(static_cast<double>(std::fabs(fast.i_c / slow.i_c - 1)), where);
  compare_units(slots, units, corners, where, dice, f);
  check_polarity(d, worst, slots, corners, f.polarities);
  f.saturated += corners.saturated > 0;
  if (corners.saturated > 0) return;
  for (std::size_t s = 0; s < slots.size(); ++s) {
    const bool is_volts = slots[s].name.ends_with("volts");
    compare_end(slots[s], units, 1, corners.high[s], true, where, f);
    compare_end(slots[s], units, -1, corners.low[s], is_volts, where, f);
  }
}

void report(const Findings& f) {
  std::cout << fmt::format("stress: {} designs, {} PNP, {} with a DC voltage outside, {} units solved\n", kDesigns,
                           f.pnp, f.with_dc, f.solved);
  std::cout << fmt::format("  with a saturated corner: {}\n", f.saturated);
  std::cout << fmt::format("  polarised: {} with + to the first node, {} to the second, {} gave way\n", f.polarities[0],
                           f.polarities[1], f.polarities[2]);
  for (const auto& [name, count] : f.polished) std::cout << fmt::format("  largest inside, {}: {}\n", name, count);
  for (const Agreement* a : {&f.bisected, &f.corners, &f.missed, &f.unfound, &f.inside, &f.beyond_corners})
    std::cout << "  " << a->summary() << " in " << a->worst_where() << "\n";
}

}  // namespace

TEST_CASE("worst stress and polarity equal an independent corner solve", "[oracle][stress]") {
  Findings f;
  PopulationSource source(8101);
  Dice dice(8102);
  for (int number = 0; number < kDesigns; ++number) {
    const RandomDesign d = source.next_with_dc();
    f.pnp += d.spec.pnp();
    f.with_dc += d.spec.source.dc != 0 || d.spec.load.dc != 0;
    f.variants.insert(bandwright::variant_of(d.population.printed)->key);
    compare_design(number, d, dice, f);
  }
  report(f);
  CHECK(f.bisected.worst() <= 1e-12);
  INFO(f.corners.summary() << " in " << f.corners.worst_where());
  CHECK(f.corners.worst() <= kCorner);
  CHECK(f.inside.worst() <= kInside);
  CHECK(f.beyond_corners.worst() > kInside);  // polishing is needed
  CHECK(f.missed.worst() <= kSearched);
  CHECK(f.unfound.worst() <= kFallsShort);
  CHECK(f.saturated <= kMostSaturated * kDesigns);
  CHECK(f.variants.size() == 6);
  CHECK(f.pnp >= kDesigns / 10);
  CHECK(f.polarities[0] > 100);
  CHECK(f.polarities[1] > 100);
  CHECK(f.polarities[2] > 20);
}
