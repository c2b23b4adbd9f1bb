#include "catalogue/pairs.hpp"

#include <algorithm>
#include <cmath>

namespace bandwright {

namespace {

constexpr double kAlike = 0.1;  // of the tolerance: closer pairs are not told apart

double both(double a, double b, bool sum) { return sum ? a + b : a * b / (a + b); }

PairedPart half_of(const OfferedValue& o) { return {o.value, o.tolerance, o.series, o.stock, o.unit_cost}; }

PartKind kind_of(const OfferedValue& o) { return o.family == nullptr ? PartKind::resistor : o.family->kind; }

bool may_join(const OfferedValue& a, const OfferedValue& b, Connection connection, int boards) {
  if (a.family != b.family || a.family == nullptr) return false;
  if (a.family->polarised && connection == Connection::series) return false;
  const bool short_of = &a == &b && a.stock != nullptr && a.stock->quantity && *a.stock->quantity < 2L * boards;
  return !short_of;
}

bool cheaper(const OfferedValue& a, const OfferedValue& b) { return a.unit_cost < b.unit_cost; }

}  // namespace

bool adds_up(PartKind kind, Connection connection) {
  return (kind == PartKind::resistor) == (connection == Connection::series);
}

double paired_value(PartKind kind, Connection connection, double first, double second) {
  return both(first, second, adds_up(kind, connection));
}

OfferedValue joined(const OfferedValue& a, const OfferedValue& b, Connection connection) {
  const bool sum = adds_up(kind_of(a), connection);
  OfferedValue o = a;
  o.value = both(a.value, b.value, sum);
  o.working_value = both(a.working_value, b.working_value, sum);
  const double low = both(a.value * (1 - a.tolerance.below), b.value * (1 - b.tolerance.below), sum);
  const double high = both(a.value * (1 + a.tolerance.above), b.value * (1 + b.tolerance.above), sum);
  o.tolerance = {1 - low / o.value, high / o.value - 1};
  o.series = nullptr;
  o.stock = nullptr;
  o.unit_cost = a.unit_cost + b.unit_cost;
  o.invented_cost = a.invented_cost || b.invented_cost;
  o.connection = connection;
  o.pair = {half_of(a), half_of(b)};
  return o;
}

OfferedValue resolve_pair(const Catalogue& catalogue, const Spec& spec, Role role, const PartChoice& wanted) {
  std::array<OfferedValue, 2> half;
  for (std::size_t i = 0; i < 2; ++i) {
    PartChoice one = wanted;
    one.connection = Connection::single;
    one.value = wanted.pair[i];
    one.part_number.clear();
    half[i] = resolve_value(catalogue, spec, role, one);
  }
  return joined(half[0], half[1], wanted.connection);
}

std::vector<OfferedValue> pairs_between(const std::vector<OfferedValue>& offered, int boards, double low, double high) {
  std::vector<OfferedValue> list;
  for (std::size_t i = 0; i < offered.size(); ++i) {
    for (std::size_t k = i; k < offered.size(); ++k) {
      for (const Connection connection : {Connection::series, Connection::parallel}) {
        if (!may_join(offered[i], offered[k], connection, boards)) continue;
        const double v =
            both(offered[i].working_value, offered[k].working_value, adds_up(kind_of(offered[i]), connection));
        if (v >= low && v <= high) list.push_back(joined(offered[k], offered[i], connection));
      }
    }
  }
  std::stable_sort(list.begin(), list.end(),
                   [](const auto& a, const auto& b) { return a.working_value < b.working_value; });
  std::vector<OfferedValue> kept;
  for (const OfferedValue& o : list) {
    const bool alike =
        !kept.empty() && o.working_value <= kept.back().working_value * (1 + kAlike * kept.back().tolerance.above);
    if (!alike)
      kept.push_back(o);
    else if (cheaper(o, kept.back()))
      kept.back() = o;
  }
  return kept;
}

}  // namespace bandwright
