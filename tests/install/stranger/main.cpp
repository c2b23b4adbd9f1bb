// Includes every public header and uses the library from outside.
#include <bandwright/analysis.hpp>
#include <bandwright/assessment.hpp>
#include <bandwright/catalogue.hpp>
#include <bandwright/design.hpp>
#include <bandwright/device.hpp>
#include <bandwright/fault.hpp>
#include <bandwright/figure.hpp>
#include <bandwright/margins.hpp>
#include <bandwright/purchase.hpp>
#include <bandwright/quantity.hpp>
#include <bandwright/ranking.hpp>
#include <bandwright/report.hpp>
#include <bandwright/role.hpp>
#include <bandwright/spec.hpp>
#include <bandwright/stage.hpp>
#include <bandwright/version.hpp>
#include <iostream>

int main() {
  const double value = bandwright::parse_quantity("4K7", bandwright::Dimension::resistance).value;
  std::cout << "bandwright " << bandwright::version() << " reads 4K7 as " << value << " ohm\n";
}
