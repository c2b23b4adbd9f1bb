#include <fmt/format.h>

#include <bandwright/fault.hpp>
#include <utility>

#include "units/printable.hpp"

namespace bandwright {

namespace {

std::string one_line_each(const std::vector<Fault>& faults) {
  std::string out;
  for (const Fault& fault : faults) {
    if (!out.empty()) out += '\n';
    out += describe(fault);
  }
  return out;
}

}  // namespace

std::string describe(const Fault& fault) {
  std::string out;
  if (!fault.where.empty()) out = printable(fault.where, 200) + ": ";
  out += fault.found.empty() ? "nothing found" : fmt::format("found \"{}\"", printable(fault.found));
  out += "; expected " + fault.expected;
  if (!fault.suggestion.empty()) out += fmt::format("; did you mean \"{}\"?", fault.suggestion);
  return out;
}

InputError::InputError(std::vector<Fault> faults)
    : std::runtime_error(one_line_each(faults)), faults_(std::move(faults)) {}

}  // namespace bandwright
