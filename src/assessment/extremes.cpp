#include "assessment/extremes.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <nlopt.hpp>
#include <optional>

#include "assessment/wide_box.hpp"

namespace bandwright {

namespace {

constexpr int kMostSteps = 12;        // from corner to corner
constexpr int kMostRounds = 3;        // of turning single causes
constexpr int kPolishSteps = 60;      // evaluations at most
constexpr double kInward = 1e-8;      // of ln y: what can be won inside is rounding
constexpr double kConstraint = 1e-9;  // of ln y

/// The swing is the smaller of two sides; all other figures are smooth.
Pieces pieces_of(Figure figure) {
  if (figure == Figure::output_swing) return {{Figure::swing_to_cutoff, {}}, {Figure::swing_to_saturation, {}}};
  if (figure == Figure::input_overload)
    return {{Figure::swing_to_cutoff, Figure::gain}, {Figure::swing_to_saturation, Figure::gain}};
  return {{figure, {}}};
}

/// Climbs to where sign ln y is highest; y is the smallest of the pieces.
class Ascent {
  using Coordinates = std::vector<double>;

public:
  Ascent(const WideBox& box, Pieces pieces, double sign) : box_(box), pieces_(std::move(pieces)), sign_(sign) {}

  const Place& best() const { return best_; }
  double height() const { return height_; }
  const std::optional<Place>& failed() const { return failed_; }  ///< the first corner without a value

  /// Looks at the corners that the slopes at a place ask for.
  void look_from(Place seed) {
    box_.add_slopes(seed);
    const Coordinates x = box_.shares_of(seed.point);
    for (const Piece& piece : pieces_) look_at(corner(x, seed, piece));
  }

  /// From corner to corner while that is better: all shares turned that ask for it, else the one that asks most.
  void climb() {
    for (int i = 0; i < kMostSteps; ++i) {
      box_.add_slopes(best_);
      const Piece& piece = smallest(best_);
      if (!look_at(corner(x_, best_, piece)) && !look_at(strongest_turned(piece))) return;
    }
  }

  /// Looks from the corner that is farthest from the best: the highest of two humps may stand on the other side.
  void cross() {
    Coordinates x = x_;
    for (double& share : x) share = share > 0.5 ? 0 : 1;
    const Place across = box_.look(x.data());
    if (std::isnan(height_of(across))) return;
    look_from(across);
    climb();
  }

  /// Turns each share alone: a figure may have a hump at both of its ends.
  void turn() {
    for (int round = 0; round < kMostRounds; ++round) {
      bool better = false;
      for (std::size_t k = 0; k < box_.size(); ++k) better = (box_.varies(k) && look_at(turned(k))) || better;
      if (!better) return;
      climb();
    }
  }

  /// Bounded local search where the corner is not yet the extreme, from both ends of the ambient: parts and cold
  /// capacitors make a hump on each side of room temperature.
  void polish() {
    if (!(won_inside() > kInward)) return;
    const Coordinates other_end = turned(box_.ambient());
    search_from(x_);
    if (box_.varies(box_.ambient())) search_from(other_end);
  }

private:
  const Piece& smallest(const Place& p) const {
    const FigureValues& f = p.analysis.figures;
    return *std::min_element(pieces_.begin(), pieces_.end(),
                             [&f](const Piece& a, const Piece& b) { return a.log_value(f) < b.log_value(f); });
  }

  double height_of(const Place& p) const { return sign_ * smallest(p).log_value(p.analysis.figures); }

  /// True where the point is better than the best.
  bool look_at(const Coordinates& x) { return take(x.data(), box_.look(x.data())); }
  bool take(const double* x, const Place& here) {
    const double h = height_of(here);
    if (std::isnan(h) && !failed_) failed_ = here;
    if (!(h > height_)) return false;
    x_.assign(x, x + box_.size());
    best_ = here;
    height_ = h;
    return true;
  }

  double pull(const Place& at, const Piece& piece, std::size_t k) const { return sign_ * box_.slope(at, piece, k); }

  /// What can be won, to first order, by moving a share of the best place to the end that its slope asks for.
  double won(const Piece& piece, std::size_t k) const {
    const double slope = pull(best_, piece, k);
    return slope > 0 ? (1 - x_[k]) * slope : -x_[k] * slope;
  }

  double won_inside() {
    box_.add_slopes(best_);
    double sum = 0;
    for (std::size_t k = 0; k < box_.size(); ++k) sum += won(smallest(best_), k);
    return sum;
  }

  /// Every share at the end that its slope asks for.
  Coordinates corner(Coordinates x, const Place& seed, const Piece& piece) const {
    for (std::size_t k = 0; k < box_.size(); ++k) {
      const double slope = pull(seed, piece, k);
      x[k] = slope > 0 ? 1 : slope < 0 ? 0 : x[k] > 0.5 ? 1 : 0;
    }
    return x;
  }

  Coordinates turned(std::size_t k) const {
    Coordinates x = x_;
    x[k] = x[k] > 0.5 ? 0 : 1;
    return x;
  }

  Coordinates strongest_turned(const Piece& piece) const {
    std::size_t strongest = 0;
    for (std::size_t k = 1; k < box_.size(); ++k)
      if (won(piece, k) > won(piece, strongest)) strongest = k;
    return turned(strongest);
  }

  /// Highest level under all pieces: the largest t with t <= sign ln y of each.
  void search_from(Coordinates x) {
    constexpr double kInfinity = std::numeric_limits<double>::infinity();
    Coordinates low(x.size(), 0.0), high(x.size(), 1.0);
    x.push_back(height_);
    low.push_back(-kInfinity);
    high.push_back(kInfinity);
    nlopt::opt optimiser(nlopt::LD_SLSQP, static_cast<unsigned>(x.size()));
    optimiser.set_lower_bounds(low);
    optimiser.set_upper_bounds(high);
    optimiser.set_maxeval(kPolishSteps);
    optimiser.set_xtol_rel(1e-9);
    optimiser.set_max_objective(level, nullptr);
    optimiser.add_inequality_mconstraint(above_pieces, this, Coordinates(pieces_.size(), kConstraint));
    double value = 0;
    try {
      optimiser.optimize(x, value);
    } catch (const std::exception&) {
      // NLopt reports a halt on rounding as an exception; the best point is kept here
    }
  }

  static double level(const Coordinates& x, Coordinates& gradient, void*) {
    std::fill(gradient.begin(), gradient.end(), 0.0);
    if (!gradient.empty()) gradient.back() = 1;
    return x.back();
  }

  /// How far the level stands above each piece.
  static void above_pieces(unsigned m, double* result, unsigned n, const double* x, double* gradient, void* self) {
    Ascent& a = *static_cast<Ascent*>(self);
    Place here = a.box_.look(x);
    a.take(x, here);
    const bool known = !std::isnan(a.height_of(here));
    if (known && gradient != nullptr) a.box_.add_slopes(here);
    for (std::size_t i = 0; i < m; ++i) {
      result[i] = known ? x[n - 1] - a.sign_ * a.pieces_[i].log_value(here.analysis.figures) : 1;
      if (gradient == nullptr) continue;
      for (std::size_t k = 0; k + 1 < n; ++k) gradient[i * n + k] = known ? -a.pull(here, a.pieces_[i], k) : 0;
      gradient[i * n + n - 1] = 1;
    }
  }

  const WideBox& box_;
  Pieces pieces_;
  double sign_;
  Coordinates x_;  ///< of the best place
  Place best_;
  double height_ = -std::numeric_limits<double>::infinity();
  std::optional<Place> failed_;
};

}  // namespace

Extremes extremes(const UnitBox& box, Figure figure, const std::vector<Place>& nominal, bool polish) {
  // where one of the pieces is lowest, the smallest of them is
  const Pieces pieces = pieces_of(figure);
  const WideBox wide(box);
  std::vector<Ascent> ways = {Ascent(wide, pieces, 1)};
  for (const Piece& piece : pieces) ways.emplace_back(wide, Pieces{piece}, -1);
  Extremes e;
  for (Ascent& way : ways) {
    for (const Place& n : nominal) way.look_from(n);
    if (!way.failed()) way.climb();
    if (way.failed()) {
      e.failed = way.failed();
      return e;
    }
    way.cross();
    way.turn();
    if (polish) way.polish();
  }
  e.high = ways[0].best();
  e.low = std::max_element(ways.begin() + 1, ways.end(), [](const Ascent& a, const Ascent& b) {
            return a.height() < b.height();
          })->best();
  return e;
}

}  // namespace bandwright
