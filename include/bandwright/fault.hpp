// Faults: what is wrong with an input, said so that a person can mend it.
//
// Every reader of the library collects all faults of its input and throws them together.
// A numerical outcome (a stage that saturates, a cutoff that does not exist) is not a fault:
// it is reported in the result.
#pragma once

#include <stdexcept>
#include <string>
#include <vector>

namespace bandwright {

/// One fault of an input.
struct Fault {
  std::string where;       ///< JSON path, option or line: "requirements.gain.target", "--gain", "line 3"
  std::string found;       ///< what stands there, quoted as given; empty: nothing
  std::string expected;    ///< what would be right
  std::string suggestion;  ///< the nearest known name, or empty
};

/// "requirements.gain.target: found "34 x"; expected a gain such as 50 or 34 dB"
std::string describe(const Fault& fault);

/// Bad input: holds every fault found. what() gives one line a fault.
class InputError : public std::runtime_error {
public:
  explicit InputError(std::vector<Fault> faults);
  const std::vector<Fault>& faults() const noexcept { return faults_; }

private:
  std::vector<Fault> faults_;
};

/// A file that could not be read or written.
class FileError : public std::runtime_error {
public:
  using std::runtime_error::runtime_error;
};

}  // namespace bandwright
