#include "agreement.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <limits>

namespace oracle {

double relative_difference(double value, double reference) {
  if (std::isnan(value) != std::isnan(reference)) return std::numeric_limits<double>::infinity();
  if (std::isnan(value) || value == reference) return 0;
  return std::fabs(value - reference) / std::fabs(reference);
}

void Agreement::add(double difference, std::string where) {
  differences_.push_back(difference);
  if (!(difference <= worst_)) worst_ = difference, where_ = std::move(where);
}

double Agreement::quantile(double share) const {
  if (differences_.empty()) return 0;
  std::vector<double> sorted = differences_;
  const auto at = static_cast<std::size_t>(share * static_cast<double>(sorted.size() - 1));
  std::nth_element(sorted.begin(), sorted.begin() + static_cast<std::ptrdiff_t>(at), sorted.end());
  return sorted[at];
}

std::string Agreement::summary() const {
  return fmt::format("{:<34} {:>7} values, median {:.1e}, 99.9 % {:.1e}, worst {:.1e}", what_, count(), quantile(0.5),
                     quantile(0.999), worst_);
}

}  // namespace oracle
