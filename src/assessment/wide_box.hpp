// The box of all units with supply and ambient as two more shares: points of it are vectors.
#pragma once

#include <algorithm>
#include <cmath>
#include <optional>
#include <vector>

#include "assessment/unit_box.hpp"
#include "numeric/elementary.hpp"

namespace bandwright {

/// A unit of the box that has been solved.
struct Place {
  BoxPoint point;
  Analysis analysis;
  std::vector<FigureValues> slopes;  ///< of ln|y|, in the box's order, then by supply and ambient; empty: not asked for
  double value(Figure f) const { return analysis.figures[index(f)]; }
};

/// A smooth quotient of figures. A figure is the smallest of its pieces.
struct Piece {
  Figure of;
  std::optional<Figure> over;

  /// NaN where a figure does not exist.
  double log_value(const FigureValues& f) const {
    const double y = f[index(of)] / (over ? f[index(*over)] : 1);
    return std::isnan(y) ? y : ln(std::fabs(y));
  }
  double slope(const FigureValues& s) const { return s[index(of)] - (over ? s[index(*over)] : 0); }
};
using Pieces = std::vector<Piece>;

/// The box with supply and ambient as two more shares.
class WideBox {
public:
  explicit WideBox(const UnitBox& box)
      : box_(box), sides_{Side(&OperatingCondition::supply, box), Side(&OperatingCondition::ambient, box)} {}

  std::size_t size() const { return box_.varying().size() + sides_.size(); }
  std::size_t ambient() const { return size() - 1; }
  bool varies(std::size_t k) const { return k < box_.varying().size() || side(k).span > 0; }

  std::vector<double> shares_of(const BoxPoint& p) const {
    std::vector<double> x;
    for (std::size_t i : box_.varying()) x.push_back(p.z[i]);
    for (const Side& s : sides_) x.push_back(s.span > 0 ? (p.at.*s.member - s.low) / s.span : 0);
    return x;
  }

  Place look(const double* x) const {
    Place p;
    for (std::size_t k = 0; k < box_.varying().size(); ++k) p.point.z[box_.varying()[k]] = x[k];
    for (std::size_t k = box_.varying().size(); k < size(); ++k)
      p.point.at.*side(k).member = side(k).low + x[k] * side(k).span;
    p.analysis = box_.analyse(p.point);
    return p;
  }

  void add_slopes(Place& p) const {
    if (p.slopes.empty()) p.slopes = box_.slopes(p.point, p.analysis, true);
  }

  /// d ln of a piece by a share.
  double slope(const Place& p, const Piece& piece, std::size_t k) const {
    return piece.slope(p.slopes[k]) * (k < box_.varying().size() ? 1 : side(k).span);
  }

private:
  struct Side {
    double OperatingCondition::*member;
    double low, span;

    Side(double OperatingCondition::*m, const UnitBox& box) : member(m) {
      const auto& list = box.population().conditions;
      const auto less = [m](const OperatingCondition& a, const OperatingCondition& b) { return a.*m < b.*m; };
      const auto [first, last] = std::minmax_element(list.begin(), list.end(), less);
      low = (*first).*m;
      span = (*last).*m - low;
    }
  };
  const Side& side(std::size_t k) const { return sides_[k - box_.varying().size()]; }

  const UnitBox& box_;
  std::array<Side, 2> sides_;
};

/// The nominal unit at a condition, with its slopes where it is active.
inline Place nominal_place(const UnitBox& box, const OperatingCondition& at) {
  Place p{box.nominal(at), {}, {}};
  p.analysis = box.analyse(p.point);
  if (p.analysis.point.state == BiasState::active) p.slopes = box.slopes(p.point, p.analysis, true);
  return p;
}

}  // namespace bandwright
