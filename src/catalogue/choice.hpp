// Which families may serve a kind of part under a spec's rules, and which one serves a value.
#pragma once

#include <bandwright/catalogue.hpp>
#include <vector>

namespace bandwright {

/// Two values within this share are one: decimal fractions carry floating noise.
inline constexpr double kSameValue = 1e-9;
inline bool at_least(double value, double limit) { return value >= limit * (1 - kSameValue); }
inline bool at_most(double value, double limit) { return value <= limit * (1 + kSameValue); }
inline bool same_value(double a, double b) { return at_least(a, b) && at_most(a, b); }

inline bool holds(const ValueRange& range, double value) {
  return range.max > 0 && at_least(value, range.min) && at_most(value, range.max);
}

inline const PartRules& rules_for(const Spec& spec, Role role) {
  return info(role).kind == PartKind::resistor ? spec.parts.resistors : spec.parts.capacitors;
}

/// The tolerance a family is bought with where one no wider than `wanted` is asked for: its usual one, else the widest
/// that fits on both sides; nothing where it offers none.
std::optional<Tolerance> bought_tolerance(const Family& family, const std::optional<Tolerance>& wanted);

struct OfferedFamily {
  const Family* family;
  Tolerance tolerance;
};

class Choice {
public:
  /// The families that the rules allow, in order: as named, else by rising first choice.
  Choice(const Catalogue& catalogue, const PartRules& rules, PartKind kind);

  /// The same with the rules' tolerance set aside and each family at its tightest.
  static Choice tightest(const Catalogue& catalogue, const PartRules& rules, PartKind kind);

  const std::vector<OfferedFamily>& families() const { return families_; }

  /// The family that serves a value; nullptr where none is made there.
  const OfferedFamily* at(double value) const;
  /// Every named family that is made at a value, in order; without names the one that serves it.
  std::vector<const OfferedFamily*> all_at(double value) const;
  /// The one that serves; where none does, the one whose range lies nearest; nullptr where there is no family.
  const OfferedFamily* nearest(double value) const;

  /// From the lowest to the highest first choice; of named families, all that they are made in.
  ValueRange usual_range() const;

private:
  Choice() = default;
  const ValueRange& own_range(const OfferedFamily& f) const { return named_ ? f.family->made : f.family->first_choice; }

  std::vector<OfferedFamily> families_;
  bool named_ = false;
};

}  // namespace bandwright
