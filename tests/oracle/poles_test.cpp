// Poles and zeros against the determinant of the nodal matrix and against the nodal response.
#include <fmt/format.h>

#include <cmath>
#include <iostream>
#include <numbers>

#include "agreement.hpp"
#include "catch.hpp"
#include "nodal.hpp"
#include "random_circuits.hpp"

using namespace oracle;
using bandwright::Analysis;
using bandwright::BiasState;
using bandwright::PolesAndZeros;

namespace {

constexpr Real kTwoPi = 2 * std::numbers::pi_v<Real>;
constexpr double kPoleSum = 1e-9;  // as the exact response
constexpr double kShape = 1e-8;    // a product of up to eleven roots
constexpr int kCircuits = 1500;

Complex radians(std::complex<double> hertz) { return kTwoPi * Complex(hertz.real(), hertz.imag()); }

/// d ln det(G + sC)/ds is the sum of 1/(s - p) over every natural frequency: one missing, one too many or one misplaced
/// shows at the s near it.
void compare_sum(const Network& net, const PolesAndZeros& found, bool floating_output, const std::string& name,
                 Agreement& agreement) {
  for (Real s = 1e-6L; s < 1e14L; s *= 31.6L) {
    Complex sum = floating_output ? 1 / s : 0;  // the charge on an open output node never moves and never shows
    for (const auto& pole : found.poles) sum += Real(1) / (s - radians(pole));
    agreement.add(static_cast<double>(std::abs(sum / net.determinant_slope(s) - Real(1))), name);
  }
}

Complex shape(const PolesAndZeros& found, Complex s) {
  Complex product = 1;
  for (const auto& zero : found.zeros) product *= s - radians(zero);
  for (const auto& pole : found.poles) product /= s - radians(pole);
  return product;
}

/// H over the product of its roots is one constant at every frequency.
void compare_shape(const Network& net, const PolesAndZeros& found, const std::string& name, Agreement& agreement) {
  const Complex middle(0, kTwoPi * 1e3L);
  const Complex constant = net.transfer(middle, output) / shape(found, middle);
  for (Real f = 1e-3L; f < 2e10L; f *= 10) {
    const Complex s(0, kTwoPi * f);
    agreement.add(static_cast<double>(std::abs(net.transfer(s, output) / shape(found, s) / constant - Real(1))), name);
  }
}

bool rising(const std::vector<std::complex<double>>& roots) {
  for (std::size_t i = 1; i < roots.size(); ++i)
    if (std::abs(roots[i]) < std::abs(roots[i - 1]) * (1 - 1e-12)) return false;
  return true;
}

}  // namespace

TEST_CASE("poles and zeros against the nodal determinant and response", "[oracle][poles]") {
  Agreement sum("sum over poles"), shape_of_h("H over its roots");
  CircuitSource source(4001);
  for (int done = 0, drawn = 0; done < kCircuits; ++drawn) {
    const RandomCircuit c = source.next();
    const Analysis a = analyse(c.stage, c.definition);
    if (a.point.state != BiasState::active) continue;
    ++done;
    const std::string name = fmt::format("circuit {}", drawn);
    INFO(name);
    const Network net = network({widen(c.stage.parts), widen(a.small), c.stage.around, c.definition.from_input});
    const PolesAndZeros found = poles_and_zeros(a.transfer);
    CHECK(rising(found.poles));
    CHECK(rising(found.zeros));
    compare_sum(net, found, c.stage.around.load_conductance == 0, name, sum);
    compare_shape(net, found, name, shape_of_h);
  }
  std::cout << "poles and zeros\n";
  for (const Agreement* a : {&sum, &shape_of_h}) {
    std::cout << "  " << a->summary() << "\n";
    INFO(a->summary() << " in " << a->worst_where());
    CHECK(a->worst() <= (a == &sum ? kPoleSum : kShape));
  }
}
