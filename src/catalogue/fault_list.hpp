// The faults of a long file: the first of them in full, the rest counted, so that no file drowns what matters.
#pragma once

#include <bandwright/fault.hpp>
#include <cstddef>
#include <string>
#include <utility>
#include <vector>

namespace bandwright {

class FaultList {
public:
  static constexpr std::size_t kMostShown = 50;

  /// `file` is the name under which the rest is told.
  explicit FaultList(std::string file) : file_(std::move(file)) {}

  const std::string& file() const { return file_; }
  std::size_t count() const { return count_; }

  /// Adds the fault that `describe` returns; it is called only where the fault will be shown.
  template <class Describe>
  void add(Describe describe) {
    if (++count_ <= kMostShown) shown_.push_back(describe());
  }

  /// Throws InputError where there is a fault.
  void throw_if_any() {
    if (count_ == 0) return;
    if (count_ > kMostShown)
      shown_.push_back({file_, "and " + std::to_string(count_ - kMostShown) + " more",
                        "no fault; only the first " + std::to_string(kMostShown) + " are shown", ""});
    throw InputError(std::move(shown_));
  }

private:
  std::string file_;
  std::size_t count_ = 0;
  std::vector<Fault> shown_;
};

}  // namespace bandwright
