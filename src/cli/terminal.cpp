#include "cli/terminal.hpp"

#include <fmt/format.h>
#include <sys/ioctl.h>
#include <unistd.h>

#include <csignal>
#include <cstdlib>
#include <cstring>
#include <string_view>

namespace bandwright::cli {

namespace {

using Clock = std::chrono::steady_clock;
constexpr auto kPatience = std::chrono::milliseconds(500);
constexpr auto kBeat = std::chrono::milliseconds(200);

volatile std::sig_atomic_t interrupt_seen = 0;
struct sigaction earlier_action;

bool is_set(const char* variable) {
  const char* value = std::getenv(variable);
  return value != nullptr && *value != '\0';
}

bool is_dumb_terminal() {
  const char* kind = std::getenv("TERM");
  return kind != nullptr && std::strcmp(kind, "dumb") == 0;
}

// A message that cannot be printed has no one to be reported to.
void to_standard_error(std::string_view text) {
  while (!text.empty()) {
    const ssize_t written = ::write(STDERR_FILENO, text.data(), text.size());
    if (written <= 0) return;
    text.remove_prefix(static_cast<std::size_t>(written));
  }
}

void note_interrupt(int) { interrupt_seen = 1; }

}  // namespace

TableStyle standard_output_style() {
  TableStyle style;
  if (::isatty(STDOUT_FILENO) == 0) return style;
  style.colour = !is_set("NO_COLOR") && !is_dumb_terminal();
  winsize window = {};
  if (::ioctl(STDOUT_FILENO, TIOCGWINSZ, &window) == 0 && window.ws_col > 0) style.width = window.ws_col;
  return style;
}

Progress::Progress(std::string label, bool quiet)
    : label_(std::move(label)),
      active_(!quiet && ::isatty(STDERR_FILENO) != 0 && !is_dumb_terminal()),
      next_(Clock::now() + kPatience) {}

Progress::~Progress() {
  if (shown_) to_standard_error("\r\x1b[K");
}

void Progress::show(double share) {
  if (!active_) return;
  const std::lock_guard lock(mutex_);
  const auto now = Clock::now();
  if (now < next_) return;
  next_ = now + kBeat;
  shown_ = true;
  to_standard_error(fmt::format("\r{} {:.0f} %\x1b[K", label_, 100 * share));
}

InterruptWatch::InterruptWatch() {
  interrupt_seen = 0;
  ::sigaction(SIGINT, nullptr, &earlier_action);
  if (earlier_action.sa_handler == SIG_IGN) return;  // started in the background: not ours to take
  struct sigaction action = {};
  action.sa_handler = note_interrupt;
  action.sa_flags = static_cast<int>(SA_RESETHAND | SA_RESTART);
  ::sigaction(SIGINT, &action, nullptr);
}

InterruptWatch::~InterruptWatch() { ::sigaction(SIGINT, &earlier_action, nullptr); }

bool InterruptWatch::requested() { return interrupt_seen != 0; }

void complain(const std::string& lines) {
  std::string_view rest = lines;
  std::string text;
  while (!rest.empty()) {
    const std::size_t end = std::min(rest.find('\n'), rest.size());
    text += fmt::format("bandwright: {}\n", rest.substr(0, end));
    rest.remove_prefix(std::min(end + 1, rest.size()));
  }
  to_standard_error(text);
}

}  // namespace bandwright::cli
