// A linear network by nodal analysis in complex long double: one unknown per wire, stamp by stamp, LU.
// Shares nothing with the library: it is the second method its results are held against. A double solve of the same
// matrix is off by 2e-7 at worst on wide circuits, hence long double.
#pragma once

#include <complex>
#include <vector>

namespace oracle {

using Real = long double;
using Complex = std::complex<long double>;

/// Wires are numbered by the caller; wire 0 is 0 V. Resistances of 0 join two wires into one.
class Network {
public:
  explicit Network(int wires);

  void join(int a, int b);
  void resistor(int a, int b, Real ohm);  ///< 0 joins
  void conductance(int a, int b, Real siemens);
  void capacitor(int a, int b, Real farad);
  /// A capacitor whose current is an unknown of its own: one between two wires that neither holds, millifarads at
  /// gigahertz, would else drown every resistor at its ends in the sums of the diagonal.
  void coupling(int a, int b, Real farad);
  /// A current g (v(plus) - v(minus)) that flows from `from` through the element to `to`.
  void controlled_current(int from, int to, int plus, int minus, Real g);

  /// Fixes the wiring: `driven` is held by an ideal voltage source. Nothing may be added afterwards.
  void close(int driven);

  /// v(output) for 1 V on the driven wire, at complex frequency s.
  Complex transfer(Complex s, int output) const;
  /// v(a) - v(b) for a current of 1 A into a and out of b, driven wire at 0 V.
  Complex impedance(Complex s, int a, int b) const;
  /// Derivative of the logarithm of det(G + sC): the sum of 1/(s - pole) over all natural frequencies.
  Complex determinant_slope(Complex s) const;

  /// The stamped matrices: unknowns first, the driven wire last.
  int unknowns() const { return unknowns_; }
  Real g(int row, int column) const;
  Real c(int row, int column) const;
  int unknown(int wire) const;  ///< -1: 0 V; unknowns(): the driven wire

  /// Each stamp alone, for a solve in another arithmetic: stamp(row, column, conductance, capacitance).
  template <class Stamp>
  void visit(Stamp stamp) const;

private:
  struct Element {
    int from, to, plus, minus;
    Real g, c;
  };
  struct Coupling {
    int a, b;
    Real farad;
  };
  int root(int wire) const;

  std::vector<int> parent_;
  std::vector<int> number_;
  std::vector<Element> elements_;
  std::vector<Coupling> couplings_;
  std::vector<Real> g_, c_;  // unknowns x (unknowns + 1), last column: the driven wire
  int unknowns_ = 0;
};

template <class Stamp>
void Network::visit(Stamp stamp) const {
  for (const Element& element : elements_) {
    const int rows[2] = {unknown(element.from), unknown(element.to)};
    const int columns[2] = {unknown(element.plus), unknown(element.minus)};
    for (int r = 0; r < 2; ++r) {
      if (rows[r] < 0 || rows[r] == unknowns_) continue;
      for (int k = 0; k < 2; ++k) {
        const Real sign = r == k ? 1 : -1;
        if (columns[k] >= 0) stamp(rows[r], columns[k], sign * element.g, sign * element.c);
      }
    }
  }
  int current = unknowns_ - static_cast<int>(couplings_.size());
  for (const Coupling& coupling : couplings_) {  // s C (v(a) - v(b)) - i = 0
    const int ends[2] = {unknown(coupling.a), unknown(coupling.b)};
    for (int k = 0; k < 2; ++k) {
      const Real sign = k == 0 ? 1 : -1;
      if (ends[k] >= 0 && ends[k] != unknowns_) stamp(ends[k], current, sign, Real(0));
      if (ends[k] >= 0) stamp(current, ends[k], Real(0), sign * coupling.farad);
    }
    stamp(current, current, Real(-1), Real(0));
    ++current;
  }
}

}  // namespace oracle
