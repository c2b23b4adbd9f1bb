#include "network.hpp"

#include <Eigen/LU>
#include <cassert>

namespace oracle {

namespace {
constexpr int kMostUnknowns = 10;
using Matrix = Eigen::Matrix<Complex, Eigen::Dynamic, Eigen::Dynamic, 0, kMostUnknowns, kMostUnknowns>;
using Vector = Eigen::Matrix<Complex, Eigen::Dynamic, 1, 0, kMostUnknowns, 1>;

Matrix admittance(const Network& network, Complex s) {
  const int n = network.unknowns();
  Matrix y(n, n);
  for (int i = 0; i < n; ++i)
    for (int k = 0; k < n; ++k) y(i, k) = network.g(i, k) + s * network.c(i, k);
  return y;
}
}  // namespace

Network::Network(int wires) : parent_(static_cast<std::size_t>(wires)) {
  for (int w = 0; w < wires; ++w) parent_[static_cast<std::size_t>(w)] = w;
}

int Network::root(int wire) const {
  while (parent_[static_cast<std::size_t>(wire)] != wire) wire = parent_[static_cast<std::size_t>(wire)];
  return wire;
}

void Network::join(int a, int b) {
  const int ra = root(a), rb = root(b);
  parent_[static_cast<std::size_t>(ra > rb ? ra : rb)] = ra > rb ? rb : ra;  // 0 V stays the root
}

void Network::resistor(int a, int b, Real ohm) {
  if (ohm == 0)
    join(a, b);
  else
    conductance(a, b, 1 / ohm);
}

void Network::conductance(int a, int b, Real siemens) { elements_.push_back({a, b, a, b, siemens, 0}); }

void Network::capacitor(int a, int b, Real farad) { elements_.push_back({a, b, a, b, 0, farad}); }

void Network::coupling(int a, int b, Real farad) { couplings_.push_back({a, b, farad}); }

void Network::controlled_current(int from, int to, int plus, int minus, Real g) {
  elements_.push_back({from, to, plus, minus, g, 0});
}

void Network::close(int driven) {
  number_.assign(parent_.size(), -1);
  unknowns_ = 0;
  for (int w = 1; w < static_cast<int>(parent_.size()); ++w)
    if (root(w) == w && w != root(driven)) number_[static_cast<std::size_t>(w)] = unknowns_++;
  unknowns_ += static_cast<int>(couplings_.size());
  assert(root(driven) != 0 && unknowns_ <= kMostUnknowns);
  number_[static_cast<std::size_t>(root(driven))] = unknowns_;
  const auto size = static_cast<std::size_t>(unknowns_ * (unknowns_ + 1));
  g_.assign(size, 0);
  c_.assign(size, 0);
  visit([this](int row, int column, Real conductance, Real capacitance) {
    const auto at = static_cast<std::size_t>(row * (unknowns_ + 1) + column);
    g_[at] += conductance;
    c_[at] += capacitance;
  });
}

int Network::unknown(int wire) const { return number_[static_cast<std::size_t>(root(wire))]; }

Real Network::g(int row, int column) const { return g_[static_cast<std::size_t>(row * (unknowns_ + 1) + column)]; }

Real Network::c(int row, int column) const { return c_[static_cast<std::size_t>(row * (unknowns_ + 1) + column)]; }

Complex Network::transfer(Complex s, int output) const {
  const int out = unknown(output);
  if (out < 0) return 0;
  if (out == unknowns_) return 1;
  Vector current(unknowns_);
  for (int i = 0; i < unknowns_; ++i) current(i) = -(g(i, unknowns_) + s * c(i, unknowns_));
  return admittance(*this, s).partialPivLu().solve(current)(out);
}

Complex Network::impedance(Complex s, int a, int b) const {
  const int ends[2] = {unknown(a), unknown(b)};
  Vector current = Vector::Zero(unknowns_);
  for (int k = 0; k < 2; ++k)
    if (ends[k] >= 0 && ends[k] < unknowns_) current(ends[k]) += k == 0 ? 1 : -1;
  const Vector v = admittance(*this, s).partialPivLu().solve(current);
  const auto voltage = [&](int u) { return u >= 0 && u < unknowns_ ? v(u) : Complex(0); };
  return voltage(ends[0]) - voltage(ends[1]);
}

Complex Network::determinant_slope(Complex s) const {
  Matrix capacitances(unknowns_, unknowns_);
  for (int i = 0; i < unknowns_; ++i)
    for (int k = 0; k < unknowns_; ++k) capacitances(i, k) = c(i, k);
  return admittance(*this, s).partialPivLu().solve(capacitances).trace();
}

}  // namespace oracle
