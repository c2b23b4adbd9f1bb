// Tolerance allocation: from the loosest class of every part, the part that makes most of the binding limit's spread is
// tightened until the yield is reached; then every tightening that turns out not to be needed is taken back.
#include <algorithm>
#include <bandwright/assessment.hpp>
#include <bandwright/stress.hpp>
#include <cmath>

#include "analysis/unit.hpp"
#include "assessment/estimate.hpp"
#include "assessment/simulation.hpp"
#include "assessment/variance.hpp"

namespace bandwright {

namespace {

constexpr double kSameValue = 1e-9;
constexpr double kWorthwhile = 1e-3;  // of a limit's variance: less is not worth a tighter part
constexpr int kMostSteps = 60;

struct Class {
  const Family* family;
  Tolerance tolerance;
};

bool is_made(const Family& f, double value) {
  const auto holds = [value](const std::string& name) {
    const Series* s = find_series(name);
    return s != nullptr && in_series(*s, value);
  };
  return value >= f.made.min * (1 - kSameValue) && value <= f.made.max * (1 + kSameValue) &&
         std::any_of(f.series.begin(), f.series.end(), holds);
}

bool is_allowed(const Family& f, const Spec& spec, const OfferedValue& part) {
  const PartRules& rules = f.kind == PartKind::resistor ? spec.parts.resistors : spec.parts.capacitors;
  if (&f == part.family) return true;
  const bool named = std::find(rules.families.begin(), rules.families.end(), f.key) != rules.families.end();
  return rules.families.empty() ? f.bias_loss == 0 : named;
}

/// The classes a part can be bought in, loosest first, one for each tolerance; the part's own family is preferred.
/// Another family must have a rating above the part's stress.
std::vector<Class> classes_of(const Spec& spec, const Catalogue& catalogue, const OfferedValue& part, double volts,
                              double watts) {
  std::vector<Class> list = {{part.family, part.tolerance}};
  const auto add = [&list](const Family& f) {
    for (const Tolerance& t : f.tolerances) {
      const bool known = std::any_of(list.begin(), list.end(), [&](const Class& c) { return c.tolerance == t; });
      if (!known) list.push_back({&f, t});
    }
  };
  add(*part.family);
  for (const Family& f : catalogue.families) {
    const bool fits = f.kind == part.family->kind && is_made(f, part.value) && is_allowed(f, spec, part);
    OfferedValue other;
    other.family = &f;
    if (fits && rating_that_holds(other, spec.parts.derating, volts, watts)) add(f);
  }
  std::stable_sort(list.begin(), list.end(),
                   [](const Class& a, const Class& b) { return half_width(a.tolerance) > half_width(b.tolerance); });
  return list;
}

ToleranceClass shown(const Class& c) { return {c.family->name, c.tolerance}; }

class Allocator {
public:
  Allocator(const Spec& spec, const Catalogue& catalogue, const BipolarParameters& device, const OfferedParts& parts,
            const Analysis& nominal)
      : spec_(spec), device_(device), parts_(parts), nominal_(nominal) {
    const WorstStress stress = worst_stress(spec, population_of(spec, device, parts, nominal));
    for (std::size_t i = 0; i < kRoleCount; ++i) {
      if (parts[i].value > 0 && parts[i].family != nullptr)
        classes_[i] = classes_of(spec, catalogue, parts[i], stress.volts[i].largest(), stress.watts[i].largest());
    }
  }

  Allocation run() {
    Allocation a;
    a.yield = trial();
    while (a.yield.share() < spec_.assess.yield && static_cast<int>(a.steps.size()) < kMostSteps) {
      const std::size_t role = most_useful();
      if (role == kRoleCount) break;
      AllocationStep step{static_cast<Role>(role), shown(now(role)), {}, a.yield.share(), 0};
      ++level_[role];
      a.yield = trial();
      step.to = shown(now(role));
      step.yield_after = a.yield.share();
      a.steps.push_back(step);
    }
    a.reached = a.yield.share() >= spec_.assess.yield;
    take_back(a, std::min(spec_.assess.yield, a.yield.share()));
    for (std::size_t i = 0; i < kRoleCount; ++i) {
      if (classes_[i].empty()) continue;
      a.parts.push_back({static_cast<Role>(i), shown(classes_[i].front()), shown(now(i)), if_looser(i)});
    }
    return a;
  }

private:
  const Class& now(std::size_t role) const { return classes_[role][level_[role]]; }

  Population units() const {
    OfferedParts parts = parts_;
    for (std::size_t i = 0; i < kRoleCount; ++i) {
      if (classes_[i].empty()) continue;
      parts[i].family = now(i).family;
      parts[i].tolerance = now(i).tolerance;
    }
    return population_of(spec_, device_, parts, nominal_);
  }

  Yield trial() const { return simulated_yield(spec_, units()); }

  /// The part whose next class takes most from the spread of the limit that is nearest in its own spread.
  std::size_t most_useful() {
    const Population p = units();
    const Sensitivity s =
        sensitivity(nominal_stage(p, p.conditions.front()), nominal_, p.definition, ResponseModel::exact, all_causes());
    std::vector<LimitDistance> limits = limit_distances(spec_, p, nominal_, s);
    std::stable_sort(limits.begin(), limits.end(),
                     [](const LimitDistance& a, const LimitDistance& b) { return a.capability() < b.capability(); });
    for (const LimitDistance& limit : limits) {
      const auto& row = s[index(limit.figure)];
      const double whole = root_sum_square(row, relative_widths(p, p.conditions.front().ambient));
      std::size_t best = kRoleCount;
      double most = kWorthwhile * whole * whole;
      for (std::size_t i = 0; i < kRoleCount; ++i) {
        if (classes_[i].empty() || level_[i] + 1 == classes_[i].size()) continue;
        const double wide = half_width(now(i).tolerance), tight = half_width(classes_[i][level_[i] + 1].tolerance);
        const double taken = row[i] * row[i] * (wide * wide - tight * tight);
        if (taken > most) most = taken, best = i;
      }
      if (best != kRoleCount) return best;
    }
    return kRoleCount;
  }

  /// Each part one class looser, as long as the share that passes holds.
  void take_back(Allocation& a, double needed) {
    for (bool changed = true; changed;) {
      changed = false;
      for (std::size_t i = 0; i < kRoleCount; ++i) {
        if (classes_[i].empty() || level_[i] == 0) continue;
        --level_[i];
        const Yield y = trial();
        if (y.share() >= needed) {
          a.yield = y;
          changed = true;
        } else {
          ++level_[i];
        }
      }
    }
  }

  double if_looser(std::size_t role) {
    if (level_[role] == 0) return kNotComputed;
    --level_[role];
    const double share = trial().share();
    ++level_[role];
    return share;
  }

  const Spec& spec_;
  const BipolarParameters& device_;
  const OfferedParts& parts_;
  const Analysis& nominal_;
  std::array<std::vector<Class>, kRoleCount> classes_;
  std::array<std::size_t, kRoleCount> level_{};
};

}  // namespace

Allocation allocate_tolerances(const Spec& spec, const Catalogue& catalogue, const BipolarParameters& device,
                               const OfferedParts& parts, const Analysis& nominal) {
  return Allocator(spec, catalogue, device, parts, nominal).run();
}

}  // namespace bandwright
