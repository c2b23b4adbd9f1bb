// Relative differences between two methods: kept, judged against a bar, and summed up in one line.
#pragma once

#include <string>
#include <vector>

namespace oracle {

/// |value/reference - 1|; both NaN: 0; one NaN: infinity.
double relative_difference(double value, double reference);

class Agreement {
public:
  explicit Agreement(std::string what) : what_(std::move(what)) {}
  void add(double difference, std::string where = {});
  double worst() const { return worst_; }
  const std::string& worst_where() const { return where_; }
  std::size_t count() const { return differences_.size(); }
  double quantile(double share) const;
  std::string summary() const;  ///< "|H|: 150000 values, median 3e-15, 99.9 % 3e-11, worst 5e-11"

private:
  std::string what_, where_;
  std::vector<double> differences_;
  double worst_ = 0;
};

}  // namespace oracle
