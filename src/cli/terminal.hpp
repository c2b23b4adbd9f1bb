// The terminal: colour, width, the progress line, and the interrupt key.
#pragma once

#include <bandwright/report.hpp>
#include <chrono>
#include <mutex>
#include <string>

namespace bandwright::cli {

/// How a table is printed on standard output: in colour and as wide as the window on a terminal (no colour where
/// NO_COLOR is set or TERM is "dumb"); plain and 100 columns wide otherwise.
TableStyle standard_output_style();

/// A line on standard error while work takes longer than half a second; nothing where that is not a terminal.
class Progress {
public:
  Progress(std::string label, bool quiet);
  ~Progress();
  Progress(const Progress&) = delete;
  Progress& operator=(const Progress&) = delete;
  void show(double share);  ///< 0 to 1; from any thread

private:
  std::string label_;
  bool active_;
  bool shown_ = false;
  std::chrono::steady_clock::time_point next_;
  std::mutex mutex_;
};

/// While it lives, the first interrupt is noted and the second ends the program at once.
class InterruptWatch {
public:
  InterruptWatch();
  ~InterruptWatch();
  InterruptWatch(const InterruptWatch&) = delete;
  InterruptWatch& operator=(const InterruptWatch&) = delete;
  static bool requested();
};

/// Prints each line of a text on standard error as "bandwright: ...".
void complain(const std::string& lines);

}  // namespace bandwright::cli
