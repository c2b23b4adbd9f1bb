// Includes every public header and uses the library from outside, down to a whole design.
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
#include <bandwright/search.hpp>
#include <bandwright/spec.hpp>
#include <bandwright/stage.hpp>
#include <bandwright/version.hpp>
#include <iostream>

namespace {

constexpr const char* kSpec = R"({
  "supply": "12 V",
  "requirements": {"gain": "20", "lower_cutoff": {"max": "100 Hz"}, "upper_cutoff": {"min": "20 kHz"}},
  "devices": ["2N3904"],
  "search": {"candidates": 1}
})";

}  // namespace

int main() {
  const double value = bandwright::parse_quantity("4K7", bandwright::Dimension::resistance).value;
  std::cout << "bandwright " << bandwright::version() << " reads 4K7 as " << value << " ohm\n";
  const bandwright::Spec spec = bandwright::read_spec(kSpec, "the stranger's spec");
  const bandwright::DesignResult result = bandwright::design(spec, bandwright::built_in_catalogue());
  std::cout << bandwright::write_csv(result);
  return result.met ? 0 : 1;
}
